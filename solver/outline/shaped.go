package outline

import (
	"math"
	"runtime"
	"slices"
)

// Contour is a face between two materials, or of a metal, a held bore or the outside.
type Contour struct {
	Loop Loop
	// In and Out are the conductivities on either side, W/mK. In is +Inf for a metal of one temperature, whose heat is given, and for a bore that is
	// held at Fixed. Out of the outside does not count.
	In, Out float64
	Held    bool
	Fixed   float64
	// Sides is how the outside meets the surroundings: one for each stroke, or one for all of them; nil for every other face. On the outside of an
	// open bundle some may be Covered: a face like every other.
	Sides []Side
	// String tells that it is no loop but a straight string of an open bundle, from part to part, with In on its left.
	String bool
}

// metal tells that a heat of its own leaves the contour.
func (c *Contour) metal() bool { return math.IsInf(c.In, 1) && !c.Held }

func (c *Contour) side(stroke int) *Side { return &c.Sides[min(stroke, len(c.Sides)-1)] }

// Shaped is a section of any convex contours, discretised and factorised: unknowns are the densities and the constant T_c. The outside is the last
// contour. Contours may touch but must leave a gap that lengths of the section can resolve in double precision (10 nm do). Safe for concurrent use.
type Shaped struct {
	contours []Contour
	around   Around
	grading  grading
	fineness float64
	metals   []int     // contours of metals
	lengths  []float64 // of the contours
	bends    []bend
	order    []int // bends by their unknowns
	discs    []shapedDisc
	n        int       // densities
	inner    int       // of them on all that does not meet the surroundings
	eq       []float64 // rows of n: conditions of the inside, mean ∂T/∂n on the outside
	outT     []float64 // mean T on the outside, rows of n
	temps    []float64 // T at the ends of cells, rows of n
	cells    int
	centre   [][]float64 // per contour: temperature at its centroid, nil but of metals
	loose    float64     // what refining last found
	factors
}

const badContour = "outline: a contour's conductivity or film is not positive, or the last one is no outside"

// NewShaped discretises the contours and refines until densities are resolved (fineness 1 is standard, 0.7 draft, 1.5 fine), and factorises. stop
// is asked between pieces of work; nil if it asked for an end.
func NewShaped(contours []Contour, fineness float64, stop func() bool) *Shaped {
	return NewShapedAround(contours, Around{MediumK: 1}, nil, fineness, stop)
}

// NewShapedAround is NewShaped with discs among the contours, which exchange harmonics with them as with a System. What an old one, nil for none, knows
// of contours and discs that are the same is kept.
func NewShapedAround(contours []Contour, around Around, old *Shaped, fineness float64, stop func() bool) *Shaped {
	s := &Shaped{contours: append([]Contour(nil), contours...), around: around, fineness: fineness, grading: grading{harmonic: perHarmonic / fineness}}
	s.around.Discs = append([]Disc(nil), around.Discs...)
	for i := range contours {
		c := &contours[i]
		hulled := around.Hull != nil
		if !(c.In > 0) || !hulled && (c.Sides == nil) != (i < len(contours)-1) || c.Sides == nil && !(c.Out > 0) {
			panic(badContour)
		}
		if c.metal() {
			s.metals = append(s.metals, i)
		}
		s.lengths = append(s.lengths, c.Loop.Perimeter())
	}
	s.discs = make([]shapedDisc, len(s.around.Discs))
	for i, d := range s.around.Discs {
		s.discs[i].Disc = d
	}
	s.begin()
	s.recall(old)
	for round := 0; ; round++ {
		if round > 0 {
			was := *s
			old = &was
		}
		if !s.write(old, stop) {
			return nil
		}
		if round == maxRounds || s.n > maxUnknowns || !s.refine(fineness) {
			return s
		}
	}
}

// Len returns the number of unknowns.
func (s *Shaped) Len() int { return s.n + 1 }

// Loose is an estimate of what the densities lack, relative to the heat.
func (s *Shaped) Loose() float64 { return s.loose }

// outside is the last contour.
func (s *Shaped) outside() *Contour { return &s.contours[len(s.contours)-1] }

