#!/usr/bin/env bash
# Installs what is missing before the start or the tests: Debian packages, then the npm packages of the lock file.
set -euo pipefail
cd "$(dirname "$0")/../.."
packages=(mariadb-server ffmpeg bubblewrap)
[ "${1:-}" = "--with-tests" ] && packages+=(chromium)
missing=()
for package in "${packages[@]}"; do
  dpkg -s "$package" >/dev/null 2>&1 || missing+=("$package")
done
if [ "${#missing[@]}" -gt 0 ]; then
  if [ "$(id -u)" -ne 0 ]; then
    echo "These Debian packages are missing. Install them and try again: apt-get install ${missing[*]}" >&2
    exit 1
  fi
  echo "Installing Debian packages: ${missing[*]}"
  apt-get update -qq
  DEBIAN_FRONTEND=noninteractive apt-get install -y -qq --no-install-recommends "${missing[@]}" >/dev/null
fi
stamp=node_modules/.lock-hash
hash=$(sha256sum package-lock.json | cut -d' ' -f1)
if [ "$(cat "$stamp" 2>/dev/null || true)" != "$hash" ]; then
  echo "Installing npm packages"
  npm ci --no-audit --no-fund --loglevel=error
  echo "$hash" >"$stamp"
fi
