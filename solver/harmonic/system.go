package harmonic

import "math"

// Disc is a round part as the system sees it: centre, outer radius, and one scale per harmonic n = 1 … len(S). The system's unknowns of
// a disc are δ_n/S[n-1].
type Disc struct {
	C complex128
	A float64
	S []float64
}

// System is the symmetric coupling of discs in one medium, with or without a round wall: for scaled outgoing amplitudes x it
// returns what comes in, y = S 𝒢 S x. Blocks are sparse: entries below a cut are dropped. Vectors hold, disc by disc and harmonic by
// harmonic, real and imaginary parts.
type System struct {
	discs  []Disc
	off    []int // start of each disc's share of a vector; one more than discs
	circle *Circle
	cut    float64
	top    int // harmonics of the circle that the discs are mapped to

	blocks []block // upper triangle with diagonal, see at
	ports  [][][]complex128
	work   builder
	alpha  []complex128
}

// NewSystem lays out the discs; Build writes their blocks. A nil circle stands for a medium without end. The discs are mapped to top
// harmonics of the circle, at least as many as it has in Sigma.
func NewSystem(discs []Disc, circle *Circle, top int, cut float64) *System {
	s := &System{discs: discs, circle: circle, cut: cut}
	if circle != nil {
		s.top = max(top, len(circle.Sigma))
	}
	s.blocks = make([]block, len(discs)*(len(discs)+1)/2)
	s.ports = make([][][]complex128, len(discs))
	s.alpha = make([]complex128, s.top)
	s.layout()
	return s
}

func (s *System) layout() {
	s.off = make([]int, len(s.discs)+1)
	for i, d := range s.discs {
		s.off[i+1] = s.off[i] + 2*len(d.S)
	}
}

// Len returns the number of real unknowns; Offset where disc i's begin; Top the harmonics of the circle that discs are mapped to.
func (s *System) Len() int { return s.off[len(s.discs)] }

// Offset returns where disc i's unknowns begin.
func (s *System) Offset(i int) int { return s.off[i] }

// Top returns the number of the circle's own harmonics that discs are mapped to.
func (s *System) Top() int { return s.top }

// Disc returns disc i.
func (s *System) Disc(i int) Disc { return s.discs[i] }

// at returns the block of discs i ≤ j.
func (s *System) at(i, j int) *block { return &s.blocks[j*(j+1)/2+i] }

// Build writes the blocks between disc j and every disc i ≤ j, and j's map to the circle.
func (s *System) Build(j int) {
	if s.circle != nil && s.top > 0 {
		s.ports[j] = portRows(s.discs[j], s.circle.R, s.top)
	}
	for i := 0; i <= j; i++ {
		s.work.write(s.at(i, j), s.discs[i], s.discs[j], i == j, s.circle, s.cut)
	}
}

// Put replaces disc i and rewrites its blocks. If its order changed the layout of vectors changes too.
func (s *System) Put(i int, d Disc) {
	relay := len(d.S) != len(s.discs[i].S)
	s.discs[i] = d
	if relay {
		s.layout()
	}
	s.Build(i)
	for j := i + 1; j < len(s.discs); j++ {
		s.work.write(s.at(i, j), s.discs[i], s.discs[j], false, s.circle, s.cut)
	}
}

// Entries returns the number of stored reals.
func (s *System) Entries() int {
	n := 0
	for i := range s.blocks {
		n += len(s.blocks[i].data)
	}
	return n
}

// Apply sets y = S 𝒢 S x.
func (s *System) Apply(y, x []float64) {
	for i := range y {
		y[i] = 0
	}
	for j := range s.discs {
		xj, yj := x[s.off[j]:s.off[j+1]], y[s.off[j]:s.off[j+1]]
		for i := 0; i < j; i++ {
			if b := s.at(i, j); len(b.data) > 0 {
				b.apply(x[s.off[i]:s.off[i+1]], xj, y[s.off[i]:s.off[i+1]], yj)
			}
		}
		if b := s.at(j, j); len(b.data) > 0 {
			b.applySelf(xj, yj)
		}
	}
	if s.circle == nil || len(s.circle.Sigma) == 0 {
		return
	}
	s.Gather(s.alpha, x)
	for n := range s.alpha {
		f := 0.0
		if n < len(s.circle.Sigma) {
			f = s.circle.Sigma[n]
		}
		s.alpha[n] = scale(f, s.alpha[n])
	}
	s.Spread(y, s.alpha)
}

// Gather sets alpha to the circle's outgoing scaled amplitudes √n A_n of x, n = 1 … Top.
func (s *System) Gather(alpha []complex128, x []float64) {
	for n := range alpha {
		alpha[n] = 0
	}
	for i := range s.discs {
		gather(s.ports[i], x[s.off[i]:s.off[i+1]], alpha)
	}
}

// Spread adds to y what the circle's regular field with scaled amplitudes omega_n = √n conj(B_n) brings to the discs.
func (s *System) Spread(y []float64, omega []complex128) {
	for i := range s.discs {
		spread(s.ports[i], omega, y[s.off[i]:s.off[i+1]])
	}
}

// apart returns c_i − c_j, no shorter than the two radii: overlapping discs count as touching.
func apart(a, b Disc) complex128 {
	d := a.C - b.C
	l := math.Hypot(real(d), imag(d))
	switch sum := a.A + b.A; {
	case l == 0:
		return complex(sum, 0)
	case l < sum:
		return scale(sum/l, d)
	}
	return d
}

// over returns f/z.
func over(f float64, z complex128) complex128 {
	q := f / (real(z)*real(z) + imag(z)*imag(z))
	return complex(q*real(z), -q*imag(z))
}
