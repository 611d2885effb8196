package outline

import (
	"math"
	"slices"
)

// HullCell is a short piece of the hull over which the conditions hold in the mean. Cell i belongs to row i of the system.
type HullCell struct {
	From, To complex128 // counterclockwise
	Length   float64
	Disc     int // of an arc, −1 of a string
	Piece    int // arcs and strings counted round the hull
}

// Cells lists the cells of the hull, counterclockwise.
func (s *HullSystem) Cells() []HullCell {
	out := make([]HullCell, 0, s.n)
	for i := range s.panels {
		b := &s.panels[i]
		at := cellsOf[b.p].at
		for l := range b.p {
			out = append(out, HullCell{From: b.at(at[l]), To: b.at(at[l+1]), Length: b.cell(l), Disc: b.disc, Piece: b.piece})
		}
	}
	return out
}

// cell is the length of cell l.
func (b *bow) cell(l int) float64 {
	at := cellsOf[b.p].at
	return b.half * (at[l+1] - at[l])
}

// Temperatures returns the mean of each cell, for the whole solution.
func (s *HullSystem) Temperatures(y []float64, src Sources) []float64 {
	t := make([]float64, s.n)
	for i := range t {
		t[i] = y[s.n] + dot(s.temp[i*s.n:][:s.n], y)
	}
	cold, tmp := make([]float64, s.n), make([]float64, s.n)
	for j := range s.discs {
		d := &s.discs[j]
		d.out(cold, d.warm, pack(make([]float64, 0, 1+2*usualOrder), src.Q[j], src.D[j]), tmp)
	}
	for i, v := range cold {
		t[i] -= v
	}
	return t
}

// Faces returns, for the temperatures of the cells, the hottest cell of the strings (−Inf without any), the mean of the outside, and the heat that
// it gives off (W/m).
func (s *HullSystem) Faces(t []float64) (hottest, mean, out float64) {
	hottest = math.Inf(-1)
	length := 0.0
	for i := range s.panels {
		b := &s.panels[i]
		p := &s.pieces[b.piece]
		film := s.film(p) * s.hull.MediumK / 2
		for l := range b.p {
			v, ds := t[b.dof+l], b.cell(l)
			length += ds
			mean += v * ds
			out += (film*(v-p.out.Temp) - p.out.Absorbed) * ds
		}
		if b.disc < 0 {
			hottest = math.Max(hottest, slices.Max(t[b.dof:][:b.p]))
		}
	}
	return hottest, mean / length, out
}
