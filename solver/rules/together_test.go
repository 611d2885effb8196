package rules

import (
	"math"
	"testing"
)

// TestMixedSizes: 1/√n (IEC 60364-5-52 B.52.5, from memory) in conduit and trunking when sizes span more than three neighbours; never elsewhere.
func TestMixedSizes(t *testing.T) {
	pvc := Conductor{RatingC: 70}
	build := func(h Holder, thick string) Outcome {
		r := Run{AmbientC: 30, Holder: h}
		motors(t, &r, "thin", 3, "2.5 mm2", Load{CurrentA: math.NaN()}, pvc)
		motors(t, &r, "thick", 1, thick, Load{CurrentA: math.NaN()}, pvc)
		return one(t, r, "iec-52")
	}
	trunking := Holder{Kind: Wireway, WidthMM: 100, HeightMM: 100, Metal: true}
	near(t, "2.5 to 6 mm² are three neighbours, B.52.17", build(trunking, "6 mm2").Conductors[0].A, 21*0.65, 1e-9)
	near(t, "2.5 to 10 mm² are four, 1/√4", build(trunking, "10 mm2").Conductors[0].A, 21*0.5, 1e-9)
	o := build(Holder{Kind: Jacket}, "10 mm2")
	near(t, "in one jacket the table stays", o.Conductors[0].A, 25*0.65, 1e-9)
	if o.remarked("mixed-sizes") == "" {
		t.Error("no remark on sizes that span more than the table is for")
	}
}

// TestLightlyLoaded: three of six circuits at 1 A are under 30 % of their grouped 11.97 A (IEC 60364-5-52 523.5): the others may take 0.70. The count stays six.
func TestLightlyLoaded(t *testing.T) {
	r := Run{AmbientC: 30, Holder: Holder{Kind: Conduit, InsideMM: 40}}
	motors(t, &r, "a", 3, "2.5 mm2", Load{CurrentA: 12}, Conductor{RatingC: 70})
	motors(t, &r, "b", 3, "2.5 mm2", Load{CurrentA: 1}, Conductor{RatingC: 70})
	o := one(t, r, "iec-52")
	if len(o.Allowances) != 1 || o.Counts[0].N != 6 {
		t.Fatalf("%+v %+v", o.Allowances, o.Counts[0])
	}
	a := o.Allowances[0]
	if a.N != 3 || len(a.LeftOut) != 3 || a.Factor != 0.7 || len(a.Currents) != 9 {
		t.Errorf("%+v", a)
	}
	near(t, "a-1-1", a.Currents["a-1-1"], 21*0.7, 1e-9)
	near(t, "and by the count", o.of(t, "a-1-1").A, 21*0.57, 1e-9)
	want := "b-1, b-2 and b-3 carry at most 30 % of their grouped rating and may be left out for the others (IEC 60364-5-52 523.5): then 3 circuits count, with 0.70 instead of 0.57."
	if a.Text != want {
		t.Errorf("%q", a.Text)
	}
	for i := range r.Loads {
		r.Loads[i].CurrentA = math.NaN() // unknown is not small
	}
	if o := one(t, r, "iec-52"); len(o.Allowances) != 0 {
		t.Errorf("unknown currents: %+v", o.Allowances)
	}
}

// TestOutsideTheRange: a rule says its range and gives no current.
func TestOutsideTheRange(t *testing.T) {
	wire := func(text string, ratingC float64) Run {
		return Run{AmbientC: 30, Holder: emt1(), Conductors: wires(t, "w", 1, text, "", Conductor{RatingC: ratingC})}
	}
	hot := wire("12 AWG", 60)
	hot.AmbientC = 56
	many := Run{AmbientC: 30, Holder: Holder{Kind: Conduit, InsideMM: 60}}
	motors(t, &many, "m", 21, "2.5 mm2", Load{}, Conductor{RatingC: 70})
	tin := wire("12 AWG", 90)
	tin.Conductors[0].Metal = "steel"
	method := wire("2.5 mm2", 70)
	method.Method = "D1"
	thick := Run{AmbientC: 30, Holder: Holder{Kind: Jacket}, Conductors: wires(t, "w", 5, "16 mm2", "", Conductor{RatingC: 70})}
	for _, c := range []struct {
		r    Run
		rule string
		want string
	}{
		{wire("26 AWG", 90), "nec-310", "w1: NEC table 310.16 runs from 18 AWG to 2000 kcmil and has no 26 AWG; nothing is extrapolated."},
		{wire("18 AWG", 75), "nec-310", "w1: NEC table 310.16 gives no current for 18 AWG copper, 75 °C column; it starts at 14 AWG."},
		{wire("2.5 mm2", 70), "nec-310", "w1: NEC table 310.16 runs from 18 AWG to 2000 kcmil and has no 2.5 mm²; nothing is extrapolated."},
		{wire("12 AWG", 0), "nec-310", "w1: its temperature rating is unknown; write its type or limit_c."},
		{wire("12 AWG", math.NaN()), "nec-310", "w1: its temperature rating is unknown; write its type or limit_c."},
		{wire("12 AWG", 50), "nec-310", "w1: the wire is rated 50 °C and NEC table 310.16 starts at 60 °C."},
		{hot, "nec-310", "w1: an ambient of 56 °C is above NEC 310.15(B)(1)(1), which for wire of 60 °C ends at 55 °C; nothing is extrapolated."},
		{tin, "nec-310", "w1: NEC table 310.16 has no steel."},
		{many, "iec-52", "m-1-1: 21 circuits are more than IEC 60364-5-52 table B.52.17 has, which ends at 20; nothing is extrapolated."},
		{method, "iec-52", "w1: IEC 60364-5-52 has no method \"D1\"; it has A1, A2, B1, B2, C, E, F, F flat, G or G horizontal."},
		{thick, "vde-0298-4", "w1: DIN VDE 0298-4 table 26 is for conductors up to 10 mm²; nothing is extrapolated."},
	} {
		o := one(t, c.r, c.rule)
		if d := o.Conductors[0]; !math.IsNaN(d.A) || len(d.Steps) != 0 || d.Why != c.want {
			t.Errorf("%s: %g %q, want %q", c.rule, d.A, d.Why, c.want)
		}
	}
}

