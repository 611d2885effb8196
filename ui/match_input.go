package ui

import (
	"errors"
	"slices"
	"strings"

	"packrise/solver/quantity"
	"packrise/solver/section"
)

// measured is what a person enters about one measurement before it is matched.
type measured struct {
	section.Measurement
	read   bool   // the reading has been entered
	reason string // for taking a higher rating from it
}

// matchInputs are the inputs of a measurement, how heat lies along the wire first. They change m and no document; changed is called after each.
func matchInputs(k *Desk, m *measured, changed func()) []*input {
	d := k.Document()
	all := []*input{
		m.words("along", "Along the wire", "First: is it as warm along the wire, or does the heat fall off from one place, as it does from a joint?", &m.Along,
			[]choice{{"", "not looked at"}, {section.Even, "even"}, {section.FallsOff, "falls off"}}),
		m.placeInput(d), m.readingInput(),
		m.number("instrument", "Instrument set to", "", "The emissivity that the instrument was set to, 0.95 as most come. Empty: a contact thermometer.", "contact thermometer", &m.InstrumentEmissivity, readEmissivity),
	}
	if m.InstrumentEmissivity.OK {
		all = append(all,
			m.number("surface", "Surface emissivity", "", "Of what it was pointed at: 0.9 plastics and paint, 0.25 galvanised steel. Below 0.5 nothing can be fitted: tape it, wait and read again.", "the outside's", &m.SurfaceEmissivity, readEmissivity),
			m.number("reflected", "Reflected", "°C", "In °C or °F, of what is mirrored in the surface. Empty: the ambient.", "the ambient", &m.ReflectedC, readCelsius))
	}
	hint := "as the design says"
	if a := d.Surroundings.AmbientC; a.OK {
		hint += ", " + written(a.V)
	}
	all = append(all,
		m.number("ambient-then", "Ambient then", "°C", "In °C or °F, at the time of the reading.", hint, &m.AmbientC, readCelsius),
		m.number("loaded-for", "Loaded for", "min", "How long it had carried that load, in minutes; 2 h is understood too.", "not known", &m.LoadedForMin, readMinutes),
		m.words("cover", "Cover", "An opened cover cools what lies behind it: the picture then says little.", &m.Cover,
			[]choice{{"", "not said"}, {section.Closed, "closed"}, {section.Opened, "opened"}}))
	if len(d.Loads) > 1 {
		all = append(all, m.allLoads(d))
	}
	for i := range d.Loads {
		all = append(all, m.loadInput(d.Loads[i]))
	}
	all = append(all, m.reasonInput())
	for _, in := range all {
		then := in.then
		in.then = func() {
			then()
			changed()
		}
	}
	return all
}

// draft makes an input that keeps what it reads to itself: the document stays as it is until the measurement is matched.
func draft(in input, read func(text string) (meant string, set func(), err error)) *input {
	in.on = "measurement"
	set := func() {}
	in.read = func(text string) (string, func(*section.Document) *section.Document, error) {
		meant, f, err := read(text)
		if err == nil {
			set = f
		}
		return meant, func(d *section.Document) *section.Document { return d }, err
	}
	in.then = func() { set() }
	return &in
}

// words is an input of few words.
func (m *measured) words(key, label, about string, of *string, words []choice) *input {
	in := input{key: key, label: label, about: about}
	for _, c := range words {
		in.choices = append(in.choices, c.word)
		if c.kind == *of {
			in.text = c.word
		}
	}
	return draft(in, func(text string) (string, func(), error) {
		for _, c := range words {
			if squeezed(c.word) == squeezed(text) || squeezed(text) == "" && c.kind == "" {
				return "", func() { *of = c.kind }, nil
			}
		}
		return "", nil, errors.New("choose one of " + strings.Join(in.choices, ", "))
	})
}

// number is an input of a number that may be left out.
func (m *measured) number(key, label, unit, about, hint string, of *section.Opt[float64], read func(string) (float64, error)) *input {
	in := input{key: key, label: label, unit: unit, about: about, hint: hint, text: optText(*of)}
	return draft(in, func(text string) (string, func(), error) {
		if strings.TrimSpace(text) == "" {
			return hint, func() {
				*of = section.Opt[float64]{}
				if of == &m.InstrumentEmissivity {
					m.SurfaceEmissivity, m.ReflectedC = section.Opt[float64]{}, section.Opt[float64]{}
				}
			}, nil
		}
		v, err := read(text)
		return withUnit(written(v), unit), func() { *of = section.Some(v) }, err
	})
}

