package rules

import (
	"fmt"
	"math"
	"slices"

	"packrise/solver/quantity"
)

// unmarkedUpToA is the circuit up to which an unmarked terminal counts as one of 60 °C, and 1 AWG the size (NEC 110.14(C)(1)).
const unmarkedUpToA = 100

// Terminals returns what the terminals of each conductor in a load permit: for sizes of the NEC the column of table 310.16 of the terminal's rating,
// uncorrected; for sizes in mm² the rated current of a terminal block of that size; or the person's own value. Earths and spares have none.
func (b *Book) Terminals(r Run) (out []Cap) {
	for _, c := range r.Conductors {
		loads := r.circuitsAt(c)
		if c.Role == Earth || len(loads) == 0 {
			continue
		}
		l, ok := r.load(loads[0])
		if !ok {
			continue
		}
		out = append(out, b.terminal(c, l))
	}
	return out
}

func (b *Book) terminal(c Conductor, l Load) Cap {
	cp := Cap{Conductor: c.ID, Load: l.ID, A: math.NaN(), Kind: "unknown", Assumed: l.Terminal == Terminal{}}
	switch {
	case l.Terminal.RatedA > 0:
		cp.A, cp.Kind = l.Terminal.RatedA, "terminal-rated"
		cp.Text = fmt.Sprintf("The terminal of %s is rated %s, as entered.", l.ID, amperes(cp.A))
	case c.american():
		return b.terminalColumn(cp, c, l)
	default:
		return b.terminalBlock(cp, c, l)
	}
	return cp
}

// terminalColumn is NEC 110.14(C).
func (b *Book) terminalColumn(cp Cap, c Conductor, l Load) Cap {
	rating, how := l.Terminal.RatingC, ""
	if rating == 0 {
		rating, how = unmarked(c, l)
	} else if rating < 60 {
		cp.Text = fmt.Sprintf("A terminal of %s °C has no column in %s; write rating_c 60, 75 or 90, or rated_a.", trim(rating), b.terminals.column.name)
		return cp
	}
	cp.Clause, cp.Kind = b.terminals.columnName, "terminal-rating"
	p, why := b.terminals.column.pick(Conductor{Size: c.Size, Metal: c.Metal, RatingC: math.Min(rating, 90)}, "", 0)
	if why != "" {
		cp.Kind = "unknown"
		cp.Text = fmt.Sprintf("%s: %s; write rated_a under terminals of %s.", c.ID, why, l.ID)
		return cp
	}
	cp.A, cp.Memory = p.a, p.column.memory
	cp.Text = fmt.Sprintf("The %s °C terminal of %s permits %s in %s (%s, %s).", trim(p.column.ratingC), l.ID, amperes(p.a), c.Size.Pretty(), cp.Clause, b.terminals.column.name)
	if how != "" {
		cp.Text = fmt.Sprintf("The terminal of %s is not marked and counts as one of %s °C, %s: it permits %s in %s (%s, %s).", l.ID, trim(p.column.ratingC), how, amperes(p.a), c.Size.Pretty(), cp.Clause, b.terminals.column.name)
	}
	return cp
}

// unmarked is the rating of a terminal that nobody stated.
func unmarked(c Conductor, l Load) (ratingC float64, how string) {
	switch device := l.Device.RatingA; {
	case c.Size.Compare(quantity.AWGSize(1)) <= 0:
		return 60, "since the wire is 1 AWG or thinner"
	case device > unmarkedUpToA, device == 0 && l.CurrentA > unmarkedUpToA:
		return 75, "since the circuit is above 100 A"
	case device > 0, l.CurrentA <= unmarkedUpToA:
		return 60, "since the circuit is 100 A or less"
	}
	return 60, "since its circuit is not known to be above 100 A"
}

// terminalBlock is the rated current of IEC 60947-7-1 by the size of the wire.
func (b *Book) terminalBlock(cp Cap, c Conductor, l Load) Cap {
	t := b.terminals
	i := slices.Index(t.sizes, c.Size)
	if i < 0 {
		cp.Text = fmt.Sprintf("%s: %s lists terminals for %s to %s and none for %s; write rated_a under terminals of %s.", c.ID, t.name, t.sizes[0].Pretty(), t.sizes[len(t.sizes)-1].Pretty(), c.sizeWord(), l.ID)
		return cp
	}
	cp.A, cp.Kind, cp.Clause, cp.Memory = t.amperes[i], "terminal-block", t.name, t.memory
	cp.Text = fmt.Sprintf("A terminal for %s is rated %s (%s, from memory).", c.Size.Pretty(), amperes(cp.A), t.name)
	if l.Terminal.RatingC > 0 {
		cp.Text += " Its rating in °C says nothing about its current here."
	}
	return cp
}
