package rules

import (
	"fmt"
	"math"
	"testing"
)

// TestNECFigures: currents of NEC tables 310.16 and 310.15(C)(1), 2023, times each other; the last figure of each is worked out here by hand.
func TestNECFigures(t *testing.T) {
	three := func(n int, text string, holder Holder, ambient float64) Run {
		r := Run{AmbientC: ambient, Holder: holder}
		motors(t, &r, "m", n/3, text, Load{CurrentA: 10}, thhnWire(text))
		r.Conductors = append(r.Conductors, wires(t, "s", n%3, text, "", thhnWire(text))...)
		return r
	}
	pvc := wireway4x4()
	pvc.Metal = false
	nipple := emt1()
	nipple.LengthM = 0.6096 // 24 in
	for _, c := range []struct {
		what string
		r    Run
		rule string
		n    int
		want float64 // A, rounded down
	}{
		{"three 8 AWG in EMT", three(3, "8 AWG", emt1(), 30), "nec-310", 3, 55},
		{"nine 8 AWG in 1-inch EMT, 55 × 0.70", three(9, "8 AWG", emt1(), 30), "nec-310", 9, 38.5},
		{"nine 12 AWG, 30 × 0.70", three(9, "12 AWG", emt1(), 30), "nec-310", 9, 21},
		{"nine 8 AWG at 110 °F, 55 × 0.70 × 0.87 = 33.495", three(9, "8 AWG", emt1(), 43.3), "nec-310", 9, 33.4},
		{"ten, 30 × 0.50", three(10, "12 AWG", emt1(), 30), "nec-310", 10, 15},
		{"22, 30 × 0.45", three(22, "12 AWG", emt1(), 30), "nec-310", 22, 13.5},
		{"nine in a nipple of 24 in", three(9, "8 AWG", nipple, 30), "nec-310", 9, 55},
		{"41 and more of 1 AWG, 145 × 0.35 = 50.75, under a fan of 52 A", three(42, "1 AWG", emt1(), 30), "nec-310", 42, 50.7},
		{"the next size holds it, 170 × 0.35", three(42, "1/0 AWG", emt1(), 30), "nec-310", 42, 59.5},
		{"30 in a metal wireway", three(30, "12 AWG", wireway4x4(), 30), "nec-376-22", 30, 30},
		{"31 in a metal wireway, 30 × 0.40", three(31, "12 AWG", wireway4x4(), 30), "nec-376-22", 31, 12},
		{"31 of 2 AWG, 130 × 0.40", three(31, "2 AWG", wireway4x4(), 30), "nec-376-22", 31, 52},
		{"31 of 1/0, 170 × 0.40", three(31, "1/0 AWG", wireway4x4(), 30), "nec-376-22", 31, 68},
		{"four in a wireway of PVC, 30 × 0.80", three(4, "12 AWG", pvc, 30), "nec-378-22", 4, 24},
		{"12 AWG alone in free air", three(1, "12 AWG", Holder{Kind: Single}, 30), "nec-310-17", 1, 40},
		{"nine 12 AWG bundled in free air, 40 × 0.70", three(9, "12 AWG", Holder{Kind: OpenBundle}, 30), "nec-310-17", 9, 28},
		{"22 by annex B, all at once: 30 × 0.70 × √0.5 = 14.849", three(22, "12 AWG", emt1(), 30), "nec-annex-b", 22, 14.8},
	} {
		o := one(t, c.r, c.rule)
		if !o.Applies || len(o.Counts) != 1 || o.Counts[0].N != c.n {
			t.Errorf("%s: applies %v, %s, counts %+v", c.what, o.Applies, o.Why, o.Counts)
			continue
		}
		d := o.Conductors[0]
		near(t, c.what, math.Floor(d.A*10+1e-9)/10, c.want, 1e-9)
		product := 1.0
		for i, s := range d.Steps {
			if product *= s.Factor; i > 0 && math.Abs(s.From*s.Factor-s.To) > 1e-9 || s.Text == "" || s.Clause == "" {
				t.Errorf("%s: step %+v", c.what, s)
			}
		}
		near(t, c.what+", product of its steps", d.Steps[0].To*product, d.A, 1e-9)
	}
}

