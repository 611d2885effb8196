package study

import (
	"context"
	"fmt"
	"math"

	"packrise/solver/heat"
	"packrise/solver/quantity"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// Plausible ranges of what is fitted to a measurement, and the least emissivity at which a reading by radiation means anything.
const (
	leastFilm    = 0.6 // of the convective film: dust, corners, a draught
	mostFilm     = 1.6
	shiny        = 0.5
	lightLoad    = 0.4 // share of the heat at full load below which a reading says little
	steadyMin    = 60  // minutes of load before a section of this kind is taken as steady; common practice, no source
	sameK        = 1.0 // K: the section explains a reading that is nearer
	matchSteps   = 12
	zeroC        = 273.15
	readingBandK = 2 // K: what a good instrument is uncertain by; common practice, no source
)

// What a match found.
const (
	Explained   = "explained"   // the section as it stands gives the reading
	Fitted      = "fitted"      // it does with another film or clearance inside the plausible range
	Unexplained = "unexplained" // nothing plausible does: look for a joint before re-rating
	Joint       = "joint"       // heat falls off along the wire: this is no matter of grouping
)

// Match is what a measurement says about a section.
type Match struct {
	ID, At    string
	Found     string
	SurfaceC  float64 // the true temperature behind the reading
	ComputedC float64 // by the section as it stands
	LowC      float64 // P5 and P95 of that
	HighC     float64
	What      string  // what was fitted: "film outside", "mean clearance"
	Value     float64 // times the formulas' film, or mm
	Low, High float64 // its plausible range
	LoadShare float64 // heat at the reading over heat at the design's loads
	Wide      bool    // at that load the fit says little
	// At the design's loads: the governing temperature as computed and with the fit, and the factors on all currents.
	FullC, FullFittedC float64
	Governs            string
	Before, After      Pair
	Raises             bool // the fit gives a higher permitted current, and no reason is written: it is not taken
	Reason             string
	Questions          []string // what nobody said
	Remarks            []string
}

// Rely is the factor on all currents to rely on after the measurement: the lower one unless a reason is written.
func (m *Match) Rely() float64 {
	if m.Found != Fitted || m.Raises {
		return m.Before.Rely.Factor
	}
	return m.After.Rely.Factor
}

// SurfaceOf returns the temperature (°C) of a surface of emissivity surface that an instrument set to another reads as readingC, with
// reflectedC mirrored in it: ε_s T⁴ + (1−ε_s) T_r⁴ = ε_i T_read⁴ + (1−ε_i) T_r⁴ (grey surface, whole spectrum). NaN where no temperature does.
func SurfaceOf(readingC, instrument, surface, reflectedC float64) float64 {
	p := func(c float64) float64 { return math.Pow(c+zeroC, 4) }
	t4 := (instrument*p(readingC) + (surface-instrument)*p(reflectedC)) / surface
	if !(t4 > 0) {
		return math.NaN()
	}
	return math.Pow(t4, 0.25) - zeroC
}

// Match fits the section to one of the design's measurements.
func (s *Study) Match(ctx context.Context, d *section.Document, id string, o Options) (*Match, error) {
	m, err := s.reading(d, id)
	if err != nil {
		return nil, err
	}
	f := &fitter{s: s, ctx: ctx, o: o, full: d, m: m, out: &Match{ID: id, At: m.At}}
	if m.Along == section.FallsOff {
		f.out.Found = Joint
		f.out.Remarks = append(f.out.Remarks, "The heat falls off along the wire, as it does from a joint: isolate, prove dead and inspect the joint. Grouping does not explain it, so nothing is fitted.")
		return f.out, nil
	}
	if err := f.run(); err != nil {
		return nil, err
	}
	return f.out, nil
}

func (s *Study) reading(d *section.Document, id string) (*section.Measurement, error) {
	for i := range d.Measurements {
		if d.Measurements[i].ID == id {
			return &d.Measurements[i], nil
		}
	}
	return nil, refusal("unknown-measurement", "measurements", "choose one of the design's measurements", "there is no measurement %q", id)
}

// refusal makes a Refusal of one sentence.
func refusal(rule, key, do, format string, args ...any) error {
	return &Refusal{[]section.Problem{{Rule: rule, Key: key, What: fmt.Sprintf(format, args...), Do: do}}}
}

type fitter struct {
	s    *Study
	ctx  context.Context
	o    Options
	full *section.Document // at the design's loads and ambient
	then *section.Document // as things were at the reading
	m    *section.Measurement
	base *rating.Result // of then
	out  *Match
}

func (f *fitter) run() (err error) {
	d := section.WithStates(f.full, f.m.Loads)
	if a := f.m.AmbientC; a.OK {
		d = d.With(func(d *section.Document) { d.Surroundings.AmbientC = a })
	}
	f.then = d
	if f.base, err = f.s.solve(f.ctx, d, f.o); err != nil {
		return err
	}
	if err := known(f.base, f.o); err != nil {
		return err
	}
	if f.base.Status != heat.Converged {
		return refusal("no-steady-state", "measurements", "check the currents of the measurement", "at the currents of %s no steady temperature exists", f.m.ID)
	}
	if err := f.surface(); err != nil {
		return err
	}
	f.ask()
	return f.compare()
}

// surface finds the true temperature behind the reading, or refuses.
func (f *fitter) surface() error {
	ambient := f.then.Surroundings.AmbientC.V
	f.out.SurfaceC = f.m.ReadingC
	if i := f.m.InstrumentEmissivity; i.OK {
		e := f.m.SurfaceEmissivity
		if !e.OK {
			e = section.Some(f.emissivity())
			f.out.Remarks = append(f.out.Remarks, fmt.Sprintf("Surface emissivity %s assumed.", quantity.Trimmed(e.V, 2)))
		}
		if e.V < shiny {
			return refusal("shiny", "measurements", "put tape or paint on it, wait until it is as warm as what is under it, and read again",
				"%s was read by radiation off a surface of emissivity %s: what is mirrored in it outweighs what it gives off", f.m.ID, quantity.Trimmed(e.V, 2))
		}
		f.out.SurfaceC = SurfaceOf(f.m.ReadingC, i.V, e.V, f.m.ReflectedC.Or(ambient))
	}
	if t := f.out.SurfaceC; math.IsNaN(t) || t < ambient {
		return refusal("below-ambient", "measurements", "check the reading, its emissivities and the ambient at that time",
			"%s gives %s °C on the surface, below the ambient of %s °C", f.m.ID, quantity.Trimmed(t, 1), quantity.Trimmed(ambient, 1))
	}
	return nil
}

// emissivity is what the design says of the surface that was read: the outside's, or the outermost material's of a part.
func (f *fitter) emissivity() float64 {
	const usual = 0.9
	if f.place() == section.Outside {
		if e := f.base.OutsideEmissivity; e > 0 {
			return e
		}
		return usual
	}
	p := section.Find(f.then, f.m.At)
	if p == nil {
		return usual
	}
	id := p.Material
	if w, ok := f.s.cat.Wire(p.Stock); ok {
		id = w.Insulation
	}
	if n := len(p.Layers); n > 0 {
		id = p.Layers[n-1].Material
	}
	for _, m := range f.then.Materials {
		if m.Name == id {
			return m.Emissivity.Or(usual)
		}
	}
	if m, ok := f.s.cat.Material(id); ok && m.Emissivity.V > 0 {
		return m.Emissivity.V
	}
	return usual
}

// ask lists what a fit rests on and nobody said.
func (f *fitter) ask() {
	q := func(s string) { f.out.Questions = append(f.out.Questions, s) }
	if f.m.Along == "" {
		q("Is the heat even along the wire, or does it fall off from one place? Falling off points to a joint.")
	}
	switch l := f.m.LoadedForMin; {
	case !l.OK:
		q("How long had it been loaded? A section that was still warming up reads too low.")
	case l.V < steadyMin:
		f.out.Remarks = append(f.out.Remarks, fmt.Sprintf("Loaded for only %s min: it may still have been warming up, so the reading is a lower bound.", quantity.Trimmed(l.V, 0)))
	}
	switch f.m.Cover {
	case "":
		q("Was a cover opened to read it? An opened cover cools what lies behind it.")
	case section.Opened:
		f.out.Remarks = append(f.out.Remarks, "A cover was opened: what lay behind it had begun to cool, so the reading is a lower bound.")
	}
}

// compare sets the reading beside what is computed, and fits.
func (f *fitter) compare() error {
	at, t, ok := f.find(f.base)
	if !ok {
		return refusal("unknown-place", "measurements", "write the id of a part, or outside, jacket, conduit or wireway", "%s was taken at %q, which has no temperature here", f.m.ID, f.m.At)
	}
	b, err := f.s.Bands(f.ctx, f.then, f.base, f.o)
	if err != nil {
		return err
	}
	f.out.ComputedC, f.out.LowC, f.out.HighC = t, t-b.Spreads[at].LowK, t+b.Spreads[at].HighK
	if err := f.loads(); err != nil {
		return err
	}
	if math.Abs(f.out.SurfaceC-t) < sameK {
		f.out.Found = Explained
		f.out.After = f.out.Before
		f.out.FullFittedC = f.out.FullC
		return nil
	}
	return f.fit()
}

// place is the thing that was read: on a wall one reads its outside.
func (f *fitter) place() string {
	switch f.m.At {
	case section.Jacket, section.Conduit, section.Wireway, section.WrapName:
		return section.Outside
	}
	return f.m.At
}

// find returns the thing that was read.
func (f *fitter) find(r *rating.Result) (at int, t float64, ok bool) {
	place := f.place()
	for i, x := range things(r) {
		if x.id == place {
			if i < len(r.Conductors) {
				x.tempC = r.Conductors[i].TempC
			}
			return i, x.tempC, !math.IsNaN(x.tempC)
		}
	}
	return 0, 0, false
}

// loads compares the heat at the reading with that at the design's loads, and rates the section as it stands.
func (f *fitter) loads() error {
	full, err := f.s.solve(f.ctx, f.full, f.o)
	if err != nil {
		return err
	}
	if f.out.LoadShare = f.base.Generated / full.Generated; math.IsNaN(f.out.LoadShare) {
		f.out.LoadShare = 0
	}
	if f.out.LoadShare < lightLoad {
		f.out.Wide = true
		f.out.Remarks = append(f.out.Remarks, fmt.Sprintf("At the reading the section made %s of its heat at full load: an error of %d K there grows to %s K. Read again at a higher load.",
			Percent(f.out.LoadShare), readingBandK, quantity.Trimmed(math.Ceil(readingBandK/math.Max(f.out.LoadShare, 0.01)), 0)))
	}
	if list := things(full); full.Status == heat.Converged {
		if at, _, ok := closest(list, nominal); ok {
			f.out.Governs, f.out.FullC = list[at].id, list[at].tempC
		}
	}
	f.out.Before, err = f.s.pair(f.ctx, f.s.engines[0], f.full, full, nil, nil, 0, f.o)
	return err
}
