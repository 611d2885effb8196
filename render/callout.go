package render

import (
	"image/color"
	"math"
	"slices"
	"sort"
	"strings"
	"sync"

	"packrise/solver/section"
)

// callout is a label outside the section with its leader. Pixels.
type callout struct {
	head  string
	sub   []string // lines below
	color color.NRGBA
	path  []section.Point
	box   box
	align float64 // 0 left, 0.5 middle, 1 right within the box
}

// wanted is a reading that deserves a label outside.
type wanted struct {
	id    string
	wall  bool // of the holder
	head  string
	sub   []string
	color color.NRGBA
}

// Sizes of callouts at device scale 1.
const (
	calloutLine = 16 // from one line to the next
	leaderSlack = 0.35
	mostCalls   = 5
)

// callouts labels the governing, the hottest and the worst parts outside the section.
func (p *sectionPainter) callouts() {
	for _, c := range p.called {
		p.drawCallout(c)
	}
}

// planCallouts chooses texts and places, the most important first, before anything is drawn.
func (p *sectionPainter) planCallouts() {
	if p.s.Stale {
		return
	}
	p.outside = map[string]bool{}
	for _, w := range p.wantCallouts() {
		p.outside[w.id] = p.planCallout(w)
	}
}

// planCallout tries straight leaders, then ones through the gaps, each with the whole text, a narrower one and the head alone.
func (p *sectionPainter) planCallout(w wanted) bool {
	straight, bent := p.leadsOf(w)
	full := w.sub
	narrow := strings.Split(strings.Join(full, ""), ", ")
	for _, leads := range []func() []lead{func() []lead { return straight }, bent} {
		ways := leads()
		for _, w.sub = range [][]string{full, narrow} {
			if p.placeCallout(w, ways) {
				return true
			}
		}
	}
	w.sub = nil
	return p.placeCallout(w, append(straight, bent()...))
}

// wantCallouts lists what deserves a label: what governs, what is over its limit (worst first), the hottest conductor.
func (p *sectionPainter) wantCallouts() []wanted {
	rs := append([]section.Reading(nil), p.s.Readings...)
	rank := func(r section.Reading) int {
		switch {
		case r.Governs:
			return 0
		case r.Over():
			return 1
		case r.Hottest:
			return 2
		}
		return 3
	}
	sort.SliceStable(rs, func(i, j int) bool {
		a, b := rank(rs[i]), rank(rs[j])
		if a != b || a != 1 {
			return a < b
		}
		ki, _ := rs[i].MarginK()
		kj, _ := rs[j].MarginK()
		return ki < kj
	})
	most := mostCalls
	if p.frame.y1-p.frame.y0 < 240*p.k {
		most = 2
	}
	var out []wanted
	for _, r := range rs {
		if rank(r) == 3 || len(out) == most {
			break
		}
		out = append(out, p.wording(r))
	}
	return out
}

func (p *sectionPainter) wording(r section.Reading) wanted {
	w := wanted{id: r.ID, wall: ofHolder(r, p.s.Shapes), head: readingName(r, p.s) + " " + besideLimit(r) + " °C", color: p.pal.Ink}
	_, limited := r.MarginK()
	switch {
	case r.Over():
		w.color, w.sub = p.pal.Over, []string{marginText(r)}
	case r.Governs && limited:
		w.sub = []string{"governs, " + marginText(r)}
	case r.Hottest && limited:
		w.sub = []string{"hottest, " + marginText(r)}
	case r.Hottest:
		w.sub = []string{"hottest"}
	}
	return w
}

// leadsOf returns the ways that a leader can take from what is labelled: straight ones, and those through the gaps, which take
// longer to find.
func (p *sectionPainter) leadsOf(w wanted) (straight []lead, bent func() []lead) {
	slack := leaderSlack * p.k
	bent = func() []lead { return nil }
	if w.wall {
		return p.wallLeads(w), bent
	}
	at, id := -1, w.id
	if owner, _ := layerOf(id, p.s.Shapes); owner != nil && p.partOf(id) == nil {
		id = owner.ID // a cable's jacket is labelled from the cable's outline
	}
	for i, s := range p.shapes {
		if s.ID == id && !s.Unset && p.inSight(p.disc(s)) {
			at = i
		}
	}
	if at < 0 {
		return nil, bent
	}
	g, i := p.gapsRound(p.shapes[at].ID)
	others := append(append([]disc(nil), g.discs[:i]...), g.discs[i+1:]...)
	return straightLeads(g.discs[i], others, slack), sync.OnceValue(func() []lead {
		g.build()
		return append(g.straight(i), g.from(i)...)
	})
}

// partOf returns the part of an id, nil for a layer.
func (p *sectionPainter) partOf(id string) *section.Shape {
	for i := range p.shapes {
		if p.shapes[i].ID == id {
			return &p.shapes[i]
		}
	}
	return nil
}