// TestSentences holds a few steps to the letter.
func TestSentences(t *testing.T) {
	r := Run{AmbientC: 43.3, Holder: emt1()}
	motors(t, &r, "m", 3, "8 AWG", Load{CurrentA: 32}, thhnWire("8 AWG"))
	var got []string
	o := one(t, r, "nec-310")
	for _, s := range o.of(t, "m-1-1").Steps {
		got = append(got, s.Text)
	}
	want := []string{
		"55 A (8 AWG copper, 90 °C column, NEC table 310.16)",
		"55 A × 0.70 (7–9 current-carrying conductors, NEC 310.15(C)(1)) = 38.5 A",
		"38.5 A × 0.87 (ambient 41–45 °C, NEC 310.15(B)(1)(1)) = 33.4 A",
	}
	if fmt.Sprint(got) != fmt.Sprint(want) {
		t.Errorf("got  %q\nwant %q", got, want)
	}
	if got, want := o.remarked("step-ahead"), "One more current-carrying conductor would take the factor from 0.70 to 0.50 (NEC 310.15(C)(1))."; got != want {
		t.Errorf("got %q, want %q", got, want)
	}
}

// TestWirewayOf38 is a 4 × 4 in wireway with 24 × 12, 8 × 10 and 3 × 8 AWG loaded and three control wires: 35 count, and 40 % leaves 12, 16 and 22 A (NEC
// 376.22(B), 310.16). The motor of 30 A asks for 37.5 A (430.22). Heavy: 12 × 2, 6 × 1/0, 20 × 12 AWG, 52 and 68 A, fill 17.3 % (areas of chapter 9 table 5).
func TestWirewayOf38(t *testing.T) {
	r := Run{AmbientC: 30, Holder: wireway4x4()}
	motors(t, &r, "light", 8, "12 AWG", Load{CurrentA: 12}, thhnWire("12 AWG"))
	for i := range 4 {
		id := fmt.Sprintf("heat-%d", i+1)
		r.Loads = append(r.Loads, Load{ID: id, System: SinglePhase, CurrentA: 16})
		r.Conductors = append(r.Conductors, wires(t, id+"-", 2, "10 AWG", id, thhnWire("10 AWG"))...)
	}
	motors(t, &r, "motor", 1, "8 AWG", Load{CurrentA: 30, Motor: true}, thhnWire("8 AWG"))
	control := thhnWire("14 AWG")
	control.Role = Control
	r.Conductors = append(r.Conductors, wires(t, "c", 3, "14 AWG", "", control)...)

	o := one(t, r, "nec-376-22")
	if o.Counts[0].N != 35 {
		t.Errorf("%d count, want 35", o.Counts[0].N)
	}
	for id, want := range map[string]float64{"light-1-1": 12, "heat-1-1": 16, "motor-1-1": 22} {
		near(t, id, o.of(t, id).A, want, 1e-9)
	}
	near(t, "fill", o.Fill.Share, 0.627/16, 0.0002)
	if got, want := o.remarked("control"), "c1, c2 and c3 are taken as serving only the starting of motors and do not count (NEC 376.22(B)); serving longer they would count and change no factor here."; got != want {
		t.Errorf("got %q, want %q", got, want)
	}
	fewer := r
	fewer.Conductors = r.Conductors[6:] // 29 loaded, three control
	if got, want := one(t, fewer, "nec-376-22").remarked("control"), "c1, c2 and c3 are taken as serving only the starting of motors and do not count (NEC 376.22(B)); serving longer they would make it 32 current-carrying conductors, with 0.40 instead of 1.00."; got != want {
		t.Errorf("got %q, want %q", got, want)
	}
	p := Shipped().Protect(r, []Permitted{{"nec-376-22", amounts(o)}})
	motor := p[len(p)-1]
	c := motor.check(t, CheckMotorWire)
	if c.Within || c.Value != 37.5 || math.Abs(c.Limit-22) > 1e-9 {
		t.Errorf("motor: %+v", c)
	}

	heavy := Run{AmbientC: 30, Holder: wireway4x4()}
	heavy.Conductors = append(heavy.Conductors, wires(t, "a", 12, "2 AWG", "", thhnWire("2 AWG"))...)
	heavy.Conductors = append(heavy.Conductors, wires(t, "b", 6, "1/0 AWG", "", thhnWire("1/0 AWG"))...)
	heavy.Conductors = append(heavy.Conductors, wires(t, "c", 20, "12 AWG", "", thhnWire("12 AWG"))...)
	o = one(t, heavy, "nec-376-22")
	near(t, "2 AWG", o.of(t, "a1").A, 52, 1e-9)
	near(t, "1/0 AWG", o.of(t, "b1").A, 68, 1e-9)
	near(t, "fill", o.Fill.Share, 0.173, 0.0005)
	if o.Fill.Over {
		t.Error("17.3 % is over 20 %")
	}
}

