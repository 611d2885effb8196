package ui

import (
	"errors"
	"fmt"
	"slices"
	"strconv"
	"strings"

	"packrise/solver/catalog"
	"packrise/solver/quantity"
	"packrise/solver/section"
)

// layerField is an input of one thing about one layer of a stack.
type layerField struct {
	in   input
	text func([]section.Layer) string
	read func(text string) (meant string, f func([]section.Layer) ([]section.Layer, error), err error)
}

// layerFields are material and thickness of n layers; with none, the material of the first to be.
func layerFields(k *Desk, label string, n int) []layerField {
	var all []layerField
	for i := range max(n, 1) {
		name := label
		if n > 1 {
			name = label + " " + strconv.Itoa(i+1)
		}
		all = append(all, layerMaterial(k, name, i))
		if n > 0 {
			all = append(all, layerThickness(name, i))
		}
	}
	return all
}

// layerMaterial is the material of layer i. It also takes all layers at once, "pvc 0.48 + pa 0.1", and "none".
func layerMaterial(k *Desk, label string, i int) layerField {
	cat, d := k.Catalog(), k.Document()
	return layerField{
		in: input{
			key: "material" + strconv.Itoa(i), label: label, hint: "such as pvc 0.8", choices: materialNames(cat, d),
			about: "A material, or all layers from the inside outwards, such as pvc 0.48 + pa 0.1; none takes them off.",
		},
		text: func(l []section.Layer) string {
			if i < len(l) {
				return materialName(cat, l[i].Material)
			}
			return ""
		},
		read: func(text string) (string, func([]section.Layer) ([]section.Layer, error), error) {
			id, err := findMaterial(cat, d, text)
			if err != nil {
				layers, err := readLayers(cat, d, text)
				return layersMeant(cat, layers), func([]section.Layer) ([]section.Layer, error) { return layers, nil }, err
			}
			return materialName(cat, id), func(l []section.Layer) ([]section.Layer, error) {
				if i >= len(l) {
					return nil, fmt.Errorf("how thick is it? write the thickness too, such as %s 0.8", text)
				}
				l = slices.Clone(l)
				l[i].Material = id
				return l, nil
			}, nil
		},
	}
}

var errThin = errors.New("a layer is thicker than nothing; write its thickness in mm, such as 0.5")

// layerThickness is the thickness of layer i.
func layerThickness(label string, i int) layerField {
	return layerField{
		in: input{key: "thickness" + strconv.Itoa(i), label: label + " thickness", unit: "mm", about: "In mm, mil or inches."},
		text: func(l []section.Layer) string {
			if i < len(l) {
				return written(l[i].ThicknessMM)
			}
			return ""
		},
		read: func(text string) (string, func([]section.Layer) ([]section.Layer, error), error) {
			mm, err := quantity.ParseLength(text, quantity.Millimetre)
			if err == nil && mm <= 0 {
				err = errThin
			}
			return withUnit(written(mm), "mm"), func(l []section.Layer) ([]section.Layer, error) {
				l = slices.Clone(l)
				if i < len(l) {
					l[i].ThicknessMM = mm
				}
				return l, nil
			}, err
		},
	}
}

// readLayers understands "pvc 0.48 + pa 0.1 mm".
func readLayers(cat *catalog.Catalog, d *section.Document, text string) ([]section.Layer, error) {
	if s := strings.ToLower(strings.TrimSpace(text)); s == "" || s == "none" || s == "bare" {
		return nil, nil
	}
	var layers []section.Layer
	for one := range strings.SplitSeq(text, "+") {
		words := strings.Fields(one)
		cut := slices.IndexFunc(words, func(w string) bool { return w[0] >= '0' && w[0] <= '9' || w[0] == '.' })
		if cut < 0 {
			cut = len(words)
		}
		id, err := findMaterial(cat, d, strings.Join(words[:cut], " "))
		if err != nil {
			return nil, err
		}
		if cut == len(words) {
			return nil, fmt.Errorf("how thick is the %s? write the thickness behind it, such as %s 0.8", id, id)
		}
		mm, err := quantity.ParseLength(strings.Join(words[cut:], " "), quantity.Millimetre)
		if err != nil {
			return nil, err
		}
		if mm <= 0 {
			return nil, errThin
		}
		layers = append(layers, section.Layer{Material: id, ThicknessMM: mm})
	}
	return layers, nil
}

func layersMeant(cat *catalog.Catalog, layers []section.Layer) string {
	if len(layers) == 0 {
		return "no layer"
	}
	var out []string
	for _, l := range layers {
		out = append(out, materialName(cat, l.Material)+" "+withUnit(written(l.ThicknessMM), "mm"))
	}
	return strings.Join(out, " + ")
}

// materialName is what people call a material.
func materialName(cat *catalog.Catalog, id string) string {
	if m, ok := cat.Material(id); ok && m.Name != "" {
		return m.Name
	}
	return id
}

// materialNames lists the document's own materials and the catalogue's.
func materialNames(cat *catalog.Catalog, d *section.Document) []string {
	var names []string
	for _, m := range d.Materials {
		names = append(names, m.Name)
	}
	for _, m := range cat.Materials() {
		if name := materialName(cat, m.ID); !slices.Contains(names, name) {
			names = append(names, name)
		}
	}
	return names
}

// findMaterial returns the id of the material that a text names.
func findMaterial(cat *catalog.Catalog, d *section.Document, text string) (string, error) {
	want := squeezed(text)
	for _, m := range d.Materials {
		if squeezed(m.Name) == want {
			return m.Name, nil
		}
	}
	for _, m := range cat.Materials() {
		if squeezed(m.ID) == want || squeezed(m.Name) == want {
			return m.ID, nil
		}
	}
	return "", notFound("material", strings.TrimSpace(text), cat.Nearest("material", strings.ToLower(strings.TrimSpace(text)), 3))
}
