package ui

import (
	"errors"
	"io/fs"
	"os"
	"path/filepath"
	"slices"
	"strings"

	"fyne.io/fyne/v2"
)

const mostRecent = 8

// recent lists the files that were open last, the newest first.
func (w *Window) recent() []string { return w.app.Preferences().StringList(prefRecent) }

// remember puts a file on top of the recent ones.
func (w *Window) remember(path string) {
	path = whole(path)
	p := w.app.Preferences()
	recent := slices.DeleteFunc(slices.Clone(w.recent()), func(s string) bool { return s == path })
	recent = append([]string{path}, recent...)
	p.SetStringList(prefRecent, recent[:min(len(recent), mostRecent)])
	p.SetString(prefFolder, filepath.Dir(path))
	delete(w.missing, path)
}

// forget takes a file that is gone out of the recent ones.
func (w *Window) forget(path string, err error) {
	if errors.Is(err, fs.ErrNotExist) {
		path = whole(path)
		w.app.Preferences().SetStringList(prefRecent, slices.DeleteFunc(slices.Clone(w.recent()), func(s string) bool { return s == path }))
		w.menu.follow()
	}
}

// checkRecent looks which of the recent files are there, beside the window: a drive may take its time to answer.
func (w *Window) checkRecent() {
	paths := w.recent()
	w.beside(func() func() {
		missing := map[string]bool{}
		for _, p := range paths {
			if _, err := os.Stat(p); err != nil {
				missing[p] = true
			}
		}
		return func() {
			w.missing = missing
			w.menu.follow()
		}
	})
}

// followRecent lists the recent files in the menu; one that is not there is grey and says so.
func (m *menus) followRecent() {
	var items []*fyne.MenuItem
	for _, path := range m.w.recent() {
		label := elided(filepath.Base(path)+"  –  "+filepath.Dir(path), 80)
		i := fyne.NewMenuItem(label, func() { m.w.open(path) })
		if m.w.missing[path] {
			i.Label, i.Disabled = label+"  (not there)", true
		}
		items = append(items, i)
	}
	m.recent.Disabled = len(items) == 0
	if len(items) > 0 {
		items = append(items, fyne.NewMenuItemSeparator(), fyne.NewMenuItem("Clear this list", func() {
			m.w.app.Preferences().SetStringList(prefRecent, nil)
			m.follow()
		}))
	}
	m.recent.ChildMenu.Items = items
}

// dropped opens the design that was dropped on the window: the first one, if there are several.
func (w *Window) dropped(_ fyne.Position, what []fyne.URI) {
	var names, designs []string
	for _, u := range what {
		names = append(names, u.Name())
		ending := strings.ToLower(filepath.Ext(u.Path()))
		if u.Scheme() == "file" && (ending == ".yaml" || ending == ".yml") {
			designs = append(designs, filepath.FromSlash(u.Path()))
		}
	}
	switch {
	case len(names) == 0:
	case len(designs) == 0:
		w.showMessage("Nothing to open", strings.Join(names, ", ")+" is no design: drop a file on this computer whose name ends in .yaml.")
	default:
		w.open(designs[0])
		if len(designs) > 1 {
			w.say("one design at a time: opening " + filepath.Base(designs[0]))
		}
	}
}
