package rating

import (
	"fmt"
	"math"
	"slices"

	"packrise/solver/heat"
	"packrise/solver/pack"
	"packrise/solver/section"
)

// body is one of several in one surroundings: parts of the top level that touch, or one alone.
type body struct {
	top, all []int         // parts of the top level, and these with what is in them in order, as scene indices
	origin   section.Point // mm: of its own heat problem
	around   float64       // m: the string round it
	box      [4]float64    // mm: x0, y0, x1, y1
	hull     []pack.Disc   // mm: what the string lies on
	coat     coat
}

// apart tells whether several bodies lie in one surroundings.
func (s *scene) apart() bool { return s.holder.kind == section.Apart }

// several tells whether a body is a bundle of its own.
func (b *body) several() bool { return len(b.top) > 1 }

// gapOf is the free distance between two placed parts of the top level, m; negative where they overlap.
func (s *scene) gapOf(i, j int) float64 {
	p, q := &s.parts[i], &s.parts[j]
	dx, dy := (q.abs.X-p.abs.X)*mm, (q.abs.Y-p.abs.Y)*mm
	free := math.Hypot(dx, dy) - p.outer() - q.outer()
	if free > math.Max(p.outer(), q.outer()) || p.form.Kind == heat.Disc && q.form.Kind == heat.Disc {
		return free // of far things that are not round it is not less than this
	}
	return p.outside().Placed(0, 0).Gap(q.outside().Placed(0, complex(dx, dy)))
}

// touchingParts gathers placed parts of the top level that touch, in the document's order.
func (s *scene) touchingParts() [][]int {
	var of []int
	for _, i := range s.children(-1) {
		if p := &s.parts[i]; !p.unset && p.outer() > 0 {
			of = append(of, i)
		}
	}
	group := make([]int, len(of))
	for a := range of {
		group[a] = a
		for b := range a {
			if group[b] != group[a] && s.gapOf(of[a], of[b]) <= touching*mm*(1+1e-9) {
				from, to := max(group[a], group[b]), min(group[a], group[b])
				for c := range a + 1 {
					if group[c] == from {
						group[c] = to
					}
				}
			}
		}
	}
	var out [][]int
	where := map[int]int{}
	for a, g := range group {
		k, ok := where[g]
		if !ok {
			k = len(out)
			where[g], out = k, append(out, nil)
		}
		out[k] = append(out[k], of[a])
	}
	return out
}

// together lists the parts of each body; while parts have no place, of those that have.
func (s *scene) together() [][]int {
	if len(s.bodies) == 0 {
		return s.touchingParts()
	}
	out := make([][]int, len(s.bodies))
	for k := range out {
		out[k] = s.bodies[k].top
	}
	return out
}

// findBodies makes the bodies of a section whose parts are placed.
func (r *resolver) findBodies() {
	s := &r.scene
	if !s.apart() {
		return
	}
	for _, top := range s.touchingParts() {
		s.bodies = append(s.bodies, body{top: top})
	}
	for k := range s.bodies {
		if s.bodies[k].several() {
			r.noSectors(s.bodies[k].top, "bodies that touch share a string round them, which takes round parts, bars and flat cables, no sector conductors by themselves",
				"move them apart, or put the sectors into a cable")
		}
	}
	r.loosenBodies()
	for k := range s.bodies {
		s.bodies[k].measure(s)
	}
}

// noSectors refuses sector conductors under a string, which can't be wound round their arcs.
func (r *resolver) noSectors(top []int, what, do string) {
	s := &r.scene
	if i := slices.IndexFunc(top, func(i int) bool { return s.parts[i].form.Kind == heat.Sector }); i >= 0 {
		id := s.parts[top[i]].id
		r.refuse(&section.Problem{Rule: "bundle-sector", IDs: []string{id}, Key: "holder.kind", What: id + ": " + what, Do: do})
	}
}

// loosenBodies moves the parts of each body apart by their clearance, unless they would meet another body. Where some are not round they stay, as in an
// open bundle.
func (r *resolver) loosenBodies() {
	s := &r.scene
	any := false
	for k := range s.bodies {
		top := s.bodies[k].top
		if len(top) < 2 {
			continue
		}
		if !(s.holder.gap > 0) {
			return
		}
		if s.formed(-1, top) {
			any = true
			continue
		}
		before := make([]item, len(s.parts))
		copy(before, s.parts)
		r.loosenParts(top)
		if s.meets(k) {
			s.parts = before
			s.notes = append(s.notes, fmt.Sprintf("%s are reckoned as drawn: another body is too near for them to be moved apart by their clearance", list(s.ids(top))))
			continue
		}
		any = true
	}
	if !any {
		s.holder.gap = 0
	}
}

// meets tells whether body k touches another.
func (s *scene) meets(k int) bool {
	for j := range s.bodies {
		if j == k {
			continue
		}
		for _, a := range s.bodies[k].top {
			for _, b := range s.bodies[j].top {
				if s.gapOf(a, b) <= touching*mm {
					return true
				}
			}
		}
	}
	return false
}

// measure finds what a body is from where its parts lie.
func (b *body) measure(s *scene) {
	first := &s.parts[b.top[0]]
	b.origin = first.abs
	member := map[int]bool{}
	for _, i := range b.top {
		member[i] = true
	}
	for i := range s.parts {
		p := &s.parts[i]
		if member[i] || p.in >= 0 && member[p.in] {
			member[i] = true
			b.all = append(b.all, i)
		}
	}
	discs := s.discsOf(b.top)
	arcs, perimeter, _ := pack.Hull(discs)
	if b.around = perimeter * mm; !b.several() {
		b.around = first.outside().Perimeter()
	}
	b.box = [4]float64{math.Inf(1), math.Inf(1), math.Inf(-1), math.Inf(-1)}
	for _, a := range arcs {
		d := discs[a.Disc]
		b.hull = append(b.hull, d)
		b.box = [4]float64{min(b.box[0], d.X-d.R), min(b.box[1], d.Y-d.R), max(b.box[2], d.X+d.R), max(b.box[3], d.Y+d.R)}
	}
}

// ids lists parts by their names.
func (s *scene) ids(of []int) []string {
	out := make([]string, len(of))
	for k, i := range of {
		out[k] = s.parts[i].id
	}
	return out
}

// name is what a body is called.
func (s *scene) bodyName(b *body) string {
	ids := s.ids(b.top)
	if len(ids) > 3 {
		return fmt.Sprintf("%s and %d more", ids[0], len(ids)-1)
	}
	return list(ids)
}

// holding is the body of a region of air between parts, by its key in spaces.
func (s *scene) holding(region int) *body { return &s.bodies[-1-region] }

// facing are the parts that face region i: what is in a cable, in the holder, or in one body of several.
func (s *scene) facing(i int) []int {
	if i < 0 && s.apart() {
		return s.holding(i).top
	}
	return s.children(i)
}

// outerBox is the box (mm) round all bodies.
func (s *scene) outerBox() [4]float64 {
	out := [4]float64{math.Inf(1), math.Inf(1), math.Inf(-1), math.Inf(-1)}
	for k := range s.bodies {
		b := &s.bodies[k].box
		out = [4]float64{min(out[0], b[0]), min(out[1], b[1]), max(out[2], b[2]), max(out[3], b[3])}
	}
	return out
}
