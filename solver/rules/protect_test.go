package rules

import (
	"math"
	"slices"
	"strings"
	"testing"
)

// circuit is one three-phase load of one size, in no particular holder.
func circuit(t *testing.T, text string, l Load) Run {
	t.Helper()
	l.ID, l.System = "l", ThreePhase
	return Run{AmbientC: 30, Loads: []Load{l}, Conductors: wires(t, "w", 3, text, "l", Conductor{RatingC: 90})}
}

func permit(by string, a float64) []Permitted {
	return []Permitted{{by, map[string]float64{"w1": a + 5, "w2": a, "w3": a + 1}}}
}

// TestProtection: NEC 210.19, 210.20, 240.4, 430.22 and IEC 60364-4-43 433.1, limits worked out by hand.
func TestProtection(t *testing.T) {
	for _, c := range []struct {
		what         string
		text         string
		l            Load
		permitted    []Permitted
		kind         string
		value, limit float64
		known        bool
		within       bool
		clause       string
	}{
		{"load within its device", "2.5 mm2", Load{CurrentA: 12, Device: Device{"breaker", 16, 1.45}}, nil, CheckLoadDevice, 12, 16, true, true, "IEC 60364-4-43, 433.1"},
		{"a device smaller than its load", "12 AWG", Load{CurrentA: 22, Device: Device{"breaker", 20, 0}}, nil, CheckLoadDevice, 22, 20, true, false, "NEC 210.20(A)"},
		{"device above what is permitted", "2.5 mm2", Load{CurrentA: 12, Device: Device{"breaker", 16, 1.45}}, permit("iec-52", 13), CheckDevicePermitted, 16, 13, true, false, "IEC 60364-4-43, 433.1"},
		{"load above what is permitted", "2.5 mm2", Load{CurrentA: 14, Device: Device{"breaker", 16, 1.45}}, permit("computed", 13.9), CheckLoadPermitted, 14, 13.9, true, false, ""},
		{"a breaker that trips at 1.45: 23.2 A against 1.45 × 16", "2.5 mm2", Load{CurrentA: 12, Device: Device{"breaker", 16, 1.45}}, permit("iec-52", 16), CheckTripping, 23.2, 23.2, true, true, "IEC 60364-4-43, 433.1"},
		{"a fuse that blows at 1.6: 25.6 A", "2.5 mm2", Load{CurrentA: 12, Device: Device{"fuse", 16, 1.6}}, permit("iec-52", 16), CheckTripping, 25.6, 23.2, true, false, "IEC 60364-4-43, 433.1"},
		{"tripping current unknown", "2.5 mm2", Load{CurrentA: 12, Device: Device{"fuse", 16, 0}}, permit("iec-52", 16), CheckTripping, math.NaN(), 23.2, false, false, "IEC 60364-4-43, 433.1"},
		{"continuous: 1.25 × 16 on 20 A", "12 AWG", Load{CurrentA: 16, Continuous: true, Device: Device{"breaker", 20, 0}}, nil, CheckContinuousDevice, 20, 20, true, true, "NEC 210.20(A), 215.3"},
		{"continuous: 1.25 × 18 on 20 A", "12 AWG", Load{CurrentA: 18, Continuous: true, Device: Device{"breaker", 20, 0}}, nil, CheckContinuousDevice, 22.5, 20, true, false, "NEC 210.20(A), 215.3"},
		{"continuous wire before factors, 75 °C column", "12 AWG", Load{CurrentA: 18, Continuous: true, Terminal: Terminal{RatingC: 75}}, nil, CheckContinuousWire, 22.5, 25, true, true, "NEC 210.19(A)(1), 215.2(A)(1)"},
		{"a 50 A motor needs 62.5 A of wire", "6 AWG", Load{CurrentA: 50, Motor: true}, permit("nec-310", 65), CheckMotorWire, 62.5, 65, true, true, "NEC 430.22"},
		{"a 30 A motor needs 37.5 A", "8 AWG", Load{CurrentA: 30, Motor: true}, permit("nec-376-22", 22), CheckMotorWire, 37.5, 22, true, false, "NEC 430.22"},
		{"14 AWG has at most 15 A", "14 AWG", Load{CurrentA: 12, Device: Device{"breaker", 20, 0}}, nil, CheckSmallConductor, 20, 15, true, false, "NEC 240.4(D)"},
		{"10 AWG has at most 30 A", "10 AWG", Load{CurrentA: 12, Device: Device{"breaker", 30, 0}}, nil, CheckSmallConductor, 30, 30, true, true, "NEC 240.4(D)"},
		{"a motor's device is excepted", "14 AWG", Load{CurrentA: 9, Motor: true, Device: Device{"breaker", 25, 0}}, nil, CheckSmallConductor, 25, 15, false, false, "NEC 240.4(D)"},
		{"load unknown", "12 AWG", Load{CurrentA: math.NaN(), Device: Device{"breaker", 20, 0}}, nil, CheckLoadDevice, math.NaN(), 20, false, false, "NEC 210.20(A)"},
		{"permitted unknown", "12 AWG", Load{CurrentA: 3, Device: Device{"breaker", 20, 0}}, permit("nec-310", math.NaN()), CheckDevicePermitted, 20, math.NaN(), false, false, "NEC 240.4"},
	} {
		p := Shipped().Protect(circuit(t, c.text, c.l), c.permitted)[0]
		got := p.check(t, c.kind)
		if math.Abs(got.Value-c.value) > 1e-9 && !same(got.Value, c.value) || math.Abs(got.Limit-c.limit) > 1e-9 && !same(got.Limit, c.limit) || got.Known != c.known || got.Within != c.within || got.Clause != c.clause || got.Text == "" {
			t.Errorf("%s: %+v", c.what, got)
		}
		if c.permitted != nil && got.By != "" && got.Conductor != "w2" && !math.IsNaN(got.Limit) {
			t.Errorf("%s: %s is not the weakest", c.what, got.Conductor)
		}
	}
}

