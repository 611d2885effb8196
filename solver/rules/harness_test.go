package rules

import (
	"fmt"
	"math"
	"strings"
	"testing"
)

// harness makes a bundle of wires of which the first loaded ones carry a load each.
func harness(t *testing.T, ambient, altitudeFt, ratingC float64, loaded int, amps float64, kinds ...any) Run {
	t.Helper()
	r := Run{AmbientC: ambient, AltitudeM: altitudeFt * feet, Holder: Holder{Kind: OpenBundle}}
	for i := 0; i < len(kinds); i += 2 {
		text := kinds[i+1].(string)
		r.Conductors = append(r.Conductors, wires(t, "w"+strings.Fields(text)[0]+"-", kinds[i].(int), text, "", Conductor{RatingC: ratingC, Metal: "tinned-copper"})...)
	}
	for i := range loaded {
		id := fmt.Sprintf("l%d", i+1)
		r.Loads = append(r.Loads, Load{ID: id, CurrentA: amps, System: DC})
		r.Conductors[i].Load = id
	}
	return r
}

// TestHarnessExamples works the examples of AC 43.13-1B step by step: A and B of paragraph 11-69 (from memory), example 2 of 11-67 (seen).
func TestHarnessExamples(t *testing.T) {
	for _, c := range []struct {
		what  string
		r     Run
		id    string
		steps []float64 // A after each step, as the circular prints them
		order string
		tol   float64
	}{
		{"A, 20 AWG", harness(t, 60, 60000, 200, 7, 7, 10, "20 AWG", 25, "22 AWG"), "w20-1", []float64{21.5, 11.2, 8.8}, "base count altitude", 0.05},
		{"A, 22 AWG", harness(t, 60, 60000, 200, 7, 7, 10, "20 AWG", 25, "22 AWG"), "w22-1", []float64{16.2, 8.4, 6.6}, "base count altitude", 0.06},
		{"B, 12 AWG", harness(t, 25, 60000, 200, 12, 20, 12, "12 AWG"), "w12-1", []float64{68, 29.2, 23.1}, "base count altitude", 0.05},
		// Example 2 takes thin air first: 47 A × 0.91 = 42.77 A × 0.6 = 26 A; the curve was read as 0.595.
		{"2, 14 AWG", harness(t, 50, 20000, 200, 4, 20, 8, "14 AWG"), "w14-1", []float64{47, 0.6 * 47, 26}, "base count altitude", 0.6},
	} {
		d := one(t, c.r, "ac-43-13").of(t, c.id)
		if len(d.Steps) != len(c.steps) {
			t.Errorf("%s: %+v", c.what, d)
			continue
		}
		var order []string
		for i, s := range d.Steps {
			near(t, fmt.Sprintf("%s, step %d", c.what, i+1), s.To, c.steps[i], c.tol)
			order = append(order, s.Kind)
		}
		if got := strings.Join(order, " "); got != c.order {
			t.Errorf("%s: %s", c.what, got)
		}
	}
}

// TestWholeHarness: 25 × 6.6 + 10 × 8.8 = 253 A, of which 20 % may be in use, 50.6 A (AC 43.13-1B, 11-69, from memory).
func TestWholeHarness(t *testing.T) {
	h := one(t, harness(t, 60, 60000, 200, 7, 7.5, 10, "20 AWG", 25, "22 AWG"), "ac-43-13").Harness
	if h == nil {
		t.Fatal("no whole-harness line")
	}
	near(t, "capacity", h.CapacityA, 253, 1e-9)
	near(t, "limit", h.LimitA, 50.6, 1e-9)
	near(t, "sum", h.SumA, 52.5, 1e-9)
	if want := "The wires together may carry 50.6 A: 20 % of the harness's capacity of 253 A (AC 43.13-1B). The loads add up to 52.5 A, which is over."; h.Text != want {
		t.Errorf("%q", h.Text)
	}
	h = one(t, harness(t, 60, 60000, 200, 7, math.NaN(), 10, "20 AWG", 25, "22 AWG"), "ac-43-13").Harness
	if !math.IsNaN(h.SumA) || !strings.HasSuffix(h.Text, "What the loads add up to is unknown.") {
		t.Errorf("%+v", h)
	}
}

