package outline

import (
	"math"

	"gonum.org/v1/gonum/blas/blas64"
	"gonum.org/v1/gonum/floats"
	"gonum.org/v1/gonum/lapack/lapack64"
)

// HullSystem is a Hull with its parts, discretised and factorised: unknowns y are the densities on its arcs and strings and the constant T_c, as of
// a System. It is not changed once made, and safe for concurrent use.
type HullSystem struct {
	hull    Hull
	grading hullGrading
	pieces  []piece
	panels  []bow
	most    float64 // W/m²K, the film of what is held; the same in all that take anything over
	n       int     // densities; the unknown n is T_c
	discs   []hullDisc
	direct  means // of the densities themselves
	means         // with what parts send straight back
	lu      blas64.General
	pivots  []int
}

// means are, for each cell and density (n columns), those of the inner side's ∂T/∂n and of T.
type means struct{ flux, temp []float64 }

func newMeans(n int) means { return means{make([]float64, n*n), make([]float64, n*n)} }

// NewHull discretises the hull and factorises; fineness 1 is standard, 0.7 draft, 1.5 fine. mirrors has one entry per disc. Every disc must lie inside
// the hull. A hull without arcs, arcs of no disc, negative films and a conductivity that is not positive panic.
func NewHull(h Hull, discs []Disc, mirrors []Mirror, fineness float64) *HullSystem {
	return newHull(h, discs, mirrors, fineness, &HullSystem{})
}

// Renew is NewHull for discs that moved, were refined, or lie in a hull that has changed, at the fineness of s. What is as it was in s is taken over: for
// dragging.
func (s *HullSystem) Renew(h Hull, discs []Disc, mirrors []Mirror) *HullSystem {
	return newHull(h, discs, mirrors, s.grading.fineness, s)
}

func newHull(h Hull, discs []Disc, mirrors []Mirror, fineness float64, old *HullSystem) *HullSystem {
	h.check(discs)
	h.Arcs = append([]Arc(nil), h.Arcs...)
	s := &HullSystem{hull: h, grading: newHullGrading(append([]Disc(nil), discs...), fineness), pieces: h.pieces(discs)}
	s.panels, s.n = s.grading.panels(s.pieces, old)
	if s.most = old.most; s.most == 0 || old.hull.MediumK != h.MediumK {
		s.most = 1e8 * h.MediumK / s.size()
	}
	s.discs = make([]hullDisc, len(discs))
	for i := range discs {
		s.discs[i] = hullDisc{Disc: discs[i], mirror: mirrors[i]}
	}
	k := s.known(old)
	if !s.eachPiece(len(discs), func(i int) { s.link(i, k) }) {
		return nil
	}
	if s.takeOver(k) {
		s.hull.Stop = nil
		return s
	}
	if !s.couple(k) {
		return nil
	}
	s.factorise()
	s.hull.Stop = nil
	return s
}

// eachPiece is each, until it is stopped; it tells whether all was done.
func (s *HullSystem) eachPiece(n int, f func(i int)) bool {
	stop := s.hull.Stop
	if stop == nil {
		stop = func() bool { return false }
	}
	eachOf(n, s.hull.Workers, func(i int) {
		if !stop() {
			f(i)
		}
	})
	return !stop()
}

// Len returns the number of unknowns.
func (s *HullSystem) Len() int { return s.n + 1 }

// film returns 2h/k of a piece; what is held has a film through which nothing can be measured.
func (s *HullSystem) film(p *piece) float64 {
	h := p.out.Film
	if h > s.most {
		h = s.most
	}
	return 2 * h / s.hull.MediumK
}

// size is the length of the hull.
func (s *HullSystem) size() float64 {
	_, l := s.Size()
	return l
}

// Size returns the length of all strings and of the whole hull, m.
func (s *HullSystem) Size() (strings, hull float64) {
	for i := range s.pieces {
		p := &s.pieces[i]
		hull += p.length
		if p.disc < 0 {
			strings += p.length
		}
	}
	return strings, hull
}

// scaleOf scales the condition of a piece so that a large film tends to T = outside.
func (s *HullSystem) scaleOf(p *piece) float64 { return 1 / (1 + s.film(p)*p.length) }

// factorise puts the conditions together and takes them apart.
func (s *HullSystem) factorise() {
	n := s.n + 1
	s.lu = blas64.General{Rows: n, Cols: n, Stride: n, Data: make([]float64, n*n)}
	open := false
	for i := range s.panels {
		b := &s.panels[i]
		p := &s.pieces[b.piece]
		c, film := s.scaleOf(p), s.film(p)
		open = open || film > 0
		for l := range b.p {
			to := s.lu.Data[(b.dof+l)*n:][:n]
			flux, temp := s.flux[(b.dof+l)*s.n:][:s.n], s.temp[(b.dof+l)*s.n:][:s.n]
			for k := range flux {
				to[k] = c * (2*flux[k] + film*temp[k])
			}
			to[s.n] = c * film
		}
		s.lu.Data[s.n*n+b.dof] = 2 * b.half // no net source
	}
	s.pivots = make([]int, n)
	if ok := lapack64.Getrf(s.lu, s.pivots); !ok || !open {
		s.lu.Data[n*n-1] = math.NaN()
	}
}

// solve overwrites the right-hand side y with the unknowns.
func (s *HullSystem) solve(y []float64) { substitute(s.lu, s.pivots, y) }

func substitute(lu blas64.General, pivots []int, y []float64) {
	for i, p := range pivots {
		y[i], y[p] = y[p], y[i]
	}
	n := len(y)
	for i := range y {
		y[i] -= floats.Dot(lu.Data[i*n:][:i], y[:i])
	}
	for i := n - 1; i >= 0; i-- {
		row := lu.Data[i*n:][:n]
		y[i] = (y[i] - floats.Dot(row[i+1:], y[i+1:])) / row[i]
	}
}
