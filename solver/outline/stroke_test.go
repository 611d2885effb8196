package outline

import (
	"encoding/csv"
	"math"
	"math/cmplx"
	"os"
	"strconv"
	"testing"
)

func TestSectorGeometry(t *testing.T) {
	f, err := os.Open("../../testdata/fe-cases/expected_geometry.csv")
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	area, centroid := Sector(6.5, math.Pi/2, 1, 0).Area()
	got := map[string]float64{"metal_area_mm2": area, "apex_to_centroid_mm": real(centroid)}
	found := 0
	for _, r := range rows {
		if r[0] != "s01_sector4" {
			continue
		}
		want, err := strconv.ParseFloat(r[2], 64)
		if err != nil {
			t.Fatal(err)
		}
		closeTo(t, r[1], got[r[1]], want, 1e-7)
		found++
	}
	if found != 2 {
		t.Errorf("%d values compared, want 2", found)
	}
}

// Areas by the elementary formulas; growing a convex loop by t adds perimeter·t + πt² (Steiner) and 2πt to the perimeter.
func TestLoops(t *testing.T) {
	for name, c := range map[string]struct {
		grown func(t float64) Loop
		area  float64
		round bool
	}{
		"circle":       {func(t float64) Loop { return Circle(2 + t) }, math.Pi * 4, true},
		"bar":          {func(t float64) Loop { return Bar(20, 5, 0.5, t) }, 100 - (4-math.Pi)*0.25, true},
		"sharp bar":    {func(t float64) Loop { return Bar(20, 5, 0, t) }, 100, true},
		"flat":         {func(t float64) Loop { return Flat(11.4, 4.4, t) }, 7*4.4 + math.Pi*2.2*2.2, true},
		"upright":      {func(t float64) Loop { return Flat(4.4, 11.4, t) }, 7*4.4 + math.Pi*2.2*2.2, true},
		"box":          {func(t float64) Loop { return Box(20, 5, t) }, 100, false},
		"sharp sector": {func(t float64) Loop { return Sector(6, math.Pi/3, 0, t) }, 36 * math.Pi / 6, true},
		"half":         {func(t float64) Loop { return Sector(6, math.Pi, 0, t) }, 36 * math.Pi / 2, true},
	} {
		l := c.grown(0).Placed(0.7, 3+4i)
		area, _ := l.Area()
		closeTo(t, name+" area", area, c.area, 1e-9*c.area)
		if !c.round {
			continue
		}
		const by = 0.3
		g := c.grown(by).Placed(-1.1, -2)
		grown, centroid := g.Area()
		closeTo(t, name+" grown", grown, c.area+l.Perimeter()*by+math.Pi*by*by, 1e-9*c.area)
		closeTo(t, name+" perimeter", g.Perimeter(), l.Perimeter()+2*math.Pi*by, 1e-9*l.Perimeter())
		if !g.Inside(centroid) || g.Inside(centroid+100) {
			t.Errorf("%s: its centroid %v is not inside, or everything is", name, centroid)
		}
		lo, hi := g.Bounds()
		for _, z := range g.Polygon(1e-4) {
			if real(z) < real(lo)-1e-9 || imag(z) > imag(hi)+1e-9 {
				t.Errorf("%s: %v is out of bounds", name, z)
			}
		}
		for i := range g {
			if cmplx.Abs(g[i].To-g[(i+1)%len(g)].From) > 0 {
				t.Errorf("%s: open after stroke %d", name, i)
			}
		}
	}
}

// A corner radius between nothing and the largest keeps a sector's outline closed and convex.
func TestSectorCorners(t *testing.T) {
	for _, deg := range []float64{30, 60, 72, 90, 120, 150, 180} {
		angle := deg * math.Pi / 180
		for _, share := range []float64{0, 0.1, 0.5, 0.99, 1} {
			l := Sector(6.5, angle, share*MaxCorner(6.5, angle), 1.2)
			turn := 0.0
			for i := range l {
				turn += l[i].span()
			}
			closeTo(t, "turn", turn, 2*math.Pi, 1e-6)
			area, _ := l.Area()
			poly := 0.0
			p := l.Polygon(1e-5)
			for i, z := range p {
				n := p[(i+1)%len(p)]
				poly += (real(z)*imag(n) - imag(z)*real(n)) / 2
			}
			closeTo(t, "area", poly, area, 1e-3)
		}
	}
}
