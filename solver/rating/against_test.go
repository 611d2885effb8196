package rating_test

import (
	"context"
	"math"
	"strings"
	"testing"

	"packrise/solver/film"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// holdersOnFloors are three 12 AWG wires in what may lie on a floor, with its outer perimeter (mm).
var holdersOnFloors = map[string]struct {
	holder    string
	perimeter float64
}{
	"jacket": {"{kind: jacket, inside_mm: 10, layers: [{material: pvc, thickness_mm: 1}]}", math.Pi * 12},
	"flat":   {"{kind: jacket, width_mm: 20, height_mm: 10, layers: [{material: pvc, thickness_mm: 1}]}", 2*10 + math.Pi*12},
	"bundle": {"{kind: open-bundle, clearance_mm: 0}", 0},
}

func onFloor(t *testing.T, holder, surroundings string) *section.Document {
	t.Helper()
	d, problems := section.Read([]byte("packrise: 1\nsurroundings: {" + surroundings + "}\nholder: " + holder + `
parts:
  - {id: L1, kind: core, conductor: {size: 12 AWG}, layers: [{material: pvc, thickness_mm: 0.5}], at_mm: [0, 2]}
  - {id: L2, kind: core, conductor: {size: 12 AWG}, layers: [{material: pvc, thickness_mm: 0.5}], at_mm: [1.8, -2]}
  - {id: L3, kind: core, conductor: {size: 12 AWG}, layers: [{material: pvc, thickness_mm: 0.5}], at_mm: [-1.8, -2]}
loads: [{id: a, conductors: [L1, L2, L3], current_a: 25}]
`))
	if d == nil {
		t.Fatal(problems)
	}
	return d
}

func answered(t *testing.T, d *section.Document) *rating.Result {
	t.Helper()
	r, problems, err := rating.NewEngine(shelf).Solve(context.Background(), d, rating.Options{})
	if r == nil {
		t.Fatal(problems, err)
	}
	if len(r.Conductors) == 0 || math.Abs(r.Generated-r.Released) > 1e-5*r.Generated {
		t.Errorf("%v W/m made, %v released", r.Generated, r.Released)
	}
	return r
}

// TestAgainst: what lies on an insulating floor is hotter than in the open, on a cold one colder; the more so the more of it does; and the answer says so.
func TestAgainst(t *testing.T) {
	const air = "kind: still-air, ambient_c: 30"
	for name, c := range holdersOnFloors {
		t.Run(name, func(t *testing.T) {
			hot := func(more string) (float64, *rating.Result) {
				r := answered(t, onFloor(t, c.holder, air+more))
				worst := 0.0
				for _, l := range r.Conductors {
					worst = max(worst, l.TempC)
				}
				return worst, r
			}
			free, _ := hot("")
			quarter, r := hot(", against: {at_deg: -90, share: 0.25, is: insulated}")
			half, _ := hot(", against: {at_deg: -90, share: 0.5, is: insulated}")
			cold, held := hot(", against: {at_deg: 180, share: 0.25, is: {fixed_c: 20}}")
			if !(cold < free-5 && free < quarter-2 && quarter < half-2) {
				t.Errorf("cold %.1f, free %.1f, a quarter insulated %.1f, half %.1f °C", cold, free, quarter, half)
			}
			if s := held.Sides; !(s["against"] > 1) || math.Abs(s["open"]+s["against"]-held.Released) > 1e-9 || r.Sides["against"] != 0 {
				t.Errorf("%v and %v", held.Sides, r.Sides)
			}
			if _, assumed := r.Sentence(); !strings.Contains(assumed, "a quarter of the outside against an insulating floor") {
				t.Error(assumed)
			}
			if notes := strings.Join(r.Notes, "\n"); !strings.Contains(notes, "no heat passes there; the film of the whole circumference acts on the rest") {
				t.Error(notes)
			}
			if notes := strings.Join(held.Notes, "\n"); !strings.Contains(notes, "a quarter of the outside against a wall held at 20 °C, which takes up ") {
				t.Error(notes)
			}
		})
	}
}

// TestAgainstAll: what is held all round is a fixed wall of that temperature.
func TestAgainstAll(t *testing.T) {
	for name, c := range holdersOnFloors {
		want := answered(t, onFloor(t, c.holder, "kind: fixed-wall, ambient_c: 66"))
		got := answered(t, onFloor(t, c.holder, "kind: still-air, ambient_c: 30, against: {at_deg: 0, share: 1, is: {fixed_c: 66}}"))
		for i, l := range got.Conductors {
			if math.Abs(got.Sides["against"]-got.Released) > 1e-9 || want.Sides != nil {
				t.Errorf("%s: %v", name, got.Sides)
			}
			if w := want.Conductors[i].TempC; math.Abs(l.TempC-w) > 0.02 {
				t.Errorf("%s: %.3f, want %.3f", name, l.TempC, w)
			}
		}
	}
}

// TestAgainstFilm: the film of an insulated quarter is that of the whole cylinder at the temperature of the open part, which gives off all the heat. A bare
// metal wire has one temperature, so that it can be written down.
func TestAgainstFilm(t *testing.T) {
	d, problems := section.Read([]byte(`packrise: 1
surroundings: {kind: still-air, ambient_c: 30, against: {at_deg: 90, share: 0.25, is: insulated}}
holder: {kind: none}
parts: [{id: L1, kind: core, conductor: {diameter_mm: 6, class: solid}, at_mm: [0, 0]}]
loads: [{id: a, conductors: [L1], heat_w_m: 9}]
materials: {copper: {k_w_mk: 380, emissivity: 0.6}}
`))
	if d == nil {
		t.Fatal(problems)
	}
	r := answered(t, d)
	o := film.Outside{Kind: film.StillAir, AmbientK: 303.15, RadiantK: 303.15, PressurePa: 101325}
	k, a := o.Surface(film.Face{Shape: film.Round, DiameterM: 6e-3, Emissivity: 0.6}, 9/(0.75*math.Pi*6e-3))
	if math.Abs(r.Conductors[0].TempC-(k-273.15)) > 0.02 || math.Abs(r.FilmWM2K.V-a.Coefficient()) > 0.01 {
		t.Errorf("%.3f °C with %.3f W/m²K, want %.3f and %.3f", r.Conductors[0].TempC, r.FilmWM2K.V, k-273.15, a.Coefficient())
	}
}

// TestAgainstSun: the sun falls on the width of the open part seen from above: all of it on a floor, what a quarter under a ceiling leaves, half beside a
// wall that covers half.
func TestAgainstSun(t *testing.T) {
	sun := func(against string) float64 {
		d, problems := section.Read([]byte("packrise: 1\nsurroundings: {kind: vacuum, ambient_c: 30, sun_w_m2: 1000" + against + `}
holder: {kind: none}
parts: [{id: L1, kind: core, conductor: {diameter_mm: 6, class: solid}, at_mm: [0, 0]}]
loads: [{id: a, conductors: [L1], heat_w_m: 0}]
materials: {copper: {k_w_mk: 380, emissivity: 0.5, absorptivity: 0.5}}
`))
		if d == nil {
			t.Fatal(problems)
		}
		r, refused, err := rating.NewEngine(shelf).Solve(context.Background(), d, rating.Options{})
		if r == nil {
			t.Fatal(refused, err)
		}
		// In a vacuum all that is absorbed is radiated: αGw = εσ(T⁴ − Ta⁴) × open perimeter.
		const sigma = 5.670374419e-8
		k := r.Conductors[0].TempC + 273.15
		return sigma * (math.Pow(k, 4) - math.Pow(303.15, 4)) / 1000 * math.Pi // × open share = width over diameter
	}
	for _, c := range []struct {
		against     string
		share, want float64
	}{
		{"", 0, 1},
		{", against: {at_deg: -90, share: 0.25, is: insulated}", 0.25, 1},
		{", against: {at_deg: 90, share: 0.25, is: insulated}", 0.25, 1 - math.Sqrt2/2},
		{", against: {at_deg: 180, share: 0.5, is: insulated}", 0.5, 0.5},
	} {
		if got := sun(c.against) * (1 - c.share); math.Abs(got-c.want) > 0.002 {
			t.Errorf("%q: %.4f of the width, want %.4f", c.against, got, c.want)
		}
	}
}

// TestAgainstShape: the line to draw has its share of the perimeter, lies on the outline and has its middle where it is asked for.
func TestAgainstShape(t *testing.T) {
	for name, c := range holdersOnFloors {
		for _, share := range []float64{0.25, 0.6} {
			d := onFloor(t, c.holder, "kind: still-air, ambient_c: 30")
			d = section.RestAgainst(d, &section.Against{AtDeg: -90, Share: share, Is: section.Side{Kind: section.SideInsulated}})
			shapes, _ := rating.Outline(d, shelf)
			line := shapes[0].Against
			if len(line) < 3 {
				t.Fatalf("%s: %v", name, line)
			}
			length := 0.0
			for i := 1; i < len(line); i++ {
				length += math.Hypot(line[i].X-line[i-1].X, line[i].Y-line[i-1].Y)
			}
			if c.perimeter > 0 && math.Abs(length-share*c.perimeter) > 2e-3*c.perimeter {
				t.Errorf("%s: %.3f mm of %.3f", name, length, c.perimeter)
			}
			a, b := line[0], line[len(line)-1]
			if math.Abs(a.X+b.X) > 0.01 || math.Abs(a.Y-b.Y) > 0.01 || !(a.X < b.X) {
				t.Errorf("%s: from %+v to %+v", name, a, b)
			}
		}
		if shapes, _ := rating.Outline(onFloor(t, c.holder, "kind: still-air, ambient_c: 30"), shelf); shapes[0].Against != nil {
			t.Errorf("%s rests against nothing", name)
		}
	}
}
