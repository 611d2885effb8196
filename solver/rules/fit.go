package rules

import (
	"fmt"
	"math"
	"strings"

	"packrise/solver/catalog"
	"packrise/solver/quantity"
)

// Bounds of the jam ratio in which three equal conductors can wedge side by side in a bend, and the widening of a bent conduit (from memory; common
// practice in cable pulling).
const (
	jamLow, jamHigh = 2.8, 3.2
	jamBend         = 1.05
)

// JamOf returns the jam ratio 1.05·ID/OD of three equal conductors in a conduit; for anything else the ratio is not defined, and Text says so.
func JamOf(r Run) Jam {
	rooms := r.rooms()
	switch {
	case r.Holder.Kind != Conduit || !(r.Holder.InsideMM > 0):
		return Jam{Text: "The jam ratio is defined for conductors drawn into a conduit."}
	case len(rooms) != 3:
		return Jam{Text: fmt.Sprintf("The jam ratio is defined for three equal conductors; here are %d.", len(rooms))}
	}
	d := rooms[0].outside
	for _, p := range rooms {
		if !(p.outside > 0) {
			return Jam{Text: "The jam ratio needs the outside diameter of " + p.id + "."}
		}
		if math.Abs(p.outside-d) > 0.02*d {
			return Jam{Text: "The jam ratio is defined for three equal conductors; these differ in diameter, so nothing is said."}
		}
	}
	j := Jam{Defined: true, Ratio: jamBend * r.Holder.InsideMM / d}
	j.Alarm = j.Ratio >= jamLow && j.Ratio <= jamHigh
	j.Text = fmt.Sprintf("Jam ratio 1.05 × %s mm / %s mm = %s", trim(r.Holder.InsideMM), quantity.Trimmed(d, 2), quantity.Fixed(j.Ratio, 2))
	if j.Alarm {
		j.Text += ", between 2.8 and 3.2: three equal conductors can wedge side by side in a bend (from memory)."
	} else {
		j.Text += ", outside 2.8 to 3.2 (from memory)."
	}
	return j
}

// NextHolder returns the smallest holder of the same family of the catalogue that holds the run within the rule's limit of fill, with that fill; ok is
// false when the rule has no such limit or no listed holder is large enough.
func (b *Book) NextHolder(r Run, id string, cat *catalog.Catalog) (h catalog.Holder, f Fill, ok bool) {
	u := b.find(id)
	if u == nil || u.fill == nil {
		return h, f, false
	}
	family := familyOf(r.Holder)
	for _, try := range cat.Holders() {
		if familyOf(Holder{Kind: try.Kind, Stock: try.ID}) != family {
			continue
		}
		next := r
		next.Holder = Holder{Kind: try.Kind, Stock: try.ID, InsideMM: 1e3 * try.InsideM, WidthMM: 1e3 * try.WidthM, HeightMM: 1e3 * try.HeightM, Metal: r.Holder.Metal, LengthM: r.Holder.LengthM}
		g := u.fillOf(next)
		if g == nil || g.Over || len(g.Unknown) > 0 || ok && g.InsideMM2 >= f.InsideMM2 {
			continue
		}
		h, f, ok = try, *g, true
	}
	return h, f, ok
}

// familyOf is what holders of one trade family share: emt, wireway, trunking-pvc. A holder of its own sizes is looked for among the usual family.
func familyOf(h Holder) string {
	if metric, found := strings.CutPrefix(h.Stock, "m"); found && strings.Trim(metric, "0123456789") != metric {
		return "m" + strings.TrimLeft(metric, "0123456789")
	}
	if i := strings.IndexAny(h.Stock, "0123456789"); i > 0 && h.Stock[i-1] == '-' {
		return h.Stock[:i-1]
	}
	if name, _, found := strings.Cut(h.Stock, "-"); found {
		return name
	}
	switch {
	case h.Kind == Conduit && h.Metal:
		return "emt"
	case h.Kind == Conduit:
		return "pvc40"
	case h.Kind == Wireway && h.Metal:
		return "wireway"
	}
	return "trunking-pvc"
}
