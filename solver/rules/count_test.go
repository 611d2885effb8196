package rules

import (
	"fmt"
	"math"
	"math/rand/v2"
	"os"
	"reflect"
	"testing"
)

// TestNeutrals follows NEC 310.15(E).
func TestNeutrals(t *testing.T) {
	for _, c := range []struct {
		what   string
		lines  int
		l      Load
		counts bool
		why    string
	}{
		{"two-wire circuit", 1, Load{System: SinglePhase}, true, "neutral of L, which carries its whole current"},
		{"three-wire, single-phase", 2, Load{System: SinglePhase}, false, "neutral of L, which carries only the unbalanced current (NEC 310.15(E)(1))"},
		{"two phases of a wye", 2, Load{System: ThreePhase}, true, "neutral of L, two phases of three (NEC 310.15(E)(2))"},
		{"four-wire wye", 3, Load{System: ThreePhase}, false, "neutral of L, which carries only the unbalanced current (NEC 310.15(E)(1))"},
		{"four-wire wye, nonlinear", 3, Load{System: ThreePhase, Nonlinear: true}, true, "neutral of L, a nonlinear load (NEC 310.15(E)(3))"},
		{"system not stated", 3, Load{}, true, "neutral of L, whose system is not stated, which counts"},
	} {
		for _, named := range []bool{true, false} { // by the load's key neutral, or standing among its conductors
			r := Run{AmbientC: 30, Holder: emt1()}
			c.l.ID = "L"
			r.Conductors = wires(t, "w", c.lines, "12 AWG", "L", thhnWire("12 AWG"))
			n := thhnWire("12 AWG")
			n.Role = Neutral
			if named {
				c.l.Neutral = "N1"
				r.Conductors = append(r.Conductors, wires(t, "N", 1, "12 AWG", "", n)...)
			} else {
				c.l.Neutral = ""
				r.Conductors = append(r.Conductors, wires(t, "N", 1, "12 AWG", "L", n)...)
			}
			r.Loads = []Load{c.l}
			items := one(t, r, "nec-310").Counts[0].Items
			if got := items[len(items)-1]; got.Counts != c.counts || got.Why != c.why {
				t.Errorf("%s, named %v: %+v", c.what, named, got)
			}
		}
	}
}

// TestReasons: every conductor has its reason, and the count is the number of those that count.
func TestReasons(t *testing.T) {
	r := Run{AmbientC: 30, Holder: emt1(), Loads: []Load{{ID: "heat", NotWith: []string{"cool"}}, {ID: "cool"}, {ID: "fan"}}}
	w := thhnWire("12 AWG")
	add := func(id, load string, role Role) {
		w.Role = role
		r.Conductors = append(r.Conductors, wires(t, id, 1, "12 AWG", load, w)...)
	}
	add("a", "heat", Line)
	add("b", "heat", Line)
	add("c", "cool", Line)
	add("d", "fan", Line)
	add("e", "", Earth)
	add("f", "fan", Spare)
	add("g", "gone", Line)
	add("h", "", Signal)
	add("i", "fan", Control)
	add("j", "", Neutral)
	o := one(t, r, "nec-310")
	want := []Counted{
		{"a1", true, "line of heat"},
		{"b1", true, "line of heat"},
		{"c1", false, "line of cool, which can't run together with others that count"},
		{"d1", true, "line of fan"},
		{"e1", false, "earth"},
		{"f1", true, "spare, which counts as if it were loaded"},
		{"g1", true, "in no load, which counts as a spare"},
		{"h1", false, "signal, which carries no current that warms"},
		{"i1", true, "control wire of fan"},
		{"j1", true, "neutral whose circuit is not stated, which counts"},
	}
	if !reflect.DeepEqual(o.Counts[0].Items, want) {
		t.Errorf("%+v", o.Counts[0].Items)
	}
	if o.Counts[0].N != 7 || o.Counts[0].Total != 8 || o.Counts[0].Text != "7 current-carrying conductors" {
		t.Errorf("%+v", o.Counts[0])
	}
	r.Holder = wireway4x4()
	items := one(t, r, "nec-376-22").Counts[0].Items
	if got := (Counted{"i1", false, "control wire of starting duty (NEC 376.22(B))"}); items[8] != got {
		t.Errorf("%+v", items[8])
	}
}

