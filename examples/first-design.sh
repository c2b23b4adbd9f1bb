#!/usr/bin/env bash
# From a fresh machine to a first design: installs what is missing, builds in build/, designs the stage that $SPEC asks
# for, shows the ranked table and keeps the results as JSON and CSV.
set -euo pipefail

SPEC=examples/hydrophone-line.json
RESULTS=build/first-design

unset CDPATH
cd -- "$(dirname -- "${BASH_SOURCE[0]}")/.."
. tests/support/packages.sh
trap 'give_back build' EXIT

need_packages "${packages_to_build[@]}"
build_in build -D CMAKE_BUILD_TYPE=Release -D BANDWRIGHT_TESTS=OFF -D BANDWRIGHT_BENCH=OFF

# Status 1 means that nothing meets every requirement: the nearest candidates are results all the same.
design() {
  local status=0
  build/bin/bandwright design "$SPEC" "$@" || status=$?
  [ "$status" -le 1 ] || fail "bandwright design $SPEC $* ended with status $status."
  return "$status"
}

mkdir -p "$RESULTS"
printf '\n%s\n' "bandwright design $SPEC"
met=0
design || met=$?
design --format json -o "$RESULTS/result.json" || true
design --format csv -o "$RESULTS/candidates.csv" || true

printf '\nWritten:\n'
for file in result.json candidates.csv; do
  [ -s "$RESULTS/$file" ] || fail "$RESULTS/$file was not written."
  printf '  %s\n' "$PWD/$RESULTS/$file"
done
exit "$met"
