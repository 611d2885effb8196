package gas_test

import (
	"math"
	"math/rand/v2"
	"testing"

	"packrise/solver/gas"
)

// around returns n equal cuts of a full circle.
func around(n int) []float64 {
	c := make([]float64, n+1)
	for k := range c {
		c[k] = 2 * math.Pi * float64(k) / float64(n)
	}
	return c
}

// ring returns a round outline of radius r with n patches.
func ring(r float64, n int) gas.Outline {
	return gas.Ring(r, (&gas.Grain{Turn: float64(n)}).Around(r))
}

// box returns a rectangle from the origin with n patches a side.
func box(w, h float64, n int) gas.Outline {
	corners := []complex128{0, complex(w, 0), complex(w, h), complex(0, h), 0}
	var o gas.Outline
	last := corners[0]
	for s := range 4 {
		for k := 1; k <= n; k++ {
			b := corners[s+1]
			if k < n {
				b = corners[s] + complex(float64(k)/float64(n), 0)*(corners[s+1]-corners[s])
			}
			o.Segments = append(o.Segments, gas.Segment{A: last, B: b})
			last = b
		}
	}
	return o
}

// between is the view factor from the patches of surface i to those of j.
func between(e *gas.Enclosure, i, j int) float64 {
	a0, a1 := e.Patches(i)
	b0, b1 := e.Patches(j)
	return span(e, a0, a1, b0, b1)
}

func span(e *gas.Enclosure, a0, a1, b0, b1 int) float64 {
	sum, area := 0.0, 0.0
	for a := a0; a < a1; a++ {
		area += e.Area(a)
		for b := b0; b < b1; b++ {
			sum += e.Area(a) * e.Factor(a, b)
		}
	}
	return sum / area
}

// Concentric cylinders: F is 1 outwards and r/R inwards (J. R. Howell, A Catalog of Radiation Heat Transfer Configuration Factors, C-91).
func TestConcentric(t *testing.T) {
	for _, r := range []float64{0.1, 0.5, 0.95} {
		e := gas.NewEnclosure([]gas.Disc{{R: r, Cuts: around(24)}}, ring(1, 72), 3, 2, nil)
		if f := between(e, 0, 1); math.Abs(f-1) > 1e-4 {
			t.Errorf("r %g: %.6f outwards", r, f)
		}
		if f := between(e, 1, 0); math.Abs(f-r) > 1e-4 {
			t.Errorf("r %g: %.6f inwards", r, f)
		}
	}
}

// Two equal cylinders (Howell, C-63): F = (√(X²−1) + asin(1/X) − X)/π with X = 1 + s/2r.
func TestTwoCylinders(t *testing.T) {
	for _, gap := range []float64{0, 0.05, 0.5, 4} {
		x := 1 + gap/2
		want := (math.Sqrt(x*x-1) + math.Asin(1/x) - x) / math.Pi
		for _, points := range []int{2, 3, 4} {
			e := gas.NewEnclosure([]gas.Disc{{C: complex(-x, 0.3), R: 1, Cuts: around(24)}, {C: complex(x, 0.3), R: 1, Cuts: around(24)}}, ring(8, 72), points, 2, nil)
			if f := between(e, 0, 1); math.Abs(f-want) > 5e-5 {
				t.Errorf("gap %g, %d points: %.6f, want %.6f", gap, points, f, want)
			}
		}
	}
}

// A strip and a cylinder over its middle (Howell, C-72 by crossed strings): F = (r/b) atan(b/h) from the strip of half-width b to the
// cylinder of radius r whose axis is h above it; the same from the cylinder's side.
func TestStripAndCylinder(t *testing.T) {
	const b, h, r = 2.0, 1.5, 0.7
	e := gas.NewEnclosure([]gas.Disc{{C: complex(b, h), R: r, Cuts: around(24)}}, box(2*b, 9, 12), 3, 2, nil)
	from, _ := e.Patches(1)
	want := r / b * math.Atan(b/h)
	if f := span(e, from, from+12, 0, 24); math.Abs(f-want) > 1e-4 {
		t.Errorf("%.6f, want %.6f", f, want)
	}
}

