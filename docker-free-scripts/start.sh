#!/usr/bin/env bash
# Sets up what is missing and runs Ohmstead on this machine: web, jobs and the local fakes of the hosted services.
#   start.sh             stays in the foreground; Ctrl-C stops everything
#   start.sh --detach    leaves it running; docker-free-scripts/stop.sh stops it
# PORT (4600) is the web's; the fakes take PORT+1 and, for mail, PORT+2; the database PORT+32 or the next free one.
set -euo pipefail
. "$(dirname "${BASH_SOURCE[0]}")/setup.sh"

DETACH=no
for argument in "$@"; do
  case $argument in
    --detach) DETACH=yes ;;
    *) sed -n '2,5p' "${BASH_SOURCE[0]}" | sed 's/^# \{0,1\}//'; exit 2 ;;
  esac
done
PORT=${PORT:-4600}
[[ $PORT =~ ^[0-9]+$ ]] && [ "$PORT" -ge 1024 ] && [ "$PORT" -le 65000 ] || fail "PORT=$PORT is not a port from 1024 to 65000."
export PORT

RUN=$DATA/run
DB=docker-free-scripts/db.sh
SECONDS=0

print_where() {
  say ""
  say "Ohmstead is at http://127.0.0.1:$1"
  if [ -r "$DATA/sign-ins.txt" ]; then say "" && cat "$DATA/sign-ins.txt"; fi
  say ""
}

make_data_folder
exec 9>"$DATA/start.lock"
flock -n 9 || fail "another start.sh is setting this checkout up: wait for it to finish."
if running_pid "$RUN" web >/dev/null; then
  print_where "$(cat "$RUN/port")"
  say "It was running already; docker-free-scripts/stop.sh stops it."
  exit 0
fi
stop_processes "$RUN"
rm -f "$RUN"/*

need_node
need_packages postgresql
need_node_modules 9>&-
for port in "$PORT" $((PORT + 1)) $((PORT + 2)); do
  port_is_free "$port" || fail "port $port is in use by another program: choose others with PORT=$((PORT + 100)) $0"
done

STARTED_DATABASE=no
clean_up() {
  trap - EXIT INT TERM HUP
  stop_processes "$RUN"
  if [ $STARTED_DATABASE = yes ]; then $DB stop || true; fi
}
trap clean_up EXIT
trap 'exit 130' INT
trap 'exit 143' TERM HUP

$DB status >/dev/null 2>&1 || STARTED_DATABASE=yes
OHMSTEAD_DB_PORT=$((PORT + 32)) $DB start >/dev/null 9>&-
settings=$(OWN_DATABASE_URL=$($DB url app) node --import tsx docker-free-scripts/commands/write-environment.ts .env.local) ||
  fail "could not write .env.local"
eval "$settings"
# The owner's address stays out of .env.local, which the web process reads.
(umask 077 && printf 'DATABASE_OWNER_URL=%s\n' "$($DB url owner)" >"$DATA/owner.env")
unset DATABASE_OWNER_URL
export FAKES_DATA=$DATA/fakes SIGN_INS_FILE=$DATA/sign-ins.txt

node --import tsx docker-free-scripts/commands/migrate.ts >"$DATA/logs/migrate.log" 2>&1 9>&- ||
  fail "the database could not be brought up to date: $(tail -n 1 "$DATA/logs/migrate.log")"
if [ "$($DB psql -Atc 'SELECT count(*) FROM (SELECT 1 FROM workshop LIMIT 1) AS one')" = 0 ]; then
  say "Filling the empty database with the demo workshops"
  # Others on this machine have no business with the sign-ins.
  (umask 077 && npm run -s db:seed) </dev/null >"$DATA/logs/seed.log" 2>&1 9>&- || fail "the demo data could not be written: see $DATA/logs/seed.log ($(grep -m 1 -i error "$DATA/logs/seed.log" | cut -c1-200))"
fi
need_build 9>&- || fail "the production build failed: see $DATA/logs/build.log ($(grep -m 1 -iE 'error' "$DATA/logs/build.log" | cut -c1-200))"

serve "$RUN" "$PORT" 9>&- || fail "it did not start: $SERVE_FAULT"
printf '%s\n' "$PORT" >"$RUN/port"
exec 9>&-

print_where "$PORT"
say "Ready after $SECONDS s. Mailbox, payments and uploads (local fakes): http://127.0.0.1:$((PORT + 1))  Logs: .data/logs"
if [ $DETACH = yes ]; then
  trap - EXIT INT TERM HUP
  say "It goes on running; docker-free-scripts/stop.sh stops it."
  exit 0
fi
say "Ctrl-C stops it."

# Ends by a signal, by stop.sh, or with the first process that stops by itself.
ended=0
wait -n || ended=$?
sleep 0.3
[ -e "$RUN/web.pid" ] || exit 0
for name in web jobs fakes; do
  if [ -e "$RUN/$name.pid" ] && ! running_pid "$RUN" "$name" >/dev/null; then
    fail "$name stopped by itself (status $ended), so everything was stopped: see $DATA/logs/run-$name.log"
  fi
done
fail "a process stopped by itself (status $ended), so everything was stopped: see $DATA/logs"
