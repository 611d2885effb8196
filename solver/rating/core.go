package rating

import (
	"fmt"
	"strings"

	"packrise/solver/catalog"
	"packrise/solver/heat"
	"packrise/solver/section"
)

// core resolves metal, insulation, type and limit of a core.
func (r *resolver) core(it *item, p *section.Part) {
	it.metal = true
	typ := p.Type
	if p.Stock != "" {
		typ = r.stockWire(it, p)
	} else {
		r.ownWire(it, p)
	}
	if m, ok := r.cat.Metal(it.wire.Metal); ok {
		it.alpha = m.Alpha20
	}
	it.radius = it.wire.DiameterM / 2
	if c := p.Conductor; c != nil && !c.Round() {
		r.shape(it, c)
	}
	it.layers = append(it.layers, r.layers(p.Layers, it.id, "")...)
	r.coreLimit(it, p, typ)
	it.label = r.coreLabel(it, typ)
}

// stockWire takes conductor, insulation and type from a finished wire of the catalogue; further layers of the part lie over it.
func (r *resolver) stockWire(it *item, p *section.Part) (typ string) {
	w, ok := r.cat.Wire(p.Stock)
	if !ok {
		pr := unknown("wire", p.Stock, it.id, "stock", r.cat.Nearest("wire", p.Stock, 3))
		r.refuse(&pr)
		return p.Type
	}
	c, err := r.cat.WireConductor(w)
	if err != nil {
		r.refuse(&section.Problem{Rule: "unknown-size", IDs: []string{it.id}, Key: "stock", What: fmt.Sprintf("%s: %v", it.id, err), Do: "choose another stock"})
		return p.Type
	}
	it.wire = c
	if t := (w.DiameterM - c.DiameterM) / 2; t > 0 {
		m, pr := r.material(w.Insulation, it.id, "stock")
		r.refuse(pr)
		it.layers = []layer{{id: w.Insulation, material: m, thickness: t}}
	} else {
		r.refuse(&section.Problem{
			Rule: "thick-conductor", IDs: []string{it.id}, Key: "stock",
			What: fmt.Sprintf("%s: the conductor of %s is %s mm thick and the wire only %s mm", it.id, p.Stock, digits(c.DiameterM/mm, 2), digits(w.DiameterM/mm, 2)),
			Do:   "choose another stock, or mend the saved row",
		})
	}
	if p.Type != "" {
		return p.Type
	}
	return w.Type
}

func (r *resolver) ownWire(it *item, p *section.Part) {
	c := p.Conductor
	if c == nil {
		r.refuse(&section.Problem{Rule: "no-conductor", IDs: []string{it.id}, Key: "conductor", What: it.id + " is a core without a conductor", Do: "give it conductor: {size: …} or stock"})
		return
	}
	metal, class := c.Metal, c.Class
	if metal == "" {
		metal = section.Copper
	}
	if class == "" {
		class = section.Stranded
	}
	var err error
	switch {
	case !c.Round() && c.Size == "" && !c.AreaMM2.OK:
		f := formOf(c)
		area, _ := f.Loop(0, 0).Area()
		it.wire, err = r.cat.ConductorOf(area, 0, metal, class)
	case c.Size != "":
		it.wire, err = r.cat.Conductor(c.Size, metal, class)
	default:
		it.wire, err = r.cat.ConductorOf(c.AreaMM2.V*mm*mm, c.DiameterMM.V*mm, metal, class)
	}
	if err != nil {
		r.refuse(&section.Problem{Rule: "unknown-size", IDs: []string{it.id}, Key: "conductor", What: fmt.Sprintf("%s: %v", it.id, err), Do: "write a size that the catalogue has, or area_mm2"})
	}
}

// coreLimit: the person's own, else the wire type's dry or wet limit, else that of its innermost insulation, assumed.
func (r *resolver) coreLimit(it *item, p *section.Part, typ string) {
	if p.LimitC.OK {
		it.limit = limit{c: p.LimitC, by: "given"}
		if typ != "" {
			t, ok := r.cat.WireType(typ)
			if !ok {
				pr := unknown("type", typ, it.id, "type", r.cat.Nearest("type", typ, 3))
				r.refuse(&pr)
			} else if t.NeverWet && r.scene.doc.Surroundings.Wet {
				r.neverWet(it.id, t)
			}
		}
		return
	}
	if typ != "" {
		t, ok := r.cat.WireType(typ)
		if !ok {
			pr := unknown("type", typ, it.id, "type", r.cat.Nearest("type", typ, 3))
			r.refuse(&pr)
			return
		}
		it.limit = r.typeLimit(it.id, t)
		return
	}
	it.limit = innermost(it.layers)
}

