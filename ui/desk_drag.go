package ui

import "packrise/solver/section"

// Drag shows a drag under way. e.Do gets the document with which the drag began and is run beside the window, since it may lay out a section; what it
// returns becomes the document when its draft answer arrives, so that the document, the picture and the numbers always belong together. The
// running draft finishes and the newest wins. Drop ends the drag, CancelDraft takes it back.
func (k *Desk) Drag(e section.Edit) {
	if k.trial != nil && (k.trial.edit.Gesture != e.Gesture || k.trial.edit.Object != e.Object) {
		k.commit(section.Edit{})
	}
	first := k.trial == nil
	if first {
		now := k.history.Now()
		k.trial = &trial{doc: now, base: now}
	}
	k.trial.edit = e
	k.rev++
	dropped := k.dropRatings()
	k.solve(ask{draft: true, frame: e.Do})
	if first {
		k.tell(ChangedFile | dropped) // unsaved from now on
	}
}

// Drop ends a drag as one undo step: e.Do is run beside the window as in Drag, then its document enters the history and is solved in full.
func (k *Desk) Drop(e section.Edit) {
	if k.trial == nil {
		return
	}
	base, rev := k.trial.base, k.rev
	k.rooms.Beside(func() {
		d := e.Do(base)
		k.rooms.Hop(func() {
			if k.closed || k.rev != rev || k.trial == nil {
				return
			}
			k.trial = nil
			e.Do = func(*section.Document) *section.Document { return d }
			k.history.Apply(e)
			k.changed(ChangedDocument, ask{interrupt: true})
		})
	})
}
