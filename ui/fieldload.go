package ui

import (
	"errors"
	"fmt"
	"slices"
	"strings"

	"packrise/solver/quantity"
	"packrise/solver/section"
	"packrise/solver/study"
)

// Words for what nobody has said.
const (
	notSaid   = "not said"
	noneWord  = "none"
	plainYes  = "yes"
	noDevice  = unknownWord
	unmarked  = "unmarked"
	noCurrent = "no current given"
)

// loadInputs are the inputs of the loads in which conductors are: what protects them, how they run, where they end. None while a conductor is in no
// load, since there is nothing to protect.
func loadInputs(k *Desk, ids []string) []*input {
	loads := loadsOf(k.Document(), ids)
	if loads == nil {
		return nil
	}
	in := []*input{deviceInput(k, loads)}
	if protected(k.Document(), loads) {
		in = append(in, tripsInput(k, loads))
	}
	in = append(
		in, continuousInput(k, loads), motorInput(k, loads), systemInput(k, loads), neutralInput(k, loads),
		terminalInput(k, loads), terminalCurrentInput(k, loads),
	)
	if len(k.Document().Loads) > 1 && len(loads) == 1 {
		in = append(in, notWithInput(k, loads[0]))
	}
	return in
}

// loadsOf returns the loads of conductors, each once; nil where one is in none.
func loadsOf(d *section.Document, ids []string) (loads []string) {
	for _, id := range ids {
		l := section.LoadOf(d, id)
		if l == nil {
			return nil
		}
		if !slices.Contains(loads, l.ID) {
			loads = append(loads, l.ID)
		}
	}
	return loads
}

func protected(d *section.Document, loads []string) bool {
	return !slices.ContainsFunc(loads, func(id string) bool {
		l := section.LoadNamed(d, id)
		return l == nil || l.Protection.Kind == ""
	})
}

// loadInput makes an input of loads. text tells how one stands, "" what nobody has said; read returns what a text makes of one.
func loadInput(k *Desk, loads []string, in input, text func(*section.Load) string,
	read func(text string) (meant string, f func(d *section.Document, load string) *section.Document, err error),
) *input {
	d := k.Document()
	for i, id := range loads {
		l := section.LoadNamed(d, id)
		if l == nil {
			continue
		}
		if t := text(l); i == 0 {
			in.text = t
		} else if t != in.text {
			in.text, in.mixed = "", true
			break
		}
	}
	in.on = "load " + strings.Join(loads, " ")
	in.step = strings.ToLower(in.label) + " of " + someIDs(loads, 3)
	if in.shown == "" && in.text != "" {
		in.shown = withUnit(in.text, in.unit)
	}
	in.read = func(text string) (string, func(*section.Document) *section.Document, error) {
		meant, f, err := read(strings.TrimSpace(text))
		if err != nil {
			return "", nil, err
		}
		return meant, func(d *section.Document) *section.Document {
			for _, id := range loads {
				d = f(d, id)
			}
			return d
		}, nil
	}
	return &in
}

// deviceWords are the kinds of device as people call them, longest first where one begins like another.
var deviceWords = []struct{ kind, word string }{
	{section.Breaker, "breaker"},
	{section.IndustrialBreaker, "industrial breaker"},
	{section.MotorBreaker, "motor breaker"},
	{section.Fuse, "fuse"},
	{section.OverloadRelay, "overload relay"},
	{section.ElectronicBreaker, "electronic breaker"},
}

// deviceWord is what people call a kind of device.
func deviceWord(kind string) string {
	for _, w := range deviceWords {
		if w.kind == kind {
			return w.word
		}
	}
	return kind
}

func deviceText(p section.Protection) string {
	if p.Kind == "" {
		return ""
	}
	return deviceWord(p.Kind) + " " + written(p.RatingA) + " A"
}

// usualRatings are those of small breakers and fuses (IEC 60898-1 and IEC 60269-1, from memory), offered and not checked.
var usualRatings = []float64{1, 2, 4, 6, 10, 16, 20, 25, 32, 40, 50, 63, 80, 100, 125, 160, 200, 250, 315, 400}

