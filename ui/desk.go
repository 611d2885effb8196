package ui

import (
	"slices"

	"packrise/solver/catalog"
	"packrise/solver/section"
	"packrise/ui/latest"
)

// Desk holds one open design: its history, selection, file and latest answer. All methods are called on the window's goroutine.
type Desk struct {
	cat     *catalog.Catalog
	rooms   Rooms
	runner  *latest.Runner[request, answer]
	rater   *latest.Runner[rateRequest, error]
	listen  []func(Changed)
	picture func(Changed) bool // told first; true: a picture is being painted, of which painted will be told
	closed  bool               // tells nothing any more
	ended   bool               // nothing runs any more
	gesture int

	beforeLong func() // told before work that takes long; nil: nobody cares

	history *section.History
	trial   *trial // what a drag under way shows and the history does not have yet
	rev     uint64 // of the document: raised by every change of it
	path    string // "" for a design that has no file yet
	differs bool   // the file holds something else, whatever the history says
	opened  []section.Problem

	selection []string
	pointed   string

	outlined bool // shapes and problems belong to rev
	shapes   []section.Shape
	problems []section.Problem

	answer answered
	rated  rated
}

// trial is the document within a drag, the edit that made it, and the document with which the drag began.
type trial struct {
	doc, base *section.Document
	edit      section.Edit
}

// Changed says what changed, for listeners. Several may come at once.
type Changed int

// Kinds of change.
const (
	ChangedDocument  Changed = 1 << iota // another document: shapes, undo names, dirty mark
	ChangedSelection                     // other parts selected or pointed at
	ChangedResult                        // a new answer, or the answer became stale
	ChangedFile                          // path, saved state
	ChangedRatings                       // ratings came, or became those of an older document
)

// NewDesk opens a desk on d; solving runs beside the window.
func NewDesk(cat *catalog.Catalog, d *section.Document) *Desk {
	return NewDeskWith(cat, d, Rooms{})
}

// NewDeskWith is NewDesk with other rooms beside it, for tests. Fields of r that are nil are filled in.
func NewDeskWith(cat *catalog.Catalog, d *section.Document, r Rooms) *Desk {
	k := &Desk{cat: cat, rooms: r.filled(cat), history: section.NewHistory(d)}
	k.runner = latest.New(k.rooms.work, k.deliver)
	k.rater = latest.New(k.rateWork, func(uint64, rateRequest, error) {})
	k.changed(ChangedDocument|ChangedFile, ask{interrupt: true})
	return k
}

// Close ends the solving and waits for it. The desk tells nothing any more.
func (k *Desk) Close() {
	if k.ended {
		return
	}
	k.mute()
	k.ended = true
	k.runner.Close()
	k.rater.Close()
}

// mute makes the desk drop what still comes from beside the window, which is closing.
func (k *Desk) mute() {
	k.closed = true
	k.answer.stopWaiting()
}

// Listen calls f after every change, on the window's goroutine.
func (k *Desk) Listen(f func(Changed)) { k.listen = append(k.listen, f) }

// listenUntil is Listen until stop is called.
func (k *Desk) listenUntil(f func(Changed)) (stop func()) {
	i := len(k.listen)
	k.listen = append(k.listen, f)
	return func() { k.listen[i] = nil }
}

func (k *Desk) tell(c Changed) {
	if k.closed || c == 0 {
		return
	}
	if k.picture != nil {
		k.picture(c)
	}
	k.tellWords(c)
}

// tellWords tells all but the picture.
func (k *Desk) tellWords(c Changed) {
	for _, f := range k.listen {
		if f != nil {
			f(c)
		}
	}
}

// Catalog returns the look-up.
func (k *Desk) Catalog() *catalog.Catalog { return k.cat }

// Document returns the current document: within a drag the one that the drag shows.
func (k *Desk) Document() *section.Document {
	if k.trial != nil {
		return k.trial.doc
	}
	return k.history.Now()
}

// Revision is a number that every change of the document raises. Work done beside the window keeps it and is dropped when it has changed.
func (k *Desk) Revision() uint64 { return k.rev }

