package heat

import (
	"context"
	"math"
	"slices"

	"packrise/solver/outline"
)

// shine is what the surfaces of a section that is not round radiate to each other. Unknowns are the net emissions e of the patches; the contours answer
// to them with temperatures T = T₀ − R e, and e = E(T) is solved as in coupled: Newton's method around GMRES.
type shine struct {
	s       *shaped
	patch   *outline.ShapedPatches
	hollows []*hollow
	unit    []float64 // of each unknown, W/m: patches count by their area
	e       []float64 // W/m
	t       []float64 // above the common zero
	base    []float64 // K
	still   []float64
	w       []float64 // room
	zero    float64
	press   float64
	warm    bool      // e is the solution of something alike
	cores   []float64 // by part, of the last solution; nil: that was of another section
}

// newShine divides the faces that look into gases; nil if there are none. What is known of a like section is a start.
func (s *shaped) newShine(old *shine) *shine {
	hollows := s.plan.hollows()
	if len(hollows) == 0 {
		return nil
	}
	p := &s.m.p
	g := &shine{s: s, hollows: hollows, zero: p.ZeroK, press: p.Pressure, patch: s.plan.divide(s.sys, hollows, s.m.set.Accuracy)}
	if g.press == 0 {
		g.press = standardPressure
	}
	n := len(g.patch.A)
	mean := 0.0
	for _, l := range g.patch.Length {
		mean += l / float64(n)
	}
	for _, l := range g.patch.Length {
		g.unit = append(g.unit, math.Sqrt(l/mean))
	}
	for _, v := range []*[]float64{&g.e, &g.t, &g.base, &g.still, &g.w} {
		*v = make([]float64, n)
	}
	g.inherit(old)
	return g
}

// inherit starts from the emissions of an older section, and keeps what surfaces saw of each other where nothing stands elsewhere.
func (g *shine) inherit(old *shine) {
	if old == nil || len(old.e) != len(g.e) || len(old.hollows) != len(g.hollows) || !slices.Equal(old.patch.Contour, g.patch.Contour) {
		return
	}
	copy(g.e, old.e)
	g.warm = old.warm
	if !slices.Equal(old.patch.A, g.patch.A) || !slices.Equal(old.patch.B, g.patch.B) || old.s.m.set.Accuracy != g.s.m.set.Accuracy {
		return
	}
	for i, h := range g.hollows {
		if o := old.hollows[i]; o.ex != nil && slices.Equal(h.walls, o.walls) && slices.Equal(h.parts, o.parts) {
			h.seen = o.ex.Enclosure
		}
	}
}

// look lets all surfaces look about; false if ctx ended first.
func (g *shine) look(ctx context.Context) bool {
	set := g.s.m.set
	_, _, points := set.Accuracy.hollowGrain()
	if !g.patch.Measure(ended(ctx)) {
		return false
	}
	for _, h := range g.hollows {
		if h.ex == nil && !h.look(g.s.plan, g.patch, points, set.threads(), ended(ctx)) {
			return false
		}
	}
	return true
}

// answer is the contours' to heats by contour and emissions e; the patches' temperatures go to t.
func (g *shine) answer(t, heats []float64, ground bool, e []float64) (y []float64) {
	for k, v := range e {
		g.w[k] = -v
	}
	y = g.patch.Respond(heats, ground, g.w)
	g.patch.Means(t, y, outline.Sources{})
	return y
}

// stir finds the convection at the base, and net the emissions there that make up for e.
func (g *shine) rebase() {
	for k, v := range g.t {
		g.base[k] = math.Max(v+g.zero, 1)
	}
	for _, h := range g.hollows {
		h.gather(h.base, g.base)
		h.gather(h.e, g.e)
		if h.stirs {
			h.nu, h.inRange = h.ex.Stir(h.base, g.press)
		}
		h.ex.NetOf(h.out, h.base, h.e)
		h.scatter(g.still, h.out)
	}
}

// change sets out to how the emissions change about the base for changes dt and de.
func (g *shine) change(out, dt, de []float64) {
	for _, h := range g.hollows {
		h.gather(h.t, dt)
		h.gather(h.e, de)
		h.ex.ChangeOf(h.out, h.base, h.t, h.e)
		h.scatter(out, h.out)
	}
}

