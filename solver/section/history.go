package section

import "strings"

// MaxSteps is how many steps can be undone. Older ones are forgotten.
const MaxSteps = 500

// History is the past and future of one open design: documents, an index, and the index of the saved one. Not safe for
// concurrent use.
type History struct {
	docs  []*Document
	steps []Edit // steps[i] leads from docs[i] to docs[i+1]
	at    int    // docs[at] is the current one
	saved *Document
	open  bool // the last thing done was an edit that the next one may merge with

	compared [2]*Document // what Dirty compared last
	differ   bool
}

// NewHistory starts at d, counted as saved.
func NewHistory(d *Document) *History {
	return &History{docs: []*Document{d}, saved: d}
}

// Now returns the current document.
func (h *History) Now() *Document { return h.docs[h.at] }

// Apply performs an edit and drops the redo tail; neighbouring edits of one gesture merge. It reports whether anything changed.
func (h *History) Apply(e Edit) bool {
	now := h.Now()
	next := e.Do(now)
	if next == nil || Equal(next, now) {
		return false
	}
	e.Do = nil // holds on to what the edit was made of
	if h.merges(e) {
		h.docs[h.at], h.steps[h.at-1].Name = next, e.Name
		if Equal(next, h.docs[h.at-1]) { // back where the gesture began: no step
			h.at--
			h.docs, h.steps = h.docs[:h.at+1], h.steps[:h.at]
			h.open = false
		}
		return true
	}
	h.docs = append(h.docs[:h.at+1], next)
	h.steps = append(h.steps[:h.at], e)
	h.at++
	h.open = true
	if len(h.steps) > MaxSteps {
		h.docs[0] = nil
		h.docs, h.steps = h.docs[1:], h.steps[1:]
		h.at--
	}
	return true
}

// merges tells whether an edit continues the gesture of the last step. A saved document is never merged over.
func (h *History) merges(e Edit) bool {
	if !h.open || h.at == 0 || e.Gesture == 0 || h.Now() == h.saved {
		return false
	}
	last := h.steps[h.at-1]
	return last.Gesture == e.Gesture && last.Object == e.Object && verb(last.Name) == verb(e.Name)
}

// verb is the kind of a name: "set" of "set L1 to 16 A".
func verb(name string) string {
	v, _, _ := strings.Cut(name, " ")
	return v
}

// Undo steps back; ok is false at the beginning. Redo steps forward.
func (h *History) Undo() (ok bool) {
	if h.at == 0 {
		return false
	}
	h.at--
	h.open = false
	return true
}

// Redo steps forward; ok is false at the end.
func (h *History) Redo() (ok bool) {
	if h.at == len(h.steps) {
		return false
	}
	h.at++
	h.open = false
	return true
}

// UndoName and RedoName return the names of the steps, "" if there is none.
func (h *History) UndoName() string {
	if h.at == 0 {
		return ""
	}
	return h.steps[h.at-1].Name
}

// RedoName returns the name of the step that Redo would take.
func (h *History) RedoName() string {
	if h.at == len(h.steps) {
		return ""
	}
	return h.steps[h.at].Name
}

// MarkSaved remembers that the current document is what the file holds.
func (h *History) MarkSaved() { h.saved = h.Now() }

// Dirty tells whether the current document differs from the saved one.
func (h *History) Dirty() bool {
	if now := [2]*Document{h.Now(), h.saved}; h.compared != now {
		h.compared, h.differ = now, !Equal(now[0], now[1])
	}
	return h.differ
}
