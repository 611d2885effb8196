package study

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"packrise/solver/catalog"
	"packrise/solver/section"
)

// outside: holder, paint, ambient.
func (a *adviser) outside() {
	a.holder()
	a.paint()
	if c := a.w.Surroundings.AmbientC; c.OK {
		a.add(candidate{
			kind: ChangeAmbient, always: true, text: fmt.Sprintf("Bring the ambient down by %.0f K, to %s", lowerK, degrees(c.V-lowerK)),
			make: func(d *section.Document) (*section.Document, bool) { return cooler(d), true },
		})
	}
}

// cooler has every ambient lower, those of the cases too.
func cooler(d *section.Document) *section.Document {
	d = warmer(d, -lowerK)
	for _, c := range d.Cases {
		if c.AmbientC.OK {
			c.AmbientC.V -= lowerK
			d = section.SetCase(d, c)
		}
	}
	return d
}

func (a *adviser) holder() {
	h := a.w.Holder
	switch h.Kind {
	case section.Conduit, section.Wireway, section.Jacket:
	default:
		return
	}
	name, next := "", func(d *section.Document) *section.Document { return wide(d, 1.1) }
	if h.Stock != "" {
		larger, ok := a.s.larger(h.Stock)
		now, found := a.s.cat.Holder(h.Stock)
		if !ok || !found {
			return
		}
		name = larger.Name + " in place of " + now.Name
		next = func(d *section.Document) *section.Document {
			h := d.Holder
			h.Stock = larger.ID
			return section.SetHolder(d, h)
		}
	} else {
		name = "a " + h.Kind + " 10 % wider inside"
	}
	a.add(candidate{
		kind: ChangeHolder, always: true, text: "Use " + name,
		make: func(d *section.Document) (*section.Document, bool) {
			d = next(d)
			if h.Kind == section.Conduit {
				d = rest(d, a.s.cat)
			}
			return d, true
		},
	})
}

// larger is the next larger holder of a family, by the area inside.
func (s *Study) larger(stock string) (next catalog.Holder, ok bool) {
	now, found := s.cat.Holder(stock)
	if !found {
		return next, false
	}
	for _, h := range s.cat.Holders() {
		if h.Kind == now.Kind && familyName(h.ID) == familyName(stock) && insideArea(h) > worthwhile*insideArea(now) && (!ok || insideArea(h) < insideArea(next)) {
			next, ok = h, true
		}
	}
	return next, ok
}

// worthwhile is how much more area inside makes a holder the next larger one, and not another shape of the same.
const worthwhile = 1.15

func insideArea(h catalog.Holder) float64 {
	if h.InsideM > 0 {
		return math.Pi / 4 * h.InsideM * h.InsideM
	}
	return h.WidthM * h.HeightM
}

// familyName is an id without its sizes.
func familyName(id string) string {
	return strings.Map(func(r rune) rune {
		if strings.ContainsRune("0123456789./x-", r) {
			return -1
		}
		return r
	}, id)
}

// Paint on metal: what it conducts, how thick it is, how it radiates (handbooks, from memory; a light colour absorbs 0.3 of the sun).
const (
	paintK, paintMM, paintEmits, paintAbsorbs = 0.2, 0.1, 0.9, 0.3
	brightBelow                               = 0.5
)

// paint: a bright outside.
func (a *adviser) paint() {
	h := a.w.Holder
	last := ""
	if row, ok := a.s.cat.Holder(h.Stock); ok {
		last = row.Wall
	}
	if n := len(h.Layers); n > 0 {
		last = h.Layers[n-1].Material
	}
	if last == "" || a.w.Surroundings.Wrap != nil || a.emissivity(last) >= brightBelow {
		return
	}
	switch a.w.Surroundings.Kind {
	case section.StillAir, section.MovingAir, section.Vacuum:
	default:
		return
	}
	a.add(candidate{
		kind: ChangePaint, always: true, text: "Paint the " + h.Kind + " outside, in a light colour",
		make: func(d *section.Document) (*section.Document, bool) { return a.s.painted(d), true },
	})
}

// painted gives the outside a coat. A holder from the catalogue takes no layers of its own, so it is written out.
func (s *Study) painted(d *section.Document) *section.Document {
	coat := section.Material{
		Name: "paint", KWMK: paintK, Emissivity: section.Some(paintEmits), Absorptivity: section.Some(paintAbsorbs), Source: "light paint: handbooks, from memory",
	}
	h := d.Holder
	if row, ok := s.cat.Holder(h.Stock); ok {
		h.Stock = ""
		h.Layers = []section.Layer{{Material: row.Wall, ThicknessMM: micron(row.WallM)}}
		if row.InsideM > 0 {
			h.InsideMM = section.Some(micron(row.InsideM))
		} else {
			h.WidthMM, h.HeightMM = section.Some(micron(row.WidthM)), section.Some(micron(row.HeightM))
		}
	}
	for slices.ContainsFunc(d.Materials, func(m section.Material) bool { return m.Name == coat.Name }) {
		coat.Name += "-light"
	}
	h.Layers = append(slices.Clip(h.Layers), section.Layer{Material: coat.Name, ThicknessMM: paintMM})
	return section.SetHolder(d.With(func(d *section.Document) { d.Materials = append(slices.Clip(d.Materials), coat) }), h)
}

// micron writes metres in millimetres, to a micrometre.
func micron(m float64) float64 { return math.Round(m*1e6) / 1e3 }

// emissivity of a material of the design or the catalogue; 1 for what nobody knows.
func (a *adviser) emissivity(id string) float64 {
	for i := range a.w.Materials {
		if m := &a.w.Materials[i]; m.Name == id && m.Emissivity.OK {
			return m.Emissivity.V
		}
	}
	if m, ok := a.s.cat.Material(id); ok {
		return m.Emissivity.V
	}
	return 1
}
