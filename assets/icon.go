package assets

import _ "embed"

// Icon is the program's icon, a PNG of 512 × 512 pixels. It is drawn by render.Icon.
//
//go:embed icon.png
var Icon []byte
