package ui

import (
	"fmt"
	"strings"

	"packrise/solver/catalog"
	"packrise/solver/quantity"
	"packrise/solver/section"
)

// coreInputs are the inputs of cores beside current, circuit and place.
func coreInputs(k *Desk, ids []string) []*input {
	in := []*input{sizeInput(k, ids), metalInput(k, ids), strandInput(k, ids), typeInput(k, ids)}
	in = append(in, coreLayerInputs(k, ids)...)
	return append(in, limitInput(k, ids), roleInput(k, ids))
}

// sizeInput is the size of cores; the list has the sizes of the system in which the first is written.
func sizeInput(k *Desk, ids []string) *input {
	cat := k.Catalog()
	first := firstCore(k, ids)
	american := true
	if first.Conductor != nil {
		s, err := quantity.ParseSize(first.Conductor.Size)
		american = err == nil && s.Kind() != quantity.MM2
	}
	in := input{key: "size", label: "Size", about: "AWG, kcmil or mm² of metal, or ⌀ 3.2 mm for a conductor of that diameter."}
	for _, s := range cat.Sizes(american) {
		in.choices = append(in.choices, prettySize(s))
	}
	return partInput(k, ids, in, func(p section.Part) string { return sizeText(cat, p) },
		func(text string) (string, func(section.Part) (section.Part, error), error) {
			now := section.Conductor{}
			if first.Conductor != nil {
				now = *first.Conductor
			}
			_, meant, err := readConductor(cat, text, now)
			return meant, func(p section.Part) (section.Part, error) {
				was := spelled(cat, p).Conductor
				if was == nil {
					was = &now
				}
				c, _, err := readConductor(cat, text, *was)
				return withConductor(cat, p, c), err
			}, err
		})
}

// firstCore returns the first of the parts, spelled out.
func firstCore(k *Desk, ids []string) section.Part {
	for _, id := range ids {
		if p := section.Find(k.Document(), id); p != nil {
			return spelled(k.Catalog(), *p)
		}
	}
	return section.Part{}
}

func prettySize(canonical string) string {
	if s, err := quantity.ParseSize(canonical); err == nil {
		return s.Pretty()
	}
	return canonical
}

// metalInput and strandInput change a conductor's metal and build.
func metalInput(k *Desk, ids []string) *input {
	return conductorWordInput(k, ids, input{key: "metal", label: "Metal"}, []string{section.Copper, section.TinnedCopper, section.Aluminium},
		func(c *section.Conductor) *string { return &c.Metal })
}

func strandInput(k *Desk, ids []string) *input {
	return conductorWordInput(k, ids, input{key: "class", label: "Strands", about: "Class 1 (solid), 2 (stranded) or 5 (flexible) of IEC 60228."},
		[]string{section.Stranded, section.Flexible, section.Solid}, func(c *section.Conductor) *string { return &c.Class })
}

// conductorWordInput is an input of one of a conductor's words; the first word is the default.
func conductorWordInput(k *Desk, ids []string, in input, words []string, of func(*section.Conductor) *string) *input {
	cat := k.Catalog()
	in.choices = words
	return partInput(k, ids, in,
		func(p section.Part) string {
			if c := spelled(cat, p).Conductor; c != nil {
				return orWord(*of(c), words[0])
			}
			return ""
		},
		func(text string) (string, func(section.Part) (section.Part, error), error) {
			word, err := oneOf(text, words)
			return word, func(p section.Part) (section.Part, error) {
				c := section.Conductor{}
				if was := spelled(cat, p).Conductor; was != nil {
					c = *was
				}
				*of(&c) = word
				if _, err := conductorOf(cat, &c); err != nil {
					return p, err
				}
				return withConductor(cat, p, c), nil
			}, err
		})
}

// oneOf finds the word that a text means: its beginning is enough where it fits one only.
func oneOf(text string, words []string) (string, error) {
	text = strings.ToLower(strings.TrimSpace(text))
	var fits []string
	for _, w := range words {
		if w == text {
			return w, nil
		}
		if text != "" && strings.HasPrefix(w, text) {
			fits = append(fits, w)
		}
	}
	if len(fits) == 1 {
		return fits[0], nil
	}
	return "", fmt.Errorf("%q isn't one of the words here; write %s", text, strings.Join(words, ", "))
}

// typeInput is the wire type, which sets the limit and the insulation.
func typeInput(k *Desk, ids []string) *input {
	cat := k.Catalog()
	in := input{key: "type", label: "Wire type", hint: "none", about: "Sets the temperature limit, dry or wet, and the insulation."}
	for _, t := range cat.WireTypes() {
		in.choices = append(in.choices, t.Name)
	}
	return partInput(k, ids, in,
		func(p section.Part) string {
			id := spelled(cat, p).Type
			if t, ok := cat.WireType(id); ok {
				return t.Name
			}
			return id
		},
		func(text string) (string, func(section.Part) (section.Part, error), error) {
			if strings.TrimSpace(text) == "" {
				return "no wire type: the limit of the insulation counts", always(func(p section.Part) section.Part {
					p = spelled(cat, p)
					p.Type = ""
					return p
				}), nil
			}
			t, err := findType(cat, text)
			if err != nil {
				return "", nil, err
			}
			return typeMeant(t), always(func(p section.Part) section.Part { return withType(cat, p, t) }), nil
		})
}

