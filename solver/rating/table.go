package rating

import "packrise/solver/section"

// Table returns the answer as rows for people: part, what it carries, what it makes, temperature, limit, margin, each with
// its unit.
func (r *Result) Table() [][6]string {
	var out [][6]string
	for _, c := range r.Conductors {
		carries := "—"
		switch {
		case c.CurrentA.OK:
			carries = digits(c.CurrentA.V, 3) + " A"
		case !c.LoadKnown:
			carries = "unknown"
		}
		out = append(out, r.row(c.ID, carries, digits(c.HeatWM, 3)+" W/m", c.JudgedC(), c.LimitC))
	}
	for _, o := range r.Others {
		makes := ""
		if o.AbsorbedWM.OK && o.AbsorbedWM.V != 0 {
			makes = minus + digits(o.AbsorbedWM.V, 3) + " W/m"
		}
		out = append(out, r.row(o.ID, "", makes, o.TempC, o.LimitC))
	}
	return out
}

func (r *Result) row(id, carries, makes string, t float64, limit section.Opt[float64]) [6]string {
	lim, left := "none", ""
	if limit.OK {
		lim, left = digits(limit.V, 1)+" °C", margin(t, limit.V)+" K"
	}
	return [6]string{id, carries, makes, degrees(t, limit.V, limit.OK) + " °C", lim, left}
}
