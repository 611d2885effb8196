package outline

import (
	"math"
)

// How contours are cut: first by their own form, then halved where the densities are not resolved.
const (
	maxRounds   = 7
	maxUnknowns = 3500
	looseness   = 2e-3 // of a bend's last modes, as a share of the heat, at fineness 1
	enough      = 3    // times that is left alone, rather than begin another round
	perHalving  = 30   // what halving a bend takes off its last modes
)

// begin cuts every contour.
func (s *Shaped) begin() {
	for i := range s.contours {
		l := s.contours[i].Loop
		longest := l.Perimeter() / 8
		for j := range l {
			st := &l[j]
			n := max(1, int(math.Ceil(st.span()/(2*maxBend)-1e-9)), int(math.Ceil(st.Length()/longest-1e-9)))
			if st.R == 0 {
				n = max(2, n)
			}
			for k := range n {
				s.cut(st, i, j, float64(k)/float64(n), float64(k+1)/float64(n))
			}
		}
	}
}

// refine halves the bends whose last modes are not small for some heat; false if there are none.
func (s *Shaped) refine(fineness float64) bool {
	tail := make([]float64, len(s.bends))
	samples := s.samples()
	for k, y := range samples {
		whole := 0.0
		for i := range s.bends {
			b := &s.bends[i]
			whole += math.Abs(y[b.dof]) * b.half
		}
		if !(whole > 0) {
			continue
		}
		if k >= len(samples)-2 && len(s.discs) > 0 {
			whole /= float64(len(s.discs)) // each of them by itself
		}
		for i := range s.bends {
			b := &s.bends[i]
			d := y[b.dof:][:modes]
			t := (math.Abs(d[modes-1]) + math.Abs(d[modes-2])/4) * b.half / whole
			tail[i] = math.Max(tail[i], t)
		}
	}
	limit := looseness / math.Pow(fineness, 3)
	var out []bend
	s.loose = 0
	for i := range s.bends {
		b := s.bends[i]
		s.loose = math.Max(s.loose, tail[i])
		if tail[i] < limit {
			b.known = b.dof
			out = append(out, b)
			continue
		}
		pieces := 2
		if tail[i] > perHalving*limit {
			pieces = 4
		}
		st := &s.contours[b.contour].Loop[b.stroke]
		for k := range pieces {
			at := func(k int) float64 { return b.lo + (b.hi-b.lo)*float64(k)/float64(pieces) }
			out = append(out, newBend(st, b.contour, b.stroke, at(k), at(k+1)))
		}
	}
	if s.loose < enough*limit {
		return false
	}
	s.bends = out
	return true
}

// samples are the solutions for 1 W/m in each metal and for the drive of the surroundings.
func (s *Shaped) samples() [][]float64 {
	var all [][]float64
	heats := make([]float64, len(s.contours))
	for i := range s.contours {
		if s.contours[i].metal() {
			heats[i] = 1
			all = append(all, s.Respond(heats, false))
			heats[i] = 0
		}
	}
	if s.driven() {
		all = append(all, s.Respond(heats, true))
	}
	return append(all, s.lit()...)
}

// lit are the solutions for 1 W/m in every disc at once, and for what the discs send back of that.
func (s *Shaped) lit() [][]float64 {
	if len(s.discs) == 0 {
		return nil
	}
	src := Sources{Q: make([]float64, len(s.discs)), D: make([][]complex128, len(s.discs))}
	b := make([][]complex128, len(s.discs))
	for j := range s.discs {
		src.Q[j] = 1
		src.D[j], b[j] = make([]complex128, s.discs[j].M), make([]complex128, s.discs[j].M+1)
	}
	first, second := make([]float64, s.n+1), make([]float64, s.n+1)
	s.RespondTo(first, src, false)
	s.Incoming(first, b)
	for j, d := range src.D {
		src.Q[j] = 0
		for n := range d {
			d[n] = scale(s.around.T[j][n], conj(b[j][n+1]))
		}
	}
	s.RespondTo(second, src, false)
	addScaled(second, 1, first)
	return [][]float64{first, second}
}

// driven tells whether heat flows without any metal's heat.
func (s *Shaped) driven() bool {
	first := math.NaN()
	differs := func(t float64) bool {
		if math.IsNaN(first) {
			first = t
		}
		return t != first
	}
	for i := range s.contours {
		c := &s.contours[i]
		if c.Held && differs(c.Fixed) {
			return true
		}
		for _, d := range c.Sides {
			if d.Kind != Insulated && d.Kind != Covered && differs(d.Temp) {
				return true
			}
		}
	}
	return false
}
