package outline

import "math"

// Field is the wall's own field (T_c included, the parts' multipoles not) made ready for very many points: Taylor series of the complex
// potential in squares, and close to the outlines the few nearest panels in closed form. Safe for concurrent use.
type Field struct {
	s    *System
	y    []float64
	root cell
}

// cell is a square of a quadtree.
type cell struct {
	mid    complex128
	half   float64
	near   []int             // panels that are too close for the series
	series [terms]complex128 // Re Σ c_n ((z−mid)/half)^n
	parts  *[4]cell
}

const (
	terms    = 17
	separate = 2.0 // distance of a panel in the series over the half diagonal: the series is cut at separate^−terms
	few      = 3   // panels that needn't be divided further
	depth    = 9
)

var reciprocal [terms]float64

func init() {
	for n := 1; n < terms; n++ {
		reciprocal[n] = 1 / float64(n)
	}
}

// Field prepares the wall's field for many points: a few milliseconds.
func (s *System) Field(y []float64) *Field {
	f := &Field{s: s, y: append([]float64(nil), y...)}
	e := s.outerEdges()
	f.root.mid = (e[0].start + e[2].start) / 2
	f.root.half = math.Max(e[0].length, e[1].length) / 2
	f.root.series[0] = complex(y[s.n], 0)
	all := make([]int, len(s.panels))
	for i := range all {
		all[i] = i
	}
	f.build(&f.root, all, depth)
	return f
}

// build sorts the panels into those of the series and those near, and divides the cell where many are near.
func (f *Field) build(c *cell, panels []int, levels int) {
	for _, i := range panels {
		p := &f.s.panels[i]
		if p.distance(c.mid) < separate*math.Sqrt2*c.half {
			c.near = append(c.near, i)
			continue
		}
		p.series(c, f.y[p.dof:][:p.p])
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
		if !f.touches(q) {
			continue
		}
		q.series = shifted(c.series, shift)
		f.build(q, c.near, levels-1)
	}
}

// series adds the field of a panel to that of c, as in expand.
func (p *panel) series(c *cell, y []float64) {
	var f potential
	c.series[0] += complex(p.temperature(&f, y, c.mid), 0)
	g := &rules[points(p.frame(c.mid), p.p, terms)]
	for i, t := range g.x {
		density := 0.0
		for k, v := range y {
			density += v * g.p[i][k]
		}
		x := scale(c.half, inverse(p.at(t)-c.mid))
		v := complex(-p.unit()*density, 0)
		for n := 1; n < terms; n++ {
			v *= x
			c.series[n] += scale(reciprocal[n], v)
		}
	}
}

// touches tells whether any of q is inside the outer face.
func (f *Field) touches(q *cell) bool {
	e := f.s.outerEdges()
	lo, hi := q.mid-complex(q.half, q.half)-e[2].start, q.mid+complex(q.half, q.half)-e[0].start
	return real(lo) <= 0 && imag(lo) <= 0 && real(hi) >= 0 && imag(hi) >= 0
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

// At returns the field at z, in the medium and in the wall's layers; NaN outside the outer face.
func (f *Field) At(z complex128) float64 {
	if !f.s.within(z) {
		return math.NaN()
	}
	c := &f.root
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
		var p potential
		for _, i := range c.near {
			t += f.s.panels[i].temperature(&p, f.y[f.s.panels[i].dof:], z)
		}
	}
	return t
}
