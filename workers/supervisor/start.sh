#!/usr/bin/env bash
# What `npm start`, `npm run dev` and `npm test` begin with: everything that has to be there before a line of
# TypeScript can run. It installs what is missing and then becomes the supervisor, so that signals reach that one.
set -euo pipefail
cd "$(dirname "${BASH_SOURCE[0]}")/../.."
mode="${1:-start}"
[ "$#" -gt 0 ] && shift

data="${DATA_DIR:-.lidfast}"
logs="$data/logs"
jobs_running=()

fail() {
  printf '%s\n' "$*" >&2
  exit 1
}

# Ends what was begun; a half-finished install is noticed and done again at the next start.
stop_early() {
  trap '' TERM INT HUP
  for pid in "${jobs_running[@]}"; do kill -TERM -- "-$pid" 2>/dev/null || true; done
  for _ in $(seq 50); do
    alive=0
    for pid in "${jobs_running[@]}"; do kill -0 -- "-$pid" 2>/dev/null && alive=1; done
    [ "$alive" = 0 ] && break
    sleep 0.2
  done
  for pid in "${jobs_running[@]}"; do kill -KILL -- "-$pid" 2>/dev/null || true; done
  printf 'Stopped.\n'
  exit 0
}
trap stop_early TERM INT HUP

# A session of its own for each job: one signal then reaches all of it, and Ctrl-C comes to us alone.
begin() {
  local log="$1"
  shift
  setsid setpriv --pdeathsig TERM -- "$@" >"$logs/$log.log" 2>&1 9>&- </dev/null &
  jobs_running+=("$!")
}

# Waits for a job, with a line now and then that says how long it has taken.
finish() {
  local pid="$1" log="$2" words="$3" began=$SECONDS code=0 said=0
  while kill -0 "$pid" 2>/dev/null; do
    sleep 0.5 || true
    if [ $((SECONDS - began)) -ge $((said + 10)) ]; then
      said=$((SECONDS - began))
      printf '%s … %s s\n' "$words" "$said"
    fi
  done
  wait "$pid" || code=$?
  if [ "$code" != 0 ]; then
    tail -n 25 "$logs/$log.log" >&2
    fail "$words failed (code $code). The whole of what it said is in $logs/$log.log."
  fi
  printf '%s: done in %s s\n' "$words" "$((SECONDS - began))"
}

have() { command -v "$1" >/dev/null 2>&1 || [ -x "/usr/bin/$1" ]; }

missing_packages() {
  if [ "$mode" = test ] || [ -z "${DATABASE_URL:-}" ]; then
    compgen -G '/usr/lib/postgresql/*/bin/initdb' >/dev/null || printf 'postgresql '
  fi
  if [ "$mode" = test ]; then
    have chromium || printf 'chromium fonts-liberation '
    have mosquitto_pub || printf 'mosquitto-clients '
  fi
}

# Debian's package would make and start a cluster of its own on port 5432; ours is private.
debian_script() {
  cat <<SCRIPT
set -e
export DEBIAN_FRONTEND=noninteractive
dpkg --configure -a
mkdir -p /etc/postgresql-common/createcluster.d
[ -e /var/lib/dpkg/info/postgresql-common.list ] || echo 'create_main_cluster = false' > /etc/postgresql-common/createcluster.d/lidfast.conf
apt-get -o DPkg::Lock::Timeout=300 update
apt-get -o DPkg::Lock::Timeout=300 install -y --no-install-recommends $1
SCRIPT
}

# The packages are complete when npm's own list of what it put there agrees with the lock file.
packages_current() {
  node -e '
    const { readFileSync } = require("fs")
    const read = (file) => JSON.parse(readFileSync(file, "utf8")).packages
    const wanted = read("package-lock.json"), there = read("node_modules/.package-lock.json")
    const same = ([name, want]) => name === "" || want.optional || want.devOptional ||
      (there[name] && there[name].version === want.version && there[name].integrity === want.integrity)
    process.exit(Object.entries(wanted).every(same) ? 0 : 1)
  ' 2>/dev/null
}

have node || fail 'Node.js is missing. Lidfast needs version 20.11 or later.'
node -e 'const [a, b] = process.versions.node.split("."); process.exit(a > 20 || (a == 20 && b >= 11) ? 0 : 1)' ||
  fail "This is Node.js $(node --version). Lidfast needs version 20.11 or later."
case "$mode" in start | dev | test) ;; *) fail "Unknown: $mode. Say start, dev or test." ;; esac

mkdir -p "$logs"
chmod 711 "$data"
lock="$data/running.lock"
[ "$mode" = test ] && lock="$data/testing.lock"
exec 9>"$lock"
if ! flock -n 9; then
  [ "$mode" = test ] && fail 'The tests already run in this folder. Wait for them, or use another checkout.'
  address="$(node -p 'JSON.parse(require("fs").readFileSync(process.argv[1], "utf8")).webUrl' "$data/run.json" 2>/dev/null || true)"
  fail "Lidfast already runs from this folder${address:+, at $address}. Stop that one first (Ctrl-C where it runs)."
fi

apt_job='' npm_job=''
packages="$(missing_packages)"
if [ -n "$packages" ]; then
  as=()
  if [ "$(id -u)" != 0 ]; then
    if sudo -n true 2>/dev/null; then
      as=(sudo -n)
    else
      printf 'Debian packages are missing: %s\nRun this once and start again:\n\n' "$packages"
      printf "  sudo sh -c \"mkdir -p /etc/postgresql-common/createcluster.d && echo 'create_main_cluster = false' > /etc/postgresql-common/createcluster.d/lidfast.conf && apt-get update && apt-get install -y --no-install-recommends %s\"\n\n" "${packages% }"
      exit 1
    fi
  fi
  have apt-get || fail "These are missing and there is no apt-get to install them with: $packages"
  printf "Installing Debian's packages: %s\n" "$packages"
  begin install-debian "${as[@]}" bash -c "$(debian_script "$packages")"
  apt_job="${jobs_running[-1]}"
fi
if ! packages_current; then
  printf 'Installing the packages of package-lock.json\n'
  begin install-npm npm ci --no-audit --no-fund --loglevel=error
  npm_job="${jobs_running[-1]}"
fi
[ -n "$npm_job" ] && finish "$npm_job" install-npm 'Installing the packages'
[ -n "$apt_job" ] && finish "$apt_job" install-debian "Installing Debian's packages"

trap - TERM INT HUP
case "$mode" in
  test) exec node --import tsx tests/run.ts "$@" ;;
  *) exec node --import tsx workers/supervisor/main.ts "$mode" "$@" ;;
esac
