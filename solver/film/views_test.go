package film_test

import (
	"math"
	"math/rand/v2"
	"testing"

	"packrise/solver/film"
)

// cylinders is the view factor between two equal parallel cylinders, x = 1 + gap/diameter: closed form of crossed strings, in
// any handbook of radiation (Howell's catalogue of configuration factors, C-63; Incropera table 13.1), from memory.
func cylinders(x float64) float64 { return (math.Sqrt(x*x-1) + math.Asin(1/x) - x) / math.Pi }

// within compares lengths (m) of bodies some centimetres large.
func within(t *testing.T, what string, got, want, tol float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tol) {
		t.Errorf("%s: %.9g, want %.9g within %g", what, got, want, tol)
	}
}

func TestViewsOfTwoCylinders(t *testing.T) {
	for _, gap := range []float64{0, 1e-6, 0.01, 0.3, 1, 10, 1000} {
		for turn := 0.0; turn < 3; turn += 0.37 {
			l := 0.03 * (1 + gap)
			b, _ := film.Views([][]film.Disc{{{X: 1, Y: 2, R: 0.015}}, {{X: 1 + l*math.Cos(turn), Y: 2 + l*math.Sin(turn), R: 0.015}}})
			within(t, "view of the neighbour", b[0][1]/(0.03*math.Pi), cylinders(1+gap), 1e-11)
		}
	}
}

// TestViewsOfUnlikeCylinders: crossed less uncrossed strings between two circles of different size, written out.
func TestViewsOfUnlikeCylinders(t *testing.T) {
	const a, b, l = 0.02, 0.005, 0.04
	cross := 2 * (math.Sqrt(l*l-(a+b)*(a+b)) + (a+b)*(math.Pi/2+math.Asin((a+b)/l)))
	beta := math.Asin((a - b) / l)
	open := 2*math.Sqrt(l*l-(a-b)*(a-b)) + a*(math.Pi+2*beta) + b*(math.Pi-2*beta)
	v, _ := film.Views([][]film.Disc{{{X: 0, Y: 0, R: a}}, {{X: 0, Y: l, R: b}}})
	within(t, "perimeter × view", v[0][1], (cross-open)/2, 1e-12)
}

// TestViewsOfPlates: two flat strips facing each other, Hottel: F = √(1 + (h/w)²) − h/w.
func TestViewsOfPlates(t *testing.T) {
	const w, h = 0.1, 0.04
	v, lit := film.Views([][]film.Disc{{{X: 0, Y: 0}, {X: w, Y: 0}}, {{X: 0, Y: h}, {X: w, Y: h}}})
	within(t, "width × view", v[0][1], math.Hypot(w, h)-h, 1e-12)
	within(t, "seen from above", lit[1], w, 1e-12)
	within(t, "in the shade", lit[0], 0, 1e-12)
}

// TestViewsPastAThird: in a row of three equal cylinders the ends see each other only past the middle one. Strings from an end to the other
// that go round the middle are the outer tangents, which touch it, so nothing is left.
func TestViewsPastAThird(t *testing.T) {
	disc := func(x, y, r float64) []film.Disc { return []film.Disc{{X: x, Y: y, R: r}} }
	v, _ := film.Views([][]film.Disc{disc(0, 0, 1), disc(3, 0, 1), disc(6, 0, 1)})
	within(t, "ends of a row", v[0][2], 0, 1e-12)
	// a thin middle one takes from the view of the ends what they see of it, but for the lines that it alone meets
	whole, _ := film.Views([][]film.Disc{disc(0, 0, 1), disc(6, 0, 1)})
	thin, _ := film.Views([][]film.Disc{disc(0, 0, 1), disc(3, 0, 0.1), disc(6, 0, 1)})
	if !(thin[0][2] < whole[0][1] && thin[0][2] > whole[0][1]-thin[0][1]) {
		t.Errorf("%g past a thin one, %g without it, which sees %g", thin[0][2], whole[0][1], thin[0][1])
	}
}

// TestViewsAtRandom: no body sees more than all there is, pairs are symmetric, and many discs, whose directions are sampled, agree with
// few, whose directions are exact.
func TestViewsAtRandom(t *testing.T) {
	rng := rand.New(rand.NewPCG(5, 1))
	for range 60 {
		var bodies [][]film.Disc
		n := 2 + rng.IntN(6)
		for i := range n {
			x, y := float64(i%3)*0.1, float64(i/3)*0.1
			body := []film.Disc{{X: x + 0.02*rng.Float64(), Y: y + 0.02*rng.Float64(), R: 0.002 + 0.02*rng.Float64()}}
			if rng.IntN(2) == 0 {
				body = append(body, film.Disc{X: x + 0.02*rng.Float64(), Y: y + 0.02*rng.Float64(), R: 0.02 * rng.Float64()})
			}
			bodies = append(bodies, body)
		}
		v, lit := film.Views(bodies)
		many := append([][]film.Disc{}, bodies...) // discs inside others change nothing but their number
		for len(many[0]) < 40 {
			many[0] = append(many[0][:len(many[0]):len(many[0])], film.Disc{X: bodies[0][0].X, Y: bodies[0][0].Y, R: bodies[0][0].R / 2})
		}
		w, shade := film.Views(many)
		for i := range bodies {
			sum := 0.0
			for j := range bodies {
				sum += v[i][j]
				within(t, "pair", v[i][j], v[j][i], 1e-13)
				within(t, "sampled", w[i][j], v[i][j], 1e-6)
			}
			p := perimeter(bodies[i])
			if sum > p*(1+1e-9) || v[i][i] != 0 || lit[i] > p/2+1e-9 {
				t.Fatalf("body %d of perimeter %g sees %g, lit over %g", i, p, sum, lit[i])
			}
			within(t, "lit", shade[i], lit[i], 1e-12)
		}
	}
}

// perimeter of the hull of one or two discs.
func perimeter(b []film.Disc) float64 {
	if len(b) == 1 {
		return 2 * math.Pi * b[0].R
	}
	sum := 0.0 // Cauchy: the integral of the widths over half a turn
	const n = 20000
	for k := range n {
		sin, cos := math.Sincos(math.Pi * (float64(k) + 0.5) / n)
		lo, hi := math.Inf(1), math.Inf(-1)
		for _, d := range b {
			p := d.Y*cos - d.X*sin
			lo, hi = math.Min(lo, p-d.R), math.Max(hi, p+d.R)
		}
		sum += (hi - lo) * math.Pi / n
	}
	return sum
}
