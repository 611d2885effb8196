package outline

import (
	"math"
	"math/rand/v2"
	"testing"
)

// bordered is a System or HullSystem.
type bordered interface {
	Len() int
	RespondTo(y []float64, src Sources, ground bool)
	Incoming(y []float64, b [][]complex128)
	RespondMany(l *Lot)
	IncomingMany(l *Lot)
}

// patchesOf are Patches or HullPatches.
type patchesOf interface {
	RespondTo(y []float64, src Sources, ground bool, w []float64)
	Means(t, y []float64, src Sources)
	RespondMany(l *Lot, w []float64)
	MeansMany(t []float64, l *Lot)
}

// Many sources at once bring what each brings alone.
func TestMany(t *testing.T) {
	discs := four()
	for _, fineness := range []float64{1, 4} {
		hull := NewHull(heap(discs, still), discs, mirrorsOf(discs, -0.7), fineness)
		strings := hull.Patches(func(complex128) float64 { return 1e-3 })
		checkMany(t, "hull", discs, hull, strings, len(strings.A))
		if fineness > 1 && hull.n <= together {
			t.Errorf("no more than %d densities", hull.n)
		}
	}
	within := append([]Disc(nil), discs...)
	for i := range within {
		within[i].C += 0.02 + 0.01i
	}
	box := New(patchRect([]Layer{{K: 0.2, Thickness: 2e-3}}), within, 1)
	inside := box.Patches(func(complex128) float64 { return 4e-3 })
	checkMany(t, "box", within, box, inside, len(inside.A))
}

func checkMany(t *testing.T, what string, discs []Disc, s bordered, p patchesOf, patches int) {
	t.Helper()
	r := rand.New(rand.NewPCG(8, 8))
	l := NewLot(discs, s.Len())
	var src [Lanes]Sources
	w := normals(r, Lanes*patches)
	for v := range src {
		src[v] = randomSources(r, discs)
		for i := range discs {
			for k, x := range pack(nil, src[v].Q[i], src[v].D[i]) {
				l.Src[i][Lanes*k+v] = x
			}
		}
	}
	for _, taken := range []bool{false, true} {
		means := make([]float64, Lanes*patches)
		if taken {
			p.RespondMany(l, w)
			p.MeansMany(means, l)
		} else {
			s.RespondMany(l)
		}
		s.IncomingMany(l)
		for v := range src {
			y, mean, mine := make([]float64, s.Len()), make([]float64, patches), make([]float64, patches)
			if taken {
				for k := range mine {
					mine[k] = w[Lanes*k+v]
				}
				p.RespondTo(y, src[v], false, mine)
				p.Means(mean, y, src[v])
			} else {
				s.RespondTo(y, src[v], false)
			}
			checkLane(t, what+": unknown", l.Y, y, v)
			checkLane(t, what+": patch", means, mean, v)
			b := make([][]complex128, len(discs))
			for i, d := range discs {
				b[i] = make([]complex128, d.M+1)
			}
			s.Incoming(y, b)
			for i := range b {
				checkLane(t, what+": incoming", l.In[i], pack(nil, real(b[i][0]), b[i][1:]), v)
			}
		}
	}
}

func checkLane(t *testing.T, what string, many, one []float64, v int) {
	t.Helper()
	most := 0.0
	for _, x := range one {
		most = math.Max(most, math.Abs(x))
	}
	for i, want := range one {
		if got := many[Lanes*i+v]; math.Abs(got-want) > 1e-9*most {
			t.Fatalf("%s %d of vector %d: %g, want %g", what, i, v, got, want)
		}
	}
}
