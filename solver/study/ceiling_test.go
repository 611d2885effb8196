package study

import (
	"context"
	"math"
	"testing"

	"packrise/assets"
	"packrise/solver/catalog"
	"packrise/solver/section"
)

func read(t testing.TB, text string) *section.Document {
	t.Helper()
	d, problems := section.Read([]byte(text))
	if len(problems) > 0 {
		t.Fatal(problems)
	}
	return d
}

func demo(t testing.TB, name string) *section.Document {
	t.Helper()
	raw, err := assets.Designs.ReadFile("designs/" + name + ".yaml")
	if err != nil {
		t.Fatal(err)
	}
	return read(t, string(raw))
}

var cat = catalog.Load()

// oneWire is a bare-film case with a closed form: T = Ta + I²R(T)(ln(r1/r0)/(2πk) + 1/(2π r1 h)).
const oneWire = `
packrise: 1
surroundings: {kind: fixed-film, ambient_c: 30, film_w_m2k: 12}
holder: {kind: none}
parts:
  - {id: W, kind: core, conductor: {area_mm2: 2.5}, layers: [{material: ins, thickness_mm: 0.8}], at_mm: [0, 0], limit_c: 70}
materials: {ins: {k_w_mk: 0.2}}
loads: [{id: a, conductors: [W], current_a: 10}]
`

// TestCeilingClosedForm: the current at which one insulated wire in a fixed film reaches 70 °C, against the closed form to 0.1 %. Resistance of the answer itself.
func TestCeilingClosedForm(t *testing.T) {
	d := read(t, oneWire)
	s := New(cat)
	ctx := context.Background()
	base, err := s.solve(ctx, d, Options{})
	if err != nil {
		t.Fatal(err)
	}
	c, err := s.climb(ctx, s.engines[0], base, func(f float64) *section.Document { return scaleAll(d, f) }, nominal, 0, Options{})
	if err != nil {
		t.Fatal(err)
	}
	w := base.Conductors[0]
	shape := base.Shapes
	r0, r1 := 0.0, 0.0
	for _, sh := range shape {
		if sh.ID == "W" {
			r0, r1 = sh.Rings[0].R1, sh.Rings[len(sh.Rings)-1].R1
		}
	}
	at := func(tc float64) float64 { return w.ResistanceOhm * (1 + 0.00393*(tc-20)) / (1 + 0.00393*(w.TempC-20)) }
	thermal := math.Log(r1/r0)/(2*math.Pi*0.2) + 1/(2*math.Pi*r1*1e-3*12)
	want := math.Sqrt(40 / (at(70) * thermal))
	if got := 10 * c.Factor; math.Abs(got/want-1) > 0.002 || got > want*1.0002 || c.Governs != "W" {
		t.Errorf("%.3f A by %q, closed form %.3f A", got, c.Governs, want)
	}
	if over := c.TempC - 70; over > 0 || over < -closeK {
		t.Errorf("%.3f °C at the ceiling of 70 °C", c.TempC)
	}
}

// TestCeilingDemos: never over, within 0.1 K, and a little more current is over.
func TestCeilingDemos(t *testing.T) {
	for _, name := range []string{"nine-in-emt", "filled-control-cable", "roof-strings", "harness-altitude", "stage-multicore"} {
		d := demo(t, name)
		s := New(cat)
		ctx := context.Background()
		o := Options{AssumeIdle: true}
		base, err := s.solve(ctx, d, o)
		if err != nil {
			t.Fatal(err)
		}
		solved := 0
		c, err := s.climb(ctx, s.engines[0], base, func(f float64) *section.Document { solved++; return scaleAll(d, f) }, nominal, 0, o)
		if err != nil {
			t.Fatal(err)
		}
		t.Logf("%s: %.4f by %s at %.2f of %.0f °C, %d solutions", name, c.Factor, c.Governs, c.TempC, c.LimitC, solved)
		if c.TempC > c.LimitC || c.TempC < c.LimitC-closeK || c.Factor <= 0 {
			t.Errorf("%s: %.3f °C, limit %.1f °C at factor %.4f", name, c.TempC, c.LimitC, c.Factor)
		}
		more, err := s.solve(ctx, scaleAll(d, c.Factor*1.01), o)
		if err != nil {
			t.Fatal(err)
		}
		if _, k, _ := closest(things(more), nominal); k >= 0 {
			t.Errorf("%s: 1 %% more is not over", name)
		}
	}
}

// TestCeilingEnds: currents of zero, a limit below the ambient, no limit at all, and a runaway.
func TestCeilingEnds(t *testing.T) {
	s := New(cat)
	ctx := context.Background()
	find := func(d *section.Document) Ceiling {
		base, err := s.solve(ctx, d, Options{})
		if err != nil {
			t.Fatal(err)
		}
		c, err := s.climb(ctx, s.engines[0], base, func(f float64) *section.Document { return scaleAll(d, f) }, nominal, 0, Options{})
		if err != nil {
			t.Fatal(err)
		}
		return c
	}
	d := read(t, oneWire)
	set := func(limit, amperes float64) *section.Document {
		return d.With(func(d *section.Document) {
			d.Parts = append([]section.Part(nil), d.Parts...)
			d.Parts[0].LimitC = section.Some(limit)
			d.Loads = append([]section.Load(nil), d.Loads...)
			d.Loads[0].CurrentA = section.Some(amperes)
		})
	}
	if c := find(set(70, 0)); !c.Unbounded || !math.IsInf(c.Factor, 1) {
		t.Errorf("currents of zero: %+v", c)
	}
	if c := find(set(25, 10)); !c.Hopeless || c.Factor != 0 || c.Governs != "W" {
		t.Errorf("limit below ambient: %+v", c)
	}
	if c := find(set(5000, 10)); !c.Runaway || c.Factor < 2 || c.Factor > 100 {
		t.Errorf("a limit that no steady state reaches: %+v", c)
	}
	hot := find(set(70, 500))
	if cold := find(set(70, 1)); math.Abs(500*hot.Factor/cold.Factor-1) > 0.003 {
		t.Errorf("from 500 A: %.3f A, from 1 A: %.3f A", 500*hot.Factor, cold.Factor)
	}
}
