package ui

import (
	"errors"
	"fmt"
	"slices"
	"strings"

	"packrise/solver/quantity"
	"packrise/solver/section"
)

// saidInput is a yes that stays "not said" until somebody says it.
func saidInput(k *Desk, loads []string, in input, of func(*section.Load) bool, set func(*section.Document, string, bool) *section.Document) *input {
	in.hint, in.choices = notSaid, []string{plainYes, notSaid}
	return loadInput(k, loads, in,
		func(l *section.Load) string {
			if of(l) {
				return plainYes
			}
			return ""
		},
		func(text string) (string, func(*section.Document, string) *section.Document, error) {
			word := notSaid
			if text != "" && squeezed(text) != "no" {
				var err error
				if word, err = oneOf(text, []string{plainYes, notSaid}); err != nil {
					return "", nil, err
				}
			}
			return word, func(d *section.Document, load string) *section.Document { return set(d, load, word == plainYes) }, nil
		})
}

func continuousInput(k *Desk, loads []string) *input {
	in := input{key: "continuous", label: "Three hours or more", about: "Whether it runs three hours or more at a time: its device and wires then have to take 125 % of it by the NEC."}
	return saidInput(k, loads, in, func(l *section.Load) bool { return l.Continuous }, section.SetContinuous)
}

func motorInput(k *Desk, loads []string) *input {
	in := input{key: "motor", label: "A motor", about: "Whether it is the branch circuit of one motor: its wires then have to take 125 % of it by NEC 430.22."}
	return saidInput(k, loads, in, func(l *section.Load) bool { return l.Motor }, section.SetMotor)
}

var systemWords = []struct{ system, word string }{
	{section.DC, "direct current"},
	{section.SinglePhase, "single phase"},
	{section.ThreePhase, "three phase"},
}

func systemInput(k *Desk, loads []string) *input {
	in := input{key: "system", label: "System", hint: notSaid, about: "Direct current, single phase or three phase: tables count loaded conductors by it."}
	var words []string
	for _, w := range systemWords {
		words = append(words, w.word)
	}
	in.choices = append(slices.Clone(words), notSaid)
	return loadInput(k, loads, in,
		func(l *section.Load) string {
			for _, w := range systemWords {
				if w.system == l.System {
					return w.word
				}
			}
			return ""
		},
		func(text string) (string, func(*section.Document, string) *section.Document, error) {
			system := ""
			if low := strings.ToLower(strings.ReplaceAll(text, "-", " ")); low != "" && low != notSaid {
				if low == "dc" {
					low = "direct current"
				}
				word, err := oneOf(low, words)
				if err != nil {
					return "", nil, err
				}
				system = systemWords[slices.Index(words, word)].system
				text = word
			}
			return orWord(text, notSaid), func(d *section.Document, load string) *section.Document { return section.SetSystem(d, load, system) }, nil
		})
}

// neutralInput names the conductor that is the loads' neutral.
func neutralInput(k *Desk, loads []string) *input {
	in := input{key: "neutral", label: "Neutral", hint: noneWord, about: "The conductor that is its neutral, in the load or not: it decides what tables count. Empty: none is named."}
	d := k.Document()
	for _, p := range section.Unfold(d) {
		if q := section.Find(d, p.ID); q != nil && (q.Role == section.RoleNeutral || slices.Contains(conductorsOf(d, loads), p.ID)) {
			in.choices = append(in.choices, p.ID)
		}
	}
	in.choices = append(in.choices, noneWord)
	return loadInput(k, loads, in, func(l *section.Load) string { return l.Neutral },
		func(text string) (string, func(*section.Document, string) *section.Document, error) {
			if strings.EqualFold(text, noneWord) {
				text = ""
			}
			if p := section.Find(d, text); text != "" && (p == nil || p.Kind != section.Core) {
				return "", nil, fmt.Errorf("there is no conductor %q; write the id of one, or nothing", text)
			}
			return orWord(text, noneWord), func(d *section.Document, load string) *section.Document { return section.SetNeutral(d, load, text) }, nil
		})
}

func conductorsOf(d *section.Document, loads []string) (ids []string) {
	for _, id := range loads {
		if l := section.LoadNamed(d, id); l != nil {
			ids = append(ids, l.Conductors...)
		}
	}
	return ids
}

// terminalInput is the temperature that terminals are marked with.
func terminalInput(k *Desk, loads []string) *input {
	in := input{
		key: "terminal", label: "Terminals marked", unit: "°C", hint: unmarked,
		about: "60, 75 or 90 °C as marked on them: the current is capped by that column of NEC table 310.16. A terminal is never a temperature of the section. Empty: unmarked.",
	}
	in.choices = []string{"60", "75", "90", unmarked}
	return loadInput(k, loads, in, func(l *section.Load) string { return optText(l.Terminals.RatingC) },
		func(text string) (string, func(*section.Document, string) *section.Document, error) {
			if strings.EqualFold(text, unmarked) {
				text = ""
			}
			v, meant, err := readOptTemperature(text, unmarked)
			return meant, func(d *section.Document, load string) *section.Document {
				return changeTerminals(d, load, func(t *section.Terminals) { t.RatingC = v })
			}, err
		})
}

