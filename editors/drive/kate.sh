#!/usr/bin/env bash
# Holds Kate's syntax definition against lines of the language, with Kate's own
# highlighter: which formats occur in a line.
set -euo pipefail
data=$(mktemp -d)
trap 'rm -rf "$data"' EXIT
mkdir -p "$data/org.kde.syntax-highlighting/syntax"
cp "$(dirname "$0")/../kate/kern.xml" "$data/org.kde.syntax-highlighting/syntax/"

# formats prints the formats of a line: the highlighter writes them below it.
formats() {
  printf '%s\n' "$1" | XDG_DATA_HOME=$data LC_ALL=C.UTF-8 kate-syntax-highlighter --stdin -s Kern -f ansi --syntax-trace=format 2>"$data/said" |
    sed 's/\x1b\[[0-9;]*[mK]//g' | tail -n +2 | grep -oE '[A-Z][a-z]+' | LC_ALL=C sort -u | tr '\n' ' '
  if [ -s "$data/said" ]; then cat "$data/said"; fi
}

expect() {
  got=$(formats "$1")
  if [ "$got" != "$2 " ]; then
    printf 'FAIL  %s\n  got  %s\n  want %s\n' "$1" "$got" "$2"
    exit 1
  fi
}

expect 'column A1, A2 "Post" as B1 {  # held' 'Comment Declaration Name Normal Particle Sign Text'
expect '    load G 5 kN/m about major' 'Normal Number Particle Statement Unit'
expect '    section = post' 'Normal Operator Statement'
expect 'section s = tube { width = 90 mm; made = hot }' 'Declaration Name Normal Number Operator Particle Property Shape Sign Unit'
expect 'a = max(b2, 5 m) * g' 'Constant Definition Function Normal Number Operator Unit'
expect '    show kN, N/mm2' 'Normal Statement Unit'
expect 'loads = hold_2 + topmost' 'Definition Normal Operator'
echo "ok    lines have their formats"
