package ui

import (
	"errors"
	"fmt"
	"slices"
	"strings"

	"packrise/solver/quantity"
	"packrise/solver/rules"
	"packrise/solver/section"
	"packrise/solver/study"
)

// designInputs are the inputs of the whole design: of the section, and of its permitted currents.
func designInputs(k *Desk) []*input { return append(wholeInputs(k), ratesInputs(k)...) }

// ratesInputs are what permitted currents of the whole design depend on: margin, rules, ranges.
func ratesInputs(k *Desk) []*input {
	in := []*input{marginInput(k)}
	if k.Document().Reason(section.ReasonMargin) != "" {
		in = append(in, marginReasonInput(k))
	}
	in = append(in, rulesInput(k), methodInput(k), insideInput(k), arrangementInput(k))
	return append(in, rangeInputs(k)...)
}

// marginInput is the design margin. A margin of 0 needs a reason, written behind it.
func marginInput(k *Desk) *input {
	usual := written(study.DesignMarginK)
	in := input{
		key: "margin", label: "Design margin", unit: "K", text: optText(k.Document().DesignMarginK), hint: usual,
		about: "Kept below every limit in what may be relied on. Empty: " + usual + " K. A margin of 0 needs a reason behind it, such as 0 because it was measured.",
	}
	in.shown = withUnit(orWord(in.text, usual), "K")
	out := wholeInput(in, nil)
	out.read = func(text string) (string, func(*section.Document) *section.Document, error) {
		number, reason := text, ""
		if i := strings.IndexAny(text, " ,;:"); i > 0 {
			number, reason = text[:i], strings.TrimSpace(strings.TrimLeft(text[i:], " ,;:"))
			reason = strings.TrimSpace(strings.TrimPrefix(reason, "because"))
			if squeezed(reason) == "k" {
				reason = ""
			}
			reason = strings.TrimSpace(strings.TrimPrefix(reason, "K "))
		}
		v := section.Opt[float64]{}
		if number != "" {
			n, err := quantity.ParseNumber(strings.TrimSuffix(number, "K"))
			if err == nil && n < 0 {
				err = errors.New("a margin is not below zero; write kelvins, such as 10")
			}
			if err == nil && n == 0 && reason == "" && k.Document().Reason(section.ReasonMargin) == "" {
				err = errors.New("a margin of 0 needs a reason, which stands on every result; write it behind, such as 0 because it was measured")
			}
			if err != nil {
				return "", nil, err
			}
			v = section.Some(n)
		}
		meant := withUnit(orWord(optText(v), usual), "K")
		if reason != "" {
			meant += ": " + reason
		}
		return meant, func(d *section.Document) *section.Document { return section.SetMargin(d, v, reason) }, nil
	}
	return out
}

// marginReasonInput is why the margin is 0.
func marginReasonInput(k *Desk) *input {
	in := input{key: "margin-reason", label: "Reason", text: k.Document().Reason(section.ReasonMargin), about: "Why the margin is 0. It stands on every result."}
	out := wholeInput(in, nil)
	out.read = func(text string) (string, func(*section.Document) *section.Document, error) {
		if text == "" {
			return "", nil, errors.New("a margin of 0 needs a reason; write it, or another margin first")
		}
		return "", func(d *section.Document) *section.Document { return section.SetReason(d, section.ReasonMargin, text) }, nil
	}
	return out
}

// Marks before the title of a rule set in the list: what choosing it does.
const (
	addRule  = "+ "
	dropRule = minusSign + " "
	usualSet = "the usual ones"
)

// rulesInput is the rule sets that stand beside the computed currents. The list adds or takes out one at a time.
func rulesInput(k *Desk) *input {
	d, book := k.Document(), rules.Shipped()
	use := d.Rules.Use
	in := input{
		key: "rules", label: "Rules", text: strings.Join(use, ", "), hint: usualSet, shown: ruleTitles(book, use),
		about: "Code tables to set beside the computed currents. The list adds or takes out one; empty takes the usual ones of the holder.",
	}
	for _, id := range book.IDs() {
		mark := addRule
		if slices.Contains(use, id) {
			mark = dropRule
		}
		in.choices = append(in.choices, mark+ruleTitle(book, id))
	}
	in.choices = append(in.choices, usualSet)
	return wholeInput(in, func(text string) (string, func(*section.Document), error) {
		next, err := readRules(book, d, text)
		return orWord(ruleTitles(book, next), usualSet), func(d *section.Document) { d.Rules.Use = next }, err
	})
}

