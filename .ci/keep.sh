#!/usr/bin/env bash
# The real window, killed with unsaved work: what was kept is offered at the next start, recovered by keyboard, and saved; then another program
# changes the file. Screenshots go to out/keep. LOOK=dark for the dark ones.
set -u
cd "$(dirname "$0")/.."
bin=$PWD/bin
out=${KEEP_OUT:-$PWD/out/keep}
look=${LOOK:-light}
mkdir -p "$out"
work=$(mktemp -d)
file="$work/motor für Öl.yaml"
cp assets/designs/nine-in-emt.yaml "$file"
trace=$out/trace-$look.txt
pids=()
finish() {
  for p in "${pids[@]}"; do kill "$p" 2>/dev/null; done
  sleep 0.2
  for p in "${pids[@]}"; do { kill -9 "$p"; wait "$p"; } 2>/dev/null; done
  rm -rf "$work"
}
trap finish EXIT
step() { echo "keep: $*"; }
shot() { import -window root "$out/$look-$1.png" 2>/dev/null || true; }
fail() {
  echo "keep: FAILED: $*" >&2
  [ -n "${DISPLAY:-}" ] && shot failed
  [ -f "$trace" ] && grep -v '^part' "$trace" | tail -n 15 >&2
  exit 1
}
until_() { # SECONDS WHAT COMMAND…
  local end=$((SECONDS + $1)) what=$2
  shift 2
  until "$@" >/dev/null 2>&1; do
    [ $SECONDS -ge $end ] && fail "waited in vain for $what"
    sleep 0.1
  done
}
marked=0
mark() { marked=$(wc -l <"$trace"); }
said() { tail -n +$((marked + 1)) "$trace" | grep -q -- "$1"; }
wait_for() { until_ 90 "$1" said "$1"; }
keys() { xdotool key --clearmodifiers "$@"; }

for tool in Xvfb openbox xdotool import; do
  command -v $tool >/dev/null || { echo "keep: $tool is missing: run .ci/setup look" >&2; exit 1; }
done
Xvfb -displayfd 7 -screen 0 1400x900x24 -noreset 7>"$work/display" >/dev/null 2>&1 &
pids+=($!)
until_ 20 "the display" test -s "$work/display"
DISPLAY=:$(head -n 1 "$work/display")
export DISPLAY HOME=$work LANG=en_US.UTF-8 XDG_CONFIG_HOME=$work/.config XDG_CACHE_HOME=$work/.cache
mkdir -p "$XDG_CONFIG_HOME/fyne/app.packrise"
echo "{\"look\":\"$look\"}" >"$XDG_CONFIG_HOME/fyne/app.packrise/preferences.json"
openbox >/dev/null 2>&1 &
pids+=($!)

start() { # the program, until its window is there
  mark
  PACKRISE_TRACE=1 "$bin/packrise" "$@" 2>>"$trace" &
  app=$!
  pids+=($app)
  wait_for '^solved rev 1: '
  until_ 30 "the window" xdotool search --onlyvisible --name 'Packrise'
  window=$(xdotool search --onlyvisible --name 'Packrise' | head -n 1)
  xdotool windowactivate --sync "$window"
}
: >"$trace"

step "change, and kill when it is kept"
start "$file"
mark
xdotool mousemove --window "$window" 700 400
keys ctrl+g
wait_for 'undo "settle"'
from=$SECONDS
wait_for '^kept '
[ $((SECONDS - from)) -le 60 ] || fail "it took $((SECONDS - from)) s to keep the change"
{ kill -9 $app; wait $app; } 2>/dev/null
cmp -s "$file" assets/designs/nine-in-emt.yaml || fail "the file was written without a save"
[ "$(ls -A "$work" | grep -c 'packrise-kept$')" = 1 ] || fail "no side file beside the design"

step "start again, recover"
start "$file"
wait_for '^offered 1, broken 0'
sleep 1
shot 1-offered
mark
keys Tab Tab space # past Discard
wait_for '^recovered '
wait_for '^title motor für Öl.yaml\* – Packrise'
wait_for '^kept '
mark
keys ctrl+s
wait_for '^title motor für Öl.yaml – Packrise'
gone() { ! ls -A "$work" | grep -q 'packrise-kept$'; }
until_ 20 "the side file to go" gone
cmp -s "$file" assets/designs/nine-in-emt.yaml && fail "the recovered work was not saved"

step "another program changes the file"
mark
sleep 1
sed -i 's/^title: .*/title: Changed by another/' "$file"
keys ctrl+g
xdotool mousemove --window "$window" 700 400
keys ctrl+z
keys ctrl+s
wait_for '^changed on disk'
sleep 1
shot 2-changed
keys Escape

step "open it a second time"
first=$app
mark
PACKRISE_TRACE=1 "$bin/packrise" "$file" 2>>"$trace" &
second=$!
pids+=($second)
wait_for '^open elsewhere'
sleep 1.5
shot 3-elsewhere
{ kill -9 $second; wait $second; kill $first; wait $first; } 2>/dev/null
step "passed; screenshots in $out"
