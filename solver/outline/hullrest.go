package outline

import "math"

// Rest is where a share of the hull has an outside of its own, since it rests against something: its middle is where a ray from the centroid of all that
// the hull encloses in direction At (rad) meets it, half of it lies to each side by length.
type Rest struct {
	Share float64 // 0: nowhere
	At    float64
	Outside
}

// lean cuts pieces where the hull begins and ends to rest against something.
func (h *Hull) lean(all []piece) []piece {
	if h.Rest.Share == 0 {
		return all
	}
	var loop Loop
	for i := range all {
		loop = append(loop, all[i].strokes()...)
	}
	whole := 0.0
	for i := range all {
		whole += all[i].length
	}
	size := h.Rest.Share * whole
	from := math.Mod(loop.Toward(h.Rest.At)-size/2+2*whole, whole)
	var out []piece
	along := 0.0
	for _, p := range all {
		cuts := []float64{0}
		for _, e := range [2]float64{math.Mod(from+size, whole) - along, from - along} {
			if e > tinyCut*whole && e < p.length-tinyCut*whole {
				cuts = append(cuts, e)
			}
		}
		if len(cuts) == 3 && cuts[1] > cuts[2] {
			cuts[1], cuts[2] = cuts[2], cuts[1]
		}
		cuts = append(cuts, p.length)
		for k := 1; k < len(cuts); k++ {
			q := p.between(cuts[k-1], cuts[k])
			if math.Mod(along+(cuts[k-1]+cuts[k])/2-from+2*whole, whole) < size {
				q.rests, q.out = true, h.Rest.Outside
			}
			out = append(out, q)
		}
		along += p.length
	}
	for i := range out {
		if j := (i + 1) % len(out); out[i].rests != out[j].rests {
			held := math.IsInf(h.Rest.Film, 1)
			out[i].tip[1], out[j].tip[0], out[i].held, out[j].held = true, true, held, held
		}
	}
	return out
}

// tinyCut is the shortest bit, as a share of the hull, that is cut off a piece.
const tinyCut = 1e-6

// between is the piece from a to b of its length.
func (p *piece) between(a, b float64) piece {
	q := *p
	if a == 0 && b == p.length {
		return q
	}
	if p.disc < 0 {
		q.start = p.at(a)
	} else {
		q.from, q.turn = p.from+a/p.a, (b-a)/p.a
	}
	q.length = b - a
	return q
}

// strokes are the piece's outline, none longer than a quarter of a turn.
func (p *piece) strokes() (l Loop) {
	if p.disc < 0 {
		return Loop{{From: p.at(0), To: p.at(p.length)}}
	}
	n := max(1, int(math.Ceil(p.turn/(math.Pi/2)-1e-9)))
	for k := range n {
		a, b := p.length*float64(k)/float64(n), p.length*float64(k+1)/float64(n)
		l = append(l, Stroke{From: p.at(a), To: p.at(b), Centre: p.c, R: p.a})
	}
	return l
}

// Panels next to where a hull begins to rest against something: the shortest, as a share of a part's radius, where flows grow without bound and where they
// only jump, and how much lengths may grow away from there.
const (
	tipHeld   = 2e-3
	tipJump   = 4e-2
	tipGrowth = 1.0
)

// tips is the longest panel at s along p next to such ends.
func (g *hullGrading) tips(p *piece, s, l float64) float64 {
	if !p.tip[0] && !p.tip[1] {
		return l
	}
	least := tipJump
	if p.held {
		least = tipHeld
	}
	least *= math.Min(g.discs[p.ends[0]].A, g.discs[p.ends[1]].A) / g.fineness
	if p.tip[0] {
		l = math.Min(l, least+tipGrowth*s)
	}
	if p.tip[1] {
		l = math.Min(l, least+tipGrowth*(p.length-s))
	}
	return l
}

// RestOut is the heat (W/m) that goes into what the hull rests against, for temperatures t of the cells.
func (s *HullSystem) RestOut(t []float64) (out float64) {
	for i := range s.panels {
		b := &s.panels[i]
		p := &s.pieces[b.piece]
		if !p.rests {
			continue
		}
		film := s.film(p) * s.hull.MediumK / 2
		for l := range b.p {
			out += film * (t[b.dof+l] - p.out.Temp) * b.cell(l)
		}
	}
	return out
}

// Gripped lists the discs on whose rim what is held at a temperature begins or ends. The field there is singular: their harmonics hardly die out, though
// what they send back to the hull is reckoned to all orders.
func (s *HullSystem) Gripped() (discs []int) {
	for i := range s.pieces {
		if p := &s.pieces[i]; p.disc >= 0 && p.held && (p.tip[0] || p.tip[1]) {
			discs = append(discs, p.disc)
		}
	}
	return discs
}
