package ui

import (
	"path/filepath"

	"packrise/solver/section"
)

// Load puts another design on the desk, with its file ("" for none), what its reader warned of, and a history of its own.
func (k *Desk) Load(d *section.Document, path string, warnings []section.Problem) {
	k.trial = nil
	k.history = section.NewHistory(d)
	k.path, k.opened, k.differs = path, warnings, false
	c := ChangedDocument | ChangedFile | ChangedSelection
	k.selection, k.pointed = nil, ""
	k.dropRatings()
	k.rated.was = nil // of another design
	k.changed(c|ChangedRatings, ask{interrupt: true})
}

// Path returns the design's file, "" if it has none.
func (k *Desk) Path() string { return k.path }

// Name returns how the window calls the design: its file's name, else its title.
func (k *Desk) Name() string {
	switch {
	case k.path != "":
		return filepath.Base(k.path)
	case k.Document().Title != "":
		return k.Document().Title
	}
	return "Untitled"
}

// Dirty tells whether the design differs from its file.
func (k *Desk) Dirty() bool { return k.trial != nil || k.differs || k.history.Dirty() }

// Saved notes that d has been written to path. It counts as saved only if it is still the current document.
func (k *Desk) Saved(d *section.Document, path string) {
	k.path = path
	if k.trial == nil && k.history.Now() == d {
		k.history.MarkSaved()
	}
	k.differs = k.trial != nil || k.history.Now() != d // changed while it was written: going back to what was saved before is no way to the file
	k.tell(ChangedFile)
}

// Differs notes that the file holds something else now.
func (k *Desk) Differs() {
	k.differs = true
	k.tell(ChangedFile)
}

// Take puts what the file holds now in place of the design, as one step that can be undone.
func (k *Desk) Take(d *section.Document, warnings []section.Problem) {
	k.opened = warnings
	k.Apply(section.Edit{Name: "take the changed file", Do: func(*section.Document) *section.Document { return d }}, false)
	k.Saved(k.Document(), k.path)
}

// Detach leaves the file: the design goes on without one.
func (k *Desk) Detach() {
	k.path = ""
	k.tell(ChangedFile)
}

// long is called before work that takes long.
func (k *Desk) long() {
	if k.beforeLong != nil {
		k.beforeLong()
	}
}
