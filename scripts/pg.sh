#!/usr/bin/env bash
# The project's own PostgreSQL on loopback: scripts/pg.sh start|stop|status|url|destroy
# `start` and `url` print the connection URL as their last line; `status` answers with its exit code too.
# As root the server runs as the user postgres (PostgreSQL refuses to run as root), as anyone else it runs as that user.
# PG_PORT asks for a port (default 54380, or the one that this cluster had last time).
set -euo pipefail
project="$(cd "$(dirname "${BASH_SOURCE[0]}")/.." && pwd -P)"
name=yardbell

bindir() {
  local d
  for d in $(printf '%s\n' /usr/lib/postgresql/*/bin | sort -rV); do
    if [ -x "$d/initdb" ]; then echo "$d" && return; fi
  done
  if command -v initdb >/dev/null; then dirname "$(readlink -f "$(command -v initdb)")" && return; fi
  echo "PostgreSQL is not installed. On Debian, as root: apt-get install postgresql" >&2
  exit 1
}
bin="$(bindir)"
major="$("$bin/postgres" --version | sed -E 's/[^0-9]*([0-9]+).*/\1/')"

if [ "$(id -u)" = 0 ]; then
  # from /: the postgres user can't enter every folder that root is in
  as() { (cd / && exec runuser -u postgres -- "$@"); }
  if as test -x "$project"; then
    home="$project/.pg/$major"
    mkdir -p "$project/.pg"
    chmod 711 "$project/.pg"
  else
    home="/var/lib/postgresql/$name-$(printf %s "$project" | sha256sum | cut -c1-8)-$major"
  fi
  [ -d "$home" ] || install -d -o postgres -g postgres -m 700 "$home"
else
  as() { "$@"; }
  home="$project/.pg/$major"
  [ -d "$home" ] || mkdir -m 700 -p "$home"
  if [ ! -w "$home" ]; then
    echo "$home belongs to another user (it was made as root?). Go on as that user, or set DATABASE_URL." >&2
    exit 1
  fi
fi
data="$home/data"
secret="$home/password"
log="$home/server.log"

# A pid file can outlive its server (power cut, killed container), and its number may by now be another program's:
# only a process that works in our data folder is our server.
server_pid() {
  local pid
  pid="$(as head -1 "$data/postmaster.pid" 2>/dev/null)" || return 1
  [ "$(as readlink "/proc/$pid/cwd" 2>/dev/null)" = "$data" ] && echo "$pid"
}
running() { server_pid >/dev/null; }
remembered() { as cat "$home/port" 2>/dev/null; }
port() { { running && as sed -n 4p "$data/postmaster.pid"; } || remembered || echo "${PG_PORT:-54380}"; }
taken() { (exec 3<>"/dev/tcp/127.0.0.1/$1") 2>/dev/null; }

url() {
  as test -s "$secret" || { echo "There is no database yet: scripts/pg.sh start" >&2 && exit 1; }
  echo "postgres://$name:$(as cat "$secret")@127.0.0.1:$(port)/$name"
}

init() {
  # an initdb that was interrupted leaves a folder that the next one refuses
  as rm -rf "$data" "$data.new"
  as sh -c "umask 077; head -c 24 /dev/urandom | od -An -tx1 | tr -d ' \n' > '$secret'"
  as "$bin/initdb" -D "$data.new" -U postgres --auth-local=scram-sha-256 --auth-host=scram-sha-256 \
    --pwfile="$secret" -E UTF8 --locale=C.UTF-8 --data-checksums >/dev/null
  as tee -a "$data.new/postgresql.conf" >/dev/null <<CONF
listen_addresses = '127.0.0.1'
unix_socket_directories = ''
timezone = 'UTC'
log_timezone = 'UTC'
max_connections = 200
CONF
  as mv "$data.new" "$data"
}

# another clone or program may have the port: take the next free one and remember it
choose_port() {
  local p="${PG_PORT:-$(remembered || echo 54380)}"
  while taken "$p"; do p=$((p + 1)); done
  printf %s "$p" | as tee "$home/port" >/dev/null
  echo "$p"
}

# PostgreSQL clears a stale pid file itself, except when its number is alive again as another program. Removing it also
# removes the guard against a second server on the same data, so first nobody may be working there.
clear_pid_file() {
  local i
  for i in $(seq 50); do
    if [ -z "$(as find /proc -maxdepth 2 -name cwd -lname "$data" 2>/dev/null)" ]; then as rm -f "$data/postmaster.pid" && return; fi
    sleep 0.2
  done
}

launch() {
  local p
  clear_pid_file
  p="$(choose_port)"
  # 9>&-: the server must not keep the lock that this script holds
  as "$bin/pg_ctl" -D "$data" -l "$log" -o "-p $p" -w -t 60 start >/dev/null 9>&- || {
    echo "PostgreSQL did not start. The last lines of its log:" >&2
    as tail -5 "$log" >&2
    exit 1
  }
}

# statements go in by stdin, so that the password is in no process list
query() { PGPASSWORD="$(as cat "$secret")" "$bin/psql" -h 127.0.0.1 -p "$(port)" -U postgres -XAtq -v ON_ERROR_STOP=1 postgres; }

prepare() {
  local has
  has="$(query <<<"select (select count(*) from pg_roles where rolname = '$name') || ' ' || (select count(*) from pg_database where datname = '$name')")"
  [ "${has% *}" = 1 ] || query <<<"create role $name login createdb password '$(as cat "$secret")'"
  [ "${has#* }" = 1 ] || query <<<"create database $name owner $name"
}

start() {
  # two programs may ask for the database at once: the second waits until the first has it running
  exec 9>>"$home/lock"
  flock 9
  as test -s "$data/PG_VERSION" || init
  running || launch
  prepare
  url
}

stop() {
  if running; then as "$bin/pg_ctl" -D "$data" -m "${1:-fast}" -w stop >/dev/null; fi
}

case "${1:-start}" in
  start) start ;;
  stop) stop ;;
  status)
    running || { echo "stopped ($data)" && exit 3; }
    echo "running, port $(port), pid $(server_pid) ($data)"
    ;;
  url) url ;;
  destroy)
    stop immediate
    rm -rf "$home"
    ;;
  *)
    echo "usage: $0 start|stop|status|url|destroy" >&2
    exit 2
    ;;
esac
