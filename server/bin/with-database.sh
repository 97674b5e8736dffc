#!/usr/bin/env bash
# Runs a program over the database, with the server running or not: with-database.sh PROGRAM [ARGUMENT ...]
set -euo pipefail
cd "$(dirname "${BASH_SOURCE[0]}")/../.."
# shellcheck source=server/bin/machine.sh
source server/bin/machine.sh
follow_npm "$@"

own_database=''
finish() {
  local status=$?
  set +e
  trap '' INT TERM HUP
  [[ -z $attended ]] || end_launched "$attended" 5
  [[ -z $own_database ]] || end_database "$own_database"
  exit "$status"
}
trap finish EXIT
trap 'exit 130' INT TERM HUP

# The database of npm start: as it runs, or opened for as long as the program takes.
use_own_database() {
  database_home=$PWD/.data
  [[ -d $database_home/mariadb && -s $database_home/database-password ]] ||
    give_up "There is no database in $database_home yet. Start Fairlead first (npm start), or set DATABASE_URL."
  database_name=fairlead
  database_password=$(kept_secret database-password)
  export DATABASE_HOST=127.0.0.1 DATABASE_PORT=${DATABASE_PORT:-4181} DATABASE_NAME=$database_name
  export DATABASE_USER=$database_user DATABASE_PASSWORD=$database_password
  [[ -z $(database_process) ]] || return 0
  export PORT=${PORT:-4180} HOST=${HOST:-127.0.0.1}
  claim_home
  settle_database "$DATABASE_PORT"
  require_free_port DATABASE_PORT 127.0.0.1 "$DATABASE_PORT"
  step database open_database --bind-address=127.0.0.1 --port="$DATABASE_PORT"
  own_database=$database_pid
}

require_node
load_settings .env
[[ -n ${DATABASE_URL:-}${DATABASE_HOST:-}${DATABASE_SOCKET:-} ]] || use_own_database
attend node --import tsx "$@"
