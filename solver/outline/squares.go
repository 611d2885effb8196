package outline

import (
	"math"
	"sync"
)

// carrier is a panel, straight or an arc, whose density makes a field.
type carrier interface {
	at(t float64) complex128
	distance(z complex128) float64
	temperature(v *sight, y []float64, z complex128) float64
	straight() *panel // it, or the straight one in its place for estimates
}

func (p *panel) straight() *panel { return p }

// sights are what carriers look with, which would else be made anew for each point.
var sights = sync.Pool{New: func() any { return new(sight) }}

// squares is the field of carriers made ready for very many points: a quadtree with Taylor series of the complex potential in each
// square, and close to the outlines the few nearest carriers in closed form.
type squares struct {
	root     cell
	carriers []carrier
	y        []float64
	useless  func(*cell) bool // nothing is asked in the square
}

// cell is a square of the quadtree.
type cell struct {
	mid    complex128
	half   float64
	near   []int             // carriers that are too close for the series
	series [terms]complex128 // Re Σ c_n ((z−mid)/half)^n
	parts  *[4]cell
}

const (
	terms    = 17
	separate = 2.0 // distance of a carrier in the series over the half diagonal: the series is cut at separate^−terms
	few      = 3   // carriers that needn't be divided further
	depth    = 9
)

var reciprocal [terms]float64

func init() {
	for n := 1; n < terms; n++ {
		reciprocal[n] = 1 / float64(n)
	}
}

// newSquares prepares the square about mid; y are the densities and, last, T_c.
func newSquares(mid complex128, half float64, carriers []carrier, y []float64, useless func(*cell) bool) squares {
	s := squares{root: cell{mid: mid, half: half}, carriers: carriers, y: append([]float64(nil), y...), useless: useless}
	s.root.series[0] = complex(y[len(y)-1], 0)
	all := make([]int, len(carriers))
	for i := range all {
		all[i] = i
	}
	s.build(&s.root, all, depth)
	return s
}

// build sorts the carriers into those of the series and those near, and divides the cell where many are near.
func (s *squares) build(c *cell, carriers []int, levels int) {
	for _, i := range carriers {
		p := s.carriers[i]
		if p.distance(c.mid) < separate*math.Sqrt2*c.half {
			c.near = append(c.near, i)
			continue
		}
		c.add(p, s.y[p.straight().dof:])
	}
	if len(c.near) <= few || levels == 0 {
		return
	}
	c.parts = new([4]cell)
	for i := range c.parts {
		q := &c.parts[i]
		q.half = c.half / 2
		shift := complex(float64(i%2)-0.5, float64(i/2)-0.5) // in units of c.half
		q.mid = c.mid + scale(c.half, shift)
		if s.useless(q) {
			continue
		}
		q.series = shifted(c.series, shift)
		s.build(q, c.near, levels-1)
	}
}

// add adds the field of a carrier to the series, as in expand.
func (c *cell) add(from carrier, y []float64) {
	v := sights.Get().(*sight)
	defer sights.Put(v)
	p := from.straight()
	c.series[0] += complex(from.temperature(v, y, c.mid), 0)
	g := &rules[points(p.frame(c.mid), p.p, terms)]
	for i, t := range g.x {
		density := 0.0
		for k, u := range y[:p.p] {
			density += u * g.p[i][k]
		}
		x := scale(c.half, inverse(from.at(t)-c.mid))
		u := complex(-p.unit()*density, 0)
		for n := 1; n < terms; n++ {
			u *= x
			c.series[n] += scale(reciprocal[n], u)
		}
	}
}

// shifted is the series about shift, in half the unit.
func shifted(c [terms]complex128, shift complex128) [terms]complex128 {
	for i := range terms { // Horner, once per coefficient
		for n := terms - 2; n >= i; n-- {
			c[n] += shift * c[n+1]
		}
	}
	unit := 1.0
	for n := range c {
		c[n] = scale(unit, c[n])
		unit /= 2
	}
	return c
}

// value is the field at z.
func (s *squares) value(z complex128) float64 {
	c := &s.root
	for c.parts != nil {
		i := 0
		if real(z) > real(c.mid) {
			i++
		}
		if imag(z) > imag(c.mid) {
			i += 2
		}
		c = &c.parts[i]
	}
	w := scale(1/c.half, z-c.mid)
	sum := c.series[terms-1]
	for n := terms - 2; n >= 0; n-- {
		sum = sum*w + c.series[n]
	}
	t := real(sum)
	if len(c.near) > 0 {
		v := sights.Get().(*sight)
		for _, i := range c.near {
			p := s.carriers[i]
			t += p.temperature(v, s.y[p.straight().dof:], z)
		}
		sights.Put(v)
	}
	return t
}