func amounts(o Outcome) map[string]float64 {
	a := map[string]float64{}
	for _, d := range o.Conductors {
		a[d.ID] = d.A
	}
	return a
}

// TestStep30to31 is the step of NEC 376.22(B), announced on both sides.
func TestStep30to31(t *testing.T) {
	for n, want := range map[int]string{
		29: "",
		30: "One more current-carrying conductor would take the factor from 1.00 to 0.40 (NEC 376.22(B) and 310.15(C)(1)).",
		31: "One fewer current-carrying conductor would take the factor from 0.40 to 1.00 (NEC 376.22(B) and 310.15(C)(1)).",
	} {
		r := Run{AmbientC: 30, Holder: wireway4x4()}
		r.Conductors = wires(t, "w", n, "12 AWG", "", thhnWire("12 AWG"))
		if got := one(t, r, "nec-376-22").remarked("step-ahead"); got != want {
			t.Errorf("%d: %q, want %q", n, got, want)
		}
	}
}

// TestAnnexBDiversity: 22 wires of which eleven run at once keep the table's 70 %, 30 × 0.70 = 21 A (formula of annex B, from memory); nine are untouched by it.
func TestAnnexBDiversity(t *testing.T) {
	for _, c := range []struct {
		n, atOnce int
		want      float64
	}{{22, 22, 30 * 0.7 * math.Sqrt(0.5)}, {22, 11, 21}, {22, 4, 21}, {22, 16, 30 * 0.7 * math.Sqrt(11.0/16)}, {9, 9, 21}, {42, 42, 30 * 0.6 * math.Sqrt(0.5)}} {
		r := Run{AmbientC: 30, Holder: emt1()}
		var ids []string
		for i := range c.n {
			id := fmt.Sprintf("l%d", i+1)
			ids = append(ids, id)
			r.Loads = append(r.Loads, Load{ID: id, System: SinglePhase, CurrentA: 6})
			r.Conductors = append(r.Conductors, wires(t, id+"-", 1, "12 AWG", id, thhnWire("12 AWG"))...)
		}
		r.AtMost = []AtMost{{ids, c.atOnce}}
		o := one(t, r, "nec-annex-b")
		if !o.Informative || o.Counts[0].Total != c.n || o.Counts[0].N != c.atOnce {
			t.Errorf("%+v", o.Counts)
		}
		near(t, fmt.Sprintf("%d of %d", c.atOnce, c.n), o.Conductors[0].A, c.want, 1e-9)
	}
	r := Run{AmbientC: 30, Holder: emt1(), Conductors: wires(t, "w", 86, "12 AWG", "", thhnWire("12 AWG"))}
	if d := one(t, r, "nec-annex-b").Conductors[0]; !math.IsNaN(d.A) || d.Why != "w1: 86 current-carrying conductors are more than NEC annex B has, which ends at 85; nothing is extrapolated." {
		t.Errorf("%+v", d)
	}
}