// TestCircuits counts circuits, spares in threes, and cables with nothing but spares as one.
func TestCircuits(t *testing.T) {
	for _, c := range []struct {
		what   string
		system System
		n      int
		want   int
		loaded int
	}{
		{"three-phase", ThreePhase, 3, 1, 3},
		{"six wires of a three-phase load", ThreePhase, 6, 2, 3},
		{"single-phase", SinglePhase, 2, 1, 2},
		{"twelve wires of a direct-current load", DC, 12, 6, 2},
		{"two wires, system not stated", "", 2, 1, 2},
		{"three wires, system not stated", "", 3, 1, 3},
		{"eight wires, system not stated", "", 8, 4, 3},
	} {
		r := Run{AmbientC: 30, Holder: Holder{Kind: Wireway, WidthMM: 100, HeightMM: 100}, Loads: []Load{{ID: "l", System: c.system}}}
		r.Conductors = wires(t, "w", c.n, "2.5 mm2", "l", Conductor{RatingC: 70})
		o := one(t, r, "iec-52")
		if n, loaded, _ := r.circuitsOf(r.Loads[0]); o.Counts[0].N != c.want || n != c.want || loaded != c.loaded {
			t.Errorf("%s: %d circuits, %d loaded", c.what, o.Counts[0].N, loaded)
		}
	}
	r := Run{AmbientC: 30, Holder: Holder{Kind: Wireway, WidthMM: 100, HeightMM: 100}}
	r.Conductors = wires(t, "loose", 4, "2.5 mm2", "", Conductor{RatingC: 70})
	r.Conductors = append(r.Conductors, wires(t, "C1/", 5, "2.5 mm2", "", Conductor{RatingC: 70, Cable: "C1"})...)
	if n := one(t, r, "iec-52").Counts[0].N; n != 3 {
		t.Errorf("four loose spares and a spare cable are %d circuits, want 3", n)
	}
}

// randomRun draws a run; the same with other currents when the seed of the currents differs.
func randomRun(t testing.TB, seed, currents uint64) Run {
	rng, amps := rand.New(rand.NewPCG(seed, 1)), rand.New(rand.NewPCG(currents, 2))
	r := Run{AmbientC: float64(rng.IntN(60)), AltitudeM: float64(rng.IntN(2)) * 9000}
	holders := []Holder{emt1(), wireway4x4(), {Kind: Jacket, InsideMM: 30}, {Kind: OpenBundle}, {Kind: Wireway, WidthMM: 50, HeightMM: 50}}
	r.Holder = holders[rng.IntN(len(holders))]
	sizes := []string{"12 AWG", "8 AWG", "20 AWG", "2.5 mm2", "10 mm2"}
	roles := []Role{Line, Line, Line, Neutral, Earth, Control, Spare, Signal}
	for i := range 1 + rng.IntN(9) {
		l := Load{ID: fmt.Sprintf("l%d", i), System: []System{"", DC, SinglePhase, ThreePhase}[rng.IntN(4)], Continuous: rng.IntN(2) == 0, Motor: rng.IntN(4) == 0}
		if i > 0 && rng.IntN(3) == 0 {
			l.NotWith = []string{fmt.Sprintf("l%d", rng.IntN(i))}
		}
		l.CurrentA = []float64{math.NaN(), 0, 40 * amps.Float64(), 400 * amps.Float64()}[amps.IntN(4)]
		l.Device = Device{"breaker", []float64{0, 16, 20}[amps.IntN(3)], []float64{0, 1.45}[amps.IntN(2)]}
		r.Loads = append(r.Loads, l)
		for j := range 1 + rng.IntN(5) {
			c := wires(t, fmt.Sprintf("l%d-%d-", i, j), 1, sizes[rng.IntN(len(sizes))], l.ID, Conductor{RatingC: []float64{60, 70, 90, 200, 0}[rng.IntN(5)], OutsideMM: 4})[0]
			c.Role = roles[rng.IntN(len(roles))]
			if rng.IntN(3) == 0 {
				c.Load = ""
			}
			if rng.IntN(4) == 0 {
				c.Cable = "C1"
			}
			r.Conductors = append(r.Conductors, c)
		}
	}
	return r
}

