package outline

import (
	"math"
)

// outer holds what the densities make of whole sides of the outer face.
type outer struct {
	side [4]panel     // a whole side as one cell
	out  [4][]float64 // heat through it
	mean []float64    // mean temperature of the outer face
}

// outerEdges returns the four edges of the outer face.
func (s *System) outerEdges() []edge { return s.edges[len(s.edges)-4:] }

func (s *System) perimeter() (sum float64) {
	for _, e := range s.outerEdges() {
		sum += e.length
	}
	return sum
}

// newOuter measures with the closed forms of one cell over the whole side.
func (s *System) newOuter() outer {
	o := outer{mean: make([]float64, s.n)}
	in := s.k[len(s.k)-1]
	var b block
	for i := range o.side {
		at := len(s.edges) - 4 + i
		e := &s.edges[at]
		side := newPanel(e, at, 0, e.length, 1)
		o.side[i], o.out[i] = side, make([]float64, s.n)
		for j := range s.panels {
			p := &s.panels[j]
			b.look(p, &side, true)
			out := o.out[i][p.dof:][:p.p]
			b.flux(-in*e.length, p, &side, 0, out)
			if p.edge == at {
				out[0] = -in * p.half // half of the jump
			}
			b.temp(e.length/s.perimeter(), p, 0, o.mean[p.dof:][:p.p])
		}
	}
	return o
}

// Faces returns, for the whole solution, the hottest temperature at the inner face of each layer and then outside, the mean temperature of the
// outer surface, and the heat through each side's outer face (W/m, out positive).
func (s *System) Faces(y []float64, src Sources) (hottest []float64, mean float64, out [4]float64) {
	hottest = s.hottest(y, src)
	in := s.k[len(s.k)-1]
	perimeter := s.perimeter()
	mean = y[s.n]
	for i, v := range s.outer.mean {
		mean += v * y[i]
	}
	for i := range out {
		side := &s.outer.side[i]
		length := 2 * side.half
		for j, v := range s.outer.out[i] {
			out[i] += v * y[j]
		}
		for j := range s.discs {
			d, m := &s.discs[j].Disc, len(src.D[j])
			v, c := pack(nil, src.Q[j], src.D[j]), make([]float64, 1+2*m)
			d.excite(side, row{flux: in * length}, s.rect.MediumK, m, c)
			out[i] += dot(c, v)
			d.excite(side, row{temp: length / perimeter}, s.rect.MediumK, m, c)
			mean -= dot(c, v)
		}
	}
	return hottest, mean, out
}

// hottest looks at all ends of cells.
func (s *System) hottest(y []float64, src Sources) []float64 {
	hottest := make([]float64, len(s.k))
	for i := range hottest {
		hottest[i] = math.Inf(-1)
	}
	for i := range s.panels {
		p := &s.panels[i]
		h := &hottest[s.edges[p.edge].face]
		for l, x := range cellsOf[p.p].at {
			own := dot(s.temps[(p.firstCell+l)*s.n:][:s.n], y[:s.n])
			*h = math.Max(*h, y[s.n]+own+s.sourcesAt(src, p.at(x)))
		}
	}
	return hottest
}

// sourcesAt is the temperature that the parts' multipoles alone make at z.
func (s *System) sourcesAt(src Sources, z complex128) float64 {
	unit := -1 / (4 * math.Pi * s.rect.MediumK)
	t := 0.0
	for j := range s.discs {
		d := &s.discs[j]
		rel := z - d.C
		t += src.Q[j] * unit * math.Log(real(rel)*real(rel)+imag(rel)*imag(rel))
		x := scale(d.A, inverse(rel))
		var sum complex128
		for m := len(src.D[j]) - 1; m >= 0; m-- {
			sum = (sum + src.D[j][m]) * x
		}
		t += real(sum)
	}
	return t
}
