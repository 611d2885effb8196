package film_test

import (
	"math"
	"math/rand/v2"
	"testing"

	"packrise/solver/film"
)

// placed makes equal cables at multiples of their diameter.
func placed(o film.Outside, d, emissivity float64, row film.Row, at ...[2]float64) *film.Together {
	t := &film.Together{Outside: o}
	for _, p := range at {
		t.Bodies = append(t.Bodies, film.Body{
			Face: film.Face{Shape: film.Round, DiameterM: d, Emissivity: emissivity, Absorptivity: 0.9},
			Hull: []film.Disc{{X: p[0] * d, Y: p[1] * d, R: d / 2}}, Row: row,
		})
	}
	return t
}

func room() film.Outside {
	return film.Outside{Kind: film.StillAir, AmbientK: 298.15, RadiantK: 298.15}
}

// TestBlackRows: black cables of one temperature give off what the table of IEC 60287-2-1 (testdata/reference/iec60287_constants.csv) has for
// the row over what it has for one cable, radiation in both. Compared for the cable that sees most of its neighbours, which the table is for.
func TestBlackRows(t *testing.T) {
	for _, c := range []struct {
		row film.Row
		at  [][2]float64
	}{
		{film.Row{N: 2, Arrangement: film.SideBySide}, [][2]float64{{0, 0}, {1, 0}}},
		{film.Row{N: 3, Arrangement: film.SideBySide}, [][2]float64{{0, 0}, {1, 0}, {-1, 0}}},
		{film.Row{N: 3, Arrangement: film.Trefoil}, [][2]float64{{0, 0}, {1, 0}, {0.5, math.Sqrt(0.75)}}},
		{film.Row{N: 2, Arrangement: film.OneAboveAnother}, [][2]float64{{0, 0}, {0, 1}}},
		{film.Row{N: 2, Arrangement: film.OneAboveAnother, Gap: 1}, [][2]float64{{0, 0}, {0, 2}}},
		{film.Row{N: 3, Arrangement: film.OneAboveAnother}, [][2]float64{{0, 0}, {0, 1}, {0, -1}}},
		{film.Row{N: 3, Arrangement: film.OneAboveAnother, Gap: 1}, [][2]float64{{0, 0}, {0, 2}, {0, -2}}},
	} {
		for _, d := range []float64{0.008, 0.03, 0.1} {
			for _, rise := range []float64{20, 45, 80} {
				g, _ := film.GroupOf(c.row.N, c.row.Arrangement, c.row.Gap, false)
				one, _ := film.GroupOf(1, film.SideBySide, 0, false)
				published, _ := g.Film(d, rise)
				alone, _ := one.Film(d, rise)
				to := placed(room(), d, 1, c.row, c.at...)
				s := make([]float64, len(c.at))
				for i := range s {
					s[i] = 298.15 + rise
				}
				our := to.Outside.Film(to.Bodies[0].Face, s[0])
				convection := to.Film(0, s).Convective / our.Convective * (alone - our.Radiative) // of the table's own single cable
				got := convection + to.Film(0, s).Flux(s[0])/rise - to.Film(0, s).Convective
				near(t, g.Name, got, published, 1e-9)
			}
		}
	}
}

// TestRowsBetweenSpacings: the share of a row rises with the gap from the table's touching value to that of a cable alone, without a jump.
func TestRowsBetweenSpacings(t *testing.T) {
	for _, r := range []film.Row{{N: 2}, {N: 3}, {N: 3, Arrangement: film.Trefoil}, {N: 2, Arrangement: film.OneAboveAnother}, {N: 3, Arrangement: film.OneAboveAnother}} {
		far := r.Reach()
		last := 0.0
		for r.Gap = 0; r.Gap < far*1.2; r.Gap += far / 200 {
			c := r.Sheltered(0.03, r.Open(), 40)
			if c > 1 || last > 0 && math.Abs(c-last) > 0.05 || r.Gap >= far && c < 1 {
				t.Errorf("%+v: share %g after %g", r, c, last)
			}
			last = c
		}
	}
	if (film.Row{}).Sheltered(0.03, 1, 40) != 1 || (film.Row{N: 7}).Reach() != 0 {
		t.Error("a cable alone, or one of a row that the table lacks")
	}
}

// TestFarApartIsAlone: bodies very far from each other have the films of bodies alone.
func TestFarApartIsAlone(t *testing.T) {
	to := placed(room(), 0.02, 0.9, film.Row{N: 2, Gap: 1e7}, [2]float64{0, 0}, [2]float64{1e7, 0})
	temps, films := to.Surfaces([]float64{300, 700})
	for i, q := range []float64{300, 700} {
		alone, a := to.Outside.Surface(to.Bodies[i].Face, q)
		near(t, "surface", temps[i], alone, 1e-9)
		near(t, "film", films[i].Coefficient(), a.Coefficient(), 1e-6)
	}
}