// readEmissivity reads an emissivity.
func readEmissivity(text string) (float64, error) {
	v, err := quantity.ParseNumber(text)
	if err == nil && (v <= 0 || v > 1) {
		err = errors.New("an emissivity lies above 0 and up to 1, such as 0.95")
	}
	return v, err
}

func readCelsius(text string) (float64, error) {
	t, err := quantity.ParseTemperature(text)
	return float64(t), err
}

// readMinutes reads minutes, or hours with their unit.
func readMinutes(text string) (float64, error) {
	text, by := strings.TrimSpace(text), 1.0
	if t, ok := strings.CutSuffix(text, "min"); ok {
		text = t
	} else if t, ok := strings.CutSuffix(text, "h"); ok {
		text, by = t, 60
	}
	v, err := quantity.ParseNumber(strings.TrimSpace(text))
	if err == nil && v < 0 {
		err = errors.New("a time below nothing isn't possible; write minutes, or hours as 2 h")
	}
	return v * by, err
}

// placesOf are where a temperature can be read.
func placesOf(d *section.Document) []string {
	places := []string{section.Outside}
	if k := d.Holder.Kind; k == section.Jacket || k == section.Conduit || k == section.Wireway {
		places = append(places, k)
	}
	for i := range d.Parts {
		places = append(places, d.Parts[i].ID)
	}
	return places
}

func (m *measured) placeInput(d *section.Document) *input {
	places := placesOf(d)
	in := input{key: "place", label: "Read at", text: m.At, choices: places, hint: "a part, or outside", missing: m.At == "", about: "The part that was read, or outside. A thermometer reads a surface, never the core under it."}
	return draft(in, func(text string) (string, func(), error) {
		text = strings.TrimSpace(text)
		if text != "" && !slices.Contains(places, text) && section.Find(d, text) == nil {
			return "", nil, errors.New("there is no " + text + " to read at; choose a part, or outside")
		}
		return "", func() { m.At = text }, nil
	})
}

func (m *measured) readingInput() *input {
	in := input{key: "reading", label: "Reading", unit: "°C", missing: !m.read, about: "In °C or °F, as the instrument showed it."}
	if m.read {
		in.text = written(m.ReadingC)
	}
	return draft(in, func(text string) (string, func(), error) {
		if strings.TrimSpace(text) == "" {
			return "", func() { m.read, m.ReadingC = false, 0 }, nil
		}
		t, err := quantity.ParseTemperature(text)
		return degreesC(float64(t)), func() { m.read, m.ReadingC = true, float64(t) }, err
	})
}

func (m *measured) loadInput(l section.Load) *input {
	in := input{
		key: "then/" + l.ID, label: l.ID, text: stateText(m.Loads, l.ID), hint: "as the design says, " + loadShown(&l),
		about: "What it carried at that time: amperes in each conductor, a share of the design's such as 60 %, or off.",
	}
	if !l.HeatWM.OK {
		in.unit = "A"
	}
	return draft(in, func(text string) (string, func(), error) {
		s, meant, given, err := readState(&l, text)
		return meant, func() { m.Loads = withState(m.Loads, s, given) }, err
	})
}

// allLoads sets every load at once to a share of what the design says.
func (m *measured) allLoads(d *section.Document) *input {
	in := input{key: "then-all", label: "All loads", hint: "a share, such as 60 %", about: "Sets every load below to a share of what the design says."}
	return draft(in, func(text string) (string, func(), error) {
		text = strings.TrimSpace(text)
		if text != "" && !strings.HasSuffix(text, "%") && !strings.EqualFold(text, "off") {
			text += " %"
		}
		next := m.Loads
		for i := range d.Loads {
			l := &d.Loads[i]
			if l.HeatWM.OK {
				continue
			}
			s, _, given, err := readState(l, text)
			if err != nil {
				return "", nil, err
			}
			next = withState(next, s, given)
		}
		return "", func() { m.Loads = next }, nil
	})
}

func (m *measured) reasonInput() *input {
	in := input{key: "reason", label: "Reason", text: m.reason, hint: "only for a higher rating", about: "A fit raises permitted currents only with a reason, which then stands on every result."}
	return draft(in, func(text string) (string, func(), error) {
		return "", func() { m.reason = strings.TrimSpace(text) }, nil
	})
}

// missing says what has to be entered before anything can be matched, "" for nothing.
func (m *measured) missing() string {
	switch {
	case m.At == "":
		return "Say where it was read: a part, or outside."
	case !m.read:
		return "Enter the reading."
	}
	return ""
}
