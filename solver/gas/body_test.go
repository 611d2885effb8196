package gas_test

import (
	"math"
	"math/cmplx"
	"math/rand/v2"
	"testing"

	"packrise/solver/gas"
)

// rim draws arcs of radius r about the corners of a convex polygon, counterclockwise, joined by straight lines; n patches to a line and
// to an arc, none for an arc of no radius. The corners are about the origin.
func rim(corners []complex128, r float64, n int) []gas.Segment {
	var out []gas.Segment
	m := len(corners)
	normal := func(i int) complex128 {
		d := corners[(i+1)%m] - corners[i%m]
		return d / complex(abs(d), 0) * -1i
	}
	for i, c := range corners {
		in, to := normal(i+m-1), normal(i)
		turn := cmplx.Phase(to/in) / float64(n)
		for k := range n {
			a, b := cmplx.Rect(r, float64(k)*turn)*in, cmplx.Rect(r, float64(k+1)*turn)*in
			if r > 0 {
				out = append(out, gas.Segment{A: c + a, B: c + b, Centre: c, R: r})
			}
		}
		a, b := c+complex(r, 0)*to, corners[(i+1)%m]+complex(r, 0)*to
		for k := range n {
			f, g := complex(float64(k)/float64(n), 0), complex(float64(k+1)/float64(n), 0)
			out = append(out, gas.Segment{A: a + f*(b-a), B: a + g*(b-a)})
		}
	}
	for i := range out {
		out[(i+1)%len(out)].A = out[i].B
	}
	return out
}

// bar is a w × h surface with corners of radius r, turned.
func bar(w, h, r, turn float64, n int) gas.Disc {
	x, y, u := w/2-r, h/2-r, cmplx.Rect(1, turn)
	c := []complex128{complex(x, -y) * u, complex(x, y) * u, complex(-x, y) * u, complex(-x, -y) * u}
	return gas.Disc{R: math.Hypot(x, y) + r, Rim: rim(c, r, n)}
}

func put(d gas.Disc, c complex128) gas.Disc { d.C = c; return d }

// Two bars face to face at gap g see of each other √(1+(g/h)²) − g/h of a face of h (Howell, C-1); square corners hide nothing else. What one
// sees in all is the wall's by the rule of sums.
func TestTwoBars(t *testing.T) {
	const w, h, n = 2.0, 5.0, 12
	for _, g := range []float64{0.02, 0.5, 3} {
		for _, turn := range []float64{0, 0.3} {
			u := cmplx.Rect(1, turn)
			a, b := put(bar(w, h, 0, turn, n), complex(-(w+g)/2, 0)*u), put(bar(w, h, 0, turn, n), complex((w+g)/2, 0)*u)
			e := gas.NewEnclosure([]gas.Disc{a, b}, ring(12, 72), 3, 2, nil)
			want, tol := (math.Hypot(g, h)-g)/(2*(w+h)), 2e-5
			if g < h/n/2 {
				tol = 2e-4 // patches are longer than the gap is wide
			}
			if f := between(e, 0, 1); math.Abs(f-want) > tol {
				t.Errorf("gap %g turned by %g: %.7f, want %.7f", g, turn, f, want)
			}
			if f := between(e, 0, 0); f != 0 && math.Abs(f) > 2e-5 {
				t.Errorf("gap %g: a convex surface sees itself: %g", g, f)
			}
			if f := between(e, 0, 2); math.Abs(f-1+want) > 2*tol {
				t.Errorf("gap %g: %.7f to the wall, want %.7f", g, f, 1-want)
			}
		}
	}
}

