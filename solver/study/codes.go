package study

import (
	"math"
	"os"
	"path/filepath"
	"slices"
	"strings"

	"packrise/solver/quantity"
	"packrise/solver/rating"
	"packrise/solver/rules"
	"packrise/solver/section"
)

// Codes is what code tables say of a design. Counts come from roles, circuits and not_with, never from a current or a temperature.
type Codes struct {
	Run      rules.Run
	Outcomes []rules.Outcome
	Caps     []rules.Cap // of terminals, per conductor
	Jam      rules.Jam
	Problems []rules.Problem // of rule files and ids
	book     *rules.Book
}

// trips is the conventional tripping current over the rating of each kind of device where the document says nothing, the largest of its kind.
// From memory: IEC 60898-1 1.45, IEC 60947-2 1.30, IEC 60269-1 gG 1.6 (16 A and more; thinner ones trip later), IEC 60947-4-1 1.20.
var trips = map[string]float64{
	section.Breaker: 1.45, section.IndustrialBreaker: 1.30, section.MotorBreaker: 1.20, section.Fuse: 1.6, section.OverloadRelay: 1.20,
	section.ElectronicBreaker: 1.30,
}

// smallFuse is what gG fuses below 16 A and below or at 4 A trip at, over the rating (IEC 60269-1, from memory).
func smallFuse(a float64) float64 {
	switch {
	case a <= 4:
		return 2.1
	case a < 16:
		return 1.9
	}
	return 1.6
}

// TripsAt is the conventional tripping current of a device over its rating, and whether the document says it.
func TripsAt(p section.Protection) (factor float64, stated bool) {
	if p.TripsAt.OK {
		return p.TripsAt.V, true
	}
	if p.Kind == section.Fuse {
		return smallFuse(p.RatingA), false
	}
	return trips[p.Kind], false
}

// Codes applies the rule sets that the design names, or the usual ones of its holder. dir is where the design's file lies, for its own rule
// files; "" leaves them out.
func (s *Study) Codes(d *section.Document, dir string) *Codes {
	c := &Codes{book: rules.Shipped()}
	for _, name := range d.Rules.Files {
		if dir == "" && !filepath.IsAbs(name) {
			c.Problems = append(c.Problems, rules.Problem{File: name, Text: "the design has no place yet, so its rule file is not found; save it beside that file"})
			continue
		}
		path := name
		if !filepath.IsAbs(path) {
			path = filepath.Join(dir, name)
		}
		text, err := os.ReadFile(path)
		if err != nil {
			c.Problems = append(c.Problems, rules.Problem{File: name, Text: "can't be read: " + err.Error()})
			continue
		}
		book, problems := c.book.Add(name, text)
		c.book, c.Problems = book, append(c.Problems, problems...)
	}
	c.Run = s.run(d)
	ids := d.Rules.Use
	if len(ids) == 0 {
		ids = c.book.Usual(c.Run)
	}
	outcomes, problems := c.book.Apply(c.Run, ids)
	c.Outcomes, c.Problems = outcomes, append(c.Problems, problems...)
	c.Caps, c.Jam = c.book.Terminals(c.Run), rules.JamOf(c.Run)
	return c
}

// Protect compares loads, devices and permitted currents.
func (c *Codes) Protect(permitted []rules.Permitted) []rules.Protected {
	return c.book.Protect(c.Run, permitted)
}

// run turns a design into what tables see of it.
func (s *Study) run(d *section.Document) rules.Run {
	inv, _ := rating.Take(d, s.cat)
	r := rules.Run{
		AmbientC: math.NaN(), AltitudeM: d.Surroundings.AltitudeM.V, ListedPanel: d.Rules.Inside == section.InPanel,
		Method: d.Rules.Method, Arrangement: d.Rules.Arrangement,
	}
	if a := d.Surroundings.AmbientC; a.OK {
		r.AmbientC = a.V
	}
	h := inv.Holder
	r.Holder = rules.Holder{Kind: h.Kind, Stock: h.Stock, InsideMM: h.InsideMM, WidthMM: h.WidthMM, HeightMM: h.HeightMM, Metal: h.Metal, LengthM: d.Holder.LengthM.V}
	starting := map[string]bool{}
	for i := range d.Loads {
		starting[d.Loads[i].ID] = d.Loads[i].StartingDuty
		r.Loads = append(r.Loads, loadOf(&d.Loads[i]))
	}
	for _, w := range inv.Wires {
		size, _ := quantity.ParseSize(w.Size)
		c := rules.Conductor{
			ID: w.ID, Size: size, AreaMM2: w.AreaMM2, Metal: w.Metal, Family: rules.FamilyOf(w.Insulation), RatingC: w.RatingC, Role: rules.Role(w.Role),
			Load: w.Load, Cable: w.Cable, OutsideMM: w.OutsideMM, Bare: w.Insulation == "",
		}
		switch {
		case w.Role == "" && isNeutral(d, w.ID):
			c.Role = rules.Neutral
		case (w.Role == "" || w.Role == section.RoleLine) && starting[w.Load]:
			c.Role = rules.Control
		case w.Role == section.RoleControl && w.Load != "" && !starting[w.Load]:
			c.Role = rules.Line // only wires of starting duty may be left out of a count, and nobody said that these are
		case w.Role == "":
			c.Role = rules.Line
		}
		r.Conductors = append(r.Conductors, c)
	}
	for _, b := range inv.Bulks {
		r.Parts = append(r.Parts, rules.Part{ID: b.ID, Kind: b.Kind, OutsideMM: b.OutsideMM})
	}
	for _, a := range d.Rules.AtMost {
		r.AtMost = append(r.AtMost, rules.AtMost{Loads: a.Of, Count: a.Count})
	}
	return r
}

