package rating

import (
	"fmt"
	"math"

	"packrise/solver/heat"
	"packrise/solver/pack"
	"packrise/solver/section"
)

// taut winds the string of an open bundle for the heat problem.
func taut(x, y, r []float64) []heat.Arc {
	discs := make([]pack.Disc, len(x))
	for i := range discs {
		discs[i] = pack.Disc{X: x[i], Y: y[i], R: r[i]}
	}
	arcs, _, _ := pack.Hull(discs)
	out := make([]heat.Arc, len(arcs))
	for i, a := range arcs {
		out[i] = heat.Arc{Disc: a.Disc, From: a.From, To: a.To}
	}
	return out
}

// hulled tells whether the taut string round the parts is the outside. An open bundle that is wrapped is taken as round instead.
func (s *scene) hulled() bool {
	return s.holder.kind == section.OpenBundle && len(s.holder.layers) == 0
}

// drawn returns the parts of the top level that are placed, in mm and in the plane of the section.
func (s *scene) drawn() []pack.Disc {
	var of []int
	for i := range s.parts {
		if p := &s.parts[i]; p.in < 0 && !p.unset && p.outer() > 0 {
			of = append(of, i)
		}
	}
	return s.discsOf(of)
}

// discsOf returns parts in mm and in the plane of the section; of one that is not round, the corners round which a string bends.
func (s *scene) discsOf(of []int) []pack.Disc {
	out := make([]pack.Disc, 0, len(of))
	for _, i := range of {
		p := &s.parts[i]
		if p.form.Kind == heat.Disc {
			out = append(out, pack.Disc{X: p.abs.X, Y: p.abs.Y, R: p.outer() / mm})
			continue
		}
		for _, c := range p.outside().Corners() {
			out = append(out, pack.Disc{X: p.abs.X + real(c.C)/mm, Y: p.abs.Y + imag(c.C)/mm, R: c.R / mm})
		}
	}
	return out
}

// hull returns the perimeter of the taut string and the length of its straight strings, m.
func (s *scene) hull() (perimeter, strings float64) {
	_, perimeter, strings = pack.Hull(s.drawn())
	return perimeter * mm, strings * mm
}

// hullStep is the largest angle (rad) between points of the drawn hull: a polygon within 0.03 % of the radius.
const hullStep = 0.05

// hullLoop is the taut string round discs as a polygon, mm.
func hullLoop(discs []pack.Disc) []section.Point {
	arcs, _, _ := pack.Hull(discs)
	var out []section.Point
	for _, a := range arcs {
		d := discs[a.Disc]
		n := int(math.Ceil((a.To - a.From) / hullStep))
		for k := range n + 1 {
			sin, cos := math.Sincos(a.From + (a.To-a.From)*float64(k)/float64(max(n, 1)))
			out = append(out, section.Point{X: d.X + d.R*cos, Y: d.Y + d.R*sin})
		}
	}
	return out
}

// bundleShape is the outline of an open bundle: its hull, and the circle round it.
func (s *scene) bundleShape(sh *section.Shape) {
	x, y, r := pack.Enclose(s.drawn())
	sh.At = section.Point{X: x, Y: y}
	sh.Rings = []section.Ring{{Material: s.holder.fill.id, R1: r}}
	if line := hullLoop(s.drawn()); len(line) > 0 {
		sh.Loops = [][]section.Point{line}
	}
}

// nanometre is what moved places are rounded to, mm: what does not move from one drawing to the next stays where it is to the last digit.
const nanometre = 1e-6

// loosen moves the parts of an open bundle apart by their mean clearance. No radius is reduced: the hull follows. Where some are not round they stay, and
// their layers give the clearance as in a holder.
func (r *resolver) loosen() {
	if s := &r.scene; s.hulled() && s.holder.gap > 0 && !s.formed(-1, s.children(-1)) {
		r.loosenParts(s.children(-1))
	}
}

// loosenParts moves parts of the top level apart from each other.
func (r *resolver) loosenParts(of []int) {
	s := &r.scene
	h := &s.holder
	discs := s.discs(of)
	moved, ok := pack.PushApart(discs, pack.Box{}, -1, h.gap/mm)
	if !ok {
		s.notes = append(s.notes, fmt.Sprintf("the parts could not be moved apart by the clearance of %s mm: they are reckoned as drawn", digits(h.gap/mm, 3)))
		h.gap = 0
		return
	}
	for k, i := range of {
		x, y := nanometre*math.Round(moved[k].X/nanometre), nanometre*math.Round(moved[k].Y/nanometre)
		if moved[k] == discs[k] {
			continue
		}
		p := &s.parts[i]
		p.x, p.y = x*mm, y*mm
		s.shift(i, x-discs[k].X, y-discs[k].Y)
	}
}
