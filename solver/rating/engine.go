package rating

import (
	"context"
	"time"

	"packrise/solver/catalog"
	"packrise/solver/heat"
	"packrise/solver/section"
)

// Engine answers for documents and keeps the prepared heat model between calls, so that a document that differs from the
// last one by currents or by one part's place is solved again in a few milliseconds. Not safe for concurrent use: one Engine
// belongs to one runner.
type Engine struct {
	cat     *catalog.Catalog
	model   *heat.Model
	problem heat.Problem
	grade   heat.Accuracy
	temps   []float64 // °C per part, of the last answer
	air     spaces
}

// NewEngine returns an engine that looks things up in cat.
func NewEngine(cat *catalog.Catalog) *Engine { return &Engine{cat: cat} }

// Options of one solution.
type Options struct {
	Accuracy   heat.Accuracy
	AssumeIdle bool // count unknown and unassigned currents as 0
}

// Solve resolves and solves. The result is nil when a problem is Refused; all problems of substance come at once. An error is only
// for a failure of the program.
func (e *Engine) Solve(ctx context.Context, d *section.Document, o Options) (*Result, []section.Problem, error) {
	s, problems := resolve(d, e.cat)
	for _, p := range problems {
		if p.Severity == section.Refused {
			return nil, problems, nil
		}
	}
	start := time.Now()
	a := e.answer(ctx, &s, o)
	r := s.result(a, o)
	r.Seconds = time.Since(start).Seconds()
	return r, problems, nil
}

// answered is the heat answer with the heats that belong to it.
type answered struct {
	heat    *heat.Result
	temps   []float64 // °C per part
	status  heat.Status
	settles float64 // runaway: largest factor on all currents that settles
	at      int     // runaway: part that runs away
	air     spaces
}

// Rounds of the loop over the temperature of enclosed air: its conductivity follows at 0.25 %/K, so each round gains a factor of
// about ten.
const (
	airRounds    = 6
	airTolerance = 5e-4
)

// answer runs the outer loop: conductivity of enclosed air, around the fixed point of the resistances.
func (e *Engine) answer(ctx context.Context, s *scene, o Options) answered {
	air := e.startAir(s)
	temps := e.startTemps(s)
	var a answered
	for round := 1; ; round++ {
		e.prepare(s.build(air), o.Accuracy)
		a = settle(ctx, e.model, s, temps, o.Accuracy)
		a.air = air
		if a.status != heat.Converged {
			e.forget()
			return a
		}
		temps = a.temps
		if o.Accuracy == heat.Draft || len(air) == 0 || round == airRounds {
			break
		}
		next := air.copy()
		if next.update(s, a.heat) < airTolerance {
			break
		}
		air = next
	}
	e.temps, e.air = temps, air
	return a
}

// forget drops what a failed solution may have left in a warm start.
func (e *Engine) forget() { e.model, e.temps, e.air = nil, nil, nil }

func (e *Engine) startAir(s *scene) spaces {
	out := s.airSpaces(s.doc.Surroundings.AmbientC.V + 20)
	if len(e.air) != len(out) {
		return out
	}
	for i := range out {
		t, ok := e.air[i]
		if !ok {
			return s.airSpaces(s.doc.Surroundings.AmbientC.V + 20)
		}
		out[i] = t
	}
	return out
}

func (e *Engine) startTemps(s *scene) []float64 {
	out := make([]float64, len(s.parts))
	if len(e.temps) == len(out) {
		copy(out, e.temps)
		return out
	}
	for i := range out {
		out[i] = s.doc.Surroundings.AmbientC.V + 20
	}
	return out
}

func (a spaces) copy() spaces {
	out := make(spaces, len(a))
	for i, t := range a {
		out[i] = t
	}
	return out
}

// prepare makes the model fit the problem: kept when it is the same, moved when one part of the top level moved, else new.
func (e *Engine) prepare(p heat.Problem, grade heat.Accuracy) {
	if e.model != nil && e.grade == grade {
		switch moved := difference(&e.problem, &p); {
		case moved == same:
			return
		case moved >= 0:
			e.model.Move(moved, p.Parts[moved].X, p.Parts[moved].Y)
			e.problem = p
			return
		}
	}
	e.model, e.problem, e.grade = heat.New(p, heat.Settings{Accuracy: grade}), p, grade
}