func isNeutral(d *section.Document, id string) bool {
	return slices.ContainsFunc(d.Loads, func(l section.Load) bool { return l.Neutral == id })
}

func loadOf(l *section.Load) rules.Load {
	out := rules.Load{
		ID: l.ID, CurrentA: math.NaN(), System: rules.System(l.System), Neutral: l.Neutral, Continuous: l.Continuous, Motor: l.Motor, NotWith: l.NotWith,
		Device:   rules.Device{Kind: l.Protection.Kind, RatingA: l.Protection.RatingA},
		Terminal: rules.Terminal{RatingC: l.Terminals.RatingC.V, RatedA: l.Terminals.RatedA.V},
	}
	if l.CurrentA.OK {
		out.CurrentA = l.CurrentA.V
	}
	if l.Protection.Kind != "" {
		out.Device.TripsAt, _ = TripsAt(l.Protection)
	}
	return out
}

// Computed is the origin of permitted currents that are reckoned here.
const Computed = "computed"

// Lowest is what a conductor may carry when everything is asked.
type Lowest struct {
	ID       string
	A        float64 // not rounded; NaN: nothing limits it or nothing is known
	Because  string  // "computed", a rule's id, "terminal"
	Text     string  // "to rely on", the rule's title, the terminal's sentence
	Computed float64 // A to rely on, all loads scaled together; NaN none
	Nominal  float64 // A by the limits alone; NaN none
	Rules    map[string]float64
	Terminal float64 // A; NaN unknown
	DeviceA  float64 // rating of its device; NaN unknown
	Differs  bool    // some rule differs from the computed value by more than a fifth
}

// differs is the share by which a rule may differ from the computed current before it is said.
const differs = 0.2

// Lowest compares amperes per conductor, never factors: computed to rely on, each rule that applies, the terminal.
func lowest(p *Permits, c *Codes) []Lowest {
	out := make([]Lowest, len(p.Base.Conductors))
	for i, w := range p.Base.Conductors {
		l := Lowest{ID: w.ID, A: math.NaN(), Computed: math.NaN(), Nominal: math.NaN(), Terminal: math.NaN(), DeviceA: math.NaN(), Rules: map[string]float64{}}
		take := func(a float64, because, text string) {
			if a >= 0 && !math.IsInf(a, 1) && !(l.A <= a) {
				l.A, l.Because, l.Text = a, because, text
			}
		}
		if w.CurrentA.OK && w.CurrentA.V > 0 {
			l.Nominal, l.Computed = finite(w.CurrentA.V*p.All.Nominal.Factor), finite(w.CurrentA.V*p.All.Rely.Factor)
			take(l.Computed, Computed, "computed, to rely on")
		}
		for k := range c.Outcomes {
			o := &c.Outcomes[k]
			if !o.Applies || i >= len(o.Conductors) || o.Conductors[i].ID != w.ID || math.IsNaN(o.Conductors[i].A) {
				continue
			}
			a := o.Conductors[i].A
			l.Rules[o.Rule] = a
			if !o.Informative {
				take(a, o.Rule, o.Title)
			}
			l.Differs = l.Differs || l.Computed > 0 && math.Abs(a/l.Computed-1) > differs
		}
		for _, cap := range c.Caps {
			if cap.Conductor == w.ID && !math.IsNaN(cap.A) {
				l.Terminal = cap.A
				if !cap.Assumed || cap.Kind != "terminal-block" && c.wired() { // nobody said that it ends in a terminal block
					take(cap.A, "terminal", cap.Text)
				}
			}
		}
		for _, load := range c.Run.Loads {
			if load.ID == w.Load && load.Device.RatingA > 0 {
				l.DeviceA = load.Device.RatingA
			}
		}
		out[i] = l
	}
	return out
}

// wired tells whether a rule of the NEC gives currents here: its terminals, where nobody states any, belong to its wiring and not to a harness or a
// cable that other rules rate.
func (c *Codes) wired() bool {
	return slices.ContainsFunc(c.Outcomes, func(o rules.Outcome) bool {
		return o.Applies && !o.Informative && strings.HasPrefix(o.Rule, "nec-") && len(o.Conductors) > 0
	})
}

func finite(a float64) float64 {
	if math.IsInf(a, 0) {
		return math.NaN()
	}
	return a
}
