package heat

import (
	"context"
	"math"
	"runtime"

	"packrise/solver/harmonic"
)

// Model is a Problem made ready: the matrix is written once and serves many sets of heats. Not safe for concurrent use.
type Model struct {
	p    Problem
	set  Settings
	top  *region // nil: one bare part without an inside
	bare *bare
	form *shaped // of sections in which not everything is round and nothing can stay a piece: nothing else is used

	contours *contourWall // the top level's border where not everything is round, but round parts stay pieces

	ready   bool
	x       []float64   // last solution
	held    []int       // sources that are bores held at a temperature
	columns [][]float64 // solutions for 1 W/m in each of them
	rises   [][]float64 // of all sources for 1 W/m in each of them
	floor   []float64   // temperatures of all sources without any heat, held bores floating
	floorX  []float64
	ground  []float64   // last solution without heat
	kept    [][]float64 // rises of all sources for 1 W/m in each

	glow   *coupled // of sections with surfaces that radiate
	before *coupled // the one before, of which a new one may keep something
}

// forget drops what depends on places, films and outside temperatures, but for the solutions, from which the next ones start.
func (m *Model) forget() { m.rises, m.floor, m.kept = nil, nil, nil }

// factor is C of the order rule, cut the size below which entries of the matrix are dropped, tol the relative residual at which the
// iteration ends.
func (a Accuracy) settings() (factor, cut, tol float64) {
	switch a {
	case Draft:
		return 0.7, 3e-5, 1e-4
	case Fine:
		return 1.5, 1e-7, 1e-7
	}
	return 1, 1e-5, 1e-5
}

// threads is how many goroutines may work.
func (s Settings) threads() int {
	if s.Threads > 0 {
		return s.Threads
	}
	return runtime.GOMAXPROCS(0)
}

// rough is the residual of columns whose products have an error quadratic in it.
func (a Accuracy) rough() float64 {
	if a == Fine {
		return 1e-4
	}
	return 1e-3
}

// New checks the geometry (misuse panics: negative radii, a part before its cable, non-finite numbers; overlaps over 1 µm are
// the caller's to exclude and only cost accuracy). The matrix is written by the first call that needs it, so that it can be cancelled.
func New(p Problem, s Settings) *Model {
	p.check()
	p.Parts = append([]Part(nil), p.Parts...)
	p.thicken()
	m := &Model{p: p, set: s}
	m.layout()
	return m
}

// layout finds the regions and their orders.
func (m *Model) layout() {
	p := &m.p
	w := &p.Wall
	if !p.round() && p.amongPieces() {
		m.layoutContours()
		return
	}
	if !p.round() {
		m.form = newShaped(m)
		return
	}
	factor, _, _ := m.set.Accuracy.settings()
	switch w.Shape {
	case BarePart:
		m.layoutBare()
	case Round:
		m.top = newRegion(p, -1, p.MediumK)
		m.top.loosen(p.Clearance)
		m.top.wall = outerWall(p.MediumK, w.R, w.Rings, w.Film)
		m.top.r = w.R + p.Clearance/2
		m.top.lean(w)
	case Rect:
		m.top = newRegion(p, -1, p.MediumK)
		m.top.loosen(p.Clearance)
		m.top.border = newRectWall(p, factor)
		for i := range m.top.pieces {
			m.top.pieces[i].at += complex(p.Clearance/2, p.Clearance/2)
		}
	case Hull:
		m.top = newRegion(p, -1, p.MediumK)
		m.top.border = newHullWall(p, factor)
	}
	if m.top != nil {
		m.top.order(factor)
	}
}

// outerWall is a round wall seen from a medium of conductivity k.
func outerWall(k, r float64, layers []Ring, film float64) harmonic.Stack {
	s := harmonic.Stack{Inner: harmonic.End{Kind: harmonic.Medium, V: k}, R: r, Rings: rings(r, layers)}
	s.Outer = harmonic.End{Kind: harmonic.Film, V: film}
	if math.IsInf(film, 1) {
		s.Outer.Kind = harmonic.Held
	}
	return s
}

// prepare writes the matrix if that is still to do; false if ctx ended first.
func (m *Model) prepare(ctx context.Context) bool {
	if m.ready || m.top == nil {
		return true
	}
	_, cut, _ := m.set.Accuracy.settings()
	if !m.top.assemble(cut, m.set.threads(), ended(ctx)) {
		return false
	}
	m.ready = true
	m.forget()
	m.dim()
	m.held = m.held[:0]
	for k, s := range m.top.sources {
		if m.p.Parts[s.part].Core == FixedBore {
			m.held = append(m.held, k)
		}
	}
	return true
}

func ended(ctx context.Context) func() bool { return func() bool { return ctx.Err() != nil } }

// level is the mean temperature of a round wall's inside for heats q; 0 within a border, which counts absolutely.
func (m *Model) level(q []float64) float64 {
	if m.top.border != nil {
		return 0
	}
	total := 0.0
	for _, v := range q {
		total += v
	}
	return m.p.Wall.Ambient + total*m.outsideR()
}

// outsideR is the wall's series resistance and its film's, K·m/W, on top of everything.
func (m *Model) outsideR() float64 {
	s := &m.top.wall
	r := s.Series()
	if f := m.p.Wall.Film; !math.IsInf(f, 1) {
		r += 1 / (2 * math.Pi * s.Outside() * f)
	}
	return r
}

