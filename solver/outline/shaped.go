package outline

import (
	"math"
	"runtime"

	"gonum.org/v1/gonum/blas/blas64"
	"gonum.org/v1/gonum/lapack/lapack64"
)

// Contour is a face between two materials, or of a metal, a held bore or the outside.
type Contour struct {
	Loop Loop
	// In and Out are the conductivities on either side, W/mK. In is +Inf for a metal of one temperature, whose heat is given, and for a bore that is
	// held at Fixed. Out of the outside does not count.
	In, Out float64
	Held    bool
	Fixed   float64
	// Sides is how the outside meets the surroundings: one for each stroke, or one for all of them; nil for every other face.
	Sides []Side
}

// source tells that a heat of its own leaves the contour.
func (c *Contour) metal() bool { return math.IsInf(c.In, 1) && !c.Held }

func (c *Contour) side(stroke int) *Side { return &c.Sides[min(stroke, len(c.Sides)-1)] }

// Shaped is a section of any convex contours, discretised and factorised: unknowns are the densities and the constant T_c. The outside is the last
// contour. Contours may touch but must leave a gap that lengths of the section can resolve in double precision (0.1 µm do). Safe for concurrent use.
type Shaped struct {
	contours []Contour
	bends    []bend
	n        int
	m        blas64.General // the equations, then their factors
	pivots   []int
	cells    int         // ends of cells
	temps    []float64   // temperature there per density
	mean     [][]float64 // per contour: mean temperature of the face
	out      [][]float64 // per stroke of the outside: heat through it
	centre   [][]float64 // per contour: temperature at its centroid, nil but of metals
	loose    float64     // what refining last found
}

const badContour = "outline: a contour's conductivity or film is not positive, or the last one is no outside"

// NewShaped discretises the contours and refines until densities are resolved (fineness 1 is standard, 0.7 draft, 1.5 fine), and factorises.
func NewShaped(contours []Contour, fineness float64) *Shaped {
	for i := range contours {
		c := &contours[i]
		if !(c.In > 0) || (c.Sides == nil) != (i < len(contours)-1) || c.Sides == nil && !(c.Out > 0) {
			panic(badContour)
		}
	}
	s := &Shaped{contours: contours}
	s.begin(fineness)
	for round := 0; ; round++ {
		s.number()
		s.write()
		if round == maxRounds || s.n > maxUnknowns || !s.refine(fineness) {
			return s
		}
	}
}

// Len returns the number of unknowns.
func (s *Shaped) Len() int { return s.n + 1 }

// Loose is an estimate of what the densities lack, relative to the heat.
func (s *Shaped) Loose() float64 { return s.loose }

// number gives the bends their unknowns.
func (s *Shaped) number() {
	s.n, s.cells = 0, 0
	for i := range s.bends {
		b := &s.bends[i]
		b.dof, b.firstCell = s.n, s.cells
		s.n += modes
		s.cells += modes + 1
	}
}

// condition is the row of a bend: as in row.
func (s *Shaped) condition(b *bend) row {
	c := &s.contours[b.contour]
	switch {
	case c.Held:
		return row{temp: 1 / s.scale(c), outside: c.Fixed}
	case c.metal():
		return row{density: 1, flux: 2}
	case c.Sides == nil:
		return row{density: 1, flux: 2 * (c.In - c.Out) / (c.In + c.Out)}
	}
	side := c.side(b.stroke)
	switch {
	case side.Kind == Insulated:
		return row{density: 1, flux: 2}
	case side.Kind == Held || math.IsInf(side.Film, 1):
		return row{temp: 1 / s.scale(c), outside: side.Temp}
	}
	l := s.scale(c)
	f := 1 / (1 + side.Film*l/c.In)
	return row{density: f, flux: 2 * f, temp: 2 * f * side.Film / c.In, outside: side.Temp}
}

func (s *Shaped) scale(c *Contour) float64 { return c.Loop.Perimeter() / 4 }

// write sets up the equations and takes them apart.
func (s *Shaped) write() {
	n := s.n + 1
	s.m = blas64.General{Rows: n, Cols: n, Stride: n, Data: make([]float64, n*n)}
	s.temps = make([]float64, s.cells*s.n)
	s.mean, s.centre = make([][]float64, len(s.contours)), make([][]float64, len(s.contours))
	for i := range s.contours {
		s.mean[i] = make([]float64, s.n)
	}
	last := &s.contours[len(s.contours)-1]
	s.out = make([][]float64, len(last.Loop))
	for i := range s.out {
		s.out[i] = make([]float64, s.n)
	}
	s.eachContour(func(i int) {
		for j := range s.bends {
			if s.bends[j].contour == i {
				s.rows(&s.bends[j])
			}
		}
		c := &s.contours[i]
		if c.metal() {
			_, at := c.Loop.Area()
			s.centre[i] = s.probe(at)
			s.carry(i)
		}
	})
	for i := range s.bends { // no net source
		s.m.Data[s.n*n+s.bends[i].dof] = 2 * s.bends[i].half
	}
	s.pivots = make([]int, n)
	if !lapack64.Getrf(s.m, s.pivots) || s.sealed() {
		s.m.Data[n*n-1] = math.NaN()
	}
}

