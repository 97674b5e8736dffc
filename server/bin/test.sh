#!/usr/bin/env bash
# npm test: everything the tests need on a bare Debian 12 with Node, then all of them. The last line counts them.
# With an argument (unit, api, e2e) only that group; with bench the ratios instead of the tests.
set -euo pipefail
cd "$(dirname "${BASH_SOURCE[0]}")/../.."
# shellcheck source=server/bin/machine.sh
source server/bin/machine.sh
follow_npm "$@"

only=${1:-all}
case $only in all | unit | api | e2e | bench) ;; *) give_up "Unknown group \"$only\". Choose unit, api, e2e or bench, or none for all." ;; esac
wants() { [[ $only == all || $only == "$1" ]]; }
wants_bench() { [[ $only == bench ]]; }

reports=''
passed=0
failed=0

finish() {
  local status=$?
  set +e
  trap '' INT TERM HUP
  [[ -z $attended ]] || end_launched "$attended" 5
  [[ -z $database_pid ]] || end_database "$database_pid"
  [[ -z $reports ]] || rm -rf "$reports"
  exit "$status"
}
trap finish EXIT
trap 'exit 130' INT TERM HUP

# Counts from a report of vitest or Playwright; a runner that left no report has failed once.
count_report() {
  local file=$1 status=$2 counts
  counts=$(node -e '
    const report = JSON.parse(require("node:fs").readFileSync(process.argv[1], "utf8"));
    const passed = report.numPassedTests ?? report.stats.expected + report.stats.flaky;
    const failed = report.numFailedTests ?? report.stats.unexpected;
    const broken = (report.testResults ?? []).filter((file) => file.status === "failed" && file.assertionResults.every(({ status }) => status !== "failed")).length;
    console.log(passed, failed + broken);
  ' "$file" 2>/dev/null) || counts='0 1'
  read -r group_passed group_failed <<<"$counts"
  ((status == 0 || group_failed > 0)) || group_failed=1
  passed=$((passed + group_passed))
  failed=$((failed + group_failed))
}

run_vitest() {
  local group=$1 status=0
  attend node node_modules/vitest/vitest.mjs run --project "$group" --reporter=default --reporter=json \
    --outputFile.json="$reports/$group.json" || status=$?
  count_report "$reports/$group.json" "$status"
}

run_browser() {
  local status=0
  PLAYWRIGHT_JSON_OUTPUT_NAME=$reports/e2e.json attend node node_modules/@playwright/test/cli.js test \
    -c tests/e2e/playwright.config.ts || status=$?
  count_report "$reports/e2e.json" "$status"
}

# The check values themselves, computed again in R.
run_reference() {
  if attend Rscript tests/fixtures/reference/reference.R; then passed=$((passed + 1)); else failed=$((failed + 1)); fi
}

check() {
  attend node node_modules/@biomejs/biome/bin/biome ci . && attend node node_modules/typescript/bin/tsc -b
}

require_node
step packages install_packages
wanted=("${mariadb_programs[@]}" openssl:openssl)
! wants e2e || wanted+=(chromium:chromium)
! wants e2e && ! wants unit || wanted+=(Rscript:r-base-core)
! wants unit || wanted+=(python3:python3)
need_from_debian "${wanted[@]}"

reports=$(mktemp -d /dev/shm/fairlead-test.XXXXXX 2>/dev/null || mktemp -d)
database_home=$reports
database_user=fairlead_test
database_password=$(od -An -N16 -tx1 /dev/urandom | tr -d ' \n')
step database open_database --skip-networking --innodb-flush-log-at-trx-commit=0 --innodb-doublewrite=0
export TEST_DATABASE_SOCKET=$database_home/mariadb/mariadb.sock TEST_DATABASE_USER=$database_user \
  TEST_DATABASE_PASSWORD=$database_password

if wants_bench; then
  attend node --import tsx tests/bench/bench.ts
  exit
fi
if [[ $only == all ]]; then
  if check; then passed=$((passed + 1)); else failed=$((failed + 1)); fi
fi
if wants unit; then
  run_vitest unit
  run_reference
fi
! wants api || run_vitest api
if wants e2e; then
  step client build_client
  run_browser
fi

printf '\n%s passed, %s failed\n' "$passed" "$failed"
((failed == 0))
