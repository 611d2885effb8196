package rating_test

import (
	"context"
	"fmt"
	"strings"
	"testing"

	"packrise/solver/catalog"
	"packrise/solver/fluid"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// TestWetTypes: wet surroundings count the wet limit, and refuse types that must never be wet.
func TestWetTypes(t *testing.T) {
	text := func(wet, typ string) string {
		return fmt.Sprintf(`packrise: 1
surroundings: {kind: still-air, ambient_c: 30, wet: %s}
holder: {kind: none}
parts: [{id: L1, kind: core, conductor: {size: 12 AWG}, layers: [{material: xlpe, thickness_mm: 0.8}], type: %s, at_mm: [0, 0]}]
loads: [{id: a, conductors: [L1], current_a: 10}]
`, wet, typ)
	}
	for _, c := range []struct {
		wet, typ, by string
		limit        float64
	}{{"false", "xhhw", "XHHW, dry", 90}, {"true", "xhhw", "XHHW, wet", 75}, {"true", "xhhw-2", "XHHW-2, wet", 90}, {"false", "thhn", "THHN, dry", 90}} {
		r := solve(t, parse(t, text(c.wet, c.typ)), rating.Options{})
		if w := r.Conductors[0]; w.LimitC.V != c.limit || w.LimitBy != c.by {
			t.Errorf("%s wet %s: limit %g by %q", c.typ, c.wet, w.LimitC.V, w.LimitBy)
		}
	}
	for _, s := range []string{text("true", "thhn"), strings.Replace(text("true", "thhn"), "type: thhn", "type: thhn, limit_c: 60", 1)} {
		_, problems, err := rating.NewEngine(catalog.Load()).Solve(context.Background(), parse(t, s), rating.Options{})
		if err != nil || len(problems) != 1 || problems[0].Rule != "never-wet" || !strings.Contains(problems[0].Sentence(), "L1 is of type THHN, which must never be wet") {
			t.Errorf("%v, %v", problems, err)
		}
	}
}

// TestOutsideNotes: what is assumed about the outside is said.
func TestOutsideNotes(t *testing.T) {
	conduit := func(surroundings, holder string) string {
		return `packrise: 1
surroundings: {` + surroundings + `}
holder: {` + holder + `}
parts: [{id: L1, kind: core, stock: thhn-8, at_mm: [0, 0]}]
loads: [{id: a, conductors: [L1], current_a: 40}]
materials: {mine: {k_w_mk: 0.2}, iron: {k_w_mk: 50}}
`
	}
	for _, c := range []struct{ surroundings, holder, want string }{
		{"kind: still-air, ambient_c: 30", "kind: conduit, stock: emt-1", "outside film by Morgan's formula (1975) for natural convection of a horizontal cylinder; radiation"},
		{"kind: still-air, ambient_c: 30", "kind: conduit, inside_mm: 30", "outside emissivity 0.9 assumed for a wall without layers"},
		{"kind: still-air, ambient_c: 30", "kind: conduit, inside_mm: 30, layers: [{material: mine, thickness_mm: 2}]", "outside emissivity 0.9 assumed for mine"},
		{"kind: still-air, ambient_c: 30", "kind: conduit, inside_mm: 30, layers: [{material: iron, thickness_mm: 2}]", "outside emissivity 0.08 assumed for iron"},
		{"kind: still-air, ambient_c: 30, sun_w_m2: 900", "kind: conduit, stock: emt-1", "0.8 of the sun's heat is absorbed (galvanised steel), over the width seen from above"},
		{"kind: still-air, ambient_c: 30, run: vertical, height_m: 3", "kind: conduit, stock: emt-1", "near the top the rise over the ambient can be a third larger"},
		{"kind: moving-air, ambient_c: 30, air_speed_m_s: 3", "kind: conduit, stock: emt-1", "the flow is assumed to go across the run"},
		{"kind: moving-air, ambient_c: 30, air_speed_m_s: 3", "kind: wireway, width_mm: 100, height_mm: 100", "the flow is assumed to go along the run"},
		{"kind: vacuum, ambient_c: 30", "kind: conduit, stock: emt-1", "where it escapes into the vacuum the parts are hotter"},
		{"kind: buried, ambient_c: 20, depth_m: 0.7, soil_w_mk: 0.4", "kind: conduit, stock: emt-1", "write wet: true where water reaches the insulation"},
		{"kind: buried, ambient_c: 50, depth_m: 0.7, soil_w_mk: 0.4", "kind: conduit, stock: emt-1", "soil may dry out"},
	} {
		text := conduit(c.surroundings, c.holder)
		if strings.Contains(c.holder, "wireway") {
			text = strings.Replace(text, "at_mm: [0, 0]", "at_mm: [50, 4]", 1)
		}
		if r := solve(t, parse(t, text), rating.Options{}); !note(r, c.want) {
			t.Errorf("%s, %s: %q lacks %q", c.surroundings, c.holder, r.Notes, c.want)
		}
	}
}

// TestAltitudeRange: the reader keeps the altitude inside the atmosphere's model.
func TestAltitudeRange(t *testing.T) {
	if section.LowestAltitudeM != fluid.AltitudeLowM || section.HighestAltitudeM != fluid.AltitudeHighM {
		t.Error("the reader's range is not the model's")
	}
}

func note(r *rating.Result, part string) bool {
	return strings.Contains(strings.Join(r.Notes, "\n"), part)
}