// TestIECFigures: IEC 60364-5-52, IEC 60204-1 and DIN VDE 0298-4, the products worked out by hand.
func TestIECFigures(t *testing.T) {
	pvc := Conductor{RatingC: 70, Family: Thermoplastic, OutsideMM: 4}
	trunking := Holder{Kind: Wireway, WidthMM: 97.6, HeightMM: 97.6, Metal: true}
	build := func(n int, text string, system System, h Holder, ambient float64, cable string) Run {
		r := Run{AmbientC: ambient, Holder: h}
		motors(t, &r, "m", n, text, Load{CurrentA: math.NaN()}, pvc)
		for i := range r.Loads {
			r.Loads[i].System = system
		}
		for i := range r.Conductors {
			r.Conductors[i].Cable = cable
		}
		return r
	}
	for _, c := range []struct {
		what string
		r    Run
		rule string
		want float64
	}{
		{"one three-phase circuit in trunking, B1", build(1, "2.5 mm2", ThreePhase, trunking, 30, ""), "iec-52", 21},
		{"six, 21 × 0.57 = 11.97", build(6, "2.5 mm2", ThreePhase, trunking, 30, ""), "iec-52", 21 * 0.57},
		{"ten take the row of 12, 21 × 0.45", build(10, "2.5 mm2", ThreePhase, trunking, 30, ""), "iec-52", 21 * 0.45},
		{"at 33 °C the row of 35 °C", build(1, "2.5 mm2", ThreePhase, trunking, 33, ""), "iec-52", 21 * 0.94},
		{"three-core cable in free air, E: 2.5 mm² 25 A", build(1, "2.5 mm2", ThreePhase, Holder{Kind: Jacket}, 30, ""), "iec-52", 25},
		{"6 mm² 43 A", build(1, "6 mm2", ThreePhase, Holder{Kind: Jacket}, 30, ""), "iec-52", 43},
		{"25 mm² 101 A", build(1, "25 mm2", ThreePhase, Holder{Kind: Jacket}, 30, ""), "iec-52", 101},
		{"16 mm² 80 A", build(1, "16 mm2", ThreePhase, Holder{Kind: Single}, 30, "C1"), "iec-52", 80},
		{"spaced singles, G vertical 25 mm² 130 A", build(1, "25 mm2", ThreePhase, Holder{Kind: Apart}, 30, ""), "iec-52", 130},
		{"trefoil, F 25 mm² 110 A", build(1, "25 mm2", ThreePhase, Holder{Kind: OpenBundle}, 30, ""), "iec-52", 110},
		{"panel, table 6 B1 at 40 °C", build(1, "2.5 mm2", ThreePhase, trunking, 40, ""), "iec-60204", 18.3},
		{"panel, nine circuits at 55 °C, 18.3 × 0.50 × 0.71", build(9, "2.5 mm2", ThreePhase, trunking, 55, ""), "iec-60204", 18.3 * 0.5 * 0.71},
		{"jumper of 10 mm², E at 40 °C", build(1, "10 mm2", ThreePhase, Holder{Kind: Jacket}, 40, ""), "iec-60204", 52},
	} {
		o := one(t, c.r, c.rule)
		if !o.Applies {
			t.Errorf("%s: %s", c.what, o.Why)
			continue
		}
		near(t, c.what, o.Conductors[0].A, c.want, 1e-9)
	}
	r := build(1, "25 mm2", ThreePhase, Holder{Kind: Apart}, 30, "")
	r.Method = "G horizontal"
	near(t, "G horizontal, 25 mm²", one(t, r, "iec-52").Conductors[0].A, 146, 1e-9) // CHECKS 9
}

