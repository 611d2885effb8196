#!/bin/sh
# Installs Packrise from the folder that this script lies in, or takes it away again.
#
#   ./install.sh                 for you alone, into ~/.local; as root for everybody, into /usr/local
#   PREFIX=/opt/it ./install.sh  somewhere else; DESTDIR is put before it, for those who build packages
#   ./install.sh --uninstall     takes away what was installed there, designs stay
set -eu
here=$(cd "$(dirname "$0")" && pwd)

remove=no
for a in "$@"; do
  case $a in
    --uninstall) remove=yes ;;
    --help | -h) sed -n '2,6s/^# \{0,1\}//p' "$0"; exit 0 ;;
    *) echo "install.sh: $a is unknown; see ./install.sh --help" >&2; exit 2 ;;
  esac
done

if [ -z "${PREFIX:-}" ]; then
  if [ "$(id -u)" -eq 0 ]; then
    PREFIX=/usr/local
  else
    PREFIX=${HOME:?is not set: say where to, as in PREFIX=/opt/it ./install.sh}/.local
  fi
fi
case $PREFIX in
  /*) ;;
  *) echo "install.sh: PREFIX has to begin with /, and $PREFIX does not" >&2; exit 2 ;;
esac
root=${DESTDIR:-}$PREFIX

# The menus and the file manager find out about new programs and file types; without their tools they do so at the next login.
refresh() {
  [ -z "${DESTDIR:-}" ] || return 0
  if command -v update-mime-database >/dev/null 2>&1; then update-mime-database "$root/share/mime" >/dev/null 2>&1 || true; fi
  if command -v update-desktop-database >/dev/null 2>&1; then update-desktop-database -q "$root/share/applications" >/dev/null 2>&1 || true; fi
  if command -v gtk-update-icon-cache >/dev/null 2>&1; then gtk-update-icon-cache -q -t -f "$root/share/icons/hicolor" >/dev/null 2>&1 || true; fi
}

files='bin/packrise
bin/packrise-cli
share/applications/app.packrise.desktop
share/mime/packages/app.packrise.xml
share/icons/hicolor/48x48/apps/app.packrise.png
share/icons/hicolor/128x128/apps/app.packrise.png
share/icons/hicolor/256x256/apps/app.packrise.png
share/icons/hicolor/512x512/apps/app.packrise.png
share/doc/packrise/README.md
share/doc/packrise/LICENSE
share/doc/packrise/THIRD-PARTY.txt'

if [ $remove = yes ]; then
  echo "$files" | while read -r f; do rm -f "$root/$f"; done
  rm -rf "$root/share/doc/packrise"
  refresh
  echo "Packrise is gone from $PREFIX. Your designs and unsaved work (in your cache folder) are where they were."
  exit 0
fi

echo "$files" | while read -r f; do
  mode=644
  case $f in bin/*) mode=755 ;; esac
  mkdir -p "$(dirname "$root/$f")"
  cp "$here/$f" "$root/$f.new"
  chmod $mode "$root/$f.new"
  mv -f "$root/$f.new" "$root/$f" # a program that runs is not written over
done
mkdir -p "$root/share/doc/packrise/designs"
cp "$here"/share/doc/packrise/designs/*.yaml "$root/share/doc/packrise/designs/"
chmod 644 "$root"/share/doc/packrise/designs/*.yaml

# A prefix need not be on the PATH of the desktop, so the entry names the program whole.
entry=$root/share/applications/app.packrise.desktop
awk -v p="$(printf %s "$PREFIX" | sed 's/\\/\\\\/g')/bin/packrise" '
  /^Exec=/ { print "Exec=\"" p "\" %f"; next }
  /^TryExec=/ { print "TryExec=" p; next }
  { print }' "$here/share/applications/app.packrise.desktop" >"$entry.new"
chmod 644 "$entry.new"
mv -f "$entry.new" "$entry"
refresh

echo "Packrise is in $PREFIX: start it from the menu, or as $PREFIX/bin/packrise; $PREFIX/bin/packrise-cli is its command line."
missing=
if command -v ldd >/dev/null 2>&1; then
  missing=$(ldd "$root/bin/packrise" 2>/dev/null | awk '/not found/ { print $1 }' | sort -u | tr '\n' ' ')
fi
if [ -n "$missing" ]; then
  echo "The window still lacks: $missing- on Debian, as root: apt-get install libgl1 libgl1-mesa-dri libx11-6 libxcursor1 libxrandr2 libxinerama1 libxi6 libxxf86vm1"
fi