func findType(cat *catalog.Catalog, text string) (catalog.WireType, error) {
	want := squeezed(text)
	for _, t := range cat.WireTypes() {
		if squeezed(t.ID) == want || squeezed(t.Name) == want {
			return t, nil
		}
	}
	return catalog.WireType{}, notFound("wire type", text, cat.Nearest("type", strings.ToLower(strings.TrimSpace(text)), 3))
}

func notFound(what, text string, nearest []string) error {
	if len(nearest) == 0 {
		return fmt.Errorf("there is no %s %q", what, text)
	}
	return fmt.Errorf("there is no %s %q; nearest are %s", what, text, strings.Join(nearest, ", "))
}

func typeMeant(t catalog.WireType) string {
	s := t.Name + ", dry " + degreesC(t.DryC)
	switch {
	case t.NeverWet:
		s += ", never wet"
	case t.WetC != 0 && t.WetC != t.DryC:
		s += ", wet " + degreesC(t.WetC)
	}
	return s
}

// degreesC writes a temperature that is an input.
func degreesC(c float64) string { return withUnit(written(c), "°C") }

// limitInput is a limit that a person sets in place of the type's or the material's.
func limitInput(k *Desk, ids []string) *input {
	in := input{key: "limit", label: "Limit", unit: "°C", hint: limitHint(k, ids), about: "In °C or °F. Empty: the limit of the wire type, else the lowest of its materials."}
	return partInput(k, ids, in, func(p section.Part) string { return optText(p.LimitC) },
		func(text string) (string, func(section.Part) (section.Part, error), error) {
			v, meant, err := readOptTemperature(text, "from type and material")
			return meant, always(func(p section.Part) section.Part { p.LimitC = v; return p }), err
		})
}

// limitHint tells which limit counts while nobody has set one.
func limitHint(k *Desk, ids []string) string {
	r, _ := k.Result()
	if r == nil || len(ids) != 1 {
		return "from type and material"
	}
	for _, c := range r.Conductors {
		if c.ID == ids[0] && c.LimitC.OK {
			if c.LimitAssumed {
				return written(c.LimitC.V) + ", assumed"
			}
			return written(c.LimitC.V)
		}
	}
	return "from type and material"
}

func optText(o section.Opt[float64]) string {
	if !o.OK {
		return ""
	}
	return written(o.V)
}

// readOptTemperature understands a temperature, or nothing.
func readOptTemperature(text, otherwise string) (section.Opt[float64], string, error) {
	if strings.TrimSpace(text) == "" {
		return section.Opt[float64]{}, otherwise, nil
	}
	t, err := quantity.ParseTemperature(text)
	if err != nil {
		return section.Opt[float64]{}, "", err
	}
	return section.Some(float64(t)), degreesC(float64(t)), nil
}

// roleInput is a conductor's role.
func roleInput(k *Desk, ids []string) *input {
	words := []string{section.RoleLine, section.RoleNeutral, section.RoleEarth, section.RoleControl, section.RoleSpare, section.RoleSignal}
	in := input{key: "role", label: "Role", choices: words, about: "What the conductor is for. An earth needs no load; a signal carries nothing that could warm it. Tables count by it."}
	out := partInput(k, ids, in, func(p section.Part) string { return orWord(p.Role, section.RoleLine) }, nil)
	out.read = func(text string) (string, func(*section.Document) *section.Document, error) {
		w, err := oneOf(text, words)
		role := w
		if role == section.RoleLine {
			role = ""
		}
		return w, func(d *section.Document) *section.Document {
			for _, id := range ids {
				d = section.SetRole(d, id, role) // with what names it as a neutral
			}
			return d
		}, err
	}
	return out
}

// coreLayerInputs are material and thickness of every layer of the cores, where they have equally many.
func coreLayerInputs(k *Desk, ids []string) []*input {
	cat := k.Catalog()
	n := len(firstCore(k, ids).Layers)
	for _, id := range ids {
		if p := section.Find(k.Document(), id); p == nil || len(spelled(cat, *p).Layers) != n {
			return nil
		}
	}
	var all []*input
	for _, f := range layerFields(k, "Insulation", n) {
		all = append(all, partInput(k, ids, f.in, func(p section.Part) string { return f.text(spelled(cat, p).Layers) },
			func(text string) (string, func(section.Part) (section.Part, error), error) {
				meant, change, err := f.read(text)
				return meant, func(p section.Part) (section.Part, error) {
					var err error
					p = spelled(cat, p)
					p.Layers, err = change(p.Layers)
					return p, err
				}, err
			}))
	}
	return all
}
