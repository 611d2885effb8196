package rating

import (
	"fmt"
	"math"

	"packrise/solver/heat"
	"packrise/solver/outline"
	"packrise/solver/section"
)

// rests is what a part of the outside rests against, nil for nothing or bodies apart.
func (s *scene) rests() *section.Against {
	if s.apart() || s.holder.kind == section.Wireway {
		return nil
	}
	return s.doc.Surroundings.Against
}

// heldAround tells whether all of the outside is held at a temperature by what it rests against.
func (s *scene) heldAround() bool {
	a := s.rests()
	return a != nil && a.Share >= 1
}

// openShare is the part of the perimeter that has a film.
func (s *scene) openShare() float64 {
	if a := s.rests(); a != nil {
		return 1 - a.Share
	}
	return 1
}

// lean puts what the outside rests against on a heat problem's wall.
func (s *scene) lean(w *heat.Wall) {
	a := s.rests()
	switch {
	case a == nil:
	case s.heldAround():
		w.Film, w.Ambient = math.Inf(1), a.Is.FixedC
	default:
		w.Against = heat.Against{Share: a.Share, At: a.AtDeg * math.Pi / 180, Held: a.Is.Kind == section.SideFixed, Temp: a.Is.FixedC}
	}
}

// lit is what the sun's absorptivity is raised by: it falls on the open part over the width that this shows from above, and is reckoned as spread over it.
// The outline counts as round.
func (s *scene) lit() float64 {
	a := s.rests()
	if a == nil {
		return 1
	}
	half, mid := math.Pi*a.Share, a.AtDeg*math.Pi/180
	return (1 - (upward(mid+half)-upward(mid-half))/2) / (1 - a.Share)
}

// upward is the integral of the sine over angles from 0, where it is above 0: twice the share of the width that an arc shows from above.
func upward(angle float64) float64 {
	turns := math.Floor(angle / (2 * math.Pi))
	if rest := angle - 2*math.Pi*turns; rest < math.Pi {
		return 2*turns + 1 - math.Cos(rest)
	}
	return 2*turns + 2
}

// restText tells in words what the outside rests against: "a quarter of the outside against an insulating floor".
func (s *scene) restText() string {
	a := s.rests()
	if a == nil {
		return ""
	}
	return shareWord(a.Share) + " of the outside against " + leaning(a)
}

func shareWord(share float64) string {
	words := map[float64]string{0.25: "a quarter", 0.5: "half", 0.75: "three quarters", 1: "all"}
	if w, ok := words[share]; ok {
		return w
	}
	return digits(100*share, 1) + " %"
}

// leaning names what the outside rests against by where it is.
func leaning(a *section.Against) string {
	what := "wall"
	switch sin := math.Sin(a.AtDeg * math.Pi / 180); {
	case sin < -0.7:
		what = "floor"
	case sin > 0.7:
		what = "ceiling"
	}
	if a.Is.Kind == section.SideFixed {
		return fmt.Sprintf("a %s held at %s °C", what, digits(a.Is.FixedC, 1))
	}
	return "an insulating " + what
}

// restNote says what that means.
func (s *scene) restNote(a answered) string {
	r := s.rests()
	if r == nil || s.heldAround() {
		return ""
	}
	out := s.restText()
	switch {
	case r.Is.Kind != section.SideFixed:
		out += ": no heat passes there"
	case a.heat != nil && a.status != heat.ThermalRunaway:
		verb, w := "takes up", a.heat.AgainstOut
		if w < 0 {
			verb, w = "gives", -w
		}
		out += fmt.Sprintf(", which %s %s W/m", verb, digits(w, 2))
	}
	if s.out.free {
		out += "; the film of the whole circumference acts on the rest"
	}
	return out
}

// againstLine is where the outline rests against something, mm in the plane of the section, counterclockwise; nil for nowhere.
func (s *scene) againstLine() []section.Point {
	a := s.rests()
	if a == nil {
		return nil
	}
	outside, at := s.outsideLoop()
	if len(outside) == 0 {
		return nil
	}
	cut, in := outside.Rest(a.AtDeg*math.Pi/180, min(a.Share, 0.9999))
	first := 0
	for i := range in {
		if in[i] && !in[(i+len(in)-1)%len(in)] {
			first = i
		}
	}
	var line outline.Loop
	for k := range cut {
		if i := (first + k) % len(cut); in[i] {
			line = append(line, cut[i])
		}
	}
	const sag = 2e-3 * mm
	var out []section.Point
	for _, z := range append(line.Polygon(sag), line[len(line)-1].To) {
		out = append(out, section.Point{X: at.X + real(z)/mm, Y: at.Y + imag(z)/mm})
	}
	return out
}

// outsideLoop is the outer outline (m) about a point (mm) of the section, nil if there is none.
func (s *scene) outsideLoop() (outline.Loop, section.Point) {
	h := &s.holder
	switch {
	case s.hulled():
		var l outline.Loop
		line := hullLoop(s.drawn())
		for i, p := range line {
			q := line[(i+1)%len(line)]
			l = append(l, outline.Stroke{From: complex(p.X*mm, p.Y*mm), To: complex(q.X*mm, q.Y*mm)})
		}
		return l, section.Point{}
	case h.kind == section.NoHolder:
		for i := range s.parts {
			if p := &s.parts[i]; p.in < 0 && !p.unset && p.outer() > 0 {
				return p.outside(), p.abs
			}
		}
		return nil, section.Point{}
	}
	if !(h.radius > 0) {
		return nil, section.Point{}
	}
	return h.loop(thickness(h.layers)), s.origin
}

// restOut is the heat (W/m) that the open part gives off, and what goes into what the rest lies against; nil if it lies against nothing.
func (s *scene) restOut(h *heat.Result) map[string]float64 {
	switch {
	case s.rests() == nil:
		return nil
	case s.heldAround():
		return map[string]float64{"open": 0, "against": h.Released}
	}
	return map[string]float64{"open": h.Released - h.AgainstOut, "against": h.AgainstOut}
}
