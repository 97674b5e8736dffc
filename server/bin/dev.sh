#!/usr/bin/env bash
# npm run dev: the database of npm start, the server and the client, both following every change.
set -euo pipefail
cd "$(dirname "${BASH_SOURCE[0]}")/../.."
# shellcheck source=server/bin/machine.sh
source server/bin/machine.sh
follow_npm "$@"
read_flags "$@"

pids=()
finish() {
  local status=$? pid
  set +e
  trap '' INT TERM HUP
  [[ -z $attended ]] || end_launched "$attended" 5
  for pid in "${pids[@]}"; do end_launched "$pid" 10; done
  [[ -z $database_pid ]] || end_database "$database_pid"
  exit "$status"
}
trap finish EXIT
trap 'exit 0' INT TERM HUP

prepare_home
launch node --watch --import tsx server/main.ts
pids+=("$launched")
launch node node_modules/vite/bin/vite.js
pids+=("$launched")
wait -n "${pids[@]}" || true
give_up "The server or the client ended by itself; its own words are above."
