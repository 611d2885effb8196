package heat_test

import (
	"fmt"
	"math"
	"testing"

	"packrise/solver/heat"
)

// sectors is a cable of n sector cores that share their flats, as in s01_sector4: neighbours touch along lines, each touches the jacket at a point.
func sectors(n int, fill float64) heat.Problem {
	angle := 2 * math.Pi / float64(n)
	const r, t, corner = 8.0, 1.0, 0.8
	f := heat.Form{Kind: heat.Sector, R: r * mm, Angle: angle, Corner: corner * mm}
	apex := t / math.Sin(angle/2) * mm
	centroid := sectorCentroid(f)
	p := heat.Problem{MediumK: fill, Wall: heat.Wall{R: (r+t)*mm + apex, Rings: []heat.Ring{{K: 0.17, Thickness: 1.5 * mm}}, Film: 10, Ambient: 30}}
	for i := range n {
		f.Turn = angle * (float64(i) + 0.5)
		sin, cos := math.Sincos(f.Turn)
		p.Parts = append(p.Parts, heat.Part{
			In: -1, X: (apex + centroid) * cos, Y: (apex + centroid) * sin, Form: f, Radius: r * mm, Heat: 3 + float64(i), Rings: []heat.Ring{{K: 0.28, Thickness: t * mm}},
		})
	}
	return p
}

// sectorCentroid is the distance of the centroid from the apex.
func sectorCentroid(f heat.Form) float64 {
	// The form lies about its centroid, its bisector along +x: the arc about the apex reaches R − centroid to the right.
	_, hi := f.Loop(0, 0).Bounds()
	return f.R - real(hi)
}

// Contacts along lines and at points, with parts a little into each other as coordinates of few digits leave them: all settle, balance and change
// little with the accuracy.
func TestShapedContacts(t *testing.T) {
	if testing.Short() {
		t.Skip("one thread, and slow under the race detector")
	}
	cases := map[string]heat.Problem{}
	counts := []int{2, 3, 5}
	for _, n := range counts[:soak(1, len(counts))] { // under PACKRISE_SOAK all
		for _, k := range []float64{0.026, 0.3} {
			cases[fmt.Sprintf("%d sectors in %g", n, k)] = sectors(n, k)
		}
	}
	stack := heat.Problem{MediumK: 0.026, Wall: heat.Wall{Shape: heat.Rect, W: 40 * mm, H: 30 * mm, Rings: []heat.Ring{{K: 50, Thickness: 1 * mm}}, Film: 9, Ambient: 20}}
	for i, y := range []float64{3.5, 10.5, 17.5} { // flat on flat on the floor, bare on top
		b := bar(30, 5, 0, 1, 0.2, 6)
		b.X, b.Y = (18+float64(i))*mm, (y-0.0005*float64(i))*mm
		stack.Parts = append(stack.Parts, b)
	}
	top := bar(30, 5, 0, 0, 0, 4)
	top.X, top.Y = 20*mm, 23.4985*mm
	stack.Parts = append(stack.Parts, top)
	cases["stack"] = stack
	bare := stack
	bare.Parts = nil
	for i := range 3 { // bare metal on bare metal on a metal floor
		b := bar(30, 5, 0.3, 0, 0, 6)
		b.X, b.Y = 20*mm, (2.5+5*float64(i))*mm
		bare.Parts = append(bare.Parts, b)
	}
	cases["bare stack"] = bare
	for name, p := range cases {
		r, fine := solve(t, p, heat.Standard), solve(t, p, heat.Fine)
		worst, rise := 0.0, heatRise(fine, p)
		for i := range p.Parts {
			worst = math.Max(worst, math.Abs(r.Core[i]-fine.Core[i]))
		}
		t.Logf("%-18s %4d unknowns, fine %4d, off by %.5f of %.1f K, estimated %.5f", name, r.Unknowns, fine.Unknowns, worst, rise, r.ErrorK)
		if !(worst < 0.02) || !(math.Abs(r.Released-r.Generated) < 1e-3*r.Generated) {
			t.Errorf("%s: off by %g K, %g of %g W/m released", name, worst, r.Released, r.Generated)
		}
	}
}