// number gives the bends their unknowns, those of the outside last.
func (s *Shaped) number() {
	s.n, s.cells, s.inner = 0, 0, 0
	s.order = nil
	for _, outer := range []bool{false, true} {
		for i := range s.bends {
			b := &s.bends[i]
			if s.outer(b) != outer {
				continue
			}
			s.order = append(s.order, i)
			b.dof, b.firstCell = s.n, s.cells
			s.n += modes
			s.cells += modes + 1
		}
		if !outer {
			s.inner = s.n
		}
	}
}

// outer tells whether a bend meets the surroundings.
func (s *Shaped) outer(b *bend) bool {
	c := &s.contours[b.contour]
	return c.Sides != nil && c.side(b.stroke).Kind != Covered
}

// condition is the row of a bend of the inside, and of the outside under its film: as in row.
func (s *Shaped) condition(b *bend) row {
	c := &s.contours[b.contour]
	switch {
	case c.Held:
		return row{temp: 4 / s.lengths[b.contour], outside: c.Fixed}
	case c.metal():
		return row{density: 1, flux: 2}
	case !s.outer(b):
		return row{density: 1, flux: 2 * (c.In - c.Out) / (c.In + c.Out)}
	}
	side, size := c.side(b.stroke), s.lengths[b.contour]/4
	switch {
	case side.Kind == Insulated:
		return row{density: 1, flux: 2}
	case side.Kind == Held || math.IsInf(side.Film, 1):
		return row{temp: 1 / size, outside: side.Temp}
	}
	f := 1 / (1 + side.Film*size/c.In)
	return row{density: f, flux: 2 * f, temp: 2 * f * side.Film / c.In, outside: side.Temp}
}

// recall marks the bends that an old section has as well.
func (s *Shaped) recall(old *Shaped) {
	if old == nil {
		return
	}
	type key struct {
		contour, stroke int
		lo, hi          float64
	}
	was := map[key]int{}
	for i := range old.bends {
		b := &old.bends[i]
		was[key{b.contour, b.stroke, b.lo, b.hi}] = b.dof
	}
	same := make([]int, len(s.contours))
	for i := range s.contours {
		same[i] = slices.IndexFunc(old.contours, s.contours[i].alike)
	}
	for i := range s.bends {
		b := &s.bends[i]
		if dof, ok := was[key{same[b.contour], b.stroke, b.lo, b.hi}]; ok {
			b.known = dof
		}
	}
}

// alike tells whether two contours have the same equations but for what is outside.
func (c *Contour) alike(d Contour) bool {
	if c.In != d.In || c.Out != d.Out || c.Held != d.Held || c.String != d.String || len(c.Sides) != len(d.Sides) || !slices.Equal(c.Loop, d.Loop) {
		return false
	}
	for i := range c.Sides {
		if (c.Sides[i].Kind == Covered) != (d.Sides[i].Kind == Covered) {
			return false
		}
	}
	return true
}

// write sets up the equations, keeping what is known of an old section, and takes them apart; false if stop asked for an end.
func (s *Shaped) write(old *Shaped, stop func() bool) bool {
	s.number()
	s.eq, s.temps = make([]float64, s.n*s.n), make([]float64, s.cells*s.n)
	s.outT = make([]float64, (s.n-s.inner)*s.n)
	s.centre = make([][]float64, len(s.contours))
	workers := min(runtime.GOMAXPROCS(0), len(s.bends))
	each(workers, func(w int) {
		for i := w; i < len(s.bends) && !stop(); i += workers {
			s.rows(&s.bends[i], old)
		}
	})
	each(len(s.discs), func(j int) {
		if !stop() {
			s.link(j)
		}
	})
	for i := range s.contours {
		if c := &s.contours[i]; c.metal() {
			_, at := c.Loop.Area()
			s.centre[i] = s.probe(at)
		}
	}
	return !stop() && s.factorise(stop)
}

