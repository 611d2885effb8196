package ui

import (
	"math"
	"slices"
	"strings"

	"packrise/solver/quantity"
	"packrise/solver/rules"
	"packrise/solver/study"
)

// wireRated is what the ratings say of one row; NaN where they say nothing.
type wireRated struct {
	band                  string  // "72–89"
	upper                 float64 // P95, °C
	rely, nominal, lowest float64 // A, all loads scaled together; lowest of these and of codes and terminal
	because               string  // what the lowest was compared with, for the tip
}

var unrated = wireRated{upper: math.NaN(), rely: math.NaN(), nominal: math.NaN(), lowest: math.NaN()}

// close tells whether the band reaches over a limit that the temperature keeps.
func (r wireRow) close() bool {
	k, ok := r.margin()
	return ok && k >= 0 && r.upper > r.limit.V
}

// ampereCell writes a permitted current, rounded down, without the unit, which stands in the header.
func ampereCell(a float64) string {
	if math.IsNaN(a) {
		return ""
	}
	if math.IsInf(a, 1) {
		return "any"
	}
	return strings.TrimSuffix(study.Amps(a), " A")
}

// rate fills in what is known of the part or layer of that id.
func (f *wireFacts) rate(row *wireRow, id string) {
	r := f.rated
	if r == nil {
		return
	}
	if low, high, ok := bandOf(r, id); ok {
		row.band, row.upper = bandWords(low, high), high
	}
	i := indexIn(r.Base, id)
	if i < 0 || i >= len(r.Base.Conductors) {
		return
	}
	if now := r.Base.Conductors[i].CurrentA; now.OK && now.V > 0 {
		row.rely, row.nominal = now.V*r.All.Rely.Factor, now.V*r.All.Nominal.Factor
	}
	if i < len(r.Lowest) {
		row.lowest, row.because = r.Lowest[i].A, lowestWords(r, &r.Lowest[i])
	}
}

// lowestWords names what the lowest current is, and the others that it was compared with.
func lowestWords(r *study.Ratings, l *study.Lowest) string {
	if math.IsNaN(l.A) {
		return ""
	}
	beside := besideWords(r, l)
	text := "Lowest: " + study.Amps(l.A) + ", " + lowestName(l) + "."
	if len(beside) > 0 {
		text += " Of " + strings.Join(beside, "; ") + "."
	}
	return text
}

// lowestName is what sets the lowest current.
func lowestName(l *study.Lowest) string {
	switch l.Because {
	case study.Computed:
		return "computed, to rely on"
	case "terminal":
		return "the terminal"
	}
	return l.Text
}

// besideWords lists what was compared: computed, every code that counts, the terminal. Amperes are compared, never factors.
func besideWords(r *study.Ratings, l *study.Lowest) (out []string) {
	if !math.IsNaN(l.Computed) {
		out = append(out, study.Amps(l.Computed)+" computed")
	}
	if r.Codes == nil {
		return out
	}
	for k := range r.Codes.Outcomes {
		o := &r.Codes.Outcomes[k]
		if a, ok := l.Rules[o.Rule]; ok && !o.Informative {
			out = append(out, study.Amps(a)+" by "+o.Title)
		}
	}
	if !math.IsNaN(l.Terminal) {
		out = append(out, study.Amps(l.Terminal)+" by "+terminalName(r, l.ID))
	}
	return out
}

// terminalName is what caps a conductor's current at its end, and that nobody has said so where it is assumed.
func terminalName(r *study.Ratings, conductor string) string {
	i := slices.IndexFunc(r.Codes.Caps, func(c rules.Cap) bool { return c.Conductor == conductor })
	if i < 0 || !r.Codes.Caps[i].Assumed {
		return "its terminal"
	}
	if r.Codes.Caps[i].Kind == "terminal-block" {
		return "a terminal block, if it ends in one"
	}
	return "an unmarked terminal"
}

// factorWords writes a factor rounded down to a hundredth.
func factorWords(f float64) string { return quantity.Fixed(quantity.RoundDown(f, 2), 2) }
