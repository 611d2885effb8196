package heat

import (
	"math"
	"sync"

	"packrise/solver/harmonic"
)

// field is the temperature of a solved section. Its look-up tables are made by the first point that is asked for.
type field struct {
	top   *state
	shift complex128 // from the holder's coordinates to the region's
}

func (f *field) At(x, y float64) float64 { return f.top.at(complex(x, y) + f.shift) }

func (f *field) Row(dst []float64, y, x0, dx float64) {
	for i := range dst {
		dst[i] = f.At(x0+float64(i)*dx, y)
	}
}

// charts are the tables of a state for evaluating its field.
type charts struct {
	once   sync.Once
	tree   *harmonic.Tree
	layers []layers // per piece
	wall   layers   // round
	border pointField
}

// layers are the waves in the rings of a piece or a round wall: per ring f (r/R1)^n and g (R0/r)^n, and its mean temperature at R1.
type layers struct {
	rings  []harmonic.Ring
	f, g   []series
	mean   []float64
	q      float64
	inner  []complex128 // a body or bore: regular wave within the innermost radius, referred to it
	innerT float64      // mean temperature there
	r0     float64
}

func (s *state) chart() *charts {
	s.charts.once.Do(func() {
		c := &s.charts
		drawn := make([]float64, len(s.pieces))
		c.layers = make([]layers, len(s.pieces))
		cloud, pieces := s.near()
		for i := range pieces {
			p := &pieces[i]
			drawn[i] = p.drawn
			c.layers[i] = p.layers()
		}
		if s.border != nil {
			c.tree, c.border = harmonic.NewTree(cloud, drawn, s.border.mid, s.border.half), s.border.field()
			return
		}
		c.wall = s.wallLayers()
		c.tree = harmonic.NewTree(&s.cloud, drawn, 0, s.r)
	})
	return &s.charts
}

// layers works out the waves in a piece's rings.
func (p *pieceState) layers() layers {
	l := newLayers(p.stack.Rings, p.q, len(p.b))
	mean := p.mean
	for i := len(l.rings) - 1; i >= 0; i-- {
		l.mean[i] = mean
		mean += p.q * ringR(l.rings[i])
	}
	l.r0, l.innerT = p.stack.R, mean
	l.inner = make([]complex128, len(p.b))
	var w []harmonic.Waves
	for n, b := range p.b {
		a := p.from(n)
		w = p.stack.Waves(n+1, w[:0])
		l.fill(n, w, b, a)
		if len(w) > 0 {
			l.inner[n] = l.f[0].x[n]*complex(w[0].W, 0) + l.g[0].x[n]
		} else {
			port := p.stack.Port(n + 1)
			l.inner[n] = b*complex(1+port.T, 0) + a*complex(port.Tau, 0)
		}
	}
	l.trim()
	return l
}

func newLayers(rings []harmonic.Ring, q float64, orders int) layers {
	l := layers{rings: rings, q: q, mean: make([]float64, len(rings)), f: make([]series, len(rings)), g: make([]series, len(rings))}
	for i := range rings {
		l.f[i].x, l.g[i].x = make([]complex128, orders), make([]complex128, orders)
	}
	return l
}

func (l *layers) fill(n int, w []harmonic.Waves, b, a complex128) {
	for i := range w {
		l.f[i].x[n], l.g[i].x[n] = w[i].Split(b, a)
	}
}

// trim finds out how far the series of each ring need summing.
func (l *layers) trim() {
	for i := range l.rings {
		l.f[i].trim()
		l.g[i].trim()
	}
}

// maxWallSeries bounds the harmonics of a round wall in pictures.
const maxWallSeries = 800

// wallLayers works out the waves in the rings of a round wall. Near a part that touches, many of them count.
func (s *state) wallLayers() layers {
	top := 64.0
	for i := range s.pieces {
		p := &s.pieces[i]
		if s.r-math.Hypot(real(p.at), imag(p.at)) < 2*p.a {
			top = math.Max(top, 2*float64(len(s.cloud.D[i]))*s.r/p.a)
		}
	}
	a := s.outgoing(max(len(s.cloud.Circle.Sigma), s.rest.harmonics(), int(math.Min(top, maxWallSeries))))
	l := newLayers(s.wall.Rings, s.total, len(a))
	mean := s.level
	for i, g := range l.rings {
		mean -= s.total * ringR(g)
		l.mean[i] = mean
	}
	var w []harmonic.Waves
	for n, v := range a {
		w = s.wall.Waves(n+1, w[:0])
		l.fill(n, w, s.rest.at(n), complex(real(v), -imag(v)))
	}
	l.trim()
	return l
}

// at returns the temperature at z of the region, NaN beyond its outer surface.
func (s *state) at(z complex128) float64 {
	c := s.chart()
	if s.border == nil {
		if r2 := square(z); r2 > s.wall.R*s.wall.R {
			if o := s.wall.Outside() * (1 + 1e-12); r2 > o*o {
				return math.NaN()
			}
			return c.wall.at(z, r2)
		}
	}
	if s.border != nil && s.border.sheet != nil {
		z = calm(s.border.sheet, z)
	}
	t, i := c.tree.At(z)
	if i >= 0 {
		return s.inPiece(i, z-s.pieces[i].at)
	}
	if s.border != nil {
		t += c.border.At(z)
	}
	return t
}

func square(z complex128) float64 { return real(z)*real(z) + imag(z)*imag(z) }

// inPiece is the temperature at z from the centre of piece i.
func (s *state) inPiece(i int, z complex128) float64 {
	p, l := &s.pieces[i], &s.charts.layers[i]
	r2 := square(z)
	switch {
	case r2 > l.r0*l.r0:
		return l.at(z, r2)
	case p.inside != nil:
		return p.inside.at(z)
	case p.source:
		return p.mean + p.q*p.series
	}
	return l.innerT + harmonic.Sum(l.inner, z*complex(1/l.r0, 0))
}

// at is the temperature in the rings at z, r2 = |z|², or on the outermost rim where there is none.
func (l *layers) at(z complex128, r2 float64) float64 {
	last := len(l.rings) - 1
	if last < 0 {
		return l.innerT + harmonic.Sum(l.inner, z*complex(1/math.Sqrt(r2), 0))
	}
	i := 0
	for i < last && r2 > l.rings[i].R1*l.rings[i].R1 {
		i++
	}
	g := &l.rings[i]
	if out := g.R1 * g.R1; r2 > out {
		z *= complex(g.R1/math.Sqrt(r2), 0)
		r2 = out
	}
	t := l.mean[i] + l.q*math.Log(g.R1*g.R1/r2)/(4*math.Pi*g.K)
	t += l.f[i].at(z*complex(1/g.R1, 0), r2/(g.R1*g.R1))
	// g (R0/r)^n e^{inθ} is a power of R0/conj(z).
	return t + l.g[i].at(z*complex(g.R0/r2, 0), g.R0*g.R0/r2)
}
