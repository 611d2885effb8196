package gas

import (
	"math"
	"slices"
)

// eye looks from one point at a time. Directions are told by s, the sine of the angle from the normal, which rises counterclockwise; the
// share of what lies between two directions is half the difference of their sines.
type eye struct {
	order []rank // discs by how near they can come
	arcs  []arc
	next  []arc
	seen  []float64 // share of each patch
	hit   []int32   // patches with a share
	path  float64
	at    complex128
	turn  complex128 // conj of the normal
	own   int        // patch of the outline that the point lies on, −1 on a disc
	edge  int        // patch of the outline where the last walk ended
}

// rank is a disc with the least distance that it can have from any point of the surface that looks.
type rank struct {
	disc int32
	near float64
}

// arc is a range of directions in which disc is the first thing to be seen, −1 the outline.
type arc struct {
	s0, s1 float64
	disc   int32
}

// sliver is the range of sines that is not worth looking at.
const sliver = 1e-12

// queue sorts the discs for looks from disc i (−1: from anywhere) of radius r about c.
func (y *eye) queue(e *Enclosure, i int, c complex128, r float64) {
	y.order = y.order[:0]
	for j := range e.discs {
		if j == i {
			continue
		}
		near := 0.0
		if i >= 0 {
			near = size(e.discs[j].C-c) - e.discs[j].R - r
		}
		y.order = append(y.order, rank{int32(j), near})
	}
	slices.SortFunc(y.order, func(a, b rank) int {
		switch {
		case a.near < b.near:
			return -1
		case a.near > b.near:
			return 1
		}
		return int(a.disc - b.disc)
	})
}

// open begins a patch.
func (y *eye) open(e *Enclosure) {
	if len(y.seen) != len(e.area) {
		y.seen = make([]float64, len(e.area))
	}
	y.hit, y.path = y.hit[:0], 0
}

// close stores what the patch saw.
func (y *eye) close(e *Enclosure, patch int) {
	row := e.raw[patch][:0]
	if cap(row) < len(y.hit) {
		row = make([]sight, 0, len(y.hit)+len(y.hit)/4)
	}
	for _, p := range y.hit {
		row = append(row, sight{p, y.seen[p]})
		y.seen[p] = 0
	}
	e.raw[patch], e.path[patch] = row, y.path
}

// add counts what lies between two directions, at distances r0 and r1.
func (y *eye) add(patch int, s0, s1, r0, r1, weight float64) {
	if s1 <= s0 {
		return
	}
	f := weight * (s1 - s0) / 2
	if y.seen[patch] == 0 {
		y.hit = append(y.hit, int32(patch))
	}
	y.seen[patch] += f
	y.path += f * (r0 + r1) / 2
}

// look adds what is seen from at with the given weight; edge is the patch of the outline that at lies on, −1 on a disc.
func (y *eye) look(e *Enclosure, at, normal complex128, weight float64, edge int) {
	y.at, y.turn = at, complex(real(normal), -imag(normal))
	y.arcs = append(y.arcs[:0], arc{-1, 1, -1})
	reach := math.Inf(1)
	for n, o := range y.order {
		if o.near > reach {
			break
		}
		d := &e.discs[o.disc]
		v := (d.C - at) * y.turn
		if real(v)+d.R <= 0 {
			continue
		}
		y.insert(e, d, v, o.disc)
		if n&7 == 7 {
			reach = y.reach(e)
		}
	}
	y.own = edge
	if edge >= 0 {
		y.edge = edge
	} else {
		y.align(e)
	}
	for _, a := range y.arcs {
		if a.disc < 0 {
			y.onOutline(e, a, weight)
		} else {
			y.onDisc(e, a, weight)
		}
	}
}

// reach is how far away the farthest place is that can be seen, +Inf while the outline can.
func (y *eye) reach(e *Enclosure) float64 {
	far := 0.0
	for _, a := range y.arcs {
		if a.disc < 0 {
			return math.Inf(1)
		}
		d := &e.discs[a.disc]
		r := size(d.C - y.at)
		if d.Rim != nil {
			r += d.R
		}
		far = math.Max(far, r)
	}
	return far
}

// insert puts a disc with centre v (normal, tangent) among the arcs. Of two discs that do not overlap the same one is in front in every
// direction that they share, so that one look per arc decides.
func (y *eye) insert(e *Enclosure, d *Disc, v complex128, disc int32) {
	lo, hi := 0.0, 0.0
	if b := e.bodies[disc]; b != nil {
		lo, hi = b.extent(y)
	} else {
		lo, hi = extent(v, d.R)
	}
	if hi-lo <= sliver {
		return
	}
	y.next = y.next[:0]
	changed := false
	for _, a := range y.arcs {
		s0, s1 := math.Max(a.s0, lo), math.Min(a.s1, hi)
		if s1-s0 <= sliver || a.disc >= 0 && !y.nearer(e, disc, a.disc, (s0+s1)/2) {
			y.next = append(y.next, a)
			continue
		}
		changed = true
		if s0-a.s0 > sliver {
			y.next = append(y.next, arc{a.s0, s0, a.disc})
		} else {
			s0 = a.s0
		}
		end := s1
		if a.s1-s1 <= sliver {
			end = a.s1
		}
		if k := len(y.next) - 1; k >= 0 && y.next[k].disc == disc {
			y.next[k].s1 = end
		} else {
			y.next = append(y.next, arc{s0, end, disc})
		}
		if end < a.s1 {
			y.next = append(y.next, arc{end, a.s1, a.disc})
		}
	}
	if changed {
		y.arcs, y.next = y.next, y.arcs
	}
}

// extent returns the sines between which a disc at v shows.
func extent(v complex128, r float64) (lo, hi float64) {
	d2 := real(v)*real(v) + imag(v)*imag(v)
	l := math.Sqrt(math.Max(d2-r*r, 0))
	if r*r > d2 {
		r = math.Sqrt(d2)
	}
	// The ends are at the angle of the centre plus and minus asin(r/d). An end behind the horizon is the horizon itself if the centre is on
	// its side, and hides the whole disc if not.
	lo, hi = -1, 1
	if real(v)*l+imag(v)*r > 0 {
		lo = math.Max(-1, (imag(v)*l-real(v)*r)/d2)
	} else if imag(v) > 0 {
		return 0, 0
	}
	if real(v)*l-imag(v)*r > 0 {
		hi = math.Min(1, (imag(v)*l+real(v)*r)/d2)
	} else if imag(v) < 0 {
		return 0, 0
	}
	return lo, hi
}

// nearer tells whether disc i is met before disc j in direction s.
func (y *eye) nearer(e *Enclosure, i, j int32, s float64) bool {
	c := cosine(s)
	return y.depth(e, i, c, s) < y.depth(e, j, c, s)
}

// depth is the distance at which a ray meets disc i.
func (y *eye) depth(e *Enclosure, i int32, c, s float64) float64 {
	d := &e.discs[i]
	if b := e.bodies[i]; b != nil {
		return b.depth(y, c, s, size(d.C-y.at))
	}
	return depth((d.C-y.at)*y.turn, d.R, c, s)
}

// depth is the distance at which a ray meets a disc.
func depth(v complex128, r, c, s float64) float64 {
	across := real(v)*s - imag(v)*c
	return real(v)*c + imag(v)*s - math.Sqrt(math.Max(0, r*r-across*across))
}
