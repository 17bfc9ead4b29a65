#!/usr/bin/env bash
# Packages the extension with the server inside, for one platform:
#
#   package.sh [TARGET] [FOLDER]
#
# TARGET is one of the names below (this machine's by default); the .vsix goes to
# FOLDER (the current one by default). Needs Go and node with npm.
set -euo pipefail
out=$(realpath "${2:-.}")
here=$(cd "$(dirname "$0")" && pwd)
target=${1:-$(node -p '`${process.platform}-${process.arch}`')}
case $target in
  linux-x64) os=linux arch=amd64 ;;
  linux-arm64) os=linux arch=arm64 ;;
  linux-armhf) os=linux arch=arm ;;
  alpine-x64) os=linux arch=amd64 ;;
  alpine-arm64) os=linux arch=arm64 ;;
  darwin-x64) os=darwin arch=amd64 ;;
  darwin-arm64) os=darwin arch=arm64 ;;
  win32-x64) os=windows arch=amd64 ;;
  win32-arm64) os=windows arch=arm64 ;;
  *)
    echo "package.sh: there is no target '$target'" >&2
    exit 2
    ;;
esac

# Everything is made in a folder of its own: the checkout stays as it is.
build=$(mktemp -d)
trap 'rm -rf "$build"' EXIT
program=kern
[ $os = windows ] && program=kern.exe
mkdir -p "$build/extension/bin" "$build/extension/dist"
(cd "$here" && CGO_ENABLED=0 GOOS=$os GOARCH=$arch go build -trimpath -ldflags='-s -w' -o "$build/extension/bin/$program" ../../cmd/kern)

cp -R "$here/src" "$here/package.json" "$here/package-lock.json" "$build/"
(
  cd "$build"
  npm ci --ignore-scripts --no-audit --no-fund --loglevel=error
  node node_modules/esbuild/bin/esbuild src/extension.js --bundle --platform=node --target=node18 --format=cjs \
    --external:vscode --minify --legal-comments=none --log-level=warning --outfile=extension/dist/extension.js
  # The licences of what was bundled.
  for licence in $(find node_modules -maxdepth 2 -iname 'licen[cs]e*' -not -path '*/esbuild/*' -not -path '*/@esbuild/*' | sort); do
    printf '=== %s\n\n' "$(basename "$(dirname "$licence")")"
    cat "$licence"
    printf '\n'
  done >extension/NOTICES.txt
)
cp -R "$here/package.json" "$here/language-configuration.json" "$here/README.md" "$here/syntaxes" "$build/extension/"
cp "$here/../../LICENSE" "$build/extension/LICENSE.txt"
(cd "$here" && go run ./pack -target "$target" -from "$build/extension" -to "$out")
