package catalog

import (
	"slices"

	"packrise/solver/quantity"
)

// thicknessRow gives insulation by size for types of which no finished wire is listed.
type thicknessRow struct {
	Types    []string           `yaml:"types"`
	From     string             `yaml:"from"`
	StepsMM  map[string]float64 `yaml:"steps_mm"`
	StepsMil map[string]float64 `yaml:"steps_mil"`
	Source   sourceRow          `yaml:"source"`
}

// steps is a thicknessRow in order.
type steps struct {
	from   quantity.Size
	at     []step
	source Source
}

type step struct {
	to quantity.Size
	mm float64
}

const mil = 0.0254 // mm

func (r thicknessRow) steps() (steps, error) {
	var c check
	out := steps{from: c.size(r.From), source: r.Source.source()}
	c.sources(r.Source)
	if (r.StepsMM == nil) == (r.StepsMil == nil) {
		c.fail("write either steps_mm or steps_mil")
	}
	for to, mm := range r.StepsMM {
		out.at = append(out.at, step{c.size(to), mm})
	}
	for to, mils := range r.StepsMil {
		out.at = append(out.at, step{c.size(to), mils * mil})
	}
	slices.SortFunc(out.at, func(a, b step) int { return a.to.Compare(b.to) })
	last := step{out.from, thinnestLayer}
	for _, s := range out.at {
		c.within("thickness up to "+s.to.String(), s.mm, last.mm, 20)
		if s.to.Compare(out.from) < 0 {
			c.fail("the step up to %s is below from, %s", s.to, out.from)
		}
		last = s
	}
	return out, c.err
}

// of returns the thickness in mm for a size; sizes of the other system go by their area.
func (s steps) of(size quantity.Size) (mm float64, ok bool) {
	const slack = 0.999
	area := size.AreaMM2()
	if area < slack*s.from.AreaMM2() {
		return 0, false
	}
	for _, st := range s.at {
		if slack*area <= st.to.AreaMM2() {
			return st.mm, true
		}
	}
	return 0, false
}

// TypicalWire returns insulation thickness (m) for a size and wire type where no finished wire is listed, with its source; ok is false if
// nothing is known. Where a finished wire of that size and type is listed it is that wire's.
func (c *Catalog) TypicalWire(size, typ string) (thicknessM float64, src Source, ok bool) {
	s, err := quantity.ParseSize(size)
	if err != nil {
		return 0, Source{}, false
	}
	if w, ok := c.wireOf(s, typ); ok {
		if metal, err := c.WireConductor(w); err == nil {
			return (w.DiameterM - metal.DiameterM) / 2, w.Source, true
		}
	}
	st, ok := c.thickness[typ]
	if !ok {
		return 0, Source{}, false
	}
	mm, ok := st.of(s)
	return mm * 1e-3, st.source, ok
}

// wireOf returns the finished wire of a size and type.
func (c *Catalog) wireOf(s quantity.Size, typ string) (Wire, bool) {
	w, ok := c.Wire(typ + "-" + short(s))
	return w, ok && w.Size == s.String()
}
