package rules

import (
	"fmt"
	"math"
	"strings"

	"packrise/solver/quantity"
)

const feet = 0.3048 // m

// rateHarness rates a harness: free air, bundle, altitude, and the whole-harness line.
func (u rule) rateHarness(r Run, out *Outcome) {
	h := u.harness
	loaded, n := u.loadedShare(r), 0
	if len(out.Counts) > 0 {
		n = out.Counts[0].N
	}
	for _, c := range r.Conductors {
		out.Conductors = append(out.Conductors, u.rateWire(r, c, n, loaded))
	}
	col := nextRow(h.bundle.loaded, loaded)
	if n > 0 && col < len(h.bundle.loaded) {
		out.remark("loaded", nil, fmt.Sprintf("%d of %s can be loaded at once, which is the %s %% curve of the bundle factors; %s %% is the share of the harness's capacity that may be in use.",
			int(math.Round(loaded*float64(n))), numbered(n, "wire"), trim(100*h.bundle.loaded[col]), trim(100*h.bundle.loaded[col])))
		out.Harness = u.wholeHarness(r, out, h.bundle.loaded[col])
	}
	u.finish(r, out)
	out.Factor = math.NaN()
}

// loadedShare is the largest share of the wires that can be loaded at once. It reads no current.
func (u rule) loadedShare(r Run) float64 {
	weights := map[string]int{}
	wires := 0
	for _, c := range r.Conductors {
		if c.Role == Earth {
			continue
		}
		wires++
		if l, ok := r.load(c.Load); ok && c.Role != Spare && c.Role != Signal {
			weights[l.ID]++
		}
	}
	on, _ := energised(r.Loads, r.AtMost, func(id string) int { return weights[id] })
	loaded := 0
	for id, running := range on {
		if running {
			loaded += weights[id]
		}
	}
	return float64(loaded) / float64(max(1, wires))
}

// rateWire rates one wire by the curves, or by the table for the harshest conditions where a curve isn't held for it.
func (u rule) rateWire(r Run, c Conductor, n int, loaded float64) Rated {
	none := func(why string) Rated { return Rated{ID: c.ID, A: math.NaN(), Why: c.ID + ": " + why + "."} }
	switch {
	case c.Role == Earth:
		return none("an earth carries no current in service, so it is not rated")
	case !(c.RatingC > 0):
		return none("its temperature rating is unknown; write its type or limit_c")
	case metalOf(c.Metal) != copper:
		return none("the curves are for copper")
	case c.RatingC <= r.AmbientC:
		return none(fmt.Sprintf("its rating of %s °C is not above the ambient of %s °C", trim(c.RatingC), trim(r.AmbientC)))
	}
	steps, why := u.byCurves(r, c, n, loaded)
	if why == "" {
		return Rated{ID: c.ID, A: steps[len(steps)-1].To, Steps: steps}
	}
	d, whyTable := u.byTable(r, c, n, loaded)
	if whyTable != "" {
		return none(why + "; " + whyTable)
	}
	return d
}

// byCurves is free air from the difference between rating and ambient, then the bundle, then thin air.
func (u rule) byCurves(r Run, c Conductor, n int, loaded float64) (steps []Step, why string) {
	h := u.harness
	k := c.RatingC - r.AmbientC
	p, ok := h.freeAir.at(c.Size, k)
	if !ok {
		if held := h.freeAir.held(c.Size); len(held) > 0 {
			return nil, fmt.Sprintf("the free-air curve of %s is held from %s K up and this wire has %s K", c.sizeWord(), trim(held[0]), trim(k))
		}
		return nil, "the free-air curve of " + c.sizeWord() + " is not held"
	}
	label := fmt.Sprintf("%s in free air, %s °C less %s °C is %s K", c.sizeWord(), trim(c.RatingC), trim(r.AmbientC), trim(k))
	if p.k < k-1e-9 {
		label += ", point of " + trim(p.k) + " K"
	}
	steps = append(steps, base(p.ampere, label, h.freeAir.name, h.freeAir.memory))
	f, label, why := h.bundle.pick(n, loaded)
	if why != "" {
		return nil, why
	}
	steps = append(steps, times(StepCount, p.ampere, f, label, h.bundle.name, h.bundle.memory))
	g, label, why := h.altitude.pick(r.AltitudeM)
	if why != "" {
		return nil, why
	}
	return append(steps, times(StepAltitude, p.ampere*f, g, label, h.altitude.name, h.altitude.memory)), ""
}

