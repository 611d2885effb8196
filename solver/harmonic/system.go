package harmonic

import (
	"math"
	"slices"
	"sync"
	"sync/atomic"
)

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
	weight []float64 // of the circle's harmonics that the discs are mapped to

	blocks []block   // upper triangle with diagonal, see at
	logs   []float64 // the same of logarithms between monopoles, see near
	ports  []block
	work   builder
	alpha  []float64   // room for the circle's amplitudes, many vectors
	feel   []float64   // room for what its mix feels, many vectors
	lean   [][]float64 // per disc, what its unit monopole makes the mix feel
	idle   []float64   // noughts that stand for what a product does not need

	parts []int       // discs whose columns different goroutines multiply with: from parts[p] to parts[p+1]
	sums  [][]float64 // what all but the first of them bring
}

// NewSystem lays out the discs; Build writes their blocks. A nil circle stands for a medium without end. The discs are mapped to the
// circle's harmonics n ≤ len(weight), weight[n-1] being how much what goes to or comes from that harmonic counts, besides what Sigma
// and Mix reflect.
func NewSystem(discs []Disc, circle *Circle, weight []float64, cut float64) *System {
	s := &System{discs: discs, circle: circle, cut: cut}
	if circle != nil {
		s.weight = make([]float64, max(len(weight), len(circle.Sigma), circle.Mix.Harmonics()))
		copy(s.weight, weight)
		for n := range circle.Mix.Harmonics() {
			s.weight[n] = math.Max(s.weight[n], math.Sqrt(circle.Mix.Weight(n+1)))
		}
		for n, f := range circle.Sigma {
			s.weight[n] = math.Max(s.weight[n], math.Sqrt(math.Abs(f)))
		}
	}
	s.blocks = make([]block, len(discs)*(len(discs)+1)/2)
	s.logs = make([]float64, len(s.blocks))
	s.ports = make([]block, len(discs))
	s.alpha = make([]float64, 2*many*len(s.weight))
	s.layout()
	s.room()
	return s
}

// room makes room for what the circle's mix feels.
func (s *System) room() {
	if s.circle != nil && s.circle.Mix != nil {
		s.feel = make([]float64, many*len(s.circle.Mix.W0))
	}
}

func (s *System) layout() {
	s.off = make([]int, len(s.discs)+1)
	for i, d := range s.discs {
		s.off[i+1] = s.off[i] + 2*len(d.S)
	}
	s.idle = make([]float64, many*(s.off[len(s.discs)]+2*len(s.weight)))
}

// Len returns the number of real unknowns; Offset where disc i's begin; Top the harmonics of the circle that discs are mapped to.
func (s *System) Len() int { return s.off[len(s.discs)] }

// Offset returns where disc i's unknowns begin.
func (s *System) Offset(i int) int { return s.off[i] }

// Top returns the number of the circle's own harmonics that discs are mapped to.
func (s *System) Top() int { return len(s.weight) }

// Disc returns disc i.
func (s *System) Disc(i int) Disc { return s.discs[i] }

// at returns the block of discs i ≤ j.
func (s *System) at(i, j int) *block { return &s.blocks[j*(j+1)/2+i] }

// Build writes all blocks, on up to threads goroutines. It asks stop now and then and reports whether it came to the end.
func (s *System) Build(threads int, stop func() bool) bool {
	n := len(s.discs)
	if n < 24 {
		threads = 1
	}
	var next atomic.Int64
	var stopped atomic.Bool
	work := func(w *builder) {
		for k := int(next.Add(1)) - 1; k < n; k = int(next.Add(1)) - 1 {
			if stopped.Load() || stop() {
				stopped.Store(true)
				return
			}
			s.column(w, n-1-k) // the longest first
		}
	}
	var all sync.WaitGroup
	for range threads - 1 {
		all.Go(func() { work(new(builder)) })
	}
	work(&s.work)
	all.Wait()
	s.leanAll()
	s.share(threads)
	return !stopped.Load()
}

// column writes the blocks between disc j and every disc i ≤ j, and j's map to the circle.
func (s *System) column(w *builder, j int) {
	if len(s.weight) > 0 {
		w.port(&s.ports[j], s.discs[j], s.circle.R, s.weight)
	}
	for i := range j + 1 {
		s.couple(w, i, j)
	}
}

