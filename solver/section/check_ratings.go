package section

import (
	"fmt"
	"strings"
)

func checkTerminals(r *report, t *Terminals, at path) {
	if t.RatingC.OK && t.RatedA.OK {
		r.addWhole(at, "one-of", "¤ has both rating_c and rated_a", "keep one of them")
	}
}

// known names what the references of the block of ratings point at.
type targets struct {
	doc     *Document
	parts   map[string]*Part
	loads   map[string]*Load
	loadIDs []string
	partIDs []string
}

func targetsOf(d *Document) *targets {
	t := &targets{doc: d, parts: map[string]*Part{}, loads: map[string]*Load{}}
	for _, p := range UnfoldAll(d) {
		t.parts[p.ID] = p.Part
		t.partIDs = append(t.partIDs, p.ID)
	}
	for i := range d.Loads {
		if l := &d.Loads[i]; l.ID != "" && t.loads[l.ID] == nil {
			t.loads[l.ID] = l
			t.loadIDs = append(t.loadIDs, l.ID)
		}
	}
	return t
}

// checkRatings looks at what the block of ratings says about the rest of the document.
func checkRatings(r *report, d *Document) {
	t := targetsOf(d)
	for i := range d.Loads {
		t.checkNeutral(r, &d.Loads[i], path("").key("loads").at(i).key("neutral"))
		t.checkNotWith(r, &d.Loads[i], path("").key("loads").at(i).key("not_with"))
	}
	t.checkCases(r)
	t.checkChoices(r, d.Rules.AtMost, path("").key("rules").key("at_most"), nil, "")
	t.checkMeasurements(r)
	t.checkReasons(r)
}

// load reports an id that is no load's.
func (t *targets) load(r *report, id string, at path) *Load {
	l := t.loads[id]
	if l == nil && id != "" {
		do := "take it out, or add a load with that id"
		if near := nearest(id, t.loadIDs); near != "" {
			do = "did you mean " + show(near) + "?"
		}
		r.add(at, "unknown-load", "there is no load "+show(id), do)
	}
	return l
}

func (t *targets) checkNeutral(r *report, l *Load, at path) {
	if l.Neutral == "" {
		return
	}
	switch p := t.parts[l.Neutral]; {
	case p == nil:
		var cores []string
		for _, id := range t.partIDs {
			if t.parts[id].Kind == Core {
				cores = append(cores, id)
			}
		}
		r.add(at, "unknown-conductor", "there is no conductor "+show(l.Neutral), conductorAdvice(l.Neutral, cores), l.Neutral)
	case p.Kind == Cable || p.Kind == Rod:
		r.add(at, "not-a-conductor", fmt.Sprintf("%s is a %s and no conductor", show(l.Neutral), p.Kind), "name the neutral conductor", l.Neutral)
	case p.Role != "" && p.Role != RoleNeutral && has(roles, p.Role):
		r.add(at, "contradiction", fmt.Sprintf("%s is named as the neutral and its role is %s", show(l.Neutral), p.Role), "write role: neutral for it, or name another conductor", l.Neutral)
	}
}

func (t *targets) checkNotWith(r *report, l *Load, at path) {
	seen := map[string]bool{}
	for i, id := range l.NotWith {
		switch at := at.at(i); {
		case id == l.ID:
			r.add(at, "contradiction", "it can't be energised together with itself", "name the other load, or take it out")
		case seen[id]:
			r.add(at, "duplicate-name", "load "+show(id)+" is named twice", "take one of them out")
		default:
			t.load(r, id, at)
		}
		seen[id] = true
	}
}

func (t *targets) checkCases(r *report) {
	excluded := exclusions(t.doc)
	seen := map[string]bool{}
	for i := range t.doc.Cases {
		c, at := &t.doc.Cases[i], path("").key("cases").at(i)
		if r.full() {
			return
		}
		if seen[c.ID] && c.ID != "" {
			r.add(at.key("id"), "duplicate-id", "its id is also that of a case before it", "give one of them another id")
		}
		seen[c.ID] = true
		states := t.checkStates(r, c.Loads, at.key("loads"))
		t.checkChoices(r, c.Any, at.key("any"), states, "any")
		for _, s := range c.Loads {
			for other := range excluded[s.Load] {
				if o, ok := states[other]; ok && s.Load < other && s.on() && o.on() {
					r.add(at.key("loads").key(s.Load), "contradiction", fmt.Sprintf("loads %s and %s both run, but can't be energised together", show(s.Load), show(other)), "write off for one of them")
				}
			}
		}
	}
}

// on tells whether the load carries a current.
func (s CaseLoad) on() bool { return !s.Off && s.CurrentA > 0 }

