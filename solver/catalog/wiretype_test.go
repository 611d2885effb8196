package catalog

import "testing"

// Dry and wet limits: NFPA 70-2023 table 310.4(1) and EN 50525 / EN 50565-1, EN 50618 (from memory).
func TestWireTypes(t *testing.T) {
	const never = -1
	c := Load()
	for id, want := range map[string][2]float64{
		"tw": {60, 60}, "thw": {75, 75}, "thwn": {75, 75}, "thhn": {90, never}, "thwn-2": {90, 90}, "thw-2": {90, 90},
		"xhhw": {90, 75}, "xhhw-2": {90, 90}, "xhh": {90, never}, "rhh": {90, never}, "rhw": {75, 75}, "rhw-2": {90, 90}, "use-2": {90, 90}, "mtw": {90, 60},
		"h05v-k": {70, 70}, "h07v-u": {70, 70}, "h07v-r": {70, 70}, "h07v-k": {70, 70}, "h05v2-k": {90, 90}, "h07v2-k": {90, 90},
		"h05z-k": {90, 90}, "h07z-k": {90, 90}, "h07z1-k": {70, 70}, "h07rn-f": {60, 60}, "h05s-k": {180, 180}, "h1z2z2-k": {90, 90},
		"etfe": {150, 150}, "fep": {200, 200}, "ptfe-200": {200, 200}, "ptfe-260": {260, 260},
	} {
		typ, ok := c.WireType(id)
		wet := typ.WetC
		if typ.NeverWet && wet == 0 {
			wet = never
		}
		if !ok || typ.DryC != want[0] || wet != want[1] {
			t.Errorf("%s: %+v, want dry %g, wet %g", id, typ, want[0], want[1])
		}
	}
}

// A type never allows more than the best grade of its insulation.
func TestWireTypesBelongToTheirInsulation(t *testing.T) {
	for _, typ := range Load().WireTypes() {
		m := mustMaterial(t, typ.Insulation)
		if typ.DryC > m.LimitC.High {
			t.Errorf("%s allows %g °C, its insulation %s at most %g", typ.ID, typ.DryC, m.ID, m.LimitC.High)
		}
	}
}
