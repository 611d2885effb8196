package outline

import "math"

// Respond solves for 'heats' of the contours (W/m, read for metals); ground adds the drive of held bores and of the surroundings.
func (s *Shaped) Respond(heats []float64, ground bool) []float64 {
	y := make([]float64, s.n+1)
	s.loadTo(y, heats, ground)
	s.solve(y)
	return y
}

// loadTo adds the right-hand side of Respond to y.
func (s *Shaped) loadTo(y, heats []float64, ground bool) {
	for i := range s.bends {
		b := &s.bends[i]
		c := &s.contours[b.contour]
		r := s.condition(b)
		for l := range modes {
			if c.metal() {
				y[b.dof+l] += heats[b.contour] / (c.Out * s.lengths[b.contour])
			}
			if ground {
				y[b.dof+l] += r.temp * r.outside
			}
		}
	}
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

// Faces returns the hottest temperature of each contour and, last, of the outside; the mean of the outside; and the heat through each stroke of the
// outside (W/m, out positive), of an open bundle through all of it but what is held, and through that.
func (s *Shaped) Faces(y []float64, src Sources) (hottest []float64, mean float64, out []float64) {
	hottest = make([]float64, len(s.contours)+1)
	for i := range hottest {
		hottest[i] = math.Inf(-1)
	}
	out = make([]float64, len(s.outside().Loop))
	if s.around.Hull != nil {
		out = make([]float64, 2)
	}
	around := 0.0
	at := cellsOf[modes].at
	temps, flux, warm := s.brought(src)
	for i := range s.bends {
		b := &s.bends[i]
		outer := s.outer(b)
		for l := range modes + 1 {
			t := dot(s.temps[(b.firstCell+l)*s.n:][:s.n], y) + y[s.n] + temps[b.firstCell+l]
			hottest[b.contour] = math.Max(hottest[b.contour], t)
			if outer {
				hottest[len(s.contours)] = math.Max(hottest[len(s.contours)], t)
			}
		}
		if !outer {
			continue
		}
		c := &s.contours[b.contour]
		for l := range modes {
			length := b.half * (at[l+1] - at[l])
			k := b.dof + l - s.inner
			around += length
			mean += length * (dot(s.outT[k*s.n:][:s.n], y) + y[s.n] - warm[k])
			f := dot(s.eq[(b.dof+l)*s.n:][:s.n], y) + dot(cellsOf[modes].mean[l], y[b.dof:])/2 - flux[k]
			to := b.stroke
			if s.around.Hull != nil {
				if to = 0; c.side(b.stroke).Kind == Held {
					to = 1
				}
			}
			out[to] -= c.In * f * length
		}
	}
	return hottest, mean / around, out
}

// brought is what the discs bring: temperatures at the ends of cells, and minus flux and mean temperature on the cells of the outside.
func (s *Shaped) brought(src Sources) (temps, flux, warm []float64) {
	temps = make([]float64, s.cells)
	flux, warm = make([]float64, s.n-s.inner), make([]float64, s.n-s.inner)
	at := cellsOf[modes].at
	for j := range s.discs {
		d := &s.discs[j]
		v := pack(make([]float64, 0, 1+2*usualOrder), src.Q[j], src.D[j][:min(len(src.D[j]), d.M)])
		for _, l := range d.links {
			b := &s.bends[l.bend]
			for c, t := range at {
				temps[b.firstCell+c] += d.brings(b.at(t), s.around.MediumK, src.Q[j], src.D[j])
			}
			if s.outer(b) {
				addProduct(flux[b.dof-s.inner:], d.send[l.offset:], 1+2*l.m, v)
				addProduct(warm[b.dof-s.inner:], d.warm[l.offset:], 1+2*l.m, v)
			}
		}
	}
	return temps, flux, warm
}

// brings is the temperature that multipoles q, m make at z.
func (d *Disc) brings(z complex128, k, q float64, m []complex128) float64 {
	x := scale(d.A, inverse(z-d.C))
	var sum complex128
	for n := min(len(m), d.reach(dist(z, d.C), 1e-5)); n > 0; n-- {
		sum = (sum + m[n-1]) * x
	}
	return real(sum) - q*math.Log(dist(z, d.C))/(2*math.Pi*k)
}
