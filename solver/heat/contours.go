package heat

import (
	"math"

	"packrise/solver/outline"
)

// parting keeps faces apart that touch, m: far less than counts, far more than rounding.
const parting = 10e-9

// plan lists the contours of a section: of parts and their rings, of its wall, and of what is exposed in an open bundle.
type plan struct {
	p        *Problem
	contours []outline.Contour
	first    []int // per part: contour of its core, −1 of a part that stays a piece; its rings' outsides follow
	skins    []int // per part: 1 where a skin of metal stands for a bare surface in an open bundle, whose outside follows that of the core
	metals   []int // parts of contours of metals, in the order of these
	wall     int   // contour of the wall's inside; of a bare part that of its core
	at       []complex128
	drawn    []bool       // per part: it is contours
	hull     outline.Loop // of an open bundle
}

// newPlan draws every face of the problem.
func newPlan(p *Problem) *plan {
	l := beginPlan(p)
	for i := range l.drawn {
		l.drawn[i] = true
	}
	return l.finish()
}

// newPlanAmong draws every face but those of round parts of the top level that nothing asks to be drawn.
func newPlanAmong(p *Problem) *plan {
	l := beginPlan(p)
	l.choose()
	return l.finish()
}

func beginPlan(p *Problem) *plan {
	n := len(p.Parts)
	l := &plan{p: p, first: make([]int, n), skins: make([]int, n), at: make([]complex128, n), drawn: make([]bool, n)}
	for i := range p.Parts {
		q := &p.Parts[i]
		l.at[i] = complex(q.X, q.Y)
		if q.In >= 0 {
			l.at[i] += l.at[q.In]
		}
	}
	return l
}

func (l *plan) finish() *plan {
	less := l.slack()
	for i := range l.first {
		l.first[i] = -1
		if l.drawn[i] {
			l.draw(i, less[i])
		}
	}
	switch l.p.Wall.Shape {
	case BarePart:
		l.bare()
	case Hull:
		l.drawHull()
	default:
		l.drawWall()
	}
	return l
}

// choose finds the parts that have to be contours, with everything that lies in the same part of the top level: what is not round, and what is exposed in
// an open bundle.
func (l *plan) choose() {
	parts := l.p.Parts
	not := make([]bool, len(parts))
	for i := range parts {
		not[l.top(i)] = not[l.top(i)] || parts[i].Form.Kind != Disc
	}
	if l.p.Wall.Shape == Hull {
		for _, i := range l.exposed() {
			not[i] = true
		}
	}
	for i := range parts {
		l.drawn[i] = not[l.top(i)]
	}
}

// top is the part of the top level that part i is or lies in.
func (l *plan) top(i int) int {
	for l.p.Parts[i].In >= 0 {
		i = l.p.Parts[i].In
	}
	return i
}

// skinOf is the contour of the outside of part i.
func (l *plan) skinOf(i int) int { return l.first[i] + len(l.p.Parts[i].Rings) + l.skins[i] }

// bounds is the outer boundary.
func (l *plan) bounds() outline.Loop {
	if l.hull != nil {
		return l.hull
	}
	return l.contours[len(l.contours)-1].Loop
}

// medium is the conductivity that part i lies in.
func (l *plan) medium(i int) float64 {
	if in := l.p.Parts[i].In; in >= 0 {
		return l.p.Parts[in].K
	}
	return l.p.MediumK
}

func thickness(rings []Ring) float64 {
	t := 0.0
	for _, r := range rings {
		t += r.Thickness
	}
	return t
}

// outer is the outside of part i as drawn.
func (l *plan) outer(i int) outline.Loop {
	q := &l.p.Parts[i]
	return q.Form.Loop(q.Radius, thickness(q.Rings)).Placed(0, l.at[i])
}

// squeeze thins rings to share of their thickness about a core of perimeter p and keeps their resistance.
func squeeze(rings []Ring, p, share float64) []Ring {
	if share == 1 {
		return rings
	}
	out := append([]Ring(nil), rings...)
	r, s := p/(2*math.Pi), p/(2*math.Pi)
	for i := range out {
		t := out[i].Thickness
		out[i].Thickness = t * share
		out[i].K *= math.Log((s+t*share)/s) / math.Log((r+t)/r)
		r, s = r+t, s+t*share
	}
	return out
}

