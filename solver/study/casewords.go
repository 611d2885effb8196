package study

import (
	"fmt"
	"math"

	"packrise/solver/heat"
	"packrise/solver/quantity"
)

// Name is the case in words.
func (a *CaseAnswer) Name() string {
	if a.ID == "" {
		return "Loads as written"
	}
	return "Case " + a.ID
}

// Sentence says what a case comes to.
func (a *CaseAnswer) Sentence() string {
	name := a.Name()
	which := ""
	switch {
	case a.Searched:
		which = " (the worst that was found among too many choices to try all"
		if !math.IsNaN(a.BoundC) {
			which += fmt.Sprintf("; by estimate none takes %s above %s °C", a.Governs, quantity.Fixed(math.Ceil(a.BoundC), 0))
		}
		which += "; " + list(a.Off) + " off)"
	case a.Of > 1:
		which = fmt.Sprintf(" (the worst of %d choices, %s off)", a.Of, list(a.Off))
	}
	if a.Result.Status == heat.ThermalRunaway {
		return fmt.Sprintf("%s%s: no steady temperature exists, %s would keep heating.", name, which, a.Result.RunawayAt)
	}
	l := things(a.Result)
	at, _, ok := closest(l, nominal)
	if !ok {
		return name + which + ": nothing here has a limit."
	}
	t := l[at]
	return fmt.Sprintf("%s%s: %s governs, %s °C, limit %s °C; all its loads together: %s to rely on, %s nominal.", name, which, t.id,
		quantity.Trimmed(quantity.BesideLimit(t.tempC, t.limit.V), 1), quantity.Trimmed(t.limit.V, 1), Percent(a.Rely.Factor), Percent(a.Nominal.Factor))
}
