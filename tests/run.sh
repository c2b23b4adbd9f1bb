#!/usr/bin/env bash
# Installs what is missing, builds everything with its tests in build-tests/, and runs all of them.
# Arguments go to ctest: bash tests/run.sh -R unit
set -euo pipefail

unset CDPATH
cd -- "$(dirname -- "${BASH_SOURCE[0]}")/.."
. tests/support/packages.sh
trap 'give_back build-tests' EXIT

need_packages "${packages_to_build[@]}" "${packages_to_test[@]}"

# Where every change is checked, a warning is an error; elsewhere a newer compiler's new warning does no harm.
warnings_are_errors=OFF
if [ "${CI:-}" = true ]; then warnings_are_errors=ON; fi
# -O2 without NDEBUG: the tests run with every assert at work.
build_in build-tests -D CMAKE_BUILD_TYPE=Release -D CMAKE_CXX_FLAGS_RELEASE=-O2 -D BANDWRIGHT_TESTS=ON \
  -D CMAKE_COMPILE_WARNING_AS_ERROR="$warnings_are_errors"
ctest --test-dir build-tests --output-on-failure --no-tests=error --parallel 2 "$@"
