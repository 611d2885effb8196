package rating_test

import (
	"context"
	"fmt"
	"math"
	"strings"
	"testing"

	"packrise/solver/catalog"
	"packrise/solver/film"
	"packrise/solver/fluid"
	"packrise/solver/heat"
	"packrise/solver/rating"
)

// bareWire is one insulated conductor without a holder, d 3 mm with 2 mm around it, in given surroundings.
func bareWire(surroundings, load string) string {
	return fmt.Sprintf(`packrise: 1
surroundings: {%s}
holder: {kind: none}
parts:
  - {id: L1, kind: core, conductor: {diameter_mm: 3, class: solid}, layers: [{material: cover, thickness_mm: 2}], at_mm: [5, -7]}
loads: [{id: a, conductors: [L1], %s}]
materials: {cover: {k_w_mk: 0.15, limit_c: 105, emissivity: 0.8, absorptivity: 0.6}, slab: {k_w_mk: 0.04, emissivity: 0.5, absorptivity: 0.5}}
`, surroundings, load)
}

// weathers are surroundings of every kind with what film calls them.
var weathers = []struct {
	text  string
	words string
	film  film.Outside
	face  film.Face
}{
	{"kind: still-air, ambient_c: 30", "still air, outside emissivity 0.8", film.Outside{Kind: film.StillAir}, film.Face{}},
	{"kind: still-air, ambient_c: 30, altitude_m: 12192, radiant_c: 50", "altitude 12192 m, radiating to 50 °C", film.Outside{Kind: film.StillAir, RadiantK: 323.15, PressurePa: 18754}, film.Face{}},
	{"kind: still-air, ambient_c: 30, run: vertical, height_m: 2, sun_w_m2: 800", "vertical run of 2 m, sun of 800 W/m²", film.Outside{Kind: film.StillAir, Vertical: true, HeightM: 2, SunWM2: 800}, film.Face{}},
	{"kind: moving-air, ambient_c: 30, air_speed_m_s: 2", "air moving at 2 m/s across the run", film.Outside{Kind: film.MovingAir, SpeedMS: 2}, film.Face{}},
	{"kind: moving-air, ambient_c: 30, air_speed_m_s: 2, air_direction: along", "air moving at 2 m/s along the run", film.Outside{Kind: film.MovingAir, SpeedMS: 2, Along: true}, film.Face{}},
	{"kind: water, ambient_c: 30", "still water", film.Outside{Kind: film.Water}, film.Face{}},
	{"kind: water, ambient_c: 30, air_speed_m_s: 1", "water moving at 1 m/s across the run", film.Outside{Kind: film.Water, SpeedMS: 1}, film.Face{}},
	{"kind: vacuum, ambient_c: 30, radiant_c: 20, sun_w_m2: 1361", "vacuum, outside emissivity 0.8", film.Outside{Kind: film.Vacuum, RadiantK: 293.15, SunWM2: 1361}, film.Face{}},
	{"kind: buried, ambient_c: 30, depth_m: 0.7, soil_w_mk: 0.4", "buried 0.7 m deep in soil of 0.4 W/mK", film.Outside{Kind: film.Buried, DepthM: 0.7, SoilWMK: 0.4}, film.Face{}},
}

// TestOutsideOfAWire: the whole loop gives one wire the temperature of the closed form, surface by film's own law at the surface's temperature,
// then ln(D/d)/2πk through the cover.
func TestOutsideOfAWire(t *testing.T) {
	for _, w := range weathers {
		o := w.film
		o.AmbientK = 303.15
		if o.RadiantK == 0 {
			o.RadiantK = o.AmbientK
		}
		f := film.Face{Shape: film.Round, DiameterM: 7e-3, Emissivity: 0.8, Absorptivity: 0.6}
		for _, q := range []float64{0, 3, 12} {
			r := solve(t, parse(t, bareWire(w.text, fmt.Sprintf("heat_w_m: %g", q))), rating.Options{Accuracy: heat.Fine})
			k, a := o.Surface(f, q/(math.Pi*7e-3))
			want := k - 273.15 + q*math.Log(7.0/3)/(2*math.Pi*0.15)
			if math.Abs(r.SurfaceC-(k-273.15)) > 1e-3 || math.Abs(r.Conductors[0].TempC-want) > 1e-3 {
				t.Errorf("%s, %g W/m: %.4f °C, outside %.4f; closed form %.4f and %.4f", w.text, q, r.Conductors[0].TempC, r.SurfaceC, want, k-273.15)
			}
			if math.Abs(r.Released-q) > 1e-6*max(q, 1) {
				t.Errorf("%s: %g W/m in, %g out", w.text, q, r.Released)
			}
			if h := a.Coefficient(); q > 0 && math.Abs(r.FilmWM2K.V/h-1) > 1e-3 {
				t.Errorf("%s: film %g, want %g W/m²K", w.text, r.FilmWM2K.V, h)
			}
			if _, second := r.Sentence(); !strings.Contains(second, w.words) || !strings.Contains(second, "Ambient 30 °C, ") {
				t.Errorf("second line %q lacks %q", second, w.words)
			}
		}
	}
}

