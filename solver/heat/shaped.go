package heat

import (
	"context"
	"math"

	"packrise/solver/outline"
)

// shaped solves sections in which not everything is round: every face is a contour of densities.
type shaped struct {
	m    *Model
	plan *plan
	sys  *outline.Shaped // nil until it is needed
	old  *outline.Shaped // the one before, of which a new one may keep something

	glow   *shine    // what radiates, nil before it is known or where nothing does
	before *shine    // the one before, of which a new one may keep something
	heats  []float64 // of the last solution, by part
}

// newShaped prepares a section; it is discretised by the first call that needs it.
func newShaped(m *Model) *shaped {
	for i := range m.p.Parts {
		m.p.Parts[i].Form.check()
	}
	return &shaped{m: m}
}

// prepare discretises; false if ctx ended first.
func (s *shaped) prepare(ctx context.Context) bool {
	if s.sys != nil {
		return true
	}
	factor, _, _ := s.m.set.Accuracy.settings()
	s.plan = newPlan(&s.m.p)
	s.sys = outline.NewShapedAround(s.plan.contours, outline.Around{MediumK: s.m.p.MediumK, Hull: s.plan.hull}, s.old, factor, ended(ctx))
	if s.sys != nil {
		s.old = nil
		s.glow, s.before = s.newShine(s.before), nil
	}
	return s.sys != nil
}

// move puts a part elsewhere.
func (s *shaped) move() {
	if s.sys != nil {
		s.old, s.sys = s.sys, nil
	}
	if s.glow != nil {
		s.glow, s.before = nil, s.glow
	}
}

// outside takes other films and temperatures.
func (s *shaped) outside() {
	if s.sys == nil {
		return
	}
	l := newPlan(&s.m.p)
	s.plan = l
	s.sys = s.sys.Outside(l.sides())
	if s.glow != nil {
		s.glow.patch, s.glow.cores = s.glow.patch.On(s.sys), nil
	}
}

// sides are those of every contour.
func (l *plan) sides() [][]outline.Side {
	s := make([][]outline.Side, len(l.contours))
	for i := range s {
		s[i] = l.contours[i].Sides
	}
	return s
}

// solve finds the temperatures for heats by part.
func (s *shaped) solve(ctx context.Context, heats []float64) *Result {
	if !s.prepare(ctx) {
		return s.m.blank(Cancelled)
	}
	r := s.m.blank(Converged)
	y := s.respond(ctx, r, heats)
	if y == nil {
		return s.m.blank(Cancelled)
	}
	hot, mean, out := s.sys.Faces(y, outline.Sources{})
	parts := s.m.p.Parts
	for i := range parts {
		q, c := &parts[i], s.plan.first[i]
		copy(r.Surfaces[i], hot[c+s.plan.skins[i]:])
		r.Core[i] = r.Surfaces[i][0]
		switch q.Core {
		case Metal:
			r.Core[i] = s.sys.Metal(y, c)
			r.Surfaces[i][0] = r.Core[i]
			r.Generated += heats[i]
		case FixedBore:
			r.Core[i], r.Absorbed[i] = q.Fixed, -s.sys.Leaves(y, c)
			if s.glow != nil && len(q.Rings) == 0 {
				r.Absorbed[i] -= s.glow.given(c)
			}
		}
	}
	s.walls(r, hot, mean, out)
	r.Unknowns = s.sys.Len()
	s.estimate(r)
	if g := s.glow; g != nil {
		r.Unknowns += len(g.e)
		g.cores = append([]float64(nil), r.Core...)
		part, _, _ := s.m.set.Accuracy.grain()
		s.m.widen(r, s.m.rise(r)*hollowError/(part*part))
	}
	r.Field = shapedField{s.sys.Field(y)}
	return r
}

// respond solves, radiation and all; nil if ctx ended first.
func (s *shaped) respond(ctx context.Context, r *Result, heats []float64) []float64 {
	load, g := s.load(heats), s.glow
	if g == nil {
		return s.sys.Respond(load, true)
	}
	if !g.look(ctx) {
		return nil
	}
	_, _, tol := s.m.set.Accuracy.settings()
	if r.Steps, r.Status = g.solve(ctx, load, tol); r.Status == Cancelled {
		return nil
	}
	s.heats = append([]float64(nil), heats...)
	h := g.hollows[0]
	r.Radiates, r.Nusselt, r.Beyond = true, h.nu, !h.inRange
	return g.answer(g.t, load, true, g.e)
}

// walls fills in what the result says of the wall.
func (s *shaped) walls(r *Result, hot []float64, mean float64, out []float64) {
	w := &s.m.p.Wall
	last := len(hot) - 2
	if w.Shape == BarePart {
		r.WallMax = []float64{hot[last]}
		for i := range s.m.p.Parts {
			q := &s.m.p.Parts[i]
			if q.In >= 0 {
				continue
			}
			r.Surfaces[i][len(q.Rings)] = hot[last]
			if len(q.Rings) == 0 && q.Core != Metal {
				r.Core[i] = hot[last]
			}
		}
	} else {
		copy(r.WallMax, hot[s.plan.wall:last+1])
	}
	if w.Shape == Hull {
		r.WallMax = hot[last+1:]
	}
	r.WallMean = mean
	if s.glow != nil {
		s.glow.direct(out)
	}
	for i, q := range out {
		r.Released += q
		if w.Shape == Rect {
			r.SideOut[boxOrder[i]] = q
		}
	}
	r.AgainstOut = s.plan.against(out)
}

// load puts heats by part in the order of the contours.
func (s *shaped) load(heats []float64) []float64 {
	h := make([]float64, len(s.plan.contours))
	for i, q := range heats {
		if s.m.p.Parts[i].Core == Metal {
			h[s.plan.first[i]] = q
		}
	}
	return h
}

// What unresolved densities do to a metal's temperature is of second order in them, to a hottest place of first: found on sixty random sections against
// bends half as long (TestShapedProperties), where the median estimate of metals was seven times the error.
const (
	looseShare   = 0.4
	hottestShare = 1.5
	shapedFloor  = 1e-5 // of the rise
)

// estimate fills in ErrorK and PartErrorK.
func (s *shaped) estimate(r *Result) {
	l := s.sys.Loose()
	rise := s.m.rise(r)
	r.ErrorK = rise * (looseShare*l*l + shapedFloor)
	for i := range r.PartErrorK {
		r.PartErrorK[i] = r.ErrorK
		switch s.m.p.Parts[i].Core {
		case Body, Bore, Inside: // a hottest place is of first order
			r.PartErrorK[i] += rise * hottestShare * l
		case FixedBore:
			r.PartErrorK[i] = 0
		}
		r.ErrorK = math.Max(r.ErrorK, r.PartErrorK[i])
	}
}

// shapedField is the field of a section that is not round.
type shapedField struct{ f *outline.ShapedField }

func (f shapedField) At(x, y float64) float64 { return f.f.At(complex(x, y)) }

func (f shapedField) Row(dst []float64, y, x0, dx float64) {
	for i := range dst {
		dst[i] = f.f.At(complex(x0+float64(i)*dx, y))
	}
}
