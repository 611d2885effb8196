package harmonic

import "math"

// EndKind tells what a Stack ends in.
type EndKind int

// Ends of a stack.
const (
	Medium EndKind = iota // a medium of conductivity V (W/mK)
	Held                  // one temperature: metal, or a face kept at a temperature
	Film                  // outer end only: a film of coefficient V (W/m²K) to a uniform outside; +Inf is Held
)

// End is the inner or outer end of a Stack.
type End struct {
	Kind EndKind
	V    float64
}

// Ring is a concentric layer of conductivity K (W/mK) between radii R0 < R1.
type Ring struct{ K, R0, R1 float64 }

// Stack is a set of concentric rings between two ends, for harmonics n ≥ 1. Without rings the ends meet at radius R, else R is Rings[0].R0.
type Stack struct {
	Inner, Outer End
	R            float64
	Rings        []Ring
}

// Port is the two-port of a stack for one harmonic: with b the regular wave that comes in from outside, referred to the outer radius, and
// A the decaying wave that comes from inside, referred to the inner radius,
//
//	conj(d) = T b + Tau conj(A)    leaves outwards, referred to the outer radius,
//	B       = Rho conj(A) + TauIn b    leaves inwards, referred to the inner radius.
//
// Every number is bounded whatever n is: waves are referred to the radius at which they enter. Tau·k_outer = TauIn·k_inner.
type Port struct{ T, Tau, TauIn, Rho float64 }

// joint is the face between kIn inside and kOut outside: temperature and flux are continuous.
func joint(kIn, kOut float64) Port {
	s := kIn + kOut
	return Port{T: (kOut - kIn) / s, Tau: 2 * kIn / s, TauIn: 2 * kOut / s, Rho: (kIn - kOut) / s}
}

// around puts o outside p.
func (p Port) around(o Port) Port {
	f := 1 / (1 - p.T*o.Rho)
	return Port{
		T:     o.T + o.Tau*p.T*o.TauIn*f,
		Tau:   o.Tau * p.Tau * f,
		TauIn: p.TauIn * o.TauIn * f,
		Rho:   p.Rho + p.TauIn*o.Rho*p.Tau*f,
	}
}

// across refers the outer waves of p to a radius further out, w = (r/r')^n.
func (p Port) across(w float64) Port {
	return Port{T: p.T * w * w, Tau: p.Tau * w, TauIn: p.TauIn * w, Rho: p.Rho}
}

// start is the inner end as a port into the first material, of conductivity k.
func (s *Stack) start(k float64) Port {
	if s.Inner.Kind == Held {
		return Port{T: -1}
	}
	return joint(s.Inner.V, k)
}

// finish is the outer end as a port seen from the last material, of conductivity k, at radius r.
func (s *Stack) finish(n int, k, r float64) Port {
	switch {
	case s.Outer.Kind == Medium:
		return joint(k, s.Outer.V)
	case s.Outer.Kind == Held, math.IsInf(s.Outer.V, 1):
		return Port{Rho: -1}
	}
	g := k * float64(n) / r
	return Port{Rho: (g - s.Outer.V) / (g + s.Outer.V), TauIn: 1} // what a source in the film sends in comes in whole
}

// Port returns the two-port for harmonic n.
func (s *Stack) Port(n int) Port {
	if len(s.Rings) == 0 {
		if s.Inner.Kind == Held {
			return Port{T: -1}
		}
		return s.finish(n, s.Inner.V, s.R)
	}
	p := s.start(s.Rings[0].K)
	for i, g := range s.Rings {
		if i > 0 {
			p = p.around(joint(s.Rings[i-1].K, g.K))
		}
		p = p.across(math.Pow(g.R0/g.R1, float64(n)))
	}
	last := s.Rings[len(s.Rings)-1]
	return p.around(s.finish(n, last.K, last.R1))
}

// Waves gives the field inside the rings for one harmonic.
type Waves struct {
	T, Tau   float64 // looking inwards from the ring's inner face: g = T f w + Tau conj(A)
	Rho, Tin float64 // looking outwards from its outer face: f = Rho g w + Tin b
	W        float64 // (R0/R1)^n
}

// Split returns, for the outer drive b and the inner drive conj(A), the regular wave f referred to the ring's outer radius and the decaying
// wave g referred to its inner radius: T = Re[(f (r/R1)^n + g (R0/r)^n) e^{inθ}].
func (w Waves) Split(b, a complex128) (f, g complex128) {
	q := 1 / (1 - w.T*w.Rho*w.W*w.W)
	g = scale(q*w.T*w.W*w.Tin, b) + scale(q*w.Tau, a)
	return scale(w.Rho*w.W, g) + scale(w.Tin, b), g
}

// Waves appends one entry per ring for harmonic n.
func (s *Stack) Waves(n int, dst []Waves) []Waves {
	if len(s.Rings) == 0 {
		return dst
	}
	first := len(dst)
	p := s.start(s.Rings[0].K)
	for i, g := range s.Rings {
		if i > 0 {
			p = p.around(joint(s.Rings[i-1].K, g.K))
		}
		w := math.Pow(g.R0/g.R1, float64(n))
		dst = append(dst, Waves{T: p.T, Tau: p.Tau, W: w})
		p = p.across(w)
	}
	last := s.Rings[len(s.Rings)-1]
	o := s.finish(n, last.K, last.R1)
	for i := len(s.Rings) - 1; i >= 0; i-- {
		x := &dst[first+i]
		x.Rho, x.Tin = o.Rho, o.TauIn
		if i > 0 {
			o = inwards(o, x.W)
			o = joint(s.Rings[i-1].K, s.Rings[i].K).around(o)
		}
	}
	return dst
}

// inwards refers the inner waves of p to a radius further in, w = (r'/r)^n.
func inwards(p Port, w float64) Port {
	return Port{T: p.T, Tau: p.Tau * w, TauIn: p.TauIn * w, Rho: p.Rho * w * w}
}

// Series returns the rings' resistance to a uniform radial flow in K·m/W: Σ ln(R1/R0)/(2πK).
func (s *Stack) Series() float64 {
	r := 0.0
	for _, g := range s.Rings {
		r += math.Log(g.R1/g.R0) / (2 * math.Pi * g.K)
	}
	return r
}

// Outside returns the outer radius.
func (s *Stack) Outside() float64 {
	if len(s.Rings) == 0 {
		return s.R
	}
	return s.Rings[len(s.Rings)-1].R1
}

func scale(f float64, z complex128) complex128 { return complex(f*real(z), f*imag(z)) }
