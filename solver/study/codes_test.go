package study

import (
	"context"
	"math"
	"strings"
	"testing"

	"packrise/solver/section"
)

// TestCodesBesideComputed: nine 8 AWG in a 1-inch EMT compute to less than the table, nine 12 AWG to more, though both computed factors are near
// 0.6 and the table's is 0.70 (NEC 310.16 and 310.15(C)(1)): amperes are compared, and the lower governs.
func TestCodesBesideComputed(t *testing.T) {
	for _, c := range []struct {
		stock            string
		table            float64 // A: 90 °C column × 0.70
		computed, within float64
	}{
		{"thhn-8", 38.5, 35, 0.05},
		{"thhn-12", 21, 21.6, 0.05},
	} {
		d := demo(t, "nine-in-emt")
		d = d.With(func(d *section.Document) {
			d.Parts = append([]section.Part(nil), d.Parts...)
			for i := range d.Parts {
				d.Parts[i].Stock, d.Parts[i].At = c.stock, section.Opt[section.Point]{}
			}
			d.StockUsed = nil
		})
		d = rest(d, cat)
		s := New(cat)
		ctx := context.Background()
		base, err := s.solve(ctx, d, Options{})
		if err != nil {
			t.Fatal(err)
		}
		all, err := s.All(ctx, d, base, nil, Options{})
		if err != nil {
			t.Fatal(err)
		}
		p := &Permits{Base: base, All: all}
		low := lowest(p, s.Codes(d, ""))
		for i, l := range low {
			if got := l.Rules["nec-310"]; math.Abs(got-c.table) > 1e-9 {
				t.Errorf("%s: the table gives %.3f A, want %.1f A", c.stock, got, c.table)
			}
			if math.Abs(l.Nominal/c.computed-1) > c.within {
				t.Errorf("%s: computed %.2f A, want about %.1f A", c.stock, l.Nominal, c.computed)
			}
			if want := math.Min(l.Computed, c.table); l.A != want && l.Because != "terminal" {
				t.Errorf("%s: lowest %.2f A because of %s, want %.2f A", c.stock, l.A, l.Because, want)
			}
			if i == 0 {
				t.Logf("%s: computed %.1f A, to rely on %.1f A, table %.1f A, lowest %.1f A (%s)", c.stock, l.Nominal, l.Computed, l.Rules["nec-310"], l.A, l.Because)
			}
		}
	}
}

// TestTerminalCaps: one 12 AWG alone in free air with a 75 °C terminal: the wire reaches 75 °C near 40 A, the terminal allows 25 A (NEC 110.14(C) and
// the 75 °C column of 310.16, from the tables).
func TestTerminalCaps(t *testing.T) {
	d := read(t, `
packrise: 1
surroundings: {kind: still-air, ambient_c: 30}
holder: {kind: none}
parts:
  - {id: W, kind: core, stock: thhn-12, at_mm: [0, 0], limit_c: 75}
loads: [{id: a, conductors: [W], current_a: 20, terminals: {rating_c: 75}}]
`)
	s := New(cat)
	r, err := s.Rate(context.Background(), d, nil, Options{})
	if err != nil {
		t.Fatal(err)
	}
	w := r.Lowest[0]
	if w.Terminal != 25 || w.A != 25 || w.Because != "terminal" {
		t.Errorf("%+v", w)
	}
	if w.Nominal < 36 || w.Nominal > 44 {
		t.Errorf("the wire reaches 75 °C at %.1f A, want about 40 A", w.Nominal)
	}
	if len(r.Protected) != 1 || !r.Protected[0].Unknown {
		t.Errorf("protection: %+v", r.Protected)
	}
}

// TestSoftFault: at its tripping current a circuit is hotter than at load, and what the device lets stand is said.
func TestSoftFault(t *testing.T) {
	d := demo(t, "nine-in-emt")
	first := d.Loads[0]
	d = section.SetProtection(d, first.ID, section.Protection{Kind: section.Breaker, RatingA: 40})
	s := New(cat)
	f, err := s.SoftFaults(context.Background(), d, Options{})
	if err != nil {
		t.Fatal(err)
	}
	if len(f) != 1 || f[0].A != 58 || f[0].Stated || !f[0].Over() || !strings.Contains(strings.Join(first.Conductors, " "), f[0].Governs) {
		t.Errorf("%+v", f)
	}
}

// TestCountsIgnoreCurrents: what tables say never depends on the current.
func TestCountsIgnoreCurrents(t *testing.T) {
	s := New(cat)
	for _, name := range []string{"nine-in-emt", "wireway-38", "robot-umbilical"} {
		d := demo(t, name)
		a, b := s.Codes(d, ""), s.Codes(scaleAll(d, 0.01), "")
		if len(a.Outcomes) == 0 || len(a.Outcomes) != len(b.Outcomes) {
			t.Fatalf("%s: %d and %d outcomes", name, len(a.Outcomes), len(b.Outcomes))
		}
		for k := range a.Outcomes {
			x, y := a.Outcomes[k], b.Outcomes[k]
			for i := range x.Conductors {
				if p, q := x.Conductors[i].A, y.Conductors[i].A; p != q && !(math.IsNaN(p) && math.IsNaN(q)) {
					t.Errorf("%s, %s, %s: %.2f and %.2f A", name, x.Rule, x.Conductors[i].ID, p, q)
				}
			}
			t.Logf("%s: %s applies %v %s", name, x.Rule, x.Applies, x.Why)
		}
	}
}
