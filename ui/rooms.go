package ui

import (
	"context"
	"time"

	"fyne.io/fyne/v2"

	"packrise/solver/catalog"
	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
	"packrise/solver/study"
)

// Rooms are what a desk asks of the rest of the program, so that tests can stand in for it.
type Rooms struct {
	// Solve answers for a document. It is called on the runner's goroutine, one call at a time.
	Solve func(context.Context, *section.Document, rating.Options) (*rating.Result, []section.Problem, error)
	// Rate answers how much the conductors of a document may carry, whose solution is base; o.Stage is told what has come. It is called on a
	// runner's goroutine, one call at a time.
	Rate func(ctx context.Context, d *section.Document, base *rating.Result, o study.Options) (*study.Ratings, error)
	// Outline returns what to draw of a document.
	Outline func(*section.Document, *catalog.Catalog) ([]section.Shape, []section.Problem)
	// Settle, LayUp and MakeRoom place the parts of the top level. They are called on the goroutine of Beside.
	Settle, LayUp func(*section.Document, *catalog.Catalog) (map[string]section.Point, error)
	MakeRoom      func(d *section.Document, cat *catalog.Catalog, held string) (map[string]section.Point, bool)
	// Hop runs f on the window's goroutine.
	Hop func(f func())
	// Beside runs f beside the window's goroutine.
	Beside func(f func())
	// After calls f on any goroutine when d has passed, unless stop is called first.
	After func(d time.Duration, f func()) (stop func())
}

// filled puts the program's own rooms where r has none.
func (r Rooms) filled(cat *catalog.Catalog) Rooms {
	if r.Solve == nil {
		r.Solve = rating.NewEngine(cat).Solve
	}
	if r.Rate == nil {
		r.Rate = study.New(cat).Rate
	}
	if r.Outline == nil {
		r.Outline = rating.Outline
	}
	if r.Settle == nil {
		r.Settle = rating.Settle
	}
	if r.LayUp == nil {
		r.LayUp = rating.LayUp
	}
	if r.MakeRoom == nil {
		r.MakeRoom = rating.MakeRoom
	}
	if r.Hop == nil {
		r.Hop = fyne.Do
	}
	if r.Beside == nil {
		r.Beside = func(f func()) { go f() }
	}
	if r.After == nil {
		r.After = func(d time.Duration, f func()) func() {
			t := time.AfterFunc(d, f)
			return func() { t.Stop() }
		}
	}
	return r
}

// request is one document to answer for.
type request struct {
	doc    *section.Document
	rev    uint64
	number uint64 // counts requests: the same document may be asked about twice
	draft  bool
	frame  func(*section.Document) *section.Document // nil: doc itself is answered for
}

// answer is what came back.
type answer struct {
	doc      *section.Document // that was answered for
	result   *rating.Result
	problems []section.Problem
	err      error
}

// work answers a request, on the runner's goroutine.
func (r Rooms) work(ctx context.Context, q request) answer {
	o := rating.Options{Accuracy: heat.Standard}
	if q.draft {
		o.Accuracy = heat.Draft
	}
	d := q.doc
	if q.frame != nil {
		d = q.frame(d)
	}
	res, problems, err := r.Solve(ctx, d, o)
	return answer{doc: d, result: res, problems: problems, err: err}
}
