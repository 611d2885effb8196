package section

// History is the past and future of one open design: documents, an index, and the index of the saved one. Not safe for
// concurrent use.
type History struct{}

// NewHistory starts at d, counted as saved.
func NewHistory(d *Document) *History { panic("section: NewHistory is not built") }

// Now returns the current document.
func (h *History) Now() *Document { panic("section: History.Now is not built") }

// Apply performs an edit and drops the redo tail; neighbouring edits of one gesture merge. It reports whether anything changed.
func (h *History) Apply(e Edit) bool { panic("section: History.Apply is not built") }

// Undo steps back; ok is false at the beginning. Redo steps forward.
func (h *History) Undo() (ok bool) { panic("section: History.Undo is not built") }

// Redo steps forward; ok is false at the end.
func (h *History) Redo() (ok bool) { panic("section: History.Redo is not built") }

// UndoName and RedoName return the names of the steps, "" if there is none.
func (h *History) UndoName() string { panic("section: History.UndoName is not built") }

// RedoName returns the name of the step that Redo would take.
func (h *History) RedoName() string { panic("section: History.RedoName is not built") }

// MarkSaved remembers that the current document is what the file holds.
func (h *History) MarkSaved() { panic("section: History.MarkSaved is not built") }

// Dirty tells whether the current document differs from the saved one.
func (h *History) Dirty() bool { panic("section: History.Dirty is not built") }
