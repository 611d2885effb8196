package outline

import (
	"math"
	"math/cmplx"
	"math/rand/v2"
	"testing"
)

// heap is a bundle of discs with its hull worked out by hand: the tangent of every pair that leaves all discs on its left.
func heap(discs []Disc, out Outside) Hull {
	h := Hull{MediumK: 0.03}
	type leg struct {
		from, to int
		angle    float64 // of the normal
	}
	var legs []leg
	for i, p := range discs {
		for j, q := range discs {
			if i == j {
				continue
			}
			v := q.C - p.C
			theta := cmplx.Phase(v) - math.Acos((p.A-q.A)/cmplx.Abs(v))
			n := cmplx.Rect(1, theta)
			ok := true
			for k, r := range discs {
				ok = ok && (k == i || k == j || real((r.C-p.C)*cmplx.Conj(n))+r.A-p.A < -1e-12)
			}
			if ok {
				legs = append(legs, leg{i, j, math.Mod(theta+4*math.Pi, 2*math.Pi)})
			}
		}
	}
	if len(legs) == 0 {
		h.Arcs = []Arc{{Disc: 0, To: 2 * math.Pi, Bare: out, String: out}}
		return h
	}
	at := 0
	for range legs {
		for k, l := range legs { // the leg that leaves the disc at which this one arrives
			if l.from != legs[at].to {
				continue
			}
			from, to := legs[at].angle, l.angle
			if to < from {
				to += 2 * math.Pi
			}
			if to-from < math.Pi*1.99 {
				h.Arcs = append(h.Arcs, Arc{Disc: l.from, From: from, To: to, Bare: out, String: out})
				at = k
				break
			}
		}
	}
	return h
}

// four are parts of unlike size, three touching, one inside the rest.
func four() []Disc {
	return []Disc{{C: 0, A: 3e-3, M: 8}, {C: 5e-3, A: 2e-3, M: 8}, {C: 2.5e-3 + 4.33e-3i, A: 1.7e-3, M: 10}, {C: 2.9e-3 + 2.4e-3i, A: 0.3e-3, M: 6}}
}

var still = Outside{Film: 9, Temp: 20}

func mirrorsOf(discs []Disc, beyond float64) []Mirror {
	m := make([]Mirror, len(discs))
	for i := range m {
		m[i].Beyond = beyond
		for n := 1; n <= 30; n++ {
			m[i].T = append(m[i].T, beyond-0.2*math.Pow(0.6, float64(n)))
		}
	}
	return m
}

func randomSources(r *rand.Rand, discs []Disc) Sources {
	var s Sources
	for _, d := range discs {
		s.Q = append(s.Q, 3*r.Float64())
		c := make([]complex128, d.M)
		for m := range c {
			c[m] = complex(r.NormFloat64(), r.NormFloat64()) * complex(math.Pow(0.7, float64(m)), 0)
		}
		s.D = append(s.D, c)
	}
	return s
}

// One part alone: the whole rim has the film. Closed form: T = T∞ + q/(2πah) on the rim, and of a harmonic comes back (nk/a − h)/(nk/a + h).
func TestLonePart(t *testing.T) {
	for _, beyond := range []float64{0, -0.7, 0.4} {
		discs := []Disc{{C: 0.01 + 0.02i, A: 2e-3, M: 5}}
		h := heap(discs, still)
		s := NewHull(h, discs, mirrorsOf(discs, beyond), 1)
		src := Sources{Q: []float64{4}, D: [][]complex128{{0.3 - 0.1i, 0, 0.2i, 0, 0}}}
		y := s.Respond(src, true)
		b := [][]complex128{make([]complex128, 6)}
		s.Incoming(y, b)
		rim := 20 + 4/(2*math.Pi*2e-3*9)
		within(t, "mean", real(b[0][0])-4*math.Log(2e-3)/(2*math.Pi*0.03), rim, 1e-6)
		for n := 1; n <= 3; n++ {
			g := float64(n) * 0.03 / 2e-3
			want := complex((g-9)/(g+9), 0) * cmplx.Conj(src.D[0][n-1])
			if e := cmplx.Abs(b[0][n] - want); e > 2e-4 {
				t.Errorf("t %g: harmonic %d comes back as %v, want %v", beyond, n, b[0][n], want)
			}
		}
		_, mean, out := s.Faces(s.Temperatures(y, src))
		within(t, "outside", mean, rim, 1e-6)
		within(t, "released", out, 4, 1e-6)
	}
}