// TestSmallConductors: NEC 240.4(D), copper 18 to 10 AWG 7, 10, 15, 20, 30 A; aluminium 12 and 10 AWG 15 and 25 A (from memory).
func TestSmallConductors(t *testing.T) {
	for _, c := range []struct {
		metal, text string
		want        float64 // 0: no cap
	}{
		{copper, "18 AWG", 7},
		{copper, "16 AWG", 10},
		{copper, "14 AWG", 15},
		{copper, "12 AWG", 20},
		{copper, "10 AWG", 30},
		{"tinned-copper", "12 AWG", 20},
		{aluminium, "12 AWG", 15},
		{aluminium, "10 AWG", 25},
		{copper, "8 AWG", 0},
	} {
		r := circuit(t, c.text, Load{CurrentA: 5, Device: Device{"fuse", 6, 0}})
		for i := range r.Conductors {
			r.Conductors[i].Metal = c.metal
		}
		got := 0.0
		for _, check := range Shipped().Protect(r, nil)[0].Checks {
			if check.Kind == CheckSmallConductor {
				got = check.Limit
			}
		}
		if got != c.want {
			t.Errorf("%s %s: %g A, want %g", c.metal, c.text, got, c.want)
		}
	}
}

// TestNextSizeUp: NEC 240.4(B) with the standard ratings of 240.6(A), from memory: 38.5 A lets 40 A stand and not 45; 40 A is itself one; above 800 A nothing is let stand.
func TestNextSizeUp(t *testing.T) {
	for _, c := range []struct {
		permitted, device float64
		within, up        bool
	}{{38.5, 40, false, true}, {38.5, 45, false, false}, {40, 45, false, false}, {41, 45, false, true}, {45, 45, true, false}, {812, 1000, false, false}, {752, 800, false, true}} {
		got := Shipped().Protect(circuit(t, "8 AWG", Load{CurrentA: 30, Device: Device{"breaker", c.device, 0}}), permit("nec-310", c.permitted))[0].check(t, CheckDevicePermitted)
		if got.Within != c.within || got.NextSizeUp != c.up {
			t.Errorf("%g A on %g A: %+v", c.device, c.permitted, got)
		}
	}
	motor := Shipped().Protect(circuit(t, "8 AWG", Load{CurrentA: 30, Motor: true, Device: Device{"breaker", 80, 0}}), permit("nec-310", 50))[0].check(t, CheckDevicePermitted)
	if motor.Within || motor.NextSizeUp || !strings.Contains(motor.Text, "430.52") {
		t.Errorf("%+v", motor)
	}
}

// TestNoDevice: protection is unknown, and what is permitted is still compared with the load.
func TestNoDevice(t *testing.T) {
	p := Shipped().Protect(circuit(t, "12 AWG", Load{CurrentA: 10}), permit("nec-310", 21))[0]
	c := p.check(t, CheckDevice)
	if !p.Unknown || c.Known || c.Text != "What protects l is unknown: its permitted currents are not a device rating. Write protection with kind and rating_a." {
		t.Errorf("%+v", p)
	}
	if c := p.check(t, CheckLoadPermitted); !c.Within || c.Text != "The load of l, 10 A, is within what NEC table 310.16 permits in w2, 21 A; margin 11 A." {
		t.Errorf("%+v", c)
	}
	if slices.ContainsFunc(p.Checks, func(c Check) bool { return c.Kind == CheckDevicePermitted || c.Kind == CheckTripping }) {
		t.Errorf("a device that is unknown is compared: %+v", p.Checks)
	}
	earth := circuit(t, "12 AWG", Load{CurrentA: 10})
	for i := range earth.Conductors {
		earth.Conductors[i].Role = Earth
	}
	if out := Shipped().Protect(earth, nil); len(out) != 0 {
		t.Errorf("a load of earths is judged: %+v", out)
	}
}
