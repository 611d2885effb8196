package rating_test

import (
	"context"
	"errors"
	"fmt"
	"math"
	"strings"
	"testing"

	"packrise/solver/catalog"
	"packrise/solver/heat"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// family is a set of published figures of one kind, all drawn in one way.
type family struct {
	name, source string // source: document, edition, clause
	conditions   string
	drawn        string // how the sections are drawn
	unit         string
	low, high    float64 // band of computed over published; both 0: reported only
	ofMean       bool    // the band is that of the family's mean: single figures may leave it, for the reason that drawn gives
	rows         []comparison
}

func (f *family) banded() bool { return f.high > 0 }

// comparison is one published figure and how it is computed.
type comparison struct {
	name      string
	published float64
	compute   func(*rig) (float64, error)
	quick     bool // also in the ordinary tests
}

// outcome is what came of a comparison.
type outcome struct {
	family             *family
	row                *comparison
	byRule, everywhere float64 // with the clearance of the defaults, with 0.2 mm everywhere
	loose              bool    // parts lie loose in a gas, so that the clearance acts
	missing            string  // why it can't be drawn yet
}

func (o outcome) ratio() float64 { return o.byRule / o.row.published }

func (o outcome) ratioEverywhere() float64 { return o.everywhere / o.row.published }

// errNotDrawn marks a section that the format names and this version does not read yet.
var errNotDrawn = errors.New("cannot be drawn yet")

// plan is a section and the question asked of it.
type plan struct {
	surroundings, holder string   // flow maps
	parts                []string // flow maps; without at_mm they are laid by lay
	lay                  func(*section.Document, *catalog.Catalog) (map[string]section.Point, error)
	loaded               []string // carry the current asked for, the same in each; all other conductors are idle
	hz, limitC           float64
	start                float64 // a current to start from, A
}

// text writes the section as a person would.
func (p plan) text() string {
	var b strings.Builder
	fmt.Fprintf(&b, "packrise: 1\nsurroundings: %s\nholder: %s\nparts:\n", p.surroundings, p.holder)
	loaded := map[string]bool{}
	for _, id := range p.loaded {
		loaded[id] = true
	}
	var idle []string
	for _, part := range p.parts {
		fmt.Fprintf(&b, "  - %s\n", part)
		if id := idOf(part); !loaded[id] {
			idle = append(idle, id)
		}
	}
	fmt.Fprintf(&b, "loads:\n  - {id: all, conductors: [%s], current_a: 1, frequency_hz: %g}\n", strings.Join(p.loaded, ", "), p.hz)
	if len(idle) > 0 {
		fmt.Fprintf(&b, "  - {id: idle, conductors: [%s], current_a: 0}\n", strings.Join(idle, ", "))
	}
	return b.String()
}

// idOf returns the id of a part written as {id: …, …}.
func idOf(part string) string {
	id, _, _ := strings.Cut(strings.TrimPrefix(part, "{id: "), ",")
	return id
}

// rig computes permitted currents.
type rig struct {
	engine    *rating.Engine
	clearance section.Opt[float64] // in place of the defaults' rule, mm
	loose     bool                 // a clearance acted in what was asked
}

func newRig() *rig { return &rig{engine: rating.NewEngine(catalog.Load())} }

var shelf = catalog.Load()

// draw reads and lays a section.
func (r *rig) draw(p plan) (*section.Document, error) {
	d, problems := section.Read([]byte(p.text()))
	for _, q := range problems {
		if q.Rule == "later-key" || q.Rule == "not-built" {
			return nil, fmt.Errorf("%w: %s", errNotDrawn, q.What)
		}
	}
	for _, q := range problems {
		return nil, fmt.Errorf("%s", q.At("section"))
	}
	if p.lay != nil {
		at, err := p.lay(d, shelf)
		if err != nil {
			return nil, err
		}
		d = section.PlaceAll(d, at)
	}
	if loose(d) {
		r.loose = true
		if r.clearance.OK {
			d = d.With(func(d *section.Document) { d.Holder.ClearanceMM = r.clearance })
		}
	}
	return d, nil
}

// loose tells whether several surfaces face each other through a gas.
func loose(d *section.Document) bool {
	h := d.Holder
	return (h.Fill == "" || h.Fill == "air") && h.Kind != section.NoHolder && h.Kind != section.Apart
}

// permitted returns the largest current of the loaded conductors with which no conductor exceeds the limit, to about 2e-4.
func (r *rig) permitted(p plan) (float64, error) {
	d, err := r.draw(p)
	if err != nil {
		return 0, err
	}
	ambient := d.Surroundings.AmbientC.V
	var known bracket
	amperes := p.start
	for range 40 {
		hottest, err := r.hottest(d, amperes)
		if err != nil {
			return 0, err
		}
		next := known.next(amperes, (hottest-ambient)/(p.limitC-ambient))
		if math.Abs(next/amperes-1) < 2e-4 {
			return next, nil
		}
		amperes = next
	}
	return 0, fmt.Errorf("no permitted current found, last tried %g A", amperes)
}

// bracket finds the current with which the rise is what is allowed: rises go about as a power of the current.
type bracket struct {
	low, high      float64 // tried, too cold and too hot; 0: none yet
	amperes, share float64 // the last but one
}

// next takes a current and its rise over the rise allowed (+Inf: no steady temperature) and returns the current to try next.
func (b *bracket) next(amperes, share float64) float64 {
	if share > 1 {
		b.high = amperes
	} else {
		b.low = amperes
	}
	if math.IsInf(share, 1) {
		if b.low > 0 {
			return math.Sqrt(b.low * b.high)
		}
		return amperes / 2
	}
	power := 2.0
	if b.amperes > 0 && math.Abs(b.amperes/amperes-1) > 1e-9 {
		if p := math.Log(share/b.share) / math.Log(amperes/b.amperes); p > 1 && p < 10 {
			power = p
		}
	}
	b.amperes, b.share = amperes, share
	next := amperes * math.Pow(share, -1/power)
	if b.high > 0 && next >= b.high && b.low > 0 {
		next = math.Sqrt(b.low * b.high)
	}
	return next
}

// hottest solves with one current and returns the temperature of the hottest conductor, +Inf where the solution does not settle.
func (r *rig) hottest(d *section.Document, amperes float64) (float64, error) {
	d = d.With(func(d *section.Document) {
		d.Loads = append([]section.Load(nil), d.Loads...)
		d.Loads[0].CurrentA = section.Some(amperes)
	})
	res, err := r.solve(d)
	if err != nil {
		return 0, err
	}
	if res.Status != heat.Converged {
		return math.Inf(1), nil // far too much current: nothing steady to compare
	}
	hot := math.Inf(-1)
	for _, c := range res.Conductors {
		hot = max(hot, c.TempC)
	}
	return hot, nil
}

func (r *rig) solve(d *section.Document) (*rating.Result, error) {
	res, problems, err := r.engine.Solve(context.Background(), d, rating.Options{})
	if err != nil {
		return nil, err
	}
	if res == nil {
		return nil, fmt.Errorf("%s", problems[0].Sentence())
	}
	return res, nil
}

// TestBracket finds the current of a known law, from too low, from too high and from where nothing settles.
func TestBracket(t *testing.T) {
	const allowed = 40.0
	law := func(amperes float64) float64 {
		if amperes > 1.3*allowed {
			return math.Inf(1)
		}
		x := amperes / allowed
		return x * x * math.Exp(0.8*(x-1)) // steeper than the square, as resistance rises
	}
	for _, start := range []float64{0.5, 39, 40, 51, 52.1, 900} {
		var known bracket
		amperes, steps := start, 0
		for next := 0.0; math.Abs(next/amperes-1) > 2e-4; steps++ {
			if next > 0 {
				amperes = next
			}
			next = known.next(amperes, law(amperes))
		}
		if math.Abs(amperes/allowed-1) > 1e-3 || steps > 15 {
			t.Errorf("from %g A: %g A after %d steps, want %g", start, amperes, steps, allowed)
		}
	}
}
