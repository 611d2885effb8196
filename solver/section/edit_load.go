package section

import (
	"slices"
	"strings"
)

// LoadOf returns the load that has the conductor, nil if none.
func LoadOf(d *Document, conductor string) *Load {
	for i := range d.Loads {
		if slices.Contains(d.Loads[i].Conductors, conductor) {
			return &d.Loads[i]
		}
	}
	return nil
}

// SetCurrent sets the current of the load that has the conductor (all of that load's conductors follow); a conductor in no load gets a new
// one of its own. amperes not OK means unknown.
func SetCurrent(d *Document, conductor string, amperes Opt[float64]) *Document {
	return setLoad(d, conductor, func(l *Load) {
		l.CurrentA, l.Unknown, l.HeatWM = amperes, !amperes.OK, Opt[float64]{}
	})
}

// SetHeat gives the load that has the conductor a fixed heat in W/m of each conductor, as SetCurrent gives it a current.
func SetHeat(d *Document, conductor string, wattsPerMetre float64) *Document {
	return setLoad(d, conductor, func(l *Load) {
		l.CurrentA, l.Unknown, l.HeatWM, l.FrequencyHz = Opt[float64]{}, false, Some(wattsPerMetre), Opt[float64]{}
	})
}

// Split takes a conductor out of a load that it shares and gives it one of its own that says the same, so that its current can
// be set alone.
func Split(d *Document, conductor string) *Document {
	l := LoadOf(d, conductor)
	if l == nil || len(l.Conductors) == 1 {
		return d
	}
	own := *l
	own.ID, own.Conductors = freshLoadID(d, conductor), []string{conductor}
	return twin(withLoads(unload(d, conductor), func(loads []Load) []Load { return append(loads, own) }), l.ID, own.ID)
}

// Unassign takes a conductor out of its load: it is then in none, which is not the same as idle.
func Unassign(d *Document, conductor string) *Document {
	if LoadOf(d, conductor) == nil {
		return d
	}
	return unload(d, conductor)
}

// unload takes a conductor out of the loads and drops a load that ends up empty, with what is said about it.
func unload(d *Document, conductor string) *Document {
	out := withLoads(d, func(loads []Load) []Load {
		return keepConductors(loads, func(c string) bool { return c != conductor })
	})
	if len(out.Loads) == len(d.Loads) {
		return out
	}
	return tidy(out)
}

func setLoad(d *Document, conductor string, set func(*Load)) *Document {
	if p := Find(d, conductor); p == nil || p.Kind != Core {
		return d
	}
	for i := range d.Loads {
		if !slices.Contains(d.Loads[i].Conductors, conductor) {
			continue
		}
		l := d.Loads[i]
		set(&l)
		if sameLoad(l, d.Loads[i]) {
			return d
		}
		out := withLoads(d, func(loads []Load) []Load { loads[i] = l; return loads })
		if l.HeatWM.OK {
			return fitStates(out)
		}
		return out
	}
	l := Load{ID: freshLoadID(d, conductor), Conductors: []string{conductor}}
	set(&l)
	return withLoads(d, func(loads []Load) []Load { return append(loads, l) })
}

func sameLoad(a, b Load) bool {
	return a.CurrentA == b.CurrentA && a.Unknown == b.Unknown && a.HeatWM == b.HeatWM && a.FrequencyHz == b.FrequencyHz
}

// freshLoadID returns "load-L1", or with a number behind it if that is taken.
func freshLoadID(d *Document, conductor string) string {
	used := map[string]bool{}
	for _, l := range d.Loads {
		used[l.ID] = true
	}
	id := "load-" + strings.ReplaceAll(conductor, "/", "-")
	if !used[id] {
		return id
	}
	return fresh(used, id+"-")
}

// withLoads returns the document with f's loads; f may write into the slice that it is given.
func withLoads(d *Document, f func([]Load) []Load) *Document {
	return d.With(func(d *Document) { d.Loads = noEmpty(f(slices.Clone(d.Loads))) })
}

// keepConductors returns loads with only the conductors that keep says, and without those that end up empty.
func keepConductors(loads []Load, keep func(string) bool) []Load {
	var out []Load
	for _, l := range loads {
		var left []string
		for _, c := range l.Conductors {
			if keep(c) {
				left = append(left, c)
			}
		}
		if len(left) == len(l.Conductors) {
			out = append(out, l)
		} else if len(left) > 0 {
			l.Conductors = left
			out = append(out, l)
		}
	}
	return out
}

// prune takes what is no conductor of the document out of its loads, and what points at parts and loads that are gone.
func prune(d *Document) *Document {
	there := map[string]bool{}
	for _, p := range Unfold(d) {
		there[p.ID] = true
	}
	return tidy(withLoads(d, func(loads []Load) []Load {
		return keepConductors(loads, func(c string) bool { return there[c] })
	}))
}