func within(t *testing.T, what string, got, want, tol float64) {
	t.Helper()
	if math.Abs(got-want) > tol*math.Max(1, math.Abs(want)) {
		t.Errorf("%s: %.10g, want %.10g", what, got, want)
	}
}

// What the conditions hold in the mean is checked against the definition: sums over the panels by a fine quadrature.
func TestHullCouplingByQuadrature(t *testing.T) {
	discs := four()
	s := NewHull(heap(discs, still), discs, mirrorsOf(discs, 0), 1)
	for i := range s.panels {
		for j := range s.panels {
			to, from := &s.panels[i], &s.panels[j]
			if i == j || math.Abs(float64(i-j)) == 1 || math.Abs(float64(i-j)) == float64(len(s.panels)-1) {
				continue
			}
			at := cellsOf[to.p].at
			for l := range to.p {
				for k := range from.p {
					flux, temp := byQuadrature(from, to, at[l], at[l+1], k)
					within(t, "flux", s.block(s.direct.flux, from, to, l)[k], flux, 1e-5)
					within(t, "temp", s.block(s.direct.temp, from, to, l)[k], temp, 1e-5*from.half)
				}
			}
		}
	}
}

// byQuadrature is the mean of ∂T/∂n and T over lo–hi of to for density P_k on from.
func byQuadrature(from, to *bow, lo, hi float64, k int) (flux, temp float64) {
	g := rules[20]
	for i, x := range g.x {
		u := (lo+hi)/2 + x*(hi-lo)/2
		z := to.at(u)
		normal := -1i * to.dir
		if to.disc >= 0 {
			normal = (z - to.c) / complex(to.a, 0)
		}
		for n, v := range g.x {
			d := z - from.at(v)
			w := g.w[i] / 2 * g.p[n][k] * from.half / (2 * math.Pi)
			r2 := real(d)*real(d) + imag(d)*imag(d)
			flux -= w * real(d*cmplx.Conj(normal)) / r2
			temp -= w * math.Log(r2) / 2
		}
	}
	return flux, temp
}

// All heat that the parts make leaves through the hull, to rounding.
func TestHullConservesHeat(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 2))
	discs := four()
	for _, beyond := range []float64{-0.9, 0, 0.5} {
		s := NewHull(heap(discs, still), discs, mirrorsOf(discs, beyond), 0.7)
		src := randomSources(r, discs)
		y := s.Respond(src, true)
		_, _, out := s.Faces(s.Temperatures(y, src))
		within(t, "released", out, src.Q[0]+src.Q[1]+src.Q[2]+src.Q[3], 1e-6)
	}
}

// A part that sends all harmonics back alike is mirrored in closed form: the same as the sum of very many.
func TestHullMirrorIsTheSum(t *testing.T) {
	discs := four()
	h := heap(discs, still)
	closed := make([]Mirror, len(discs))
	summed := make([]Mirror, len(discs))
	for i := range discs {
		closed[i].Beyond = -0.6
		for range 3000 {
			summed[i].T = append(summed[i].T, -0.6)
		}
	}
	src := randomSources(rand.New(rand.NewPCG(3, 4)), discs)
	a, b := NewHull(h, discs, closed, 1), NewHull(h, discs, summed, 1)
	x, y := a.Temperatures(a.Respond(src, true), src), b.Temperatures(b.Respond(src, true), src)
	for i := range x {
		within(t, "cell", x[i], y[i], 2e-4)
	}
}

// Harmonics of a string, up to very high ones, are those of a fine quadrature.
func TestHarmonicsOfAString(t *testing.T) {
	discs := four()
	s := NewHull(heap(discs, still), discs, mirrorsOf(discs, 0), 1)
	for i := range s.panels {
		b := &s.panels[i]
		d := discs[s.pieces[b.piece].ends[1]]
		if b.disc >= 0 {
			continue
		}
		const m = 300
		out := make([]float64, b.p*(1+2*m))
		b.expandString(d.C, d.A, m, out)
		const parts = 60
		g := rules[24]
		for _, n := range []int{1, 5, 20, 60, 150, m} {
			for k := range b.p {
				var want complex128
				for j := range parts {
					for l, x := range g.x {
						u := (2*float64(j)+1+x)/parts - 1
						p, _ := legendre(k, u)
						want += complex(g.w[l]/parts*p*b.half/(2*math.Pi*float64(n)), 0) * cmplx.Pow(complex(d.A, 0)/(b.at(u)-d.C), complex(float64(n), 0))
					}
				}
				got := complex(out[k*(1+2*m)+2*n-1], out[k*(1+2*m)+2*n])
				if e := cmplx.Abs(got - want); e > 1e-6*b.half/float64(n) {
					t.Errorf("panel %d mode %d harmonic %d: %v, want %v", i, k, n, got, want)
				}
			}
		}
	}
}