// couple writes the block of discs i ≤ j.
func (s *System) couple(w *builder, i, j int) {
	w.write(s.at(i, j), s.discs[i], s.discs[j], i == j, s.circle, s.cut)
	s.logs[j*(j+1)/2+i] = s.near(i, j)
}

// Put replaces disc i and rewrites its blocks. If its order changed the layout of vectors changes too.
func (s *System) Put(i int, d Disc) {
	relay := len(d.S) != len(s.discs[i].S)
	s.discs[i] = d
	if relay {
		s.layout()
	}
	s.column(&s.work, i)
	for j := i + 1; j < len(s.discs); j++ {
		s.couple(&s.work, i, j)
	}
	if s.lean != nil {
		s.lean = slices.Clone(s.lean) // forks keep theirs
		s.lean[i] = s.leanOf(i)
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

// Reflect replaces the circle by one that differs in Sigma and Mix alone, no longer than Top.
func (s *System) Reflect(c *Circle) {
	s.circle = c
	s.room()
	s.leanAll()
}

// Fork returns a system with the same blocks and work space of its own, so that both can multiply at the same time. Neither may be
// written to meanwhile.
func (s *System) Fork() *System {
	f := *s
	f.alpha, f.idle = make([]float64, len(s.alpha)), make([]float64, len(s.idle))
	f.work, f.parts = builder{}, nil
	f.room()
	return &f
}

// Apply sets y = S 𝒢 S x.
func (s *System) Apply(y, x []float64) { s.apply(y, x, 1) }

// Many is the number of vectors that ApplyMany takes at once.
const Many = many

// ApplyMany is Apply for Many vectors, element k of vector v at Many·k + v.
func (s *System) ApplyMany(y, x []float64) { s.apply(y, x, many) }

func (s *System) apply(y, x []float64, k int) {
	clear(y)
	if k == 1 && len(s.parts) > 0 {
		s.together(y, x)
	} else {
		s.columns(y, x, 0, len(s.discs), k)
	}
	if s.circle.mute() {
		return
	}
	alpha := s.alpha[:2*k*len(s.weight)]
	s.gather(alpha, x, k)
	s.reflect(alpha, k)
	s.spread(y, alpha, k)
}

// columns multiplies with the blocks of discs from ≤ j < to.
func (s *System) columns(y, x []float64, from, to, k int) {
	for j := from; j < to; j++ {
		xj, yj := x[k*s.off[j]:k*s.off[j+1]], y[k*s.off[j]:k*s.off[j+1]]
		for i := range j + 1 {
			if b := s.at(i, j); len(b.data) > 0 {
				b.applyTo(x[k*s.off[i]:k*s.off[i+1]], xj, y[k*s.off[i]:k*s.off[i+1]], yj, k)
			}
		}
	}
}

// worthSharing is the number of stored reals from which a product is spread over goroutines: below it they cost more than they save.
const worthSharing = 4e5

// share divides the discs into parts with about as many stored reals each.
func (s *System) share(threads int) {
	s.parts = nil
	total := s.Entries()
	if threads < 2 || float64(total) < worthSharing {
		return
	}
	s.parts = []int{0}
	sum := 0
	for j := range s.discs {
		for i := range j + 1 {
			sum += len(s.at(i, j).data)
		}
		if sum*threads >= total*len(s.parts) {
			s.parts = append(s.parts, j+1)
		}
	}
	s.sums = make([][]float64, len(s.parts)-2)
}

// together is columns for all discs, the parts at the same time.
func (s *System) together(y, x []float64) {
	var all sync.WaitGroup
	for p := range s.sums {
		all.Go(func() {
			if len(s.sums[p]) != len(y) {
				s.sums[p] = make([]float64, len(y))
			}
			clear(s.sums[p])
			s.columns(s.sums[p], x, s.parts[p+1], s.parts[p+2], 1)
		})
	}
	s.columns(y, x, s.parts[0], s.parts[1], 1)
	all.Wait()
	for _, sum := range s.sums {
		for i, v := range sum {
			y[i] += v
		}
	}
}

// apart returns c_i − c_j, no shorter than the two radii: overlapping discs count as touching.
func apart(a, b Disc) complex128 {
	d := a.C - b.C
	l := size(d)
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
