package rating

import (
	"fmt"
	"math"
	"strings"

	"packrise/solver/heat"
)

// Caution is the standing caution of every window, picture and report.
const Caution = "A calculation aid. Local codes, the maker's data and licensed practice decide; where the code's value is lower, it governs. Joints, faults and damage are not covered."

// State words of an answer.
const (
	Within    = "Within"
	OverWord  = "Over"
	Undecided = "Undecided" // currents are unknown, or nothing has a limit
)

// State returns the state word. While a current is unknown nothing is called within, since its heat is missing.
func (r *Result) State() string {
	switch {
	case r.Over():
		return OverWord
	case r.Governing == nil || len(r.Unassigned) > 0 || r.Status != heat.Converged:
		return Undecided
	}
	return Within
}

// Sentence returns the answer as the two lines that stand on top of the window and of every export: the state word with what governs, and
// what is assumed.
func (r *Result) Sentence() (answer, assumed string) {
	return r.State() + ". " + r.finding(), r.assumptions()
}

func (r *Result) finding() string {
	switch {
	case r.Status == heat.ThermalRunaway && r.Settles <= 0:
		return fmt.Sprintf("No steady temperature exists: %s passes %d °C even with all currents at zero; check the fixed heats and the temperatures held.", r.RunawayAt, hottestC)
	case r.Status == heat.ThermalRunaway:
		return fmt.Sprintf("No steady temperature exists: %s would keep heating. All currents together settle up to %s of these.", r.RunawayAt, share(r.Settles))
	case r.Status == heat.Cancelled:
		return "The calculation was cancelled before it was done."
	case r.Hottest == "" && r.Governing == nil:
		return "Nothing here has a limit."
	}
	var b strings.Builder
	if g := r.Governing; g != nil {
		by := " governs"
		if g.Insulation {
			by = " governs by its insulation"
		}
		fmt.Fprintf(&b, "%s%s: %s °C, limit %s °C (%s), margin %s K.", g.Part, by, degrees(g.TempC, g.LimitC, true), digits(g.LimitC, 1), g.SetBy, margin(g.TempC, g.LimitC))
	} else {
		fmt.Fprintf(&b, "%s is hottest: %s °C; no limit is known.", r.Hottest, degrees(r.hottest(), 0, false))
	}
	if r.Status == heat.StoppedEarly {
		b.WriteString(" The calculation stopped early: its last digits are not settled.")
	}
	return b.String()
}

// share writes a factor below one rounded down to a hundredth.
func share(f float64) string { return digits(math.Floor(f*100)/100, 2) }

func (r *Result) hottest() float64 {
	for _, c := range r.Conductors {
		if c.ID == r.Hottest {
			return c.TempC
		}
	}
	return math.NaN()
}

// assumptions is the second line: unknown loads first, since they make every number too low.
func (r *Result) assumptions() string {
	parts := []string{}
	if n := len(r.Unassigned); n > 0 {
		parts = append(parts, fmt.Sprintf("%s of unknown current left out (%s): too cool", count(n, "conductor"), list(r.Unassigned)))
	}
	parts = append(parts, fmt.Sprintf("Ambient %s °C, %s", digits(r.AmbientC, 1), r.surroundings))
	if n := r.assumedLimits(); n > 0 {
		parts = append(parts, fmt.Sprintf("limit assumed for %s", count(n, "item")))
	}
	return strings.Join(parts, "; ")
}

func (r *Result) assumedLimits() int {
	n := 0
	for _, c := range r.Conductors {
		if c.LimitAssumed {
			n++
		}
	}
	for _, o := range r.Others {
		if o.LimitAssumed {
			n++
		}
	}
	return n
}

func count(n int, what string) string {
	if n == 1 {
		return "1 " + what
	}
	return fmt.Sprintf("%d %ss", n, what)
}

// Balance is the quiet line below a picture: heat in and out, numerical error, time.
func (r *Result) Balance() string {
	if r.field == nil {
		return ""
	}
	out := fmt.Sprintf("heat in %s W/m, out %s W/m", digits(r.Generated, 2), digits(r.Released, 2))
	if r.Absorbed != 0 {
		out += fmt.Sprintf(", taken up by bores %s W/m", digits(r.Absorbed, 2))
	}
	return out + fmt.Sprintf(" · ±%s K numerical · %s ms", digits(math.Max(0.01, math.Ceil(r.ErrorK*100)/100), 2), digits(math.Ceil(r.Seconds*1e3), 0))
}
