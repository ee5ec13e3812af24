# What Pilotis is built from and tested with, all from Debian 12. Sourced by apps/demo.sh and tests/run.sh.

build_packages=(
  g++ cmake ninja-build ccache
  libeigen3-dev libboost-dev libhdf5-dev libfmt-dev libtomlplusplus-dev libcli11-dev libudunits2-dev libssl-dev
  nlohmann-json3-dev libtbb-dev
)
test_packages=(
  libgtest-dev libgmock-dev libbenchmark-dev librapidcheck-dev libsundials-dev
  python3 python3-h5py python3-xarray python3-h5netcdf python3-netcdf4 python3-scipy
  clang-format openmpi-bin libopenmpi-dev procps
)

# Prints the packages among the arguments that are not installed.
missing_packages() {
  local package
  for package in "$@"; do
    dpkg-query -W -f='${db:Status-Status}' "$package" 2>/dev/null | grep -qx installed || echo "$package"
  done
}

# Runs a command as root: as it stands, or through sudo.
as_root() {
  if [ "$(id -u)" -eq 0 ]; then
    "$@"
  elif command -v sudo >/dev/null; then
    sudo "$@"
  else
    echo "Not root, and sudo is not there: run this as root: $*" >&2
    return 1
  fi
}

# Installs those of the arguments that are missing. Asks nothing, and leaves apt alone when nothing is missing.
install_packages() {
  if ! command -v dpkg-query >/dev/null || ! command -v apt-get >/dev/null; then
    echo "This script installs packages of Debian 12, and this is not Debian. Install what corresponds to these," >&2
    echo "then build with CMake as DEVELOPERS.md says: $*" >&2
    return 1
  fi
  local missing
  mapfile -t missing < <(missing_packages "$@")
  if [ ${#missing[@]} -eq 0 ]; then return 0; fi
  echo "Installing from Debian: ${missing[*]}"
  as_root apt-get -q update &&
    as_root env DEBIAN_FRONTEND=noninteractive apt-get -q -y --no-install-recommends install "${missing[@]}"
}

# build FOLDER OPTIONS...: configures with CMake and builds all of it.
build() {
  local folder=$1
  shift
  cmake -G Ninja -S . -B "$folder" "$@" && cmake --build "$folder"
}
