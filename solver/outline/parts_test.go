package outline

import (
	"math"
	"math/cmplx"

	"gonum.org/v1/gonum/mat"
)

// rod is a round part: a metal core in layers (layered cylinders, harmonic by harmonic).
type rod struct {
	id     string
	c      complex128
	core   float64
	k, t   []float64 // layers, outwards
	kCore  float64   // 0: one temperature throughout
	heat   float64
	order  int
	radius float64
}

// reflect returns t_n in d_n = t_n conj(b_n).
func (p *rod) reflect(n int, km float64) float64 {
	g := 1.0
	r := p.core
	y := math.Inf(1)
	if p.kCore > 0 {
		y = p.kCore
	}
	for i, k := range p.k {
		if !math.IsInf(y, 1) {
			g = (y - k) / (y + k)
		}
		u := math.Pow(r/(r+p.t[i]), 2*float64(n))
		y = k * (1 + g*u) / (1 - g*u)
		r += p.t[i]
	}
	if math.IsInf(y, 1) {
		return -1
	}
	return (1 - y/km) / (1 + y/km)
}

func (p *rod) resistance() float64 {
	r, sum := p.core, 0.0
	for i, k := range p.k {
		sum += math.Log((r+p.t[i])/r) / (2 * math.Pi * k)
		r += p.t[i]
	}
	return sum
}

// whole is a section solved densely: wall and parts.
type whole struct {
	wall  *System
	rods  []rod
	k     float64 // of the medium
	first []int   // unknown of each rod's first harmonic
	src   Sources
	b     [][]complex128
	y     []float64
	core  []float64
}

// solveWhole finds d from d_n = t_n conj(b_n), b_n from the other parts (translations of multipoles: Greengard and Rokhlin,
// Journal of Computational Physics 73, 1987, in two dimensions) and from the wall.
func solveWhole(r Rect, rods []rod, fineness float64, ground bool) *whole {
	w := &whole{rods: rods, k: r.MediumK, first: []int{0}}
	var discs []Disc
	for i, p := range rods {
		discs = append(discs, Disc{C: p.c, A: p.radius, M: p.order})
		w.first = append(w.first, w.first[i]+2*p.order)
		w.src.Q = append(w.src.Q, 0)
		w.src.D = append(w.src.D, make([]complex128, p.order))
		w.b = append(w.b, make([]complex128, p.order+1))
	}
	w.wall = New(r, discs, fineness)
	a := w.matrix()
	for i, p := range rods {
		w.src.Q[i] = p.heat
	}
	if n := w.first[len(rods)]; n > 0 {
		var x mat.VecDense
		if err := x.SolveVec(a, mat.NewVecDense(n, w.residual(ground))); err != nil {
			panic(err)
		}
		for i := range rods {
			for m := range w.src.D[i] {
				w.src.D[i][m] = -complex(x.AtVec(w.first[i]+2*m), x.AtVec(w.first[i]+2*m+1))
			}
		}
	}
	w.residual(ground)
	for i, p := range rods {
		own := -math.Log(p.radius)/(2*math.Pi*w.k) + p.resistance()
		w.core = append(w.core, real(w.b[i][0])+p.heat*own)
	}
	return w
}

// matrix is the residual of each unit source.
func (w *whole) matrix() *mat.Dense {
	n := w.first[len(w.rods)]
	if n == 0 {
		return nil
	}
	a := mat.NewDense(n, n, nil)
	for i := range w.rods {
		for m := range w.src.D[i] {
			for part, unit := range []complex128{1, 1i} {
				w.src.D[i][m] = unit
				a.SetCol(w.first[i]+2*m+part, w.residual(false))
			}
			w.src.D[i][m] = 0
		}
	}
	return a
}

// residual is d − t conj(b); it leaves b and y for the present sources.
func (w *whole) residual(ground bool) []float64 {
	for i := range w.b {
		clear(w.b[i])
	}
	w.direct()
	w.y = w.wall.Respond(w.src, ground)
	w.wall.Incoming(w.y, w.b)
	out := make([]float64, w.first[len(w.rods)])
	for i := range w.rods {
		for m, d := range w.src.D[i] {
			z := d - complex(w.rods[i].reflect(m+1, w.k), 0)*conj(w.b[i][m+1])
			out[w.first[i]+2*m], out[w.first[i]+2*m+1] = real(z), imag(z)
		}
	}
	return out
}

// direct adds what the parts send each other.
func (w *whole) direct() {
	src, b, km := w.src, w.b, w.k
	for i := range w.rods {
		for j := range w.rods {
			if i == j {
				continue
			}
			pi, pj := &w.rods[i], &w.rods[j]
			dz := pi.c - pj.c
			x, y := complex(pi.radius, 0)/dz, complex(pj.radius, 0)/dz
			q := complex(-src.Q[j]/(2*math.Pi*km), 0)
			b[i][0] += q * complex(math.Log(cmplx.Abs(dz)), 0)
			xn := complex(1, 0)
			for n := 0; n <= pi.order; n++ {
				if n > 0 {
					xn *= -x
					b[i][n] -= q * xn / complex(float64(n), 0)
				}
				ym, c := complex(1, 0), 1.0
				for m := 1; m <= pj.order; m++ {
					ym *= y
					if m > 1 {
						c *= float64(m+n-1) / float64(m-1)
					}
					b[i][n] += complex(c, 0) * xn * ym * src.D[j][m-1]
				}
			}
		}
	}
}

// orders gives each rod the harmonics that its gaps need; c = 1 is standard.
func orders(r Rect, rods []rod, c float64) {
	wallMetal := len(r.Layers) > 0 && r.Layers[0].K > 5
	for i := range rods {
		p := &rods[i]
		ratio := r.MediumK / p.k[len(p.k)-1]
		m := 6.0
		if ratio > 0.5 {
			m = 3
		}
		need := func(reff, gap float64) {
			x := math.Max(math.Sqrt(2*reff*math.Max(gap, 0)), reff*math.Min(ratio, 1.5))
			m = math.Max(m, c*p.radius/x)
		}
		for j := range rods {
			if o := &rods[j]; i != j {
				need(p.radius*o.radius/(p.radius+o.radius), cmplx.Abs(p.c-o.c)-p.radius-o.radius)
			}
		}
		x, y := real(p.c), imag(p.c)
		gap := math.Min(math.Min(x, r.W-x), math.Min(y, r.H-y)) - p.radius
		reff := p.radius
		if wallMetal {
			reff /= 2
		}
		need(reff, gap)
		p.order = int(math.Min(math.Ceil(m), 40))
	}
}
