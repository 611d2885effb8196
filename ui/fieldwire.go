package ui

import (
	"errors"
	"fmt"
	"math"
	"strings"

	"packrise/solver/catalog"
	"packrise/solver/quantity"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// conductorOf looks the conductor of a core up, by its size, area or diameter.
func conductorOf(cat *catalog.Catalog, c *section.Conductor) (catalog.Conductor, error) {
	if c == nil {
		return catalog.Conductor{}, errors.New("no conductor")
	}
	metal, class := orWord(c.Metal, section.Copper), orWord(c.Class, section.Stranded)
	switch {
	case c.Size != "":
		return cat.Conductor(c.Size, metal, class)
	case c.AreaMM2.OK:
		return cat.ConductorOf(c.AreaMM2.V*1e-6, 0, metal, class)
	}
	return cat.ConductorOf(rating.MetalArea(c), c.DiameterMM.V*1e-3, metal, class)
}

// outlineText returns the outline of a conductor that is not round: "bar 20 × 5 mm", "sector 90° R 6.5 mm".
func outlineText(c *section.Conductor) string {
	switch c.Shape {
	case section.BarShape:
		return "bar " + written(c.WidthMM.V) + " × " + withUnit(written(c.HeightMM.V), "mm")
	case section.SectorShape:
		return "sector " + written(c.AngleDeg.V) + "° R " + withUnit(written(c.RadiusMM.V), "mm")
	}
	return ""
}

func orWord(s, otherwise string) string {
	if s == "" {
		return otherwise
	}
	return s
}

// spelled returns a core with what its stock stands for written out: conductor, layers, type.
func spelled(cat *catalog.Catalog, p section.Part) section.Part {
	w, ok := cat.Wire(p.Stock)
	if p.Stock == "" || !ok {
		return p
	}
	p.Stock = ""
	if p.Conductor == nil {
		p.Conductor = &section.Conductor{Size: w.Size, Metal: w.Metal, Class: w.Class}
	}
	if p.Type == "" {
		p.Type = w.Type
	}
	if c, err := conductorOf(cat, p.Conductor); err == nil && len(p.Layers) == 0 && w.DiameterM > c.DiameterM {
		p.Layers = []section.Layer{{Material: w.Insulation, ThicknessMM: micrometres((w.DiameterM - c.DiameterM) / 2 * 1e3)}}
	}
	return p
}

// micrometres rounds a length in mm to whole µm.
func micrometres(mm float64) float64 { return math.Round(mm*1e3) / 1e3 }

// stocked returns the finished wire of a size and type that the catalogue lists, "" if none.
func stocked(cat *catalog.Catalog, c *section.Conductor, typ string) string {
	want, err := conductorOf(cat, c)
	if err != nil || typ == "" {
		return ""
	}
	for _, w := range cat.Wires() {
		if w.Type == typ && w.Metal == want.Metal && w.Class == want.Class && w.Size == want.Size {
			return w.ID
		}
	}
	return ""
}

// withConductor returns the core with another conductor: a wire from stock stays one where the catalogue lists it, else it is spelled out.
// Insulation that was the usual one for size and type stays the usual one.
func withConductor(cat *catalog.Catalog, p section.Part, c section.Conductor) section.Part {
	out := spelled(cat, p)
	usual := usualLayers(cat, out)
	out.Conductor = &c
	if p.Stock != "" {
		if id := stocked(cat, &c, out.Type); id != "" {
			return fromStock(out, id)
		}
	}
	if t, _, ok := cat.TypicalWire(c.Size, out.Type); ok && len(out.Layers) == 1 && (usual || p.Stock != "") {
		out.Layers = []section.Layer{{Material: out.Layers[0].Material, ThicknessMM: micrometres(t * 1e3)}}
	}
	return out
}

// fromStock returns the core as the finished wire.
func fromStock(p section.Part, id string) section.Part {
	p.Stock, p.Conductor, p.Layers, p.Type = id, nil, nil, ""
	return p
}

// usualLayers tells whether a spelled-out core has the one layer that is usual for its size and type.
func usualLayers(cat *catalog.Catalog, p section.Part) bool {
	if p.Conductor == nil || len(p.Layers) != 1 {
		return false
	}
	t, _, ok := cat.TypicalWire(p.Conductor.Size, p.Type)
	return ok && math.Abs(t*1e3-p.Layers[0].ThicknessMM) < 2e-3
}

// withType returns the core as a wire of another type: its limit, and its insulation where that was one layer or none.
func withType(cat *catalog.Catalog, p section.Part, t catalog.WireType) section.Part {
	out := spelled(cat, p)
	out.Type = t.ID
	if p.Stock != "" {
		if id := stocked(cat, out.Conductor, t.ID); id != "" {
			return fromStock(out, id)
		}
	}
	if len(out.Layers) > 1 || t.Insulation == "" {
		return out
	}
	thick := 0.0
	if len(out.Layers) == 1 {
		thick = out.Layers[0].ThicknessMM
	}
	if out.Conductor != nil {
		if usual, _, ok := cat.TypicalWire(out.Conductor.Size, t.ID); ok {
			thick = micrometres(usual * 1e3)
		}
	}
	if thick > 0 {
		out.Layers = []section.Layer{{Material: t.Insulation, ThicknessMM: thick}}
	}
	return out
}

// sizeText returns a core's size as people write it: "8 AWG", "2.5 mm²", "⌀ 3.2 mm".
func sizeText(cat *catalog.Catalog, p section.Part) string {
	c := spelled(cat, p).Conductor
	switch {
	case c == nil:
		return ""
	case c.Size != "":
		if s, err := quantity.ParseSize(c.Size); err == nil {
			return s.Pretty()
		}
		return c.Size
	case c.AreaMM2.OK:
		return written(c.AreaMM2.V) + " mm²"
	case !c.Round():
		return outlineText(c)
	}
	return "⌀ " + written(c.DiameterMM.V) + " mm"
}

// readConductor understands a size typed for a core. A bare number is in the system that the core has.
func readConductor(cat *catalog.Catalog, text string, now section.Conductor) (section.Conductor, string, error) {
	c := now // its outline stays
	c.Size, c.AreaMM2, c.DiameterMM = "", section.Opt[float64]{}, section.Opt[float64]{}
	text = strings.TrimSpace(text)
	if !c.Round() && text == outlineText(&c) {
		return c, "the metal fills its outline", nil
	}
	if rest, ok := cutAny(text, "⌀", "Ø", "ø", "diameter"); ok {
		d, err := quantity.ParseLength(strings.TrimSpace(rest), quantity.Millimetre)
		if err != nil {
			return c, "", err
		}
		if d <= 0 {
			return c, "", errors.New("a conductor is thicker than nothing; write its diameter, such as ⌀ 3.2 mm")
		}
		if !c.Round() {
			return c, "", errors.New("this conductor is not round; write the size or area of its metal, such as 95 mm²")
		}
		c.DiameterMM = section.Some(d)
		return c, "metal of ⌀ " + written(d) + " mm", nil
	}
	if n, err := quantity.ParseNumber(text); err == nil {
		text += " " + systemOf(now, n)
	}
	size, err := quantity.ParseSize(text)
	if err != nil {
		return c, "", err
	}
	row, err := cat.Conductor(size.String(), orWord(c.Metal, section.Copper), orWord(c.Class, section.Stranded))
	if err != nil {
		if size.Kind() != quantity.MM2 {
			return c, "", err
		}
		c.AreaMM2 = section.Some(size.AreaMM2())
		return c, size.Pretty() + " of metal: not a standard size, taken by its area", nil
	}
	c.Size = row.Size
	if !c.Round() {
		return c, size.Pretty() + " of metal in its outline", nil
	}
	return c, fmt.Sprintf("%s, ⌀ %s mm over the metal", size.Pretty(), quantity.Trimmed(row.DiameterM*1e3, 2)), nil
}

func cutAny(s string, prefixes ...string) (string, bool) {
	for _, p := range prefixes {
		if rest, ok := strings.CutPrefix(s, p); ok {
			return rest, true
		}
	}
	return s, false
}

// systemOf is the unit in which a bare number is read for a conductor: the system of its size.
func systemOf(c section.Conductor, n float64) string {
	s, err := quantity.ParseSize(c.Size)
	switch {
	case err == nil && s.Kind() == quantity.MM2, c.AreaMM2.OK:
		return "mm2"
	case err != nil:
		return ""
	case n > quantity.ThinnestAWG:
		return "kcmil"
	}
	return "AWG"
}