// Solve finds the temperatures for the given heats (W/m, one per part, read for Metal parts only); nil means the Problem's own. It starts from
// the last solution. Status is Cancelled when ctx ends first, and the Result then holds the best so far.
func (m *Model) Solve(ctx context.Context, heats []float64) *Result {
	heats = m.heats(heats)
	if m.form != nil {
		return m.form.solve(ctx, heats)
	}
	if m.top == nil {
		return m.bare.solve(heats)
	}
	if !m.prepare(ctx) {
		return m.blank(Cancelled)
	}
	m.loadContours(heats)
	return m.solve(ctx, m.metals(heats))
}

// metals lists heats by source, 0 for bores.
func (m *Model) metals(heats []float64) []float64 {
	q := make([]float64, len(m.top.sources))
	for k, s := range m.top.sources {
		if m.p.Parts[s.part].Core == Metal {
			q[k] = heats[s.part]
		}
	}
	return q
}

func (m *Model) heats(heats []float64) []float64 {
	if heats == nil {
		heats = make([]float64, len(m.p.Parts))
		for i := range heats {
			heats[i] = m.p.Parts[i].Heat
		}
	}
	if len(heats) != len(m.p.Parts) {
		panic(badHeats)
	}
	if !good(heats...) {
		panic(badNumber)
	}
	return heats
}

// solve does the work for heats q by source.
func (m *Model) solve(ctx context.Context, q []float64) *Result {
	g := m.top
	if g.opens() {
		return m.solveCoupled(ctx, q)
	}
	_, _, tol := m.set.Accuracy.settings()
	if len(m.x) != g.sys.Len() {
		m.x = make([]float64, g.sys.Len())
	}
	if !m.holdBores(ctx, q) {
		return m.blank(Cancelled)
	}
	f := g.loadColumn(q, true)
	steps, ok := g.iterate(m.x, f, tol, ended(ctx))
	s := g.solved(q, m.x, m.level(q), nil)
	r := m.result(s)
	m.estimate(r, s, q)
	r.Steps = steps
	if !ok || steps >= maxSteps {
		r.Status = StoppedEarly
		if !ok {
			r.Status = Cancelled
		}
		m.doubt(r, f)
	}
	return r
}

// blank is a result that holds nothing but its status.
func (m *Model) blank(s Status) *Result {
	n := len(m.p.Parts)
	r := &Result{Core: make([]float64, n), Surfaces: make([][]float64, n), Absorbed: make([]float64, n), PartErrorK: make([]float64, n), Status: s}
	for i := range r.Core {
		r.Core[i] = math.NaN()
		r.Surfaces[i] = make([]float64, len(m.p.Parts[i].Rings)+1)
		for k := range r.Surfaces[i] {
			r.Surfaces[i][k] = math.NaN()
		}
	}
	r.WallMax = make([]float64, len(m.p.Wall.Rings)+1)
	for k := range r.WallMax {
		r.WallMax[k] = math.NaN()
	}
	r.WallMean, r.ErrorK = math.NaN(), math.NaN()
	r.Nusselt = 1
	r.Field = nowhere{}
	return r
}

// result reads the answer off a state.
func (m *Model) result(s *state) *Result {
	r := m.blank(Converged)
	m.read(r, s)
	m.readContours(r, s)
	m.readWall(r, s)
	r.Unknowns = m.top.sys.Len()
	if m.contours != nil {
		r.Unknowns += m.contours.sys.Len()
	}
	r.Field = &field{top: s, shift: m.shift()}
	return r
}

// readWall fills in the wall. A bare cable's jacket is its wall.
func (m *Model) readWall(r *Result, s *state) {
	if s.border != nil {
		r.WallMax, r.WallMean, r.SideOut, r.Released = s.border.hot, s.border.mean, s.border.sides, s.border.released
		r.AgainstOut = s.border.against
		if s.border.arcs != nil {
			r.WallMax[0] = s.exposed(r.WallMax[0])
		}
		return
	}
	r.WallMax, r.WallMean, r.Released = s.wallFaces(&m.p.Wall)
	if s.rest != nil {
		_, r.AgainstOut = s.rest.leaves(r.WallMean)
	}
	if i := m.bareCable(); i >= 0 {
		r.Surfaces[i], r.Core[i] = r.WallMax, r.WallMax[0]
		r.WallMax = r.WallMax[len(r.WallMax)-1:]
	}
}

// bareCable is the index of a cable that has no holder, −1 if there is none.
func (m *Model) bareCable() int {
	if m.p.Wall.Shape != BarePart || m.top == nil {
		return -1
	}
	for i := range m.p.Parts {
		if m.p.Parts[i].In == -1 {
			return i
		}
	}
	return -1
}

// read fills in the pieces of a state, going down into the cables.
func (m *Model) read(r *Result, s *state) {
	for i := range s.pieces {
		p := &s.pieces[i]
		faces := p.faces()
		r.Surfaces[p.part] = faces
		r.Core[p.part] = p.core(faces)
		switch m.p.Parts[p.part].Core {
		case Metal:
			r.Generated += p.q
		case FixedBore:
			r.Absorbed[p.part], r.Core[p.part] = -p.q, m.p.Parts[p.part].Fixed
		case Inside:
			m.read(r, p.inside)
		}
	}
}

// nowhere is the field of nothing.
type nowhere struct{}

func (nowhere) Row(dst []float64, _, _, _ float64) {
	for i := range dst {
		dst[i] = math.NaN()
	}
}
func (nowhere) At(_, _ float64) float64 { return math.NaN() }