// TestStageMulticore: 19 × 2.5 mm² rubber, six circuits L and N, six earths, one spare, 35 °C: 13 loaded cores take the row of 14, 26 × 0.50 × 0.91 = 11.83 A
// (DIN VDE 0298-4 tables 11, 26, 17).
func TestStageMulticore(t *testing.T) {
	r := Run{AmbientC: 35, Holder: Holder{Kind: Jacket}}
	rubber := Conductor{RatingC: 60, Family: Rubber}
	for i := range 6 {
		id := fmt.Sprintf("circuit-%d", i+1)
		r.Loads = append(r.Loads, Load{ID: id, CurrentA: 13})
		r.Conductors = append(r.Conductors, wires(t, id+"L", 1, "2.5 mm2", id, rubber)...)
		n := rubber
		n.Role = Neutral
		r.Conductors = append(r.Conductors, wires(t, id+"N", 1, "2.5 mm2", id, n)...)
		e := rubber
		e.Role = Earth
		r.Conductors = append(r.Conductors, wires(t, id+"E", 1, "2.5 mm2", "", e)...)
	}
	spare := rubber
	spare.Role = Spare
	r.Conductors = append(r.Conductors, wires(t, "X", 1, "2.5 mm2", "", spare)...)
	o := one(t, r, "vde-0298-4")
	if o.Counts[0].N != 13 {
		t.Errorf("%d loaded cores, want 13", o.Counts[0].N)
	}
	near(t, "core", o.of(t, "circuit-1L1").A, 26*0.5*0.91, 1e-9)
	if got, want := o.of(t, "circuit-1L1").Steps[1].Text, "26 A × 0.50 (13 loaded cores, row of 14, DIN VDE 0298-4 table 26) = 13 A"; got != want {
		t.Errorf("got %q, want %q", got, want)
	}
	if d := o.of(t, "circuit-1E1"); !math.IsNaN(d.A) || d.Why == "" {
		t.Errorf("earth is rated: %+v", d)
	}
}

// TestRobotUmbilical: three phases of 4 mm², six of 1.5, twelve valves of which eight run at once: 17 loaded cores take the row of 19, 34 × 0.87 × 0.45 = 13.3 A at
// 40 °C (DIN VDE 0298-4). The three spares, once they count, take it to the row of 24.
func TestRobotUmbilical(t *testing.T) {
	core := Conductor{RatingC: 90}
	r := Run{AmbientC: 40, Holder: Holder{Kind: Jacket}}
	motors(t, &r, "drive", 1, "4 mm2", Load{CurrentA: 22}, core)
	for i := range 3 {
		id := fmt.Sprintf("dc-%d", i+1)
		r.Loads = append(r.Loads, Load{ID: id, System: DC, CurrentA: 6})
		r.Conductors = append(r.Conductors, wires(t, id+"-", 2, "1.5 mm2", id, core)...)
	}
	valve, ids := Conductor{RatingC: 70}, []string(nil)
	for i := range 12 {
		id := fmt.Sprintf("valve-%d", i+1)
		ids = append(ids, id)
		r.Loads = append(r.Loads, Load{ID: id, System: DC, CurrentA: 1})
		r.Conductors = append(r.Conductors, wires(t, id+"-", 1, "0.5 mm2", id, valve)...)
	}
	signal := Conductor{RatingC: 70, Role: Signal}
	r.Conductors = append(r.Conductors, wires(t, "signal", 12, "0.25 mm2", "", signal)...)
	r.AtMost = []AtMost{{ids, 8}}
	o := one(t, r, "vde-0298-4")
	if o.Counts[0].N != 17 || o.Counts[0].Total != 21 {
		t.Errorf("%d of %d loaded cores, want 17 of 21", o.Counts[0].N, o.Counts[0].Total)
	}
	near(t, "phase", o.Conductors[0].A, 34*0.87*0.45, 1e-9)
	r.Conductors = append(r.Conductors, wires(t, "spare", 3, "0.5 mm2", "", Conductor{RatingC: 70, Role: Spare})...)
	near(t, "phase with spares", one(t, r, "vde-0298-4").Conductors[0].A, 34*0.87*0.40, 1e-9)
}
