package ui

import (
	"errors"
	"slices"
	"strconv"
	"strings"

	"packrise/solver/quantity"
	"packrise/solver/section"
)

// caseInputs are the inputs of one load case: name, ambient, the loads that run otherwise than the design says, and what any so many of run.
// renamed is told of another name.
func caseInputs(k *Desk, id string, renamed func(to string)) []*input {
	d := k.Document()
	c := section.CaseNamed(d, id)
	if c == nil {
		return nil
	}
	all := []*input{caseNameInput(d, id, renamed), caseAmbientInput(d, c)}
	for i := range d.Loads {
		if l := &d.Loads[i]; !inAny(c, l.ID) {
			all = append(all, caseLoadInput(c, l))
		}
	}
	for i := 0; i <= len(c.Any); i++ {
		all = append(all, caseAnyInput(d, c, i))
	}
	return all
}

func inAny(c *section.Case, load string) bool {
	return slices.ContainsFunc(c.Any, func(a section.AnyOf) bool { return slices.Contains(a.Of, load) })
}

// caseInput makes an input of a case. read returns what a text makes of it.
func caseInput(id string, in input, read func(text string) (meant string, f func(*section.Case), err error)) *input {
	in.on = "case " + id
	if in.step == "" {
		in.step = strings.ToLower(in.label) + " of case " + id
	}
	in.read = func(text string) (string, func(*section.Document) *section.Document, error) {
		meant, f, err := read(text)
		return meant, func(d *section.Document) *section.Document {
			now := section.CaseNamed(d, id)
			if now == nil {
				return d
			}
			c := *now
			c.Loads, c.Any = slices.Clone(c.Loads), slices.Clone(c.Any)
			f(&c)
			return section.SetCase(d, c)
		}, err
	}
	return &in
}

func caseNameInput(d *section.Document, id string, renamed func(string)) *input {
	to := id
	in := input{key: "case-name", label: "Name", text: id, on: "case " + id, step: "name of case " + id, about: "How the case is called: night, start-up."}
	in.read = func(text string) (string, func(*section.Document) *section.Document, error) {
		text = strings.TrimSpace(text)
		switch {
		case text == "":
			return "", nil, errors.New("a case needs a name")
		case strings.ContainsAny(text, "/\n"):
			return "", nil, errors.New("a case's name has no / in it; write another name")
		case text != id && section.CaseNamed(d, text) != nil:
			return "", nil, errors.New("there is a case " + text + " already; write another name")
		}
		to = text
		return "", func(d *section.Document) *section.Document { return section.RenameCase(d, id, text) }, nil
	}
	in.then = func() { renamed(to) }
	return &in
}

func caseAmbientInput(d *section.Document, c *section.Case) *input {
	in := input{key: "case-ambient", label: "Ambient", unit: "°C", text: optText(c.AmbientC), hint: "as the design says", about: "In °C or °F, while this case runs. Empty: as the design says."}
	if a := d.Surroundings.AmbientC; a.OK {
		in.hint += ", " + written(a.V)
	}
	return caseInput(c.ID, in, func(text string) (string, func(*section.Case), error) {
		v, meant, err := readOptTemperature(text, "as the design says")
		return meant, func(c *section.Case) { c.AmbientC = v }, err
	})
}

// stateText is the state of a load as it is entered.
func stateText(states []section.CaseLoad, load string) string {
	for _, s := range states {
		switch {
		case s.Load != load:
		case s.Off:
			return "off"
		default:
			return written(s.CurrentA)
		}
	}
	return ""
}

// readState understands a load's state: amperes, a percentage of what the design says, off, or nothing, which is as the design says.
func readState(l *section.Load, text string) (s section.CaseLoad, meant string, given bool, err error) {
	s.Load = l.ID
	text = strings.TrimSpace(text)
	switch strings.ToLower(text) {
	case "":
		return s, "as the design says", false, nil
	case "off":
		s.Off = true
		return s, "off", true, nil
	}
	if l.HeatWM.OK {
		return s, "", false, errors.New(l.ID + " is a fixed heat and takes no current; write off, or leave it empty")
	}
	if p, ok := strings.CutSuffix(text, "%"); ok {
		v, err := quantity.ParseNumber(strings.TrimSpace(p))
		switch {
		case err != nil:
			return s, "", false, err
		case !l.CurrentA.OK:
			return s, "", false, errors.New("the design does not say what " + l.ID + " carries, so a share of it is unknown; write amperes")
		case v < 0:
			return s, "", false, errors.New("a share below nothing isn't possible")
		}
		s.CurrentA = tidyAmps(l.CurrentA.V * v / 100)
		return s, withUnit(written(s.CurrentA), "A"), true, nil
	}
	s.CurrentA, err = quantity.ParseCurrent(text)
	return s, withUnit(written(s.CurrentA), "A"), err == nil, err
}

