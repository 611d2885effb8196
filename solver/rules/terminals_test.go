package rules

import (
	"math"
	"strings"
	"testing"
)

// TestTerminalColumns: NEC 110.14(C), the uncorrected column of table 310.16 (2023) of the terminal's rating.
func TestTerminalColumns(t *testing.T) {
	for _, c := range []struct {
		what   string
		text   string
		metal  string
		l      Load
		want   float64 // A; NaN none
		column string
	}{
		{"12 AWG with a 75 °C terminal", "12 AWG", copper, Load{Terminal: Terminal{RatingC: 75}}, 25, "75 °C"},
		{"12 AWG with a 60 °C terminal", "12 AWG", copper, Load{Terminal: Terminal{RatingC: 60}}, 20, "60 °C"},
		{"8 AWG with a 75 °C terminal", "8 AWG", copper, Load{Terminal: Terminal{RatingC: 75}}, 50, "75 °C"},
		{"8 AWG, not marked", "8 AWG", copper, Load{}, 40, "60 °C"},
		{"1 AWG, not marked, above 100 A", "1 AWG", copper, Load{CurrentA: 105}, 110, "60 °C"},
		{"1/0, not marked, circuit of 125 A", "1/0 AWG", copper, Load{CurrentA: 90, Device: Device{RatingA: 125}}, 150, "75 °C"},
		{"1/0, not marked, circuit of 100 A", "1/0 AWG", copper, Load{CurrentA: 90, Device: Device{RatingA: 100}}, 125, "60 °C"},
		{"1/0, not marked, 120 A without a device", "1/0 AWG", copper, Load{CurrentA: 120}, 150, "75 °C"},
		{"1/0, not marked, nothing known", "1/0 AWG", copper, Load{CurrentA: math.NaN()}, 125, "60 °C"},
		{"aluminium 8 AWG, 75 °C", "8 AWG", "aluminium", Load{Terminal: Terminal{RatingC: 75}}, 40, "75 °C"},
		{"a terminal of 105 °C takes the last column", "12 AWG", copper, Load{Terminal: Terminal{RatingC: 105}}, 30, "90 °C"},
		{"16 AWG has no 60 °C current", "16 AWG", copper, Load{}, math.NaN(), "rated_a"},
		{"a terminal of 50 °C has no column", "12 AWG", copper, Load{Terminal: Terminal{RatingC: 50}}, math.NaN(), "rated_a"},
		{"the person's own value", "12 AWG", copper, Load{Terminal: Terminal{RatedA: 13, RatingC: 75}}, 13, "as entered"},
	} {
		c.l.ID = "l"
		r := Run{Loads: []Load{c.l}, Conductors: wires(t, "w", 1, c.text, "l", Conductor{RatingC: 90, Metal: c.metal})}
		caps := Shipped().Terminals(r)
		if len(caps) != 1 || !same(caps[0].A, c.want) || !strings.Contains(caps[0].Text, c.column) || caps[0].Assumed != (c.l.Terminal == Terminal{}) {
			t.Errorf("%s: %+v", c.what, caps)
		}
	}
}

// TestTerminalBlocks: IEC 60947-7-1 rated currents, from memory.
func TestTerminalBlocks(t *testing.T) {
	want := map[string]float64{"2.5 mm2": 24, "4 mm2": 32, "6 mm2": 41, "10 mm2": 57, "16 mm2": 76, "25 mm2": 101, "1.5 mm2": math.NaN(), "35 mm2": math.NaN()}
	for text, a := range want {
		r := Run{Loads: []Load{{ID: "l"}}, Conductors: wires(t, "w", 1, text, "l", Conductor{RatingC: 70})}
		if cp := Shipped().Terminals(r)[0]; !same(cp.A, a) || math.IsNaN(a) != (cp.Kind == "unknown") || cp.Text == "" {
			t.Errorf("%s: %+v, want %g", text, cp, a)
		}
	}
}

// TestTerminalCapsTheWire: one 12 AWG alone in free air may carry 40 A by table 310.17 and 25 A at a 75 °C terminal.
func TestTerminalCapsTheWire(t *testing.T) {
	r := Run{AmbientC: 30, Holder: Holder{Kind: Single}, Loads: []Load{{ID: "l", Terminal: Terminal{RatingC: 75}, CurrentA: 30}}}
	r.Conductors = wires(t, "w", 1, "12 AWG", "l", thhnWire("12 AWG"))
	near(t, "free air", one(t, r, "nec-310-17").Conductors[0].A, 40, 0)
	near(t, "terminal", Shipped().Terminals(r)[0].A, 25, 0)
	if c := Shipped().Protect(r, nil)[0].check(t, CheckLoadTerminal); c.Within || c.Limit != 25 {
		t.Errorf("%+v", c)
	}
	r.Conductors[0].Role = Earth
	if caps := Shipped().Terminals(r); len(caps) != 0 {
		t.Errorf("an earth has a cap: %+v", caps)
	}
}
