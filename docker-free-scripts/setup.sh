# What start.sh, test.sh and db.sh share: Debian packages, npm ci, the production build, ports and processes.
# Sourced, never run. Expects bash with set -euo pipefail; sets ROOT and DATA and moves to ROOT.

ROOT=$(cd "$(dirname "${BASH_SOURCE[0]}")/.." && pwd -P)
DATA=$ROOT/.data
cd "$ROOT"
export NEXT_TELEMETRY_DISABLED=1

say() { printf '%s\n' "$*"; }
fail() { printf 'ohmstead: %s\n' "$*" >&2; exit 1; }

# Secrets and data in .data are nobody else's business; 0711 still lets the postgres user reach its own cluster inside.
make_data_folder() {
  mkdir -p "$DATA" "$DATA/logs" "$DATA/run" 2>/dev/null && [ -w "$DATA" ] ||
    fail "can't write in $DATA. It belongs to another user: run as that user, or 'sudo chown -R $(id -un) $DATA'."
  chmod 0711 "$DATA"
  chmod 0700 "$DATA/logs" "$DATA/run"
}

as_root() {
  if [ "$(id -u)" = 0 ]; then "$@"
  elif ! command -v sudo >/dev/null; then return 1
  elif [ -t 0 ]; then sudo "$@"
  else sudo -n "$@"
  fi
}

# package_here NAME: what proves that the package works, not that dpkg lists it.
package_here() {
  case $1 in
    postgresql) compgen -G '/usr/lib/postgresql/*/bin/initdb' >/dev/null ;;
    chromium) command -v chromium >/dev/null ;;
    ngspice) command -v ngspice >/dev/null ;;
    kicad-symbols) [ -d /usr/share/kicad/symbols ] ;;
    poppler-utils) command -v pdftotext >/dev/null ;;
    *) dpkg -s "$1" >/dev/null 2>&1 ;;
  esac
}