// tidyAmps rounds a current that was worked out to a milliampere.
func tidyAmps(a float64) float64 {
	v, err := strconv.ParseFloat(strconv.FormatFloat(a, 'f', 3, 64), 64)
	if err != nil {
		return a
	}
	return v
}

// withState puts a load's state into a list, or takes it out.
func withState(list []section.CaseLoad, s section.CaseLoad, given bool) []section.CaseLoad {
	list = slices.Clone(list)
	i := slices.IndexFunc(list, func(x section.CaseLoad) bool { return x.Load == s.Load })
	switch {
	case i < 0 && given:
		return append(list, s)
	case i >= 0 && given:
		list[i] = s
	case i >= 0:
		list = slices.Delete(list, i, i+1)
	}
	if len(list) == 0 {
		return nil
	}
	return list
}

func caseLoadInput(c *section.Case, l *section.Load) *input {
	in := input{
		key: "case-load/" + l.ID, label: l.ID, text: stateText(c.Loads, l.ID), hint: "as the design says, " + loadShown(l),
		about: "Amperes in each conductor, a share of the design's such as 60 %, or off. Empty: as the design says.",
	}
	if !l.HeatWM.OK {
		in.unit = "A"
	}
	in.step = l.ID + " in case " + c.ID
	load := *l
	return caseInput(c.ID, in, func(text string) (string, func(*section.Case), error) {
		s, meant, given, err := readState(&load, text)
		return meant, func(c *section.Case) { c.Loads = withState(c.Loads, s, given) }, err
	})
}

// caseAnyInput is the i-th choice of a case, or a new one: "2 of pump-1, pump-2, pump-3".
func caseAnyInput(d *section.Document, c *section.Case, i int) *input {
	in := input{key: "case-any/" + strconv.Itoa(i), label: "Any of", hint: "such as 1 of a, b", about: "So many of these loads run at a time, whichever; the others are off: 2 of pump-1, pump-2, pump-3. Empty: no such choice."}
	if i < len(c.Any) {
		in.text = anyText(c.Any[i])
	} else if i > 0 {
		in.label = "And any of"
	}
	in.step = "choice of case " + c.ID
	return caseInput(c.ID, in, func(text string) (string, func(*section.Case), error) {
		a, err := readAny(d, c, i, text)
		meant := ""
		if len(a.Of) > 0 {
			meant = anyText(a)
		}
		return meant, func(c *section.Case) {
			switch {
			case len(a.Of) == 0 && i < len(c.Any):
				c.Any = slices.Delete(c.Any, i, i+1)
			case len(a.Of) == 0:
			case i < len(c.Any):
				c.Any[i] = a
			default:
				c.Any = append(c.Any, a)
			}
			if len(c.Any) == 0 {
				c.Any = nil
			}
			for _, id := range a.Of { // a choice takes the place of a state
				c.Loads = withState(c.Loads, section.CaseLoad{Load: id}, false)
			}
		}, err
	})
}

func anyText(a section.AnyOf) string {
	return strconv.Itoa(a.Count) + " of " + strings.Join(a.Of, ", ")
}

// readAny understands "2 of a, b, c"; nothing is no choice.
func readAny(d *section.Document, c *section.Case, at int, text string) (a section.AnyOf, err error) {
	text = strings.TrimSpace(text)
	if text == "" {
		return a, nil
	}
	n, names, ok := strings.Cut(text, " of ")
	if a.Count, err = strconv.Atoi(strings.TrimSpace(n)); !ok || err != nil || a.Count < 0 {
		return a, errors.New("write how many of which loads run, such as 2 of pump-1, pump-2, pump-3")
	}
	for _, name := range strings.Split(names, ",") {
		name = strings.TrimSpace(name)
		switch {
		case name == "":
			continue
		case section.LoadNamed(d, name) == nil:
			return a, errors.New("there is no load " + name + "; the loads are " + someIDs(loadIDs(d), 8))
		case slices.Contains(a.Of, name):
			return a, errors.New(name + " is named twice")
		}
		for i, other := range c.Any {
			if i != at && slices.Contains(other.Of, name) {
				return a, errors.New(name + " stands in another choice of this case already")
			}
		}
		a.Of = append(a.Of, name)
	}
	if a.Count > len(a.Of) {
		return a, errors.New("that is " + counted(len(a.Of), "load") + ", so no " + strconv.Itoa(a.Count) + " of them can run")
	}
	return a, nil
}

func loadIDs(d *section.Document) (ids []string) {
	for i := range d.Loads {
		ids = append(ids, d.Loads[i].ID)
	}
	return ids
}
