#!/usr/bin/env bash
# The package as somebody gets it: unpacked in a folder with a space in its name, run from there, installed, run, looked up by the file manager's
# own tool, taken away.
set -u
cd "$(dirname "$0")/.."
fail() { echo "package: FAILED: $*" >&2; exit 1; }
step() { echo "package: $*"; }
work=$(mktemp -d)
trap 'rm -rf "$work"' EXIT
archive=$(ls -t out/packrise-*.tar.gz 2>/dev/null | head -n 1)
[ -n "$archive" ] || fail "there is no package: make package"
unset PREFIX DESTDIR
export HOME="$work/home of nobody" XDG_CACHE_HOME="$work/cache"
mkdir -p "$HOME"

step "unpack $archive"
mkdir "$work/a folder"
tar -xzf "$archive" -C "$work/a folder" || fail "it can't be unpacked"
tree=$(echo "$work/a folder"/packrise-*)
for f in README.md LICENSE INSTALL.txt install.sh bin/packrise bin/packrise-cli share/doc/packrise/THIRD-PARTY.txt; do
  [ -s "$tree/$f" ] || fail "$f is missing"
done
grep -q '^==== fyne.io/fyne/v2 ' "$tree/share/doc/packrise/THIRD-PARTY.txt" || fail "the toolkit's licence is missing"
awk '/^==== / { if (n && !l) bad = bad " " n; n = $2; l = 0 } !/^==== / && NF { l++ } END { if (!l) bad = bad " " n; if (bad) { print bad; exit 1 } }' \
  "$tree/share/doc/packrise/THIRD-PARTY.txt" || fail "these libraries come without a licence"

step "run from there"
design=$tree/share/doc/packrise/designs/nine-in-emt.yaml
"$tree/bin/packrise-cli" solve "$design" >"$work/cli.txt" 2>&1 || [ $? -eq 1 ] || fail "packrise-cli: $(cat "$work/cli.txt")"
grep -q '°C' "$work/cli.txt" || fail "packrise-cli says $(cat "$work/cli.txt")"
without_display() { (cd "$work" && env -u DISPLAY -u WAYLAND_DISPLAY "$@" >"$work/window.txt" 2>&1); }
without_display "$tree/bin/packrise" "$design" || fail "without a display: $(cat "$work/window.txt")"
grep -q 'no display' "$work/window.txt" || fail "it does not say that there is no display: $(cat "$work/window.txt")"
[ "$(head -c 8 "$work/nine-in-emt.png" | od -An -tx1 | tr -d ' \n')" = 89504e470d0a1a0a ] || fail "no picture was written"

check_installed() { # ROOT PREFIX
  local entry=$1/share/applications/app.packrise.desktop
  for want in '^\[Desktop Entry\]$' '^Type=Application$' '^Name=Packrise$' "^Exec=\"$2/bin/packrise\" %f\$" "^TryExec=$2/bin/packrise\$" \
    '^Icon=app.packrise$' '^MimeType=application/x-packrise;$' '^Categories=.*;$' '^Terminal=false$'; do
    grep -q "$want" "$entry" || fail "the desktop entry lacks $want"
  done
  grep -q '@' "$entry" && fail "the desktop entry has a place holder left"
  if command -v desktop-file-validate >/dev/null; then desktop-file-validate "$entry" || fail "the desktop entry is not valid"; fi
  [ -x "$1/bin/packrise" ] && [ -x "$1/bin/packrise-cli" ] || fail "the programs are not in $1/bin"
  for size in 48 128 256 512; do
    png=$1/share/icons/hicolor/${size}x$size/apps/app.packrise.png
    [ "$(od -An -tu1 -j16 -N8 "$png" | awk '{ print $3 * 256 + $4, $7 * 256 + $8 }')" = "$size $size" ] || fail "$png is not $size wide"
  done
}

step "install for one person, and associate"
if [ "$(id -u)" -eq 0 ]; then export PREFIX=$HOME/.local; fi # what root gets is for everybody: not here
sh "$tree/install.sh" >"$work/install.txt" 2>&1 || fail "install.sh: $(cat "$work/install.txt")"
unset PREFIX
check_installed "$HOME/.local" "$HOME/.local"
without_display "$HOME/.local/bin/packrise" --version || fail "the installed program: $(cat "$work/window.txt")"
if command -v gio >/dev/null && command -v update-mime-database >/dev/null; then
  export XDG_DATA_HOME=$HOME/.local/share
  kind() { gio info -a standard::content-type "$1" | sed -n 's/.*content-type: //p'; }
  printf 'version: 3\nservices:\n' >"$work/other.yaml"
  cp "$design" "$work/my motor für Öl.yaml"
  [ "$(kind "$work/my motor für Öl.yaml")" = application/x-packrise ] || fail "a design counts as $(kind "$work/my motor für Öl.yaml")"
  [ "$(kind "$work/other.yaml")" != application/x-packrise ] || fail "any YAML file counts as a design"
  unset XDG_DATA_HOME
fi

step "take away"
PREFIX=$HOME/.local sh "$tree/install.sh" --uninstall >"$work/install.txt" 2>&1 || fail "uninstall: $(cat "$work/install.txt")"
left=$(find "$HOME" -name '*packrise*')
[ -z "$left" ] || fail "stays behind: $left"

step "install for those who build packages"
DESTDIR="$work/image" PREFIX=/usr sh "$tree/install.sh" >"$work/install.txt" 2>&1 || fail "install.sh: $(cat "$work/install.txt")"
check_installed "$work/image/usr" /usr
PREFIX=usr sh "$tree/install.sh" >/dev/null 2>&1 && fail "a PREFIX that does not begin with / is taken"
sh "$tree/install.sh" --nonsense >/dev/null 2>&1 && fail "nonsense is taken"
step "passed"
