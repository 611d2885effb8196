package heat

import (
	"math"
	"sync"

	"packrise/solver/harmonic"
	"packrise/solver/outline"
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
	layers []layers       // per piece
	wall   layers         // round
	rect   *outline.Field // rectangle
}

// layers are the waves in the rings of a piece or a round wall: per ring f (r/R1)^n and g (R0/r)^n, and its mean temperature at R1.
type layers struct {
	rings  []harmonic.Ring
	f, g   [][]complex128
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
		for i := range s.pieces {
			p := &s.pieces[i]
			drawn[i] = p.drawn
			c.layers[i] = p.layers()
		}
		if s.rect != nil {
			mid, half := s.rect.frame()
			c.tree, c.rect = harmonic.NewTree(&s.cloud, drawn, mid, half), s.rect.sys.Field(s.rect.y)
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
			l.inner[n] = l.f[0][n]*complex(w[0].W, 0) + l.g[0][n]
		} else {
			port := p.stack.Port(n + 1)
			l.inner[n] = b*complex(1+port.T, 0) + a*complex(port.Tau, 0)
		}
	}
	return l
}

func newLayers(rings []harmonic.Ring, q float64, orders int) layers {
	l := layers{rings: rings, q: q, mean: make([]float64, len(rings)), f: make([][]complex128, len(rings)), g: make([][]complex128, len(rings))}
	for i := range rings {
		l.f[i], l.g[i] = make([]complex128, orders), make([]complex128, orders)
	}
	return l
}

func (l *layers) fill(n int, w []harmonic.Waves, b, a complex128) {
	for i := range w {
		l.f[i][n], l.g[i][n] = w[i].Split(b, a)
	}
}

// wallLayers works out the waves in the rings of a round wall. Near a part that touches, many of them count.
func (s *state) wallLayers() layers {
	a := s.cloud.Outgoing(max(len(s.cloud.Circle.Sigma), 64))
	l := newLayers(s.wall.Rings, s.total, len(a))
	mean := s.level
	for i, g := range l.rings {
		mean -= s.total * ringR(g)
		l.mean[i] = mean
	}
	var w []harmonic.Waves
	for n, v := range a {
		w = s.wall.Waves(n+1, w[:0])
		l.fill(n, w, 0, complex(real(v), -imag(v)))
	}
	return l
}

// at returns the temperature at z of the region, NaN beyond its outer surface.
func (s *state) at(z complex128) float64 {
	c := s.chart()
	if s.rect == nil {
		if r := math.Hypot(real(z), imag(z)); r > s.wall.R {
			if r > s.wall.Outside()*(1+1e-12) {
				return math.NaN()
			}
			return c.wall.at(z, r)
		}
	}
	t, i := c.tree.At(z)
	if i >= 0 {
		return s.inPiece(i, z-s.pieces[i].at)
	}
	if s.rect != nil {
		t += c.rect.At(z)
	}
	return t
}

// inPiece is the temperature at z from the centre of piece i.
func (s *state) inPiece(i int, z complex128) float64 {
	p, l := &s.pieces[i], &s.charts.layers[i]
	r := math.Hypot(real(z), imag(z))
	switch {
	case r > l.r0:
		return l.at(z, r)
	case p.inside != nil:
		return p.inside.at(z)
	case p.source:
		return p.mean + p.q*p.series
	}
	return l.innerT + wave(l.inner, z*complex(1/l.r0, 0))
}

// at is the temperature in the rings, or on the outermost rim where there is none.
func (l *layers) at(z complex128, r float64) float64 {
	last := len(l.rings) - 1
	if last < 0 {
		return l.innerT + wave(l.inner, z*complex(1/r, 0))
	}
	i := 0
	for i < last && r > l.rings[i].R1 {
		i++
	}
	g := &l.rings[i]
	if r > g.R1 {
		z *= complex(g.R1/r, 0)
		r = g.R1
	}
	t := l.mean[i] + l.q*math.Log(g.R1/r)/(2*math.Pi*g.K)
	t += wave(l.f[i], z*complex(1/g.R1, 0))
	// g (R0/r)^n e^{inθ} is a power of R0/conj(z).
	return t + wave(l.g[i], z*complex(g.R0/(r*r), 0))
}

// wave returns Re Σ x[n-1] z^n.
func wave(x []complex128, z complex128) float64 {
	var s complex128
	for n := len(x) - 1; n >= 0; n-- {
		s = (s + x[n]) * z
	}
	return real(s)
}
