package outline

// ShapedPatches are pieces of the faces of a Shaped that take up heat besides what conduction brings them, such as radiation through a gas on one side
// of them, and whose mean temperatures are wanted. They stand contour by contour, counterclockwise along each; on contours of parts the gas lies to
// the right of A → B, on the wall's inside (and strings) to the left. Where a patch does not begin at the end of the one before, another contour or
// covered piece begins. The geometry is that of the chords A–B, Length that of the face itself.
type ShapedPatches struct {
	A, B    []complex128
	Length  []float64 // m
	Contour []int     // that each lies on

	s     *Shaped
	first []int     // cell of each patch, and of one more
	row   []int     // of each cell
	share []float64 // of each cell in the length of its patch
	gain  []float64 // what 1 W/m² into a patch adds to the rows of its cells; of a metal, to all its rows for 1 W/m
	temp  []float64 // mean temperature of each patch per density, n columns
	feel  [][]touch // per disc and patch
}

// Patches divides the contours that faces tells of along their cells, longest telling how long a patch at z may be. Contours of metals take part with
// one temperature; what a held one takes up goes to what holds it. Measure is due before Means.
func (s *Shaped) Patches(faces func(contour int) bool, longest func(z complex128) float64) *ShapedPatches {
	p := &ShapedPatches{s: s}
	at := cellsOf[modes].at
	for i := range s.bends {
		b := &s.bends[i]
		if !faces(b.contour) {
			continue
		}
		for l := range modes {
			from, to := b.at(at[l]), b.at(at[l+1])
			k := len(p.A) - 1
			follows := k >= 0 && p.Contour[k] == b.contour && p.B[k] == from
			if !follows || dist(p.A[k], to) > longest(scale(0.5, p.A[k]+to)) || i > 0 && l == 0 && s.bends[i-1].stroke != b.stroke {
				p.A, p.B, p.Length = append(p.A, from), append(p.B, to), append(p.Length, 0)
				p.Contour, p.first = append(p.Contour, b.contour), append(p.first, len(p.row))
				p.gain = append(p.gain, s.gain(b))
				k++
			}
			length := b.half * (at[l+1] - at[l])
			p.B[k] = to
			p.Length[k] += length
			p.row, p.share = append(p.row, b.dof+l), append(p.share, length)
		}
	}
	p.first = append(p.first, len(p.row))
	for k, length := range p.Length {
		for c := p.first[k]; c < p.first[k+1]; c++ {
			p.share[c] /= length
		}
	}
	p.feel = make([][]touch, len(s.discs))
	return p
}

// gain is what 1 W/m² into the face adds to a bend's rows: k_in (∂T/∂n + σ/2) = k_out (∂T/∂n − σ/2) + w. A metal takes up its whole, W/m.
func (s *Shaped) gain(b *bend) float64 {
	c := &s.contours[b.contour]
	r := s.condition(b)
	switch {
	case c.metal():
		return 1 / (c.Out * s.lengths[b.contour])
	case c.Held:
		return 0
	case s.outer(b):
		return 2 * r.density / c.In
	}
	return 2 / (c.In + c.Out)
}

// Measure works out what every density and disc brings to the patches, which Means needs, unless that is known; false if stop, asked after every
// millisecond or so of work, asked for an end.
func (p *ShapedPatches) Measure(stop func() bool) bool {
	if p.temp != nil {
		return true
	}
	s := p.s
	temp := make([]float64, len(p.A)*s.n)
	each(len(p.A), func(k int) {
		if stop() {
			return
		}
		var f curved
		for c := p.first[k]; c < p.first[k+1]; c++ {
			to := s.bendOf(p.row[c])
			for j := range s.bends {
				from := &s.bends[j]
				from.meanTemp(&f, to, p.row[c]-to.dof, p.share[c], temp[k*s.n+from.dof:][:modes])
			}
		}
	})
	each(len(s.discs), func(i int) {
		if !stop() {
			p.Follow(i)
		}
	})
	if stop() {
		return false
	}
	p.temp = temp
	return true
}

// bendOf is the bend with unknown dof.
func (s *Shaped) bendOf(dof int) *bend { return &s.bends[s.order[dof/modes]] }

// Of tells whether the patches are those of s.
func (p *ShapedPatches) Of(s *Shaped) bool { return p.s == s }

// Follow works out anew what disc i brings to the patches, after MoveDisc.
func (p *ShapedPatches) Follow(i int) {
	s := p.s
	d := &s.discs[i]
	p.feel[i] = make([]touch, len(p.A))
	for k := range p.A {
		m := 0
		for _, row := range p.row[p.first[k]:p.first[k+1]] {
			m = max(m, d.reach(s.bendOf(row).distance(d.C), decayed))
		}
		row, cells := make(touch, 1+2*m), make([]float64, modes*(1+2*m))
		var last *bend
		for c := p.first[k]; c < p.first[k+1]; c++ {
			b := s.bendOf(p.row[c])
			if b != last {
				clear(cells)
				d.warms(b, -1, s.around.MediumK, m, cells)
				last = b
			}
			addScaled(row, p.share[c], cells[(p.row[c]-b.dof)*len(row):][:len(row)])
		}
		p.feel[i][k] = row
	}
}

// RespondTo is Shaped.RespondTo with w (W/m) going into each patch besides.
func (p *ShapedPatches) RespondTo(y []float64, src Sources, ground bool, w []float64) {
	p.s.loadFrom(y, src, ground)
	p.add(y, w)
	p.s.solve(y)
}

// Respond is Shaped.Respond with w (W/m) going into each patch besides.
func (p *ShapedPatches) Respond(heats []float64, ground bool, w []float64) []float64 {
	y := make([]float64, p.s.n+1)
	p.s.loadTo(y, heats, ground)
	p.add(y, w)
	p.s.solve(y)
	return y
}

// add adds what goes into the patches to the right-hand side y.
func (p *ShapedPatches) add(y, w []float64) {
	s := p.s
	for k, v := range w {
		if b := s.bendOf(p.row[p.first[k]]); s.contours[b.contour].metal() {
			for i := range s.bends {
				if e := &s.bends[i]; e.contour == b.contour {
					for l := range modes {
						y[e.dof+l] += v * p.gain[k]
					}
				}
			}
			continue
		}
		v *= p.gain[k] / p.Length[k]
		for _, row := range p.row[p.first[k]:p.first[k+1]] {
			y[row] += v
		}
	}
}

// Means sets t to the mean temperatures of the patches, for the whole solution.
func (p *ShapedPatches) Means(t, y []float64, src Sources) {
	n := p.s.n
	for k := range t {
		t[k] = y[n] + dot(p.temp[k*n:][:n], y)
	}
	for j := range p.s.discs {
		v := pack(make([]float64, 0, 1+2*usualOrder), src.Q[j], src.D[j])
		for k, row := range p.feel[j] {
			m := min(len(row), len(v))
			t[k] += dot(row[:m], v)
		}
	}
}