// TestOutsideResistance: with a current, resistance and film settle together: the heat is I²R at the temperature found.
func TestOutsideResistance(t *testing.T) {
	for _, i := range []float64{10, 40, 60} {
		r := solve(t, parse(t, bareWire("kind: still-air, ambient_c: 30", fmt.Sprintf("current_a: %g", i))), rating.Options{Accuracy: heat.Fine})
		c := r.Conductors[0]
		o := film.Outside{Kind: film.StillAir, AmbientK: 303.15, RadiantK: 303.15, PressurePa: fluid.Atmosphere}
		k, _ := o.Surface(film.Face{Shape: film.Round, DiameterM: 7e-3, Emissivity: 0.8}, i*i*c.ResistanceOhm/(math.Pi*7e-3))
		if want := k - 273.15 + i*i*c.ResistanceOhm*math.Log(7.0/3)/(2*math.Pi*0.15); math.Abs(c.TempC-want) > 2e-3 {
			t.Errorf("%g A: %.4f °C, want %.4f", i, c.TempC, want)
		}
	}
}

// TestWrap: 20 mm of thermal insulation is ln(47/7)/2πk more on the way out, its outside the one that radiates, and it may not be listed
// as a jacket.
func TestWrap(t *testing.T) {
	q := 3.0
	r := solve(t, parse(t, bareWire("kind: insulation, ambient_c: 30, wrap: {material: slab, thickness_mm: 20}", "heat_w_m: 3")), rating.Options{Accuracy: heat.Fine})
	o := film.Outside{Kind: film.StillAir, AmbientK: 303.15, RadiantK: 303.15, PressurePa: fluid.Atmosphere}
	k, _ := o.Surface(film.Face{Shape: film.Round, DiameterM: 47e-3, Emissivity: 0.5}, q/(math.Pi*47e-3))
	want := k - 273.15 + q*(math.Log(47.0/7)/(2*math.Pi*0.04)+math.Log(7.0/3)/(2*math.Pi*0.15))
	if math.Abs(r.Conductors[0].TempC-want) > 1e-3 {
		t.Errorf("%.4f °C, want %.4f", r.Conductors[0].TempC, want)
	}
	if _, second := r.Sentence(); !strings.Contains(second, "wrapped in 20 mm of slab in still air, outside emissivity 0.5") {
		t.Error(second)
	}
	found := false
	for _, o := range r.Others {
		found = found || o.ID == "wrap"
	}
	if !found {
		t.Errorf("no wrap among %+v", r.Others)
	}
	jacket := `packrise: 1
surroundings: {kind: insulation, ambient_c: 30, wrap: {material: mineral-wool, thickness_mm: 20}}
holder: {kind: conduit, stock: emt-1}
parts: [{id: L1, kind: core, stock: thhn-8, at_mm: [0, 0]}]
loads: [{id: a, conductors: [L1], current_a: 40}]
`
	r = solve(t, parse(t, jacket), rating.Options{})
	if last := r.Others[len(r.Others)-2]; last.ID != "wrap" || !last.LimitC.OK || last.TempC < r.SurfaceC {
		t.Errorf("wrap of a conduit: %+v", last)
	}
}

// TestBoxFaces: each open face of a box gives off what film says at its own mean temperature, and the whole is in balance.
func TestBoxFaces(t *testing.T) {
	text := `packrise: 1
surroundings: {kind: still-air, ambient_c: 25, sun_w_m2: 300}
holder: {kind: wireway, width_mm: 80, height_mm: 40, layers: [{material: plate, thickness_mm: 4}], sides: {left: insulated}, touch_limit_c: 40}
parts:
  - {id: A, kind: core, stock: thhn-8, at_mm: [10, 3]}
  - {id: B, kind: core, stock: thhn-8, at_mm: [40, 3]}
loads: [{id: a, conductors: [A, B], current_a: 50}]
materials: {plate: {k_w_mk: 400, emissivity: 0.9, absorptivity: 0.9}}
`
	r := solve(t, parse(t, text), rating.Options{})
	if math.Abs(r.Generated-r.Released) > 1e-6*r.Generated {
		t.Errorf("in %g, out %g W/m", r.Generated, r.Released)
	}
	if r.Sides["left"] > 1e-6 || r.Sides["left"] < -1e-6 {
		t.Errorf("the insulated side gives off %g W/m", r.Sides["left"])
	}
	o := film.Outside{Kind: film.StillAir, AmbientK: 298.15, RadiantK: 298.15, PressurePa: fluid.Atmosphere, SunWM2: 300}
	faces := map[string]film.Shape{"top": film.Top, "bottom": film.Bottom, "right": film.Side}
	hot := map[string]float64{}
	for side, shape := range faces {
		wide := 0.088
		if side == "right" {
			wide = 0.048
		}
		k, _ := o.Surface(film.Face{Shape: shape, WidthM: 0.088, HeightM: 0.048, Emissivity: 0.9, Absorptivity: 0.9}, r.Sides[side]/wide)
		hot[side] = k - 273.15
	}
	// copper this thick is of one temperature: the flow of each face must lead to it by the face's own law
	for side, c := range hot {
		if math.Abs(c-r.SurfaceC) > 0.1 {
			t.Errorf("%s is at %.2f °C by its flow, the outside's mean %.2f", side, c, r.SurfaceC)
		}
	}
	if g := r.Governing; g == nil || g.Part != "outside" || g.SetBy != "touch limit, given" {
		t.Errorf("the touch limit does not govern: %+v", g)
	}
	if !note(r, "outside film by Churchill and Chu's formula (1975) for natural convection of a vertical face") && !note(r, "McAdams") {
		t.Errorf("notes: %q", r.Notes)
	}
}

