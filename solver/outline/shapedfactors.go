package outline

import (
	"math"

	"gonum.org/v1/gonum/blas"
	"gonum.org/v1/gonum/blas/blas64"
	"gonum.org/v1/gonum/floats"
	"gonum.org/v1/gonum/lapack/lapack64"
)

// factors are a Shaped's equations taken apart, the inside by itself so that the outside can change quickly: with the inside's matrix A, what the
// outside and T_c do to it, B, and the outside's rows [C D], the rest is S = D − C A⁻¹ B.
type factors struct {
	a      blas64.General // factors of A
	pivots []int
	x      blas64.General // A⁻¹ B
	low    blas64.General // [C D]: rows of the outside, then the closure
	rest   blas64.General // factors of S
	swaps  []int
}

func general(rows, cols int) blas64.General {
	return blas64.General{Rows: rows, Cols: cols, Stride: max(cols, 1), Data: make([]float64, rows*max(cols, 1))}
}

// factorise takes the inside apart, then the outside; false if stop asked for an end.
func (s *Shaped) factorise(stop func() bool) bool {
	n1, n2 := s.inner, s.n-s.inner+1
	s.a, s.x, s.pivots = general(n1, n1), general(n1, n2), make([]int, n1)
	for i := range n1 {
		copy(s.a.Data[i*s.a.Stride:][:n1], s.eq[i*s.n:])
		copy(s.x.Data[i*n2:][:n2-1], s.eq[i*s.n+n1:])
	}
	for i := range s.bends {
		b := &s.bends[i]
		if r := s.condition(b); b.dof < n1 {
			for l := range modes {
				s.x.Data[(b.dof+l)*n2+n2-1] = r.temp
			}
		}
	}
	for i := range s.contours {
		if s.contours[i].metal() {
			s.carry(i)
		}
	}
	if n1 > 0 {
		if !lapack64.Getrf(s.a, s.pivots) {
			s.a.Data[0] = math.NaN()
		}
		if stop() {
			return false
		}
		lapack64.Getrs(blas.NoTrans, s.a, s.x, s.pivots)
	}
	if stop() {
		return false
	}
	s.close()
	return true
}

// carry adds to a metal's rows that all its density makes its heat: nothing else tells how much leaves it.
func (s *Shaped) carry(contour int) {
	p := s.lengths[contour]
	for i := range s.bends {
		to := &s.bends[i]
		if to.contour != contour {
			continue
		}
		for j := range s.bends {
			if from := &s.bends[j]; from.contour == contour {
				for l := range modes {
					s.a.Data[(to.dof+l)*s.a.Stride+from.dof] += 2 * from.half / p
				}
			}
		}
	}
}

// close writes the rows of the outside and takes them apart.
func (s *Shaped) close() {
	n1, n2 := s.inner, s.n-s.inner+1
	s.low = general(n2, s.n+1)
	for i := range s.bends {
		b := &s.bends[i]
		s.low.Data[(n2-1)*s.low.Stride+b.dof] = 2 * b.half // no net source
		if b.dof < n1 {
			continue
		}
		r := s.condition(b)
		for l := range modes {
			k := b.dof + l - n1
			row := s.low.Data[k*s.low.Stride:][:s.low.Stride]
			flux, temp := s.eq[(b.dof+l)*s.n:][:s.n], s.outT[k*s.n:][:s.n]
			for j := range s.n {
				row[j] = r.flux*flux[j] + r.temp*temp[j]
			}
			for j, v := range cellsOf[modes].mean[l] {
				row[b.dof+j] += r.density * v
			}
			row[s.n] = r.temp
		}
	}
	s.rest, s.swaps = general(n2, n2), make([]int, n2)
	for i := range n2 {
		copy(s.rest.Data[i*n2:][:n2], s.low.Data[i*s.low.Stride+n1:])
	}
	if n1 > 0 {
		c := blas64.General{Rows: n2, Cols: n1, Stride: s.low.Stride, Data: s.low.Data}
		blas64.Gemm(blas.NoTrans, blas.NoTrans, -1, c, s.x, 1, s.rest)
	}
	if !lapack64.Getrf(s.rest, s.swaps) || s.sealed() {
		s.rest.Data[n2*n2-1] = math.NaN()
	}
}

// sealed tells that nothing lets heat out.
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

// Outside returns the section with other sides of its contours, as many as before, covered where they were (nil: as they are). Solutions of the one
// before stay good with it.
func (s *Shaped) Outside(sides [][]Side) *Shaped {
	t := *s
	t.contours = append([]Contour(nil), s.contours...)
	for i, d := range sides {
		if d != nil {
			t.contours[i].Sides = d
		}
	}
	t.close()
	return &t
}

// solve overwrites the right-hand side y with the unknowns.
func (s *Shaped) solve(y []float64) {
	n1, n2 := s.inner, s.n-s.inner+1
	if n1 > 0 {
		substitute(s.a, s.pivots, y[:n1])
		for i := range n2 {
			y[n1+i] -= floats.Dot(y[:n1], s.low.Data[i*s.low.Stride:][:n1])
		}
	}
	substitute(s.rest, s.swaps, y[n1:])
	for i := range n1 {
		y[i] -= floats.Dot(y[n1:], s.x.Data[i*n2:][:n2])
	}
}
