package gas

import (
	"math"

	"packrise/solver/fluid"
)

// Where convection counts. Below LeastSpace the air of a packed holder hardly moves (k_eff/k ≤ 1.06 by the formula below), and in gaps, where
// a surface sees another one nearer than nearPath on average, it is held; from farPath on it is free.
const (
	LeastSpace = 32e-3 // m, inside diameter
	nearPath   = 10e-3 // m
	farPath    = 12e-3
	gravity    = 9.80665 // m/s²
)

// Annulus returns by how many times more heat crosses the air between horizontal concentric cylinders of diameters inner < outer (m)
// than by conduction alone, difference (K) being that between them: G. D. Raithby and K. G. T. Hollands, Advances in Heat Transfer 11
// (1975) 265, as F. P. Incropera and D. P. DeWitt give it (Fundamentals of Heat and Mass Transfer, section 9.8) for Rayleigh numbers Ra_c
// up to 1e7; never below 1. inRange is false beyond.
func Annulus(inner, outer float64, air fluid.State, difference float64) (nu float64, inRange bool) {
	if !(inner > 0) || !(outer > inner) || !(difference > 0) {
		return 1, true
	}
	perCube := gravity * air.Expansion * difference / (air.Kinematic() * air.Diffusivity()) // Ra_L/L³
	ln := math.Log(outer / inner)
	s := math.Pow(inner, -0.6) + math.Pow(outer, -0.6)
	ra := ln * ln * ln * ln * perCube / (s * s * s * s * s)
	pr := air.Prandtl()
	return math.Max(1, 0.386*math.Pow(pr/(0.861+pr)*ra, 0.25)), ra <= 1e7
}

// Space is the free space of an enclosure as an annulus: Inner is the diameter of one cylinder with the section of all discs together, Outer the
// inside (hydraulic) diameter of the outline, m.
type Space struct{ Inner, Outer float64 }

// Free returns the space within the outline.
func (e *Enclosure) Free() Space {
	s := 0.0
	for i := range e.discs {
		if d := &e.discs[i]; d.Rim != nil {
			area, _ := within(d.Rim)
			s += 4 / math.Pi * area
		} else {
			s += 4 * d.R * d.R
		}
	}
	outer := 2 * e.out.R
	if outer == 0 {
		if area, around := within(e.out.Segments); around > 0 {
			outer = 4 * area / around // hydraulic diameter
		}
	}
	return Space{math.Sqrt(s), outer}
}

// within returns the area within patches and their length.
func within(patches []Segment) (area, around float64) {
	for k := range patches {
		s := &patches[k]
		area += (real(s.A)*imag(s.B) - imag(s.A)*real(s.B)) / 2
		p := newRail(s, true)
		around += p.length
		if s.R > 0 {
			area += s.R * s.R / 2 * (2*p.arc - math.Sin(2*p.arc))
		}
	}
	return area, around
}

// Stir sets the air node for patches at temperatures t (K) at the pressure p (Pa). The heat that convection adds to conduction goes between each free
// surface and the node, through a coefficient such that both surfaces of the annulus in series exchange (Nu−1) times what it conducts:
// h = 2(Nu−1)k (1/Di + 1/Do)/ln(Do/Di), which is 2(Nu−1)k/L in a narrow one. It returns Nu, 1 for none.
func (x *Exchange) Stir(t []float64, p float64) (nu float64, inRange bool) {
	sp := x.Free()
	x.SetNode(nil)
	if sp.Outer < LeastSpace || sp.Inner >= sp.Outer || sp.Inner == 0 {
		return 1, true
	}
	free := make([]float64, x.Len()) // m² per metre that meets moving air
	var area, sum [2]float64         // discs, outline
	from, _ := x.Patches(len(x.discs))
	for k := range free {
		w := math.Min(1, math.Max(0, (x.Path(k)-nearPath)/(farPath-nearPath)))
		free[k] = w * x.Area(k)
		side := 0
		if k >= from {
			side = 1
		}
		area[side] += free[k]
		sum[side] += free[k] * t[k]
	}
	if area[0] == 0 || area[1] == 0 {
		return 1, true
	}
	warm, cold := sum[0]/area[0], sum[1]/area[1]
	air := fluid.Air((warm+cold)/2, p)
	nu, inRange = Annulus(sp.Inner, sp.Outer, air, math.Abs(warm-cold))
	h := 2 * (nu - 1) * air.Conductivity * (1/sp.Inner + 1/sp.Outer) / math.Log(sp.Outer/sp.Inner)
	for k := range free {
		free[k] *= h
	}
	x.SetNode(free)
	return nu, inRange
}
