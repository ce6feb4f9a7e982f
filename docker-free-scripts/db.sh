#!/usr/bin/env bash
# A private PostgreSQL cluster on 127.0.0.1, made from Debian's packages and kept in .data/.
#   db.sh start            make it if there is none, and start it
#   db.sh stop | status
#   db.sh psql [ARGS…]     psql as the cluster's superuser (sees all rows), in the database ohmstead
#   db.sh create NAME      make the database NAME, owned by ohmstead_owner
#   db.sh url owner|app|admin [NAME]   a connection address
#   db.sh destroy --yes    stop it and delete all of its data
# OHMSTEAD_CLUSTER=test picks the throw-away cluster of the tests (without fsync, its owner may make databases);
# OHMSTEAD_DB_PORT the port it should take (4632; the next free one when something else has it).
set -euo pipefail
. "$(dirname "${BASH_SOURCE[0]}")/setup.sh"

case ${OHMSTEAD_CLUSTER:-main} in
  main) NAME=postgres SECRETS=$DATA/secrets WANTED_PORT=${OHMSTEAD_DB_PORT:-4632} ;;
  test) NAME=test-postgres SECRETS=$DATA/test-secrets WANTED_PORT=${OHMSTEAD_DB_PORT:-4732} ;;
  *) fail "OHMSTEAD_CLUSTER is main or test" ;;
esac
# Where the postgres user can't come into the checkout (below /root, say), the cluster lies in /var/lib and this names it.
ELSEWHERE=$DATA/$NAME-folder
DATABASE=ohmstead

# PostgreSQL refuses to run as root; then the user that Debian made for it runs the cluster.
as_server() {
  if [ "$(id -u)" = 0 ]; then (cd / && runuser -u postgres -- "$@"); else (cd / && "$@"); fi
}

find_cluster() {
  if [ -f "$ELSEWHERE" ]; then CLUSTER=$(cat "$ELSEWHERE"); else CLUSTER=$DATA/$NAME; fi
}

cluster_exists() { [ -f "$CLUSTER/PG_VERSION" ] || as_root test -f "$CLUSTER/PG_VERSION" 2>/dev/null; }

