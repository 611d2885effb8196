package catalog

import "testing"

// UL 83, UL 44 and EN 50525 (from memory): mils for American types, mm for the others.
func TestTypicalWire(t *testing.T) {
	const mil, mm = 25.4e-6, 1e-3
	for _, c := range []struct {
		size, typ string
		want      float64
	}{
		{"14 AWG", "tw", 30 * mil},
		{"8 AWG", "thw", 45 * mil},
		{"6 AWG", "thw", 60 * mil},
		{"1/0 AWG", "thw-2", 80 * mil},
		{"250 kcmil", "thw", 95 * mil},
		{"22 AWG", "mtw", 30 * mil},
		{"12 AWG", "xhhw-2", 30 * mil},
		{"4/0 AWG", "xhhw", 55 * mil},
		{"750 kcmil", "xhhw-2", 80 * mil},
		{"10 AWG", "rhw-2", 45 * mil},
		{"500 kcmil", "use-2", 95 * mil},
		{"2.5 mm2", "h07v-k", 0.8 * mm},
		{"2,5 mm²", "h07v-k", 0.8 * mm},
		{"300 mm2", "h07v-r", 2.4 * mm},
		{"2.5 mm2", "h07rn-f", 0.9 * mm},
		{"12 AWG", "h07v-k", 0.8 * mm}, // 3.31 mm² by area
	} {
		got, src, ok := Load().TypicalWire(c.size, c.typ)
		if !ok || src.Text == "" {
			t.Errorf("%s %s: nothing known", c.size, c.typ)
		}
		near(t, c.size+" "+c.typ, got, c.want, 1e-3)
	}
	for _, c := range [][2]string{{"16 AWG", "tw"}, {"1000 mm2", "h07v-k"}, {"12 AWG", "no-such"}, {"12", "thhn"}, {"0.34 mm2", "h05v-k"}, {"12 AWG", "polyimide"}} {
		if th, src, ok := Load().TypicalWire(c[0], c[1]); ok || th != 0 {
			t.Errorf("%s %s: %g by %v", c[0], c[1], th, src)
		}
	}
}

// The steps and the finished wires of the same types come from different tables and agree.
func TestStepsAgreeWithFinishedWires(t *testing.T) {
	c := Load()
	compared := 0
	for _, w := range c.Wires() {
		st, ok := c.thickness[w.Type]
		if !ok {
			continue
		}
		metal, err := c.WireConductor(w)
		if err != nil {
			t.Fatal(err)
		}
		mm, ok := st.of(parsed(w.Size))
		if !ok {
			t.Errorf("%s: no step", w.ID)
			continue
		}
		near(t, w.ID, (w.DiameterM-metal.DiameterM)/2*1e3, mm, 0.03)
		compared++
	}
	if compared < 100 {
		t.Errorf("only %d wires were compared", compared)
	}
}
