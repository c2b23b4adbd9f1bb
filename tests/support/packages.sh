# shellcheck shell=bash disable=SC2034
# Finds out which Debian packages are missing and installs those. To be sourced by bash scripts.

packages_to_build=(g++ cmake ninja-build libnlopt-cxx-dev libboost-program-options-dev nlohmann-json3-dev
  libeigen3-dev libfmt-dev libtbb-dev)
packages_to_test=(catch2 python3)
packages_to_format=(git clang-format-14)

say() { printf '%s\n' "$*" >&2; }

fail() {
  printf '\n%s: %s\n' "${0##*/}" "$1" >&2
  shift
  local line
  for line; do printf '  %s\n' "$line" >&2; done
  exit 1
}

is_installed() {
  [ "$(dpkg-query --show --showformat='${db:Status-Status}' "$1" 2>/dev/null)" = installed ]
}

list_missing() {
  local package
  for package; do is_installed "$package" || printf ' %s' "$package"; done
}

as_root() {
  if [ "$(id -u)" -eq 0 ]; then "$@"; else sudo "$@"; fi
}

apt_get() {
  as_root env DEBIAN_FRONTEND=noninteractive apt-get -o DPkg::Lock::Timeout=300 -o Acquire::Retries=2 "$@" \
    </dev/null >&2
}

# Installs what is missing of the packages named; nothing, and without asking for rights, where all is there.
need_packages() {
  if ! command -v dpkg-query >/dev/null || ! command -v apt-get >/dev/null; then
    say "This is not a Debian system: packages are left to you. Needed, by their Debian names:" "$@"
    return
  fi
  local missing
  missing=$(list_missing "$@")
  if [ -z "$missing" ]; then
    say "Packages: all there."
    return
  fi
  say "Packages to install:$missing"
  if [ "$(id -u)" -ne 0 ] && ! command -v sudo >/dev/null; then
    fail "packages are missing, and neither root nor sudo is here to install them." \
      "Run this as root, then start the script again:" "apt-get install$missing"
  fi
  # A list that cannot be fetched matters only where a package then cannot be installed.
  apt_get update || say "apt-get update failed; trying to install all the same."
  # shellcheck disable=SC2086
  apt_get install --yes --no-install-recommends $missing ||
    fail "apt-get could not install:$missing" "Its own message stands above. The usual reasons:" \
      "no network (could not resolve, connection failed, timed out)," \
      "package lists never fetched, or a system older than Debian 12 (unable to locate package)," \
      "no right to install (sudo refused), or another installation still at work (could not get lock)."
  missing=$(list_missing "$@")
  [ -z "$missing" ] || fail "apt-get ended well, yet these are still missing:$missing"
}

need_tools() {
  local tool
  for tool; do
    command -v "$tool" >/dev/null ||
      fail "the program '$tool' is not here." "Install it (on Debian 12: apt-get install g++ cmake ninja-build)."
  done
}

# build_in FOLDER CMAKE-OPTION... : configures where needed and builds.
build_in() {
  local folder=$1 fresh=()
  shift
  need_tools cmake ninja c++
  mkdir -p "$folder" 2>/dev/null || true
  [ -w "$folder" ] || fail "cannot write to $PWD/$folder." "Was it made by another user? Remove it, then run again."
  if ! grep -qsxF "CMAKE_HOME_DIRECTORY:INTERNAL=$(pwd -P)" "$folder/CMakeCache.txt" ||
    ! grep -qsxF "CMAKE_GENERATOR:INTERNAL=Ninja" "$folder/CMakeCache.txt"; then
    fresh=(--fresh)
  fi
  cmake "${fresh[@]}" -S . -B "$folder" -G Ninja "$@" >&2 ||
    fail "CMake could not configure the build." "Its own message stands above."
  cmake --build "$folder" --parallel "$(nproc)" >&2 ||
    fail "the build failed." "The compiler's own message stands above."
}

# Under sudo the files made here would belong to root, and a later run without sudo could not change them.
give_back() {
  if [ "$(id -u)" -eq 0 ] && [ -n "${SUDO_UID:-}" ] && [ -e "$1" ]; then
    chown -R "$SUDO_UID:${SUDO_GID:-$SUDO_UID}" "$1" || true
  fi
}
