package rating_test

import (
	"context"
	"fmt"
	"math"
	"math/rand/v2"
	"os"
	"strings"
	"testing"

	"packrise/solver/catalog"
	"packrise/solver/film"
	"packrise/solver/fluid"
	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
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
holder: {kind: wireway, width_mm: 80, height_mm: 40, layers: [{material: painted-steel, thickness_mm: 1.5}], sides: {left: insulated}, touch_limit_c: 40}
parts:
  - {id: A, kind: core, stock: thhn-8, at_mm: [10, 3]}
  - {id: B, kind: core, stock: thhn-8, at_mm: [40, 3]}
loads: [{id: a, conductors: [A, B], current_a: 50}]
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
		wide := 0.083
		if side == "right" {
			wide = 0.043
		}
		k, _ := o.Surface(film.Face{Shape: shape, WidthM: 0.083, HeightM: 0.043, Emissivity: 0.9, Absorptivity: 0.9}, r.Sides[side]/wide)
		hot[side] = k - 273.15
	}
	// steel this thick is nearly of one temperature, so the faces' own means lie within some kelvin of each other and of the outside's mean
	for side, c := range hot {
		if math.Abs(c-r.SurfaceC) > 4 {
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

func note(r *rating.Result, part string) bool {
	return strings.Contains(strings.Join(r.Notes, "\n"), part)
}

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

// TestRunawayInAir: in still air a wire settles where a fixed film of its cold state would let it run away, and the factor told is the
// largest that settles.
func TestRunawayInAir(t *testing.T) {
	at := func(i float64) *rating.Result {
		return solve(t, parse(t, bareWire("kind: still-air, ambient_c: 30", fmt.Sprintf("current_a: %g", i))), rating.Options{})
	}
	r := at(400)
	if r.Status != heat.ThermalRunaway || !(r.Settles > 0 && r.Settles < 1) {
		t.Fatalf("%v, settles %g", r.Status, r.Settles)
	}
	limit := 400 * r.Settles
	for _, f := range []float64{0.5, 0.8, 0.95, 0.99, 0.998} {
		if r := at(limit * f); r.Status != heat.Converged || r.Conductors[0].TempC > 1000 {
			t.Errorf("%.3f of the limit: %v, %.1f °C", f, r.Status, r.Conductors[0].TempC)
		}
	}
	for _, f := range []float64{1.002, 1.05, 1.5} {
		if r := at(limit * f); r.Status != heat.ThermalRunaway || math.Abs(r.Settles*f-1) > 2e-3 {
			t.Errorf("%.3f of the limit: %v, settles %.4f", f, r.Status, r.Settles*f)
		}
	}
}

// TestDraftKeepsFilms: while dragging the films stay as they were, and the answer on release is a fresh one's.
func TestDraftKeepsFilms(t *testing.T) {
	d := parse(t, `packrise: 1
surroundings: {kind: still-air, ambient_c: 30}
holder: {kind: conduit, stock: emt-1}
parts:
  - {id: A, kind: core, stock: thhn-8, at_mm: [0, -8]}
  - {id: B, kind: core, stock: thhn-8, at_mm: [0, 3]}
loads: [{id: a, conductors: [A, B], current_a: 40}]
`)
	e := rating.NewEngine(catalog.Load())
	ask := func(d *section.Document, g heat.Accuracy) *rating.Result {
		r, problems, err := e.Solve(context.Background(), d, rating.Options{Accuracy: g})
		if err != nil || r == nil {
			t.Fatal(problems, err)
		}
		return r
	}
	first := ask(d, heat.Standard)
	for y := 3.0; y > -1; y -= 0.5 {
		d = section.Move(d, "B", section.Point{X: 4, Y: y})
		draft := ask(d, heat.Draft)
		if draft.FilmWM2K != first.FilmWM2K {
			t.Fatalf("the film moved from %v to %v", first.FilmWM2K, draft.FilmWM2K)
		}
	}
	got, want := ask(d, heat.Standard), solve(t, d, rating.Options{})
	for i := range want.Conductors {
		if math.Abs(got.Conductors[i].TempC-want.Conductors[i].TempC) > 0.02 { // the air between the wires is taken to 0.05 % of its conductivity
			t.Errorf("%s on release %.4f °C, fresh %.4f", want.Conductors[i].ID, got.Conductors[i].TempC, want.Conductors[i].TempC)
		}
	}
	if draft := solve(t, d, rating.Options{Accuracy: heat.Draft}); math.Abs(draft.SurfaceC-want.SurfaceC) > 0.3 {
		t.Errorf("a first draft has its outside at %.3f °C, standard %.3f", draft.SurfaceC, want.SurfaceC)
	}
}

// dice makes random small sections in random surroundings.
type dice struct{ *rand.Rand }

func (d dice) in(a, b float64) float64 { return a + (b-a)*d.Float64() }

func (d dice) of(words ...string) string { return words[d.IntN(len(words))] }

// surroundings of any kind at an ambient.
func (d dice) surroundings(ambient, altitude, sun float64) string {
	s := fmt.Sprintf("ambient_c: %g", ambient)
	air := fmt.Sprintf(", altitude_m: %g, sun_w_m2: %g", altitude, sun)
	if d.IntN(3) == 0 {
		air += fmt.Sprintf(", radiant_c: %g", ambient+d.in(-10, 10))
	}
	up := ""
	if d.IntN(4) == 0 {
		up = fmt.Sprintf(", run: vertical, height_m: %.2f", d.in(0.3, 20))
	}
	switch d.IntN(6) {
	case 0:
		return "kind: moving-air, " + s + air + up + fmt.Sprintf(", air_speed_m_s: %.3f, air_direction: %s", d.in(0, 5), d.of("across", "along"))
	case 1:
		return "kind: buried, " + s + fmt.Sprintf(", depth_m: %.2f, soil_w_mk: %.2f", d.in(0.4, 2), d.in(0.3, 2))
	case 2:
		return "kind: water, " + s + up + fmt.Sprintf(", air_speed_m_s: %.3f", d.in(0, 1)*float64(d.IntN(2)))
	case 3:
		return "kind: vacuum, " + s + fmt.Sprintf(", sun_w_m2: %g", sun)
	case 4:
		return "kind: insulation, " + s + air + up + fmt.Sprintf(", wrap: {material: mineral-wool, thickness_mm: %.1f}", d.in(5, 50))
	}
	return "kind: still-air, " + s + air + up
}

// section draws up to four wires side by side in a holder of any kind.
func (d dice) section() (holder, parts string, ids []string) {
	n := 1 + d.IntN(4)
	r := d.in(1, 4) // mm, of a wire
	wall := fmt.Sprintf(", layers: [{material: %s, thickness_mm: %.2f}]", d.of("pvc", "galvanised-steel", "pe", "painted-steel"), d.in(0.8, 3))
	gap := d.in(0, 2)
	width := float64(n)*2*r + float64(n-1)*gap
	x0, y := -width/2+r, 0.0
	switch d.IntN(4) {
	case 0:
		if n = 1; true {
			holder, x0 = "kind: none", 0
		}
	case 1:
		holder = "kind: open-bundle"
	case 2:
		holder = fmt.Sprintf("kind: %s, inside_mm: %.2f%s", d.of("conduit", "jacket"), width*1.02+0.1, wall)
	default:
		holder = fmt.Sprintf("kind: wireway, width_mm: %.2f, height_mm: %.2f%s", width+4, 2*r+3+d.in(0, 20), wall)
		if d.IntN(2) == 0 {
			holder += ", sides: {" + d.of("left", "top", "bottom") + ": insulated}"
		}
		x0, y = 2+r, r+1
	}
	if d.IntN(3) == 0 && !strings.HasPrefix(holder, "kind: none") {
		holder += ", fill: pvc"
	}
	for i := range n {
		id := fmt.Sprintf("L%d", i+1)
		ids = append(ids, id)
		parts += fmt.Sprintf("  - {id: %s, kind: core, conductor: {diameter_mm: %.3f, class: solid}, layers: [{material: pvc, thickness_mm: %.3f}], at_mm: [%.5f, %.5f]}\n",
			id, 2*r*0.6, r*0.4, x0+float64(i)*(2*r+gap), y)
	}
	return holder, parts, ids
}

// TestRandomOutsides: on random small sections of all kinds the loop converges, heat in is heat out, and more current, ambient, sun or altitude
// never cool a conductor.
func TestRandomOutsides(t *testing.T) {
	n := 60
	switch {
	case testing.Short():
		n = 10
	case os.Getenv("PACKRISE_SOAK") == "1":
		n = 1000
	}
	for seed := range n {
		draw := func(ambient, altitude, sun, current float64) string {
			d := dice{rand.New(rand.NewPCG(uint64(seed), 9))}
			holder, parts, ids := d.section()
			around := d.surroundings(ambient, altitude, sun)
			amps := current * d.in(5, 40)
			return fmt.Sprintf("packrise: 1\nsurroundings: {%s}\nholder: {%s}\nparts:\n%sloads: [{id: a, conductors: [%s], current_a: %.3f}]\n", around, holder, parts, strings.Join(ids, ", "), amps)
		}
		base := draw(25, 0, 0, 1)
		r := solve(t, parse(t, base), rating.Options{})
		if r.Status == heat.ThermalRunaway {
			if r.Settles >= 1 || r.Settles <= 0 {
				t.Errorf("settles up to %g of:\n%s", r.Settles, base)
			}
			continue
		}
		if r.Status != heat.Converged || math.Abs(r.Generated-r.Released) > 1e-5*r.Generated {
			t.Errorf("%v, in %g, out %g W/m:\n%s", r.Status, r.Generated, r.Released, base)
			continue
		}
		for what, text := range map[string]string{"ambient": draw(40, 0, 0, 1), "altitude": draw(25, 9000, 0, 1), "sun": draw(25, 0, 900, 1), "current": draw(25, 0, 0, 1.1)} {
			w := solve(t, parse(t, text), rating.Options{})
			if w.Status == heat.ThermalRunaway || what == "altitude" && r.SurfaceC < r.AmbientC { // thin air warms an outside less that radiates to the cold
				continue
			}
			if w.Status != heat.Converged {
				t.Errorf("%s: %v:\n%s", what, w.Status, text)
				continue
			}
			for i := range r.Conductors {
				// buried runs and water know neither altitude nor sun; rounding of the loop is 5 mK
				if w.Conductors[i].TempC < r.Conductors[i].TempC-0.01 {
					t.Errorf("more %s cools %s from %.3f to %.3f °C:\n%s", what, r.Conductors[i].ID, r.Conductors[i].TempC, w.Conductors[i].TempC, text)
				}
			}
		}
	}
}
