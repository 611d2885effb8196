package rating

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"packrise/solver/fluid"
	"packrise/solver/heat"
	"packrise/solver/section"
)

// shine tells the heat problem which media are gases and how surfaces radiate through them. of has the scene's index of each of its parts; nil: the same.
func (s *scene) shine(p *heat.Problem, of []int) {
	p.ZeroK = zeroC
	p.Pressure, _ = fluid.StandardPressure(s.doc.Surroundings.AltitudeM.V)
	p.Filling = s.holder.fill.filling()
	p.Wall.Emissivity = s.holder.insideEmissivity()
	for i := range p.Parts {
		k, q := i, &p.Parts[i]
		if of != nil {
			k = of[i]
		}
		it := &s.parts[k]
		q.Emissivity = it.skin
		if it.inside != nil {
			q.Filling = it.inside.fill.filling()
			q.InsideEmissivity = it.inside.insideEmissivity()
		}
	}
}

// filling tells what a medium does besides conducting.
func (m *medium) filling() heat.Filling {
	switch {
	case m.air:
		return heat.Air
	case m.gas:
		return heat.Gas
	}
	return heat.Solid
}

// insideEmissivity is that of the face that looks at the parts.
func (e *enclosure) insideEmissivity() float64 {
	switch {
	case (e.kind == section.OpenBundle || e.kind == section.Apart) && len(e.layers) == 0:
		return e.strings
	case e.skin > 0:
		return e.skin
	case len(e.layers) > 0:
		return e.layers[0].material.emissivity
	}
	return usualEmissivity
}

// radiationNote says how surfaces radiate to each other, and how the air between them moves.
func (s *scene) radiationNote(a answered) string {
	var skins []float64
	var dull []string // ids of what would radiate more under paint
	add := func(e float64) {
		if e = math.Round(e*100) / 100; !slices.Contains(skins, e) {
			skins = append(skins, e)
		}
	}
	look := func(e *enclosure, of []int) {
		if e == nil || !e.fill.gas || e.kind == section.NoHolder || len(of) == 0 {
			return
		}
		add(e.insideEmissivity())
		for _, j := range of {
			add(s.parts[j].skin)
			if s.parts[j].skin < bright {
				dull = append(dull, s.parts[j].id)
			}
		}
	}
	if !s.apart() {
		look(&s.holder, s.children(-1))
	}
	for k := range s.bodies {
		if b := &s.bodies[k]; b.several() {
			look(&s.holder, b.top)
		}
	}
	for i := range s.parts {
		look(s.parts[i].inside, s.children(i))
	}
	if len(skins) == 0 || a.heat == nil || !a.heat.Radiates {
		return ""
	}
	slices.Sort(skins)
	words := make([]string, len(skins))
	for i, e := range skins {
		words[i] = digits(e, 2)
	}
	note := "surfaces radiate through the gas between them, emissivity " + strings.Join(words, ", ")
	if s.thin() {
		note += fmt.Sprintf("; a gas that conducts less than %s W/mK is reckoned with that, contacts in a vacuum being unknown: across 0.2 mm it carries %s times what black surfaces at 27 °C "+
			"exchange, across 1 mm %s times", digits(heat.ThinnestK, 4), digits(carries(0.2*mm), 2), digits(carries(1*mm), 2))
	}
	if len(dull) > 0 {
		note += fmt.Sprintf("; bright metal radiates little (%s): painted or taped, emissivity about 0.9, it would run cooler", list(dull))
	}
	if h := a.heat; h.Nusselt > 1.005 {
		note += fmt.Sprintf("; in the free space the air carries %s times what it conducts (Raithby and Hollands 1975, ±25 %%)", digits(h.Nusselt, 2))
		if h.Beyond {
			note += ", beyond that formula's range"
		}
	}
	return note
}

// bright is the emissivity below which a surface is told to radiate little.
const bright = 0.2

// carries is the conductance of the thinnest gas across a gap (m) over that of black surfaces at 300 K, 4σT³.
func carries(gap float64) float64 {
	const sigma = 5.670374419e-8 // W/m²K⁴, CODATA 2018
	return heat.ThinnestK / gap / (4 * sigma * 300 * 300 * 300)
}

// thin tells whether a gas conducts less than the least that is reckoned.
func (s *scene) thin() bool {
	m := &s.holder.fill
	if m.gas && !m.air && m.k < heat.ThinnestK {
		return true
	}
	for i := range s.parts {
		if in := s.parts[i].inside; in != nil && in.fill.gas && !in.fill.air && in.fill.k < heat.ThinnestK {
			return true
		}
	}
	return false
}
