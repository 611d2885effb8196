package outline

import (
	"math"

	"gonum.org/v1/gonum/blas"
	"gonum.org/v1/gonum/blas/blas64"
	"gonum.org/v1/gonum/lapack/lapack64"
)

// System is a Rect with its parts, discretised and factorised: unknowns y are the densities on its outlines and the constant T_c. Safe for
// concurrent use after New, except for Move.
type System struct {
	rect    Rect
	edges   []edge
	panels  []panel
	rows    []row // per edge
	n       int   // densities; the unknown n is T_c
	points  int   // ends of cells
	lu      blas64.General
	pivots  []int
	temps   []float64 // points × n: temperature at the ends of cells per density
	discs   []disc
	surface surface
}

// New discretises the outlines (elements graded to corners and to the discs' gaps; fineness 1 is standard, 0.7 draft, 1.5 fine) and factorises.
func New(r Rect, discs []Disc, fineness float64) *System {
	s := &System{rect: r, edges: r.edges()}
	s.rect.Layers = append([]Layer(nil), r.Layers...)
	g := newGrading(&s.rect, discs, fineness)
	s.panels, s.n, s.points = g.panels(s.edges)
	s.rows = s.rect.rows(s.edges)
	s.factorise()
	s.discs = make([]disc, len(discs))
	for i, d := range discs {
		s.discs[i].Disc = d
		s.link(&s.discs[i])
	}
	s.measure()
	return s
}

// Len returns the number of unknowns.
func (s *System) Len() int { return s.n + 1 }

// factorise writes the wall's own equations and takes them apart.
func (s *System) factorise() {
	n := s.n + 1
	s.lu = blas64.General{Rows: n, Cols: n, Stride: n, Data: make([]float64, n*n)}
	s.temps = make([]float64, s.points*s.n)
	var b block
	for j := range s.panels {
		from := &s.panels[j]
		for i := range s.panels {
			b.write(s, from, &s.panels[i])
		}
		s.lu.Data[s.n*n+from.dof] = 2 * from.half // no net source
	}
	for i := range s.panels {
		t := &s.panels[i]
		for l := range t.p {
			s.lu.Data[(t.dof+l)*n+s.n] = s.rows[t.edge].temp
		}
	}
	s.pivots = make([]int, n)
	lapack64.Getrf(s.lu, s.pivots)
}

// solve overwrites the right-hand side y with the unknowns.
func (s *System) solve(y []float64) {
	for i, p := range s.pivots {
		y[i], y[p] = y[p], y[i]
	}
	v := blas64.Vector{N: len(y), Inc: 1, Data: y}
	t := blas64.Triangular{Uplo: blas.Lower, Diag: blas.Unit, N: len(y), Stride: s.lu.Stride, Data: s.lu.Data}
	blas64.Trsv(blas.NoTrans, t, v)
	t.Uplo, t.Diag = blas.Upper, blas.NonUnit
	blas64.Trsv(blas.NoTrans, t, v)
}

// block is the work space for the equations of one panel in the modes of another.
type block struct {
	w [maxModes + 1]complex128
	f [maxModes + 1]potential
}

// look evaluates the potentials of a panel at the ends of the cells of another.
func (b *block) look(from, to *panel, second bool) {
	at := cellsOf[to.p].at
	inv := 1 / from.half
	if from.edge == to.edge {
		mid := (to.lo+to.hi)/2 - (from.lo+from.hi)/2
		for l, x := range at {
			b.w[l] = complex((mid+to.half*x)*inv, 0)
			b.f[l].at(b.w[l], from.p, mid < 0, second)
		}
		return
	}
	turn := scale(inv, conj(from.dir))
	mid, step := (to.mid-from.mid)*turn, to.dir*turn
	for l, x := range at {
		b.w[l] = mid + scale(to.half*x, step)
		b.f[l].at(b.w[l], from.p, real(mid) < 0, second)
	}
}

func (b *block) write(s *System, from, to *panel) {
	r := &s.rows[to.edge]
	c := &cellsOf[to.p]
	n := s.n + 1
	b.look(from, to, r.temp != 0)
	unit := -from.half / (2 * math.Pi)
	log := 2 * math.Log(from.half) // ln(half) over the panel
	for l := range to.p {
		a := s.lu.Data[(to.dof+l)*n+from.dof:][:from.p]
		lo, hi := &b.f[l], &b.f[l+1]
		if from == to {
			for k := range a {
				a[k] = r.density * c.mean[l][k]
			}
		}
		if r.flux != 0 && from.edge != to.edge { // nothing crosses the line of a straight edge
			u := unit * r.flux / (to.half * (c.at[l+1] - c.at[l]))
			for k := range a {
				a[k] += u * (imag(hi.first[k]) - imag(lo.first[k]))
			}
		}
		if r.temp != 0 {
			step := inverse(b.w[l+1] - b.w[l])
			for k := range a {
				a[k] += unit * r.temp * real((hi.second[k]-lo.second[k])*step)
			}
			a[0] += unit * r.temp * log
		}
	}
	for l := range c.at {
		t := s.temps[(to.pt+l)*s.n+from.dof:][:from.p]
		for k := range t {
			t[k] = unit * real(b.f[l].first[k])
		}
		t[0] += unit * log
	}
}