func ruleTitle(book *rules.Book, id string) string {
	if info, ok := book.Info(id); ok {
		return info.Title
	}
	return id
}

func ruleTitles(book *rules.Book, ids []string) string {
	var titles []string
	for _, id := range ids {
		titles = append(titles, ruleTitle(book, id))
	}
	return strings.Join(titles, "; ")
}

// readRules understands a choice of the list and ids with commas between them.
func readRules(book *rules.Book, d *section.Document, text string) ([]string, error) {
	text = strings.TrimSpace(text)
	if text == "" || text == usualSet {
		return nil, nil
	}
	if mark, title, ok := cutMark(text); ok {
		for _, id := range book.IDs() {
			if ruleTitle(book, id) != title {
				continue
			}
			next := slices.DeleteFunc(slices.Clone(d.Rules.Use), func(s string) bool { return s == id })
			if mark == addRule {
				next = append(next, id)
			}
			return next, nil
		}
	}
	var next []string
	for one := range strings.SplitSeq(text, ",") {
		id := strings.ToLower(strings.TrimSpace(one))
		if _, ok := book.Info(id); !ok && len(d.Rules.Files) == 0 { // a person's own files may have more
			return nil, fmt.Errorf("there is no rule set %q; write %s", strings.TrimSpace(one), strings.Join(book.IDs(), ", "))
		}
		if id != "" && !slices.Contains(next, id) {
			next = append(next, id)
		}
	}
	return next, nil
}

// cutMark cuts what a choice of the list does from its title. Its minus sign may have become a plain one on the way.
func cutMark(text string) (mark, title string, ok bool) {
	if title, ok = strings.CutPrefix(text, addRule); ok {
		return addRule, title, true
	}
	for _, minus := range []string{dropRule, "- "} {
		if title, ok = strings.CutPrefix(text, minus); ok {
			return dropRule, title, true
		}
	}
	return "", "", false
}

// methods are the reference methods of IEC 60364-5-52.
var methods = []string{"A1", "A2", "B1", "B2", "C", "E", "F", "G"}

func methodInput(k *Desk) *input {
	in := input{
		key: "method", label: "Method", text: k.Document().Rules.Method, hint: "from the holder", choices: append(slices.Clone(methods), "from the holder"),
		about: "Reference method of installation of IEC 60364-5-52: A1, A2, B1, B2, C, E, F or G. Empty: the one of the holder.",
	}
	return wholeInput(in, func(text string) (string, func(*section.Document), error) {
		m := strings.ToUpper(strings.TrimSpace(text))
		if m == strings.ToUpper("from the holder") {
			m = ""
		}
		if m != "" && !slices.Contains(methods, m) {
			return "", nil, fmt.Errorf("%q is no reference method; write %s", text, strings.Join(methods, ", "))
		}
		return orWord(m, "from the holder"), func(d *section.Document) { d.Rules.Method = m }, nil
	})
}

// wordPair is a word of the file and what people read.
type wordPair struct{ id, word string }

var insideWords = []wordPair{{"", "building wiring"}, {section.InPanel, "inside a panel"}, {section.InMachine, "on a machine"}}

var arrangementWords = []wordPair{
	{section.Bunched, "bunched"},
	{section.LayerWall, "one layer on a wall or floor"},
	{section.LayerCeiling, "one layer under a ceiling"},
	{section.LayerTray, "one layer on a perforated tray"},
	{section.LayerLadder, "one layer on a ladder or cleats"},
}

func insideInput(k *Desk) *input {
	in := input{key: "lies-in", label: "It lies", about: "Inside a listed panel or on a machine their own standards count, and not the wiring rules of buildings."}
	return pairInput(in, insideWords, k.Document().Rules.Inside, func(d *section.Document, id string) { d.Rules.Inside = id })
}

func arrangementInput(k *Desk) *input {
	in := input{key: "arrangement", label: "Beside others", about: "How cables or bundles lie beside each other, for the grouping factors of IEC 60364-5-52."}
	return pairInput(in, arrangementWords, orWord(k.Document().Rules.Arrangement, section.Bunched), func(d *section.Document, id string) {
		if id == section.Bunched {
			id = ""
		}
		d.Rules.Arrangement = id
	})
}

