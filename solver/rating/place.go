package rating

import (
	"fmt"
	"math"

	"packrise/solver/pack"
	"packrise/solver/section"
)

// Tolerances of places, in mm: below touching a gap or overlap counts as contact, up to nudge it is pushed apart for solving.
const (
	touching = 1e-3
	nudge    = 20e-3
)

// places finds the frame of the heat problem, pushes slight overlaps apart and reports larger ones, in the holder and in every cable.
func (r *resolver) places() {
	if !r.placed() {
		r.overlapsOfPlaced()
		return
	}
	if len(r.scene.parts) == 0 {
		r.refuse(&section.Problem{Rule: "empty", Key: "parts", What: "the section has no parts", Do: "put in a conductor"})
		return
	}
	if r.unsound() {
		return
	}
	r.frame()
	for in := -1; in < len(r.scene.parts); in++ {
		if in < 0 || r.scene.parts[in].inside != nil {
			r.room(in)
		}
	}
	r.clearance()
	r.loosen()
	r.findBodies()
}

// placed tells whether every part has a place.
func (r *resolver) placed() bool {
	for i := range r.scene.parts {
		if r.scene.parts[i].unset {
			return false
		}
	}
	return true
}

// overlapsOfPlaced reports overlaps among the parts of the top level that have a place while others have none, so that all problems come
// at once. Bundles and bare parts have no wall, so their frame does not matter.
func (r *resolver) overlapsOfPlaced() {
	var of []int
	for _, i := range r.scene.children(-1) {
		if p := &r.scene.parts[i]; !p.unset && p.outer() > 0 {
			of = append(of, i)
		}
	}
	if len(of) > 0 {
		r.overlaps(-1, of, r.scene.discs(of), r.scene.box(-1))
	}
}

// unsound tells whether any part or the holder has no size, because a problem was found before.
func (r *resolver) unsound() bool {
	for i := range r.scene.parts {
		if !(r.scene.parts[i].outer() > 0) {
			return true
		}
	}
	h := &r.scene.holder
	switch h.kind {
	case section.Jacket, section.Conduit:
		return !(h.radius > 0)
	case section.Wireway:
		return !(h.w > 0 && h.h > 0)
	}
	return false
}

// children returns the indices of the parts that lie in a cable, or in the holder (−1).
func (s *scene) children(in int) []int {
	var out []int
	for i := range s.parts {
		if s.parts[i].in == in {
			out = append(out, i)
		}
	}
	return out
}

// discs returns parts as pack sees them, in mm and in the frame of what they lie in.
func (s *scene) discs(of []int) []pack.Disc {
	out := make([]pack.Disc, len(of))
	for k, i := range of {
		p := &s.parts[i]
		out[k] = pack.Disc{X: p.x / mm, Y: p.y / mm, R: p.outer() / mm}
	}
	return out
}

// box returns the inside that the parts lie in, in mm.
func (s *scene) box(in int) pack.Box {
	e := &s.holder
	if in >= 0 {
		e = s.parts[in].inside
	}
	switch {
	case e.kind == section.Wireway:
		return pack.Box{W: e.w / mm, H: e.h / mm}
	case e.kind == section.Jacket || e.kind == section.Conduit:
		return pack.Box{R: e.radius / mm}
	}
	return pack.Box{}
}

// frame moves the origin of a section without a fixed one (bundle, bare part) to the middle of its parts.
func (r *resolver) frame() {
	s := &r.scene
	top := s.children(-1)
	switch s.holder.kind {
	case section.OpenBundle:
		r.noSectors(top, "an open bundle takes round parts, bars and flat cables, no sector conductors by themselves", "put the sectors into a cable, or use a jacket or conduit")
		x, y, rad := pack.Enclose(s.discs(top))
		s.origin = section.Point{X: x, Y: y}
		s.holder.radius = rad * mm
		if !s.hulled() {
			s.notes = append(s.notes, fmt.Sprintf("the wrap is taken as round, about the bundle's enclosing circle of ⌀ %s mm", digits(2*rad, 2)))
		}
	case section.Apart:
		x, y, rad := pack.Enclose(s.discs(top))
		s.origin = section.Point{X: x, Y: y}
		s.holder.radius = rad * mm
	case section.NoHolder:
		if len(top) != 1 {
			r.refuse(&section.Problem{
				Rule: "none-holds-one", Key: "holder.kind", What: fmt.Sprintf("holder kind none is for one bare part, and there are %d", len(top)),
				Do: "use kind open-bundle for several, or take parts out",
			})
			return
		}
		s.origin = s.parts[top[0]].abs
	}
	for _, i := range top {
		s.parts[i].x = (s.parts[i].abs.X - s.origin.X) * mm
		s.parts[i].y = (s.parts[i].abs.Y - s.origin.Y) * mm
	}
}

