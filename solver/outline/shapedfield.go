package outline

import (
	"math"
	"sync"
)

// ShapedField is the temperature of a solution anywhere within the outside, but for what discs bring. Safe for concurrent use.
type ShapedField struct {
	s     *Shaped
	y     []float64
	cloud []dipole // of the densities, some to a bend
	lo    complex128
	size  float64 // of a box
	boxes [boxesAcross * boxesAcross]box
}

const (
	boxesAcross = 48
	boxTerms    = 16
	boxApart    = 2.5 // bends farther from the middle of a box than this times its radius are summed up in a series
	cloudPoints = 8
)

// dipole is a point of a density with its share of it.
type dipole struct {
	z complex128
	q float64
}

// box is a square with the field that far bends make in it, as a power series, and the near ones.
type box struct {
	once sync.Once
	a    [boxTerms + 1]complex128
	near []int
}

// Field makes a solution ready for many points.
func (s *Shaped) Field(y []float64) *ShapedField {
	f := &ShapedField{s: s, y: y}
	rule := &rules[cloudPoints]
	for i := range s.bends {
		b := &s.bends[i]
		for j, t := range rule.x {
			q := 0.0
			for k := range modes {
				q += rule.p[j][k] * y[b.dof+k]
			}
			f.cloud = append(f.cloud, dipole{b.at(t), -q * b.half / (2 * math.Pi)})
		}
	}
	lo, hi := s.Bounds().Bounds()
	f.lo, f.size = lo, math.Max(real(hi-lo), imag(hi-lo))/boxesAcross
	return f
}

// Bounds is the outer boundary.
func (s *Shaped) Bounds() Loop {
	if s.around.Hull != nil {
		return s.around.Hull
	}
	return s.outside().Loop
}

// Bounds returns the lower left and the upper right corner of a rectangle round the loop.
func (l Loop) Bounds() (lo, hi complex128) {
	p := l.Polygon(1e-3 * l.Perimeter())
	x0, y0, x1, y1 := math.Inf(1), math.Inf(1), math.Inf(-1), math.Inf(-1)
	add := func(z complex128, r float64) {
		x0, x1 = math.Min(x0, real(z)-r), math.Max(x1, real(z)+r)
		y0, y1 = math.Min(y0, imag(z)-r), math.Max(y1, imag(z)+r)
	}
	for _, z := range p {
		add(z, 0)
	}
	for i := range l { // where an arc reaches farthest
		s := &l[i]
		if s.R == 0 {
			continue
		}
		for _, d := range []complex128{1, 1i, -1, -1i} {
			if z := s.Centre + scale(s.R, d); onRight(s.From, s.To, z) {
				add(z, 0)
			}
		}
	}
	return complex(x0, y0), complex(x1, y1)
}

// At returns the temperature at z, NaN outside.
func (f *ShapedField) At(z complex128) float64 {
	if !f.s.Bounds().Inside(z) {
		return math.NaN()
	}
	i := min(max(int(real(z-f.lo)/f.size), 0), boxesAcross-1)
	j := min(max(int(imag(z-f.lo)/f.size), 0), boxesAcross-1)
	b := &f.boxes[j*boxesAcross+i]
	mid := f.lo + complex((float64(i)+0.5)*f.size, (float64(j)+0.5)*f.size)
	b.once.Do(func() { f.fill(b, mid) })
	x := scale(1/f.size, z-mid)
	var sum complex128
	for n := boxTerms; n >= 0; n-- {
		sum = sum*x + b.a[n]
	}
	t := f.y[f.s.n] + real(sum)
	var c curved
	var g [modes]complex128
	for _, k := range b.near {
		e := &f.s.bends[k]
		e.complexPotential(&c, e.look(z), &g)
		for m := range modes {
			t -= f.y[e.dof+m] * real(g[m]) / (2 * math.Pi)
		}
	}
	return t
}

// fill works a box out.
func (f *ShapedField) fill(b *box, mid complex128) {
	far := boxApart * f.size * math.Sqrt2 / 2
	for k := range f.s.bends {
		e := &f.s.bends[k]
		if e.distance(mid) < math.Max(far, far/boxApart+2*e.half) {
			b.near = append(b.near, k)
			continue
		}
		for _, d := range f.cloud[k*cloudPoints:][:cloudPoints] {
			// ln(z−y) = ln(mid−y) − Σ (−u)ⁿ/n, u = (z−mid)/(mid−y)
			u := scale(f.size, inverse(mid-d.z))
			b.a[0] += scale(d.q, clog(mid-d.z))
			p := complex(-d.q, 0)
			for n := 1; n <= boxTerms; n++ {
				p *= -u
				b.a[n] += scale(1/float64(n), p)
			}
		}
	}
}
