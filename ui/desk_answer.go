package ui

import (
	"time"

	"packrise/solver/rating"
	"packrise/solver/section"
)

// staleAfter is how long an old picture stands before it is greyed.
const staleAfter = 200 * time.Millisecond

// ask tells how an answer is wanted.
type ask struct {
	draft     bool // within a drag: coarse, and the running draft finishes first
	interrupt bool
	frame     func(*section.Document) *section.Document // of a drag: makes the document to answer for, beside the window
}

// answered is the latest answer and its age.
type answered struct {
	result   *rating.Result
	problems []section.Problem // with which the solver refused
	failure  error             // of the program
	rev      uint64            // the document that it belongs to; 0: no answer yet
	draft    bool
	base     uint64     // revision with which the drag under way began: frames since then may be shown
	asked    uint64     // number of the newest request
	stale    bool       // the document has been another one for staleAfter
	wanted   ask        // how the answer under way was asked for
	stop     func()     // of the timer that makes it stale
	serial   uint64     // raised by every answer that is taken
	unsaid   Changed    // what is told when the picture of this answer has been painted; 0: nothing waits for it
	next     *delivered // came meanwhile
}

// delivered is an answer that has come.
type delivered struct {
	q request
	a answer
}

func (a *answered) stopWaiting() {
	if a.stop != nil {
		a.stop()
		a.stop = nil
	}
}

// solve asks for an answer for the document as it is now.
func (k *Desk) solve(a ask) {
	if !a.draft {
		k.answer.base = k.rev
	}
	k.answer.wanted = a
	k.answer.asked++
	if k.answer.stop == nil && !k.answer.stale {
		k.waitForStale()
	}
	q := request{doc: k.Document(), rev: k.rev, number: k.answer.asked, draft: a.draft, frame: a.frame}
	if a.frame != nil {
		q.doc = k.trial.base
	}
	k.runner.Ask(q, a.interrupt)
}

// refine asks for the standard answer where only a draft is there or under way.
func (k *Desk) refine() {
	if k.answer.wanted.draft {
		k.solve(ask{interrupt: true})
	}
}

// waitForStale greys the picture when no newer answer comes in time.
func (k *Desk) waitForStale() {
	stopped := false // read and written on the window's goroutine
	stop := k.rooms.After(staleAfter, func() {
		k.rooms.Hop(func() {
			if stopped || k.closed {
				return
			}
			k.answer.stop = nil
			k.answer.stale = true
			k.tell(ChangedResult)
		})
	})
	k.answer.stop = func() { stopped = true; stop() }
}

// deliver brings an answer from the runner's goroutine to the window's.
func (k *Desk) deliver(_ uint64, q request, a answer) {
	k.rooms.Hop(func() { k.arrive(q, a) })
}

// arrive takes an answer, or drops it: it must be the one asked for last, for the document as it is now, or, within a drag, a frame of that drag
// newer than the one shown. The words about it are told together with its picture, and a newer one waits until then, so that all that is in sight
// belongs to one revision.
func (k *Desk) arrive(q request, a answer) {
	if k.answer.unsaid != 0 {
		k.answer.next = &delivered{q, a}
		return
	}
	frame := k.trial != nil && q.rev > k.answer.base && q.rev > k.answer.rev
	if k.closed || (q.number != k.answer.asked && !frame) {
		return
	}
	k.answer.stopWaiting()
	k.answer.result, k.answer.problems, k.answer.failure = a.result, a.problems, a.err
	k.answer.rev, k.answer.draft, k.answer.stale = q.rev, q.draft, false
	if q.rev != k.rev {
		k.waitForStale()
	}
	c := ChangedResult
	if q.frame != nil && k.trial != nil && a.doc != nil {
		k.trial.doc, k.outlined = a.doc, false
		c |= ChangedDocument
	}
	k.answer.serial++
	if !q.draft && q.rev == k.rev && k.trial == nil && a.doc != nil {
		k.rate(a.doc, a.result)
	}
	if k.picture != nil && k.picture(c) {
		k.answer.unsaid = c
		return
	}
	k.tellWords(c)
}

// painted tells that a picture made since the answer of that number was taken is in sight.
func (k *Desk) painted(serial uint64) {
	if k.answer.unsaid == 0 || serial != k.answer.serial {
		return
	}
	c, next := k.answer.unsaid, k.answer.next
	k.answer.unsaid, k.answer.next = 0, nil
	k.tellWords(c)
	if next != nil {
		k.arrive(next.q, next.a)
	}
}

// Result returns the answer; fresh is false when it belongs to an older document or none exists (nil). Within a drag the last frame of that drag
// that has been answered counts as fresh: the canvas shows that frame.
func (k *Desk) Result() (r *rating.Result, fresh bool) {
	if k.answer.result == nil {
		return nil, false
	}
	frame := k.trial != nil && k.answer.rev > k.answer.base && !k.answer.stale
	return k.answer.result, k.answer.rev == k.rev || frame
}

// Stale tells that the answer, or its absence, is older than the document by more than staleAfter: time to grey it. An answer that is neither
// fresh nor stale may stand for the moment together with the picture that it belongs to.
func (k *Desk) Stale() bool { return k.answer.stale }

// Draft tells that the answer is a coarse one from within a drag.
func (k *Desk) Draft() bool { return k.answer.draft }

// Solving tells that the answer for the current document is under way.
func (k *Desk) Solving() bool { return k.answer.rev != k.rev }

// Failure returns why the program failed to answer for the current document, nil if it didn't.
func (k *Desk) Failure() error {
	if k.Solving() {
		return nil
	}
	return k.answer.failure
}

// Problems returns all that is wrong with the current document: what the file's reader warned of, and what the section says.
func (k *Desk) Problems() []section.Problem {
	_, problems := k.Shapes()
	if !k.Solving() && len(k.answer.problems) > 0 {
		problems = k.answer.problems
	}
	if len(k.opened) == 0 {
		return problems
	}
	return append(append([]section.Problem(nil), k.opened...), problems...)
}