// Apply performs an edit as one undo step and asks for a new answer. draft is for edits within a drag: the running draft finishes, the newest wins,
// and the step enters the history with the first edit of that gesture that isn't a draft. CancelDraft takes drafts back.
func (k *Desk) Apply(e section.Edit, draft bool) {
	if k.trial != nil && (k.trial.edit.Gesture != e.Gesture || k.trial.edit.Object != e.Object) {
		k.commit(section.Edit{})
	}
	if draft {
		next := e.Do(k.Document())
		if next == k.Document() {
			return
		}
		k.trial = &trial{doc: next, base: k.history.Now(), edit: e}
		k.changed(ChangedDocument, ask{draft: true})
		return
	}
	drafted := k.trial != nil
	if k.commit(e) || drafted {
		k.changed(ChangedDocument, ask{interrupt: true})
		return
	}
	k.refine()
}

// commit enters e, on top of what a drag has shown so far, into the history as one step.
func (k *Desk) commit(e section.Edit) bool {
	t := k.trial
	k.trial = nil
	if t == nil {
		return k.history.Apply(e)
	}
	if e.Do == nil {
		e = t.edit
		e.Do = func(d *section.Document) *section.Document { return d }
	}
	last := e.Do
	e.Do = func(*section.Document) *section.Document { return last(t.doc) }
	return k.history.Apply(e)
}

// CancelDraft takes back what drafts have shown since the last step of the history, as Escape does within a drag.
func (k *Desk) CancelDraft() {
	if k.trial == nil {
		return
	}
	k.trial = nil
	k.changed(ChangedDocument, ask{interrupt: true})
}

// Drafting tells whether a drag has changed the document without having entered the history.
func (k *Desk) Drafting() bool { return k.trial != nil }

// NewGesture returns a number for the edits of one drag or one run of key presses.
func (k *Desk) NewGesture() int {
	k.gesture++
	return k.gesture
}

// Undo steps back. Redo steps forward.
func (k *Desk) Undo() {
	if k.trial != nil {
		k.CancelDraft()
		return
	}
	if k.history.Undo() {
		k.changed(ChangedDocument, ask{interrupt: true})
	}
}

// Redo steps forward.
func (k *Desk) Redo() {
	if k.trial == nil && k.history.Redo() {
		k.changed(ChangedDocument, ask{interrupt: true})
	}
}

// UndoName returns the name of the step that Undo takes back, "" if there is none.
func (k *Desk) UndoName() string { return k.history.UndoName() }

// RedoName returns the name of the step that Redo takes, "" if there is none.
func (k *Desk) RedoName() string { return k.history.RedoName() }

// Shapes returns what to draw now (of the current document, whatever the answer's age) and the problems of substance.
func (k *Desk) Shapes() ([]section.Shape, []section.Problem) {
	if !k.outlined {
		k.shapes, k.problems = k.rooms.Outline(k.Document(), k.cat)
		k.outlined = true
	}
	return k.shapes, k.problems
}

// Select replaces the selection; Selection returns it, in order of choosing. Ids that the document does not have are left out.
func (k *Desk) Select(ids ...string) {
	var chosen []string
	for _, id := range ids {
		if section.Find(k.Document(), id) != nil && !slices.Contains(chosen, id) {
			chosen = append(chosen, id)
		}
	}
	if slices.Equal(chosen, k.selection) {
		return
	}
	k.selection = chosen
	k.tell(ChangedSelection)
}

// Selection returns the selected ids.
func (k *Desk) Selection() []string { return k.selection }

// Selected tells whether the part is selected.
func (k *Desk) Selected(id string) bool { return slices.Contains(k.selection, id) }

// Point lights up the part under the pointer ("" for none); Pointed returns it.
func (k *Desk) Point(id string) {
	if id == k.pointed {
		return
	}
	k.pointed = id
	k.tell(ChangedSelection)
}

// Pointed returns the part lit up.
func (k *Desk) Pointed() string { return k.pointed }

// changed notes that the document is another one, asks for an answer and tells everybody.
func (k *Desk) changed(c Changed, a ask) {
	k.rev++
	k.outlined = false
	c |= k.dropRatings()
	kept := slices.DeleteFunc(slices.Clone(k.selection), func(id string) bool { return section.Find(k.Document(), id) == nil })
	if len(kept) != len(k.selection) {
		k.selection = kept
		c |= ChangedSelection
	}
	if k.pointed != "" && section.Find(k.Document(), k.pointed) == nil {
		k.pointed = ""
		c |= ChangedSelection
	}
	k.solve(a)
	k.tell(c)
}
