#!/usr/bin/env bash
# Builds Leeway and tests it. Every step says what it does; what a machine lacks is installed, what is there is left.
#
#   ./build.sh         set up, build the page and the zip, assess a demo line
#   ./build.sh test    set up, build, run every test
#   ./build.sh bench   benchmarks, as ratios in one run
#   ./build.sh data    make the data file anew from its sources
set -euo pipefail
cd "$(dirname "$0")"
export CARGO_TERM_COLOR=${CARGO_TERM_COLOR:-never}
export PATH="${CARGO_HOME:-$HOME/.cargo}/bin:$PATH"

DIST=dist
DEMO=tests/lines/heron-2.leeway.json
PAGE_LIMIT=2500000
BUILD=target/page

say() { printf '\n== %s\n' "$*"; }
note() { printf '   %s\n' "$*"; }
stop() { printf '\nStopped: %s\n' "$*" >&2; exit 1; }
have() { command -v "$1" >/dev/null 2>&1; }

as_root() {
  if [ "$(id -u)" = 0 ]; then "$@"
  elif have sudo; then sudo "$@"
  else stop "this needs root once: $*"
  fi
}

# Debian packages that are not there yet; arguments are pairs of command and package.
debian() {
  local missing=()
  while [ $# -gt 0 ]; do
    if have "$1"; then note "$1 is there"; else missing+=("$2"); fi
    shift 2
  done
  [ ${#missing[@]} -eq 0 ] && return
  note "installing from Debian: ${missing[*]}"
  as_root apt-get update -qq
  as_root env DEBIAN_FRONTEND=noninteractive apt-get install -y -qq "${missing[@]}" >/dev/null
}

rust_tools() {
  say "Rust: target, formatter, lints and the binding tool"
  if ! have cargo || ! have rustup; then stop "cargo or rustup is missing: install Rust 1.95 or later with rustup"; fi
  if rustup target list --installed | grep -qx wasm32-unknown-unknown; then note "target wasm32-unknown-unknown is there"
  else note "adding target wasm32-unknown-unknown"; rustup target add wasm32-unknown-unknown; fi
  cargo fmt --version >/dev/null 2>&1 || rustup component add rustfmt
  cargo clippy --version >/dev/null 2>&1 || rustup component add clippy
  local version
  version=$(awk '/^name = "wasm-bindgen"$/ { getline; gsub(/version = |"/, ""); print; exit }' Cargo.lock)
  if [ "$(wasm-bindgen --version 2>/dev/null)" = "wasm-bindgen $version" ]; then note "wasm-bindgen $version is there"
  else note "installing wasm-bindgen-cli $version"; cargo install --quiet wasm-bindgen-cli --version "$version"; fi
}

page_tools() {
  say "Page: bundler and type checker"
  have npm || stop "npm is missing: install Node.js 20 or later"
  if [ web/node_modules/.package-lock.json -nt web/package-lock.json ]; then note "packages are there"
  else note "installing the packages of web/package-lock.json"; (cd web && npm ci --no-audit --no-fund --loglevel=error); fi
}

wasm() {
  say "Engine for the page"
  cargo build --quiet --release --package leeway-wasm --target wasm32-unknown-unknown
  mkdir -p "$BUILD"
  wasm-bindgen --target no-modules --no-typescript --out-dir "$BUILD" target/wasm32-unknown-unknown/release/leeway_wasm.wasm
  note "$(stat -c %s "$BUILD/leeway_wasm_bg.wasm") bytes of WebAssembly"
}

page() {
  say "One page with everything inside"
  mkdir -p "$DIST"
  node web/build.mjs --wasm "$BUILD" --lines tests/lines --licences "$DIST/THIRD-PARTY-LICENCES.txt" --out "$DIST/leeway.html"
  local size
  size=$(stat -c %s "$DIST/leeway.html")
  [ "$size" -le "$PAGE_LIMIT" ] || stop "the page has $size bytes, at most $PAGE_LIMIT are allowed"
  note "$size bytes of $PAGE_LIMIT allowed"
}

shell_command() {
  say "Command for the shell"
  cargo build --quiet --release --package leeway-cli
  note "target/release/leeway"
}

licences() {
  say "Licences of everything that ships"
  mkdir -p "$DIST"
  python3 tests/licences.py --out "$DIST/THIRD-PARTY-LICENCES.txt"
}

zip_folder() {
  say "The zip"
  rm -rf "$DIST/leeway" "$DIST/leeway.zip"
  mkdir -p "$DIST/leeway/lines"
  cp "$DIST/leeway.html" crates/dataset/data/leeway-data.txt web/GUIDE.txt "$DIST/THIRD-PARTY-LICENCES.txt" LICENSE-MIT LICENSE-APACHE "$DIST/leeway/"
  cp tests/lines/*.leeway.json "$DIST/leeway/lines/"
  # One date and one order, so that the same files make the same zip.
  find "$DIST/leeway" -exec touch -d 2000-01-01T00:00:00Z {} +
  (cd "$DIST" && find leeway -type f | LC_ALL=C sort | TZ=UTC zip -q -X -@ leeway.zip)
  rm -rf "$DIST/leeway"
  note "$DIST/leeway.zip, $(stat -c %s "$DIST/leeway.zip") bytes"
}

build() {
  rust_tools
  page_tools
  debian zip zip
  wasm
  licences
  page
  shell_command
  zip_folder
}

demo() {
  say "A demo line assessed (invented: Tarnholt Strip, Heron 2)"
  target/release/leeway assess "$DEMO"
  printf '\nThe page: %s\n' "$(pwd)/$DIST/leeway.html"
}

data_tools() {
  say "Data: the sources, pinned, in an environment of their own"
  debian pip3 python3-pip
  local venv=target/data-venv stamp
  stamp=$(sha256sum crates/dataset/make/requirements.txt | cut -d' ' -f1)
  if [ "$(cat $venv/stamp 2>/dev/null)" = "$stamp" ]; then note "the sources are there"; return; fi
  rm -rf $venv
  python3 -m venv $venv || { debian no-such-command python3-venv; python3 -m venv $venv; }
  $venv/bin/pip install --quiet --disable-pip-version-check -r crates/dataset/make/requirements.txt
  echo "$stamp" > $venv/stamp
}

data() {
  data_tools
  target/data-venv/bin/python crates/dataset/make/make.py --out crates/dataset/data/leeway-data.txt
}

tests() {
  build
  say "Formatting"
  cargo fmt --all --check
  say "Lints, warnings denied"
  cargo clippy --quiet --workspace --all-targets -- -D warnings
  cargo clippy --quiet --package leeway-wasm --target wasm32-unknown-unknown -- -D warnings
  say "Documentation, warnings denied"
  RUSTDOCFLAGS="-D warnings" cargo doc --quiet --workspace --no-deps
  say "The data file made anew from its sources, byte for byte"
  data_tools
  target/data-venv/bin/python crates/dataset/make/make.py --check crates/dataset/data/leeway-data.txt
  say "Native tests"
  cargo test --workspace
  say "The engine as WebAssembly in Node: the same bits as native"
  mkdir -p target/parity
  cargo run --quiet --release --package leeway-tests --bin parity > target/parity/native.json
  LEEWAY_PARITY="$(pwd)/target/parity/native.json" CARGO_TARGET_WASM32_UNKNOWN_UNKNOWN_RUNNER=wasm-bindgen-test-runner \
    cargo test --package leeway-wasm --target wasm32-unknown-unknown
  say "Types of the page"
  (cd web && npx --no-install tsc --noEmit)
  say "Logic of the page"
  node --test web/test/*.test.js
  say "The page in Chromium, from file://"
  debian chromium chromium
  node --test --test-concurrency=1 tests/page/*.test.mjs
  say "All tests passed"
}

bench() {
  build
  debian chromium chromium
  say "Benchmarks: ratios in one run"
  (cd tests/bench && cargo bench --quiet)
  node tests/bench/ratios.mjs
  node tests/bench/page.mjs
}

case "${1:-}" in
  "") build; demo ;;
  test) tests ;;
  bench) bench ;;
  data) data ;;
  *) sed -n '2,8s/^# \{0,1\}//p' "$0"; exit 2 ;;
esac
