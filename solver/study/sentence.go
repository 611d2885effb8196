package study

import (
	"fmt"
	"math"
	"strings"

	"packrise/solver/heat"
	"packrise/solver/quantity"
	"packrise/solver/rating"
)

// Amps writes a permitted current, rounded down: two decimals below 10 A, one below 100 A, else none. "unlimited" where nothing reaches its limit.
func Amps(a float64) string {
	switch {
	case math.IsNaN(a):
		return "unknown"
	case math.IsInf(a, 1):
		return "unlimited here"
	case a < 10:
		return quantity.Trimmed(quantity.RoundDown(a, 2), 2) + " A"
	case a < 100:
		return quantity.Trimmed(quantity.RoundDown(a, 1), 1) + " A"
	}
	return quantity.Trimmed(quantity.RoundDown(a, 0), 0) + " A"
}

// Percent writes a factor on currents, rounded down.
func Percent(f float64) string {
	if math.IsInf(f, 1) {
		return "any multiple"
	}
	return quantity.Fixed(quantity.RoundDown(100*f, 0), 0) + " %"
}

// words of the states as they begin a sentence.
var stateWord = map[string]string{Within: "Within", Close: "Close", Over: "Over", Undecided: "Undecided"}

// Band returns P5 and P95 (°C) of the i-th thing as loaded (conductors, then others, as in the base result); ok is false before the bands are known.
func (r *Ratings) Band(i int) (low, high float64, ok bool) {
	if r.Bands == nil || i >= len(r.Bands.Spreads) {
		return 0, 0, false
	}
	t, s := things(r.Base)[i], r.Bands.Spreads[i]
	return t.tempC - s.LowK, t.tempC + s.HighK, !math.IsNaN(t.tempC)
}

// governing is the thing that decides the state: the least room with its band, as Sentence names it.
func (r *Ratings) governing() (at int, ok bool) {
	if r.Bands == nil {
		at, _, ok = closest(things(r.Base), nominal)
		return at, ok
	}
	return governs(r.Base, r.Bands.Spreads)
}

// Governs returns the id of what Sentence names, "" where nothing has a limit.
func (r *Ratings) Governs() string {
	at, ok := r.governing()
	if !ok {
		return ""
	}
	return things(r.Base)[at].id
}

// governs is the thing with the least room to its limit, as pictures name it; where only P95 of another passes its limit, that one.
func governs(r *rating.Result, spreads []Spread) (at int, ok bool) {
	list, banded := things(r), rely(spreads, r.AmbientC, 0)
	at, k, ok := closest(list, nominal)
	if !ok || k < 0 || banded(at, list[at]) < 0 {
		return at, ok
	}
	if other, k, _ := closest(list, banded); k < 0 {
		return other, true
	}
	return at, true
}

// Sentence returns the answer: the state with what governs, its band and limit; and the amperes that go with it, to rely on first, each
// code's beside them and the lowest named.
func (r *Ratings) Sentence() (answer, amperes string) {
	if r.Base.Status != heat.Converged {
		answer, _ = r.Base.Sentence()
		return answer + r.assumed(), r.ampereLine(-1)
	}
	at, ok := r.governing()
	if !ok {
		answer, _ = r.Base.Sentence()
		return answer + r.assumed(), ""
	}
	t := things(r.Base)[at]
	var b strings.Builder
	shown := quantity.Trimmed(quantity.BesideLimit(t.tempC, t.limit.V), 1)
	by := " governs"
	if at < len(r.Base.Conductors) && r.Base.Conductors[at].HottestC > r.Base.Conductors[at].TempC+0.05 {
		by += " by its insulation" // beside hotter neighbours
	}
	fmt.Fprintf(&b, "%s. %s%s: %s °C", stateWord[r.StateHere], t.id, by, shown)
	if low, high, ok := r.Band(at); ok {
		fmt.Fprintf(&b, " (%s)", bandText(low, high))
	}
	fmt.Fprintf(&b, ", limit %s °C (%s), margin %s K.", quantity.Trimmed(t.limit.V, 1), t.by, quantity.Trimmed(t.limit.V-quantity.BesideLimit(t.tempC, t.limit.V), 1))
	if r.Heater != "" {
		fmt.Fprintf(&b, " %s heats it: %d %% of its rise.", r.Heater, r.HeaterShare)
	}
	b.WriteString(r.assumed() + r.worstCase())
	return b.String(), r.ampereLine(at)
}