// Opposite sides of a duct, F = √(1+(h/w)²) − h/w, and sides that meet, F = (1 + h/w − √(1+(h/w)²))/2 (Hottel's crossed strings; Howell, C-1 and C-3).
func TestStrips(t *testing.T) {
	for _, h := range []float64{0.2, 1, 3} {
		e := gas.NewEnclosure(nil, box(1, h, 8), 3, 2, nil)
		d := math.Sqrt(1 + h*h)
		if f := span(e, 0, 8, 16, 24); math.Abs(f-(d-h)) > 1e-5 {
			t.Errorf("h %g: %.6f opposite, want %.6f", h, f, d-h)
		}
		if f, want := span(e, 0, 8, 8, 16), (1+h-d)/2; math.Abs(f-want) > 1e-5 {
			t.Errorf("h %g: %.6f beside, want %.6f", h, f, want)
		}
	}
}

// scatter drops discs of unlike sizes into a circle of radius 10 (or a box 20 × 15), some touching.
func scatter(r *rand.Rand, n int, boxed bool) []gas.Disc {
	var d []gas.Disc
	for tries := 0; len(d) < n && tries < 3000; tries++ {
		q := gas.Disc{C: complex(20*r.Float64()-10, 20*r.Float64()-10), R: 0.4 + 2*r.Float64(), Cuts: around(12 + r.IntN(20))}
		if boxed {
			q.C = complex(20*r.Float64(), 15*r.Float64())
		}
		room := 10 - abs(q.C)
		if boxed {
			room = math.Min(math.Min(real(q.C), 20-real(q.C)), math.Min(imag(q.C), 15-imag(q.C)))
		}
		for _, o := range d {
			room = math.Min(room, abs(q.C-o.C)-o.R)
		}
		if room < 0.4 {
			continue
		}
		q.R = math.Min(q.R, room)
		d = append(d, q)
	}
	return d
}

func abs(z complex128) float64 { return math.Hypot(real(z), imag(z)) }

// first returns the patch that a ray meets, by trying every surface.
func first(discs []gas.Disc, out gas.Outline, at, dir complex128, self int) int {
	best, patch, base := math.Inf(1), -1, 0
	for j, d := range discs {
		v := (d.C - at) * complex(real(dir), -imag(dir))
		if w := d.R*d.R - imag(v)*imag(v); j != self && w > 0 && real(v) > 0 && real(v)-math.Sqrt(w) < best {
			best = real(v) - math.Sqrt(w)
			hit := at + complex(best, 0)*dir - d.C
			t := math.Atan2(imag(hit), real(hit))
			if t < 0 {
				t += 2 * math.Pi
			}
			n := len(d.Cuts) - 1
			patch = base + min(int(t/(2*math.Pi)*float64(n)), n-1)
		}
		base += len(d.Cuts) - 1
	}
	if patch >= 0 {
		return patch
	}
	if out.R > 0 {
		v := -at * complex(real(dir), -imag(dir))
		hit := at + complex(real(v)+math.Sqrt(out.R*out.R-imag(v)*imag(v)), 0)*dir
		t := math.Atan2(imag(hit), real(hit))
		if t < 0 {
			t += 2 * math.Pi
		}
		return base + min(int(t/(2*math.Pi)*float64(len(out.Segments))), len(out.Segments)-1)
	}
	for k, s := range out.Segments {
		a, b := (s.A-at)*complex(real(dir), -imag(dir)), (s.B-at)*complex(real(dir), -imag(dir))
		if imag(a) <= 0 && imag(b) > 0 && (real(a) > 0 || real(b) > 0) {
			return base + k
		}
	}
	return -1
}

// Random sections, many surfaces in each other's way: against plain rays from many points of every patch.
func TestRays(t *testing.T) {
	seeds := 6
	if testing.Short() {
		seeds = 2
	}
	for seed := range seeds {
		r := rand.New(rand.NewPCG(uint64(seed), 7))
		boxed := seed%2 == 1
		discs, out := scatter(r, 14, boxed), ring(10, 60)
		if boxed {
			out = box(20, 15, 12)
		}
		e := gas.NewEnclosure(discs, out, 4, 2, nil)
		const origins, rays = 24, 360
		square, all := 0.0, 0.0
		for i := range discs {
			a, b := e.Patches(i)
			whole := make([]float64, len(discs)+1)
			for k := a; k < b; k++ {
				count := make([]float64, e.Len())
				lo, hi := discs[i].Cuts[k-a], discs[i].Cuts[k-a+1]
				for o := range origins {
					s, c := math.Sincos(lo + (hi-lo)*(float64(o)+0.5)/origins)
					n := complex(c, s)
					for m := range rays {
						sin := -1 + 2*(float64(m)+0.5)/rays
						dir := n * complex(math.Sqrt(1-sin*sin), sin)
						count[first(discs, out, discs[i].C+complex(discs[i].R, 0)*n, dir, i)] += 1.0 / (origins * rays)
					}
				}
				for j := range whole {
					for p, to := e.Patches(j); p < to; p++ {
						whole[j] += count[p] - e.Factor(k, p)
						square += e.Area(k) * (count[p] - e.Factor(k, p)) * (count[p] - e.Factor(k, p))
					}
				}
				all += e.Area(k)
			}
			for j, f := range whole {
				if f /= float64(b - a); math.Abs(f) > 1.5e-3 {
					t.Errorf("seed %d: the factor from disc %d to %d is off by %.4f", seed, i, j, f)
				}
			}
		}
		if rms := math.Sqrt(square / all); rms > 4e-3 {
			t.Errorf("seed %d: factors of patches are off by %.4f, root mean square", seed, rms)
		}
	}
}