// TestTogetherBalances: Surfaces inverts Flux at random; what bodies exchange by radiation adds up to nothing; a grey body among others of
// its temperature gives off less than a black one, and none gains by a neighbour as warm as itself.
func TestTogetherBalances(t *testing.T) {
	rng := rand.New(rand.NewPCG(7, 2))
	for round := range 60 {
		o := room()
		o.Kind = []film.Kind{film.StillAir, film.Vacuum, film.MovingAir}[round%3]
		if o.Kind == film.MovingAir {
			o.SpeedMS = 1
		}
		o.SunWM2 = float64(round%2) * 500
		to := &film.Together{Outside: o}
		n := 2 + rng.IntN(5)
		q := make([]float64, n)
		for i := range q {
			d := 0.005 + 0.02*rng.Float64()
			to.Bodies = append(to.Bodies, film.Body{
				Face: film.Face{Shape: film.Round, DiameterM: d, Emissivity: 0.05 + 0.95*rng.Float64(), Absorptivity: 0.5},
				Hull: []film.Disc{{X: 0.03 * float64(i%3), Y: 0.03 * float64(i/3), R: d / 2}},
				Row:  film.Row{N: 1 + rng.IntN(3), Gap: rng.Float64()},
			})
			q[i] = 800 * rng.Float64()
			if o.Kind != film.Vacuum { // there is no colder than radiating nothing
				q[i] -= 80
			}
		}
		temps, films := to.Surfaces(q)
		back := to.Flux(temps)
		for i := range q {
			within(t, "flux", back[i], q[i], 1e-4)
			within(t, "film", films[i].Flux(temps[i]), q[i], 1e-4)
		}
		// all that bodies give each other by radiation adds up to nothing
		still := *to
		still.Outside.Kind, still.Outside.SunWM2, still.Outside.RadiantK = film.Vacuum, 0, 0
		at := append([]float64(nil), temps...)
		sum, away := 0.0, 0.0
		for i := range at {
			at[i] = 300 + 100*rng.Float64()
		}
		for i, f := range (&film.Together{Outside: still.Outside, Bodies: still.Bodies}).Flux(at) {
			sum += f * still.Bodies[i].Face.DiameterM
			alone := (&film.Together{Outside: still.Outside, Bodies: still.Bodies[i : i+1]}).Flux(at[i : i+1])
			away += alone[0] * still.Bodies[i].Face.DiameterM
		}
		if !(sum > 0 && sum < away) { // what reaches the cold outside is less than all would radiate alone
			t.Errorf("%g W/m leave, alone %g", sum, away)
		}
	}
}

// TestFollow: a film's end, the coefficient kept, against differences of the flow.
func TestFollow(t *testing.T) {
	ground := film.Outside{Kind: film.Buried, AmbientK: 288, DepthM: 0.6, SoilWMK: 0.8}
	for _, o := range []film.Outside{room(), ground} {
		to := placed(o, 0.02, 0.8, film.Row{N: 2, Gap: 0.2}, [2]float64{0, 0}, [2]float64{1.2, 0}, [2]float64{0.4, 1.3})
		s := []float64{340, 320, 355}
		k := to.Follow(s)
		const d = 1e-3
		for j := range s {
			up, down := append([]float64{}, s...), append([]float64{}, s...)
			up[j] += d
			down[j] -= d
			a, b := to.Flux(up), to.Flux(down)
			for i := range s {
				h := to.Film(i, s).Coefficient()
				want := -(a[i] - b[i]) / (2 * d * h)
				if i == j {
					want++
				}
				within(t, "follow", k[i][j], want, 1e-6)
			}
		}
	}
}

// TestBuriedInARow: the middle of three equally loaded cables, laid flat: IEC 60287-2-1, T4 = ρ/2π [ln(u + √(u²−1)) + ln(1 + (2L/s)²)], from
// memory.
func TestBuriedInARow(t *testing.T) {
	const d, depth, k, s, q = 0.04, 0.8, 1.0, 0.08, 30.0
	o := film.Outside{Kind: film.Buried, AmbientK: 288.15, DepthM: depth, SoilWMK: k}
	to := placed(o, d, 0.9, film.Row{}, [2]float64{0, 0}, [2]float64{s / d, 0}, [2]float64{-s / d, 0})
	w := q / (math.Pi * d)
	temps, films := to.Surfaces([]float64{w, w, w})
	u := 2 * depth / d
	t4 := (math.Log(u+math.Sqrt(u*u-1)) + math.Log(1+math.Pow(2*depth/s, 2))) / (2 * math.Pi * k)
	near(t, "rise of the middle one", temps[0]-288.15, q*t4, 1e-12)
	near(t, "its film", films[0].Flux(temps[0]), w, 1e-9)
	for i, f := range to.Flux(temps) {
		near(t, "back", f, w, 1e-9)
		if temps[i] > temps[0] {
			t.Errorf("%d is hotter than the middle one", i)
		}
	}
	// deeper bodies are warmer
	to = placed(o, d, 0.9, film.Row{}, [2]float64{0, 2}, [2]float64{0, -2})
	temps, _ = to.Surfaces([]float64{w, w})
	if temps[1] <= temps[0] {
		t.Errorf("upper %g K, lower %g K", temps[0], temps[1])
	}
}

// TestSunOnBodies: what stands in the shade of another absorbs nothing, what is half in it half.
func TestSunOnBodies(t *testing.T) {
	o := room()
	o.SunWM2 = 1000
	to := placed(o, 0.02, 0.9, film.Row{}, [2]float64{0, 0}, [2]float64{0, -3}, [2]float64{0.5, -6})
	s := []float64{330, 330, 330}
	whole := 0.9 * 1000 / math.Pi
	near(t, "in the sun", to.Film(0, s).AbsorbedWM2, whole, 1e-12)
	within(t, "in the shade", to.Film(1, s).AbsorbedWM2, 0, 1e-9)
	near(t, "half in it", to.Film(2, s).AbsorbedWM2, whole/2, 1e-9)
}

func BenchmarkTogether12(b *testing.B) {
	b.ReportAllocs()
	q := make([]float64, 12)
	var at [][2]float64
	for i := range q {
		q[i] = 300 + 10*float64(i)
		at = append(at, [2]float64{2 * float64(i), 0})
	}
	for b.Loop() {
		placed(room(), 0.01, 0.9, film.Row{N: 3, Gap: 1}, at...).Surfaces(q)
	}
}
