package ui

import (
	"errors"
	"fmt"
	"strings"

	"packrise/solver/quantity"
	"packrise/solver/section"
)

// idInput renames one part of the top level.
func idInput(k *Desk, id string) *input {
	d := k.Document()
	in := &input{key: "id", label: "Id", text: id, shown: id, on: id, step: "id of " + id}
	in.read = func(text string) (string, func(*section.Document) *section.Document, error) {
		text = strings.TrimSpace(text)
		switch {
		case text == "":
			return "", nil, errors.New("a part needs an id; write one, such as L1")
		case strings.ContainsAny(text, "/\n\t"):
			return "", nil, errors.New("an id has no / in it; write another one, such as L1")
		case text != id && section.Find(d, text) != nil:
			return "", nil, fmt.Errorf("%s is there already; write another id, such as %s", text, section.FreshID(d, stemOf(text)))
		}
		in.then = func() { k.Select(text) }
		return text, func(d *section.Document) *section.Document { return section.RenamePart(d, id, text) }, nil
	}
	return in
}

// stemOf is an id without the number at its end.
func stemOf(id string) string {
	if s := strings.TrimRight(id, "0123456789"); s != "" {
		return s
	}
	return "L"
}

// placeInputs are x and y of parts. Empty takes a part out of its place.
func placeInputs(k *Desk, ids []string) []*input {
	return []*input{
		placeInput(k, ids, "x", func(p *section.Point) *float64 { return &p.X }),
		placeInput(k, ids, "y", func(p *section.Point) *float64 { return &p.Y }),
	}
}

func placeInput(k *Desk, ids []string, axis string, of func(*section.Point) *float64) *input {
	in := input{key: axis, label: "Place " + axis, unit: "mm", hint: "not placed", about: "In mm or inches from the middle of a round holder, or from the lower left inside corner; x to the right, y up."}
	return partInput(k, ids, in,
		func(p section.Part) string {
			if !p.At.OK {
				return ""
			}
			return written(*of(&p.At.V))
		},
		func(text string) (string, func(section.Part) (section.Part, error), error) {
			if strings.TrimSpace(text) == "" {
				return "not placed", always(func(p section.Part) section.Part { p.At = section.Opt[section.Point]{}; return p }), nil
			}
			v, err := quantity.ParseLength(text, quantity.Millimetre)
			return withUnit(written(v), "mm"), always(func(p section.Part) section.Part {
				at := p.At.V
				*of(&at) = v
				p.At = section.Some(at)
				return p
			}), err
		})
}

// rodInputs are the inputs of rods beside their place.
func rodInputs(k *Desk, ids []string) []*input {
	cat, d := k.Catalog(), k.Document()
	diameter := lengthInput(k, ids, input{key: "diameter", label: "Diameter", unit: "mm", about: "Over the material, under any covering; in mm or inches."}, false,
		func(p *section.Part) *section.Opt[float64] { return &p.Diameter })
	bore := lengthInput(k, ids, input{key: "bore", label: "Bore", unit: "mm", hint: "none", about: "Of a hose, in mm or inches; empty: a solid rod."}, true,
		func(p *section.Part) *section.Opt[float64] { return &p.BoreMM })
	material := partInput(k, ids, input{key: "rodmaterial", label: "Material", choices: materialNames(cat, d)},
		func(p section.Part) string { return materialName(cat, p.Material) },
		func(text string) (string, func(section.Part) (section.Part, error), error) {
			id, err := findMaterial(cat, d, text)
			return materialName(cat, id), always(func(p section.Part) section.Part { p.Material = id; return p }), err
		})
	return []*input{diameter, material, bore, limitInput(k, ids)}
}

// lengthInput is a length in mm above zero; optional ones may be empty.
func lengthInput(k *Desk, ids []string, in input, optional bool, of func(*section.Part) *section.Opt[float64]) *input {
	return partInput(k, ids, in,
		func(p section.Part) string { return optText(*of(&p)) },
		func(text string) (string, func(section.Part) (section.Part, error), error) {
			v, meant, err := readOptLength(text, optional)
			return meant, always(func(p section.Part) section.Part { *of(&p) = v; return p }), err
		})
}

// readOptLength understands a length above zero in mm, or nothing where that may be.
func readOptLength(text string, optional bool) (section.Opt[float64], string, error) {
	if strings.TrimSpace(text) == "" && optional {
		return section.Opt[float64]{}, "none", nil
	}
	mm, err := quantity.ParseLength(text, quantity.Millimetre)
	if err != nil {
		return section.Opt[float64]{}, "", err
	}
	if mm <= 0 {
		return section.Opt[float64]{}, "", errors.New("it is above nothing; write a length in mm, such as 4.5")
	}
	return section.Some(mm), withUnit(written(mm), "mm"), nil
}

// cableInputs are the inputs of cables beside their place.
func cableInputs(k *Desk, ids []string) []*input {
	turn := partInput(k, ids, input{key: "turn", label: "Turn", unit: "°", hint: "0", about: "In degrees, counterclockwise."},
		func(p section.Part) string { return optText(p.TurnDeg) },
		func(text string) (string, func(section.Part) (section.Part, error), error) {
			text = strings.TrimSuffix(strings.TrimSpace(text), "°")
			if text == "" {
				return "0°", always(func(p section.Part) section.Part { p.TurnDeg = section.Opt[float64]{}; return p }), nil
			}
			v, err := quantity.ParseNumber(text)
			return written(v) + "°", always(func(p section.Part) section.Part { p.TurnDeg = section.Some(v); return p }), err
		})
	return []*input{turn}
}

// inputsOf are all inputs that the parts have in common.
func inputsOf(k *Desk, ids []string) []*input {
	var in []*input
	if len(ids) == 1 && !strings.Contains(ids[0], "/") {
		in = append(in, idInput(k, ids[0]))
	}
	switch kindOf(k.Document(), ids) {
	case section.Core:
		in = append(in, circuitInput(k, ids), currentInput(k, ids))
		in = append(in, coreInputs(k, ids)...)
		in = append(in, loadInputs(k, ids)...)
	case section.Rod:
		in = append(in, rodInputs(k, ids)...)
	case section.Cable:
		in = append(in, cableInputs(k, ids)...)
	}
	if len(ids) == 1 {
		if reason := limitReasonInput(k, ids[0]); reason != nil {
			in = append(in, reason)
		}
	}
	in = append(in, placeInputs(k, ids)...)
	return append(in, seatInputs(k, ids)...)
}

// kindOf returns the kind that all parts share, "" where they differ.
func kindOf(d *section.Document, ids []string) string {
	kind := ""
	for i, id := range ids {
		p := section.Find(d, id)
		if p == nil || i > 0 && p.Kind != kind {
			return ""
		}
		kind = p.Kind
	}
	return kind
}

// inputNamed returns the input of a key, nil if none.
func inputNamed(all []*input, key string) *input {
	for _, in := range all {
		if in.key == key {
			return in
		}
	}
	return nil
}
