package rules

import (
	"fmt"
	"math"
	"testing"
)

// wires makes n conductors prefix1 … prefixN of one kind; load "" leaves them unassigned.
func wires(t testing.TB, prefix string, n int, text, load string, c Conductor) (out []Conductor) {
	t.Helper()
	c.Size = size(t, text)
	if c.Role == "" {
		c.Role = Line
	}
	for i := range n {
		c.ID, c.Load = fmt.Sprintf("%s%d", prefix, i+1), load
		out = append(out, c)
	}
	return out
}

// motors makes so many three-phase circuits of one size.
func motors(t testing.TB, r *Run, prefix string, n int, text string, l Load, c Conductor) {
	t.Helper()
	for i := range n {
		l.ID = fmt.Sprintf("%s-%d", prefix, i+1)
		l.System = ThreePhase
		r.Loads = append(r.Loads, l)
		r.Conductors = append(r.Conductors, wires(t, l.ID+"-", 3, text, l.ID, c)...)
	}
}

// thhn are wires of NEC chapter 9 table 5 (areas 0.0097, 0.0133, 0.0211, 0.0366, 0.1158, 0.1855 in²): their outside diameters in inches.
var thhn = map[string]float64{"14 AWG": 0.111, "12 AWG": 0.130, "10 AWG": 0.164, "8 AWG": 0.216, "6 AWG": 0.254, "2 AWG": 0.384, "1/0 AWG": 0.486}

func thhnWire(text string) Conductor {
	return Conductor{RatingC: 90, Family: Thermoplastic, OutsideMM: 25.4 * thhn[text], Metal: copper}
}

func emt1() Holder {
	return Holder{Kind: Conduit, Stock: "emt-1", InsideMM: 1.049 * 25.4, Metal: true}
}

func wireway4x4() Holder {
	return Holder{Kind: Wireway, Stock: "wireway-4x4", WidthMM: 101.6, HeightMM: 101.6, Metal: true}
}

func one(t testing.TB, r Run, id string) Outcome {
	t.Helper()
	out, problems := Shipped().Apply(r, []string{id})
	if len(problems) > 0 || len(out) != 1 {
		t.Fatalf("%s: %v", id, problems)
	}
	return out[0]
}

func (o Outcome) of(t testing.TB, id string) Rated {
	t.Helper()
	for _, d := range o.Conductors {
		if d.ID == id {
			return d
		}
	}
	t.Fatalf("no conductor %s in %s", id, o.Rule)
	return Rated{}
}

// near wants a current within a tolerance in A.
func near(t testing.TB, what string, got, want, tolerance float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tolerance) {
		t.Errorf("%s is %.4g, want %.4g ± %.2g", what, got, want, tolerance)
	}
}

func (o Outcome) remarked(kind string) string {
	for _, m := range o.Remarks {
		if m.Kind == kind {
			return m.Text
		}
	}
	return ""
}

// sentences are all texts of an outcome.
func (o Outcome) sentences() (out []string) {
	out = append(out, o.Why)
	for _, c := range o.Counts {
		out = append(out, c.Text)
		for _, i := range c.Items {
			out = append(out, i.Why)
		}
	}
	for _, d := range o.Conductors {
		out = append(out, d.Why)
		for _, s := range d.Steps {
			out = append(out, s.Text)
		}
	}
	for _, a := range o.Allowances {
		out = append(out, a.Text)
	}
	for _, m := range o.Remarks {
		out = append(out, m.Text)
	}
	if o.Fill != nil {
		out = append(out, o.Fill.Text)
	}
	if o.Harness != nil {
		out = append(out, o.Harness.Text)
	}
	return out
}

func (p Protected) check(t testing.TB, kind string) Check {
	t.Helper()
	for _, c := range p.Checks {
		if c.Kind == kind {
			return c
		}
	}
	t.Fatalf("%s has no check %s", p.Load, kind)
	return Check{}
}
