package study

import (
	"context"
	"fmt"
	"math"
	"math/rand/v2"
	"slices"

	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// Seating is what a search over the places of a design's conductors found. Margins (K) are those of the thing with the least.
type Seating struct {
	Doc            *section.Document // the best seating; d itself where none is better
	Swaps          [][2]string       // part and the part whose place it takes, for those that changed
	Present, Best  Seat
	MeanK, WorstK  float64 // margin of random seatings: the mean, and the worst of those tried, to first order
	Random         int     // how many those are
	Searched       int     // seatings judged to first order
	Solved         int     // and in full
	Movable, Fixed int     // conductors that could change places, and parts that could not
	Why            string  // why nothing could be searched, "" else
}

// Seat is one seating solved in full.
type Seat struct {
	MarginK float64
	Governs string
	TempC   float64
	Factor  float64 // on all currents, nominal
}

const (
	sweeps      = 400 // moves tried per conductor in one run
	runs        = 4   // from different starts
	randomSeats = 400
	rounds      = 3 // linearisations
	sameMM      = 1e-3
)

// Seat searches for the seating with the largest margin: conductors of the top level with equal outside diameters change places, pinned parts stay
// and the parts of a group keep the group's places among themselves. Seatings are judged through the influence matrix and the best are solved in
// full, after which the matrix is taken anew. The same seed gives the same answer.
func (s *Study) Seat(ctx context.Context, d *section.Document, seed uint64, o Options) (*Seating, error) {
	s = New(s.cat) // engines that know nothing, so that what was asked before changes nothing
	base, err := s.solve(ctx, d, o)
	if err != nil {
		return nil, err
	}
	if err := known(base, o); err != nil {
		return nil, err
	}
	out := &Seating{Doc: d}
	if base.Status != heat.Converged {
		out.Why = "no steady temperature exists at these currents; lower them first"
		return out, nil
	}
	f := &seater{s: s, ctx: ctx, o: o, out: out, random: rand.New(rand.NewPCG(seed, 77))}
	f.best, f.bestDoc = base, d
	out.Present, _ = seatOf(base)
	if err := f.search(d); err != nil {
		return nil, err
	}
	return out, f.finish(d, base)
}

// seatOf reads the margin off a solution.
func seatOf(r *rating.Result) (Seat, bool) {
	list := things(r)
	at, k, ok := closest(list, nominal)
	if !ok || r.Status != heat.Converged {
		return Seat{MarginK: math.Inf(-1)}, false
	}
	return Seat{MarginK: k, Governs: list[at].id, TempC: list[at].tempC}, true
}

type seater struct {
	s       *Study
	ctx     context.Context
	o       Options
	out     *Seating
	random  *rand.Rand
	best    *rating.Result
	bestDoc *section.Document
}

// board is a design to first order: which conductor sits where.
type board struct {
	p       *rating.Point
	ids     []string // conductors, as in the point
	seats   [][]int  // classes of conductors that may change places, as indices
	sit     []int    // conductor → place (both indices of the point; a place is where that conductor sat)
	q       []float64
	ground  []float64 // temperature at a place without the conductors' heats
	limit   []float64
	moving  []int // conductors in classes of two or more
	classOf []int
	kind    []string // conductors of one kind are as good as each other anywhere
}

func (f *seater) search(d *section.Document) error {
	for round := range rounds {
		p, r, _, err := f.s.engines[0].Point(f.ctx, f.bestDoc, f.o.rating())
		if err != nil || p == nil {
			if r != nil && r.Status == heat.Cancelled {
				return context.Cause(f.ctx)
			}
			return err
		}
		b := newBoard(p, f.bestDoc)
		if round == 0 {
			f.out.Movable, f.out.Fixed = len(b.moving), len(d.Parts)-len(b.moving)
			if len(b.moving) == 0 {
				f.out.Why = "no two conductors of the top level may change places: they differ in diameter, are pinned, or lie inside cables"
				return nil
			}
			f.randoms(b)
		}
		better, err := f.improve(b)
		if err != nil {
			return err
		}
		f.o.tell(round+1, rounds)
		if !better {
			return nil
		}
	}
	return nil
}

// newBoard classes the conductors: equal diameters, of the top level, not pinned, of the same group.
func newBoard(p *rating.Point, d *section.Document) *board {
	n := len(p.Sources)
	b := &board{p: p, sit: make([]int, n), q: make([]float64, n), ground: make([]float64, n), limit: make([]float64, n), classOf: make([]int, n)}
	type class struct {
		group string
		mm    float64
	}
	var classes []class
	for i, c := range p.Conductors {
		b.ids = append(b.ids, c.ID)
		b.kind = append(b.kind, kindOf(d, c.ID))
		b.sit[i], b.q[i], b.classOf[i] = i, c.HeatWM, -1
		b.limit[i] = math.Inf(1)
		if c.LimitC.OK {
			b.limit[i] = c.LimitC.V
		}
		part := topPart(d, c.ID)
		mm := outsideOf(p.Shapes, c.ID)
		if part == nil || part.Pinned || !(mm > 0) {
			continue
		}
		k := slices.IndexFunc(classes, func(x class) bool { return x.group == part.Group && math.Abs(x.mm-mm) < sameMM })
		if k < 0 {
			k = len(classes)
			classes = append(classes, class{part.Group, mm})
			b.seats = append(b.seats, nil)
		}
		b.seats[k] = append(b.seats[k], i)
		b.classOf[i] = k
	}
	for k, of := range b.seats {
		if len(of) < 2 {
			for _, i := range of {
				b.classOf[i] = -1
			}
			b.seats[k] = nil
		}
	}
	for i := range n {
		if b.classOf[i] >= 0 {
			b.moving = append(b.moving, i)
		}
		b.ground[i] = p.Conductors[i].TempC
		for j := range n {
			b.ground[i] -= p.K[i][j] * b.q[j]
		}
	}
	return b
}

// topPart is a round core of the top level that is placed.
func topPart(d *section.Document, id string) *section.Part {
	for i := range d.Parts {
		p := &d.Parts[i]
		if p.ID == id && p.Kind == section.Core && p.At.OK && (p.Conductor == nil || p.Conductor.Round()) {
			return p
		}
	}
	return nil
}

func outsideOf(shapes []section.Shape, id string) float64 {
	for i := range shapes {
		if s := &shapes[i]; s.ID == id && len(s.Rings) > 0 {
			return 2 * s.Rings[len(s.Rings)-1].R1
		}
	}
	return 0
}

// temperatures of conductors with seats as in sit. Heats stay: resistances follow later, in full.
func (b *board) temperatures(t []float64) {
	for i, at := range b.sit {
		t[i] = b.ground[at]
		for j, from := range b.sit {
			t[i] += b.p.K[at][from] * b.q[j]
		}
	}
}

func (b *board) margin(t []float64) float64 {
	m := math.Inf(1)
	for i := range t {
		m = math.Min(m, b.limit[i]-t[i])
	}
	return m
}

// swap exchanges two conductors and brings t up to date.
func (b *board) swap(i, j int, t []float64) {
	pi, pj := b.sit[i], b.sit[j]
	b.sit[i], b.sit[j] = pj, pi
	for k, at := range b.sit {
		if k == i || k == j {
			continue
		}
		t[k] += (b.p.K[at][pj] - b.p.K[at][pi]) * (b.q[i] - b.q[j])
	}
	for _, k := range [2]int{i, j} {
		at := b.sit[k]
		t[k] = b.ground[at]
		for l, from := range b.sit {
			t[k] += b.p.K[at][from] * b.q[l]
		}
	}
}

// pair draws two conductors of one class.
func (b *board) pair(random *rand.Rand) (i, j int) {
	i = b.moving[random.IntN(len(b.moving))]
	of := b.seats[b.classOf[i]]
	for j = i; j == i; {
		j = of[random.IntN(len(of))]
	}
	return i, j
}

// randoms judges random seatings.
func (f *seater) randoms(b *board) {
	sum, worst := 0.0, math.Inf(1)
	t := make([]float64, len(b.sit))
	start := slices.Clone(b.sit)
	for range randomSeats {
		f.shuffle(b)
		b.temperatures(t)
		m := b.margin(t)
		sum += m
		worst = math.Min(worst, m)
	}
	copy(b.sit, start)
	f.out.MeanK, f.out.WorstK, f.out.Random = sum/randomSeats, worst, randomSeats
}

func (f *seater) shuffle(b *board) {
	for _, of := range b.seats {
		f.random.Shuffle(len(of), func(x, y int) {
			i, j := of[x], of[y]
			b.sit[i], b.sit[j] = b.sit[j], b.sit[i]
		})
	}
}

// improve anneals from several starts and solves what comes out in full.
func (f *seater) improve(b *board) (better bool, err error) {
	found := make([][]int, runs)
	from := slices.Clone(b.sit)
	for run := range runs {
		copy(b.sit, from)
		if run > 1 {
			f.shuffle(b)
		}
		if found[run], err = f.anneal(b); err != nil {
			return false, err
		}
		b.stay(found[run])
	}
	copy(b.sit, from)
	docs := make([]*section.Document, 0, runs)
	var kept [][]int
	for _, sit := range found {
		if !slices.EqualFunc([][]int{from}, [][]int{sit}, slices.Equal) && !slices.ContainsFunc(kept, func(k []int) bool { return slices.Equal(k, sit) }) {
			kept = append(kept, sit)
			docs = append(docs, b.seated(f.bestDoc, sit))
		}
	}
	results := make([]*rating.Result, len(docs))
	quiet := f.o
	quiet.Progress = nil
	if err = f.s.each(f.ctx, len(docs), quiet, func(e *rating.Engine, i int) (err error) {
		results[i], err = solveWith(f.ctx, e, docs[i], f.o)
		return err
	}); err != nil {
		return false, err
	}
	f.out.Solved += len(docs)
	for i, r := range results {
		now, _ := seatOf(f.best)
		if s, ok := seatOf(r); ok && s.MarginK > now.MarginK+0.02 {
			f.best, f.bestDoc, better = r, docs[i], true
		}
	}
	return better, nil
}

// anneal lowers the temperature of the search from a tenth of the spread of margins to nothing.
func (f *seater) anneal(b *board) ([]int, error) {
	t := make([]float64, len(b.sit))
	b.temperatures(t)
	now := b.margin(t)
	best, bestSit := now, slices.Clone(b.sit)
	hot := math.Max(0.1, (f.out.MeanK-f.out.WorstK)/4)
	n := sweeps * len(b.moving)
	for step := range n {
		if step%1024 == 0 {
			if f.ctx.Err() != nil {
				return nil, context.Cause(f.ctx)
			}
			b.temperatures(t) // what differences have gathered of rounding
		}
		i, j := b.pair(f.random)
		if b.q[i] == b.q[j] && b.limit[i] == b.limit[j] {
			continue
		}
		b.swap(i, j, t)
		f.out.Searched++
		m := b.margin(t)
		cold := hot * (1 - float64(step)/float64(n))
		if m < now && f.random.Float64() >= math.Exp((m-now)/math.Max(cold, 1e-6)) {
			b.swap(i, j, t)
			continue
		}
		if now = m; m > best+1e-9 {
			best = m
			copy(bestSit, b.sit)
		}
	}
	return bestSit, nil
}

// stay lets conductors that are as good as each other keep their places where some of them sit there anyway.
func (b *board) stay(sit []int) {
	of := map[string][]int{}
	var order []string
	for _, i := range b.moving {
		key := fmt.Sprint(b.classOf[i], b.kind[i])
		if of[key] == nil {
			order = append(order, key)
		}
		of[key] = append(of[key], i)
	}
	for _, key := range order {
		var free, left []int
		for _, i := range of[key] {
			free = append(free, sit[i])
		}
		for _, i := range of[key] {
			if k := slices.Index(free, i); k >= 0 {
				sit[i] = i
				free = slices.Delete(free, k, k+1)
			} else {
				left = append(left, i)
			}
		}
		slices.Sort(free)
		for k, i := range left {
			sit[i] = free[k]
		}
	}
}

// kindOf tells what a conductor is and carries, but for its name and place.
func kindOf(d *section.Document, id string) string {
	p := topPart(d, id)
	if p == nil {
		return id
	}
	q := *p
	q.ID, q.At, q.Conductor = "", section.Opt[section.Point]{}, nil
	wire, load := section.Conductor{}, section.Load{}
	if p.Conductor != nil {
		wire = *p.Conductor
	}
	if l := section.LoadOf(d, id); l != nil {
		load = section.Load{CurrentA: l.CurrentA, Unknown: l.Unknown, HeatWM: l.HeatWM, FrequencyHz: l.FrequencyHz}
	}
	return fmt.Sprintf("%v %v %v", q, wire, load)
}

// seated is the design with conductors in other places.
func (b *board) seated(d *section.Document, sit []int) *section.Document {
	places := map[string]section.Point{}
	for i, at := range sit {
		if i != at {
			places[b.ids[i]] = topPart(d, b.ids[at]).At.V
		}
	}
	return moved(d, places)
}

// finish rates the present and the best seating, and names what moved.
func (f *seater) finish(d *section.Document, base *rating.Result) error {
	f.out.Doc = f.bestDoc
	f.out.Best, _ = seatOf(f.best)
	ends := []*Seat{&f.out.Present, &f.out.Best}
	docs, results := []*section.Document{d, f.bestDoc}, []*rating.Result{base, f.best}
	quiet := f.o
	quiet.Progress = nil
	err := f.s.each(f.ctx, 2, quiet, func(e *rating.Engine, i int) error {
		if i == 1 && f.bestDoc == d {
			return nil
		}
		c, err := f.s.climb(f.ctx, e, results[i], func(g float64) *section.Document { return scaleAll(docs[i], g) }, nominal, 0, f.o)
		ends[i].Factor = c.Factor
		return err
	})
	if f.bestDoc == d {
		f.out.Best.Factor = f.out.Present.Factor
	}
	was := map[section.Point]string{}
	for _, p := range d.Parts {
		if p.At.OK {
			was[p.At.V] = p.ID
		}
	}
	for _, p := range f.bestDoc.Parts {
		if old := topPart(d, p.ID); old != nil && old.At != p.At {
			f.out.Swaps = append(f.out.Swaps, [2]string{p.ID, was[p.At.V]})
		}
	}
	return err
}
