package heat_test

import (
	"fmt"
	"math"
	"testing"

	"packrise/solver/heat"
	"packrise/solver/pack"
)

// TestHullExtremes: rows on one string, parts just off a string, size ratio 50, enamel, bare metal, media from vacuum-like to better than the
// insulation, films from almost none to held. The answer converges, conserves heat, and stays between ambient and the hottest metal.
func TestHullExtremes(t *testing.T) {
	if testing.Short() {
		t.Skip("one thread, and slow under the race detector")
	}
	at := func(xy ...float64) (p [][2]float64) {
		for i := 0; i < len(xy); i += 2 {
			p = append(p, [2]float64{xy[i], xy[i+1]})
		}
		return p
	}
	for name, c := range map[string]struct {
		places [][2]float64 // mm
		r      []float64    // mm
		skin   float64      // share of the radius
		k      float64
	}{
		"two":                  {at(-1, 0, 1, 0), []float64{1}, 0.3, 0.2},
		"row of five":          {at(-4, 0, -2, 0, 0, 0, 2, 0, 4, 0), []float64{1}, 0.3, 0.2},
		"a nanometre inside":   {at(-2, 0, 0, -1e-6, 2, 0, 0, -2.02), []float64{1}, 0.3, 0.2},
		"a micrometre inside":  {at(-2, 0, 0, -1e-3, 2, 0, 0, -2.02), []float64{1}, 0.3, 0.2},
		"ten micrometres in":   {at(-2, 0, 0, -1e-2, 2, 0, 0, -2.02), []float64{1}, 0.3, 0.2},
		"far apart":            {at(-20, 0, 20, 0, 0, 30), []float64{1}, 0.3, 0.2},
		"ratio 50":             {at(0, 0, 10.2, 0, 0, 10.2, 8, -6.5), []float64{10, 0.2, 0.2, 0.2}, 0.3, 0.2},
		"ratio 50 between":     {at(-10, 0, 10, 0, 0, 2.0098), []float64{10, 10, 0.2}, 0.3, 0.2},
		"enamel":               {at(-1, 0, 1, 0, 0, 1.7320508), []float64{1}, 0.02, 0.25},
		"bare":                 {at(-1, 0, 1, 0, 0, 1.7320508), []float64{1}, 0, 0},
		"a hundred and twenty": {rows(12, 10), []float64{1}, 0.4, 0.2},
	} {
		for _, medium := range []float64{heat.ThinnestK, 0.01, 0.03, 0.2, 3} {
			for _, film := range []float64{0.01, 10, 1e4, math.Inf(1)} {
				if name == "a hundred and twenty" && (film != 10 || testing.Short()) {
					continue
				}
				p := heat.Problem{MediumK: medium, Wall: heat.Wall{Shape: heat.Hull, Film: film, Ambient: 20, Taut: taut}}
				for i, xy := range c.places {
					r := c.r[min(i, len(c.r)-1)] * mm
					q := heat.Part{In: -1, X: xy[0] * mm, Y: xy[1] * mm, Radius: r * (1 - c.skin), Heat: float64(1 + i%3)}
					if c.skin > 0 {
						q.Rings = []heat.Ring{{K: c.k, Thickness: r * c.skin}}
					}
					p.Parts = append(p.Parts, q)
				}
				extreme(t, fmt.Sprintf("%s, medium %g, film %g", name, medium, film), p)
			}
		}
	}
}

// rows is a hexagonal heap.
func rows(n, m int) (p [][2]float64) {
	for j := range m {
		for i := range n {
			p = append(p, [2]float64{2*float64(i) + float64(j%2), float64(j) * 1.7320508075688774})
		}
	}
	return p
}

func extreme(t *testing.T, name string, p heat.Problem) {
	t.Helper()
	r := heat.New(p, heat.Settings{}).Solve(bg, nil)
	if r.Status != heat.Converged {
		t.Errorf("%s: %v", name, r.Status)
	}
	if e := r.Released - r.Generated; !(math.Abs(e) < 1e-6*r.Generated) {
		t.Errorf("%s: heat balance off by %g of %g", name, e, r.Generated)
	}
	hot := 0.0
	for _, v := range r.Core {
		hot = math.Max(hot, v)
	}
	slack := 2e-3 * (hot - 20)
	for i, v := range r.Core {
		if !(v > 20-1e-3 && v <= hot) { // bare metal held at 20 °C may read a little less
			t.Errorf("%s: part %d at %g", name, i, v)
		}
	}
	if !(r.WallMean > 20-slack && r.WallMax[0] < hot+slack) {
		t.Errorf("%s: outside %g and %g, hottest metal %g", name, r.WallMean, r.WallMax[0], hot)
	}
}

// TestHullOf500: as many parts as a section may have.
func TestHullOf500(t *testing.T) {
	if testing.Short() {
		t.Skip("a second")
	}
	p := heat.Problem{MediumK: 0.027, Wall: heat.Wall{Shape: heat.Hull, Film: 10, Ambient: 20, Taut: taut}}
	radii := make([]float64, 500)
	for i := range radii {
		radii[i] = (0.5 + 0.3*float64(i%5)) * mm
	}
	places, _ := pack.LayUp(radii)
	for _, d := range places {
		p.Parts = append(p.Parts, heat.Part{In: -1, X: d.X, Y: d.Y, Radius: 0.6 * d.R, Rings: []heat.Ring{{K: 0.2, Thickness: 0.4 * d.R}}, Heat: 0.2})
	}
	extreme(t, "five hundred", p)
}
