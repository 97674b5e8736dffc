#!/usr/bin/env bash
# npm start: makes a bare Debian 12 with Node ready and serves Fairlead until it is told to stop.
# npm start -- --lan: the same for phones on the local network, with TLS beside plain http.
# npm start -- --no-demo: the same without the demo; the first start prints a link that creates organisation and owner.
set -euo pipefail
cd "$(dirname "${BASH_SOURCE[0]}")/../.."
# shellcheck source=server/bin/machine.sh
source server/bin/machine.sh
follow_npm "$@"
read_flags "$@"

server_pid=''

finish() {
  local status=$?
  set +e
  trap '' INT TERM HUP
  [[ -z $attended ]] || end_launched "$attended" 5
  [[ -z $server_pid ]] || end_launched "$server_pid" 10
  [[ -z $database_pid ]] || end_database "$database_pid"
  exit "$status"
}

trap finish EXIT
trap 'exit 130' INT TERM HUP

prepare_home
[[ ${FAIRLEAD_LAN:-off} == off ]] || {
  export TLS_PORT=${TLS_PORT:-4443}
  require_free_port TLS_PORT "$HOST" "$TLS_PORT"
}
step client build_client

export NODE_ENV=${NODE_ENV:-production}
launch node --import tsx server/main.ts
server_pid=$launched
# From here on being told to stop is the ordinary end.
trap 'exit 0' INT TERM HUP

watched=("$server_pid")
is_own_child "$database_pid" && watched+=("$database_pid")
status=0
wait -n -p ended "${watched[@]}" || status=$?
if [[ $ended == "$server_pid" ]]; then
  give_up_with "$status" "The server ended by itself (exit code $status); its own words are above."
fi
complain "The database ended by itself, so the server is stopped. The end of its log, .data/mariadb.log:"
tail -n 20 .data/mariadb.log >&2
exit 1
