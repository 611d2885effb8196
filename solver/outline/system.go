package outline

import (
	"math"
	"runtime"
	"sync"

	"gonum.org/v1/gonum/blas/blas64"
	"gonum.org/v1/gonum/floats"
	"gonum.org/v1/gonum/lapack/lapack64"
)

// System is a Rect with its parts, discretised and factorised: unknowns y are the densities on its outlines and the constant T_c. Safe for
// concurrent use after New, except for Move.
type System struct {
	rect    Rect
	k       []float64 // of the medium and of each layer
	edges   []edge
	rows    []row // per edge
	grading grading
	panels  []panel
	n       int // densities; the unknown n is T_c
	lu      blas64.General
	pivots  []int
	temps   []float64 // temperature at the ends of cells per density, n columns
	outer   outer
	discs   []disc
}

// New discretises the outlines (elements graded to corners and to the discs' gaps; fineness 1 is standard, 0.7 draft, 1.5 fine) and factorises.
// Layers may be of any conductivity and thickness, metal and foil included, in any order. Lengths and conductivities that aren't positive and
// finite panic. Where no side lets heat out there is no steady temperature and all answers are NaN.
func New(r Rect, discs []Disc, fineness float64) *System {
	r.check()
	s := &System{rect: r, k: r.conductivities(), edges: r.edges(), grading: newGrading(&r, fineness)}
	s.rect.Layers = append([]Layer(nil), r.Layers...)
	var ends int
	s.panels, s.n, ends = s.grading.panels(s.edges, discs)
	s.rows = s.rect.rows(s.edges)
	stop := r.Stop
	if s.rect.Stop = nil; stop == nil {
		stop = func() bool { return false }
	}
	if !s.factorise(ends, stop) {
		return nil
	}
	s.outer = s.newOuter()
	s.discs = make([]disc, len(discs))
	eachOf(len(discs), r.Workers, func(i int) {
		if s.discs[i].Disc = discs[i]; !stop() {
			s.link(&s.discs[i])
		}
	})
	if stop() {
		return nil
	}
	return s
}

// Len returns the number of unknowns.
func (s *System) Len() int { return s.n + 1 }

// each calls f for 0 … n−1 on all processors.
func each(n int, f func(i int)) { eachOf(n, 0, f) }

// eachOf is each on so many goroutines at most, 0 for all processors.
func eachOf(n, workers int, f func(i int)) {
	if workers < 1 {
		workers = runtime.GOMAXPROCS(0)
	}
	if workers = min(workers, n); workers == 1 {
		for i := range n {
			f(i)
		}
		return
	}
	var wg sync.WaitGroup
	for w := range workers {
		wg.Go(func() {
			for i := w; i < n; i += workers {
				f(i)
			}
		})
	}
	wg.Wait()
}

// factorise writes the wall's own equations and takes them apart; false if stop asked for an end.
func (s *System) factorise(ends int, stop func() bool) bool {
	n := s.n + 1
	s.lu = blas64.General{Rows: n, Cols: n, Stride: n, Data: make([]float64, n*n)}
	s.temps = make([]float64, ends*s.n)
	eachOf(len(s.panels), s.rect.Workers, func(i int) {
		if stop() {
			return
		}
		var b block
		to := &s.panels[i]
		for j := range s.panels {
			from := &s.panels[j]
			b.look(from, to, s.rows[to.edge].temp != 0)
			b.equations(s, from, to)
			b.temperatures(s, from, to)
		}
		for c := range to.p {
			s.lu.Data[(to.dof+c)*n+s.n] = s.rows[to.edge].temp
		}
	})
	for i := range s.panels { // no net source
		s.lu.Data[s.n*n+s.panels[i].dof] = 2 * s.panels[i].half
	}
	if stop() {
		return false
	}
	s.pivots = make([]int, n)
	if ok := lapack64.Getrf(s.lu, s.pivots); !ok || s.rect.sealed() {
		s.lu.Data[n*n-1] = math.NaN()
	}
	return !stop()
}

// solve overwrites the right-hand side y with the unknowns, row by row: twice as quick as the library's.
func (s *System) solve(y []float64) {
	for i, p := range s.pivots {
		y[i], y[p] = y[p], y[i]
	}
	n := len(y)
	for i := range y {
		y[i] -= floats.Dot(s.lu.Data[i*n:][:i], y[:i])
	}
	for i := n - 1; i >= 0; i-- {
		row := s.lu.Data[i*n:][:n]
		y[i] = (y[i] - floats.Dot(row[i+1:], y[i+1:])) / row[i]
	}
}
