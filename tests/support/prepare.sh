# What both command lines of the README share: packages, then a build. Sourced, not run.

ionledger_packages=(g++ cmake make libeigen3-dev libboost-dev libtomlplusplus-dev doctest-dev libfmt-dev
                    libcli11-dev nlohmann-json3-dev libfast-float-dev)

# install_packages NAME...: installs what is missing; without the right to, prints the line to run and stops.
install_packages() {
  local missing=() name
  for name in "$@"; do
    [ "$(dpkg-query -W -f '${db:Status-Status}' "$name" 2>/dev/null)" = installed ] || missing+=("$name")
  done
  [ ${#missing[@]} -eq 0 ] && return
  local as_root=()
  if [ "$(id -u)" -ne 0 ]; then
    if sudo -n true 2>/dev/null; then
      as_root=(sudo -n)
    else
      echo "Some packages are missing. Run this line, then run this script again:" >&2
      echo "  sudo apt-get install --no-install-recommends ${missing[*]}" >&2
      exit 1
    fi
  fi
  echo "Installing ${missing[*]} ..."
  "${as_root[@]}" apt-get update -qq
  DEBIAN_FRONTEND=noninteractive "${as_root[@]}" apt-get install -y -qq --no-install-recommends \
    "${missing[@]}" >/dev/null
}

# build FOLDER OPTION...: configures FOLDER with the options and builds the array `targets`, or all of it.
targets=(all)
build() {
  local folder=$1
  shift
  mkdir -p "$folder"
  cmake -S . -B "$folder" "$@" >"$folder/configure.log" || { cat "$folder/configure.log" >&2; exit 1; }
  cmake --build "$folder" --target "${targets[@]}" --parallel "$(nproc)" >"$folder/build.log" 2>&1 ||
    { tail -50 "$folder/build.log" >&2; exit 1; }
}
