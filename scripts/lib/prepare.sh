# What must be there before anything of ours can run. Sourced from the project's folder; every step does nothing
# when nothing changed. Steps in two terminals wait for one another, so that they never build over each other.

export NUXT_TELEMETRY_DISABLED=1

# What goes into a build: change one of these and the next start builds again.
build_sources=(nuxt.config.ts app.vue error.vue app.config.ts pages layouts components composables utils stores middleware plugins
  modules assets public shared server emails tailwind.config.ts package.json package-lock.json tsconfig.json)

fail() {
  echo "$1" >&2
  exit 1
}

prepare_node() {
  local version
  version=$(node --version 2>/dev/null) || fail "Node.js is missing. Undercroft needs Node.js 20, 20.19 or newer."
  [[ $version =~ ^v20\.([0-9]+)\. && ${BASH_REMATCH[1]} -ge 19 ]] ||
    fail "Undercroft needs Node.js 20, 20.19 or newer; this is $version."
}

prepare_postgres() {
  compgen -G '/usr/lib/postgresql/*/bin/postgres' >/dev/null || install_package postgresql PostgreSQL
}

prepare_chromium() {
  [[ -x /usr/bin/chromium ]] || install_package chromium Chromium
}

install_package() {
  local package=$1 name=$2
  command -v apt-get >/dev/null || fail "$name is missing, and there is no apt-get to install it with. Install it and try again."
  ((EUID == 0)) || fail "$name is missing. Install it and try again: sudo apt-get install $package"
  echo "Installing $name …"
  export DEBIAN_FRONTEND=noninteractive
  { apt-get update -qq && apt-get install -y -qq "$package"; } >/dev/null || fail "$name could not be installed: see the lines above."
}

# Packages and Nuxt's generated types, without which no TypeScript of ours can be read.
prepare_packages() {
  local log=${1:-} stamp=node_modules/.undercroft-installed state
  hold_project
  state="$(node --version) $(hash_of package-lock.json)"
  if [[ $(cat "$stamp" 2>/dev/null) != "$state" ]]; then
    rm -f "$stamp"
    long_step 'Installing packages' "$log" npm ci --include=dev --no-audit --no-fund
    echo "$state" >"$stamp"
  elif [[ ! -e .nuxt/tsconfig.json ]]; then
    long_step 'Preparing types' "$log" node_modules/.bin/nuxt prepare
  fi
  release_project
}

prepare_build() {
  local log=${1:-} stamp=.output/.undercroft-built state
  hold_project
  state="$(node --version) $(hash_of "${build_sources[@]}")"
  if [[ $(cat "$stamp" 2>/dev/null) != "$state" ]]; then
    rm -f "$stamp"
    NODE_ENV=production long_step 'Building' "$log" node_modules/.bin/nuxt build
    echo "$state" >"$stamp"
  fi
  release_project
}

# One hash over names and contents; what is not there simply does not count.
hash_of() {
  local found=() path
  for path in "$@"; do [[ -e $path ]] && found+=("$path"); done
  find "${found[@]}" -type f -print0 | LC_ALL=C sort -z | xargs -0 sha256sum | sha256sum | cut -c1-64
}

# The lock is on the project's folder itself. A step that outlives us holds it too, so the next one waits for it to end.
hold_project() {
  exec 8<.
  flock -n 8 && return
  echo 'Another start is preparing this copy of Undercroft; waiting for it …'
  flock 8
}

release_project() {
  exec 8<&-
}

# Runs a slow command, with its output in the log named or, where none is kept, in a passing one. It has a process
# group of its own, so that Ctrl-C or SIGTERM ends all of it at once, and must not keep the data folder's lock (9) if we are killed.
long_step() {
  local what=$1 log=$2 passing='' began=$SECONDS group
  shift 2
  [[ -n $log ]] || log=$(mktemp -t undercroft-XXXXXX.log) passing=$log
  echo "$what …"
  setsid "$@" >"$log" 2>&1 9>&- </dev/null &
  group=$!
  trap 'kill -TERM -- "-$group" 2>/dev/null; wait "$group" || true; exit 130' INT TERM HUP
  if ! wait "$group"; then
    tail -n 40 "$log" >&2
    fail "$what failed; the whole of it is in $log."
  fi
  trap - INT TERM HUP
  [[ -z $passing ]] || rm -f "$passing"
  echo "$what took $((SECONDS - began)) s."
}