// eachContour calls f for every contour on all processors, in an even order.
func (s *Shaped) eachContour(f func(i int)) {
	workers := min(runtime.GOMAXPROCS(0), len(s.contours))
	each(workers, func(w int) {
		for i := w; i < len(s.contours); i += workers {
			f(i)
		}
	})
}

func (s *Shaped) sealed() bool {
	for i := range s.contours {
		c := &s.contours[i]
		if c.Held {
			return false
		}
		for j := range c.Sides {
			if d := &c.Sides[j]; d.Kind == Held || d.Kind == Open && d.Film > 0 {
				return false
			}
		}
	}
	return true
}

// rows writes the equations of one bend and what is measured along it.
func (s *Shaped) rows(to *bend) {
	r := s.condition(to)
	n := s.n + 1
	c := &s.contours[to.contour]
	perimeter := c.Loop.Perimeter()
	at := cellsOf[modes].at
	var f curved
	var g [modes + 1][modes]complex128
	var spots [modes + 1]spot
	for j := range s.bends {
		from := &s.bends[j]
		for l, t := range at {
			spots[l] = from.spotOf(to, t)
			from.complexPotential(&f, spots[l], &g[l])
			row := s.temps[(to.firstCell+l)*s.n+from.dof:]
			for k := range modes {
				v := -real(g[l][k]) / (2 * math.Pi)
				row[k] = v
				s.mean[to.contour][from.dof+k] += v * lobattoWeight[l] * to.half / perimeter
			}
		}
		for l := range modes {
			a := s.m.Data[(to.dof+l)*n+from.dof:][:modes]
			share := (at[l+1] - at[l]) / 2
			s.flux(from, to, l, &spots, &g, a, r.flux/(2*to.half*share))
			if c.Sides != nil {
				s.flux(from, to, l, &spots, &g, s.out[to.stroke][from.dof:][:modes], -c.In)
			}
			if r.temp != 0 {
				s.meanTemp(&f, from, to, l, r.temp, a)
			}
		}
		if from == to {
			s.ownDensity(to, r, c)
		}
	}
	if r.temp != 0 {
		for l := range modes {
			s.m.Data[(to.dof+l)*n+s.n] = r.temp
		}
	}
}

// ownDensity adds the jump of a bend's own density.
func (s *Shaped) ownDensity(to *bend, r row, c *Contour) {
	at := cellsOf[modes].at
	for l, m := range cellsOf[modes].mean {
		a := s.m.Data[(to.dof+l)*(s.n+1)+to.dof:]
		for k, v := range m {
			a[k] += r.density * v
			if c.Sides != nil {
				s.out[to.stroke][to.dof+k] -= c.In / 2 * v * to.half * (at[l+1] - at[l])
			}
		}
	}
}

// flux adds f times the heat-like integral of ∂T/∂n (principal value) over cell l of to, per mode of from: the difference of the conjugate potential.
func (s *Shaped) flux(from, to *bend, l int, spots *[modes + 1]spot, g *[modes + 1][modes]complex128, a []float64, f float64) {
	if spots[l].straight || f == 0 {
		return
	}
	f /= -2 * math.Pi
	for k := range a {
		a[k] += f * (imag(g[l+1][k]) - imag(g[l][k]))
	}
	if from == to {
		return
	}
	if turns := from.turns(to, l, spots); turns != 0 {
		a[0] += f * 2 * from.half * 2 * math.Pi * turns
	}
}

// turns is by how many turns the logarithms at the ends of cell l of to have to be brought to one branch.
func (b *bend) turns(to *bend, l int, spots *[modes + 1]spot) float64 {
	at := cellsOf[modes].at
	mid := scale(0.5, spots[l].w+spots[l+1].w)
	p, change := b.b, imag(spots[l+1].ll)-imag(spots[l].ll)
	if real(mid) > 0 {
		p, change = b.a, imag(spots[l+1].lr)-imag(spots[l].lr)
	}
	return math.Round((to.sweep(at[l], at[l+1], p) - change) / (2 * math.Pi))
}

// meanTemp adds f times the mean of T over cell l of to, per mode of from, by a Gauss rule.
func (s *Shaped) meanTemp(c *curved, from, to *bend, l int, f float64, a []float64) {
	at := cellsOf[modes].at
	var g [modes]complex128
	rule := &rules[2]
	if from.contour == to.contour {
		rule = &rules[4]
	}
	for i, x := range rule.x {
		t := (at[l]+at[l+1])/2 + x*(at[l+1]-at[l])/2
		from.complexPotential(c, from.spotOf(to, t), &g)
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

// carry adds to a metal's rows that all its density makes its heat: nothing else tells how much leaves it.
func (s *Shaped) carry(contour int) {
	p := s.contours[contour].Loop.Perimeter()
	for i := range s.bends {
		to := &s.bends[i]
		if to.contour != contour {
			continue
		}
		for j := range s.bends {
			if from := &s.bends[j]; from.contour == contour {
				for l := range modes {
					s.m.Data[(to.dof+l)*(s.n+1)+from.dof] += 2 * from.half / p
				}
			}
		}
	}
}

// lobattoWeight are those of the ends of cells for the mean over a bend times two.
var lobattoWeight = func() (w [modes + 1]float64) {
	for l, t := range lobatto(modes) {
		p, _ := legendre(modes, t)
		w[l] = 2 / (float64(modes*(modes+1)) * p * p)
	}
	return w
}()
