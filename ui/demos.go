package ui

import (
	"io/fs"
	"path"
	"slices"
	"strings"

	"packrise/assets"
	"packrise/solver/section"
)

// demo is a design that the program carries.
type demo struct {
	file  string
	title string
	doc   *section.Document
}

// demoFiles are the designs that the program carries.
func demoFiles() fs.FS { return assets.Designs }

// demoDesigns reads the designs that the program carries, by title. They are embedded: no disk is touched.
func demoDesigns(designs fs.FS) []demo {
	files, _ := fs.Glob(designs, "designs/*.yaml")
	var all []demo
	for _, f := range files {
		data, err := fs.ReadFile(designs, f)
		if err != nil {
			continue
		}
		d, _ := section.Read(data)
		if d == nil {
			continue
		}
		title := d.Title
		if title == "" {
			title = strings.TrimSuffix(path.Base(f), ".yaml")
		}
		all = append(all, demo{file: path.Base(f), title: title, doc: d})
	}
	slices.SortFunc(all, func(a, b demo) int { return strings.Compare(a.title, b.title) })
	return all
}
