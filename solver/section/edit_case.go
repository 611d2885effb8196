package section

import (
	"reflect"
	"slices"
)

// SetCase puts a case in place of the one with its id, or behind the others. Check tells what is wrong with it.
func SetCase(d *Document, c Case) *Document {
	return d.With(func(d *Document) { d.Cases = put(d.Cases, c, func(c *Case) string { return c.ID }) })
}

// put replaces the item with e's id, or appends e.
func put[E any](list []E, e E, id func(*E) string) []E {
	list = slices.Clone(list)
	for i := range list {
		if id(&list[i]) == id(&e) {
			list[i] = e
			return list
		}
	}
	return append(list, e)
}

// RemoveCase takes a case out.
func RemoveCase(d *Document, id string) *Document {
	if CaseNamed(d, id) == nil {
		return d
	}
	return d.With(func(d *Document) {
		d.Cases = noEmpty(slices.DeleteFunc(slices.Clone(d.Cases), func(c Case) bool { return c.ID == id }))
	})
}

// RenameCase gives a case another id. It changes nothing where to is empty, holds a "/" or is taken.
func RenameCase(d *Document, id, to string) *Document {
	if !goodID(to) || CaseNamed(d, id) == nil || CaseNamed(d, to) != nil {
		return d
	}
	return d.With(func(d *Document) {
		d.Cases = mapped(d.Cases, func(c Case) Case {
			if c.ID == id {
				c.ID = to
			}
			return c
		})
	})
}

// FreshCaseID returns "case1", "case2" …, the first that is free.
func FreshCaseID(d *Document) string {
	used := map[string]bool{}
	for _, c := range d.Cases {
		used[c.ID] = true
	}
	return fresh(used, "case")
}

// SetMeasurement puts a measurement in place of the one with its id, or behind the others. Check tells what is wrong with it.
func SetMeasurement(d *Document, m Measurement) *Document {
	return d.With(func(d *Document) {
		d.Measurements = put(d.Measurements, m, func(m *Measurement) string { return m.ID })
	})
}

// RemoveMeasurement takes a measurement out, with its reason.
func RemoveMeasurement(d *Document, id string) *Document {
	if measurementOf(d, id) == nil {
		return d
	}
	return SetReason(d.With(func(d *Document) {
		d.Measurements = noEmpty(slices.DeleteFunc(slices.Clone(d.Measurements), func(m Measurement) bool { return m.ID == id }))
	}), ReasonMeasurement+id, "")
}

// RenameMeasurement gives a measurement another id; its reason follows. It changes nothing where to is empty, holds a "/" or is taken.
func RenameMeasurement(d *Document, id, to string) *Document {
	if !goodID(to) || measurementOf(d, id) == nil || measurementOf(d, to) != nil {
		return d
	}
	return d.With(func(d *Document) {
		d.Measurements = mapped(d.Measurements, func(m Measurement) Measurement {
			if m.ID == id {
				m.ID = to
			}
			return m
		})
		d.Reasons = mapped(d.Reasons, func(v Reason) Reason {
			if v.For == ReasonMeasurement+id {
				v.For = ReasonMeasurement + to
			}
			return v
		})
	})
}

// WithStates returns the document with the states of loads applied: currents as given, and 0 (or a heat of 0) for what is off. Ids of no load, and
// currents of a fixed heat, are left aside.
func WithStates(d *Document, states []CaseLoad) *Document {
	by := map[string]CaseLoad{}
	for _, s := range states {
		by[s.Load] = s
	}
	changed := false
	loads := mapped(d.Loads, func(l Load) Load {
		s, ok := by[l.ID]
		before := l
		switch {
		case !ok:
		case s.Off && l.HeatWM.OK:
			l.HeatWM = Some(0.0)
		case s.Off:
			l.CurrentA, l.Unknown = Some(0.0), false
		case !l.HeatWM.OK:
			l.CurrentA, l.Unknown = Some(s.CurrentA), false
		}
		changed = changed || !reflect.DeepEqual(l, before)
		return l
	})
	if !changed {
		return d
	}
	return d.With(func(d *Document) { d.Loads = loads })
}

// WithCase returns the document with a case's currents and ambient applied. The loads under its `any` run as the design says, all of them: which of
// them run is the caller's to try, with SwitchOff. An unknown id changes nothing.
func WithCase(d *Document, id string) *Document {
	c := CaseNamed(d, id)
	if c == nil {
		return d
	}
	d = WithStates(d, c.Loads)
	if !c.AmbientC.OK || c.AmbientC == d.Surroundings.AmbientC {
		return d
	}
	return d.With(func(d *Document) { d.Surroundings.AmbientC = c.AmbientC })
}

// SwitchOff returns the document with the loads off.
func SwitchOff(d *Document, loads ...string) *Document {
	var states []CaseLoad
	for _, id := range loads {
		states = append(states, CaseLoad{Load: id, Off: true})
	}
	return WithStates(d, states)
}

// ScaleLoads multiplies all known currents; fixed heats stay, unknown currents stay unknown.
func ScaleLoads(d *Document, factor float64) *Document {
	if factor == 1 {
		return d
	}
	return withLoads(d, func(loads []Load) []Load {
		return mapped(loads, func(l Load) Load {
			if l.CurrentA.OK {
				l.CurrentA.V *= factor
			}
			return l
		})
	})
}