// terminalCurrentInput is the current for which terminals are made.
func terminalCurrentInput(k *Desk, loads []string) *input {
	in := input{key: "terminal-current", label: "Terminals for", unit: "A", hint: noCurrent, about: "The current for which terminal or contact is made, from its data sheet: a cap on every conductor. Empty: not known."}
	return loadInput(k, loads, in, func(l *section.Load) string { return optText(l.Terminals.RatedA) },
		func(text string) (string, func(*section.Document, string) *section.Document, error) {
			v, meant := section.Opt[float64]{}, noCurrent
			if text != "" && text != noCurrent {
				a, err := quantity.ParseCurrent(text)
				if err == nil && a <= 0 {
					err = errors.New("a terminal is made for more than nothing; write amperes, such as 32, or leave it empty")
				}
				if err != nil {
					return "", nil, err
				}
				v, meant = section.Some(a), withUnit(written(a), "A")
			}
			return meant, func(d *section.Document, load string) *section.Document {
				return changeTerminals(d, load, func(t *section.Terminals) { t.RatedA = v })
			}, nil
		})
}

func changeTerminals(d *section.Document, load string, f func(*section.Terminals)) *section.Document {
	l := section.LoadNamed(d, load)
	if l == nil {
		return d
	}
	t := l.Terminals
	f(&t)
	return section.SetTerminals(d, load, t)
}

// notWithInput names the loads that never run together with one.
func notWithInput(k *Desk, load string) *input {
	d := k.Document()
	in := input{key: "not-with", label: "Never on with", hint: noneWord, about: "Other circuits that are never on together with this one, such as heating and cooling, with commas between them. Tables then count fewer."}
	var now []string
	for i := range d.Loads {
		id := d.Loads[i].ID
		if id == load {
			continue
		}
		in.choices = append(in.choices, id)
		if section.NotTogether(d, load, id) {
			now = append(now, id)
		}
	}
	in.choices = append(in.choices, noneWord)
	return loadInput(k, []string{load}, in, func(*section.Load) string { return strings.Join(now, ", ") },
		func(text string) (string, func(*section.Document, string) *section.Document, error) {
			var others []string
			for one := range strings.SplitSeq(text, ",") {
				one = strings.TrimSpace(one)
				if one == "" || strings.EqualFold(one, noneWord) {
					continue
				}
				if one == load || section.LoadNamed(d, one) == nil {
					return "", nil, fmt.Errorf("there is no other circuit %q; write %s", one, someIDs(in.choices[:len(in.choices)-1], 6))
				}
				others = append(others, one)
			}
			return orWord(strings.Join(others, ", "), noneWord), func(d *section.Document, load string) *section.Document {
				return section.SetNotWith(d, load, others...)
			}, nil
		})
}

// limitReasonInput is why a part's limit is above the catalogue's; nil where it isn't and no reason stands.
func limitReasonInput(k *Desk, id string) *input {
	d := k.Document()
	r, _ := k.Result()
	raised := r != nil && slices.Contains(r.Unreasoned, id)
	now := d.LimitReason(id)
	if !raised && now == "" {
		return nil
	}
	key := section.ReasonLimit + id
	in := &input{key: "limit-reason", label: "Why this limit", text: now, shown: now, hint: "no reason given", on: id, step: "reason of the limit of " + id, missing: raised}
	in.about = "Its limit is above the catalogue's: nothing is rated until the reason is written, and it stands on every result."
	in.read = func(text string) (string, func(*section.Document) *section.Document, error) {
		return "", func(d *section.Document) *section.Document { return section.SetReason(d, key, text) }, nil
	}
	return in
}

// seatInputs say what may happen to parts when places are sought.
func seatInputs(k *Desk, ids []string) []*input {
	if slices.ContainsFunc(ids, func(id string) bool { return !isTop(id) }) {
		return nil
	}
	const free, fixed = "may move", "stays"
	pinned := partInput(k, ids, input{key: "pinned", label: "Its place", choices: []string{free, fixed}, about: "Whether it stays where it is while a better seating is sought."},
		func(p section.Part) string {
			if p.Pinned {
				return fixed
			}
			return free
		},
		func(text string) (string, func(section.Part) (section.Part, error), error) {
			w, err := oneOf(text, []string{free, fixed})
			return w, always(func(p section.Part) section.Part { p.Pinned = w == fixed; return p }), err
		})
	group := partInput(k, ids, input{key: "group", label: "Group", hint: "no group", choices: groupsOf(k.Document()), about: "Parts of one group stay together while a better seating is sought; a new name begins a group."},
		func(p section.Part) string { return p.Group },
		func(text string) (string, func(section.Part) (section.Part, error), error) {
			text = strings.TrimSpace(text)
			if text == "no group" || text == noneWord {
				text = ""
			}
			return orWord(text, "no group"), always(func(p section.Part) section.Part { p.Group = text; return p }), nil
		})
	return []*input{pinned, group}
}

// groupsOf lists the groups of a design, and none behind them.
func groupsOf(d *section.Document) (names []string) {
	for i := range d.Parts {
		if g := d.Parts[i].Group; g != "" && !slices.Contains(names, g) {
			names = append(names, g)
		}
	}
	if len(names) > 0 {
		names = append(names, "no group")
	}
	return names
}