func (t *targets) checkStates(r *report, states []CaseLoad, at path) map[string]CaseLoad {
	byLoad := map[string]CaseLoad{}
	for _, s := range states {
		byLoad[s.Load] = s
		if l := t.load(r, s.Load, at.key(s.Load)); l != nil && l.HeatWM.OK && !s.Off {
			r.add(at.key(s.Load), "contradiction", "load "+show(s.Load)+" is a fixed heat and takes no current", "write off, or take it out")
		}
	}
	return byLoad
}

// checkChoices keeps counts to what there is and, in a case (where is then "any"), a load to one place.
func (t *targets) checkChoices(r *report, choices []AnyOf, at path, states map[string]CaseLoad, where string) {
	taken := map[string]bool{}
	for i, a := range choices {
		at := at.at(i)
		if where == "" {
			taken = map[string]bool{}
		}
		for j, id := range a.Of {
			at := at.key("of").at(j)
			switch _, given := states[id]; {
			case given:
				r.add(at, "contradiction", "load "+show(id)+" stands under loads and in any", "take it out of one of them")
			case taken[id] && where == "any":
				r.add(at, "contradiction", "load "+show(id)+" stands twice in any", "take it out of one of them")
			case taken[id]:
				r.add(at, "duplicate-name", "load "+show(id)+" is named twice", "take one of them out")
			default:
				t.load(r, id, at)
			}
			taken[id] = true
		}
		if a.Count > len(a.Of) {
			r.add(at.key("count"), "number-range", fmt.Sprintf("¤ is %d, more than the %d loads that it is about", a.Count, len(a.Of)), "write at most "+fmt.Sprint(len(a.Of)))
		}
	}
}

func (t *targets) checkMeasurements(r *report) {
	seen := map[string]bool{}
	for i := range t.doc.Measurements {
		m, at := &t.doc.Measurements[i], path("").key("measurements").at(i)
		if r.full() {
			return
		}
		if seen[m.ID] && m.ID != "" {
			r.add(at.key("id"), "duplicate-id", "its id is also that of a measurement before it", "give one of them another id")
		}
		seen[m.ID] = true
		if m.At != "" && t.parts[m.At] == nil && !t.surface(m.At) {
			do := "write the id of a part, jacket for the holder's wall, or outside"
			if near := nearest(m.At, append([]string{Outside, Jacket}, t.partIDs...)); near != "" {
				do = "did you mean " + show(near) + "?"
			}
			r.add(at.key("at"), "unknown-place", "there is no "+show(m.At)+" to measure at", do)
		}
		t.checkStates(r, m.Loads, at.key("loads"))
		checkReading(r, m, at)
	}
}

// checkReading looks at readings that can't be. An instrument that sees something cold mirrored may show less than the ambient.
func checkReading(r *report, m *Measurement, at path) {
	mirrored := m.InstrumentEmissivity.OK && m.ReflectedC.OK && m.ReflectedC.V < m.AmbientC.V
	if m.AmbientC.OK && m.ReadingC < m.AmbientC.V && !mirrored {
		r.addWhole(at, "below-ambient", fmt.Sprintf("the reading of %s °C is below its ambient of %s °C", shown(m.ReadingC), shown(m.AmbientC.V)),
			"read both again; what a warm surface mirrors is reflected_c")
	}
	if !m.InstrumentEmissivity.OK && (m.SurfaceEmissivity.OK || m.ReflectedC.OK) {
		r.add(at.key("instrument_emissivity"), "missing-key", "¤ is missing", "write what the instrument was set to, 0.95 if nothing was; a contact thermometer needs none of the three")
	}
}

// checkReasons keeps reasons to what needs one, and asks for them.
func (t *targets) checkReasons(r *report) {
	at := path("").key("reasons")
	for _, v := range t.doc.Reasons {
		limit, isLimit := strings.CutPrefix(v.For, ReasonLimit)
		survey, isMeasurement := strings.CutPrefix(v.For, ReasonMeasurement)
		switch {
		case isLimit && t.parts[limit] == nil:
			do := "take it out"
			if near := nearest(limit, t.partIDs); near != "" {
				do = "did you mean " + show(ReasonLimit+near) + "?"
			}
			r.add(at.key(v.For), "unknown-part", "there is no part "+show(limit), do)
		case isMeasurement && measurementOf(t.doc, survey) == nil:
			r.add(at.key(v.For), "unknown-measurement", "there is no measurement "+show(survey), "take it out")
		case !isLimit && !isMeasurement && v.For != ReasonMargin && v.For != "":
			r.add(at.key(v.For), "unknown-word", show(v.For)+" is nothing that takes a reason", "write limit and a part's id, measurement and its id, or design_margin_k")
		}
	}
	if t.doc.DesignMarginK == Some(0.0) && t.doc.Reason(ReasonMargin) == "" {
		r.add(path("").key(ReasonMargin), "no-reason", "¤ is 0, which needs a reason", "write reasons: {design_margin_k: why}, or a margin above zero")
	}
}