// worstCase is the sentence of the case that is more serious than the loads as written, "" if there is none.
func (r *Ratings) worstCase() string {
	if r.Cases == nil || r.State == r.StateHere {
		return ""
	}
	at := -1
	for i := range r.Cases.List {
		if a := &r.Cases.List[i]; i > 0 && a.State == r.State && (at < 0 || a.Rely.Factor < r.Cases.List[at].Rely.Factor) {
			at = i
		}
	}
	if at < 0 {
		return ""
	}
	return " " + stateWord[r.State] + ". " + r.Cases.List[at].Sentence()
}

// bandText writes a band in whole degrees, outwards.
func bandText(low, high float64) string {
	up := "no bound"
	if !math.IsInf(high, 0) {
		up = quantity.Fixed(math.Ceil(high-1e-9), 0)
	}
	return quantity.Fixed(math.Floor(low+1e-9), 0) + "–" + up
}

// ampereLine is about the governing conductor, or, where another thing governs, the conductor that makes the most heat.
func (r *Ratings) ampereLine(at int) string {
	n := len(r.Base.Conductors)
	if at < 0 || at >= n || !r.Base.Conductors[at].Heats {
		most := -1
		for i, c := range r.Base.Conductors {
			if c.CurrentA.V > 0 && (most < 0 || c.HeatWM > r.Base.Conductors[most].HeatWM || math.IsNaN(c.HeatWM) && c.CurrentA.V > r.Base.Conductors[most].CurrentA.V) {
				most = i
			}
		}
		if most < 0 {
			return "Nothing carries a current."
		}
		at = most
	}
	c := r.Base.Conductors[at]
	var b strings.Builder
	now := c.CurrentA.V
	whichever := ""
	if r.Cases != nil {
		whichever = ", whichever case runs,"
	}
	fmt.Fprintf(&b, "With all loads scaled together%s %s may carry %s to rely on, %s nominal.", whichever, c.ID, Amps(now*r.All.Rely.Factor), Amps(now*r.All.Nominal.Factor))
	if at < len(r.Lowest) {
		r.beside(&b, at)
	}
	return b.String()
}

// beside adds what codes, terminals and devices say, and which is lowest.
func (r *Ratings) beside(b *strings.Builder, at int) {
	l := r.Lowest[at]
	for k := range r.Codes.Outcomes {
		o := &r.Codes.Outcomes[k]
		if a, ok := l.Rules[o.Rule]; ok && !o.Informative {
			fmt.Fprintf(b, " %s: %s.", o.Title, Amps(a))
		}
	}
	if !math.IsNaN(l.Terminal) {
		fmt.Fprintf(b, " %s: %s.", r.Codes.terminal(l.ID), Amps(l.Terminal))
	}
	if math.IsNaN(l.DeviceA) {
		b.WriteString(" Protection unknown: not a device rating.")
	} else {
		fmt.Fprintf(b, " Device: %s.", Amps(l.DeviceA))
	}
	if !math.IsNaN(l.A) {
		because := map[string]string{Computed: "computed", "terminal": "the terminal"}[l.Because]
		if because == "" {
			because = l.Text
		}
		fmt.Fprintf(b, " Lowest: %s (%s).", Amps(l.A), because)
	}
}

// terminal says what caps a conductor at its end, and that nobody has said so where it is assumed.
func (c *Codes) terminal(conductor string) string {
	for i := range c.Caps {
		switch k := &c.Caps[i]; {
		case k.Conductor != conductor:
		case k.Assumed && k.Kind == "terminal-block":
			return "A terminal block, if it ends in one"
		case k.Assumed:
			return "Unmarked terminal"
		}
	}
	return "Terminal"
}
