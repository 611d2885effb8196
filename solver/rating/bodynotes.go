package rating

import (
	"fmt"
	"math"

	"packrise/solver/film"
	"packrise/solver/heat"
	"packrise/solver/section"
)

// addOutsides adds the outside of every body: "outside" the hottest, which counts where one is asked for, the others "outside of …".
func (s *scene) addOutsides(r *Result, h *heat.Result, t limit) {
	hot, of := math.Inf(-1), 0
	at := func(k int) float64 { w := h.Bodies[k].WallMax; return w[len(w)-1] }
	for k := range s.bodies {
		if v := at(k); v > hot+1e-6 {
			hot, of = v, k
		}
	}
	add := func(id string, k int) {
		r.Others = append(r.Others, Other{ID: id, Kind: "surface", TempC: at(k), LimitC: t.c, LimitBy: t.by})
	}
	add("outside", of)
	for k := range s.bodies {
		if k != of {
			add("outside of "+s.bodyName(&s.bodies[k]), k)
		}
	}
}

// mayBeHigh ends every sentence on what is left out between bodies.
const mayBeHigh = ", so the rating may be too high"

// bodyNotes say what stands for the neighbours of bodies apart.
func (s *scene) bodyNotes(a answered) []string {
	if !s.apart() || a.heat == nil || a.status == heat.ThermalRunaway || len(s.bodies) < 2 {
		return nil
	}
	d := s.doc.Surroundings
	hot := 0
	for k, b := range a.heat.Bodies {
		if b.WallMax[0] > a.heat.Bodies[hot].WallMax[0] {
			hot = k
		}
	}
	out := []string{fmt.Sprintf("%d bodies apart; the hottest outside is that of %s", len(s.bodies), s.bodyName(&s.bodies[hot]))}
	switch d.Kind {
	case section.FixedFilm:
		return append(out, "the fixed film counts for every body alike, whatever lies beside it"+mayBeHigh)
	case section.Buried:
		return append(out, "buried bodies warm each other by superposition, each as a line of heat in the soil (IEC 60287-2-1, groups of buried cables); their depths are taken from the middle of the section")
	case section.Water:
		return append(out, "how bodies shelter each other in water is not reckoned"+mayBeHigh)
	}
	out = append(out, "bodies radiate to each other and past each other by their view factors, each outside at one temperature")
	switch {
	case d.Kind == section.Vacuum:
		return out
	case d.Kind == section.MovingAir && d.AirSpeedMS.V > 0:
		return append(out, "how bodies shelter each other in moving air is not reckoned, each meets the flow as if alone"+mayBeHigh)
	case d.Run == section.Vertical:
		return append(out, "no constants are published for bodies beside each other on a vertical run; each has its convection as if alone"+mayBeHigh)
	}
	return append(out, s.rowNotes(a)...)
}

// rowNotes say which published rows count, and where they are stretched.
func (s *scene) rowNotes(a answered) (out []string) {
	rows := s.rows()
	least, at, far := 2.0, 0, 0
	var many, unequal, crossed, uneven, beyond, tight []string
	for k := range rows {
		st := &rows[k]
		b := &s.bodies[k]
		name := s.bodyName(b)
		note := func(to *[]string, when bool) {
			if when {
				*to = append(*to, name)
			}
		}
		note(&many, len(st.of) > 3)
		note(&unequal, st.unequal)
		note(&crossed, st.crossed)
		note(&uneven, st.uneven && !st.crossed)
		note(&beyond, st.beyond && !st.far)
		note(&tight, st.nearGap < tightGap*b.diameterM())
		if st.far {
			far++
			continue
		}
		rise := a.heat.Bodies[k].WallMean - s.doc.Surroundings.AmbientC.V
		if c := st.row.Sheltered(b.diameterM(), st.row.Open(), rise); c < least {
			least, at = c, k
		}
	}
	say := func(ids []string, format string) {
		if len(ids) > 0 {
			out = append(out, fmt.Sprintf(format, list(ids)))
		}
	}
	if least <= 1 {
		out = append(out, fmt.Sprintf("neighbours leave %s %s %% of the convection of a body alone, by the group constants of IEC 60287-2-1 for %s, %s diameters apart, straight between the spacings that it has",
			s.bodyName(&s.bodies[at]), digits(100*least, 0), rowName(rows[at].row), digits(rows[at].row.Gap, 2)))
	}
	if far == len(rows) {
		out = append(out, "the bodies are too far apart for the group constants of IEC 60287-2-1 (they reach to 0.5 or 0.75 diameters side by side, 2 or 4 above each other); each has its convection as if alone")
	}
	say(many, "the group constants of IEC 60287-2-1 end at three cables; %s count as one of three"+mayBeHigh)
	say(unequal, "the group constants are for equal cables; %s differ from their neighbours and count as equal"+mayBeHigh)
	say(crossed, "no constants are published for bodies both beside and above each other, or askew; for %s the row that leaves least counts alone"+mayBeHigh)
	say(uneven, "the gaps beside %s differ: the smaller counts on both sides")
	say(beyond, "the group constants end at a diameter of 150 mm, and %s is thicker"+mayBeHigh)
	say(tight, "%s lie too close to a neighbour for air to pass between; the group constants of touching cables are the nearest there are"+mayBeHigh)
	return out
}

// rowName words a row.
func rowName(r film.Row) string {
	n := map[int]string{2: "two cables", 3: "three cables"}[r.N]
	switch r.Arrangement {
	case film.Trefoil:
		return n + " in trefoil"
	case film.OneAboveAnother:
		return n + " above each other"
	}
	return n + " side by side"
}