// Turning and moving the whole bundle changes nothing.
func TestHullTurns(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 6))
	discs := four()
	src := randomSources(r, discs)
	one := NewHull(heap(discs, still), discs, mirrorsOf(discs, -0.7), 1)
	want := one.Temperatures(one.Respond(src, true), src)
	for _, angle := range []float64{0.7, 2.5, 4.1} {
		turn := cmplx.Rect(1, angle)
		turned := append([]Disc(nil), discs...)
		sources := Sources{Q: src.Q}
		for i := range turned {
			turned[i].C = discs[i].C*turn + 0.02 - 0.01i
			d := append([]complex128(nil), src.D[i]...)
			for m := range d {
				d[m] *= cmplx.Pow(turn, complex(float64(m+1), 0))
			}
			sources.D = append(sources.D, d)
		}
		h := heap(turned, still)
		for h.Arcs[0].Disc != one.hull.Arcs[0].Disc {
			h.Arcs = append(h.Arcs[1:], h.Arcs[0])
		}
		two := NewHull(h, turned, mirrorsOf(discs, -0.7), 1)
		got := two.Temperatures(two.Respond(sources, true), sources)
		for i := range want {
			within(t, "cell", got[i], want[i], 1e-8)
		}
	}
}

// Other films on a ready system, and a part moved inside, are as if made anew.
func TestHullChanges(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 8))
	discs := four()
	src := randomSources(r, discs)
	h := heap(discs, still)
	m := mirrorsOf(discs, -0.7)
	s := NewHull(h, discs, m, 1)
	for i := range h.Arcs {
		h.Arcs[i].Bare, h.Arcs[i].String = Outside{Film: 3, Temp: 25, Absorbed: 100}, Outside{Film: float64(4 + i), Temp: 22}
	}
	compare(t, "outside", s.Outside(h.Arcs), NewHull(h, discs, m, 1), src, 1e-9)
	s = s.Outside(h.Arcs)
	for _, c := range []struct {
		what string
		disc int
		by   complex128
		keep bool // the factors
		tol  float64
	}{{"inside, with the panels as they were", 3, 0.1e-3, true, 5e-4}, {"on the hull", 1, 0.05e-3 + 0.1e-3i, false, 1e-9}, {"nowhere", 0, 0, true, 1e-9}} {
		moved := append([]Disc(nil), discs...)
		moved[c.disc].C += c.by
		g := heap(moved, still)
		for i := range g.Arcs {
			g.Arcs[i].Bare, g.Arcs[i].String = h.Arcs[i].Bare, h.Arcs[i].String
		}
		renewed := s.Renew(g, moved, m)
		compare(t, c.what, renewed, NewHull(g, moved, m, 1), src, c.tol)
		if kept := &renewed.lu.Data[0] == &s.lu.Data[0]; kept != c.keep {
			t.Errorf("%s: factors kept %v", c.what, kept)
		}
	}
}

func compare(t *testing.T, what string, a, b *HullSystem, src Sources, tol float64) {
	t.Helper()
	x, y := a.Temperatures(a.Respond(src, true), src), b.Temperatures(b.Respond(src, true), src)
	if len(x) != len(y) {
		t.Skip("other panels")
	}
	for i := range x {
		within(t, what, x[i], y[i], tol)
	}
}

func TestHullRefuses(t *testing.T) {
	discs := four()
	for name, spoil := range map[string]func(h *Hull){
		"no arcs":      func(h *Hull) { h.Arcs = nil },
		"no such disc": func(h *Hull) { h.Arcs[0].Disc = 9 },
		"backwards":    func(h *Hull) { h.Arcs[0].To = h.Arcs[0].From - 1 },
		"conductivity": func(h *Hull) { h.MediumK = 0 },
		"film":         func(h *Hull) { h.Arcs[1].String.Film = -1 },
	} {
		h := heap(discs, still)
		spoil(&h)
		func() {
			defer func() {
				if recover() == nil {
					t.Errorf("%s goes through", name)
				}
			}()
			NewHull(h, discs, mirrorsOf(discs, 0), 1)
		}()
	}
	s := NewHull(heap(discs, Outside{}), discs, mirrorsOf(discs, 0), 1)
	if y := s.Respond(randomSources(rand.New(rand.NewPCG(1, 1)), discs), true); !math.IsNaN(y[0]) {
		t.Error("an answer where no heat gets out")
	}
}
