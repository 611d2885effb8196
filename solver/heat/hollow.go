package heat

import (
	"math"
	"math/cmplx"

	"packrise/solver/gas"
	"packrise/solver/outline"
)

// hollow is a space full of gas between contours: its wall is one of them, seen from inside, or the strings of an open bundle; what lies in it are parts,
// seen from outside.
type hollow struct {
	walls []int // contours, counterclockwise
	parts []int
	eps   float64 // emissivity of the wall
	stirs bool
	seen  *gas.Enclosure // what the surfaces saw of each other when they stood as they do; nil else
	at    []int          // patch of the contours for each patch of the exchange
	ex    *gas.Exchange
	t, e  []float64 // room
	base  []float64
	out   []float64
	nusselt
}

// hollowGrain is grain for patches along the cells of contours, which lie finer near contacts anyway.
func (a Accuracy) hollowGrain() (part, wall float64, points int) {
	part, wall, points = a.grain()
	return 2 * part, wall, points
}

// hollows lists the spaces that are full of gas, that of the top level first.
func (l *plan) hollows() []*hollow {
	var out []*hollow
	add := func(in int, walls []int, f Filling, eps float64) {
		if f == Solid || len(walls) == 0 {
			return
		}
		h := &hollow{walls: walls, eps: eps, stirs: f == Air, nusselt: nusselt{1, true}}
		for j := range l.p.Parts {
			if l.p.Parts[j].In == in {
				h.parts = append(h.parts, j)
			}
		}
		out = append(out, h)
	}
	if l.p.Wall.Shape != BarePart {
		add(-1, l.walls(), l.p.Filling, l.p.Wall.Emissivity)
	}
	for i := range l.p.Parts {
		if q := &l.p.Parts[i]; q.Core == Inside {
			add(i, []int{l.first[i]}, q.Filling, q.InsideEmissivity)
		}
	}
	return out
}

// walls are the contours about the top level: the wall's inside, or the strings of an open bundle.
func (l *plan) walls() (w []int) {
	if l.p.Wall.Shape != Hull {
		return []int{l.wall}
	}
	for i := range l.contours {
		if l.contours[i].String {
			w = append(w, i)
		}
	}
	return w
}

// faces are the surfaces that look into hollows: of each contour, the hollow, and the place of its part there, −1 for the wall.
type faces struct {
	of    []*hollow
	place []int
}

func (l *plan) faces(hollows []*hollow) faces {
	f := faces{make([]*hollow, len(l.contours)), make([]int, len(l.contours))}
	for _, h := range hollows {
		for _, w := range h.walls {
			f.of[w], f.place[w] = h, -1
		}
		for k, i := range h.parts {
			f.of[l.skinOf(i)], f.place[l.skinOf(i)] = h, k
		}
	}
	return f
}

// hollowError is to sections of contours what grainError is to others, in patches per turn of grain: more than nineteen of twenty random ones.
const hollowError = 0.25

// grained is a grain for a wall of a given length.
type grained struct {
	gas.Grain
	around float64
}

// divide cuts the faces of all hollows of sys into patches.
func (l *plan) divide(sys *outline.Shaped, hollows []*hollow, a Accuracy) *outline.ShapedPatches {
	part, turn, _ := a.hollowGrain()
	f := l.faces(hollows)
	grains := map[*hollow]*grained{}
	for _, h := range hollows {
		g := &grained{}
		for _, w := range h.walls {
			g.around += l.contours[w].Loop.Perimeter()
		}
		for _, i := range h.parts {
			g.Discs = append(g.Discs, l.disc(i, strokes(l.contours[l.skinOf(i)].Loop)))
		}
		grains[h] = g
	}
	on, usual := 0, 0.0 // Patches asks for contours in turn
	return sys.Patches(func(contour int) bool {
		if f.of[contour] == nil {
			return false
		}
		if on, usual = contour, l.contours[contour].Loop.Perimeter()/part; f.place[contour] < 0 {
			usual = grains[f.of[on]].around / turn
		}
		return true
	}, func(z complex128) float64 { return grains[f.of[on]].Longest(z, usual, f.place[on]) })
}

// disc is part i with patches (or strokes) of its outside.
func (l *plan) disc(i int, rim []gas.Segment) gas.Disc {
	d := gas.Disc{C: l.at[i], Rim: rim}
	for k := range rim {
		s := &rim[k]
		s.A, s.B, s.Centre = s.A-d.C, s.B-d.C, s.Centre-d.C
		d.R = math.Max(d.R, cmplx.Abs(s.A))
		if s.R > 0 {
			d.R = math.Max(d.R, cmplx.Abs(s.Centre)+s.R)
		}
	}
	return d
}

