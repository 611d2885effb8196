package ui

import (
	"errors"
	"slices"
	"strings"

	"packrise/solver/quantity"
	"packrise/solver/section"
)

// aroundInputs are the inputs of a holder besides its size, fill and wall: what belongs to its kind.
func aroundInputs(k *Desk) []*input {
	h := k.Document().Holder
	var all []*input
	if h.Kind == section.Wireway {
		all = sideInputs(k)
	}
	if gasFill(k) && h.Kind != section.NoHolder {
		all = append(all, clearanceInput(k))
		if h.Kind == section.OpenBundle || h.Kind == section.Apart {
			all = append(all, stringInput(k))
		}
	}
	return append(all, touchInput(k))
}

// gasFill tells whether a gas is between the parts.
func gasFill(k *Desk) bool {
	d := k.Document()
	fill := d.Holder.Fill
	if fill == "" || fill == "air" {
		return true
	}
	if i := slices.IndexFunc(d.Materials, func(m section.Material) bool { return m.Name == fill }); i >= 0 {
		return d.Materials[i].Gas
	}
	m, ok := k.Catalog().Material(fill)
	return ok && m.Gas
}

// sideName is a side of a rectangle, in the order in which the dialog has them.
type sideName struct {
	key, label string
	side       string // within a sentence
	of         func(*section.Sides) *section.Side
}

var sideNames = []sideName{
	{"side-left", "Left side", "its left side", func(s *section.Sides) *section.Side { return &s.Left }},
	{"side-right", "Right side", "its right side", func(s *section.Sides) *section.Side { return &s.Right }},
	{"side-top", "Top side", "its top", func(s *section.Sides) *section.Side { return &s.Top }},
	{"side-bottom", "Bottom side", "its bottom", func(s *section.Sides) *section.Side { return &s.Bottom }},
}

// sideInputs say how each side's outer face meets the outside.
func sideInputs(k *Desk) []*input {
	now := k.Document().Holder.Sides
	var all []*input
	for _, n := range sideNames {
		in := input{
			key: n.key, label: n.label, text: sideText(*n.of(&now)), choices: []string{section.SideOpen, section.SideInsulated},
			about: "Its outer face: open to the surroundings, insulated, or held at a temperature in °C or °F.",
		}
		in.shown = in.text
		if n.of(&now).Kind == section.SideFixed {
			in.shown = "held at " + in.text
		}
		all = append(all, wholeInput(in, func(text string) (string, func(*section.Document), error) {
			side, meant, err := readSide(text, section.SideOpen)
			if err != nil {
				return "", nil, err
			}
			sides := k.Document().Holder.Sides
			*n.of(&sides) = side
			if !slices.ContainsFunc(sideNames, func(n sideName) bool { return n.of(&sides).Kind != section.SideInsulated }) {
				return "", nil, errors.New("with all four sides insulated no heat could leave; keep one open or held")
			}
			return meant, func(d *section.Document) { d.Holder.Sides = sides }, nil
		}))
	}
	return all
}

// sideText is a side as the entry shows it.
func sideText(s section.Side) string {
	switch s.Kind {
	case section.SideFixed:
		return degreesC(s.FixedC)
	case section.SideInsulated:
		return section.SideInsulated
	}
	return section.SideOpen
}

// readSide understands "insulated", the word of what isn't written, or a temperature.
func readSide(text, otherwise string) (side section.Side, meant string, err error) {
	switch squeezed(text) {
	case "", squeezed(otherwise):
		return section.Side{}, otherwise, nil
	case section.SideInsulated, "insulating":
		return section.Side{Kind: section.SideInsulated}, section.SideInsulated, nil
	}
	text = strings.TrimPrefix(strings.TrimPrefix(strings.TrimSpace(text), "held"), " at")
	t, err := quantity.ParseTemperature(text)
	if err != nil {
		return side, "", errors.New("it takes " + otherwise + ", insulated, or the temperature at which it is held, such as 40 °C")
	}
	return section.Side{Kind: section.SideFixed, FixedC: float64(t)}, "held at " + degreesC(float64(t)), nil
}

// clearanceInput is the mean clearance of parts that lie loose in a gas.
func clearanceInput(k *Desk) *input {
	in := input{
		key: "clearance", label: "Mean clearance", unit: "mm", text: optText(k.Document().Holder.ClearanceMM), hint: clearanceHint(k.Document().Holder.Kind),
		about: "Mean gap of parts that seem to touch, in mm or inches. 0: they touch as drawn. Empty: the usual one is assumed.",
	}
	return wholeInput(in, func(text string) (string, func(*section.Document), error) {
		v := section.Opt[float64]{}
		meant := in.hint
		if strings.TrimSpace(text) != "" {
			mm, err := quantity.ParseLength(text, quantity.Millimetre)
			if err == nil && mm < 0 {
				err = errors.New("a clearance is not below zero; write mm, such as 0.2")
			}
			if err != nil {
				return "", nil, err
			}
			v, meant = section.Some(mm), withUnit(written(mm), "mm")
		}
		return meant, func(d *section.Document) { d.Holder.ClearanceMM = v }, nil
	})
}

// clearanceHint is what is assumed where nobody has entered a clearance.
func clearanceHint(kind string) string {
	switch kind {
	case section.Conduit, section.Wireway:
		return "0.2, at most 6 % of the thinnest part"
	case section.OpenBundle, section.Apart:
		return "0.05"
	}
	return "none"
}

// stringInput is the emissivity of the inner face of strings or ties.
func stringInput(k *Desk) *input {
	in := input{
		key: "string-emissivity", label: "String emissivity", text: optText(k.Document().Holder.StringEmissivity), hint: "0.9",
		about: "How well the inner face of the strings or ties radiates: above 0, at most 1. Plastics 0.9, bright metal 0.08.",
	}
	return wholeInput(in, func(text string) (string, func(*section.Document), error) {
		if strings.TrimSpace(text) == "" {
			return "0.9", func(d *section.Document) { d.Holder.StringEmissivity = section.Opt[float64]{} }, nil
		}
		v, err := readShare(text)
		return written(v), func(d *section.Document) { d.Holder.StringEmissivity = section.Some(v) }, err
	})
}

// readShare understands "0.25", "25 %" and "1/4".
func readShare(text string) (float64, error) {
	text = strings.TrimSpace(text)
	number, percent := strings.CutSuffix(text, "%")
	above, below, ratio := strings.Cut(number, "/")
	v, err := quantity.ParseNumber(strings.TrimSpace(above))
	if ratio && err == nil {
		var w float64
		if w, err = quantity.ParseNumber(strings.TrimSpace(below)); err == nil {
			v /= w
		}
	}
	if percent {
		v /= 100
	}
	if err == nil && !(v > 0 && v <= 1) {
		err = errors.New("it lies above 0 and is at most 1, which is 100 %")
	}
	return v, err
}

// touchInput is the limit of the outside surface.
func touchInput(k *Desk) *input {
	in := input{
		key: "touch", label: "Touch limit", unit: "°C", text: optText(k.Document().Holder.TouchLimitC), hint: "none",
		about: "The most that the outside surface may have, where people can touch it. In °C or °F. Empty: no limit.",
	}
	return wholeInput(in, func(text string) (string, func(*section.Document), error) {
		v, meant, err := readOptTemperature(text, "none")
		return meant, func(d *section.Document) { d.Holder.TouchLimitC = v }, err
	})
}
