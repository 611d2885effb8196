package study

import (
	"cmp"
	"fmt"
	"math"
	"slices"

	"packrise/solver/heat"
	"packrise/solver/quantity"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// Kinds of change.
const (
	ChangeOff     = "off"     // switch a load off
	ChangeOut     = "out"     // lay the wires of a load elsewhere, or take out what carries nothing
	ChangeMove    = "move"    // one part to a free place
	ChangeSwap    = "swap"    // two parts
	ChangeUpsize  = "upsize"  // the conductors of a load
	ChangeCut     = "cut"     // a load by 10 or 20 %
	ChangeClass   = "class"   // a wire type of a higher temperature
	ChangeSplit   = "split"   // half of the loads into a second holder
	ChangeHolder  = "holder"  // the next larger
	ChangePaint   = "paint"   // a bright outside
	ChangeAmbient = "ambient" // 5 K lower
)

// Change is one change that helps, solved in full.
type Change struct {
	Kind  string
	IDs   []string // parts or loads
	Text  string   // what to do
	GainK float64  // least room of anything after less before
	AtK   float64  // the same at the thing that governs now; NaN where it is gone
	// Governs after the change, with its temperature and limit.
	Governs       string
	TempC, LimitC float64
	RoomK         float64
	CopperKgM     float64  // more copper, kg per m of run
	OutsideMM     float64  // more diameter, or width of a rectangle
	Fill          float64  // more fill, as a share of the inside; 0 where there is no inside
	Worse         []string // sentences of what has clearly less room than before
	Doc           *section.Document
	Result        *rating.Result // at Advice.Factor
}

// judge compares a solved change with what is. nil where it has no steady temperature.
func (a *adviser) judge(c *candidate, doc *section.Document, r *rating.Result) *Change {
	if r.Status != heat.Converged {
		return nil
	}
	list := things(r)
	at, k, ok := closest(list, nominal)
	if !ok {
		return nil
	}
	g := list[at]
	out := &Change{
		Kind: c.kind, IDs: c.ids, Text: c.text, GainK: k - a.room, AtK: math.NaN(), Governs: g.id, TempC: g.tempC, LimitC: g.limit.V, RoomK: k, Doc: doc, Result: r,
	}
	before := map[string]thing{}
	for _, t := range a.list {
		before[t.id] = t
	}
	type worse struct {
		text string
		k    float64
	}
	var bad []worse
	for i, t := range list {
		b, ok := before[t.id]
		if !ok || !t.limit.OK || !b.limit.OK || math.IsNaN(t.tempC) || math.IsNaN(b.tempC) {
			continue
		}
		less := nominal(i, b) - nominal(i, t)
		if t.id == a.out.Governs {
			out.AtK = -less
		}
		if room := nominal(i, t); less > 0.5 && room < 3*DesignMarginK {
			bad = append(bad, worse{fmt.Sprintf("%s has %s K less margin, at %s °C of %s °C", t.id, quantity.Fixed(less, 1),
				quantity.Trimmed(quantity.BesideLimit(t.tempC, t.limit.V), 1), quantity.Trimmed(t.limit.V, 1)), room})
		}
	}
	slices.SortStableFunc(bad, func(x, y worse) int {
		return cmp.Compare(x.k, y.k)
	})
	for _, b := range bad[:min(len(bad), 3)] {
		out.Worse = append(out.Worse, b.text)
	}
	a.cost(out)
	return out
}

// cost fills in what a change takes: copper, size and fill.
func (a *adviser) cost(c *Change) {
	was, is := a.s.measure(a.d, a.p.Result), a.s.measure(c.Doc, c.Result)
	c.OutsideMM, c.Fill = is.outsideMM-was.outsideMM, is.fill-was.fill
	if c.Kind != ChangeOut && c.Kind != ChangeSplit { // those wires are still bought
		c.CopperKgM = is.copperKgM - was.copperKgM
	}
}

// measured is what a design takes.
type measured struct{ copperKgM, outsideMM, fill float64 }

// copperKgM is the mass of 1 mm² of copper, kg/m: 8890 kg/m³ (IEC 60028).
const copperKgM = 8.89e-3

func (s *Study) measure(d *section.Document, r *rating.Result) (m measured) {
	inv, _ := rating.Take(d, s.cat)
	taken := 0.0
	for _, w := range inv.Wires {
		if w.Metal == section.Copper || w.Metal == section.TinnedCopper {
			m.copperKgM += copperKgM * w.AreaMM2
		}
		if w.Cable == "" {
			taken += math.Pi / 4 * w.OutsideMM * w.OutsideMM
		}
	}
	for _, b := range inv.Bulks {
		taken += math.Pi / 4 * b.OutsideMM * b.OutsideMM
	}
	inside := inv.Holder.WidthMM * inv.Holder.HeightMM
	if inv.Holder.InsideMM > 0 {
		inside = math.Pi / 4 * inv.Holder.InsideMM * inv.Holder.InsideMM
	}
	if k := inv.Holder.Kind; inside > 0 && (k == section.Jacket || k == section.Conduit || k == section.Wireway) {
		m.fill = taken / inside
	}
	for _, sh := range r.Shapes {
		if sh.ID != "" || len(sh.Rings) == 0 {
			continue
		}
		m.outsideMM = 2 * sh.OuterR()
		if sh.Width > 0 {
			m.outsideMM = sh.Width + 2*sh.Rings[len(sh.Rings)-1].R1
		}
	}
	return m
}

// Sentence says what a change does.
func (c *Change) Sentence() string {
	what := fmt.Sprintf("%s: %s K more margin", c.Text, quantity.Fixed(quantity.RoundDown(c.GainK, 1), 1))
	what += fmt.Sprintf("; then %s governs, %s °C, limit %s °C", c.Governs, quantity.Trimmed(quantity.BesideLimit(c.TempC, c.LimitC), 1), quantity.Trimmed(c.LimitC, 1))
	for _, v := range []struct {
		is   float64
		text string
	}{
		{math.Abs(c.CopperKgM) / 0.0005, signed(c.CopperKgM, 3) + " kg/m of copper"},
		{math.Abs(c.OutsideMM) / 0.05, signed(c.OutsideMM, 1) + " mm across"},
		{math.Abs(c.Fill) / 0.001, signed(100*c.Fill, 1) + " points of fill"},
	} {
		if v.is >= 1 {
			what += "; " + v.text
		}
	}
	for _, w := range c.Worse {
		what += "; " + w
	}
	return what + "."
}