// deviceInput is the device ahead of loads, with its rating.
func deviceInput(k *Desk, loads []string) *input {
	in := input{
		key: "device", label: "Protection", hint: noDevice,
		about: "Kind and rating of the device ahead, such as breaker 25 A, motor breaker 9, fuse 63, overload relay, electronic breaker. Empty: unknown, and no current shown here is a device rating.",
	}
	rating := 0.0
	for _, id := range loads {
		if l := section.LoadNamed(k.Document(), id); l != nil {
			rating = max(rating, l.Protection.RatingA, l.CurrentA.V)
			if l.Protection.RatingA > 0 {
				rating = l.Protection.RatingA
				break
			}
		}
	}
	if !slices.Contains(usualRatings, rating) && !protected(k.Document(), loads) {
		for _, r := range usualRatings {
			if r >= rating {
				rating = r
				break
			}
		}
	}
	for _, w := range deviceWords {
		in.choices = append(in.choices, deviceText(section.Protection{Kind: w.kind, RatingA: rating}))
	}
	in.choices = append(in.choices, noDevice)
	return loadInput(k, loads, in, func(l *section.Load) string { return deviceText(l.Protection) },
		func(text string) (string, func(*section.Document, string) *section.Document, error) {
			p, err := readDevice(text)
			if err != nil {
				return "", nil, err
			}
			meant := orWord(deviceText(p), "protection unknown")
			return meant, func(d *section.Document, load string) *section.Document {
				q := p
				if was := section.LoadNamed(d, load); was != nil && was.Protection.Kind == p.Kind {
					q.TripsAt = was.Protection.TripsAt
				}
				return section.SetProtection(d, load, q)
			}, nil
		})
}

// readDevice understands "breaker 25 A", "25 A fuse", "unknown" and nothing.
func readDevice(text string) (p section.Protection, err error) {
	low := strings.ToLower(strings.TrimSpace(strings.ReplaceAll(text, "-", " ")))
	if low == "" || low == unknownWord || low == noneWord || low == "?" {
		return p, nil
	}
	var words []string
	for _, w := range strings.Fields(strings.ReplaceAll(low, noBreak, " ")) {
		number := strings.TrimSuffix(w, "a")
		if v, e := quantity.ParseNumber(number); e == nil {
			p.RatingA = v
		} else if w != "a" {
			words = append(words, w)
		}
	}
	name := strings.Join(words, " ")
	for _, w := range deviceWords {
		if w.word == name {
			p.Kind = w.kind
		}
	}
	if p.Kind == "" {
		var all []string
		for _, w := range deviceWords {
			all = append(all, w.word)
		}
		return p, fmt.Errorf("%q is no kind of device here; write %s, with the rating behind it, such as breaker 25 A", text, strings.Join(all, ", "))
	}
	if p.RatingA <= 0 {
		return p, fmt.Errorf("how many amperes? write the rating behind it, such as %s 25 A", deviceWord(p.Kind))
	}
	return p, nil
}

// tripsInput is the conventional tripping current over the rating.
func tripsInput(k *Desk, loads []string) *input {
	usual := ""
	if l := section.LoadNamed(k.Document(), loads[0]); l != nil {
		p := l.Protection
		p.TripsAt = section.Opt[float64]{}
		f, _ := study.TripsAt(p)
		usual = written(f) + ", usual of its kind"
	}
	in := input{
		key: "trips", label: "Trips at", unit: "× rating", hint: usual,
		about: "The current that has to trip it in the conventional time, over its rating, from its data sheet; 145 % is 1.45. Empty: the usual one of its kind.",
	}
	return loadInput(k, loads, in, func(l *section.Load) string { return optText(l.Protection.TripsAt) },
		func(text string) (string, func(*section.Document, string) *section.Document, error) {
			v := section.Opt[float64]{}
			if text != "" {
				number, percent := strings.CutSuffix(text, "%")
				f, err := quantity.ParseNumber(strings.TrimSpace(strings.TrimSuffix(strings.TrimSpace(strings.TrimSuffix(number, "rating")), "×")))
				if percent {
					f /= 100
				}
				if err == nil && !(f >= 1 && f <= 3) {
					err = errors.New("a device trips at 1 to 3 times its rating; write the factor, such as 1.45")
				}
				if err != nil {
					return "", nil, err
				}
				v = section.Some(f)
			}
			return orWord(withUnitIf(optText(v), "× its rating"), usual), func(d *section.Document, load string) *section.Document {
				l := section.LoadNamed(d, load)
				if l == nil {
					return d
				}
				p := l.Protection
				p.TripsAt = v
				return section.SetProtection(d, load, p)
			}, nil
		})
}

// withUnitIf is withUnit that leaves nothing as it is.
func withUnitIf(number, unit string) string {
	if number == "" {
		return ""
	}
	return withUnit(number, unit)
}