// seeds is how many random runs are drawn: few for the race detector, many with PACKRISE_SOAK=1.
func seeds() uint64 {
	switch {
	case testing.Short():
		return 20
	case os.Getenv("PACKRISE_SOAK") == "1":
		return 5000
	}
	return 150
}

// TestCountsReadNoCurrent: with any other currents and devices, counts, factors and permitted currents stay as they are, by every rule set.
func TestCountsReadNoCurrent(t *testing.T) {
	rated := 0
	for seed := range seeds() {
		a, _ := Shipped().Apply(randomRun(t, seed, 1), Shipped().IDs())
		b, _ := Shipped().Apply(randomRun(t, seed, 2+seed), Shipped().IDs())
		for i := range a {
			if !reflect.DeepEqual(a[i].Counts, b[i].Counts) || !same(a[i].Factor, b[i].Factor) {
				t.Errorf("seed %d, %s: %+v and %+v", seed, a[i].Rule, a[i].Counts, b[i].Counts)
			}
			for j, d := range a[i].Conductors {
				if !same(d.A, b[i].Conductors[j].A) {
					t.Errorf("seed %d, %s: %+v and %+v", seed, a[i].Rule, d, b[i].Conductors[j])
				}
				if !math.IsNaN(d.A) {
					rated++
				}
			}
		}
	}
	if rated < 10*int(seeds()) {
		t.Errorf("only %d conductors were rated", rated)
	}
}

// TestOutcomesHoldTogether: every conductor has a current or a reason, every count its items, every step its arithmetic and its clause; more conductors never
// raise a current, but where idle ones lower the share in use (annex B, the harness).
func TestOutcomesHoldTogether(t *testing.T) {
	for seed := range seeds() {
		r := randomRun(t, seed, seed)
		all, _ := Shipped().Apply(r, Shipped().IDs())
		more := r
		more.Conductors = append(append([]Conductor(nil), r.Conductors...), wires(t, "extra", 3, "12 AWG", "", thhnWire("12 AWG"))...)
		crowded, _ := Shipped().Apply(more, Shipped().IDs())
		for i, o := range all {
			if o.Applies == (o.Why != "") {
				t.Errorf("%s applies %v, %q", o.Rule, o.Applies, o.Why)
			}
			for j, d := range o.Conductors {
				if math.IsNaN(d.A) == (d.Why == "") || math.IsNaN(d.A) != (len(d.Steps) == 0) {
					t.Errorf("%s: %+v", o.Rule, d)
				}
				for k, s := range d.Steps {
					if s.Clause == "" || s.Text == "" || k > 0 && (math.Abs(s.From*s.Factor-s.To) > 1e-9 || s.From != d.Steps[k-1].To) {
						t.Errorf("%s: %+v", o.Rule, s)
					}
				}
				if c := crowded[i].Conductors[j]; o.Rule != "nec-annex-b" && o.Rule != "ac-43-13" && c.A > d.A+1e-9 {
					t.Errorf("%s, %s: three more raise %g to %g", o.Rule, d.ID, d.A, c.A)
				}
			}
			counted := 0
			for _, c := range o.Counts {
				for _, item := range c.Items {
					if item.Why == "" {
						t.Errorf("%s: no reason for %s", o.Rule, item.ID)
					}
					counted++
				}
			}
			if len(o.Counts) > 0 && counted != len(r.Conductors) {
				t.Errorf("%s: %d of %d conductors have a reason", o.Rule, counted, len(r.Conductors))
			}
		}
	}
}
