package outline

import (
	"math"

	"gonum.org/v1/gonum/floats"
)

// Respond solves for 'heats' of the contours (W/m, read for metals); ground adds the drive of held bores and of the surroundings.
func (s *Shaped) Respond(heats []float64, ground bool) []float64 {
	y := make([]float64, s.n+1)
	for i := range s.bends {
		b := &s.bends[i]
		c := &s.contours[b.contour]
		r := s.condition(b)
		for l := range modes {
			if c.metal() {
				y[b.dof+l] = heats[b.contour] / (c.Out * c.Loop.Perimeter())
			}
			if ground {
				y[b.dof+l] += r.temp * r.outside
			}
		}
	}
	for i, p := range s.pivots {
		y[i], y[p] = y[p], y[i]
	}
	n := len(y)
	for i := range y {
		y[i] -= floats.Dot(s.m.Data[i*n:][:i], y[:i])
	}
	for i := n - 1; i >= 0; i-- {
		row := s.m.Data[i*n:][:n]
		y[i] = (y[i] - floats.Dot(row[i+1:], y[i+1:])) / row[i]
	}
	return y
}

// Metal is the temperature of a metal.
func (s *Shaped) Metal(y []float64, contour int) float64 {
	return floats.Dot(s.centre[contour], y[:s.n]) + y[s.n]
}

// Leaves is the heat that leaves a metal or a held bore, W/m.
func (s *Shaped) Leaves(y []float64, contour int) float64 {
	sum := 0.0
	for i := range s.bends {
		if b := &s.bends[i]; b.contour == contour {
			sum += 2 * b.half * y[b.dof]
		}
	}
	return sum * s.contours[contour].Out
}

// Faces returns the hottest temperature of each contour, the mean of the outside, and the heat through each stroke of the outside (W/m, out positive).
func (s *Shaped) Faces(y []float64) (hottest []float64, mean float64, out []float64) {
	hottest = make([]float64, len(s.contours))
	for i := range hottest {
		hottest[i] = math.Inf(-1)
	}
	for i := range s.bends {
		b := &s.bends[i]
		for l := range modes + 1 {
			t := floats.Dot(s.temps[(b.firstCell+l)*s.n:][:s.n], y[:s.n]) + y[s.n]
			hottest[b.contour] = math.Max(hottest[b.contour], t)
		}
	}
	mean = floats.Dot(s.mean[len(s.mean)-1], y[:s.n]) + y[s.n]
	for _, o := range s.out {
		out = append(out, floats.Dot(o, y[:s.n]))
	}
	return hottest, mean, out
}