// gapsRound returns the room round a part and the part's number in it: its neighbours, and those of the cables that it lies in,
// but not these cables themselves, which a leader may cross. Parts side by side share it.
func (p *sectionPainter) gapsRound(id string) (g *gaps, number int) {
	parent := parentID(id)
	room := p.rooms[parent]
	if room == nil {
		room = &gapRoom{number: map[string]int{}}
		var discs []disc
		for _, s := range p.shapes {
			up := parentID(s.ID)
			if s.ID == parent || isInside(parent, s.ID) || up != "" && up != parent && !isInside(parent, up) {
				continue
			}
			room.number[s.ID] = len(discs)
			discs = append(discs, p.core(s))
		}
		room.gaps = newGaps(discs, leaderSlack*p.k)
		p.rooms[parent] = room
	}
	return room.gaps, room.number[id]
}

// gapRoom is the room between the parts of one level, and their numbers in it.
type gapRoom struct {
	gaps   *gaps
	number map[string]int
}

// wallLeads start in the middle of a layer of the wall, or on the outer surface, and go straight outwards.
func (p *sectionPainter) wallLeads(w wanted) []lead {
	depth := 0.0 // below the outer surface
	if owner, i := layerOf(w.id, p.s.Shapes); owner != nil && w.id != "outside" {
		if r, ok := layerRing(*owner, i); ok {
			depth = (owner.OuterR() - (r.R0+r.R1)/2) * p.v.PxPerMM
		}
	}
	b := p.edge.box()
	if b.empty() {
		return nil
	}
	cx, cy := (b.x0+b.x1)/2, (b.y0+b.y1)/2
	if d, ok := p.bodyOf(w.id); ok {
		return ringLeads(d)
	}
	var out []lead
	for n := range headings {
		sin, cos := math.Sincos(2 * pi * float64(n) / headings)
		t := p.edge.leave(cx, cy, cos, sin) - depth
		out = append(out, lead{[]section.Point{{X: cx + t*cos, Y: cy + t*sin}}, cos, sin})
	}
	return out
}

// bodyOf finds, of bodies apart, a part of the one whose outside a reading is of: named in it, or that of the hottest conductor.
func (p *sectionPainter) bodyOf(id string) (d disc, ok bool) {
	if p.holder == nil || p.holder.Kind != section.Apart {
		return d, false
	}
	name, named := strings.CutPrefix(id, "outside of ")
	name, _, _ = strings.Cut(name, ", ")
	name, _, _ = strings.Cut(name, " and ")
	for _, s := range p.shapes {
		if s.Unset || s.Depth > 0 {
			continue
		}
		hot := slices.ContainsFunc(p.s.Readings, func(r section.Reading) bool { return r.Hottest && (r.ID == s.ID || isInside(r.ID, s.ID)) })
		if named && s.ID == name || !named && hot {
			return p.disc(s), true
		}
	}
	return d, false
}

// ringLeads start on a circle and go straight outwards.
func ringLeads(d disc) []lead {
	out := make([]lead, headings)
	for n := range out {
		sin, cos := math.Sincos(2 * pi * float64(n) / headings)
		out[n] = lead{[]section.Point{{X: d.x + d.r*cos, Y: d.y + d.r*sin}}, cos, sin}
	}
	return out
}

func (p *sectionPainter) calloutFonts(col color.NRGBA) (head, sub Font) {
	head = Font{Size: 13 * p.k, Bold: true, Color: col, AY: 0.5}
	sub = Font{Size: 12 * p.k, Color: col, AY: 0.5}
	return head, sub
}

func (p *sectionPainter) drawCallout(c callout) {
	for _, pen := range []Pen{{Width: 3.8 * p.k, Color: alpha(p.pal.Paper, 0.85), Round: true}, {Width: 1.3 * p.k, Color: p.pal.Ink, Round: true}} {
		for i, q := range c.path {
			if i == 0 {
				p.c.MoveTo(q.X, q.Y)
			} else {
				p.c.LineTo(q.X, q.Y)
			}
		}
		p.c.Stroke(pen)
	}
	p.c.Circle(c.path[0].X, c.path[0].Y, 3.2*p.k)
	p.c.Fill(p.pal.Paper)
	p.c.Circle(c.path[0].X, c.path[0].Y, 2.2*p.k)
	p.c.Fill(p.pal.Ink)
	head, sub := p.calloutFonts(c.color)
	head.AX, sub.AX = c.align, c.align
	x, y := c.box.x0+c.align*(c.box.x1-c.box.x0), c.box.y0+calloutLine*p.k/2
	p.write(c.head, x, y, head)
	for _, t := range c.sub {
		y += calloutLine * p.k
		p.write(t, x, y, sub)
	}
}
