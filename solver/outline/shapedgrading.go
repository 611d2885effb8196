package outline

import (
	"math"
	"slices"
)

// How contours are cut: first by their own form, then halved where the densities are not resolved.
const (
	maxRounds   = 7
	maxUnknowns = 3500
	looseness   = 4e-3 // of a bend's last modes, as a share of the heat, at fineness 1
	enough      = 3    // times that is left alone, rather than begin another round
	perHalving  = 30   // what halving a bend takes off its last modes
)

// begin cuts every contour.
func (s *Shaped) begin() {
	for i := range s.contours {
		l := s.contours[i].Loop
		longest, first := l.Perimeter()/(8*math.Max(1, s.fineness)), len(s.bends)
		lo, hi := l.Bounds()
		corner := math.Min(real(hi-lo), imag(hi-lo)) / (inCorner * s.fineness)
		for j := range l {
			st := &l[j]
			from, to := corner, corner
			if !l.sharp(j) || s.contours[i].String {
				from = longest
			}
			if !l.sharp((j+1)%len(l)) || s.contours[i].String {
				to = longest
			}
			at := st.shares(longest, from, to)
			for k := 1; k < len(at); k++ {
				s.cut(st, i, j, at[k-1], at[k])
			}
			s.singular(first, from < longest, to < longest, j)
		}
		s.balance(first, i)
	}
}

// sharp tells whether the loop has a corner where stroke j begins: densities are singular there.
func (l Loop) sharp(j int) bool {
	s, before := &l[j], &l[(j+len(l)-1)%len(l)]
	turn := s.normal(0) * conj(before.normal(1))
	return real(turn) < 0.98
}

// shares are where a stroke is cut at first: into pieces no longer than longest, and from its ends into some that grow from the lengths from and to.
func (s *Stroke) shares(longest, from, to float64) []float64 {
	size := s.Length()
	cuts := []float64{0, 1}
	grow := func(l float64, at func(u float64) float64) {
		if l >= longest {
			return
		}
		for x := l; x < size/2; x += l + fromCorner*x {
			cuts = append(cuts, at(x/size))
		}
	}
	grow(from, func(u float64) float64 { return u })
	grow(to, func(u float64) float64 { return 1 - u })
	slices.Sort(cuts)
	least := 1
	if s.R == 0 && len(cuts) == 2 {
		least = 2
	}
	out := []float64{0}
	for k := 1; k < len(cuts); k++ {
		share := cuts[k] - cuts[k-1]
		n := max(least, int(math.Ceil(s.span()*share/(2*maxBend)-1e-9)), int(math.Ceil(size*share/longest-1e-9)))
		for m := range n {
			out = append(out, cuts[k-1]+share*float64(m+1)/float64(n))
		}
	}
	return out
}

// singular marks the bends at the sharp ends of a stroke, which no halving resolves.
func (s *Shaped) singular(first int, from, to bool, stroke int) {
	for i := first; i < len(s.bends); i++ {
		if b := &s.bends[i]; b.stroke == stroke {
			b.corner = from && b.lo == 0 || to && b.hi == 1
		}
	}
}

// mostGrowth is how much longer a bend may be than its neighbour.
const mostGrowth = 5

// balance halves bends of a contour that are much longer than their neighbours.
func (s *Shaped) balance(first, contour int) {
	c := &s.contours[contour]
	for again := true; again; {
		again = false
		old := append([]bend(nil), s.bends[first:]...)
		s.bends = s.bends[:first]
		n := len(old)
		for k := range old {
			b := &old[k]
			next, last := &old[(k+1)%n], &old[(k+n-1)%n]
			least := math.Min(next.half, last.half)
			if c.String {
				least = b.half // its ends have no neighbours of its own
				if k > 0 {
					least = math.Min(least, last.half)
				}
				if k < n-1 {
					least = math.Min(least, next.half)
				}
			}
			if b.corner || b.half <= mostGrowth*least {
				s.bends = append(s.bends, *b)
				continue
			}
			again = true
			st, mid := &c.Loop[b.stroke], (b.lo+b.hi)/2
			s.bends = append(s.bends, newBend(st, contour, b.stroke, b.lo, mid), newBend(st, contour, b.stroke, mid, b.hi))
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
		if !b.corner {
			s.loose = math.Max(s.loose, tail[i])
		}
		if tail[i] < limit || b.corner {
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