// draw adds the contours of part i, whose outside is drawn in by less.
func (l *plan) draw(i int, less float64) {
	q := &l.p.Parts[i]
	l.first[i] = len(l.contours)
	whole := thickness(q.Rings)
	core, rings, t := q.Radius, q.Rings, 0.0
	if whole > 0 {
		rings = squeeze(q.Rings, q.Form.Loop(q.Radius, 0).Perimeter(), 1-less/whole)
	} else {
		t = -less
	}
	c := outline.Contour{In: q.K}
	switch q.Core {
	case Metal:
		c.In = math.Inf(1)
		l.metals = append(l.metals, i)
		if len(rings) == 0 && q.In < 0 && l.p.Wall.Shape == Hull {
			l.skin(i, &c, t)
		}
	case FixedBore:
		c.In, c.Held, c.Fixed = math.Inf(1), true, q.Fixed
	}
	for _, r := range rings {
		c.Out = r.K
		c.Loop = q.Form.Loop(core, t).Placed(0, l.at[i])
		l.contours = append(l.contours, c)
		c = outline.Contour{In: r.K}
		t += r.Thickness
	}
	c.Out = l.medium(i)
	c.Loop = q.Form.Loop(core, t).Placed(0, l.at[i])
	l.contours = append(l.contours, c)
}

// skin of the metal that stands for the surface of bare metal in the open, as a share of its size, and its conductivity.
const (
	skinShare = 0.01
	skinK     = 400
)

// skin begins bare metal with what lies under its skin; c becomes the skin's outside.
func (l *plan) skin(i int, c *outline.Contour, t float64) {
	q := &l.p.Parts[i]
	lo, hi := q.Form.Loop(q.Radius, t).Bounds()
	c.Loop = q.Form.Loop(q.Radius, t-skinShare*math.Min(real(hi-lo), imag(hi-lo))).Placed(0, l.at[i])
	c.Out = skinK
	l.contours = append(l.contours, *c)
	l.skins[i] = 1
	*c = outline.Contour{In: skinK}
}

// bare makes the outside of the only part of the top level that of the section.
func (l *plan) bare() {
	i := 0
	for l.p.Parts[i].In >= 0 {
		i++
	}
	q := &l.p.Parts[i]
	l.wall = l.first[i]
	n := len(q.Rings)
	c := l.contours[l.wall+n]
	if n == 0 && math.IsInf(c.In, 1) {
		lo, hi := c.Loop.Bounds()
		core := q.Form.Loop(q.Radius, -skinShare*math.Min(real(hi-lo), imag(hi-lo))).Placed(0, l.at[i])
		l.contours[l.wall].Loop, l.contours[l.wall].Out = core, skinK
		c.In, c.Held = skinK, false
	} else {
		l.contours = append(l.contours[:l.wall+n], l.contours[l.wall+n+1:]...)
		for j := range l.first {
			if l.first[j] > l.wall+n {
				l.first[j]--
			}
		}
	}
	c.Sides = []outline.Side{{Film: l.p.Wall.Film, Temp: l.p.Wall.Ambient}}
	l.p.Wall.Against.cut(&c)
	l.contours = append(l.contours, c)
}

// wallLoop is the wall's inside grown by t.
func wallLoop(w *Wall, t float64) outline.Loop {
	switch w.Shape {
	case Rect:
		return outline.Box(w.W, w.H, t)
	case FlatWall:
		return outline.Flat(w.W, w.H, t)
	}
	return outline.Circle(w.R + t)
}

// drawWall adds the contours of the wall. The clearance widens its inside at the cost of its layers, whose resistance stays, and of the film's
// area, which stays as well.
func (l *plan) drawWall() {
	w := &l.p.Wall
	more := l.widen()
	whole := thickness(w.Rings)
	rings := w.Rings
	if whole > 0 {
		rings = squeeze(w.Rings, wallLoop(w, 0).Perimeter(), 1-more/whole)
	}
	l.wall = len(l.contours)
	c, t := outline.Contour{In: l.p.MediumK}, more
	for _, r := range rings {
		c.Out, c.Loop = r.K, wallLoop(w, t)
		l.contours = append(l.contours, c)
		c = outline.Contour{In: r.K}
		t += r.Thickness
	}
	c.Loop, c.Sides = wallLoop(w, t), w.outlineSides(wallLoop(w, whole).Perimeter()/wallLoop(w, t).Perimeter())
	w.Against.cut(&c)
	l.contours = append(l.contours, c)
}

// widen is by how much the clearance moves the wall's inside outwards.
func (l *plan) widen() float64 {
	more := l.p.Clearance / 2
	if t := thickness(l.p.Wall.Rings); t > 0 {
		return math.Min(more, t/3)
	}
	return more
}