// typeLimit is a wire type's limit, dry or wet. Types that must never be wet are refused there.
func (r *resolver) typeLimit(id string, t catalog.WireType) limit {
	switch {
	case !r.scene.doc.Surroundings.Wet:
		return limit{c: section.Some(t.DryC), by: t.Name + ", dry"}
	case t.NeverWet:
		r.neverWet(id, t)
		return limit{}
	}
	return limit{c: section.Some(t.WetC), by: t.Name + ", wet"}
}

func (r *resolver) neverWet(id string, t catalog.WireType) {
	r.refuse(&section.Problem{
		Rule: "never-wet", IDs: []string{id}, Key: "type", What: fmt.Sprintf("%s is of type %s, which must never be wet, and the surroundings are wet", id, t.Name),
		Do: "choose a type with a wet limit, or write wet: false",
	})
}

// lowest is the lowest limit of any layer, assumed.
func lowest(layers []layer) limit {
	var out limit
	for _, l := range layers {
		if l.material.limitC.OK && (!out.c.OK || l.material.limitC.V < out.c.V) {
			out = limit{c: l.material.limitC, assumed: true, by: "lowest for " + l.material.name + ", assumed"}
		}
	}
	return out
}

func (r *resolver) coreLabel(it *item, typ string) string {
	var b strings.Builder
	c := it.wire
	if c.Size != "" {
		b.WriteString(prettySize(c.Size))
	} else {
		fmt.Fprintf(&b, "%s mm²", digits(c.AreaM2/mm/mm, 2))
	}
	b.WriteString(" " + strings.ReplaceAll(c.Metal, "-", " "))
	if t, ok := r.cat.WireType(typ); ok {
		b.WriteString(" " + t.Name)
	} else if len(it.layers) > 0 {
		b.WriteString(" " + it.layers[0].material.name)
	} else {
		b.WriteString(" bare")
	}
	if it.form.Kind != heat.Disc {
		fmt.Fprintf(&b, ", %s", it.extent())
		return b.String()
	}
	fmt.Fprintf(&b, ", ⌀ %s mm", digits(2*it.outer()/mm, 2))
	return b.String()
}

func prettySize(s string) string { return strings.Replace(s, "mm2", "mm²", 1) }

// rod resolves a filler, hose or strength member.
func (r *resolver) rod(it *item, p *section.Part) {
	m, pr := r.material(p.Material, it.id, "material")
	r.refuse(pr)
	it.body = m.k
	it.radius = p.Diameter.V * mm / 2
	own := layer{id: p.Material, material: m}
	if p.BoreMM.OK {
		r.hose(it, p, own)
	}
	it.layers = append(it.layers, r.layers(p.Layers, it.id, "")...)
	it.limit = innermost(append([]layer{own}, it.layers...))
	if p.LimitC.OK {
		it.limit = limit{c: p.LimitC, by: "given"}
	}
	it.label = fmt.Sprintf("%s, ⌀ %s mm", m.name, digits(2*it.outer()/mm, 2))
}

func (r *resolver) hose(it *item, p *section.Part, own layer) {
	if p.BoreMM.V >= p.Diameter.V {
		r.refuse(&section.Problem{
			Rule: "thick-bore", IDs: []string{it.id}, Key: "bore_mm",
			What: fmt.Sprintf("%s: its bore of %s mm is not smaller than its diameter of %s mm", it.id, digits(p.BoreMM.V, 3), digits(p.Diameter.V, 3)),
			Do:   "make bore_mm smaller than diameter_mm",
		})
		return
	}
	fill, pr := r.medium(p.Bore.Material, it.id, "bore")
	r.refuse(pr)
	it.bore = &hollow{fill: fill, fixed: p.Bore.FixedC}
	own.thickness = (p.Diameter.V - p.BoreMM.V) / 2 * mm
	it.radius = p.BoreMM.V / 2 * mm
	it.layers = []layer{own}
}
