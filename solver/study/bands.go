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

// Bands is how uncertain the temperatures of a design are. Every end of every input is solved in full, one at a time; P5 and P95 come from samples
// in which all inputs go anywhere in their ranges, each as likely, through those responses and, for the currents, through the influence matrix.
type Bands struct {
	Spreads []Spread // per thing of the base result: conductors, then others
	Effects []Effect // one at a time; largest at the governing thing first
	At      string   // that thing, "" if nothing has a limit
	at      int      // its index, −1
	// Ends are inputs at whose worse end no steady temperature exists: what they do has no bound.
	Ends []string
}

// Effect is what one input does by itself.
type Effect struct {
	Input
	LowK, HighK []float64 // change of each thing's temperature at From and at To
}

// Size is its largest change of the i-th thing, K.
func (e *Effect) Size(i int) float64 { return math.Max(math.Abs(e.LowK[i]), math.Abs(e.HighK[i])) }

const (
	samples = 2000
	jostles = 8 // ways to lie that are solved
	tail    = 0.05
)

// Bands finds the uncertainty of the temperatures of d, whose solution is base.
func (s *Study) Bands(ctx context.Context, d *section.Document, base *rating.Result, o Options) (*Bands, error) {
	b := &bander{s: s, d: d, base: base, o: o, list: things(base), out: &Bands{}}
	b.inputs = s.inputs(d, base)
	if p := d.Ranges.LoadPercent; p.OK && p.V > 0 {
		f := p.V / 100
		b.loads = f
		b.inputs = append(b.inputs, Input{
			"all currents", percent(-f), percent(f), true,
			change{d: scaleAll(d, 1-f)},
			change{d: scaleAll(d, 1+f)},
		})
	}
	if err := b.solve(ctx); err != nil {
		return nil, err
	}
	if err := b.follow(ctx); err != nil {
		return nil, err
	}
	b.sample()
	b.sort()
	return b.out, nil
}

type bander struct {
	s      *Study
	d      *section.Document
	base   *rating.Result
	o      Options
	list   []thing
	inputs []Input
	lies   []*rating.Result // ways to lie
	loads  float64          // range of each current, as a share
	by     [][]float64      // [load][thing]: K for a share of 1 more heat in that load
	out    *Bands
}

// solve solves every end of every input and the ways to lie.
func (b *bander) solve(ctx context.Context) error {
	places := b.places()
	ends := make([]*rating.Result, 2*len(b.inputs)+len(places))
	err := b.s.each(ctx, len(ends), b.o, func(e *rating.Engine, i int) (err error) {
		if i >= 2*len(b.inputs) {
			ends[i], err = solveWith(ctx, e, places[i-2*len(b.inputs)], b.o)
			return err
		}
		in := &b.inputs[i/2]
		c := in.low
		if i%2 == 1 {
			c = in.high
		}
		if c.none {
			ends[i] = b.base
			return nil
		}
		d := b.d
		if c.d != nil {
			d = c.d
		}
		ends[i], err = solveVaried(ctx, e, d, b.o, c.vary)
		return err
	})
	if err != nil {
		return err
	}
	for i, in := range b.inputs {
		e := Effect{Input: in, LowK: b.change(ends[2*i]), HighK: b.change(ends[2*i+1])}
		if math.IsInf(slices.Max(append(append([]float64{0}, e.LowK...), e.HighK...)), 1) {
			b.out.Ends = append(b.out.Ends, in.Name)
		}
		b.out.Effects = append(b.out.Effects, e)
	}
	for _, r := range ends[2*len(b.inputs):] {
		if r.Status == heat.Converged {
			b.lies = append(b.lies, r)
		}
	}
	return nil
}

// change is what a solution differs from the base, per thing; +Inf where there is no steady state.
func (b *bander) change(r *rating.Result) []float64 {
	out := make([]float64, len(b.list))
	other := things(r)
	for i := range out {
		switch {
		case r.Status == heat.ThermalRunaway || len(other) != len(out):
			out[i] = math.Inf(1)
		case !math.IsNaN(b.list[i].tempC):
			out[i] = other[i].tempC - b.list[i].tempC
		}
	}
	return out
}

// places are other ways for loose parts to lie.
func (b *bander) places() (out []*section.Document) {
	far := b.d.Ranges.PositionMM.Or(usualPositionMM)
	if !b.base.ClearanceMM.OK || far <= 0 {
		return nil
	}
	for n := range jostles {
		at, ok := rating.Jostle(b.d, b.s.cat, n, far)
		if ok {
			out = append(out, moved(b.d, at))
		}
	}
	return out
}

// moved puts parts of the top level elsewhere.
func moved(d *section.Document, at map[string]section.Point) *section.Document {
	return d.With(func(d *section.Document) {
		d.Parts = slices.Clone(d.Parts)
		for i := range d.Parts {
			if p, ok := at[d.Parts[i].ID]; ok {
				d.Parts[i].At = section.Some(p)
			}
		}
	})
}

