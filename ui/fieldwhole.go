package ui

import (
	"errors"
	"strings"

	"packrise/solver/quantity"
	"packrise/solver/section"
)

// wholeInputs are the inputs of the section as a whole.
func wholeInputs(k *Desk) []*input {
	d := k.Document()
	in := []*input{titleInput(k), ambientInput(k)}
	if d.Surroundings.Kind == section.FixedFilm {
		in = append(in, filmInput(k))
	}
	switch d.Holder.Kind {
	case section.NoHolder, section.OpenBundle, section.Apart:
	default:
		in = append(in, holderInput(k))
		in = append(in, holderSizeInputs(k)...)
	}
	if d.Holder.Kind != section.NoHolder {
		in = append(in, fillInput(k))
	}
	in = append(in, holderLayerInputs(k)...)
	return append(in, aroundInputs(k)...)
}

// wholeInput makes an input of the document.
func wholeInput(in input, read func(text string) (meant string, f func(*section.Document), err error)) *input {
	in.on = "section"
	if in.step == "" {
		in.step = strings.ToLower(in.label)
	}
	if in.shown == "" && in.text != "" {
		in.shown = withUnit(in.text, in.unit)
	}
	in.read = func(text string) (string, func(*section.Document) *section.Document, error) {
		meant, f, err := read(text)
		return meant, func(d *section.Document) *section.Document { return d.With(f) }, err
	}
	return &in
}

func titleInput(k *Desk) *input {
	in := input{key: "title", label: "Title", text: k.Document().Title, hint: "untitled"}
	return wholeInput(in, func(text string) (string, func(*section.Document), error) {
		return "", func(d *section.Document) { d.Title = strings.TrimSpace(text) }, nil
	})
}

// ambientInput is the temperature of the surroundings, far away.
func ambientInput(k *Desk) *input {
	in := input{key: "ambient", label: "Ambient", unit: "°C", text: optText(k.Document().Surroundings.AmbientC), about: "In °C or °F, of the surroundings far away."}
	if k.Document().Surroundings.Kind == section.FixedWall {
		in.label, in.about = "Outside at", "In °C or °F: the outer surface is held at it."
	}
	in.missing = in.text == ""
	return wholeInput(in, func(text string) (string, func(*section.Document), error) {
		t, err := quantity.ParseTemperature(text)
		return degreesC(float64(t)), func(d *section.Document) { d.Surroundings.AmbientC = section.Some(float64(t)) }, err
	})
}

// filmInput is the constant film coefficient.
func filmInput(k *Desk) *input {
	in := input{
		key: "film", label: "Film", unit: "W/m²K", text: optText(k.Document().Surroundings.FilmWM2K),
		about: "Heat that a square metre of the outer surface gives off for each kelvin, radiation included.",
	}
	return wholeInput(in, func(text string) (string, func(*section.Document), error) {
		v, err := quantity.ParseNumber(strings.TrimSpace(strings.TrimSuffix(strings.TrimSpace(text), "W/m²K")))
		if err == nil && v <= 0 {
			err = errors.New("a film coefficient is above zero; write W/m²K, such as 9")
		}
		return withUnit(written(v), "W/m²K"), func(d *section.Document) { d.Surroundings.FilmWM2K = section.Some(v) }, err
	})
}

// holderWord is what people call a kind of holder.
func holderWord(kind string) string {
	switch kind {
	case section.OpenBundle:
		return "bundle"
	case section.Apart, section.NoHolder:
		return "section"
	}
	return kind
}

// holderInput is the holder's trade size.
func holderInput(k *Desk) *input {
	cat, now := k.Catalog(), k.Document().Holder
	in := input{key: "holder", label: upperFirst(holderWord(now.Kind)), hint: "own size", text: now.Stock, about: "A trade or metric size of the catalogue; empty: its own size and wall."}
	for _, h := range cat.Holders() {
		if h.ID == now.Stock {
			in.text = h.Name
		}
		in.choices = append(in.choices, h.Name)
	}
	return wholeInput(in, func(text string) (string, func(*section.Document), error) {
		if strings.TrimSpace(text) == "" {
			return "its own size and wall", func(d *section.Document) { d.Holder = spelledHolder(cat, d.Holder) }, nil
		}
		h, err := findHolder(cat, text)
		if err != nil {
			return "", nil, err
		}
		return holderMeant(h), func(d *section.Document) { *d = *withHolder(cat, d, h) }, nil
	})
}

// holderSizeInputs are the inside of a holder; entering one spells a stock holder out.
func holderSizeInputs(k *Desk) []*input {
	h := spelledHolder(k.Catalog(), k.Document().Holder)
	one := func(key, label string, of func(*section.Holder) *section.Opt[float64]) *input {
		in := input{key: key, label: label, unit: "mm", text: optText(*of(&h)), about: "Clear inside, in mm or inches."}
		return wholeInput(in, func(text string) (string, func(*section.Document), error) {
			v, meant, err := readOptLength(text, false)
			return meant, func(d *section.Document) {
				d.Holder = spelledHolder(k.Catalog(), d.Holder)
				*of(&d.Holder) = v
			}, err
		})
	}
	if h.Kind == section.Wireway {
		return []*input{
			one("width", "Inside width", func(h *section.Holder) *section.Opt[float64] { return &h.WidthMM }),
			one("height", "Inside height", func(h *section.Holder) *section.Opt[float64] { return &h.HeightMM }),
		}
	}
	return []*input{one("inside", "Inside ⌀", func(h *section.Holder) *section.Opt[float64] { return &h.InsideMM })}
}

// fillInput is the medium between the parts.
func fillInput(k *Desk) *input {
	cat, d := k.Catalog(), k.Document()
	in := input{key: "fill", label: "Fill", text: "air", choices: append([]string{"air"}, materialNames(cat, d)...), about: "What is between the parts: air, or a filler."}
	if f := d.Holder.Fill; f != "" && f != "air" {
		in.text = materialName(cat, f)
	}
	return wholeInput(in, func(text string) (string, func(*section.Document), error) {
		if squeezed(text) == "air" || squeezed(text) == "" {
			return "air", func(d *section.Document) { d.Holder.Fill = "" }, nil
		}
		id, err := findMaterial(cat, d, text)
		return materialName(cat, id), func(d *section.Document) { d.Holder.Fill = id }, err
	})
}

// holderLayerInputs are the layers of the holder's wall, by the inputs of a part's layers.
func holderLayerInputs(k *Desk) []*input {
	cat := k.Catalog()
	h := spelledHolder(cat, k.Document().Holder)
	switch h.Kind {
	case section.NoHolder, section.OpenBundle, section.Apart:
		return nil
	}
	var all []*input
	for _, f := range layerFields(k, "Wall", len(h.Layers)) {
		in := f.in
		in.text = f.text(h.Layers)
		all = append(all, wholeInput(in, func(text string) (string, func(*section.Document), error) {
			meant, change, err := f.read(text)
			if err != nil {
				return "", nil, err
			}
			layers, err := change(h.Layers)
			return meant, func(d *section.Document) {
				d.Holder = spelledHolder(cat, d.Holder)
				d.Holder.Layers = layers
			}, err
		}))
	}
	return all
}
