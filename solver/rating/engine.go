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
	cat    *catalog.Catalog
	model  model
	bodies []prepared
	grade  heat.Accuracy
	temps  []float64 // °C per part, of the last answer
	air    spaces
	out    outside   // of the last answer, with the heat flows of its faces
	flux   []float64 // W/m²
}

// NewEngine returns an engine that looks things up in cat.
func NewEngine(cat *catalog.Catalog) *Engine { return &Engine{cat: cat} }

// Options of one solution.
type Options struct {
	Accuracy   heat.Accuracy
	AssumeIdle bool // count unknown and unassigned currents as 0
	Cautious   bool // natural convection of a round outside by Churchill and Chu in place of Morgan: 5–7 % less current on thin wires
	Vary       Vary // for bands
}

// Solve resolves and solves. The result is nil when a problem is Refused; all problems of substance come at once. An error is only
// for a failure of the program.
func (e *Engine) Solve(ctx context.Context, d *section.Document, o Options) (*Result, []section.Problem, error) {
	s, problems := resolveVaried(d, e.cat, o.Vary)
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
	films   films
}

// forget drops what a failed solution may have left in a warm start.
func (e *Engine) forget() {
	e.model, e.bodies, e.temps, e.air, e.out = nil, nil, nil, nil, outside{}
}

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
	if len(e.temps) == len(s.parts) {
		return append([]float64(nil), e.temps...)
	}
	return e.coldTemps(s)
}

// coldTemps start an iteration that knows nothing.
func (e *Engine) coldTemps(s *scene) []float64 {
	out := make([]float64, len(s.parts))
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
