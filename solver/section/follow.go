package section

import (
	"slices"
	"strings"
)

// follow renames what the document's references point at; the parts and loads themselves have their new names already. Either map may be nil.
func follow(d *Document, parts, loads map[string]string) *Document {
	return rewrite(d, func(id string) string { return renamed(parts, id) }, func(id string) string { return renamed(loads, id) })
}

func renamed(names map[string]string, id string) string {
	if to, ok := names[id]; ok {
		return to
	}
	return id
}

// tidy takes out references to parts and loads that are no longer there, and numbers of loads that are now fixed heats.
func tidy(d *Document) *Document {
	t := targetsOf(d)
	return fitStates(rewrite(d, func(id string) string {
		if t.parts[id] == nil {
			return ""
		}
		return id
	}, func(id string) string {
		if t.loads[id] == nil {
			return ""
		}
		return id
	}))
}

// rewrite returns the document with every reference to a part and a load replaced; "" takes it out with what has no sense without it.
func rewrite(d *Document, part, load func(string) string) *Document {
	w := rewriter{targetsOf(d), part, load}
	return d.With(func(d *Document) {
		d.Loads = noEmpty(mapped(d.Loads, w.ofLoad))
		d.Cases = noEmpty(mapped(d.Cases, w.ofCase))
		d.Rules.AtMost = w.choices(d.Rules.AtMost)
		d.Measurements = kept(d.Measurements, w.measurement)
		d.Reasons = kept(d.Reasons, func(v Reason) (Reason, bool) {
			if id, ok := strings.CutPrefix(v.For, ReasonMeasurement); ok {
				return v, measurementOf(d, id) != nil
			}
			return w.reason(v)
		})
	})
}

type rewriter struct {
	*targets
	part, load func(string) string
}

// kept applies f, and leaves out the items of which f says so.
func kept[E any](list []E, f func(E) (E, bool)) []E {
	var out []E
	for _, e := range list {
		if e, ok := f(e); ok {
			out = append(out, e)
		}
	}
	return out
}

func names(list []string, f func(string) string) []string {
	return kept(list, func(id string) (string, bool) { id = f(id); return id, id != "" })
}

func (w rewriter) ofLoad(l Load) Load {
	l.Conductors = names(l.Conductors, w.part)
	l.NotWith = names(l.NotWith, w.load)
	if l.Neutral != "" {
		l.Neutral = w.part(l.Neutral)
	}
	if p := w.parts[l.Neutral]; p == nil || p.Kind != Core || p.Role != "" && p.Role != RoleNeutral {
		l.Neutral = ""
	}
	return l
}

func (w rewriter) ofCase(c Case) Case {
	c.Loads, c.Any = w.states(c.Loads), w.choices(c.Any)
	return c
}

func (w rewriter) choices(list []AnyOf) []AnyOf {
	return kept(list, func(a AnyOf) (AnyOf, bool) {
		a.Of = names(a.Of, w.load)
		a.Count = min(a.Count, len(a.Of))
		return a, len(a.Of) > 0
	})
}

func (w rewriter) states(list []CaseLoad) []CaseLoad {
	return kept(list, func(s CaseLoad) (CaseLoad, bool) { s.Load = w.load(s.Load); return s, s.Load != "" })
}

func (w rewriter) measurement(m Measurement) (Measurement, bool) {
	m.Loads = w.states(m.Loads)
	m.At = w.place(m.At)
	return m, m.At != ""
}

// place follows the name of a part, or of the wall of a cable.
func (w rewriter) place(at string) string {
	if to := w.part(at); to != "" && to != at || w.parts[at] != nil || w.surface(at) {
		return renamedOr(to, at)
	}
	cable, wall, ok := cutLast(at, "/"+Jacket)
	if to := w.part(cable) + wall; ok && w.surface(to) {
		return to
	}
	return ""
}

func renamedOr(to, at string) string {
	if to == "" {
		return at
	}
	return to
}

// cutLast splits before the last occurrence of sep.
func cutLast(s, sep string) (before, after string, ok bool) {
	if i := strings.LastIndex(s, sep); i >= 0 {
		return s[:i], s[i:], true
	}
	return s, "", false
}

func (w rewriter) reason(v Reason) (Reason, bool) {
	id, ok := strings.CutPrefix(v.For, ReasonLimit)
	if !ok {
		return v, true
	}
	to := w.part(id)
	v.For = ReasonLimit + to
	return v, to != ""
}

// twin gives a load that was made from another what is said about that one.
func twin(d *Document, from, to string) *Document {
	states := func(list []CaseLoad) []CaseLoad {
		for _, s := range list {
			if s.Load == from {
				s.Load = to
				return append(slices.Clip(list), s)
			}
		}
		return list
	}
	return d.With(func(d *Document) {
		d.Loads = mapped(d.Loads, func(l Load) Load {
			if slices.Contains(l.NotWith, from) {
				l.NotWith = append(slices.Clip(l.NotWith), to)
			}
			return l
		})
		d.Cases = mapped(d.Cases, func(c Case) Case { c.Loads = states(c.Loads); return c })
		d.Measurements = mapped(d.Measurements, func(m Measurement) Measurement { m.Loads = states(m.Loads); return m })
	})
}

// fitStates takes currents of loads that are fixed heats out of cases and measurements.
func fitStates(d *Document) *Document {
	heats := map[string]bool{}
	for _, l := range d.Loads {
		heats[l.ID] = l.HeatWM.OK
	}
	wrong := func(s CaseLoad) bool { return heats[s.Load] && !s.Off }
	fit := func(list []CaseLoad) []CaseLoad {
		return kept(list, func(s CaseLoad) (CaseLoad, bool) { return s, !wrong(s) })
	}
	return d.With(func(d *Document) {
		d.Cases = mapped(d.Cases, func(c Case) Case { c.Loads = fit(c.Loads); return c })
		d.Measurements = mapped(d.Measurements, func(m Measurement) Measurement { m.Loads = fit(m.Loads); return m })
	})
}
