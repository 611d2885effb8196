package study

import (
	"context"
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
