package rating

import (
	"fmt"
	"math"
	"strings"

	"packrise/solver/heat"
	"packrise/solver/outline"
	"packrise/solver/section"
)

// formOf is the outline of a conductor that is not round.
func formOf(c *section.Conductor) heat.Form {
	f := heat.Form{W: c.WidthMM.V * mm, H: c.HeightMM.V * mm, R: c.RadiusMM.V * mm, Angle: c.AngleDeg.V * math.Pi / 180, Corner: c.CornerMM.V * mm}
	f.Kind = map[string]heat.FormKind{section.BarShape: heat.Bar, section.SectorShape: heat.Sector}[c.Shape]
	return f
}

// MetalArea is the area (m²) of the outline of a conductor that is not round, 0 of a round one or if it lacks a size: what stands for the metal's area where
// neither size nor area_mm2 is given.
func MetalArea(c *section.Conductor) float64 {
	bar := c.Shape == section.BarShape && c.WidthMM.OK && c.HeightMM.OK
	sector := c.Shape == section.SectorShape && c.AngleDeg.OK && c.RadiusMM.OK
	if !bar && !sector {
		return 0
	}
	f := formOf(c)
	area, _ := f.Loop(0, 0).Area()
	return area
}

// form is the outline of a flat enclosure.
func (e *enclosure) form(turn float64) heat.Form {
	return heat.Form{Kind: heat.Flat, W: e.w, H: e.h, Turn: turn}
}

// loop is the inside of a round or flat enclosure grown by t.
func (e *enclosure) loop(t float64) outline.Loop {
	f := heat.Form{}
	if e.flat {
		f = e.form(0)
	}
	return f.Loop(e.radius, t)
}

// loop is the outline of the part's core about its place, grown by t.
func (p *item) loop(t float64) outline.Loop { return p.form.Loop(p.radius, t) }

// outside is the part's outer outline about its place.
func (p *item) outside() outline.Loop { return p.loop(p.outer() - p.radius) }

// least is the smaller side of the upright rectangle round the part.
func (p *item) least() float64 {
	lo, hi := p.outside().Bounds()
	return min(real(hi-lo), imag(hi-lo))
}

// extent words the outer size of a part that is not round.
func (p *item) extent() string {
	f := p.form
	f.Turn = 0
	lo, hi := f.Loop(p.radius, p.outer()-p.radius).Bounds()
	return fmt.Sprintf("%s × %s mm", digits(real(hi-lo)/mm, 2), digits(imag(hi-lo)/mm, 2))
}

// shape gives a core the outline of its conductor, which has to hold the metal.
func (r *resolver) shape(it *item, c *section.Conductor) {
	it.form = formOf(c)
	l := it.form.Loop(0, 0)
	it.radius = l.Reach()
	if area, _ := l.Area(); it.wire.AreaM2 > area*1.01 {
		r.refuse(&section.Problem{
			Rule: "too-much-metal", IDs: []string{it.id}, Key: "conductor",
			What: fmt.Sprintf("%s: %s mm² of metal do not fit into an outline of %s mm²", it.id, digits(it.wire.AreaM2/mm/mm, 2), digits(area/mm/mm, 2)),
			Do:   "make the outline larger, or the size smaller",
		})
	}
}

// formed tells whether one of the parts, or what they lie in, is neither round nor a wireway.
func (s *scene) formed(in int, of []int) bool {
	if in < 0 && s.holder.flat || in >= 0 && s.parts[in].inside.flat {
		return true
	}
	for _, i := range of {
		if s.parts[i].form.Kind != heat.Disc {
			return true
		}
	}
	return false
}

// overlapsOfLoops reports every overlap of outlines deeper than nudge. It tells whether there was one.
func (r *resolver) overlapsOfLoops(in int, of []int) bool {
	s := &r.scene
	found := false
	report := func(i, j int, d float64) {
		if d > nudge {
			r.refuse(r.overlapProblem(in, of, i, j, d))
			found = true
		}
	}
	l := make([]outline.Loop, len(of))
	for k, i := range of {
		p := &s.parts[i]
		l[k] = p.outside().Placed(0, complex(p.x, p.y))
		for m := range k {
			q := &s.parts[of[m]]
			if math.Hypot(p.x-q.x, p.y-q.y) < p.outer()+q.outer() {
				report(m, k, -l[k].Gap(l[m])/mm)
			}
		}
		if room := s.room(in); room != nil {
			report(k, -1, -l[k].Room(room)/mm)
		}
	}
	return found
}

// room is the inside that parts lie in, in their frame; nil in the open.
func (s *scene) room(in int) outline.Loop {
	e := &s.holder
	switch {
	case in >= 0: // turned, like the places of the parts
		return s.parts[in].loop(0)
	case e.kind == section.Wireway:
		return outline.Box(e.w, e.h, 0)
	case e.kind == section.Jacket || e.kind == section.Conduit:
		return e.loop(0)
	}
	return nil
}

// around is the circumference of a section that is no wireway.
func (s *scene) around() float64 {
	h := &s.holder
	if s.hulled() {
		perimeter, _ := s.hull()
		return perimeter
	}
	if h.kind == section.NoHolder {
		for i := range s.parts {
			if s.parts[i].in < 0 {
				return s.parts[i].outside().Perimeter()
			}
		}
	}
	return h.loop(thickness(h.layers)).Perimeter()
}

// loops are the outer outlines of a core and its layers, mm.
func loops(loop func(t float64) outline.Loop, layers []layer, at section.Point) [][]section.Point {
	const sag = 2e-3 * mm
	out := make([][]section.Point, 0, len(layers)+1)
	t := 0.0
	for i := 0; i <= len(layers); i++ {
		var line []section.Point
		for _, z := range loop(t).Polygon(sag) {
			line = append(line, section.Point{X: at.X + real(z)/mm, Y: at.Y + imag(z)/mm})
		}
		out = append(out, line)
		if i < len(layers) {
			t += layers[i].thickness
		}
	}
	return out
}

// formNote says what stands for what is not round: for the film of an outside, and for the skin effect of bars. For the plates that a bar's faces are, the
// common correlations (4th roots of temperature difference over length, handbooks on heat transfer, from memory) give what is said of the film.
func (s *scene) formNote() string {
	formed, flat := s.holder.flat, s.holder.flat
	for i := range s.parts {
		p := &s.parts[i]
		if (s.holder.kind == section.NoHolder || s.apart()) && p.in < 0 && p.form.Kind != heat.Disc {
			lo, hi := p.outside().Bounds()
			formed, flat = true, flat || real(hi-lo) > 2*imag(hi-lo)
		}
	}
	var notes []string
	if formed && s.out.free {
		n := "the film of the outside, which is not round, is that of a cylinder of the same circumference"
		if flat {
			n += ": lying flat, it has about a fifth less convection, and its rise may be a tenth larger"
		}
		notes = append(notes, n)
	}
	if y, id := s.barSkin(); y > 0.0005 {
		notes = append(notes, fmt.Sprintf("the skin effect of bars is that of a round conductor of the same resistance, which is more than a flat one has: it adds %s %% to %s", digits(100*y, 1), id))
	}
	return strings.Join(notes, "; ")
}

// barSkin is the largest skin effect factor of a bar.
func (s *scene) barSkin() (most float64, id string) {
	for i := range s.parts {
		p := &s.parts[i]
		if p.metal && p.form.Kind == heat.Bar && p.load != nil && !p.load.HeatWM.OK {
			if y := skin(p.wire.R20, p.load.FrequencyHz.V); y > most {
				most, id = y, p.id
			}
		}
	}
	return most, id
}
