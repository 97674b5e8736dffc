# shellcheck shell=bash
# What start, dev and test share: sentences, steps and their times, programs that end with their starter,
# packages, the client's build, and a MariaDB of our own.
#
# Sourced, never run; the working directory is the top of the checkout. A function that cannot do its work says why
# and what to do, and returns non-zero.

# An ordinary user's PATH lacks the folder of mariadbd.
PATH=$PATH:/usr/sbin:/sbin

# tsx takes the decorators' settings from here.
export TSX_TSCONFIG_PATH=server/tsconfig.json

# --- Sentences and steps ---------------------------------------------------------------------------------------------

complain() { printf '\n%s\n' "$*" >&2; }

give_up() {
  complain "$@"
  exit 1
}

# The same, with an exit code of one's own.
give_up_with() {
  local status=$1
  shift
  complain "$@"
  exit "$((status == 0 ? 1 : status))"
}

notes=()

# Runs a command in this shell and prints how long it took; what it noted comes after its line.
step() {
  local name=$1 begun=${EPOCHREALTIME//[!0-9]/} tenths
  shift
  notes=()
  printf '%-18s' "$name"
  "$@" || return 1
  tenths=$(((${EPOCHREALTIME//[!0-9]/} - begun + 50000) / 100000))
  printf '%6s s\n' "$((tenths / 10)).$((tenths % 10))"
  ((${#notes[@]} == 0)) || printf '%s\n' "${notes[@]}"
}

# Runs a command without its output, of which the end is shown when it fails.
quietly() {
  local path log status=0
  path=$(mktemp) || return 1
  exec {log}<>"$path"
  rm -f "$path"
  "$@" >&"$log" 2>&1 || status=$?
  ((status == 0)) || { printf '\n' && tail -n 40 "/dev/fd/$log"; } >&2
  exec {log}>&-
  return "$status"
}

# --- Programs that end with their starter ----------------------------------------------------------------------------

# npm killed outright would leave this script running: let the system end it then.
follow_npm() {
  [[ -z ${npm_lifecycle_event:-} || -n ${FAIRLEAD_FOLLOWS_NPM:-} ]] && return
  FAIRLEAD_FOLLOWS_NPM=1 exec setpriv --pdeathsig TERM bash "$0" "$@"
}

# Starts a program in a session of its own, so that Ctrl-C reaches only this script, which then ends one after the
# other. Were this script killed outright, the system would still end the program.
launch() {
  setsid setpriv --pdeathsig TERM "$@" &
  launched=$!
}

# Launches a program and waits for it; a signal to this script is answered at once, not after the program's end.
attended=''
attend() {
  local launched status=0
  launch "$@"
  attended=$launched
  wait "$attended" || status=$?
  attended=''
  return "$status"
}

# Returns name their status: within a trap a bare return would give that of the command before it.
is_running() {
  local state
  state=$(sed -n 's/^State:[[:space:]]*\(.\).*/\1/p' "/proc/$1/status" 2>/dev/null) || return 1
  [[ -n $state && $state != Z ]]
}

# Whether a process was started by this script, which alone can be waited for.
is_own_child() { [[ -n $1 && $(ps -o ppid= -p "$1" 2>/dev/null | tr -d ' ') == "$$" ]]; }

# Waits until a process is gone; fails when it is still there after so many seconds.
outlast() {
  local pid=$1 tenths=$(($2 * 10))
  while is_running "$pid"; do
    ((tenths-- > 0)) || return 1
    sleep 0.1
  done
}

# Ends a launched program with all that it started: politely, and after so many seconds by force.
end_launched() {
  local pid=$1 seconds=$2
  kill -TERM -- "-$pid" 2>/dev/null || kill -TERM "$pid" 2>/dev/null || return 0
  outlast "$pid" "$seconds" || complain "Process $pid did not stop within $seconds s and was ended by force."
  kill -KILL -- "-$pid" 2>/dev/null || return 0
}

# A flag wins over what the environment and .env say.
read_flags() {
  local flag
  for flag in "$@"; do
    case $flag in
      --no-demo) export FAIRLEAD_DEMO=off ;;
      --lan) export FAIRLEAD_LAN=on HOST=0.0.0.0 ;;
      *) give_up "\"$flag\" is not a flag of Fairlead; there are two: npm start -- --no-demo and npm start -- --lan" ;;
    esac
  done
}

# --- What must be there first ----------------------------------------------------------------------------------------

require_node() {
  local wanted found
  wanted=$(sed -n 's/.*"node": *">=\([0-9.]*\)".*/\1/p' package.json)
  found=$(node --version 2>/dev/null) || found=none
  [[ $found != none && $(printf '%s\n' "$wanted" "${found#v}" | sort --version-sort | head -n 1) == "$wanted" ]] ||
    give_up "Fairlead needs Node $wanted or newer; the one found here is: $found. Install Node 20 and start again."
}

require_space() {
  local folder=$1 needed_mb=$2 free_mb
  free_mb=$(df --output=avail --block-size=1M "$folder" | tail -n 1 | tr -dc 0-9) || return 1
  ((free_mb >= needed_mb)) && return
  complain "Too little room in $folder: $free_mb MB are free, $needed_mb MB are needed. Free some and start again."
  return 1
}

# Reads NAME=value lines; what is set already stays as it is.
load_settings() {
  local file=$1 line number=0
  [[ -e $file ]] || return 0
  [[ -r $file ]] || give_up "$PWD/$file cannot be read. Run Fairlead as the user who owns it: $(stat -c %U "$file")."
  while IFS= read -r line || [[ -n $line ]]; do
    number=$((number + 1))
    line=${line%$'\r'}
    [[ $line =~ ^[[:space:]]*(#.*)?$ ]] && continue
    [[ $line =~ ^([A-Z][A-Z0-9_]*)=(.*)$ ]] ||
      give_up "Line $number of $file is not of the form NAME=value. Correct it and start again."
    [[ -v ${BASH_REMATCH[1]} ]] || export "${BASH_REMATCH[1]}=$(unquoted "${BASH_REMATCH[2]}")"
  done <"$file"
}

unquoted() {
  if [[ $1 =~ ^\"(.*)\"[[:space:]]*$ || $1 =~ ^\'(.*)\'[[:space:]]*$ ]]; then
    printf '%s' "${BASH_REMATCH[1]}"
  else
    printf '%s' "${1%"${1##*[![:space:]]}"}"
  fi
}

# Refuses an address on which nothing can listen, and names the setting that moves it.
require_free_port() {
  local setting=$1 host=$2 port=$3 fault
  [[ $port =~ ^[0-9]{1,5}$ ]] && ((10#$port >= 1 && 10#$port <= 65535)) ||
    give_up "$setting is \"$port\": give a whole number from 1 to 65535."
  fault=$(node -e '
    const [host, port] = process.argv.slice(1);
    const server = require("node:net").createServer();
    server.once("error", (error) => console.log(error.code));
    server.listen({ host, port: Number(port), exclusive: true }, () => server.close());
  ' "$host" "$port")
  case $fault in
    '') ;;
    EADDRINUSE) give_up "Port $port is taken by another program. Stop that program (ss -ltnp shows it), or choose" \
      "another port, for example: $setting=$((port < 65435 ? port + 100 : port - 100)) npm start" ;;
    EACCES) give_up "Port $port is reserved for root. Choose one above 1023, for example: $setting=4180 npm start" ;;
    *) give_up "Nothing can listen on $host, port $port ($fault). Set HOST to an address of this machine and start" \
      "again." ;;
  esac
}

# --- Packages and the client -----------------------------------------------------------------------------------------

# Two commands in one checkout must not install or build at the same moment.
one_at_a_time() {
  local lock status=0
  exec {lock}<package-lock.json
  attend flock "$lock" && "$@" || status=$?
  exec {lock}<&-
  return "$status"
}

packages_are_current() {
  [[ -f node_modules/.package-lock.json && ! package-lock.json -nt node_modules/.package-lock.json ]]
}

install_packages() { packages_are_current || one_at_a_time install_missing_packages; }

install_missing_packages() {
  packages_are_current && return
  require_space "$PWD" 700 || return 1
  [[ -w . ]] || {
    complain "You may not write to $PWD. Run Fairlead as the user who owns that folder: $(stat -c %U .)."
    return 1
  }
  quietly attend npm ci --include=dev --no-audit --no-fund --loglevel=error && return
  complain "npm could not install the packages; its own words are above. Check the network and start again."
  return 1
}

client_is_current() {
  [[ -f dist/client/index.html && -f dist/client.built ]] || return 1
  [[ -z $(find src shared index.html vite.config.ts package-lock.json -newer dist/client.built -print -quit) ]]
}

build_client() { client_is_current || one_at_a_time build_stale_client; }

# Builds beside the client being served and then takes its place, so that a failed or interrupted build harms nobody.
build_stale_client() {
  client_is_current && return
  mkdir -p dist && touch dist/client.begun && rm -rf dist/client.next || return 1
  quietly attend env NODE_ENV=production node node_modules/vite/bin/vite.js build --outDir dist/client.next || {
    complain "The client could not be built; vite's own words are above."
    return 1
  }
  rm -rf dist/client && mv dist/client.next dist/client && mv dist/client.begun dist/client.built
}

# --- Debian's packages -----------------------------------------------------------------------------------------------

mariadb_programs=(mariadbd:mariadb-server-core mariadb-install-db:mariadb-server-core mariadb:mariadb-client-core)

# Prints the packages whose programs are not there, from pairs program:package.
missing_from_debian() {
  local pair
  for pair in "$@"; do
    command -v "${pair%%:*}" >/dev/null || printf '%s\n' "${pair#*:}"
  done | sort -u
}

# Installs what is missing, as a step of its own; silent when nothing is.
need_from_debian() {
  local packages
  mapfile -t packages < <(missing_from_debian "$@")
  ((${#packages[@]} == 0)) || step 'debian packages' install_from_debian "${packages[@]}"
}

install_from_debian() {
  local as_root=() by_hand="apt-get install --no-install-recommends $*"
  command -v apt-get >/dev/null || {
    complain "These programs are missing and there is no apt-get to install them: $*. Install them and start again."
    return 1
  }
  if ((EUID != 0)); then
    { command -v sudo && { sudo -n true || : </dev/tty; }; } &>/dev/null || {
      complain "Debian's packages $* are missing, and installing them takes root or sudo, which $(id -un) has not." \
        "Ask an administrator to run: $by_hand"
      return 1
    }
    as_root=(sudo)
  fi
  require_space /usr 1000 || return 1
  # Not launched: apt-get is never cut short, since that would leave Debian's package database in pieces.
  quietly "${as_root[@]}" apt-get update -qq -o DPkg::Lock::Timeout=300 &&
    quietly "${as_root[@]}" env DEBIAN_FRONTEND=noninteractive apt-get install --yes -qq --no-install-recommends \
      -o DPkg::Lock::Timeout=300 "$@" && return
  complain "Debian's packages could not be installed; apt-get's own words are above. Try by hand: $by_hand"
  return 1
}

# --- A MariaDB of our own --------------------------------------------------------------------------------------------
# Everything lies under one home: the data in mariadb/, with the socket and the pid file inside, the log beside it.

database_home=''
database_user=fairlead
database_password=''
database_name='' # the one database the user may use; any when empty
database_pid=''
database_was_cut_off=''

# The socket is named from within the data: a path from the top can be longer than a socket may have.
ask_database() {
  (cd "$database_home/mariadb" && MYSQL_PWD=$database_password mariadb --no-defaults --protocol=socket \
    --socket=mariadb.sock --user="$database_user" --batch --skip-column-names --execute="$1") 2>/dev/null
}

# Prints the process that has our data open, if there is one.
database_process() {
  local pid
  pid=$(cat "$database_home/mariadb/mariadb.pid" 2>/dev/null) || return 1
  tr '\0' '\n' 2>/dev/null <"/proc/$pid/cmdline" | grep -qxF -e "--datadir=$database_home/mariadb" || return 1
  printf '%s' "$pid"
}

# Looks after what an earlier start left: one that stops is waited for, one that answers on the wanted port is used
# again, one that does not answer is ended.
settle_database() {
  local port=$1 pid
  if pid=$(database_process); then
    if ! outlast "$pid" 5 && [[ $(ask_database 'select @@port') == "$port" ]]; then
      database_pid=$pid
      return
    fi
    end_database "$pid"
  fi
  # A database that ends in order takes its pid file away.
  [[ ! -e $database_home/mariadb/mariadb.pid ]] || database_was_cut_off=1
  rm -f "$database_home/mariadb/mariadb.pid" "$database_home/mariadb/mariadb.sock"
}

# Opens the database with further options for mariadbd, making its files the first time.
open_database() {
  [[ -z $database_pid ]] || {
    notes+=("The database was still running from an earlier start and is used again.")
    return
  }
  [[ -d $database_home/mariadb ]] || make_database_files || return 1
  write_database_setup || return 1
  local launched as_user=()
  ((EUID != 0)) || as_user=(--user=root)
  launch mariadbd --no-defaults "${as_user[@]}" --datadir="$database_home/mariadb" --socket=mariadb.sock \
    --pid-file="$database_home/mariadb/mariadb.pid" --log-error="$database_home/mariadb.log" \
    --init-file="$database_home/mariadb.sql" --skip-name-resolve --innodb-log-file-size=32M \
    --character-set-server=utf8mb4 --collation-server=utf8mb4_unicode_ci --default-time-zone=+00:00 "$@" \
    >>"$database_home/mariadb.log" 2>&1 9>&-
  database_pid=$launched
  await_database || return 1
  rm -f "$database_home/mariadb.sql"
  [[ -z $database_was_cut_off ]] ||
    notes+=("The database was not shut down cleanly last time; it has recovered by itself, nothing needs doing.")
}

make_database_files() {
  rm -rf "$database_home/mariadb.next"
  quietly mariadb-install-db --no-defaults --datadir="$database_home/mariadb.next" --skip-test-db --skip-name-resolve \
    --auth-root-authentication-method=socket --auth-root-socket-user="$(id -un)" --innodb-log-file-size=32M &&
    mv "$database_home/mariadb.next" "$database_home/mariadb" && return
  complain "MariaDB could not lay out its files in $database_home; its own words are above."
  return 1
}

# What mariadbd runs at each start, so that nobody has to sign in as its root.
write_database_setup() {
  local host account
  (
    umask 077
    exec >"$database_home/mariadb.sql"
    [[ -z $database_name ]] || printf 'create database if not exists `%s` character set utf8mb4;\n' "$database_name"
    for host in localhost 127.0.0.1; do
      account="'$database_user'@'$host'"
      printf 'create user if not exists %s;\n' "$account"
      printf "alter user %s identified by '%s';\n" "$account" "$database_password"
      printf 'grant all on %s.* to %s;\n' "${database_name:-*}" "$account"
    done
  )
}

await_database() {
  local tenths=3000
  while is_running "$database_pid" && ((tenths-- > 0)); do
    [[ -z $(ask_database 'select 1') ]] || return 0
    sleep 0.1
  done
  complain "The database did not come up. The end of its log, $database_home/mariadb.log:"
  tail -n 20 "$database_home/mariadb.log" >&2
  return 1
}

end_database() {
  kill -TERM "$1" 2>/dev/null || return 0
  outlast "$1" 30 && return
  kill -KILL "$1" 2>/dev/null
  complain "The database did not stop within 30 s and was ended by force; it recovers at the next start."
}

# --- The home that start and dev share: .data ------------------------------------------------------------------------

# Prints a random secret kept in a file of .data, made on first use.
kept_secret() {
  local file=.data/$1
  [[ -s $file ]] || (umask 077 && od -An -N32 -tx1 /dev/urandom | tr -d ' \n' >"$file") || return 1
  cat "$file"
}

# Takes the checkout's .data for this process alone. The lock (descriptor 9) is inherited by the server, so that a
# start right after a kill waits until the old server is gone.
claim_home() {
  local holder='' address=''
  { mkdir -p -m 700 .data && [[ -w .data && -x .data ]] && exec 9<>.data/running; } 2>/dev/null ||
    give_up "You may not write to $PWD/.data. Run Fairlead as the user who owns that folder, or give it to" \
      "yourself: sudo chown -R $(id -un) $PWD/.data"
  if ! flock --nonblock 9; then
    read -r holder address <.data/running || true
    if [[ -n $holder ]] && is_running "$holder"; then
      give_up "Fairlead is already running from this folder: $address. Use that one, or stop it first with Ctrl-C" \
        "where it runs or with: kill $holder"
    fi
    flock --timeout 15 9 || give_up "A server left by an earlier start still uses $PWD/.data. End it (fuser" \
      "$PWD/.data/running shows its number) and start again."
  fi
  printf '%s %s\n' "$$" "http://$HOST:$PORT" >.data/running
}

# Everything up to the point where a server can be started.
prepare_home() {
  require_node
  load_settings .env
  export PORT=${PORT:-4180} HOST=${HOST:-127.0.0.1}
  claim_home
  require_free_port PORT "$HOST" "$PORT"
  SESSION_SECRET=${SESSION_SECRET:-$(kept_secret session-secret)}
  SIGNING_SECRET=${SIGNING_SECRET:-$(kept_secret signing-secret)}
  export SESSION_SECRET SIGNING_SECRET
  if [[ -n ${DATABASE_URL:-}${DATABASE_HOST:-}${DATABASE_SOCKET:-} ]]; then
    step packages install_packages
    need_from_debian openssl:openssl
  else
    prepare_own_database
  fi
}

prepare_own_database() {
  database_home=$PWD/.data
  database_name=fairlead
  database_password=$(kept_secret database-password)
  export DATABASE_HOST=127.0.0.1 DATABASE_PORT=${DATABASE_PORT:-4181} DATABASE_NAME=$database_name
  export DATABASE_USER=$database_user DATABASE_PASSWORD=$database_password
  settle_database "$DATABASE_PORT"
  [[ -n $database_pid ]] || require_free_port DATABASE_PORT 127.0.0.1 "$DATABASE_PORT"
  require_space .data 200
  step packages install_packages
  need_from_debian "${mariadb_programs[@]}" openssl:openssl
  step database open_database --bind-address=127.0.0.1 --port="$DATABASE_PORT"
}
