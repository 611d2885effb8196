package ui

import (
	"context"
	"errors"
	"path/filepath"

	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
	"packrise/solver/study"
)

// rateRequest asks how much the conductors of a document may carry. Without a document it only ends what runs.
type rateRequest struct {
	doc  *section.Document
	base *rating.Result // its solution
	rev  uint64
	o    study.Options
}

// rated is what is known of the ratings of the present document.
type rated struct {
	running bool
	ratings *study.Ratings    // as far as they have come; nil: not yet, or refused
	refusal []section.Problem // why nothing is rated
	failure error             // of the program
	named   bool              // the picture has been told what governs by the bands
	shaded  bool              // and who heats whom
	was     *study.Ratings    // of the document before, shown greyed until newer ones are as far
}

// Ratings returns how much the conductors may carry, as far as it has come (Done tells); nil where it is not known for the document as it is.
func (k *Desk) Ratings() *study.Ratings { return k.rated.ratings }

// Rating tells whether ratings of the document as it is are under way.
func (k *Desk) Rating() bool { return k.rated.running }

// RatingRefusal returns why the document as it is can't be rated, nil if nothing stands against it.
func (k *Desk) RatingRefusal() []section.Problem { return k.rated.refusal }

// RatingFailure returns why the program failed to rate the document as it is, nil if it didn't.
func (k *Desk) RatingFailure() error { return k.rated.failure }

// shownRatings returns the ratings for panes that keep old numbers, greyed, until newer ones are there; nil before anything can be relied on.
func (k *Desk) shownRatings() (r *study.Ratings, aged bool) {
	now, was := k.rated.ratings, k.rated.was
	switch {
	case now != nil && now.Done >= study.StageBands && (was == nil || now.Done >= was.Done || !k.rated.running):
		return now, false
	case was != nil && len(k.rated.refusal) == 0 && k.rated.failure == nil:
		return was, true
	}
	return nil, false
}

// rate asks for the ratings of a document that has just been answered for in full.
func (k *Desk) rate(d *section.Document, base *rating.Result) {
	if base == nil || len(d.Parts) == 0 || base.Status == heat.Cancelled {
		return
	}
	dir := ""
	if k.path != "" {
		dir = filepath.Dir(k.path)
	}
	k.rated.running = true
	k.rater.Ask(rateRequest{doc: d, base: base, rev: k.rev, o: study.Options{Dir: dir}}, true)
}

// dropRatings forgets the ratings, which belong to an older document, and ends what runs.
func (k *Desk) dropRatings() Changed {
	r := &k.rated
	if r.running {
		k.rater.Ask(rateRequest{}, true)
	}
	c := Changed(0)
	if r.ratings != nil || r.refusal != nil || r.failure != nil {
		c = ChangedRatings
	}
	was := r.was
	if r.ratings != nil && r.ratings.Done >= study.StageBands && (was == nil || !r.running || r.ratings.Done >= was.Done) {
		was = r.ratings
	}
	*r = rated{was: was}
	return c
}

// work rates on the rater's goroutine; stages hop to the window's as they come.
func (k *Desk) rateWork(ctx context.Context, q rateRequest) error {
	if q.doc == nil {
		return nil
	}
	o := q.o
	o.Stage = func(r *study.Ratings) {
		if ctx.Err() == nil && r.Done < study.Last {
			k.rooms.Hop(func() { k.takeStage(q, r) })
		}
	}
	r, err := k.rooms.Rate(ctx, q.doc, q.base, o)
	if err != nil && ctx.Err() != nil {
		return nil
	}
	k.rooms.Hop(func() { k.takeRatings(q, r, err) })
	return nil
}

// current tells whether ratings belong to the document as it is.
func (k *Desk) current(q rateRequest) bool { return !k.closed && q.rev == k.rev && k.rated.running }

func (k *Desk) takeStage(q rateRequest, r *study.Ratings) {
	if k.current(q) {
		k.rated.ratings = r
		k.tellRatings()
	}
}

// takeRatings is the end of it.
func (k *Desk) takeRatings(q rateRequest, r *study.Ratings, err error) {
	if !k.current(q) {
		return
	}
	k.rated.running = false
	var refused *study.Refusal
	switch {
	case errors.As(err, &refused):
		k.rated.ratings, k.rated.was, k.rated.refusal = nil, nil, refused.Problems
	case err != nil:
		k.rated.ratings, k.rated.was, k.rated.failure = nil, nil, err
	default:
		k.rated.ratings, k.rated.was = r, nil
	}
	k.tellRatings()
}

// tellRatings tells of ratings, together with the answer's picture where that is still being painted.
func (k *Desk) tellRatings() {
	if id, _ := k.heaters(); id != "" && !k.rated.shaded && k.picture != nil {
		k.rated.shaded = true
		k.picture(ChangedRatings)
	}
	if k.answer.unsaid != 0 {
		k.answer.unsaid |= ChangedRatings
		return
	}
	if id, ok := k.governs(); ok && !k.rated.named {
		k.rated.named = true
		if g := k.answer.result.Governing; g == nil || g.Part != id {
			k.tell(ChangedRatings) // the picture names it too
			return
		}
	}
	k.tellWords(ChangedRatings)
}
