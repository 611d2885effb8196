package outline

import "math"

// At is the hull's own field at z in a pocket, T_c included, the parts' multipoles not. HullField is quicker for many points.
func (s *HullSystem) At(y []float64, z complex128) float64 {
	t := y[s.n]
	var v sight
	for i := range s.panels {
		b := &s.panels[i]
		t += b.temperature(&v, y[b.dof:], z)
	}
	return t
}

// temperature is what the density Σ y_k P_k on b makes at z.
func (b *bow) temperature(v *sight, y []float64, z complex128) float64 {
	b.look(z, v, 0, false)
	sum := b.log() * y[0]
	for k := range b.p {
		sum += y[k] * real(v.value(k))
	}
	return sum * b.unit()
}

// High returns, for each disc, the coefficients b_n, n = M+1 … top, that its own arcs and the strings beside it bring; the disc sends them
// straight back by its mirror. Nil for discs away from the hull.
func (s *HullSystem) High(y []float64, top int) [][]complex128 {
	out := make([][]complex128, len(s.discs))
	var x exchange
	for i := range s.discs {
		d := &s.discs[i]
		kin := s.kin(i)
		if len(kin) == 0 || top <= d.M {
			continue
		}
		b := make([]complex128, top-d.M)
		for _, j := range kin {
			p := &s.panels[j]
			cols := 1 + 2*top
			x.fill(&d.Disc, p, s.hull.MediumK, top)
			for k := range p.p {
				f := y[p.dof+k]
				for n := range b {
					c := k*cols + 2*(d.M+n) + 1
					b[n] += complex(f*x.receive[c], f*x.receive[c+1])
				}
			}
		}
		out[i] = b
	}
	return out
}

// HullField is the hull's own field (T_c included, the parts' multipoles not) made ready for very many points. Safe for concurrent use.
type HullField struct {
	s   *HullSystem
	rim []halfPlane
	squares
}

// Field prepares the hull's field for many points.
func (s *HullSystem) Field(y []float64) *HullField {
	lo, hi := complex(math.Inf(1), math.Inf(1)), complex(math.Inf(-1), math.Inf(-1))
	for i := range s.discs {
		d := &s.discs[i]
		lo = complex(math.Min(real(lo), real(d.C)-d.A), math.Min(imag(lo), imag(d.C)-d.A))
		hi = complex(math.Max(real(hi), real(d.C)+d.A), math.Max(imag(hi), imag(d.C)+d.A))
	}
	all := make([]carrier, len(s.panels))
	for i := range all {
		all[i] = &s.panels[i]
	}
	half := math.Max(real(hi-lo), imag(hi-lo)) / 2
	return &HullField{s: s, rim: s.rim(), squares: newSquares((lo+hi)/2, half, all, y[:s.n+1], s.pocketless)}
}

// pocketless tells whether all of q lies in one part, or beyond a string.
func (s *HullSystem) pocketless(q *cell) bool {
	far := math.Sqrt2 * q.half
	for i := range s.discs {
		d := &s.discs[i]
		if v := q.mid - d.C; math.Hypot(real(v), imag(v))+far < d.A {
			return true
		}
	}
	for i := range s.pieces {
		if p := &s.pieces[i]; p.disc < 0 && imag((q.mid-p.start)*conj(p.dir)) < -far {
			return true
		}
	}
	return false
}

// At returns the field at z in a pocket; NaN outside the hull.
func (f *HullField) At(z complex128) float64 {
	for i := range f.rim {
		if f.rim[i].excludes(z) && !f.s.onArc(z) {
			return math.NaN()
		}
	}
	return f.value(z)
}

// halfPlane is what lies to the left of a line.
type halfPlane struct{ x, y, most float64 }

func (h *halfPlane) excludes(z complex128) bool { return real(z)*h.x+imag(z)*h.y > h.most }

// rim returns the half planes that meet in the polygon of all strings and all chords of arcs: what of the hull lies beyond it is in a part. Nothing
// is left where one arc goes all the way round.
func (s *HullSystem) rim() []halfPlane {
	var out []halfPlane
	for i := range s.pieces {
		p := &s.pieces[i]
		from, to := p.at(0), p.at(p.length)
		if p.disc >= 0 && p.turn > 2*math.Pi-tinyArc {
			return []halfPlane{{most: -1}}
		}
		n := -1i * (to - from)
		n = scale(1/math.Hypot(real(n), imag(n)), n)
		out = append(out, halfPlane{real(n), imag(n), real(from)*real(n) + imag(from)*imag(n) + 1e-9*p.length})
	}
	return out
}

// onArc tells whether z lies in the disc of an arc.
func (s *HullSystem) onArc(z complex128) bool {
	for i := range s.pieces {
		if p := &s.pieces[i]; p.disc >= 0 {
			if v := z - p.c; real(v)*real(v)+imag(v)*imag(v) <= p.a*p.a*(1+1e-12) {
				return true
			}
		}
	}
	return false
}
