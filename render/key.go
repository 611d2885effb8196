package render

// key says what hatching, dashed lines, heat-flow lines and shades mean, when there are any.
func (p *sectionPainter) key(after bar, hatched bool, lines []isoline, heat *flow, shaded bool) {
	var entries []keyEntry
	if hatched {
		entries = append(entries, keyEntry{"over its limit", p.hatchSwatch})
	}
	for _, l := range lines {
		if l.limit && len(l.lines) > 0 {
			entries = append(entries, keyEntry{"at a limit", p.limitSwatch})
			break
		}
	}
	if heat != nil && len(heat.lines) > 0 {
		entries = append(entries, keyEntry{heat.keyText(), p.flowSwatch})
	}
	p.placeKey(after, entries)
	if shaded {
		p.placeKey(after, []keyEntry{{"shaded: share of the rise of " + p.s.Heated, p.shadeSwatch}})
	}
}

// placeKey writes entries at the bottom beside the scale in mm, else in another corner that is free.
func (p *sectionPainter) placeKey(after bar, entries []keyEntry) {
	wide := 0.0
	for i, e := range entries {
		if i > 0 {
			wide += keyGap * p.k
		}
		wide += p.keyWidth(e)
	}
	left := after.x + max(after.long, 40*p.k) + 26*p.k
	high, low := p.frame.y0+15*p.k, p.frame.y1-15*p.k
	for _, at := range [][2]float64{{left, low}, {p.frame.x1 - wide - 12*p.k, low}, {12 * p.k, high}, {p.frame.x1 - wide - 12*p.k, high}} {
		b := box{at[0], at[1] - 7*p.k, at[0] + wide, at[1] + 7*p.k}
		if wide > 0 && b.within(p.frame) && !p.edge.meetsBox(b) && p.isFree(b) {
			p.drawKey(entries, at[0], at[1])
			p.taken = append(p.taken, b)
			return
		}
	}
}

// keyEntry is one sample and its meaning.
type keyEntry struct {
	text   string
	swatch func(box)
}

// Widths in a key at device scale 1: of a sample, between it and its text, between entries.
const (
	keySwatch = 22
	keySpace  = 6
	keyGap    = 18
)

func (p *sectionPainter) keyWidth(e keyEntry) float64 {
	return (keySwatch+keySpace)*p.k + p.c.MeasureText(e.text, p.barFont())
}

func (p *sectionPainter) drawKey(entries []keyEntry, x, y float64) {
	f := p.barFont()
	f.AY = 0.5
	for _, e := range entries {
		e.swatch(box{x, y - 6*p.k, x + keySwatch*p.k, y + 6*p.k})
		p.write(e.text, x+(keySwatch+keySpace)*p.k, y, f)
		x += p.keyWidth(e) + keyGap*p.k
	}
}

func (p *sectionPainter) hatchSwatch(b box) {
	p.hatch(b, func(x, y, dx, dy float64) []span { return across(b, x, y, dx, dy) })
	rectangle(p.c, b.x0, b.y0, b.x1-b.x0, b.y1-b.y0)
	p.c.Stroke(Pen{Width: p.k, Color: p.pal.Quiet})
}

func (p *sectionPainter) limitSwatch(b box) {
	y := (b.y0 + b.y1) / 2
	line(p.c, b.x0, y, b.x1, y, Pen{Width: 1.6 * p.k, Color: overOnMap, Dash: []float64{6 * p.k, 3 * p.k}})
}