// improve adds to e what solves e − change(T(e), e) = f, heats being nought.
func (g *shine) improve(ctx context.Context, e, f []float64, eta float64) (steps int, ok bool) {
	n := len(f)
	none := make([]float64, len(g.s.plan.contours))
	x, b := make([]float64, n), make([]float64, n)
	de, dt, out := make([]float64, n), make([]float64, n), make([]float64, n)
	for k, v := range f {
		b[k] = v / g.unit[k]
	}
	steps, ok = gmres(func(y, x []float64) {
		for k, v := range x {
			de[k] = g.unit[k] * v
		}
		g.answer(dt, none, false, de)
		g.change(out, dt, de)
		for k := range y {
			y[k] = x[k] - out[k]/g.unit[k]
		}
	}, x, b, eta, ended(ctx))
	for k, v := range x {
		e[k] += g.unit[k] * v
	}
	return steps, ok
}

// solve finds the emissions for heats by contour. What does not lead anywhere from the last ones is tried from none.
func (g *shine) solve(ctx context.Context, heats []float64, tol float64) (steps int, status Status) {
	warm := g.warm
	steps, status = g.newton(ctx, heats, tol)
	if status == StoppedEarly && warm {
		g.warm = false
		more := 0
		more, status = g.newton(ctx, heats, tol)
		steps += more
	}
	if g.warm = status == Converged; g.warm {
		g.level()
	}
	return steps, status
}

func (g *shine) newton(ctx context.Context, heats []float64, tol float64) (steps int, status Status) {
	if !g.warm {
		clear(g.e)
		g.answer(g.t, heats, true, g.e)
		more, ok := g.begin(ctx)
		if steps += more; !ok {
			return steps, Cancelled
		}
	}
	whole := norm(heats)
	r := make([]float64, len(g.e))
	for range newtonRounds {
		g.answer(g.t, heats, true, g.e)
		g.rebase()
		for k, v := range g.still {
			r[k] = v - g.e[k]
		}
		size := norm(r)
		if math.IsNaN(size) || math.IsInf(size, 0) {
			return steps, StoppedEarly
		}
		want := tol * (whole + norm(g.e) + leastDrive)
		if size <= want {
			return steps, Converged
		}
		more, ok := g.improve(ctx, g.e, r, math.Max(newtonRough, 0.3*want/size))
		if steps += more; !ok {
			return steps, Cancelled
		}
	}
	return steps, StoppedEarly
}

// begin takes radiation as linear about one temperature, a little above that of the first hollow's wall.
func (g *shine) begin(ctx context.Context) (steps int, ok bool) {
	t, length := 0.0, 0.0
	for k, c := range g.patch.Contour {
		if l := g.patch.Length[k]; slices.Contains(g.hollows[0].walls, c) {
			t += l * g.t[k]
			length += l
		}
	}
	t = math.Max(t/length+guessRise+g.zero, 1)
	f, d := make([]float64, len(g.e)), make([]float64, len(g.e))
	for k, v := range g.t {
		g.base[k] = t
		d[k] = v + g.zero - t
	}
	for _, h := range g.hollows {
		h.gather(h.base, g.base)
	}
	g.change(f, d, g.e)
	return g.improve(ctx, g.e, f, newtonRough)
}

// column is the contours' answer to 1 W/m more in a metal, about the last solution.
func (g *shine) column(ctx context.Context, contour int) ([]float64, bool) {
	heats := make([]float64, len(g.s.plan.contours))
	heats[contour] = 1
	n := len(g.e)
	e, f, t := make([]float64, n), make([]float64, n), make([]float64, n)
	g.answer(t, heats, false, e)
	g.change(f, t, e)
	if _, ok := g.improve(ctx, e, f, tangentTolerance); !ok {
		return nil, false
	}
	return g.answer(t, heats, false, e), true
}

// level makes the emissions in each hollow add up to nothing, exactly.
func (g *shine) level() {
	for _, h := range g.hollows {
		sum, area := 0.0, 0.0
		for i, k := range h.at {
			sum += g.e[k]
			area += h.ex.Seen(i) * g.patch.Length[k] // blank patches see nothing
		}
		for i, k := range h.at {
			g.e[k] -= sum / area * h.ex.Seen(i) * g.patch.Length[k]
		}
	}
}

// given is what all patches of a contour give off, W/m.
func (g *shine) given(contour int) float64 {
	sum := 0.0
	for k, c := range g.patch.Contour {
		if c == contour {
			sum += g.e[k]
		}
	}
	return sum
}

// direct adds to the heat through the strokes of the outside, of an open bundle in all, what its patches take up: no layer brings it.
func (g *shine) direct(out []float64) {
	l := g.s.plan
	last := len(l.contours) - 1
	for k, c := range g.patch.Contour {
		switch {
		case l.contours[c].String:
			out[0] -= g.e[k]
		case c == last && l.hull == nil:
			out[nearestStroke(l.contours[c].Loop, (g.patch.A[k]+g.patch.B[k])/2)] -= g.e[k]
		}
	}
}
