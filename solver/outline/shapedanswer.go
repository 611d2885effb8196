package outline

import "math"

// Respond solves for 'heats' of the contours (W/m, read for metals); ground adds the drive of held bores and of the surroundings.
func (s *Shaped) Respond(heats []float64, ground bool) []float64 {
	y := s.load(heats, ground)
	s.solve(y)
	return y
}

// load is the right-hand side of Respond.
func (s *Shaped) load(heats []float64, ground bool) []float64 {
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
	return y
}

// Metal is the temperature of a metal.
func (s *Shaped) Metal(y []float64, contour int) float64 {
	return dot(s.centre[contour], y) + y[s.n]
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
	c := s.outside()
	out = make([]float64, len(c.Loop))
	perimeter := c.Loop.Perimeter()
	at := cellsOf[modes].at
	for i := range s.bends {
		b := &s.bends[i]
		for l := range modes + 1 {
			t := dot(s.temps[(b.firstCell+l)*s.n:][:s.n], y) + y[s.n]
			hottest[b.contour] = math.Max(hottest[b.contour], t)
		}
		if b.dof < s.inner {
			continue
		}
		for l := range modes {
			length := b.half * (at[l+1] - at[l])
			mean += length / perimeter * (dot(s.outT[(b.dof+l-s.inner)*s.n:][:s.n], y) + y[s.n])
			flux := dot(s.eq[(b.dof+l)*s.n:][:s.n], y) + dot(cellsOf[modes].mean[l], y[b.dof:])/2
			out[b.stroke] -= c.In * flux * length
		}
	}
	return hottest, mean, out
}
