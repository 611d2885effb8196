package outline

import (
	"math"
	"math/cmplx"
)

// Toward is the length along the loop at which a ray from its centroid in direction angle (rad) meets it.
func (l Loop) Toward(angle float64) float64 {
	_, c := l.Area()
	ray := cmplx.Rect(1, -angle)
	along, best, far := 0.0, 0.0, math.Inf(-1)
	for i := range l {
		s := &l[i]
		if u, x := s.cross(c, ray); x > far {
			best, far = along+u*s.Length(), x
		}
		along += s.Length()
	}
	return best
}

// cross is the share of the stroke's length at which it passes the ray from c upwards, and how far out; −Inf if it does not. turn takes the ray to the real
// axis.
func (s *Stroke) cross(c, turn complex128) (u, far float64) {
	a, b := (s.From-c)*turn, (s.To-c)*turn
	if imag(a) > 0 || imag(b) < 0 {
		return 0, math.Inf(-1)
	}
	if s.R == 0 {
		if imag(b) > imag(a) {
			u = -imag(a) / (imag(b) - imag(a))
		}
		return u, real(a) + u*real(b-a)
	}
	m := (s.Centre - c) * turn
	x := real(m) + math.Sqrt(math.Max(s.R*s.R-imag(m)*imag(m), 0))
	t := cmplx.Phase((complex(x, 0) - m) / (a - m))
	if t < -1e-9 {
		t += 2 * math.Pi
	}
	return math.Min(math.Max(t/s.span(), 0), 1), x
}

// Rest cuts the loop where share of its length begins and ends whose middle is Toward(angle), and tells which strokes lie in it.
func (l Loop) Rest(angle, share float64) (cut Loop, in []bool) {
	whole := l.Perimeter()
	from := l.Toward(angle) - share*whole/2
	ends := [2]float64{math.Mod(from+whole, whole), math.Mod(from+whole*(1+share), whole)}
	along := 0.0
	for i := range l {
		s := l[i]
		size := s.Length()
		at := []float64{0, 1}
		for _, e := range ends {
			if u := (e - along) / size; u > 1e-6 && u < 1-1e-6 {
				at = append(at, u)
			}
		}
		if len(at) == 4 && at[2] > at[3] {
			at[2], at[3] = at[3], at[2]
		}
		at = append(append(at[:1:1], at[2:]...), 1)
		for k := 1; k < len(at); k++ {
			cut = append(cut, Stroke{From: s.At(at[k-1]), To: s.At(at[k]), Centre: s.Centre, R: s.R})
			mid := math.Mod(along+(at[k-1]+at[k])/2*size-from+2*whole, whole)
			in = append(in, mid < share*whole)
		}
		along += size
	}
	return cut.seamless(), in
}
