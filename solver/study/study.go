package study

import (
	"context"
	"runtime"
	"strings"
	"sync"

	"packrise/solver/catalog"
	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// Study answers questions about designs. It holds a rating.Engine per worker, which stay warm between questions. Not safe for concurrent
// use: one Study belongs to one runner.
type Study struct {
	cat     *catalog.Catalog
	engines []*rating.Engine
}

// New returns a study that looks things up in cat.
func New(cat *catalog.Catalog) *Study {
	s := &Study{cat: cat}
	for range max(1, runtime.GOMAXPROCS(0)) {
		s.engines = append(s.engines, rating.NewEngine(cat))
	}
	return s
}

// Options of all questions.
type Options struct {
	AssumeIdle bool   // count unknown and unassigned currents as 0
	Cautious   bool   // see rating.Options
	Dir        string // where the design's file lies, for rule files beside it; "" for none
	// Progress is told how far a long question is, from any goroutine, one call at a time; nil if nobody cares.
	Progress func(done, of int)
	// Stage is given what Rate has found so far, each time a stage is done; nil if nobody cares.
	Stage func(*Ratings)

	vary rating.Vary // shifts of every solution
}

func (o Options) rating() rating.Options {
	return rating.Options{AssumeIdle: o.AssumeIdle, Cautious: o.Cautious}
}

func (o Options) tell(done, of int) {
	if o.Progress != nil {
		o.Progress(done, of)
	}
}

// Refusal is a question that cannot be answered for a design: the problems say why and what to do.
type Refusal struct{ Problems []section.Problem }

// Error lists what is wrong.
func (r *Refusal) Error() string {
	var what []string
	for _, p := range r.Problems {
		what = append(what, p.What)
	}
	return strings.Join(what, "; ")
}

// solve solves one design with the first engine. A refused design is a *Refusal, a cancelled one the context's error. Results that are not
// converged otherwise (runaway, stopped early) are returned as they are.
func (s *Study) solve(ctx context.Context, d *section.Document, o Options) (*rating.Result, error) {
	return solveWith(ctx, s.engines[0], d, o)
}

func solveWith(ctx context.Context, e *rating.Engine, d *section.Document, o Options) (*rating.Result, error) {
	return solveVaried(ctx, e, d, o, o.vary)
}

// solveVaried is solveWith with inputs shifted.
func solveVaried(ctx context.Context, e *rating.Engine, d *section.Document, o Options, v rating.Vary) (*rating.Result, error) {
	how := o.rating()
	how.Vary = v
	r, problems, err := e.Solve(ctx, d, how)
	switch {
	case err != nil:
		return nil, err
	case r == nil:
		return nil, &Refusal{refused(problems)}
	case r.Status == heat.Cancelled:
		return nil, context.Cause(ctx)
	}
	return r, nil
}

func refused(problems []section.Problem) (out []section.Problem) {
	for _, p := range problems {
		if p.Severity == section.Refused {
			out = append(out, p)
		}
	}
	return out
}

// each runs f for 0 … n−1 on all engines, worker w taking w, w + workers, …, so that what is warm does not depend on chance. It stops at the
// first error of the lowest index.
// nolint
func (s *Study) each(ctx context.Context, n int, o Options, f func(e *rating.Engine, i int) error) error {
	errs := make([]error, n)
	var wait sync.WaitGroup
	var mu sync.Mutex
	done := 0
	for w, e := range s.engines {
		wait.Add(1)
		go func() {
			defer wait.Done()
			for i := w; i < n && ctx.Err() == nil; i += len(s.engines) {
				if errs[i] = f(e, i); errs[i] != nil {
					return
				}
				mu.Lock()
				done++
				o.tell(done, n)
				mu.Unlock()
			}
		}()
	}
	wait.Wait()
	for _, err := range errs {
		if err != nil {
			return err
		}
	}
	return ctx.Err()
}
