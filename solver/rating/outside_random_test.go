package rating_test

import (
	"fmt"
	"math"
	"math/rand/v2"
	"os"
	"strings"
	"testing"

	"packrise/solver/heat"
	"packrise/solver/rating"
)

// dice makes random small sections in random surroundings.
type dice struct{ *rand.Rand }

func (d dice) in(a, b float64) float64 { return a + (b-a)*d.Float64() }

func (d dice) of(words ...string) string { return words[d.IntN(len(words))] }

// surroundings of any kind at an ambient.
func (d dice) surroundings(ambient, altitude, sun float64) string {
	s := fmt.Sprintf("ambient_c: %g", ambient)
	air := fmt.Sprintf(", altitude_m: %g, sun_w_m2: %g", altitude, sun)
	if d.IntN(3) == 0 {
		air += fmt.Sprintf(", radiant_c: %g", ambient+d.in(-10, 10))
	}
	up := ""
	if d.IntN(4) == 0 {
		up = fmt.Sprintf(", run: vertical, height_m: %.2f", d.in(0.3, 20))
	}
	switch d.IntN(6) {
	case 0:
		return "kind: moving-air, " + s + air + up + fmt.Sprintf(", air_speed_m_s: %.3f, air_direction: %s", d.in(0, 5), d.of("across", "along"))
	case 1:
		return "kind: buried, " + s + fmt.Sprintf(", depth_m: %.2f, soil_w_mk: %.2f", d.in(0.4, 2), d.in(0.3, 2))
	case 2:
		return "kind: water, " + s + up + fmt.Sprintf(", air_speed_m_s: %.3f", d.in(0, 1)*float64(d.IntN(2)))
	case 3:
		return "kind: vacuum, " + s + fmt.Sprintf(", sun_w_m2: %g", sun)
	case 4:
		return "kind: insulation, " + s + air + up + fmt.Sprintf(", wrap: {material: mineral-wool, thickness_mm: %.1f}", d.in(5, 50))
	}
	return "kind: still-air, " + s + air + up
}

// section draws up to four wires side by side in a holder of any kind.
func (d dice) section() (holder, parts string, ids []string) {
	n := 1 + d.IntN(4)
	r := d.in(1, 4) // mm, of a wire
	wall := fmt.Sprintf(", layers: [{material: %s, thickness_mm: %.2f}]", d.of("pvc", "galvanised-steel", "pe", "painted-steel"), d.in(0.8, 3))
	gap := d.in(0, 2)
	width := float64(n)*2*r + float64(n-1)*gap
	x0, y := -width/2+r, 0.0
	switch d.IntN(4) {
	case 0:
		if n = 1; true {
			holder, x0 = "kind: none", 0
		}
	case 1:
		holder = "kind: open-bundle"
	case 2:
		holder = fmt.Sprintf("kind: %s, inside_mm: %.2f%s", d.of("conduit", "jacket"), width*1.02+0.1, wall)
	default:
		holder = fmt.Sprintf("kind: wireway, width_mm: %.2f, height_mm: %.2f%s", width+4, 2*r+3+d.in(0, 20), wall)
		if d.IntN(2) == 0 {
			holder += ", sides: {" + d.of("left", "top", "bottom") + ": insulated}"
		}
		x0, y = 2+r, r+1
	}
	if d.IntN(3) == 0 && !strings.HasPrefix(holder, "kind: none") {
		holder += ", fill: pvc"
	}
	for i := range n {
		id := fmt.Sprintf("L%d", i+1)
		ids = append(ids, id)
		parts += fmt.Sprintf("  - {id: %s, kind: core, conductor: {diameter_mm: %.3f, class: solid}, layers: [{material: pvc, thickness_mm: %.3f}], at_mm: [%.5f, %.5f]}\n",
			id, 2*r*0.6, r*0.4, x0+float64(i)*(2*r+gap), y)
	}
	return holder, parts, ids
}

// TestRandomOutsides: on random small sections of all kinds the loop converges, heat in is heat out, and more current, ambient, sun or altitude
// never cool a conductor.
func TestRandomOutsides(t *testing.T) {
	n := 60
	switch {
	case testing.Short():
		n = 10
	case os.Getenv("PACKRISE_SOAK") == "1":
		n = 1000
	}
	for seed := range n {
		draw := func(ambient, altitude, sun, current float64) string {
			d := dice{rand.New(rand.NewPCG(uint64(seed), 9))}
			holder, parts, ids := d.section()
			around := d.surroundings(ambient, altitude, sun)
			amps := current * d.in(5, 40)
			return fmt.Sprintf("packrise: 1\nsurroundings: {%s}\nholder: {%s}\nparts:\n%sloads: [{id: a, conductors: [%s], current_a: %.3f}]\n", around, holder, parts, strings.Join(ids, ", "), amps)
		}
		base := draw(25, 0, 0, 1)
		r := solve(t, parse(t, base), rating.Options{})
		if r.Status == heat.ThermalRunaway {
			if r.Settles >= 1 || r.Settles <= 0 {
				t.Errorf("settles up to %g of:\n%s", r.Settles, base)
			}
			continue
		}
		if r.Status != heat.Converged || math.Abs(r.Generated-r.Released) > 1e-5*r.Generated {
			t.Errorf("%v, in %g, out %g W/m:\n%s", r.Status, r.Generated, r.Released, base)
			continue
		}
		for what, text := range map[string]string{"ambient": draw(40, 0, 0, 1), "altitude": draw(25, 9000, 0, 1), "sun": draw(25, 0, 900, 1), "current": draw(25, 0, 0, 1.1)} {
			w := solve(t, parse(t, text), rating.Options{})
			if w.Status == heat.ThermalRunaway || what == "altitude" && r.SurfaceC < r.AmbientC { // thin air warms an outside less that radiates to the cold
				continue
			}
			if w.Status != heat.Converged {
				t.Errorf("%s: %v:\n%s", what, w.Status, text)
				continue
			}
			for i := range r.Conductors {
				// buried runs and water know neither altitude nor sun; rounding of the loop is 5 mK
				if w.Conductors[i].TempC < r.Conductors[i].TempC-0.01 {
					t.Errorf("more %s cools %s from %.3f to %.3f °C:\n%s", what, r.Conductors[i].ID, r.Conductors[i].TempC, w.Conductors[i].TempC, text)
				}
			}
		}
	}
}
