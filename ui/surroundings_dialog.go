package ui

import (
	"errors"
	"slices"
	"strings"

	"packrise/solver/quantity"
	"packrise/solver/section"
)

// showSurroundings edits what the section gives its heat to.
func (w *Window) showSurroundings() { w.showInputs("Surroundings", surroundingsInputs) }

// surroundingsInputs are the inputs of the surroundings: kind, ambient, and what belongs to the kind.
func surroundingsInputs(k *Desk) []*input {
	s := k.Document().Surroundings
	all := []*input{surroundingsKindInput(k), ambientInput(k)}
	if s.Kind == section.FixedFilm {
		all = append(all, filmInput(k))
	}
	for i := range surroundingsNumbers {
		if n := &surroundingsNumbers[i]; slices.Contains(n.kinds, s.Kind) {
			all = append(all, n.input(k))
		}
	}
	if s.Kind == section.Insulation && s.Wrap != nil {
		all = append(all, wrapInputs(k)...)
	}
	if slices.Contains(airAndWater, s.Kind) {
		all = append(all, runInput(k))
		if s.Run == section.Vertical {
			all = append(all, heightNumber.input(k))
		}
	}
	if s.Kind == section.MovingAir || s.Kind == section.Water {
		all = append(all, directionInput(k))
	}
	if s.Kind != section.Vacuum {
		all = append(all, wetInput(k))
	}
	return append(all, againstInputs(k)...)
}

var (
	air         = []string{section.StillAir, section.MovingAir, section.Insulation}
	airAndWater = append(slices.Clip(air), section.Water)
	light       = append(slices.Clip(air), section.Vacuum)
)

// surroundingsNumber is a number of the surroundings.
type surroundingsNumber struct {
	key, label, unit, about string
	low, high               float64
	optional                string // what an empty entry means; "": it must be entered
	kinds                   []string
	of                      func(*section.Surroundings) *section.Opt[float64]
}

var surroundingsNumbers = []surroundingsNumber{
	{
		"speed", "Speed", "m/s", "Of the air or the water past the run.", 0, 100, "at rest",
		[]string{section.MovingAir, section.Water},
		func(s *section.Surroundings) *section.Opt[float64] { return &s.AirSpeedMS },
	},
	{
		"depth", "Depth", "m", "Of the axis below the ground; often 0.7.", 0.001, 100, "",
		[]string{section.Buried},
		func(s *section.Surroundings) *section.Opt[float64] { return &s.DepthM },
	},
	{
		"soil", "Soil", "W/mK", "Conductivity of the ground: 0.4 where it dries out, 1 where it stays moist.", 0.01, 20, "",
		[]string{section.Buried},
		func(s *section.Surroundings) *section.Opt[float64] { return &s.SoilWMK },
	},
	{
		"altitude", "Altitude", "m", "Pressure altitude of the place: it thins the air and leaves the ambient as it is.",
		section.LowestAltitudeM, section.HighestAltitudeM, "sea level", air,
		func(s *section.Surroundings) *section.Opt[float64] { return &s.AltitudeM },
	},
	{
		"radiant", "Radiates to", "°C", "What the surface sees around it. Empty: as warm as the ambient.", -273, 2000, "the ambient", light,
		func(s *section.Surroundings) *section.Opt[float64] { return &s.RadiantC },
	},
	{
		"sun", "Sun", "W/m²", "Irradiance from above; 1000 at noon in summer. Empty: none.", 0, 2000, "none", light,
		func(s *section.Surroundings) *section.Opt[float64] { return &s.SunWM2 },
	},
}

var heightNumber = surroundingsNumber{
	"height", "Height", "m", "Of the vertical run.", 0.001, 1000, "", nil,
	func(s *section.Surroundings) *section.Opt[float64] { return &s.HeightM },
}

// input makes the number an input of the document.
func (n *surroundingsNumber) input(k *Desk) *input {
	now := k.Document().Surroundings
	in := input{key: n.key, label: n.label, unit: n.unit, about: n.about, hint: n.optional, text: optText(*n.of(&now))}
	return wholeInput(in, func(text string) (string, func(*section.Document), error) {
		v, err := n.read(text)
		meant := n.optional
		if v.OK {
			meant = withUnit(written(v.V), n.unit)
		}
		return meant, func(d *section.Document) { *n.of(&d.Surroundings) = v }, err
	})
}

// read understands a text: a number with or without its unit, temperatures and lengths in any unit.
func (n *surroundingsNumber) read(text string) (section.Opt[float64], error) {
	text = strings.TrimSpace(text)
	if text == "" && n.optional != "" {
		return section.Opt[float64]{}, nil
	}
	v, err := n.number(text)
	if err == nil && (v < n.low || v > n.high) {
		err = errors.New("it lies between " + written(n.low) + " and " + withUnit(written(n.high), n.unit))
	}
	return section.Some(v), err
}

func (n *surroundingsNumber) number(text string) (float64, error) {
	switch n.unit {
	case "°C":
		t, err := quantity.ParseTemperature(text)
		return float64(t), err
	case "m":
		mm, err := quantity.ParseLength(text, quantity.Metre)
		return mm / 1000, err
	}
	return quantity.ParseNumber(strings.TrimSpace(strings.TrimSuffix(text, n.unit)))
}

