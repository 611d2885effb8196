package rating

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"packrise/solver/heat"
	"packrise/solver/section"
)

// surroundingsText tells the surroundings in words, without the ambient: "still air, outside emissivity 0.25".
func (s *scene) surroundingsText() string {
	d := s.doc.Surroundings
	w := []string{s.kindText()}
	say := func(format string, args ...any) { w = append(w, fmt.Sprintf(format, args...)) }
	if s.out.free && s.radiates() {
		say("outside emissivity %s", s.emissivities())
	}
	if d.AltitudeM.V != 0 {
		say("altitude %s m", digits(d.AltitudeM.V, 0))
	}
	if d.RadiantC.OK && d.RadiantC != d.AmbientC {
		say("radiating to %s °C", digits(d.RadiantC.V, 1))
	}
	if d.Run == section.Vertical {
		say("vertical run of %s m", digits(d.HeightM.V, 2))
	}
	if d.SunWM2.V > 0 {
		say("sun of %s W/m²", digits(d.SunWM2.V, 0))
	}
	if n := s.restText(); n != "" {
		say("%s", n)
	}
	if d.Wet {
		say("wet")
	}
	return strings.Join(w, ", ")
}

// emissivities are those of the outsides in words: "0.9", "0.08 to 0.9".
func (s *scene) emissivities() string {
	low, high := s.out.coat.emissivity, s.out.coat.emissivity
	for k := range s.bodies {
		e := s.bodies[k].coat.emissivity
		low, high = min(low, e), max(high, e)
	}
	a, b := digits(low, 2), digits(high, 2)
	if a == b {
		return a
	}
	return a + " to " + b
}

// kindText tells the kind with what makes it up.
func (s *scene) kindText() string {
	d := s.doc.Surroundings
	flow := fmt.Sprintf("moving at %s m/s %s the run", digits(d.AirSpeedMS.V, 2), s.flow())
	switch d.Kind {
	case section.FixedWall:
		return "outside held at the ambient"
	case section.FixedFilm:
		return fmt.Sprintf("fixed film of %s W/m²K", digits(s.filmW, 2))
	case section.MovingAir:
		return "air " + flow
	case section.Insulation:
		return fmt.Sprintf("wrapped in %s mm of %s in still air", digits(d.Wrap.ThicknessMM, 1), s.wrapName())
	case section.Buried:
		return fmt.Sprintf("buried %s m deep in soil of %s W/mK", digits(d.DepthM.V, 2), digits(d.SoilWMK.V, 2))
	case section.Water:
		if d.AirSpeedMS.V > 0 {
			return "water " + flow
		}
		return "still water"
	case section.Vacuum:
		return "vacuum"
	}
	return "still air"
}

// flow is the word for how air or water moves.
func (s *scene) flow() string {
	if s.along() {
		return section.Along
	}
	return section.Across
}

// radiates tells whether heat radiation leaves the outside.
func (s *scene) radiates() bool {
	k := s.doc.Surroundings.Kind
	return k != section.Buried && k != section.Water
}

// wrapName is what the wrap is called.
func (s *scene) wrapName() string {
	id := s.doc.Surroundings.Wrap.Material
	for _, m := range append(s.holder.layers[:len(s.holder.layers):len(s.holder.layers)], s.topLayers()...) {
		if m.id == id {
			return m.material.name
		}
	}
	return id
}

// topLayers are those of the only part of a section without a holder.
func (s *scene) topLayers() []layer {
	if s.holder.kind != section.NoHolder {
		return nil
	}
	for i := range s.parts {
		if s.parts[i].in < 0 {
			return s.parts[i].layers
		}
	}
	return nil
}

// weatherNotes say which formulas made the film, what they assume and where they are out of their range.
func (s *scene) weatherNotes(a answered) []string {
	if !s.out.free || a.heat == nil || a.status == heat.ThermalRunaway {
		return nil
	}
	var by, out []string
	add := func(to *[]string, list []string) {
		for _, w := range list {
			if !slices.Contains(*to, w) {
				*to = append(*to, w)
			}
		}
	}
	for i := range s.out.n {
		if s.out.open[i] {
			add(&by, a.films[i].at.By)
			add(&out, a.films[i].at.Notes)
		}
	}
	if len(by) == 0 {
		return nil
	}
	if s.doc.Surroundings.Kind != section.Vacuum && s.radiates() {
		by = append(by, "radiation")
	}
	first := "outside film by " + strings.Join(by, "; ")
	return append(append([]string{first}, s.assumedOutside()...), out...)
}

// assumedOutside says what nobody wrote down.
func (s *scene) assumedOutside() (out []string) {
	d := s.doc.Surroundings
	c := &s.out.coat
	if c.assumed && s.radiates() {
		out = append(out, fmt.Sprintf("outside emissivity %s assumed for %s", digits(c.emissivity, 2), c.of))
	}
	if d.SunWM2.V > 0 {
		out = append(out, fmt.Sprintf("%s of the sun's heat is absorbed (%s), over the width seen from above", digits(c.absorptivity, 2), c.of))
	}
	if (d.Kind == section.MovingAir || d.Kind == section.Water) && d.AirDirection == "" && d.AirSpeedMS.V > 0 {
		out = append(out, "the flow is assumed to go "+s.flow()+" the run")
	}
	if d.Kind == section.Vacuum && s.holder.kind != section.NoHolder && s.holder.fill.gas {
		out = append(out, "the gas between the parts is reckoned as shut in at its pressure; where it escapes into the vacuum the parts are hotter")
	}
	if (d.Kind == section.Water || d.Kind == section.Buried) && !d.Wet {
		out = append(out, "the wire types' dry limits count: write wet: true where water reaches the insulation")
	}
	return out
}

// touch is the limit of the outside surface.
func (s *scene) touch() limit {
	if t := s.doc.Holder.TouchLimitC; t.OK {
		return limit{c: t, by: "touch limit, given"}
	}
	return limit{}
}

// filmShown is the coefficient that counts, if there is one.
func (s *scene) filmShown(a answered) (h section.Opt[float64]) {
	switch {
	case s.out.free && a.heat != nil && a.status != heat.ThermalRunaway:
		h.V, h.OK = s.out.coefficient(a.films)
	case !s.out.free && !math.IsInf(s.filmW, 0):
		h = section.Some(s.filmW)
	}
	return h
}