// rows writes the equations of one bend and the temperatures along it.
func (s *Shaped) rows(to *bend, old *Shaped) {
	outer := s.outer(to)
	r := s.condition(to)
	if outer {
		r = row{flux: 1}
	}
	at := cellsOf[modes].at
	var f curved
	var g [modes + 1][modes]complex128
	var spots [modes + 1]spot
	for j := range s.bends {
		from := &s.bends[j]
		if to.known >= 0 && from.known >= 0 {
			s.keep(to, from, old)
			continue
		}
		for l, t := range at {
			spots[l] = from.spotOf(to, t)
			from.complexPotential(&f, spots[l], &g[l])
			row := s.temps[(to.firstCell+l)*s.n+from.dof:]
			for k := range modes {
				row[k] = -real(g[l][k]) / (2 * math.Pi)
			}
		}
		for l := range modes {
			a := s.eq[(to.dof+l)*s.n+from.dof:][:modes]
			if r.flux != 0 {
				from.flux(to, l, &spots, &g, a, r.flux/(to.half*(at[l+1]-at[l])))
			}
			switch {
			case outer:
				from.meanTemp(&f, to, l, 1, s.outT[(to.dof+l-s.inner)*s.n+from.dof:][:modes])
			case r.temp != 0:
				from.meanTemp(&f, to, l, r.temp, a)
			}
			if from == to && !outer {
				for k, v := range cellsOf[modes].mean[l] {
					a[k] += r.density * v
				}
			}
		}
	}
}

// keep copies what two bends do to each other.
func (s *Shaped) keep(to, from *bend, old *Shaped) {
	i, j := to.known, from.known
	for l := range modes {
		copy(s.eq[(to.dof+l)*s.n+from.dof:][:modes], old.eq[(i+l)*old.n+j:])
		if to.dof >= s.inner {
			copy(s.outT[(to.dof+l-s.inner)*s.n+from.dof:][:modes], old.outT[(i+l-old.inner)*old.n+j:])
		}
	}
	first := i / modes * (modes + 1)
	for l := range modes + 1 {
		copy(s.temps[(to.firstCell+l)*s.n+from.dof:][:modes], old.temps[(first+l)*old.n+j:])
	}
}

// flux adds f times the integral of ∂T/∂n (principal value) over cell l of to, per mode of b: the difference of the conjugate potential.
func (b *bend) flux(to *bend, l int, spots *[modes + 1]spot, g *[modes + 1][modes]complex128, a []float64, f float64) {
	if spots[l].straight {
		return
	}
	f /= -2 * math.Pi
	for k := range a {
		a[k] += f * (imag(g[l+1][k]) - imag(g[l][k]))
	}
	if b == to {
		return
	}
	if turns := b.turns(to, l, spots); turns != 0 {
		a[0] += f * 2 * b.half * 2 * math.Pi * turns
	}
}

// turns is by how many turns the logarithms at the ends of cell l of to have to be brought to one branch: as seen from the end of b that keeps farther
// off the cell's ends, for the other may be one of them but for rounding.
func (b *bend) turns(to *bend, l int, spots *[modes + 1]spot) float64 {
	at := cellsOf[modes].at
	u, v := spots[l].w, spots[l+1].w
	p, change := b.b, imag(spots[l+1].ll)-imag(spots[l].ll)
	if math.Min(dist(u, -1), dist(v, -1)) > math.Min(dist(u, 1), dist(v, 1)) {
		p, change = b.a, imag(spots[l+1].lr)-imag(spots[l].lr)
	}
	return math.Round((to.sweep(at[l], at[l+1], p) - change) / (2 * math.Pi))
}

// meanTemp adds f times the mean of T over cell l of to, per mode of b, by a Gauss rule.
func (b *bend) meanTemp(c *curved, to *bend, l int, f float64, a []float64) {
	at := cellsOf[modes].at
	var g [modes]complex128
	rule := &rules[2]
	if b.contour == to.contour {
		rule = &rules[4]
	}
	for i, x := range rule.x {
		t := (at[l]+at[l+1])/2 + x*(at[l+1]-at[l])/2
		b.complexPotential(c, b.spotOf(to, t), &g)
		w := -f * rule.w[i] / 2 / (2 * math.Pi)
		for k := range a {
			a[k] += w * real(g[k])
		}
	}
}

// probe is the temperature at z per density.
func (s *Shaped) probe(z complex128) []float64 {
	row := make([]float64, s.n)
	var f curved
	var g [modes]complex128
	for j := range s.bends {
		b := &s.bends[j]
		b.complexPotential(&f, b.look(z), &g)
		for k := range modes {
			row[b.dof+k] = -real(g[k]) / (2 * math.Pi)
		}
	}
	return row
}
