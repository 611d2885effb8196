package ui

import (
	"packrise/solver/catalog"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// Desk holds one open design: its history, selection, file and latest answer. All methods are called on the window's goroutine.
type Desk struct{}

// What changed, for listeners.
type Changed int

// Kinds of change.
const (
	ChangedDocument  Changed = 1 << iota // another document: shapes, undo names, dirty mark
	ChangedSelection                     // other parts selected or pointed at
	ChangedResult                        // a new answer, or the answer became stale
	ChangedFile                          // path, saved state
)

// NewDesk opens a desk on d; solving runs beside the window.
func NewDesk(cat *catalog.Catalog, d *section.Document) *Desk { panic("ui: not built") }

// Listen calls f after every change, on the window's goroutine.
func (k *Desk) Listen(f func(Changed)) { panic("ui: not built") }

// Catalog returns the look-up.
func (k *Desk) Catalog() *catalog.Catalog { panic("ui: not built") }

// Document returns the current document.
func (k *Desk) Document() *section.Document { panic("ui: not built") }

// Apply performs an edit as one undo step and asks for a new answer. draft is for edits within a drag: the running draft finishes, the newest wins.
func (k *Desk) Apply(e section.Edit, draft bool) { panic("ui: not built") }

// NewGesture returns a number for the edits of one drag or one run of key presses.
func (k *Desk) NewGesture() int { panic("ui: not built") }

// Undo steps back. Redo steps forward.
func (k *Desk) Undo() { panic("ui: not built") }

// Redo steps forward.
func (k *Desk) Redo() { panic("ui: not built") }

// Shapes returns what to draw now (of the current document, whatever the answer's age) and the problems of substance.
func (k *Desk) Shapes() ([]section.Shape, []section.Problem) { panic("ui: not built") }

// Result returns the answer; fresh is false when it belongs to an older document or none exists (nil).
func (k *Desk) Result() (r *rating.Result, fresh bool) { panic("ui: not built") }

// Select replaces the selection; Selection returns it, in order of choosing.
func (k *Desk) Select(ids ...string) { panic("ui: not built") }

// Selection returns the selected ids.
func (k *Desk) Selection() []string { panic("ui: not built") }

// Point lights up the part under the pointer ("" for none); Pointed returns it.
func (k *Desk) Point(id string) { panic("ui: not built") }

// Pointed returns the part lit up.
func (k *Desk) Pointed() string { panic("ui: not built") }
