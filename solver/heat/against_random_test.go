package heat_test

import (
	"context"
	"math"
	"math/rand/v2"
	"os"
	"testing"

	"packrise/solver/heat"
)

// randomLeaning is a random section that rests against something: a jacket, a bundle, a cable or a wire alone.
func randomLeaning(r *rand.Rand) heat.Problem {
	u := func(a, b float64) float64 { return a + (b-a)*r.Float64() }
	a := heat.Against{Share: u(0.02, 0.9), At: u(-4, 4)}
	if r.IntN(2) == 0 {
		a.Held, a.Temp = true, u(-20, 90)
	}
	p := rosetteOf(r, 2+r.IntN(9))
	p.ZeroK = 273.15
	p.Wall = heat.Wall{Film: u(3, 25), Ambient: u(0, 60), Against: a, Emissivity: 0.9}
	if r.IntN(3) == 0 {
		p.Filling = heat.Gas
	}
	reach := 0.0
	for i := range p.Parts {
		reach = math.Max(reach, math.Hypot(p.Parts[i].X, p.Parts[i].Y)+p.Parts[i].Radius+p.Parts[i].Rings[0].Thickness)
	}
	layers := func() (l []heat.Ring) {
		for range r.IntN(3) {
			l = append(l, heat.Ring{K: []float64{0.15, 0.3, 45}[r.IntN(3)], Thickness: reach * u(0.03, 0.3)})
		}
		return l
	}
	switch r.IntN(4) {
	case 0, 1:
		p.Wall.R, p.Wall.Rings = reach*u(1, 1.4), layers()
	case 2:
		p.Wall.Shape, p.Wall.Taut = heat.Hull, taut
	case 3:
		p.Wall.Shape = heat.BarePart
		jacket := append(layers(), heat.Ring{K: 0.2, Thickness: 0.2 * reach})
		for i := range p.Parts {
			p.Parts[i].In = 0
		}
		p.Parts = append([]heat.Part{{In: -1, Core: heat.Inside, Radius: reach * u(1, 1.2), K: p.MediumK, Rings: jacket, Filling: p.Filling, InsideEmissivity: 0.9}}, p.Parts...)
	}
	return p
}

// rosetteOf is n wires side by side round a circle, and one in the middle.
func rosetteOf(r *rand.Rand, n int) heat.Problem {
	p := heat.Problem{MediumK: []float64{0.027, 0.2, 0.03}[r.IntN(3)]}
	for i := range n {
		w := heat.Part{In: -1, Core: heat.Metal, Radius: 1.2e-3, Rings: []heat.Ring{{K: 0.2, Thickness: 0.5e-3}}, Heat: 3 * r.Float64(), Emissivity: 0.9}
		if i > 0 {
			ring := math.Max(3.4e-3, 1.7e-3/math.Sin(math.Pi/math.Max(float64(n-1), 2))) * (1 + 0.1*r.Float64())
			s, c := math.Sincos(2 * math.Pi * float64(i) / float64(n-1))
			w.X, w.Y = ring*c, ring*s
		}
		p.Parts = append(p.Parts, w)
	}
	return p
}

// TestAgainstRandom holds random sections to what physics demands: heat is conserved, nothing is colder than the coldest of what takes heat up, the
// influence matrix is symmetric and positive and tells the temperatures of conduction, and the estimate bounds the difference from fine on at least
// nineteen of twenty sections.
func TestAgainstRandom(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 11))
	n := 40
	switch {
	case os.Getenv("PACKRISE_SOAK") == "1":
		n = 1000
	case testing.Short():
		n = 15
	}
	over := 0
	for i := range n {
		p := randomLeaning(r)
		m := heat.New(p, heat.Settings{})
		got := m.Solve(context.Background(), nil)
		if got.Status != heat.Converged {
			t.Fatalf("%d: %v", i, got.Status)
		}
		holdsHeat(t, i, &p, got)
		influences(t, i, &p, m, got)
		want := solveAt(p, heat.Fine)
		worst := 0.0
		for j, v := range want.Core {
			worst = math.Max(worst, math.Abs(got.Core[j]-v))
		}
		if worst > got.ErrorK {
			over++
			t.Logf("%d: %.5f off, estimate %.5f, shape %d %d layers, %+v", i, worst, got.ErrorK, p.Wall.Shape, len(p.Wall.Rings), p.Wall.Against)
		}
		if worst > 0.1 {
			t.Errorf("%d: %.4f K off", i, worst)
		}
	}
	if over > n/20 {
		t.Errorf("%d of %d sections are beyond their estimates", over, n)
	}
}

func holdsHeat(t *testing.T, i int, p *heat.Problem, r *heat.Result) {
	t.Helper()
	if d := math.Abs(r.Generated - r.Released); d > 1e-6*(r.Generated+math.Abs(r.AgainstOut)) {
		t.Errorf("%d: %v W/m made, %v released, %v against", i, r.Generated, r.Released, r.AgainstOut)
	}
	least := p.Wall.Ambient
	if a := p.Wall.Against; a.Held {
		least = math.Min(least, a.Temp)
	}
	for j, v := range r.Core {
		if v < least-0.01 {
			t.Errorf("%d: part %d is at %v, colder than %v", i, j, v, least)
		}
	}
	if r.WallMean < least-0.01 {
		t.Errorf("%d: the outside is at %v, colder than %v", i, r.WallMean, least)
	}
}