// TestNotBuried: a run whose section reaches out of the ground is refused.
func TestNotBuried(t *testing.T) {
	for _, holder := range []string{"{kind: conduit, inside_mm: 100, layers: [{material: pvc, thickness_mm: 5}]}", "{kind: wireway, width_mm: 100, height_mm: 110}"} {
		_, problems, err := rating.NewEngine(catalog.Load()).Solve(context.Background(), parse(t, `packrise: 1
surroundings: {kind: buried, ambient_c: 20, depth_m: 0.054, soil_w_mk: 1}
holder: `+holder+`
parts: [{id: L1, kind: core, stock: thhn-8, at_mm: [5, 5]}]
loads: [{id: a, conductors: [L1], current_a: 10}]
`), rating.Options{})
		if err != nil || len(problems) != 1 || problems[0].Rule != "not-buried" || problems[0].Key != "surroundings.depth_m" || problems[0].Line != 2 {
			t.Errorf("%v, %v", problems, err)
		}
	}
}

// TestOutsideExtremes: a box without an open side has no film, a bare cable without a jacket and a bare hose have one, and the cautious choice
// is hotter.
func TestOutsideExtremes(t *testing.T) {
	box := solve(t, parse(t, `packrise: 1
surroundings: {kind: still-air, ambient_c: 25}
holder: {kind: wireway, width_mm: 30, height_mm: 30, sides: {left: insulated, right: insulated, top: insulated, bottom: {fixed_c: 20}}}
parts: [{id: A, kind: core, stock: thhn-8, at_mm: [10, 3]}]
loads: [{id: a, conductors: [A], current_a: 30}]
`), rating.Options{})
	if box.FilmWM2K.OK || note(box, "outside film") || math.Abs(box.Sides["bottom"]-box.Generated) > 1e-6*box.Generated {
		t.Errorf("film %v, notes %q, %v of %g W/m", box.FilmWM2K, box.Notes, box.Sides, box.Generated)
	}
	cable := parse(t, `packrise: 1
surroundings: {kind: still-air, ambient_c: 25}
holder: {kind: none}
builds: {b: {holder: {kind: jacket, inside_mm: 8, fill: pvc}, parts: [{id: A, kind: core, stock: thhn-14, at_mm: [0, 1]}, {id: B, kind: core, stock: thhn-14, at_mm: [0, -2.5]}]}}
parts: [{id: C, kind: cable, build: b, at_mm: [0, 0]}]
loads: [{id: a, conductors: [C/A, C/B], current_a: 20}]
`)
	plain, cautious := solve(t, cable, rating.Options{}), solve(t, cable, rating.Options{Cautious: true})
	if plain.Status != heat.Converged || math.Abs(plain.Released-plain.Generated) > 1e-6*plain.Generated || !note(plain, "assumed for a surface without layers") {
		t.Errorf("bare cable: %v, %g in, %g out, %q", plain.Status, plain.Generated, plain.Released, plain.Notes)
	}
	if !(cautious.SurfaceC > plain.SurfaceC+0.2) || !note(cautious, "Churchill and Chu's formula (1975) for natural convection of a horizontal cylinder") {
		t.Errorf("cautious %.2f °C, Morgan %.2f °C", cautious.SurfaceC, plain.SurfaceC)
	}
	hose := solve(t, parse(t, `packrise: 1
surroundings: {kind: moving-air, ambient_c: 25, air_speed_m_s: 1}
holder: {kind: none}
parts: [{id: H, kind: rod, diameter_mm: 8, bore_mm: 5, bore: {fixed_c: 60}, material: pur, at_mm: [0, 0]}]
`), rating.Options{})
	if hose.Status != heat.Converged || math.Abs(hose.Released+hose.Absorbed) > 1e-6*hose.Released || !(hose.Released > 1) {
		t.Errorf("hose: %v, %g out, %g absorbed", hose.Status, hose.Released, hose.Absorbed)
	}
}
