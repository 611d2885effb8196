package outline

import (
	"math"
	"slices"
)

// Moved returns the system with disc i elsewhere, in a fraction of the time of NewHull: for dragging a part inside the bundle. It returns
// nil where NewHull is due: the part lies on the hull or close to it, or the panels are too long for it there. The hull must be as it was.
func (s *HullSystem) Moved(i int, c complex128) *HullSystem {
	d := s.discs[i].Disc
	if len(s.kin(i, d)) > 0 {
		return nil
	}
	d.C = c
	if len(s.kin(i, d)) > 0 || !s.grading.resolve(&d, s.panels) {
		return nil
	}
	t := *s
	t.discs = slices.Clone(s.discs)
	t.discs[i].Disc = d
	t.link(i)
	return &t
}

// resolve tells whether the panels are short enough for a disc inside, to the tolerance that a drag can bear.
func (g *hullGrading) resolve(d *Disc, panels []bow) bool {
	for i := range panels {
		b := &panels[i]
		for _, t := range [3]float64{-0.7, 0, 0.7} {
			if l := 2 * b.half; g.near(d, b.at(t), l) < 0.6*l {
				return false
			}
		}
	}
	return true
}

// Outside returns the system with other outsides, as many as the hull has arcs: Bare and String of each are read.
func (s *HullSystem) Outside(arcs []Arc) *HullSystem {
	t := *s
	t.hull.Arcs = slices.Clone(s.hull.Arcs)
	for i := range arcs {
		t.hull.Arcs[i].Bare, t.hull.Arcs[i].String = arcs[i].Bare, arcs[i].String
	}
	discs := make([]Disc, len(s.discs))
	for i := range discs {
		discs[i] = s.discs[i].Disc
	}
	t.hull.check(discs)
	t.pieces = t.hull.pieces(discs)
	gain, film := make([]float64, s.n), make([]float64, s.n) // new send = gain·send + film·warm
	for i := range s.panels {
		b := &s.panels[i]
		old, now := &s.pieces[b.piece], &t.pieces[b.piece]
		for l := range b.p {
			gain[b.dof+l] = t.scaleOf(now) / s.scaleOf(old)
			film[b.dof+l] = t.scaleOf(now) * (t.film(now) - s.film(old))
		}
	}
	t.discs = slices.Clone(s.discs)
	each(len(t.discs), func(i int) {
		d := &t.discs[i]
		size := make([]int, len(d.send))
		for c := range size {
			size[c] = len(d.send[c])
		}
		send := columns(size)
		for c := range send {
			for k := range send[c] {
				j := d.order[k]
				send[c][k] = gain[j]*d.send[c][k] + film[j]*d.warm[c][k]
			}
		}
		d.send = send
	})
	t.factorise()
	return &t
}

// sameArcs tells whether two hulls have the same arcs, but for what is outside.
func sameArcs(a, b []Arc) bool {
	return slices.EqualFunc(a, b, func(a, b Arc) bool {
		return a.Disc == b.Disc && math.Abs(a.From-b.From) < tinyArc && math.Abs(a.To-b.To) < tinyArc
	})
}

// Fits tells whether the hull is the one with these arcs.
func (s *HullSystem) Fits(arcs []Arc) bool { return sameArcs(s.hull.Arcs, arcs) }