func influences(t *testing.T, i int, p *heat.Problem, m *heat.Model, r *heat.Result) {
	t.Helper()
	k, ground, status := m.Tangent(context.Background())
	if status != heat.Converged {
		t.Fatalf("%d: %v", i, status)
	}
	for a := range k {
		if k[a] == nil {
			continue
		}
		sum := ground[a]
		for b := range k[a] {
			if k[b] == nil {
				continue
			}
			sum += k[a][b] * p.Parts[b].Heat
			if d := math.Abs(k[a][b] - k[b][a]); !r.Radiates && d > 1e-9*k[a][a] { // a tangent of radiation is not symmetric
				t.Errorf("%d: influence %v and %v", i, k[a][b], k[b][a])
			}
			if k[a][b] < 0 {
				t.Errorf("%d: influence %v", i, k[a][b])
			}
		}
		if d := math.Abs(sum - r.Core[a]); d > 0.03+r.ErrorK {
			t.Errorf("%d: part %d at %v, by influence %v", i, a, r.Core[a], sum)
		}
	}
}

// TestAgainstTurns: a section that is turned with what it rests against stays the same.
func TestAgainstTurns(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 9))
	for i := range 12 {
		p := randomLeaning(r)
		turned := p
		turned.Parts = append([]heat.Part(nil), p.Parts...)
		const turn = 1.234
		s, c := math.Sincos(turn)
		for j := range turned.Parts {
			q := &turned.Parts[j]
			q.X, q.Y = p.Parts[j].X*c-p.Parts[j].Y*s, p.Parts[j].X*s+p.Parts[j].Y*c
		}
		turned.Wall.Against.At += turn
		a, b := solveAt(p, heat.Standard), solveAt(turned, heat.Standard)
		for j := range a.Core {
			if math.Abs(a.Core[j]-b.Core[j]) > 0.02 {
				t.Errorf("%d: part %d at %v, turned %v", i, j, a.Core[j], b.Core[j])
			}
		}
	}
}

// TestAgainstFollows: other films, another temperature of the floor and another place of a part lead to what a new model says.
func TestAgainstFollows(t *testing.T) {
	for _, shape := range []heat.Shape{heat.Round, heat.Hull, heat.FlatWall} {
		p := leaning(heat.Against{Share: 0.25, At: -1.4, Held: true, Temp: 50}, heat.Ring{K: 0.2, Thickness: 1e-3})
		if shape != heat.FlatWall {
			p.Filling = heat.Gas
		}
		p.Wall.Shape, p.Wall.W, p.Wall.H = shape, 16e-3, 12e-3
		if shape == heat.Hull {
			p.Wall.Taut, p.Wall.Rings = taut, nil
		}
		m := heat.New(p, heat.Settings{})
		m.Solve(context.Background(), nil)
		p.Wall.Film, p.Wall.Ambient, p.Wall.Against.Temp = 14, 20, 10
		m.Outside(p.Wall)
		m.Solve(context.Background(), nil)
		p.Parts = append([]heat.Part(nil), p.Parts...)
		p.Parts[2].X += 0.2e-3
		p.Parts[2].Y += 0.3e-3
		m.Move(2, p.Parts[2].X, p.Parts[2].Y)
		sameAnswer(t, m.Solve(context.Background(), nil), solveAt(p, heat.Standard), 0.02)
	}
}

// TestAgainstField: the picture has what the answer tells: the outside's temperatures, no heat where it is insulated, the temperature where it is held.
func TestAgainstField(t *testing.T) {
	for _, c := range []struct {
		held bool
		p    heat.Problem
	}{
		{false, leaning(heat.Against{Share: 0.3, At: -math.Pi / 2}, heat.Ring{K: 0.2, Thickness: 1.2e-3})},
		{true, leaning(heat.Against{Share: 0.3, At: -math.Pi / 2, Held: true, Temp: 50}, heat.Ring{K: 0.2, Thickness: 1.2e-3})},
		{true, leaning(heat.Against{Share: 0.3, At: -math.Pi / 2, Held: true, Temp: 50})},
	} {
		r := solveAt(c.p, heat.Standard)
		out := c.p.Wall.R
		for _, l := range c.p.Wall.Rings {
			out += l.Thickness
		}
		const n = 720
		mean, hot := 0.0, math.Inf(-1)
		for i := range n {
			s, cos := math.Sincos(2 * math.Pi * float64(i) / n)
			v := r.Field.At(out*cos*(1-1e-9), out*s*(1-1e-9))
			mean += v / n
			hot = math.Max(hot, v)
			angle := math.Abs(math.Remainder(2*math.Pi*float64(i)/n+math.Pi/2, 2*math.Pi))
			if c.held && angle < 0.27*math.Pi && math.Abs(v-50) > 0.3 {
				t.Errorf("%v of what is held at %v rad from its middle", v, angle)
			}
			if !c.held && angle < 0.27*math.Pi {
				in := r.Field.At((out-2e-5)*cos, (out-2e-5)*s)
				if flux := 0.2 * (in - v) / 2e-5; math.Abs(flux) > 12 { // an open outside gives off some 450 W/m²
					t.Errorf("%v W/m² pass where nothing passes, %v rad from the middle", flux, angle)
				}
			}
		}
		if math.Abs(mean-r.WallMean) > 0.02 || math.Abs(hot-r.WallMax[len(r.WallMax)-1]) > 0.2 {
			t.Errorf("outside %.3f, hottest %.3f; the answer says %.3f, %.3f", mean, hot, r.WallMean, r.WallMax)
		}
	}
}
