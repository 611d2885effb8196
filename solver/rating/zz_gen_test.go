package rating_test

import (
	"math"
	"testing"

	"packrise/solver/catalog"
	"packrise/solver/pack"
	"packrise/solver/rating"
	"packrise/solver/section"
)

func TestZZ(t *testing.T) {
	cat := catalog.Load()
	for _, file := range []string{"robot-umbilical", "nine-in-emt", "filled-control-cable"} {
		d := read(t, "/tmp/me/designs/"+file+".yaml")
		at := map[string]section.Point{}
		shapes, _ := rating.Outline(d, cat)
		var radii []float64
		for _, s := range shapes[1:] {
			radii = append(radii, s.OuterR())
		}
		var discs []pack.Disc
		var r float64
		switch file {
		case "robot-umbilical":
			discs, r = pack.SmallestHolder(radii, 3)
		case "filled-control-cable":
			discs, r = pack.LayUp(radii)
		default:
			discs, _ = pack.Settle(discsOf(radii), pack.Box{R: 13.3}, 1)
		}
		t.Log(file, 2*r)
		for i, s := range shapes[1:] {
			at[s.ID] = section.Point{X: math.Round(discs[i].X*1e4) / 1e4, Y: math.Round(discs[i].Y*1e4) / 1e4}
		}
		d = section.PlaceAll(d, at)
		if err := section.Save("/tmp/me/gen/"+file+".yaml", d); err != nil {
			t.Error(err)
		}
	}
}

func discsOf(r []float64) []pack.Disc {
	out := make([]pack.Disc, len(r))
	for i := range r {
		out[i].R = r[i]
	}
	return out
}