// TestDoesNotApply: a rule set that is for something else says so, and what is for this.
func TestDoesNotApply(t *testing.T) {
	r := Run{AmbientC: 30, Holder: wireway4x4(), Conductors: wires(t, "w", 3, "12 AWG", "", thhnWire("12 AWG"))}
	panel := r
	panel.ListedPanel = true
	unknown := r
	unknown.AmbientC = math.NaN()
	for _, c := range []struct {
		r    Run
		rule string
		want string
	}{
		{r, "nec-310", "NEC table 310.16 does not apply: a wireway is judged by its own article: nec-376-22 of metal, nec-378-22 not of metal."},
		{r, "nec-378-22", "NEC 378.22 does not apply: it is for wireways not of metal; metal ones are judged by nec-376-22."},
		{panel, "nec-376-22", "NEC 376.22 does not apply: inside a listed panel the panel's own standard (UL 508A) rules, not the wiring code, which starts at its terminals."},
		{panel, "iec-52", "IEC 60364-5-52 does not apply: inside a panel its own standards rule (IEC 61439, IEC 60204-1), not the rules for fixed wiring; iec-60204 is the usual one."},
		{unknown, "nec-376-22", "No ambient temperature was entered, and NEC 376.22 needs one."},
	} {
		o := one(t, c.r, c.rule)
		if o.Applies || o.Why != c.want || len(o.Conductors) != 3 || !math.IsNaN(o.Conductors[0].A) {
			t.Errorf("%s: %v %q, want %q", c.rule, o.Applies, o.Why, c.want)
		}
	}
	if o := one(t, panel, "iec-60204"); !o.Applies {
		t.Errorf("iec-60204 in a panel: %s", o.Why)
	}
}

func TestUsual(t *testing.T) {
	american := wires(t, "w", 4, "12 AWG", "", thhnWire("12 AWG"))
	metric := wires(t, "w", 4, "2.5 mm2", "", Conductor{RatingC: 70})
	hot := wires(t, "w", 4, "20 AWG", "", Conductor{RatingC: 200})
	for _, c := range []struct {
		r    Run
		want string
	}{
		{Run{Conductors: american, Holder: emt1()}, "nec-310"},
		{Run{Conductors: american, Holder: wireway4x4()}, "nec-376-22"},
		{Run{Conductors: american, Holder: Holder{Kind: Wireway}}, "nec-378-22"},
		{Run{Conductors: american, Holder: Holder{Kind: OpenBundle}}, "nec-310-17"},
		{Run{Conductors: hot, Holder: Holder{Kind: OpenBundle}}, "ac-43-13"},
		{Run{Conductors: metric, Holder: emt1()}, "iec-52"},
		{Run{Conductors: metric, Holder: wireway4x4(), ListedPanel: true}, "iec-60204"},
		{Run{Conductors: metric, Holder: conduit(t, "duct-60x80")}, "iec-60204"},
	} {
		got := Shipped().Usual(c.r)
		if got[0] != c.want {
			t.Errorf("%+v: %v, want %s first", c.r.Holder, got, c.want)
		}
		if _, problems := Shipped().Apply(c.r, got); len(problems) > 0 {
			t.Error(problems)
		}
	}
}

// TestOpenAir: a core of a cable in an open bundle is rated by table 310.16 with the count of the whole bundle, a loose wire by 310.17 (NEC 310.15(C)(1)).
func TestOpenAir(t *testing.T) {
	r := Run{AmbientC: 30, Holder: Holder{Kind: OpenBundle}}
	motors(t, &r, "m", 2, "12 AWG", Load{}, thhnWire("12 AWG"))
	for i := range 3 {
		r.Conductors[i].Cable = "C1"
	}
	loose, cable := one(t, r, "nec-310-17"), one(t, r, "nec-310")
	near(t, "core", cable.of(t, "m-1-1").A, 30*0.8, 1e-9)
	near(t, "wire", loose.of(t, "m-2-1").A, 40*0.8, 1e-9)
	if d := cable.of(t, "m-2-1"); d.Why != "m-2-1: NEC table 310.16 is for cables here, and this is a loose wire." {
		t.Errorf("%+v", d)
	}
	if d := loose.of(t, "m-1-1"); d.Why != "m-1-1: NEC table 310.17 is for loose wires, and this is a core of a cable." {
		t.Errorf("%+v", d)
	}
	if got := Shipped().Usual(r); len(got) != 2 {
		t.Errorf("%v", got)
	}
	r.Conductors = r.Conductors[3:]
	if o := one(t, r, "nec-310"); o.Applies || o.Why != "NEC table 310.16 does not apply: wires in open air are judged by nec-310-17." {
		t.Errorf("%q", o.Why)
	}
}
