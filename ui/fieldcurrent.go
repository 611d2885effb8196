package ui

import (
	"errors"
	"slices"
	"strings"

	"packrise/solver/quantity"
	"packrise/solver/section"
)

// unknownWord is how an unknown current is written, in the file too.
const unknownWord = "unknown"

// loadText is what a conductor carries, as it is entered: "16", "5 W/m", "unknown", "" in no load.
func loadText(l *section.Load) string {
	switch {
	case l == nil:
		return ""
	case l.HeatWM.OK:
		return written(l.HeatWM.V) + " W/m"
	case l.CurrentA.OK:
		return written(l.CurrentA.V)
	}
	return unknownWord
}

// loadShown is what a conductor carries within a sentence or a cell.
func loadShown(l *section.Load) string {
	if l != nil && l.CurrentA.OK {
		return withUnit(loadText(l), "A")
	}
	if l != nil && l.HeatWM.OK {
		return withUnit(written(l.HeatWM.V), "W/m")
	}
	return unknownWord
}

// currentInput is the current of the conductors' loads: every conductor of a load follows.
func currentInput(k *Desk, ids []string) *input {
	d := k.Document()
	in := &input{key: "current", label: "Current", unit: "A", hint: unknownWord, on: strings.Join(ids, " ")}
	in.about = "Effective value (r.m.s.) in each conductor. 0 is idle; empty is unknown and never read as 0; 5 W/m is a fixed heat."
	var who, loads []string
	for i, id := range ids {
		l := section.LoadOf(d, id)
		if t := loadText(l); i == 0 {
			in.text, in.shown = t, loadShown(l)
		} else if t != in.text {
			in.text, in.shown, in.mixed = "", "different currents", true
		}
		name, members := id, []string{id}
		if l != nil {
			name, members = l.ID, l.Conductors
		}
		if !slices.Contains(loads, name) {
			loads = append(loads, name)
			who = append(who, members...)
		}
		in.missing = in.missing || l == nil || !l.CurrentA.OK && !l.HeatWM.OK
	}
	in.step = "current of " + someIDs(loads, 3)
	in.read = func(text string) (string, func(*section.Document) *section.Document, error) {
		meant, set, err := readLoad(text)
		if err != nil {
			return "", nil, err
		}
		if len(who) > 1 {
			meant += " in each of " + someIDs(who, 6)
		}
		return meant, func(d *section.Document) *section.Document {
			for _, id := range ids {
				d = set(d, id)
			}
			return d
		}, nil
	}
	return in
}

// readLoad understands "16", "500 mA", "5 W/m", "idle", "unknown" and nothing, which is unknown.
func readLoad(text string) (meant string, set func(*section.Document, string) *section.Document, err error) {
	text = strings.TrimSpace(text)
	switch strings.ToLower(text) {
	case "", "?", unknownWord:
		return "current unknown", setCurrent(section.Opt[float64]{}), nil
	case "idle", "off":
		return withUnit("0", "A"), setCurrent(section.Some(0.0)), nil
	}
	if rest, ok := strings.CutSuffix(strings.ReplaceAll(strings.ToLower(text), " ", ""), "w/m"); ok {
		w, err := quantity.ParseNumber(rest)
		if err != nil {
			return "", nil, err
		}
		if w < 0 {
			return "", nil, errors.New("a heat below nothing isn't possible; write the watts that each metre makes, such as 5 W/m")
		}
		return "a fixed heat of " + withUnit(written(w), "W/m"), setHeat(w), nil
	}
	a, err := quantity.ParseCurrent(text)
	if err != nil {
		return "", nil, err
	}
	return withUnit(written(a), "A"), setCurrent(section.Some(a)), nil
}

func setCurrent(a section.Opt[float64]) func(*section.Document, string) *section.Document {
	return func(d *section.Document, id string) *section.Document { return section.SetCurrent(d, id, a) }
}

func setHeat(w float64) func(*section.Document, string) *section.Document {
	return func(d *section.Document, id string) *section.Document { return section.SetHeat(d, id, w) }
}

// circuitInput is the load that conductors belong to.
func circuitInput(k *Desk, ids []string) *input {
	d := k.Document()
	in := &input{
		key: "circuit", label: "Circuit", hint: "in no load", on: strings.Join(ids, " "), step: "circuit of " + someIDs(ids, 3),
		about: "Conductors of one circuit carry the same current; a new name begins a new circuit.",
	}
	for i, id := range ids {
		t := ""
		if l := section.LoadOf(d, id); l != nil {
			t = l.ID
		}
		if i == 0 {
			in.text = t
		} else if t != in.text {
			in.text, in.mixed = "", true
		}
	}
	for _, l := range d.Loads {
		in.choices = append(in.choices, l.ID)
	}
	in.shown = in.text
	in.read = func(text string) (string, func(*section.Document) *section.Document, error) {
		text = strings.TrimSpace(text)
		meant := "in no load, current unknown"
		if text != "" {
			meant = "a new circuit, current unknown"
		}
		for i := range d.Loads {
			if l := &d.Loads[i]; l.ID == text {
				meant = "joins " + someIDs(l.Conductors, 4) + ": " + loadShown(l)
			}
		}
		if strings.ContainsAny(text, "/\n") {
			return "", nil, errors.New("a circuit's name has no / in it; write another name")
		}
		return meant, func(d *section.Document) *section.Document {
			for _, id := range ids {
				d = inLoad(d, id, text)
			}
			return d
		}, nil
	}
	return in
}