// byTable takes the table's current where the harness is nowhere harsher than the table's conditions.
func (u rule) byTable(r Run, c Conductor, n int, loaded float64) (d Rated, why string) {
	h := u.harness
	thick := c.Size.Compare(h.thick) >= 0
	switch {
	case r.AmbientC > h.tableC:
		return d, fmt.Sprintf("%s is for an ambient up to %s °C", u.currents.name, trim(h.tableC))
	case loaded > h.tableShare+1e-9:
		return d, fmt.Sprintf("%s is for at most %s %% of the harness's capacity in use, and %s %% of the wires can be loaded at once", u.currents.name, trim(100*h.tableShare), quantity.Trimmed(100*loaded, 0))
	case r.AltitudeM/feet > h.tableFt+1:
		return d, fmt.Sprintf("%s is for altitudes up to %s ft", u.currents.name, trim(h.tableFt))
	case thick && n > h.thickWires:
		return d, fmt.Sprintf("%s is for at most %d wires of %s and thicker", u.currents.name, h.thickWires, h.thick.Pretty())
	}
	p, why := u.currents.pick(c, "", 0)
	if why != "" {
		return d, why
	}
	s := base(p.a, p.label+", "+strings.TrimPrefix(u.currents.conditions, "tinned copper, "), p.column.clause, p.column.memory)
	return Rated{ID: c.ID, A: p.a, Steps: []Step{s}}, ""
}

// pick returns the factor for so many wires with a share of them loaded; the next row and the next curve count.
func (b *bundle) pick(n int, loaded float64) (f float64, label, why string) {
	row := min(nextRow(b.upTo, float64(max(n, 1))), len(b.upTo)-1)
	col := nextRow(b.loaded, loaded)
	if col == len(b.loaded) || math.IsNaN(b.factors[row][col]) {
		return 0, "", fmt.Sprintf("%s is held for %s wires only up to %s %% loaded, and %s %% of these can be", b.name, b.rowWord(row), trim(100*b.held(row)), quantity.Trimmed(100*loaded, 0))
	}
	return b.factors[row][col], fmt.Sprintf("%s, %s %% curve, row of %s", numbered(n, "wire"), trim(100*b.loaded[col]), b.rowWord(row)), ""
}

func (b *bundle) rowWord(row int) string {
	if row == len(b.upTo)-1 {
		return trim(b.upTo[row]) + " and more"
	}
	return trim(b.upTo[row])
}

// held is the largest share for which a row has a factor.
func (b *bundle) held(row int) (share float64) {
	for i, f := range b.factors[row] {
		if !math.IsNaN(f) {
			share = b.loaded[i]
		}
	}
	return share
}

// pick returns the factor of an altitude in m; the next higher one counts.
func (a *altitude) pick(m float64) (f float64, label, why string) {
	ft := m / feet
	i := nextRow(a.upToFt, ft-1) // a foot of rounding between metres and feet
	if i == len(a.upToFt) {
		return 0, "", fmt.Sprintf("%s ft is above %s, which ends at %s ft; nothing is extrapolated", quantity.Trimmed(ft, 0), a.name, trim(a.upToFt[i-1]))
	}
	if i == 0 {
		return a.factors[i], "sea level", ""
	}
	return a.factors[i], fmt.Sprintf("altitude %s ft, row of %s ft", quantity.Trimmed(ft, 0), trim(a.upToFt[i])), ""
}

// wholeHarness adds up the capacities, each rounded down to a tenth of an ampere as the circular does.
func (u rule) wholeHarness(r Run, out *Outcome, share float64) *Harness {
	h := &Harness{Share: share}
	for i, d := range out.Conductors {
		if r.Conductors[i].Role == Earth {
			continue
		}
		if math.IsNaN(d.A) {
			return nil
		}
		h.CapacityA += quantity.RoundDown(d.A, 1)
		if l, ok := r.load(r.Conductors[i].Load); ok && r.Conductors[i].Role != Spare {
			h.SumA += l.CurrentA
		}
	}
	h.LimitA = share * h.CapacityA
	h.Text = fmt.Sprintf("The wires together may carry %s: %s %% of the harness's capacity of %s (%s).", amperes(h.LimitA), trim(100*share), amperes(h.CapacityA), u.name)
	switch {
	case math.IsNaN(h.SumA):
		h.Text += " What the loads add up to is unknown."
	case h.SumA > h.LimitA+1e-9:
		h.Text += " The loads add up to " + needed(h.SumA) + ", which is over."
	default:
		h.Text += " The loads add up to " + needed(h.SumA) + "."
	}
	return h
}
