#!/usr/bin/env bash
# Sets up what is missing and runs every test, with its own database and its own ports; leaves nothing running.
#   test.sh              all of it; the last line is "N passed, N failed"
#   test.sh PART…        some of: types lint format boundaries migrations unused unit reference lists integration api browser faults
# TEST_PORT (4700) is the first of the 40 ports it may use; when taken, the next free block is.
set -euo pipefail
. "$(dirname "${BASH_SOURCE[0]}")/setup.sh"

ALL="types lint format boundaries migrations unused unit reference lists integration api browser faults"
usage() { sed -n '2,5p' "${BASH_SOURCE[0]}" | sed 's/^# \{0,1\}//'; }
if [ "${1:-}" = --help ]; then usage; exit 0; fi
PARTS=" ${*:-$ALL} "
for part in $PARTS; do
  [[ " $ALL " == *" $part "* ]] || { usage; fail "there is no part '$part'"; }
done
wants() { [[ $PARTS == *" $1 "* ]]; }
has_tests() { [ -n "$(find "tests/$1" -name '*.test.*' -print -quit 2>/dev/null)" ]; }

make_data_folder
OUT=$DATA/test
DB=docker-free-scripts/db.sh
NEEDS_SERVER=no
for part in integration api browser faults; do if wants $part && has_tests $part; then NEEDS_SERVER=yes; fi; done
if [ $NEEDS_SERVER = yes ]; then
  exec 8>"$DATA/test.lock"
  flock -n 8 || fail "another test.sh is using this checkout's test database: wait for it to finish."
else
  OUT=$(mktemp -d "$DATA/test-XXXXXX")
fi
RUN=$OUT/run
export OHMSTEAD_CLUSTER=test

CURRENT=
clean_up() {
  trap - EXIT INT TERM HUP
  if [ -n "$CURRENT" ]; then kill -TERM -- "-$CURRENT" 2>/dev/null || true; fi
  stop_processes "$RUN"
  if [ $NEEDS_SERVER = yes ]; then $DB destroy --yes >/dev/null 2>&1 || true; else rm -rf "$OUT"; fi
}
trap clean_up EXIT
trap 'exit 130' INT
trap 'exit 143' TERM HUP

need_node
packages=()
if wants reference; then packages+=(ngspice kicad-symbols poppler-utils); fi
if wants browser; then packages+=(chromium poppler-utils); fi
if [ $NEEDS_SERVER = yes ]; then packages+=(postgresql); fi
need_packages "${packages[@]}"
need_node_modules 8>&-
if [ $NEEDS_SERVER = yes ]; then rm -rf "$OUT"; fi
mkdir -p "$OUT" "$RUN"
chmod 0700 "$OUT"
: >"$OUT/results.jsonl"

# Everything runs in its own process group with a time limit, so that a signal to this script ends it at once.
bounded() {
  local limit=$1 status=0; shift
  setsid timeout --kill-after=10 "$limit" "$@" </dev/null 8>&- &
  CURRENT=$!
  wait "$CURRENT" || status=$?
  CURRENT=
  return $status
}

# check NAME SECONDS COMMAND…: one counted check.
check() {
  local name=$1 limit=$2 log=$OUT/$1.log began=$SECONDS status=0; shift 2
  bounded "$limit" "$@" >"$log" 2>&1 || status=$?
  if [ $status = 0 ]; then
    say "ok      $name ($((SECONDS - began)) s)"
    printf '{"part":"%s","passed":1,"failed":0}\n' "$name" >>"$OUT/results.jsonl"
    return 0
  fi
  say "FAILED  $name ($((SECONDS - began)) s$([ $status = 124 ] && printf ', over its limit'))"
  tail -n 25 "$log" | cut -c1-240 | sed 's/^/        | /'
  printf '{"part":"%s","passed":0,"failed":1}\n' "$name" >>"$OUT/results.jsonl"
  return 1
}

not_run() {
  say "FAILED  $1: not run, because $2 failed"
  printf '{"part":"%s","passed":0,"failed":1}\n' "$1" >>"$OUT/results.jsonl"
}

# tests NAME SECONDS: the tests of tests/NAME, each counted.
tests() {
  wants "$1" || return 0
  if ! has_tests "$1"; then say "none    $1: there are no tests in tests/$1"; return 0; fi
  bounded $(($2 + 30)) node --import tsx docker-free-scripts/run-tests.ts run "$1" "$2" "$OUT" || true
}

