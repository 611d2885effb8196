package outline

import "slices"

// Outside returns the system with other outsides, as many as the hull has arcs: Bare and String of each are read.
func (s *HullSystem) Outside(arcs []Arc) *HullSystem { return s.Outsides(arcs, s.hull.Rest.Outside) }

// Outsides is Outside where what the hull rests against changes too: not whether it is held.
func (s *HullSystem) Outsides(arcs []Arc, rest Outside) *HullSystem {
	t := *s
	t.hull.Rest.Outside = rest
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
	eachOf(len(t.discs), t.hull.Workers, func(i int) {
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
