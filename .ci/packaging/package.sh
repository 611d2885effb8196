#!/usr/bin/env bash
# Makes out/packrise-VERSION-linux-ARCH.tar.gz of the built programs: .ci/packaging/package.sh, best by `make package`.
set -euo pipefail
cd "$(dirname "$0")/../.."
version=$(sed -n 's/^ *Version = "\(.*\)"$/\1/p' FyneApp.toml)
[ -n "$version" ] || { echo "package: FyneApp.toml names no version" >&2; exit 1; }
for b in packrise packrise-cli; do
  [ -x "bin/$b" ] || { echo "package: bin/$b is missing: make build cli" >&2; exit 1; }
done
name=packrise-$version-linux-$(go env GOARCH)
tree=out/package/$name
rm -rf out/package
mkdir -p "$tree"/bin "$tree"/share/{applications,mime/packages,doc/packrise/designs}

cp bin/packrise bin/packrise-cli "$tree/bin/"
if command -v strip >/dev/null; then strip "$tree/bin/packrise" "$tree/bin/packrise-cli"; fi
sed 's/@EXEC@/packrise/; s/@TRYEXEC@/packrise/' .ci/packaging/app.packrise.desktop >"$tree/share/applications/app.packrise.desktop"
cp .ci/packaging/app.packrise.xml "$tree/share/mime/packages/"
for size in 48 128 256 512; do
  icon=$tree/share/icons/hicolor/${size}x$size/apps
  mkdir -p "$icon"
  go run ./.ci/packaging/icon assets/icon.png $size "$icon/app.packrise.png"
done
cp README.md LICENSE "$tree/share/doc/packrise/"
cp assets/designs/*.yaml "$tree/share/doc/packrise/designs/"
cp README.md LICENSE .ci/packaging/INSTALL.txt .ci/packaging/install.sh "$tree/"
chmod 755 "$tree/install.sh"

# the licences of the libraries that are in the programs
{
  echo "Packrise is built on these libraries, each under its own licence."
  go list -deps -f '{{with .Module}}{{if not .Main}}{{.Path}} {{.Version}} {{.Dir}}{{end}}{{end}}' ./cmd/packrise ./cmd/packrise-cli | sort -u |
    while read -r path v dir; do
      printf '\n\n==== %s %s\n' "$path" "$v"
      find "$dir" -maxdepth 3 -type f \( -iname 'LICEN[SC]E*' -o -iname 'COPYING*' -o -iname 'NOTICE*' \) | sort | while read -r f; do
        printf '\n---- %s\n\n' "${f#"$dir"/}"
        cat "$f"
      done
    done
  printf '\n\n==== Go %s\n\n' "$(go env GOVERSION)"
  cat "$(go env GOROOT)/LICENSE"
} >"$tree/share/doc/packrise/THIRD-PARTY.txt"

tar --sort=name --owner=0 --group=0 --numeric-owner -C out/package -czf "out/$name.tar.gz" "$name"
echo "out/$name.tar.gz"
