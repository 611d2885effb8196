package gas

import (
	"math"
	"sort"
)

// onDisc shares an arc of directions out among the patches of the disc that it shows. Counterclockwise for the eye is clockwise on the disc.
func (y *eye) onDisc(e *Enclosure, a arc, weight float64) {
	i := int(a.disc)
	d := &e.discs[i]
	if b := e.bodies[i]; b != nil {
		b.share(y, a, e.first[i], weight)
		return
	}
	n := len(d.Cuts) - 1
	if n < 1 {
		return
	}
	v := (d.C - y.at) * y.turn
	c0, c1 := cosine(a.s0), cosine(a.s1)
	r, r1 := depth(v, d.R, c0, a.s0), depth(v, d.R, c1, a.s1)
	k := d.patchAt((complex(r*c0, r*a.s0) - v) * complex(real(y.turn), -imag(y.turn)))
	ends := e.endsOf(i)
	s := a.s0
	for range n + 2 {
		end := ends[k]
		w := (end - y.at) * y.turn
		l, se := r1, a.s1
		if out := end - d.C; real(out)*(real(y.at)-real(end))+imag(out)*(imag(y.at)-imag(end)) > 0 && real(w) > 0 { // faces the eye
			l = size(w)
			se = math.Min(a.s1, math.Max(s, imag(w)/l))
		}
		if se >= a.s1 {
			l = r1
		}
		if k < n && !d.blank(k) { // else no surface
			y.add(e.first[i]+k, s, se, r, l, weight)
		}
		if se >= a.s1 {
			return
		}
		s, r = se, l
		if k--; k < 0 {
			k = d.last()
		}
	}
}

func cosine(s float64) float64 { return math.Sqrt(math.Max(0, 1-s*s)) }

// patchAt is the patch in the direction v from the centre, len(Cuts)−1 where there is none.
func (d *Disc) patchAt(v complex128) int {
	t := math.Atan2(imag(v), real(v)) - d.Cuts[0]
	t = d.Cuts[0] + t - 2*math.Pi*math.Floor(t/(2*math.Pi))
	return max(0, sort.SearchFloat64s(d.Cuts, t)-1)
}

// last is the patch below the first: the last one of a full circle, else the arc without a surface.
func (d *Disc) last() int {
	n := len(d.Cuts) - 1
	if d.Cuts[n]-d.Cuts[0] > 2*math.Pi-1e-9 {
		return n - 1
	}
	return n
}

// onOutline shares an arc of directions out among the patches of the outline, going on from where the last arc ended.
func (y *eye) onOutline(e *Enclosure, a arc, weight float64) {
	segments := e.out.Segments
	n := len(segments)
	if n == 0 {
		return
	}
	u := complex(cosine(a.s0), a.s0)
	k, behind := y.edge, y.behind(e)
	for range n { // to the first patch that ends beyond the direction s0
		w := (segments[k].B - y.at) * y.turn
		if real(u)*imag(w)-imag(u)*real(w) > 0 || real(w) < 0 && imag(w) > 0 || k == y.own && a.s0 >= behind {
			break
		}
		k = next(k, n)
	}
	s, r := a.s0, -1.0
	for range n + 1 {
		seg := &segments[k]
		if w := (seg.A - y.at) * y.turn; e.gap[k] && k != y.own && real(w) > 0 {
			l := size(w)
			if b := imag(w) / l; b > s {
				s, r = b, l
			}
		}
		w := (seg.B - y.at) * y.turn
		l, se := size(w), 1.0
		if real(w) > 0 {
			se = imag(w) / l
		} else if imag(w) < 0 {
			se = -1
		}
		if k == y.own && s >= behind {
			l, se = 0, 1
		}
		if r < 0 {
			r = l
		}
		se = math.Min(se, a.s1)
		y.add(e.first[len(e.discs)]+k, s, se, r, l, weight)
		if se >= a.s1 {
			break
		}
		s, r = math.Max(s, se), l
		k = next(k, n)
	}
	y.edge = k
}

// behind is the direction from which the eye sees the patch that it lies on once more, beyond 1 if that is straight.
func (y *eye) behind(e *Enclosure) float64 {
	if y.own < 0 || e.out.R == 0 && e.out.Segments[y.own].R == 0 {
		return 2
	}
	w := (e.out.Segments[y.own].A - y.at) * y.turn
	return imag(w) / size(w) * (1 - 1e-14)
}

func next(k, n int) int {
	if k++; k == n {
		return 0
	}
	return k
}

// align puts the walk along the outline before the first arc that shows it.
func (y *eye) align(e *Enclosure) {
	n := len(e.out.Segments)
	if n == 0 {
		return
	}
	if y.edge >= n {
		y.edge = 0
	}
	for _, a := range y.arcs {
		if a.disc >= 0 {
			continue
		}
		u := complex(cosine(a.s0), a.s0)
		ahead := func(k int) bool {
			w := (e.out.Segments[k].B - y.at) * y.turn
			return real(u)*imag(w)-imag(u)*real(w) > 0
		}
		k := y.edge
		for range n { // back to a patch that ends before the direction
			if !ahead(k) {
				break
			}
			if k--; k < 0 {
				k = n - 1
			}
		}
		for range n {
			if ahead(k) {
				break
			}
			k = next(k, n)
		}
		y.edge = k
		return
	}
}