// outlineSides are the wall's sides in the order of a box's strokes, films times share.
func (w *Wall) outlineSides(share float64) []outline.Side {
	if w.Shape != Rect {
		return []outline.Side{{Film: w.Film * share, Temp: w.Ambient}}
	}
	var out []outline.Side
	for _, i := range boxOrder {
		s := &w.Sides[i]
		to := outline.Side{Film: w.Film * share, Temp: w.Ambient}
		switch {
		case s.Kind == Insulated:
			to = outline.Side{Kind: outline.Insulated}
		case s.Kind == Held:
			to = outline.Side{Kind: outline.Held, Temp: s.Temp}
		case s.Film != 0:
			to = outline.Side{Film: s.Film * share, Temp: s.Temp}
		}
		out = append(out, to)
	}
	return out
}

// boxOrder is that of the strokes of outline.Box.
var boxOrder = [4]int{Right, Top, Left, Bottom}

// slack is by how much each contour's outside has to be drawn in: for the clearance, for contacts, and 10 µm between bare metals (see metalGap).
func (l *plan) slack() []float64 {
	p := l.p
	less := make([]float64, len(p.Parts))
	for i := range p.Parts {
		less[i] = l.clearance(i)
	}
	add := make([]float64, len(p.Parts))
	for i := range p.Parts {
		if !l.drawn[i] || p.Parts[i].In < 0 && p.Wall.Shape == BarePart {
			continue
		}
		for j := range i {
			if l.drawn[j] && p.Parts[j].In == p.Parts[i].In {
				short := l.apart(p.Parts[i].metalSkin() && p.Parts[j].metalSkin()) - l.between(i, j) - less[i] - less[j]
				add[i], add[j] = math.Max(add[i], short/2), math.Max(add[j], short/2)
			}
		}
		if room, metal := l.around(i); room != nil {
			add[i] = math.Max(add[i], l.apart(metal && p.Parts[i].metalSkin())-l.outer(i).Room(room)-less[i])
		}
	}
	for i := range less {
		less[i] += math.Min(add[i], 2*metalGap)
	}
	return less
}

// clearance is what part i gives for the clearance.
func (l *plan) clearance(i int) float64 {
	if q := &l.p.Parts[i]; q.In == -1 {
		return math.Min(l.p.Clearance/2, thickness(q.Rings)/3)
	}
	return 0
}

// slackOf is by how much a piece at z has to be drawn in to keep off the contours.
func (l *plan) slackOf(i int, z complex128) float64 {
	q := &l.p.Parts[i]
	less, add := l.clearance(i), 0.0
	r := q.Radius + thickness(q.Rings) - less
	for j := range l.p.Parts {
		if d := &l.p.Parts[j]; l.drawn[j] && d.In == -1 {
			near := l.contours[l.skinOf(j)].Loop.Distance(z)
			add = math.Max(add, l.apart(q.metalSkin() && d.metalSkin())-(near-r))
		}
	}
	if room, metal := l.around(i); room != nil {
		add = math.Max(add, l.apart(metal && q.metalSkin())-(room.Distance(z)-r))
	}
	return less + math.Min(add, 2*metalGap)
}

func (l *plan) apart(metals bool) float64 {
	if metals {
		return metalGap
	}
	return 2 * parting
}

// between is the gap between two parts, from their circumscribed rectangles if that is enough.
func (l *plan) between(i, j int) float64 {
	a, b := l.outer(i), l.outer(j)
	al, ah := a.Bounds()
	bl, bh := b.Bounds()
	x := math.Max(real(al)-real(bh), real(bl)-real(ah))
	y := math.Max(imag(al)-imag(bh), imag(bl)-imag(ah))
	if far := math.Max(x, y); far > 2*metalGap {
		return far
	}
	return a.Gap(b)
}

// around is what part i lies in, nil in the open, and whether its inside is metal.
func (l *plan) around(i int) (outline.Loop, bool) {
	if in := l.p.Parts[i].In; in >= 0 {
		q := &l.p.Parts[in]
		return q.Form.Loop(q.Radius, 0).Placed(0, l.at[in]), len(q.Rings) > 0 && q.Rings[0].K > metalK
	}
	w := &l.p.Wall
	if w.Shape == Hull || w.Shape == BarePart {
		return nil, false
	}
	return wallLoop(w, l.widen()), len(w.Rings) > 0 && w.Rings[0].K > metalK
}

// metalSkin tells whether the part's outermost layer is metal.
func (q *Part) metalSkin() bool {
	if n := len(q.Rings); n > 0 {
		return q.Rings[n-1].K > metalK
	}
	return q.Core == Metal || q.K > metalK
}
