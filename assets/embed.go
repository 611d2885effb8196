// Package assets holds the files that the program carries: the catalogue, the demo designs, the icon. It doesn't know what
// they mean.
package assets

import "embed"

// Catalog holds catalog/*.yaml (and catalog/rules/*.yaml later).
//
//go:embed catalog
var Catalog embed.FS

// Designs holds the demo designs, designs/*.yaml.
//
//go:embed designs
var Designs embed.FS