// pairInput is an input of one of a few words.
func pairInput(in input, pairs []wordPair, now string, set func(*section.Document, string)) *input {
	var words []string
	for _, p := range pairs {
		words = append(words, p.word)
		if p.id == now {
			in.text = p.word
		}
	}
	in.choices = words
	return wholeInput(in, func(text string) (string, func(*section.Document), error) {
		w, err := oneOf(orWord(text, words[0]), words)
		i := slices.Index(words, w)
		return w, func(d *section.Document) {
			if i >= 0 {
				set(d, pairs[i].id)
			}
		}, err
	})
}

// rangeInputs are how far what was entered may be off, for the bands.
func rangeInputs(k *Desk) []*input {
	r := k.Document().Ranges
	one := func(key, label, unit, hint, about string, of func(*section.Ranges) *section.Opt[float64], most float64) *input {
		in := input{key: key, label: label, unit: unit, text: optText(*of(&r)), hint: hint, about: about + " Empty: " + hint + "."}
		in.shown = withUnit(orWord(in.text, hint), unit)
		return wholeInput(in, func(text string) (string, func(*section.Document), error) {
			v, err := readRange(text, unit, most)
			return orWord(withUnitIf(optText(v), unit), hint), func(d *section.Document) { *of(&d.Ranges) = v }, err
		})
	}
	return []*input{
		one("range-ambient", "Ambient ±", "K", "0", "How far the ambient may be off, either way.", func(r *section.Ranges) *section.Opt[float64] { return &r.AmbientK }, 100),
		one("range-load", "Currents ±", "%", "0", "How far every current may be off, either way.", func(r *section.Ranges) *section.Opt[float64] { return &r.LoadPercent }, 100),
		one("range-film", "Film ±", "%", "15", "How far the heat transfer outside may be off, either way.", func(r *section.Ranges) *section.Opt[float64] { return &r.FilmPercent }, 95),
		one("range-emissivity", "Emissivity ±", "", "0.1", "How far emissivities may be off, either way.", func(r *section.Ranges) *section.Opt[float64] { return &r.Emissivity }, 0.9),
		one("range-position", "Places ±", "mm", "0.2", "How far loose parts may lie from where they are drawn.", func(r *section.Ranges) *section.Opt[float64] { return &r.PositionMM }, 100),
		clearanceRangeInput(k),
	}
}

func readRange(text, unit string, most float64) (section.Opt[float64], error) {
	text = strings.TrimSpace(text)
	if text == "" {
		return section.Opt[float64]{}, nil
	}
	v, err := quantity.ParseNumber(strings.TrimSpace(strings.TrimPrefix(strings.TrimSuffix(text, unit), "±")))
	if err == nil && !(v >= 0 && v <= most) {
		err = fmt.Errorf("it lies between 0 and %s", withUnit(written(most), unit))
	}
	return section.Some(v), err
}

// clearanceRangeInput is the range of the mean clearance of loose parts.
func clearanceRangeInput(k *Desk) *input {
	const hint = "from touching to 2.5 times"
	in := input{key: "range-clearance", label: "Clearance from–to", unit: "mm", hint: hint, about: "Least and largest mean clearance of loose parts, such as 0.1–0.4. Empty: " + hint + " the clearance."}
	if c := k.Document().Ranges.ClearanceMM; c.OK {
		in.text = written(c.V.Low) + "–" + written(c.V.High)
	}
	in.shown = orWord(withUnitIf(in.text, "mm"), hint)
	return wholeInput(in, func(text string) (string, func(*section.Document), error) {
		if strings.TrimSpace(text) == "" {
			return hint, func(d *section.Document) { d.Ranges.ClearanceMM = section.Opt[section.Span]{} }, nil
		}
		text = strings.ReplaceAll(strings.ReplaceAll(text, "–", "-"), " to ", "-")
		low, high, ok := strings.Cut(text, "-")
		a, errA := quantity.ParseLength(strings.TrimSpace(low), quantity.Millimetre)
		b, errB := quantity.ParseLength(strings.TrimSpace(high), quantity.Millimetre)
		err := errors.Join(errA, errB)
		if !ok || err != nil || a < 0 || b <= a {
			return "", nil, errors.New("write the least and the largest clearance in mm, such as 0.1–0.4")
		}
		return written(a) + "–" + withUnit(written(b), "mm"), func(d *section.Document) { d.Ranges.ClearanceMM = section.Some(section.Span{Low: a, High: b}) }, nil
	})
}