// crossed is A F between two convex surfaces, given as points of their outlines, counterclockwise: half of what the string that crosses between them is
// longer than the one about both (H. C. Hottel, in W. H. McAdams, Heat Transmission, 3rd ed. 1954, chapter 4).
func crossed(a, b []complex128) float64 {
	left := func(p []complex128, from, to complex128) (some, all bool) { // of the line
		all = true
		for _, z := range p {
			if z != from && z != to {
				on := imag((z-from)*cmplx.Conj(to-from)) > 0
				some, all = some || on, all && on
			}
		}
		return some, all
	}
	// The four lines that touch both, by what lies to their left.
	var at [2][2][2]int
	for i, z := range a {
		for j, w := range b {
			sa, aa := left(a, z, w)
			sb, ab := left(b, z, w)
			if sa == aa && sb == ab {
				at[index(sa)][index(sb)] = [2]int{i, j}
			}
		}
	}
	length := func(l [2]int) float64 { return abs(a[l[0]] - b[l[1]]) }
	run := func(p []complex128, from, to int) float64 {
		s := 0.0
		for k := from; k != to; k = (k + 1) % len(p) {
			s += abs(p[(k+1)%len(p)] - p[k])
		}
		return s
	}
	up, down := at[0][1], at[1][0]     // a right of the line and b left of it, and the other way round
	above, below := at[0][0], at[1][1] // both right, both left
	eight := length(up) + length(down) + run(a, up[0], down[0]) + run(b, up[1], down[1])
	about := length(above) + length(below) + run(a, above[0], below[0]) + run(b, below[1], above[1])
	return (eight - about) / 2
}

func index(b bool) int {
	if b {
		return 1
	}
	return 0
}

// points along a surface.
func points(d gas.Disc, per int) []complex128 {
	var out []complex128
	for _, s := range d.Rim {
		n := 1
		if s.R > 0 {
			n = per
		}
		for k := range n {
			z := s.A + complex(float64(k)/float64(n), 0)*(s.B-s.A)
			if s.R > 0 {
				z = s.Centre + (s.A-s.Centre)*cmplx.Rect(1, float64(k)/float64(n)*cmplx.Phase((s.B-s.Centre)/(s.A-s.Centre)))
			}
			out = append(out, d.C+z)
		}
	}
	return out
}

// Bars, flats and sectors in any position see of each other what crossed strings say.
func TestCrossedStrings(t *testing.T) {
	r := rand.New(rand.NewPCG(2, 11))
	for k := range 6 {
		a := bar(1+3*r.Float64(), 1+r.Float64(), 0.1+0.3*r.Float64(), 6*r.Float64(), 4)
		b := bar(1+4*r.Float64(), 1, 0.5, 6*r.Float64(), 4)
		if k%2 == 1 { // a sector is a triangle with one bent side
			s := cmplx.Rect(1, 6*r.Float64())
			b = gas.Disc{R: 3, Rim: rim([]complex128{-0.6 * s, complex(1.4, -1.2) * s, complex(1.9, 0) * s, complex(1.4, 1.2) * s}, 0.2, 4)}
		}
		b.C = cmplx.Rect(a.R+b.R+0.05+2*r.Float64(), 6*r.Float64())
		e := gas.NewEnclosure([]gas.Disc{a, b}, ring(20, 72), 4, 2, nil)
		area := 0.0
		for p, to := e.Patches(0); p < to; p++ {
			area += e.Area(p)
		}
		want := crossed(points(a, 8), points(b, 8)) / area
		if f := between(e, 0, 1); math.Abs(f-want) > 5e-5 {
			t.Errorf("pair %d: %.6f, want %.6f", k, f, want)
		}
	}
}

// crowd drops bars, sectors and discs into a flat wall, some touching.
func crowd(r *rand.Rand) ([]gas.Disc, gas.Outline) {
	wall := bar(20, 12, 5.9, 0, 10)
	var out []gas.Disc
	for range 60 {
		d := gas.Disc{R: 0.5 + r.Float64(), Cuts: around(16)}
		switch r.IntN(3) {
		case 0:
			d = bar(1+2*r.Float64(), 0.5+r.Float64(), 0.1, 6*r.Float64(), 4)
		case 1:
			s := cmplx.Rect(0.6, 6*r.Float64())
			d = gas.Disc{R: 1.7, Rim: rim([]complex128{-0.6 * s, complex(1.4, -1.2) * s, complex(1.9, 0) * s, complex(1.4, 1.2) * s}, 0.2, 3)}
		}
		d.C = complex(20*r.Float64()-10, 12*r.Float64()-6)
		core := math.Max(-4, math.Min(4, real(d.C)))
		clear := abs(d.C-complex(core, 0)) < 5.9-d.R
		for _, o := range out {
			clear = clear && abs(d.C-o.C) > d.R+o.R
		}
		if clear {
			out = append(out, d)
		}
	}
	return out, gas.Outline{Segments: wall.Rim}
}

