package ui

import (
	"strings"

	"packrise/solver/section"
)

// input is one thing that can be entered: how it stands, and what a text would make of it. It belongs to the parts for which it was made.
type input struct {
	key     string   // "current", the same for every part
	label   string   // "Current"
	unit    string   // behind the label: "A"
	text    string   // as it stands, as the entry shows it; "" where parts differ
	shown   string   // as it stands within a sentence, "36 A"
	mixed   bool     // several parts, and they differ
	choices []string // what the catalogue has, shortest way in; nil: free text
	hint    string   // in the empty entry
	about   string   // one line of help: meaning and usual range
	missing bool     // nobody has entered it yet: the first thing to enter
	// read understands a text: meant says how, for people; do performs it. The error is one sentence for people.
	read func(text string) (meant string, do func(*section.Document) *section.Document, err error)
	step string // name of the undo step: "current of motor-1"
	on   string // what the step acts on
	then func() // after the step, nil: nothing
}

// edit returns the undo step that a text stands for; ok is false when nothing is to be done because the text is as it was.
func (in *input) edit(text string) (e section.Edit, ok bool, err error) {
	text = strings.TrimSpace(text)
	if text == in.text {
		return section.Edit{}, false, nil
	}
	_, do, err := in.read(plainMinus(text))
	if err != nil {
		return section.Edit{}, false, err
	}
	return section.Edit{Name: in.step, Object: in.on, Do: do}, true, nil
}

// understood returns how a text is understood, "" when it says no more than the text does.
func (in *input) understood(text string) (string, error) {
	text = strings.TrimSpace(text)
	if text == in.text {
		return "", nil
	}
	meant, _, err := in.read(plainMinus(text))
	if err != nil || squeezed(meant) == squeezed(text) {
		return "", err
	}
	return meant, nil
}

func squeezed(s string) string {
	return strings.ToLower(strings.Join(strings.Fields(strings.ReplaceAll(s, noBreak, " ")), ""))
}

// partInput makes an input of parts. text tells how one stands; read returns what a text makes of a part.
func partInput(k *Desk, ids []string, in input, text func(section.Part) string,
	read func(string) (meant string, f func(section.Part) (section.Part, error), err error),
) *input {
	d := k.Document()
	for i, id := range ids {
		p := section.Find(d, id)
		if p == nil {
			continue
		}
		if t := text(*p); i == 0 {
			in.text = t
		} else if t != in.text {
			in.text, in.mixed = "", true
			break
		}
	}
	in.on = strings.Join(ids, " ")
	in.step = strings.ToLower(in.label) + " of " + someIDs(ids, 3)
	in.read = func(text string) (string, func(*section.Document) *section.Document, error) {
		meant, f, err := read(text)
		if err != nil {
			return "", nil, err
		}
		for _, id := range ids {
			if p := section.Find(d, id); p != nil {
				if _, err := f(*p); err != nil {
					return "", nil, err
				}
			}
		}
		return meant, func(d *section.Document) *section.Document {
			for _, id := range ids {
				d = withPart(d, id, func(p *section.Part) {
					if q, err := f(*p); err == nil {
						q.ID = p.ID
						*p = q
					}
				})
			}
			return d
		}, nil
	}
	if in.shown == "" && in.text != "" {
		in.shown = withUnit(in.text, in.unit)
	}
	return &in
}

// always makes an edit of parts that can't fail out of one that returns the part.
func always(f func(section.Part) section.Part) func(section.Part) (section.Part, error) {
	return func(p section.Part) (section.Part, error) { return f(p), nil }
}