find_programs() {
  local version
  if cluster_exists && version=$(as_server cat "$CLUSTER/PG_VERSION" 2>/dev/null); then
    BIN=/usr/lib/postgresql/$version/bin
    [ -x "$BIN/postgres" ] || fail "the cluster in $CLUSTER is of PostgreSQL $version, which is not installed: 'sudo apt-get install postgresql-$version'."
  else
    BIN=$(printf '%s\n' /usr/lib/postgresql/*/bin | sort -V | tail -n 1)
  fi
}

# A socket's path may have 107 bytes at most, so it can't lie in a deep checkout.
socket_folder() { printf '/tmp/ohmstead-%s\n' "$(printf '%s' "$CLUSTER" | sha256sum | cut -c1-12)"; }

read_secrets() {
  [ -r "$SECRETS" ] || fail "$SECRETS is missing or not readable: run '$0 start' as the user who made the database."
  local key value
  while IFS='=' read -r key value; do
    case $key in ADMIN) ADMIN_PASSWORD=$value ;; OWNER) OWNER_PASSWORD=$value ;; APP) APP_PASSWORD=$value ;; esac
  done <"$SECRETS"
}

write_secrets() {
  (umask 077 && node -e '
    const { randomBytes } = require("node:crypto");
    for (const key of ["ADMIN", "OWNER", "APP"]) console.log(key + "=" + randomBytes(24).toString("hex"));' >"$SECRETS")
}

is_running() { as_server "$BIN/pg_ctl" -D "$CLUSTER" status >/dev/null 2>&1; }
running_port() { as_server sed -n 4p "$CLUSTER/postmaster.pid"; }

url() {
  local role=$1 database=${2:-$DATABASE} user password
  case $role in
    owner) user=ohmstead_owner password=$OWNER_PASSWORD ;;
    app) user=ohmstead_app password=$APP_PASSWORD ;;
    admin) user=postgres password=$ADMIN_PASSWORD ;;
    *) fail "a role is owner, app or admin" ;;
  esac
  printf 'postgres://%s:%s@127.0.0.1:%s/%s\n' "$user" "$password" "$(running_port)" "$database"
}

# PGOPTIONS quietens notices such as "role exists already". Passwords go by environment, never on a command line.
admin_psql() {
  PGPASSWORD=$ADMIN_PASSWORD PGOPTIONS='-c client_min_messages=warning' PGCONNECT_TIMEOUT=10 \
    "$BIN/psql" -X -q -v ON_ERROR_STOP=1 -h 127.0.0.1 -p "$(running_port)" -U postgres "$@"
}

make_cluster() {
  local password_file
  CLUSTER=$DATA/$NAME
  rm -f "$ELSEWHERE"
  if [ "$(id -u)" = 0 ]; then
    if ! as_server test -x "$DATA"; then
      CLUSTER=$(mktemp -d /var/lib/ohmstead-XXXXXXXX)
      printf '%s\n' "$CLUSTER" >"$ELSEWHERE"
    fi
    mkdir -p "$CLUSTER" && chown postgres: "$CLUSTER"
  else
    mkdir -p "$CLUSTER"
  fi
  chmod 0700 "$CLUSTER"
  write_secrets && read_secrets
  password_file=$(as_server mktemp)
  printf '%s\n' "$ADMIN_PASSWORD" | as_server tee "$password_file" >/dev/null
  as_server "$BIN/initdb" -D "$CLUSTER" -U postgres --pwfile="$password_file" --auth=scram-sha-256 -E UTF8 --locale=C.UTF-8 \
    >"$DATA/logs/$NAME-initdb.log" 2>&1 || { as_server rm -f "$password_file"; fail "initdb failed: see $DATA/logs/$NAME-initdb.log"; }
  as_server rm -f "$password_file"
  as_server tee -a "$CLUSTER/postgresql.conf" >/dev/null <<CONF

# --- set by docker-free-scripts/db.sh ---
listen_addresses = '127.0.0.1'
max_connections = 120
shared_buffers = 256MB
timezone = 'UTC'
log_timezone = 'UTC'
log_line_prefix = '%m [%p] %u@%d '
# Nobody waits for ever: neither on a lock nor in a transaction that its process forgot.
lock_timeout = '20s'
idle_in_transaction_session_timeout = '60s'
CONF
  if [ "$NAME" = test-postgres ]; then
    printf '%s\n' 'fsync = off' 'synchronous_commit = off' 'full_page_writes = off' | as_server tee -a "$CLUSTER/postgresql.conf" >/dev/null
  fi
}

# The secrets were lost but the data are there: single-user mode needs no password.
renew_secrets() {
  write_secrets && read_secrets
  printf "ALTER ROLE postgres PASSWORD '%s';\n" "$ADMIN_PASSWORD" |
    as_server "$BIN/postgres" --single -D "$CLUSTER" postgres >"$DATA/logs/$NAME-renew.log" 2>&1 ||
    fail "could not renew the database's passwords: see $DATA/logs/$NAME-renew.log"
}

# The owner migrates and owns all; the application owns nothing and can't bypass row-level security. Neither may make
# roles: CREATEROLE in PostgreSQL 15 is a way to the server's files and programs.
make_roles() {
  local createdb=NOCREATEDB
  if [ "$NAME" = test-postgres ]; then createdb=CREATEDB; fi
  admin_psql -d postgres <<SQL
DO \$\$ BEGIN
  IF NOT EXISTS (SELECT 1 FROM pg_roles WHERE rolname = 'ohmstead_owner') THEN CREATE ROLE ohmstead_owner; END IF;
  IF NOT EXISTS (SELECT 1 FROM pg_roles WHERE rolname = 'ohmstead_app') THEN CREATE ROLE ohmstead_app; END IF;
END \$\$;
ALTER ROLE ohmstead_owner LOGIN NOSUPERUSER $createdb NOCREATEROLE NOBYPASSRLS PASSWORD '$OWNER_PASSWORD';
ALTER ROLE ohmstead_app LOGIN NOSUPERUSER NOCREATEDB NOCREATEROLE NOBYPASSRLS PASSWORD '$APP_PASSWORD';
SQL
}

create_database() {
  local name=$1
  [[ $name =~ ^[a-z][a-z0-9_]{0,62}$ ]] || fail "a database's name has a-z, 0-9 and _ only"
  [ "$(admin_psql -d postgres -Atc "SELECT 1 FROM pg_database WHERE datname = '$name'")" = 1 ] && return 0
  admin_psql -d postgres -c "CREATE DATABASE $name OWNER ohmstead_owner TEMPLATE template0 ENCODING 'UTF8'" \
    -c "REVOKE ALL ON DATABASE $name FROM PUBLIC" -c "GRANT CONNECT ON DATABASE $name TO ohmstead_app"
}

start() {
  local port log sockets fresh=no tries
  make_data_folder
  need_node
  need_packages postgresql
  find_cluster
  find_programs
  if ! cluster_exists; then make_cluster; fresh=yes; fi
  if is_running; then read_secrets; return 0; fi
  if [ ! -r "$SECRETS" ]; then renew_secrets; fresh=yes; fi
  read_secrets
  sockets=$(socket_folder)
  as_server mkdir -p -m 0700 "$sockets"
  log=$CLUSTER/server.log
  for tries in 0 1 2 3 4 5 6 7 8 9; do
    port=$((WANTED_PORT + tries))
    port_is_free "$port" || continue
    # Its own session, or Ctrl-C in the terminal of start.sh would stop the server before the application.
    if as_server setsid "$BIN/pg_ctl" -D "$CLUSTER" -l "$log" -w -t 60 -o "-p $port -k $sockets" start </dev/null >"$DATA/logs/$NAME-start.log" 2>&1; then
      if [ $fresh = yes ] || ! app_signs_in; then make_roles; fi
      create_database "$DATABASE"
      return 0
    fi
    port_is_free "$port" && break
  done
  fail "PostgreSQL did not start on port $WANTED_PORT: see $DATA/logs/$NAME-start.log and $log"
}

app_signs_in() {
  PGPASSWORD=$APP_PASSWORD PGCONNECT_TIMEOUT=10 "$BIN/psql" -X -q -h 127.0.0.1 -p "$(running_port)" -U ohmstead_app -d "$DATABASE" -c 'select 1' >/dev/null 2>&1
}

stop() {
  find_cluster
  cluster_exists || return 0
  find_programs
  is_running || return 0
  as_server "$BIN/pg_ctl" -D "$CLUSTER" -m fast -w -t 60 stop >/dev/null || fail "PostgreSQL in $CLUSTER did not stop within 60 s"
}

need_running() {
  find_cluster
  cluster_exists || fail "there is no database yet: '$0 start' makes it."
  find_programs
  is_running || fail "the database is not running: '$0 start' starts it."
  read_secrets
}

case ${1:-} in
  start) start; say "PostgreSQL on 127.0.0.1:$(running_port), data in $CLUSTER" ;;
  stop) stop ;;
  status)
    find_cluster
    if cluster_exists && find_programs && is_running; then say "running on 127.0.0.1:$(running_port), data in $CLUSTER"
    else say "not running"; exit 3; fi ;;
  psql)
    shift; need_running
    if [[ " $* " == *" -d "* ]]; then admin_psql "$@"; else admin_psql -d "$DATABASE" "$@"; fi ;;
  create) need_running; create_database "${2:?name of the database}" ;;
  url) need_running; url "${2:?owner, app or admin}" "${3:-$DATABASE}" ;;
  destroy)
    [ "${2:-}" = --yes ] || fail "'$0 destroy --yes' deletes all data of the database; nothing was done."
    stop
    find_cluster
    if cluster_exists || [ -d "$CLUSTER" ]; then
      rm -rf "$(socket_folder)" "$CLUSTER"
    fi
    rm -f "$ELSEWHERE" "$SECRETS" ;;
  *) sed -n '2,11p' "${BASH_SOURCE[0]}" | sed 's/^# \{0,1\}//'; exit 2 ;;
esac
