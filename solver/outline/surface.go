package outline

import "math"

// surface holds the whole-side functionals of the densities: heat through each side and mean temperature of the outer face.
type surface struct {
	out  [4][]float64
	mean []float64
}

func (s *System) measure() {
	last := len(s.edges) - 4
	k := s.rect.conductivities()
	in := k[len(k)-1]
	s.surface.mean = make([]float64, s.n)
	var perimeter float64
	for i := last; i < len(s.edges); i++ {
		perimeter += s.edges[i].length
	}
	var lo, hi potential
	for side := range 4 {
		e := &s.edges[last+side]
		out := make([]float64, s.n)
		for j := range s.panels {
			p := &s.panels[j]
			turn := scale(1/p.half, conj(p.dir))
			w0, w1 := (e.start-p.mid)*turn, (e.at(e.length)-p.mid)*turn
			if p.edge == last+side {
				w0, w1 = complex(real(w0), 0), complex(real(w1), 0)
			}
			flip := real(w0+w1) < 0
			lo.at(w0, p.p, flip, true)
			hi.at(w1, p.p, flip, true)
			unit := -p.half / (2 * math.Pi)
			step := scale(e.length/perimeter, inverse(w1-w0))
			for k := range p.p {
				s.surface.mean[p.dof+k] += unit * real((hi.second[k]-lo.second[k])*step)
				if p.edge != last+side {
					out[p.dof+k] = -in * unit * (imag(hi.first[k]) - imag(lo.first[k]))
				}
			}
			s.surface.mean[p.dof] += unit * 2 * math.Log(p.half) * e.length / perimeter
			if p.edge == last+side {
				out[p.dof] = -in * p.half
			}
		}
		s.surface.out[side] = out
	}
}

// Faces returns, for the whole solution, the hottest temperature at the inner face of each layer and then outside, the mean temperature of the
// outer surface, and the heat through each side's outer face (W/m, out positive).
func (s *System) Faces(y []float64, src Sources) (hottest []float64, mean float64, out [4]float64) {
	hottest = make([]float64, len(s.rect.Layers)+1)
	for i := range hottest {
		hottest[i] = math.Inf(-1)
	}
	for i := range s.panels {
		p := &s.panels[i]
		f := s.edges[p.edge].face
		for l, x := range cellsOf[p.p].at {
			t := y[s.n] + s.sourcesAt(src, p.mid+scale(p.half*x, p.dir))
			for k, v := range s.temps[(p.pt+l)*s.n:][:s.n] {
				t += v * y[k]
			}
			hottest[f] = math.Max(hottest[f], t)
		}
	}
	last := len(s.edges) - 4
	k := s.rect.conductivities()
	in := k[len(k)-1]
	unit := -1 / (2 * math.Pi * s.rect.MediumK)
	mean = y[s.n]
	var perimeter float64
	for i := last; i < len(s.edges); i++ {
		perimeter += s.edges[i].length
	}
	for side := range 4 {
		e := &s.edges[last+side]
		for i, v := range s.surface.out[side] {
			out[side] += v * y[i]
		}
		turn := 1i * conj(e.dir)
		for j := range s.discs {
			d := &s.discs[j]
			z0, z1 := e.start-d.C, e.at(e.length)-d.C
			ln0, ln1 := clog(z0*turn), clog(z1*turn)
			flux := src.Q[j] * unit * imag(ln1-ln0)
			sum := scale(src.Q[j]*unit, z1*ln1-z0*ln0-(z1-z0))
			x0, x1 := scale(d.A, inverse(z0)), scale(d.A, inverse(z1))
			lower := scale(d.A, ln1-ln0)
			u, v := x0, x1
			for m, c := range src.D[j] {
				flux += imag(c * (v - u))
				sum += c * lower
				lower = scale(d.A/float64(m+1), u-v)
				u, v = u*x0, v*x1
			}
			out[side] -= in * flux
			mean += real(sum*conj(e.dir)) / perimeter
		}
	}
	for i, v := range s.surface.mean {
		mean += v * y[i]
	}
	return hottest, mean, out
}

// sourcesAt is the temperature that the parts' multipoles alone make at z.
func (s *System) sourcesAt(src Sources, z complex128) float64 {
	unit := -1 / (2 * math.Pi * s.rect.MediumK)
	t := 0.0
	for j := range s.discs {
		d := &s.discs[j]
		rel := z - d.C
		t += src.Q[j] * unit * 0.5 * math.Log(real(rel)*real(rel)+imag(rel)*imag(rel))
		x := scale(d.A, inverse(rel))
		var sum complex128
		dm := src.D[j]
		for m := len(dm) - 1; m >= 0; m-- {
			sum = (sum + dm[m]) * x
		}
		t += real(sum)
	}
	return t
}
