package study

import (
	"fmt"
	"slices"

	"packrise/solver/section"
)

// AtDevices takes loads of unknown current at the rating of their device, the most that they can carry for good. It returns the design with
// those currents, the loads, and a sentence each; the design itself where there are none.
func AtDevices(d *section.Document) (out *section.Document, loads, notes []string) {
	out = d
	for i := range d.Loads {
		l := &d.Loads[i]
		if l.CurrentA.OK || l.HeatWM.OK || l.Protection.Kind == "" || !(l.Protection.RatingA > 0) {
			continue
		}
		a := l.Protection.RatingA
		out = section.ChangeLoad(out, l.ID, func(l *section.Load) { l.CurrentA, l.Unknown = section.Some(a), false })
		loads = append(loads, l.ID)
		notes = append(notes, fmt.Sprintf("the current of %s is unknown and taken at the rating of its device, %s in each conductor", l.ID, Amps(a)))
	}
	return out, loads, notes
}

// assumed counts what was taken at its device's rating, for the sentence; "" for nothing.
func (r *Ratings) assumed() string {
	switch n := len(r.AtDevice); {
	case n == 0:
		return ""
	case n == 1:
		return fmt.Sprintf(" The current of %s is unknown and taken at the rating of its device.", r.AtDevice[0])
	}
	return fmt.Sprintf(" %s of unknown current are taken at the rating of their devices: %s.", count(len(r.AtDevice), "load"), list(slices.Clone(r.AtDevice)))
}
