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

// HullField is the hull's own field (T_c included, the parts' multipoles not) made ready for very many points, as a Field is. Safe for
// concurrent use.
type HullField struct {
	s    *HullSystem
	y    []float64
	root cell
	rim  []halfPlane
}

// Field prepares the hull's field for many points.
func (s *HullSystem) Field(y []float64) *HullField {
	f := &HullField{s: s, y: append([]float64(nil), y...), rim: s.rim()}
	lo, hi := complex(math.Inf(1), math.Inf(1)), complex(math.Inf(-1), math.Inf(-1))
	for i := range s.discs {
		d := &s.discs[i]
		lo = complex(math.Min(real(lo), real(d.C)-d.A), math.Min(imag(lo), imag(d.C)-d.A))
		hi = complex(math.Max(real(hi), real(d.C)+d.A), math.Max(imag(hi), imag(d.C)+d.A))
	}
	f.root.mid = (lo + hi) / 2
	f.root.half = math.Max(real(hi-lo), imag(hi-lo)) / 2
	f.root.series[0] = complex(y[s.n], 0)
	all := make([]int, len(s.panels))
	for i := range all {
		all[i] = i
	}
	f.build(&f.root, all, depth)
	return f
}

// build sorts the panels into those of the series and those near, and divides the cell where many are near.
func (f *HullField) build(c *cell, panels []int, levels int) {
	for _, i := range panels {
		b := &f.s.panels[i]
		if b.distance(c.mid) < separate*math.Sqrt2*c.half {
			c.near = append(c.near, i)
			continue
		}
		b.series(c, f.y[b.dof:][:b.p])
	}
	if len(c.near) <= few || levels == 0 {
		return
	}
	c.parts = new([4]cell)
	for i := range c.parts {
		q := &c.parts[i]
		q.half = c.half / 2
		shift := complex(float64(i%2)-0.5, float64(i/2)-0.5) // in units of c.half
		q.mid = c.mid + scale(c.half, shift)
		if f.s.pocketless(q) {
			continue
		}
		q.series = shifted(c.series, shift)
		f.build(q, c.near, levels-1)
	}
}

// series adds the field of a panel to that of c.
func (b *bow) series(c *cell, y []float64) {
	var v sight
	c.series[0] += complex(b.temperature(&v, y, c.mid), 0)
	g := &rules[points(b.frame(c.mid), b.p, terms)]
	for i, t := range g.x {
		density := 0.0
		for k, v := range y {
			density += v * g.p[i][k]
		}
		x := scale(c.half, inverse(b.at(t)-c.mid))
		v := complex(-b.unit()*density, 0)
		for n := 1; n < terms; n++ {
			v *= x
			c.series[n] += scale(reciprocal[n], v)
		}
	}
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
	c := &f.root
	for c.parts != nil {
		i := 0
		if real(z) > real(c.mid) {
			i++
		}
		if imag(z) > imag(c.mid) {
			i += 2
		}
		c = &c.parts[i]
	}
	w := scale(1/c.half, z-c.mid)
	sum := c.series[terms-1]
	for n := terms - 2; n >= 0; n-- {
		sum = sum*w + c.series[n]
	}
	t := real(sum)
	if len(c.near) > 0 {
		var v sight
		for _, i := range c.near {
			b := &f.s.panels[i]
			t += b.temperature(&v, f.y[b.dof:], z)
		}
	}
	return t
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