// follow finds how each load's heat moves the temperatures, when currents are uncertain.
func (b *bander) follow(ctx context.Context) error {
	if b.loads == 0 {
		return nil
	}
	p, r, _, err := b.s.engines[0].Point(ctx, b.d, b.o.rating())
	if err != nil || p == nil || r.Status != heat.Converged {
		return err
	}
	last := &b.out.Effects[len(b.out.Effects)-1] // all currents
	more := 2*b.loads + b.loads*b.loads
	for i := range b.d.Loads {
		l := &b.d.Loads[i]
		if !l.CurrentA.OK || l.CurrentA.V == 0 {
			continue
		}
		const step = 0.01
		x := make([]float64, len(p.Sources))
		share := 0.0
		for j, c := range b.base.Conductors {
			x[j] = 1
			if c.Load == l.ID {
				x[j] += step
				share += c.HeatWM / b.base.Generated
			}
		}
		row := make([]float64, len(b.list))
		temps := p.Predict(x, nil)
		for k := range row {
			switch {
			case k < len(temps):
				row[k] = (temps[k] - b.base.Conductors[k].TempC) / step
			case !math.IsInf(last.HighK[k], 0):
				row[k] = share * last.HighK[k] / more
			}
		}
		b.by = append(b.by, row)
	}
	b.scaleRows(last, more)
	return nil
}

// scaleRows makes the rows of all loads add up to what all currents together were found to do: the matrix leaves out how films follow.
func (b *bander) scaleRows(all *Effect, more float64) {
	for k := range b.list {
		sum := 0.0
		for _, row := range b.by {
			sum += row[k]
		}
		f := all.HighK[k] / more / sum
		if sum <= 0 || f <= 0 || math.IsInf(f, 0) || math.IsNaN(f) {
			continue
		}
		for _, row := range b.by {
			row[k] *= f
		}
	}
}

// sample draws all inputs at once and takes the tails.
func (b *bander) sample() {
	random := rand.New(rand.NewPCG(1, 2))
	drawn := make([][]float64, len(b.list))
	for i := range drawn {
		drawn[i] = make([]float64, 0, samples)
	}
	row := make([]float64, len(b.list))
	for range samples {
		b.draw(random, row)
		for i, k := range row {
			drawn[i] = append(drawn[i], k)
		}
	}
	for i, t := range b.list {
		slices.Sort(drawn[i])
		at := func(share float64) float64 { return drawn[i][min(samples-1, int(share*samples))] }
		s := Spread{LowK: math.Max(0, -at(tail)), HighK: math.Max(0, at(1-tail)), AtRiseK: t.tempC - b.base.AmbientC}
		if k := b.d.Ranges.AmbientK; k.OK {
			s.StillK, s.LowStillK = math.Min(s.HighK, (1-2*tail)*k.V), math.Min(s.LowK, (1-2*tail)*k.V)
		}
		b.out.Spreads = append(b.out.Spreads, s)
	}
}

// draw is one sample of the changes of all things.
func (b *bander) draw(random *rand.Rand, row []float64) {
	clear(row)
	for e := range b.out.Effects {
		f := &b.out.Effects[e]
		if b.by != nil && e == len(b.out.Effects)-1 {
			break // the currents, each by itself below
		}
		u := 2*random.Float64() - 1
		end := f.HighK
		if u < 0 {
			u, end = -u, f.LowK
		}
		for i, k := range end {
			if u*k != 0 { // 0 × Inf
				row[i] += u * k
			}
		}
	}
	for _, by := range b.by {
		u := 1 + b.loads*(2*random.Float64()-1)
		for i, k := range by {
			row[i] += (u*u - 1) * k
		}
	}
	if len(b.lies) > 0 {
		lie := things(b.lies[random.IntN(len(b.lies))])
		for i := range row {
			if i < len(lie) && !math.IsNaN(lie[i].tempC) {
				row[i] += lie[i].tempC - b.list[i].tempC
			}
		}
	}
}

// sort brings the effects in the order of what they do to the governing thing.
func (b *bander) sort() {
	at, ok := governs(b.base, b.out.Spreads)
	if len(b.lies) > 0 {
		b.out.Effects = append(b.out.Effects, b.lyingEffect())
	}
	b.out.at = -1
	if !ok {
		return
	}
	b.out.At, b.out.at = b.list[at].id, at
	slices.SortStableFunc(b.out.Effects, func(x, y Effect) int {
		switch a, c := x.Size(at), y.Size(at); {
		case a > c:
			return -1
		case a < c:
			return 1
		}
		return 0
	})
}

// lyingEffect is what other ways to lie do: the coolest and the hottest of those solved.
func (b *bander) lyingEffect() Effect {
	far := b.d.Ranges.PositionMM
	e := Effect{Input: Input{Name: "how the parts lie", From: "0", To: trimmed(far.Or(usualPositionMM)) + " mm elsewhere", Stated: far.OK}}
	e.LowK, e.HighK = make([]float64, len(b.list)), make([]float64, len(b.list))
	for _, r := range b.lies {
		for i, k := range b.change(r) {
			e.LowK[i], e.HighK[i] = math.Min(e.LowK[i], k), math.Max(e.HighK[i], k)
		}
	}
	return e
}

// AtGoverning returns what an effect does to the governing thing at its two ends, K; NaN where nothing governs.
func (b *Bands) AtGoverning(e *Effect) (low, high float64) {
	if b.at < 0 {
		return math.NaN(), math.NaN()
	}
	return e.LowK[b.at], e.HighK[b.at]
}

// Largest words the n inputs that move the governing temperature most.
func (b *Bands) Largest(n int) (out []string) {
	if b == nil || b.at < 0 {
		return nil
	}
	for i := range b.Effects {
		e := &b.Effects[i]
		if i >= n || e.Size(b.at) < 0.05 {
			break
		}
		low, high := b.AtGoverning(e)
		out = append(out, fmt.Sprintf("Not known exactly: %s, %s to %s: %s at %s to %s K.", e.Name, e.From, e.To, b.At, signed(low, 1), signed(high, 1)))
	}
	return out
}
