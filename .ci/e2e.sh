#!/usr/bin/env bash
# The real window on a display without a screen: opens a copy of a demo, drags a conductor, edits a current, saves, and checks the
# file and the command line's answer. Screenshots and the program's own trace go to out/e2e.
set -u
cd "$(dirname "$0")/.."
bin=$PWD/bin
out=${E2E_OUT:-$PWD/out/e2e}
mkdir -p "$out"
rm -f "$out"/*.png "$out"/*.txt
work=$(mktemp -d)
file=$work/nine-in-emt.yaml
{ cat assets/designs/nine-in-emt.yaml; echo '# a remark of a person'; } >"$file"
trace=$out/trace.txt
pids=()

finish() {
  for p in "${pids[@]}"; do kill "$p" 2>/dev/null; done
  sleep 0.2
  for p in "${pids[@]}"; do kill -9 "$p" 2>/dev/null; done
  rm -rf "$work"
}
trap finish EXIT

step() { echo "e2e: $*"; }
fail() {
  echo "e2e: FAILED: $*" >&2
  [ -n "${DISPLAY:-}" ] && shot failed
  [ -f "$trace" ] && { echo "last lines of the trace:" >&2; grep -v '^part' "$trace" | tail -n 15 >&2; }
  exit 1
}
shot() { import -window root "$out/$1.png" 2>/dev/null || true; }

# until SECONDS WHAT COMMAND… polls until the command succeeds.
until_() {
  local end=$((SECONDS + $1)) what=$2
  shift 2
  until "$@" >/dev/null 2>&1; do
    [ $SECONDS -ge $end ] && fail "waited in vain for $what"
    sleep 0.1
  done
}
# said PATTERN: the trace has it after the mark; mark: forget what came so far.
marked=0
mark() { marked=$(wc -l <"$trace"); }
said() { tail -n +$((marked + 1)) "$trace" | grep -q -- "$1"; }
wait_for() { until_ 60 "$1" said "$1"; }
# place ID: where a part is on the screen.
place() { sed -n "s/^part $1 at \([0-9]*\),\([0-9]*\) px$/\1 \2/p" "$trace" | tail -n 1; }
keys() { xdotool key --clearmodifiers "$@"; }

# --- what the other checks leave out, since it needs the toolkit's OpenGL package, which is compiled for this one anyway
step "test cmd/packrise"
go test ./cmd/packrise/... >"$out/cmd-test.txt" 2>&1 || { cat "$out/cmd-test.txt" >&2; fail "go test ./cmd/packrise/..."; }

# --- a display of its own
for tool in Xvfb openbox xdotool import; do
  command -v $tool >/dev/null || { echo "e2e: $tool is missing: run .ci/setup look" >&2; exit 1; }
done
Xvfb -displayfd 7 -screen 0 1400x900x24 -noreset 7>"$work/display" >"$out/xvfb.txt" 2>&1 &
pids+=($!)
until_ 20 "the display" test -s "$work/display"
DISPLAY=:$(head -n 1 "$work/display")
export DISPLAY HOME=$work LANG=en_US.UTF-8 XDG_CONFIG_HOME=$work/.config
mkdir -p "$XDG_CONFIG_HOME/fyne/app.packrise"
echo '{"look":"light"}' >"$XDG_CONFIG_HOME/fyne/app.packrise/preferences.json"
openbox >"$out/openbox.txt" 2>&1 &
pids+=($!)

# --- open
step "open $(basename "$file")"
: >"$trace"
PACKRISE_TRACE=1 "$bin/packrise" "$file" 2>"$trace" &
app=$!
pids+=($app)
wait_for '^solved rev 1: '
until_ 30 "the window" xdotool search --onlyvisible --name 'nine-in-emt.yaml.*Packrise'
window=$(xdotool search --onlyvisible --name 'nine-in-emt.yaml.*Packrise' | head -n 1)
xdotool windowactivate --sync "$window" windowmove --sync "$window" 0 0
mark
xdotool windowsize --sync "$window" 1280 800
wait_for '^placed 9 parts'
settled() { # the places have not changed for half a second
  local before
  before=$(place B1)
  sleep 0.5
  [ "$before" = "$(place B1)" ]
}
until_ 20 "the layout to settle" settled
eval "$(xdotool getwindowgeometry --shell "$window" | sed -n 's/^\([XY]\)=/O\1=/p')"
shot 1-opened

# --- drag a conductor
step "drag A1"
read -r x y < <(place A1)
[ -n "$x" ] || fail "the trace does not say where A1 is"
x=$((x + OX)) y=$((y + OY))
mark
xdotool mousemove $x $y
xdotool mousedown 1
for i in 1 2 3 4 5 6 7 8 9 10; do
  xdotool mousemove $((x - 6 * i)) $((y - 7 * i))
  sleep 0.03
done
shot 2-dragging
xdotool mouseup 1
wait_for 'undo "move A1"'
wait_for '^solved rev '
wait_for '^title nine-in-emt.yaml\* – Packrise'
shot 3-dropped

# --- edit its current by keyboard: Enter goes to the details, to the current
step "edit the current"
mark
keys Return
wait_for '^focus .*fieldEntry'
xdotool type --delay 40 '28'
shot 4-typing
keys Return
wait_for 'undo "current of '
wait_for '^solved rev '
shot 5-edited

# --- undo and redo
step "undo and redo"
mark
xdotool mousemove $((OX + 700)) $((OY + 30))
keys ctrl+z
wait_for 'redo "current of '
mark
keys ctrl+y
wait_for 'undo "current of '
wait_for '^solved rev '

# --- save
step "save"
mark
keys ctrl+s
wait_for '^title nine-in-emt.yaml – Packrise'
shot 6-saved
old=$(grep 'id: A1' assets/designs/nine-in-emt.yaml) new=$(grep 'id: A1' "$file")
echo "$new" | grep -q at_mm || fail "the saved A1 has no at_mm: $new"
[ "$old" != "$new" ] || fail "at_mm of A1 did not change: $new"
grep -A1 'id: pump-a' "$file" | grep -q 'current_a: 28' || fail "current_a of pump-a is not 28: $(grep -A3 'id: pump-a' "$file")"
grep -q '# a remark of a person' "$file" || fail "the comment in the file was lost"

# --- the command line gives the same answer
step "solve the saved file on the command line"
"$bin/packrise-cli" solve --json "$file" >"$out/solved.txt" 2>&1
status=$?
[ $status -le 1 ] || fail "packrise-cli says $(cat "$out/solved.txt")"
grep -q '"current_a": *28' "$out/solved.txt" || fail "packrise-cli does not have the 28 A"
window_says=$(grep '^solved rev' "$trace" | tail -n 1 | sed 's/^solved rev [0-9]*: //')
"$bin/packrise-cli" solve "$file" >"$out/solved-text.txt" 2>&1
grep -qF "$window_says" "$out/solved-text.txt" || fail "the window says \"$window_says\", packrise-cli $(head -n 3 "$out/solved-text.txt")"

# --- a small window, then quit: nothing is unsaved, so nothing is asked
step "small window, quit"
mark
xdotool windowsize --sync "$window" 1024 640
wait_for '^placed 9 parts'
sleep 0.5
shot 7-small
keys ctrl+q
gone() { ! kill -0 $app 2>/dev/null; }
until_ 20 "the program to end" gone
wait $app
status=$?
[ $status -eq 0 ] || fail "the program ended with status $status"

# --- without a display: the demo's picture
step "without a display"
(cd "$work" && env -u DISPLAY -u WAYLAND_DISPLAY "$bin/packrise" >"$out/no-display.txt" 2>&1) || fail "without a display: $(cat "$out/no-display.txt")"
cp "$work/packrise-demo.png" "$out/" || fail "no picture was written: $(cat "$out/no-display.txt")"
grep -q 'no display' "$out/no-display.txt" || fail "it does not say that there is no display"

step "passed; screenshots in $out"