// Reciprocity and closure hold to rounding, and what each patch finds by itself is all round it.
func TestCrowd(t *testing.T) {
	for seed := range 5 {
		r := rand.New(rand.NewPCG(uint64(seed), 4))
		discs, out := crowd(r)
		e := gas.NewEnclosure(discs, out, 3, 2, nil)
		for i := range e.Len() {
			sum := 0.0
			for j := range e.Len() {
				f := e.Factor(i, j)
				sum += f
				if d := f*e.Area(i) - e.Factor(j, i)*e.Area(j); math.Abs(d) > 1e-12 {
					t.Fatalf("A F of %d and %d differ by %g", i, j, d)
				}
				if f < -0.02 || f > 1 {
					t.Errorf("F of %d to %d is %g", i, j, f)
				}
			}
			if math.Abs(sum-1) > 1e-12 {
				t.Errorf("row %d adds up to %.15f", i, sum)
			}
			if seen := e.Seen(i); math.Abs(seen-1) > 1e-9 {
				t.Errorf("seed %d: patch %d sees %.12f of all round it", seed, i, seen)
			}
		}
	}
}

// Rays from many points of every patch find the same.
func TestCrowdRays(t *testing.T) {
	if testing.Short() {
		t.Skip("plain rays take long")
	}
	r := rand.New(rand.NewPCG(8, 4))
	discs, out := crowd(r)
	e := gas.NewEnclosure(discs, out, 4, 2, nil)
	const origins, rays = 12, 180
	for i := range discs {
		whole, area := make([]float64, len(discs)+1), 0.0
		a, b := e.Patches(i)
		for k := a; k < b; k++ {
			area += e.Area(k)
			for o := range origins {
				z, n := along(&discs[i], k-a, (float64(o)+0.5)/origins)
				for m := range rays {
					sin := -1 + 2*(float64(m)+0.5)/rays
					whole[met(discs, z, n*complex(math.Sqrt(1-sin*sin), sin), i)] += e.Area(k) / (origins * rays)
				}
			}
		}
		for j, f := range whole {
			if d := f/area - between(e, i, j); math.Abs(d) > 1.5e-3 {
				t.Errorf("the factor from %d to %d is off by %.4f", i, j, d)
			}
		}
	}
}

// along returns a point of a patch and the normal there.
func along(d *gas.Disc, patch int, u float64) (z, n complex128) {
	if d.Rim == nil {
		n = cmplx.Rect(1, d.Cuts[patch]+u*(d.Cuts[patch+1]-d.Cuts[patch]))
		return d.C + complex(d.R, 0)*n, n
	}
	s := d.Rim[patch]
	if s.R > 0 {
		v := s.A - s.Centre
		v *= cmplx.Rect(1, u*cmplx.Phase((s.B-s.Centre)/v))
		return d.C + s.Centre + v, v / complex(s.R, 0)
	}
	return d.C + s.A + complex(u, 0)*(s.B-s.A), (s.B - s.A) / complex(abs(s.B-s.A), 0) * -1i
}

// met is the surface that a ray meets first, len(discs) the outline: rims as polygons of many sides.
func met(discs []gas.Disc, z, dir complex128, self int) int {
	best, on := math.Inf(1), len(discs)
	for j := range discs {
		d := &discs[j]
		v := (d.C - z) * cmplx.Conj(dir)
		if j == self || math.Abs(imag(v)) > d.R || real(v) < -d.R {
			continue
		}
		if d.Rim == nil {
			if r := real(v) - math.Sqrt(d.R*d.R-imag(v)*imag(v)); r > 0 && r < best {
				best, on = r, j
			}
			continue
		}
		p := points(*d, 4)
		for k := range p {
			a, b := (p[k]-z)*cmplx.Conj(dir), (p[(k+1)%len(p)]-z)*cmplx.Conj(dir)
			if imag(a) >= 0 && imag(b) < 0 {
				if r := real(a) + imag(a)/(imag(a)-imag(b))*(real(b)-real(a)); r > 0 && r < best {
					best, on = r, j
				}
			}
		}
	}
	return on
}