// room checks the parts of one enclosure and pushes slight overlaps apart.
func (r *resolver) room(in int) {
	s := &r.scene
	of := s.children(in)
	box := s.box(in)
	discs := s.discs(of)
	bad := r.overlaps(in, of, discs, box)
	if s.formed(in, of) {
		return // slight overlaps of what is not round are evened out by the solver
	}
	_, _, depth := pack.Overlap(discs, box)
	if bad || depth <= touching {
		return
	}
	moved, ok := pack.PushApart(discs, box, -1, 0)
	if !ok {
		i, j, _ := pack.Overlap(discs, box)
		r.refuse(r.overlapProblem(in, of, i, j, depth))
		return
	}
	for k, i := range of {
		p := &s.parts[i]
		dx, dy := moved[k].X-discs[k].X, moved[k].Y-discs[k].Y
		p.x, p.y = moved[k].X*mm, moved[k].Y*mm
		s.shift(i, dx, dy)
	}
	s.notes = append(s.notes, fmt.Sprintf("overlaps of up to %s µm were pushed apart for solving", digits(math.Ceil(depth*1e3), 0)))
}

// shift moves what is drawn of a part and of all parts in it.
func (s *scene) shift(i int, dx, dy float64) {
	s.parts[i].abs.X += dx
	s.parts[i].abs.Y += dy
	for _, j := range s.children(i) {
		s.shift(j, dx, dy)
	}
}

// overlaps reports every overlap deeper than nudge. It tells whether there was one.
func (r *resolver) overlaps(in int, of []int, discs []pack.Disc, box pack.Box) bool {
	if r.scene.formed(in, of) {
		return r.overlapsOfLoops(in, of)
	}
	found := false
	for i := range discs {
		for j := range i {
			if d := discs[i].R + discs[j].R - math.Hypot(discs[i].X-discs[j].X, discs[i].Y-discs[j].Y); d > nudge {
				r.refuse(r.overlapProblem(in, of, j, i, d))
				found = true
			}
		}
		if _, _, d := pack.Overlap(discs[i:i+1], box); d > nudge {
			r.refuse(r.overlapProblem(in, of, i, -1, d))
			found = true
		}
	}
	return found
}

func (r *resolver) overlapProblem(in int, of []int, i, j int, depth float64) *section.Problem {
	a := r.scene.parts[of[i]].id
	if j < 0 {
		where := "the " + r.scene.holder.kind
		if in >= 0 {
			where = "the jacket of " + r.scene.parts[in].id
		}
		return &section.Problem{
			Rule: "outside-holder", IDs: []string{a}, Key: "at_mm",
			What: fmt.Sprintf("%s reaches %s mm into or beyond the wall of %s", a, digits(depth, 3), where), Do: "move it inside, or settle the section",
		}
	}
	b := r.scene.parts[of[j]].id
	return &section.Problem{
		Rule: "overlap", IDs: []string{a, b}, Key: "at_mm",
		What: fmt.Sprintf("%s overlaps %s by %s mm", a, b, digits(depth, 3)), Do: "move one of them, or settle the section",
	}
}

// clearance applies the default of a holder whose parts lie loose in a gas: conduit and wireway 0.2 mm or 6 % of the smallest outside
// diameter, bundle 0.05 mm, jacket 0 (DEVELOPERS.md, defaults).
func (r *resolver) clearance() {
	h := &r.scene.holder
	if !h.fill.gas {
		h.gap = 0
		return
	}
	if h.gap >= 0 {
		return
	}
	h.gap = 0
	switch h.kind {
	case section.Conduit, section.Wireway:
		small := math.Inf(1)
		for _, i := range r.scene.children(-1) {
			small = min(small, r.scene.parts[i].least())
		}
		h.gap = min(0.2*mm, 0.06*small)
	case section.OpenBundle, section.Apart:
		h.gap = 0.05 * mm
	}
}