// TestHarnessTable: where the free-air curve isn't held, table 11-9 stands in while the harness is nowhere harsher than its conditions; else the range is said.
func TestHarnessTable(t *testing.T) {
	d := one(t, harness(t, 70, 60000, 150, 7, 5, 35, "16 AWG"), "ac-43-13").of(t, "w16-1")
	near(t, "16 AWG by table 11-9", d.A, 11, 0)
	for _, c := range []struct {
		what string
		r    Run
		want string
	}{
		{"warmer than the table", harness(t, 75, 0, 150, 7, 5, 35, "16 AWG"), "w16-1: the free-air curve of 16 AWG is not held; AC 43.13-1B table 11-9 is for an ambient up to 70 °C."},
		{"24 of 35 loaded", harness(t, 55, 0, 150, 24, 5, 35, "16 AWG"), "w16-1: the free-air curve of 16 AWG is not held; AC 43.13-1B table 11-9 is for at most 20 % of the harness's capacity in use, and 69 % of the wires can be loaded at once."},
		{"too small a difference", harness(t, 75, 0, 150, 7, 5, 35, "20 AWG"), "w20-1: the free-air curve of 20 AWG is held from 140 K up and this wire has 75 K; AC 43.13-1B table 11-9 is for an ambient up to 70 °C."},
		{"too high", harness(t, 60, 70000, 200, 7, 5, 35, "20 AWG"), "w20-1: 70000 ft is above AC 43.13-1B figure 11-5, which ends at 60000 ft; nothing is extrapolated; AC 43.13-1B table 11-9 is for altitudes up to 60000 ft."},
		{"too many thick ones", harness(t, 60, 0, 150, 2, 5, 10, "8 AWG"), "w8-1: the free-air curve of 8 AWG is not held; AC 43.13-1B table 11-9 is for at most 9 wires of 8 AWG and thicker."},
		{"colder wire than air", harness(t, 160, 0, 150, 2, 5, 10, "20 AWG"), "w20-1: its rating of 150 °C is not above the ambient of 160 °C."},
	} {
		if d := one(t, c.r, "ac-43-13").Conductors[0]; !math.IsNaN(d.A) || d.Why != c.want {
			t.Errorf("%s: %g %q", c.what, d.A, d.Why)
		}
	}
}

// TestAltitudeAndBundleSteps: the next row counts, so that nothing between two points is better than the worse of them (AC 43.13-1B figures 11-5 and 11-6).
func TestAltitudeAndBundleSteps(t *testing.T) {
	h := Shipped().find("ac-43-13").harness
	for ft, want := range map[float64]float64{0: 1, 1000: 0.91, 20000: 0.91, 20001.5: 0.79, 60000: 0.79} {
		if f, _, _ := h.altitude.pick(ft * feet); f != want {
			t.Errorf("%g ft: %g, want %g", ft, f, want)
		}
	}
	for _, c := range []struct {
		n      int
		loaded float64
		want   float64
	}{{8, 0.6, 0.595}, {8, 0.5, 0.595}, {12, 1, 0.43}, {25, 0.2, 0.52}, {33, 0.2, 0.52}, {100, 0.1, 0.52}, {1, 1, 1}} {
		if f, _, why := h.bundle.pick(c.n, c.loaded); f != c.want || why != "" {
			t.Errorf("%d wires, %g loaded: %g %q, want %g", c.n, c.loaded, f, why, c.want)
		}
	}
	// all loaded: 3, 7, 12 and 19 wires 0.725, 0.54, 0.43, 0.34 (bundle curves of MIL-W-5088L, read to ±0.01)
	for n, want := range map[int]float64{3: 0.725, 7: 0.54, 12: 0.43, 19: 0.34} {
		if f, _, _ := h.bundle.pick(n, 1); math.Abs(f-want) > 0.01 {
			t.Errorf("%d wires, all loaded: %g, want %g", n, f, want)
		}
	}
	if _, _, why := h.bundle.pick(25, 0.3); why == "" {
		t.Error("25 wires at 30 % have a factor, and none is held")
	}
}