// surroundingsKinds are the kinds by what people call them.
var surroundingsKinds = []choice{
	{section.StillAir, "still air"},
	{section.MovingAir, "moving air"},
	{section.Buried, "ground"},
	{section.Water, "water"},
	{section.Vacuum, "vacuum"},
	{section.Insulation, "thermal insulation in air"},
	{section.FixedFilm, "fixed film"},
	{section.FixedWall, "surface held"},
}

// surroundingsKindInput is the kind of the surroundings. What the new kind needs is written out, so that it can be seen and changed.
func surroundingsKindInput(k *Desk) *input {
	in := input{key: "surroundings", label: "Kind", step: "kind of surroundings", about: "What takes the heat up. Fixed film: one coefficient all round. Surface held: the outside at one temperature."}
	kinds := surroundingsKinds
	if k.Document().Holder.Kind == section.Apart {
		kinds = slices.DeleteFunc(slices.Clone(kinds), func(c choice) bool { return slices.Contains(wholeOnly, c.kind) })
	}
	return choiceInput(in, k.Document().Surroundings.Kind, kinds, func(d *section.Document, kind string) *section.Document {
		return section.Surround(d, kind, func(s *section.Surroundings) { completeSurroundings(s) })
	})
}

// completeSurroundings gives a kind the numbers without which it can't be reckoned.
func completeSurroundings(s *section.Surroundings) {
	need := func(o *section.Opt[float64], v float64) {
		if !o.OK {
			*o = section.Some(v)
		}
	}
	switch s.Kind {
	case section.MovingAir:
		need(&s.AirSpeedMS, 0.5)
	case section.Buried:
		need(&s.DepthM, 0.7)
		need(&s.SoilWMK, 1)
	case section.FixedFilm:
		need(&s.FilmWM2K, 9)
	case section.Insulation:
		if s.Wrap == nil {
			s.Wrap = &section.Layer{Material: "mineral-wool", ThicknessMM: 50}
		}
	}
}

// wordInput is an input of one of two words; the first is what an empty key means.
func wordInput(k *Desk, in input, words []choice, now string, set func(s *section.Surroundings, kind string)) *input {
	return choiceInput(in, now, words, func(d *section.Document, kind string) *section.Document {
		return d.With(func(d *section.Document) { set(&d.Surroundings, kind) })
	})
}

func runInput(k *Desk) *input {
	now := orWord(k.Document().Surroundings.Run, section.Horizontal)
	in := input{key: "run", label: "Run", about: "Level, or upright between two floors."}
	return wordInput(k, in, []choice{{section.Horizontal, "horizontal"}, {section.Vertical, "vertical"}}, now, func(s *section.Surroundings, kind string) {
		s.Run, s.HeightM = "", section.Opt[float64]{}
		if kind == section.Vertical {
			s.Run, s.HeightM = kind, section.Some(3.0)
		}
	})
}

func directionInput(k *Desk) *input {
	now := k.Document().Surroundings.AirDirection
	if now == "" {
		now = section.Across
		if k.Document().Holder.Kind == section.Wireway {
			now = section.Along
		}
	}
	in := input{key: "direction", label: "Flows", about: "Across the run, or along it."}
	return wordInput(k, in, []choice{{section.Across, "across"}, {section.Along, "along"}}, now, func(s *section.Surroundings, kind string) {
		s.AirDirection = kind
	})
}

func wetInput(k *Desk) *input {
	now := "dry"
	if k.Document().Surroundings.Wet {
		now = "wet"
	}
	in := input{key: "wet", label: "Place", about: "A wet place takes the wire types' wet limits."}
	return wordInput(k, in, []choice{{"dry", "dry"}, {"wet", "wet"}}, now, func(s *section.Surroundings, kind string) { s.Wet = kind == "wet" })
}

// wrapInputs are material and thickness of the thermal insulation.
func wrapInputs(k *Desk) []*input {
	cat, d := k.Catalog(), k.Document()
	now := *d.Surroundings.Wrap
	set := func(l section.Layer) func(*section.Document) {
		return func(d *section.Document) { d.Surroundings.Wrap = &l }
	}
	material := input{key: "wrap", label: "Insulation", text: materialName(cat, now.Material), choices: materialNames(cat, d), about: "What is wrapped round the whole section."}
	thick := input{key: "wrap-thickness", label: "Insulation thickness", unit: "mm", text: written(now.ThicknessMM), about: "In mm or in."}
	return []*input{
		wholeInput(material, func(text string) (string, func(*section.Document), error) {
			id, err := findMaterial(cat, d, text)
			return materialName(cat, id), set(section.Layer{Material: id, ThicknessMM: now.ThicknessMM}), err
		}),
		wholeInput(thick, func(text string) (string, func(*section.Document), error) {
			v, meant, err := readOptLength(text, false)
			return meant, set(section.Layer{Material: now.Material, ThicknessMM: v.V}), err
		}),
	}
}
