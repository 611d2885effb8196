package outline

import (
	"math"
	"math/cmplx"
)

// support is how far the loop reaches in the direction of angle φ, with cos φ + i sin φ = n.
func (l Loop) support(n complex128) float64 {
	far := math.Inf(-1)
	for i := range l {
		s := &l[i]
		far = math.Max(far, real(s.From)*real(n)+imag(s.From)*imag(n))
		if s.R > 0 && onRight(s.From, s.To, s.Centre+scale(s.R, n)) {
			far = math.Max(far, real(s.Centre)*real(n)+imag(s.Centre)*imag(n)+s.R)
		}
	}
	return far
}

// Reach is the radius of the smallest circle about the origin that holds the loop.
func (l Loop) Reach() float64 {
	far := 0.0
	for i := range l {
		s := &l[i]
		far = math.Max(far, cmplx.Abs(s.From))
		if c := cmplx.Abs(s.Centre); s.R > 0 && (c == 0 || onRight(s.From, s.To, s.Centre+scale(s.R/c, s.Centre))) {
			far = math.Max(far, c+s.R)
		}
	}
	return far
}

// Corner is a rounded piece of a convex outline, or a sharp corner (R = 0): what a taut string can bend round.
type Corner struct {
	C complex128
	R float64
}

// Corners are those of the loop, counterclockwise; one of a circle.
func (l Loop) Corners() (all []Corner) {
	for i := range l {
		s, next := &l[i], &l[(i+1)%len(l)]
		k := Corner{s.Centre, s.R}
		switch {
		case s.R > 0 && (len(all) == 0 || all[len(all)-1] != k && (i < len(l)-1 || all[0] != k)):
			all = append(all, k)
		case s.R == 0 && next.R == 0:
			all = append(all, Corner{s.To, 0})
		}
	}
	return all
}

// Gap is the distance between two loops; negative: by how much one has to be moved for them to touch.
func (l Loop) Gap(m Loop) float64 {
	return -least(func(phi float64) float64 {
		n := cmplx.Rect(1, phi)
		return l.support(n) + m.support(-n)
	})
}

// Room is the distance from the loop to another one around it; negative: by how much it reaches beyond.
func (l Loop) Room(around Loop) float64 {
	return least(func(phi float64) float64 {
		n := cmplx.Rect(1, phi)
		return around.support(n) - l.support(n)
	})
}

// directions are looked at before the best of them are improved.
const directions = 180

// least finds the smallest value of f over a turn, by golden sections from the lowest samples.
func least(f func(phi float64) float64) float64 {
	const step = 2 * math.Pi / directions
	var v [directions]float64
	best := math.Inf(1)
	for i := range v {
		v[i] = f(float64(i) * step)
		best = math.Min(best, v[i])
	}
	low := best
	for i := range v {
		a, b := v[(i+directions-1)%directions], v[(i+1)%directions]
		// A function of this kind can fall below a sample by no more than its neighbours rise above it.
		if v[i] > a || v[i] > b || v[i]-math.Max(a-v[i], b-v[i]) > low {
			continue
		}
		best = math.Min(best, golden(f, (float64(i)-1)*step, (float64(i)+1)*step))
	}
	return best
}

// golden narrows a minimum between a and b (golden section search, Kiefer 1953).
func golden(f func(x float64) float64, a, b float64) float64 {
	ratio := (math.Sqrt(5) - 1) / 2
	x, y := b-ratio*(b-a), a+ratio*(b-a)
	fx, fy := f(x), f(y)
	for range 60 {
		if fx < fy {
			b, y, fy = y, x, fx
			x = b - ratio*(b-a)
			fx = f(x)
		} else {
			a, x, fx = x, y, fy
			y = a + ratio*(b-a)
			fy = f(y)
		}
	}
	return math.Min(fx, fy)
}