// Reciprocity A_i F_ij = A_j F_ji and closure Σ F_ij = 1 hold to rounding, with tangent discs too.
func TestReciprocalAndClosed(t *testing.T) {
	r := rand.New(rand.NewPCG(3, 3))
	discs := scatter(r, 12, false)
	e := gas.NewEnclosure(discs, ring(10, 48), 3, 2, nil)
	for i := range e.Len() {
		sum := 0.0
		for j := range e.Len() {
			f := e.Factor(i, j)
			sum += f
			if d := f*e.Area(i) - e.Factor(j, i)*e.Area(j); math.Abs(d) > 1e-14 {
				t.Fatalf("A F of %d and %d differ by %g", i, j, d)
			}
			if f < -0.02 || f > 1 {
				t.Errorf("F of %d to %d is %g", i, j, f)
			}
		}
		if math.Abs(sum-1) > 1e-13 {
			t.Errorf("row %d adds up to %.15f", i, sum)
		}
	}
}

// After Move everything is as if made anew.
func TestMove(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 5))
	discs := scatter(r, 16, false)
	e := gas.NewEnclosure(discs, ring(10, 48), 3, 2, nil)
	for range 4 {
		i := r.IntN(len(discs))
		discs[i].C *= complex(0.9, 0)
		clear := true
		for j, d := range discs {
			clear = clear && (j == i || abs(d.C-discs[i].C) >= d.R+discs[i].R)
		}
		if !clear {
			discs[i].C /= complex(0.9, 0)
			continue
		}
		e.Move(i, discs[i].C, 2)
		fresh := gas.NewEnclosure(discs, ring(10, 48), 3, 2, nil)
		for a := range e.Len() {
			for b := range e.Len() {
				if d := math.Abs(e.Factor(a, b) - fresh.Factor(a, b)); d > 1e-9 {
					t.Fatalf("F of %d to %d is off by %g after Move", a, b, d)
				}
			}
		}
	}
}

// Discs in a row on a floor hide and graze each other's horizons exactly.
func TestGrazing(t *testing.T) {
	var discs []gas.Disc
	for k := range 9 {
		discs = append(discs, gas.Disc{C: complex(1+2*float64(k), 1), R: 1, Cuts: around(24)})
	}
	e := gas.NewEnclosure(discs, box(18, 6, 18), 3, 2, nil)
	// The floor between two neighbours sees nothing but them: by crossed strings π/4 of a radius to each quarter.
	if f := between(e, 3, 4); math.Abs(f-(0.5-1/math.Pi)) > 3e-4 {
		t.Errorf("neighbours see %.6f of each other, want %.6f", f, 0.5-1/math.Pi)
	}
	if f := between(e, 3, 6); math.Abs(f) > 1e-9 {
		t.Errorf("a hidden disc is seen: %g", f)
	}
}

// A look about that is to stop gives nothing; on one goroutine or several it gives the same.
func TestStopAndThreads(t *testing.T) {
	discs := scatter(rand.New(rand.NewPCG(9, 9)), 10, false)
	if e := gas.NewEnclosure(discs, ring(10, 48), 2, 2, func() bool { return true }); e != nil {
		t.Error("it did not stop")
	}
	one, four := gas.NewEnclosure(discs, ring(10, 48), 2, 1, nil), gas.NewEnclosure(discs, ring(10, 48), 2, 4, nil)
	for a := range one.Len() {
		for b := range one.Len() {
			if one.Factor(a, b) != four.Factor(a, b) {
				t.Fatalf("F of %d to %d depends on the number of goroutines", a, b)
			}
		}
	}
}