func strokes(l outline.Loop) []gas.Segment {
	out := make([]gas.Segment, len(l))
	for i := range l {
		out[i] = gas.Segment{A: l[i].From, B: l[i].To, Centre: l[i].Centre, R: l[i].R}
	}
	return out
}

// segment is a patch from a to b of a loop, moved outwards by off.
func segment(l outline.Loop, a, b complex128, off float64) gas.Segment {
	const near = 1e-7 // of a radius
	for i := range l {
		s := &l[i]
		if s.R == 0 || math.Abs(cmplx.Abs(a-s.Centre)-s.R) > near*s.R || math.Abs(cmplx.Abs(b-s.Centre)-s.R) > near*s.R {
			continue
		}
		if m := (a+b)/2 - s.Centre; cmplx.Abs(s.At(0.5)-s.Centre-m*complex(s.R/cmplx.Abs(m), 0)) > cmplx.Abs(s.From-s.At(0.5)) {
			continue // another arc about the same centre
		}
		r := complex((s.R+off)/s.R, 0)
		return gas.Segment{A: s.Centre + r*(a-s.Centre), B: s.Centre + r*(b-s.Centre), Centre: s.Centre, R: s.R + off}
	}
	n := -1i * (b - a) * complex(off/cmplx.Abs(b-a), 0)
	return gas.Segment{A: a + n, B: b + n}
}

// look lets the surfaces of the hollow see each other; false if stop asked for an end. Parts are seen as drawn, clearances and all.
func (h *hollow) look(l *plan, p *outline.ShapedPatches, points, threads int, stop func() bool) bool {
	var discs []gas.Disc
	var eps []float64
	h.at = nil
	take := func(contour int, off, e float64) (out []gas.Segment, blank []bool) {
		for k, c := range p.Contour {
			if c == contour {
				out = append(out, segment(l.contours[c].Loop, p.A[k], p.B[k], off))
				blank = append(blank, l.blank(c, (p.A[k]+p.B[k])/2))
				h.at, eps = append(h.at, k), append(eps, e)
			}
		}
		for k := range out { // neighbours meet exactly
			if next := (k + 1) % len(out); next > 0 || !l.contours[contour].String {
				out[next].A = out[k].B
			}
		}
		return out, blank
	}
	for _, i := range h.parts {
		c, off := l.skinOf(i), 0.0
		if l.hull == nil {
			off = (l.outer(i).Perimeter() - l.contours[c].Loop.Perimeter()) / (2 * math.Pi)
		}
		rim, blank := take(c, off, l.p.Parts[i].Emissivity)
		d := l.disc(i, rim)
		d.Blank = blank
		discs = append(discs, d)
	}
	var out gas.Outline
	for _, w := range h.walls {
		s, _ := take(w, 0, h.eps)
		out.Segments = append(out.Segments, s...)
	}
	e := h.seen
	if e == nil || !e.Alike(discs, out, points) {
		if e = gas.NewEnclosure(discs, out, points, threads, stop); e == nil {
			return false
		}
	}
	h.ex = gas.NewExchange(e, eps)
	n := e.Len()
	h.t, h.e, h.base, h.out = make([]float64, n), make([]float64, n), make([]float64, n), make([]float64, n)
	return true
}

// blank tells whether the contour faces the surroundings of an open bundle at z.
func (l *plan) blank(contour int, z complex128) bool {
	c := &l.contours[contour]
	return l.hull != nil && !c.String && c.Sides != nil && c.Sides[nearestStroke(c.Loop, z)].Kind != outline.Covered
}

// nearestStroke is the one that z lies on.
func nearestStroke(l outline.Loop, z complex128) (on int) {
	least := math.Inf(1)
	for i := range l {
		if d := cmplx.Abs(l[i].Nearest(z) - z); d < least {
			on, least = i, d
		}
	}
	return on
}

// gather sets to to what of x belongs to the hollow.
func (h *hollow) gather(to, x []float64) {
	for k, i := range h.at {
		to[k] = x[i]
	}
}

func (h *hollow) scatter(to, x []float64) {
	for k, i := range h.at {
		to[i] = x[k]
	}
}