# need_packages NAME…: installs from Debian what is missing.
need_packages() {
  local name missing=() no_cluster=/etc/postgresql-common/createcluster.d/ohmstead.conf log=$DATA/logs/apt.log
  for name in "$@"; do package_here "$name" || missing+=("$name"); done
  [ ${#missing[@]} -gt 0 ] || return 0
  command -v apt-get >/dev/null || fail "missing: ${missing[*]}. Install them, then run this again."
  say "Installing from Debian: ${missing[*]}"
  as_root true 2>/dev/null || fail "needs sudo to install ${missing[*]}: run 'sudo apt-get install ${missing[*]}' first, then this again."
  # Debian's postgresql makes and starts a system cluster when installed; this one must bring only its programs.
  if [[ " ${missing[*]} " == *" postgresql "* ]]; then
    as_root mkdir -p "${no_cluster%/*}"
    as_root sh -c "echo 'create_main_cluster = false' > $no_cluster"
  fi
  local ok=yes
  {
    as_root timeout 300 apt-get -o DPkg::Lock::Timeout=240 update &&
      as_root timeout 1500 env DEBIAN_FRONTEND=noninteractive apt-get -o DPkg::Lock::Timeout=240 install -y --no-install-recommends "${missing[@]}"
  } </dev/null >"$log" 2>&1 || ok=no
  if [[ " ${missing[*]} " == *" postgresql "* ]]; then as_root rm -f "$no_cluster"; fi
  [ $ok = yes ] || fail "apt-get could not install ${missing[*]}: see $log ($(grep -E '^E:' "$log" | head -n 1))"
  for name in "${missing[@]}"; do package_here "$name" || fail "Debian's $name is installed but does not work here: see $log"; done
}

need_node() {
  command -v node >/dev/null || fail "Node.js is missing: install Node.js 20, then run this again."
  node -e 'const [major, minor] = process.versions.node.split(".").map(Number); process.exit(major > 20 || (major === 20 && minor >= 12) ? 0 : 1)' ||
    fail "Node.js $(node -v) is too old: install Node.js 20.12 or newer, then run this again."
  command -v npm >/dev/null || fail "npm is missing: install it beside Node.js, then run this again."
}

# npm writes node_modules/.package-lock.json last, so it says what is really there, whoever installed it.
node_modules_match_lock() {
  [ -f node_modules/.package-lock.json ] || return 1
  node -e '
    const { readFileSync } = require("node:fs");
    const wanted = JSON.parse(readFileSync("package-lock.json", "utf8")).packages;
    const present = JSON.parse(readFileSync("node_modules/.package-lock.json", "utf8")).packages;
    const differs = Object.entries(wanted).some(([path, entry]) => path !== "" && (present[path] ? present[path].version !== entry.version : !entry.optional));
    process.exit(differs ? 1 : 0);'
}

need_node_modules() {
  need_node
  node_modules_match_lock && return 0
  local log=$DATA/logs/npm-ci.log
  say "Installing the packages of package-lock.json (a minute or two)"
  timeout 1500 npm ci --no-audit --no-fund </dev/null >"$log" 2>&1 || fail "npm ci failed: see $log ($(grep -E '^npm (ERR!|error)' "$log" | head -n 1))"
}

source_stamp() {
  { find app components lib db public -type f -print0 2>/dev/null
    find . -maxdepth 1 -type f \( -name '*.config.*' -o -name 'package*.json' -o -name tsconfig.json -o -name proxy.ts -o -name 'instrumentation*.ts' \) -print0
  } | sort -z | xargs -0 sha256sum | sha256sum | cut -d' ' -f1
}

# Builds only when a source differs from what .next was built of. The caller exports the environment.
need_build() {
  local stamp log=$DATA/logs/build.log stamp_file=$ROOT/.next/ohmstead-sources
  stamp=$(source_stamp)
  [ -f .next/BUILD_ID ] && [ "$(cat "$stamp_file" 2>/dev/null)" = "$stamp" ] && return 0
  if [ "${1:-}" != quiet ]; then say "Building for production (a minute or two)"; fi
  mkdir -p .next && rm -f "$stamp_file"
  flock -w 900 "$DATA/build.lock" timeout 1200 node node_modules/next/dist/bin/next build </dev/null >"$log" 2>&1 || return 1
  printf '%s\n' "$stamp" >"$stamp_file"
}

port_is_free() { ! (exec 3<>"/dev/tcp/127.0.0.1/$1") 2>/dev/null; }

# --- processes: each in its own process group, with a file DATA/run/NAME.pid ---

# launch RUNFOLDER NAME COMMAND…: starts it in the background, log in DATA/logs.
launch() {
  local folder=$1 name=$2 log; shift 2
  log=$DATA/logs/${folder##*/}-$name.log
  setsid "$@" </dev/null >"$log" 2>&1 &
  printf '%s\n' $! >"$folder/$name.pid"
}

# A recorded pid counts only while it is a process of this checkout: numbers are reused.
running_pid() {
  local pid
  pid=$(cat "$1/$2.pid" 2>/dev/null) || return 1
  [ -n "$pid" ] && [ "$(readlink "/proc/$pid/cwd" 2>/dev/null)" = "$ROOT" ] && printf '%s\n' "$pid"
}

# stop_processes RUNFOLDER: asks all of them, waits 10 s, then insists.
stop_processes() {
  local folder=$1 file name pid tries pids=()
  for file in "$folder"/*.pid; do
    [ -e "$file" ] || continue
    name=$(basename "$file" .pid)
    if pid=$(running_pid "$folder" "$name"); then
      kill -TERM -- "-$pid" 2>/dev/null || true
      pids+=("$pid")
    fi
    rm -f "$file"
  done
  for tries in $(seq 100); do
    local left=no
    for pid in "${pids[@]}"; do if kill -0 -- "-$pid" 2>/dev/null; then left=yes; fi; done
    [ $left = yes ] || return 0
    sleep 0.1
  done
  for pid in "${pids[@]}"; do kill -KILL -- "-$pid" 2>/dev/null || true; done
}

# serve RUNFOLDER PORT: fakes, jobs and web with the exported environment; returns 1 with SERVE_FAULT set.
serve() {
  local folder=$1 port=$2 name
  SERVE_FAULT=
  mkdir -p "$folder"
  if [ "${OHMSTEAD_SERVICES:-fake}" = fake ]; then
    launch "$folder" fakes node --import tsx docker-free-scripts/fakes/main.ts
  fi
  # lib/ marks what may never reach a browser with the package server-only, which needs this condition outside of Next.js.
  # Neither process gets the owner's address; the empty value also hides one from .env files.
  launch "$folder" jobs env DATABASE_OWNER_URL= OHMSTEAD_PROCESS=jobs node --conditions=react-server --import tsx docker-free-scripts/commands/jobs.ts
  launch "$folder" web env DATABASE_OWNER_URL= OHMSTEAD_PROCESS=web NODE_ENV=production node node_modules/next/dist/bin/next start -H 127.0.0.1 -p "$port"
  if ! node --import tsx docker-free-scripts/commands/wait-for.ts "http://127.0.0.1:$port/api/health" 90 "$folder"/*.pid 2>"$folder/wait.txt"; then
    SERVE_FAULT=$(head -n 1 "$folder/wait.txt")
    for name in fakes jobs web; do
      if [ -e "$folder/$name.pid" ] && ! running_pid "$folder" "$name" >/dev/null; then
        SERVE_FAULT="$name stopped by itself: see $DATA/logs/${folder##*/}-$name.log ($(grep -vE '^\s*(at |$)' "$DATA/logs/${folder##*/}-$name.log" | tail -n 1 | cut -c1-200))"
      fi
    done
    return 1
  fi
}
