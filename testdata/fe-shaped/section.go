package main

import (
	"math"
	"math/cmplx"
)

type stroke struct {
	a, b, c complex128
	arc     bool
}

// body is a closed outline; rad tells that it looks into hollow number rad-1 (0: none), wall that it does so inwards.
type body struct {
	s    []stroke
	rad  int
	wall bool
	eps  float64
	h    float64 // patch or edge length
}

type region struct {
	name  string
	k, q  float64 // W/mK, W/m
	out   int     // body
	holes []int
}

type section struct {
	bodies   []body
	regions  []region
	outside  int
	film, ta float64
}

func rounded(cs []complex128, r float64, at complex128, turn float64) []stroke {
	var out []stroke
	n := len(cs)
	nrm := func(i int) complex128 { d := cs[(i+1)%n] - cs[i%n]; return d / complex(cmplx.Abs(d), 0) * -1i }
	u := cmplx.Rect(1, turn)
	for i, c := range cs {
		in, to := nrm(i+n-1), nrm(i)
		if r > 0 {
			out = append(out, stroke{a: at + u*(c+complex(r, 0)*in), b: at + u*(c+complex(r, 0)*to), c: at + u*c, arc: true})
		}
		out = append(out, stroke{a: at + u*(c+complex(r, 0)*to), b: at + u*(cs[(i+1)%n]+complex(r, 0)*to)})
	}
	return out
}

func rect(w, h, r float64, at complex128, turn float64) []stroke { // outer w,h
	x, y := w/2-r, h/2-r
	return rounded([]complex128{complex(x, -y), complex(x, y), complex(-x, y), complex(-x, -y)}, r, at, turn)
}

func flat(w, h float64, at complex128, turn float64) []stroke { // stadium, arcs of quarter turns
	x, r := w/2-h/2, h/2
	u := cmplx.Rect(1, turn)
	p := func(x, y float64) complex128 { return at + u*complex(x, y) }
	return []stroke{
		{a: p(-x, -r), b: p(x, -r)},
		{a: p(x, -r), b: p(x+r, 0), c: p(x, 0), arc: true},
		{a: p(x+r, 0), b: p(x, r), c: p(x, 0), arc: true},
		{a: p(x, r), b: p(-x, r)},
		{a: p(-x, r), b: p(-x-r, 0), c: p(-x, 0), arc: true},
		{a: p(-x-r, 0), b: p(-x, -r), c: p(-x, 0), arc: true},
	}
}

func circle(r float64, at complex128) []stroke {
	var out []stroke
	for k := range 4 {
		out = append(out, stroke{a: at + cmplx.Rect(r, float64(k)*math.Pi/2), b: at + cmplx.Rect(r, float64(k+1)*math.Pi/2), c: at, arc: true})
	}
	return out
}

const mm = 1e-3

// add takes an outline in mm.
func (s *section) add(st []stroke, rad int, wall bool, eps, h float64) int {
	for i := range st {
		st[i].a *= mm
		st[i].b *= mm
		st[i].c *= mm
	}
	s.bodies = append(s.bodies, body{st, rad, wall, eps, h * mm})
	return len(s.bodies) - 1
}

func duct() section {
	var s section
	b := s.add
	out := b(rect(63, 43, 0, complex(30, 20), 0), 0, false, 0, 2)
	in := b(rect(60, 40, 0, complex(30, 20), 0), 1, true, 0.25, 2)
	b1 := b(rect(5, 30, 0.5, complex(18, 20), 0), 1, false, 0.08, 1)
	b2 := b(rect(7, 32, 1.5, complex(36, 19), 0), 1, false, 0.9, 1)
	b2m := b(rect(5, 30, 0.5, complex(36, 19), 0), 0, false, 0, 1)
	s.regions = []region{{"steel", 45, 0, out, []int{in}}, {"gas", 0.028, 0, in, []int{b1, b2}}, {"bar1", 1e5, 12, b1, nil}, {"ins", 0.2, 0, b2, []int{b2m}}, {"bar2", 1e5, 18, b2m, nil}}
	s.outside, s.film, s.ta = out, 9, 30
	return s
}

func flatCable() section {
	var s section
	b := s.add
	const turn = 0.3
	at := complex(-2, -8)
	u := cmplx.Rect(1, turn)
	c1, c2 := at+u*complex(-2.6, 0.1), at+u*complex(2.5, -0.15)
	wire := complex(5, 5)
	out := b(circle(17.8, 0), 0, false, 0, 1.2)
	in := b(circle(16, 0), 1, true, 0.9, 1.2)
	jo := b(flat(13.4, 7.4, at, turn), 1, false, 0.9, 0.6)
	ji := b(flat(11, 5, at, turn), 2, true, 0.9, 0.35)
	w1 := b(circle(2.1, c1), 2, false, 0.9, 0.25)
	m1 := b(circle(1.4, c1), 0, false, 0, 0.25)
	w2 := b(circle(2.2, c2), 2, false, 0.9, 0.25)
	m2 := b(circle(1.4, c2), 0, false, 0, 0.25)
	lo := b(circle(2.3, wire), 1, false, 0.8, 0.4)
	lm := b(circle(1.5, wire), 0, false, 0, 0.4)
	s.regions = []region{
		{"wall", 0.2, 0, out, []int{in}},
		{"gas", 0.027, 0, in, []int{jo, lo}},
		{"jacket", 0.19, 0, jo, []int{ji}},
		{"gas2", 0.027, 0, ji, []int{w1, w2}},
		{"i1", 0.2, 0, w1, []int{m1}},
		{"core1", 1e5, 3, m1, nil},
		{"i2", 0.2, 0, w2, []int{m2}},
		{"core2", 1e5, 2, m2, nil},
		{"i3", 0.25, 0, lo, []int{lm}},
		{"wire", 1e5, 4, lm, nil},
	}
	s.outside, s.film, s.ta = out, 10, 25
	return s
}