static_check() { if wants "$1"; then check "$@" || true; fi; }

static_check types 600 bash -c 'node node_modules/next/dist/bin/next typegen && node node_modules/typescript/bin/tsc --noEmit --incremental false'
static_check lint 600 node node_modules/eslint/bin/eslint.js . --max-warnings 0
static_check format 120 node node_modules/@biomejs/biome/bin/biome format .
static_check boundaries 300 node --import tsx docker-free-scripts/commands/boundaries.ts
static_check migrations 120 node --import tsx docker-free-scripts/commands/migrations-complete.ts
static_check unused 300 node node_modules/knip/bin/knip.js --no-progress
tests unit 900
tests reference 1200
if wants lists && [ -f ../shared/boms/score.mjs ]; then check lists 600 node ../shared/boms/score.mjs --min 90 || true; fi

free_block() {
  local base=$1 offset free
  for base in $(seq "$1" 40 $(($1 + 400))); do
    free=yes
    for offset in 0 1 2 3 4 10 11 12 32; do port_is_free $((base + offset)) || free=no; done
    if [ $free = yes ]; then printf '%s\n' "$base"; return; fi
  done
  fail "no free block of ports from $1 on: choose another with TEST_PORT=…"
}

# The databases: `ohmstead` for the running application with the demo in it, and an empty one for the integration tests.
start_database() {
  $DB destroy --yes && OHMSTEAD_DB_PORT=$((PORT + 32)) $DB start && $DB create ohmstead_integration
}
migrate() { DATABASE_OWNER_URL=$1 node --import tsx docker-free-scripts/commands/migrate.ts; }
# check runs a command in another bash; these functions go with it.
export -f start_database migrate
export DB

if [ $NEEDS_SERVER = yes ]; then
  PORT=$(free_block "${TEST_PORT:-4700}")
  export PORT SIGN_INS_FILE=$OUT/sign-ins.txt
  served=no
  if check database 180 bash -euo pipefail -c start_database; then
    settings=$(OWN_DATABASE_URL=$($DB url app) node --import tsx docker-free-scripts/commands/write-environment.ts --new "$OUT/environment")
    eval "$settings"
    DATABASE_OWNER_URL=$($DB url owner)
    export DATABASE_OWNER_URL FAKES_DATA=
    INTEGRATION_OWNER_URL=$($DB url owner ohmstead_integration)
    INTEGRATION_URL=$($DB url app ohmstead_integration)
    export INTEGRATION_OWNER_URL TEST_BASE_URL=http://127.0.0.1:$PORT TEST_FAKES_URL=http://127.0.0.1:$((PORT + 1))
    # Migrating twice shows that a second start has nothing to do.
    if check migrate 180 bash -euo pipefail -c 'migrate "$INTEGRATION_OWNER_URL" && migrate "$DATABASE_OWNER_URL" && migrate "$DATABASE_OWNER_URL" | grep "up to date"'; then
      DEMO_URL=$DATABASE_URL
      export DATABASE_URL=$INTEGRATION_URL
      tests integration 1800
      export DATABASE_URL=$DEMO_URL
      serving=no
      for part in api browser faults; do if wants $part && has_tests $part; then serving=yes; fi; done
      if [ $serving = yes ]; then
        export ROOT DATA
        export -f need_build source_stamp say
        if check seed 300 npm run -s db:seed && check build 1200 bash -euo pipefail -c 'need_build quiet || { cat "$DATA/logs/build.log"; exit 1; }'; then
          if serve "$RUN" "$PORT" 8>&-; then served=yes; else say "        | $SERVE_FAULT"; fi
        fi
        for part in api browser faults; do
          wants $part && has_tests $part || continue
          if [ $served = yes ]; then tests $part 2400; else not_run $part "starting the application"; fi
        done
      fi
    else
      for part in integration api browser faults; do if wants $part && has_tests $part; then not_run $part "migrating"; fi; done
    fi
  else
    for part in integration api browser faults; do if wants $part && has_tests $part; then not_run $part "starting the database"; fi; done
  fi
fi

cp "$OUT/results.jsonl" "$DATA/last-results.jsonl"
summary=0
node --import tsx docker-free-scripts/run-tests.ts sum "$OUT" >"$DATA/last-summary.txt" || summary=$?
clean_up
cat "$DATA/last-summary.txt"
exit $summary
