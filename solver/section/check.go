package section

import (
	"fmt"
	"strings"
)

// Check returns the problems of form of a document as it stands in memory, the same that Read would report after saving it.
// What needs the catalogue (unknown materials, overlaps …) is not looked at.
func Check(d *Document) []Problem {
	r := newReport(nil)
	r.check(d)
	return r.problems()
}

// check adds the problems of the values of d.
func (r *report) check(d *Document) {
	r.doc, r.checking = d, true
	listed := len(d.Parts)
	for _, b := range d.Builds {
		listed += len(b.Parts)
	}
	if len(d.Parts) > MaxParts || listed > 8*MaxParts {
		r.add(path("").key("parts"), "too-many-parts", fmt.Sprintf("the design lists %d parts, and at most %d are read", listed, MaxParts), "split it into several designs")
		return
	}
	documentTable.check(r, *d, "")
	if len(d.Builds) > MaxNamed {
		return
	}
	checkHolderParts(r, d)
	checkAgainst(r, d)
	checkIDs(r, d.Parts, path("").key("parts"))
	for i := range d.Builds {
		checkIDs(r, d.Builds[i].Parts, path("").key("builds").key(d.Builds[i].Name).key("parts"))
	}
	if checkNesting(r, d) {
		checkLoads(r, d)
		checkRatings(r, d)
	}
}

// checkHolder keeps the keys of a holder to those of its kind.
func checkHolder(r *report, h *Holder, at path) {
	round, rectangle := h.Kind == Jacket || h.Kind == Conduit, h.Kind == Wireway
	open := h.Kind == OpenBundle || h.Kind == NoHolder || h.Kind == Apart
	if !round && !rectangle && !open {
		return // of no kind: reported already
	}
	reject := func(written bool, key, why, do string) {
		if written {
			r.add(at.key(key), "key-of-kind", "¤ does not belong to kind "+h.Kind+why, do)
		}
	}
	flat := h.Kind == Jacket && (h.WidthMM.OK || h.HeightMM.OK) && !h.InsideMM.OK
	reject(!round && h.InsideMM.OK, "inside_mm", "", "take it out"+sizeAdvice(h))
	reject(!rectangle && !flat && h.WidthMM.OK, "width_mm", "", "take it out"+sizeAdvice(h))
	reject(!rectangle && !flat && h.HeightMM.OK, "height_mm", "", "take it out"+sizeAdvice(h))
	reject(!rectangle && h.Sides != Sides{}, "sides", ", which is no rectangle", "take it out")
	reject(open && h.Stock != "", "stock", ", which has no wall", "take it out")
	reject(open && len(h.Layers) > 0, "layers", ", which has no wall", "take it out")
	reject(h.Kind != OpenBundle && h.Kind != Apart && h.StringEmissivity.OK, "string_emissivity", ", which has no strings", "take it out")
	reject(h.Kind == NoHolder && h.Fill != "", "fill", ", which encloses nothing", "take it out")
	reject(h.Kind == NoHolder && h.ClearanceMM.OK, "clearance_mm", ", which encloses nothing", "take it out")
	if h.TouchLimitC.OK && len(at.steps()) > 1 {
		r.add(at.key("touch_limit_c"), "key-of-kind", "¤ belongs to the section's own holder, whose outside can be touched", "take it out, or give a layer's material a limit")
	}
	if h.LengthM.OK && len(at.steps()) > 1 {
		r.add(at.key("length_m"), "key-of-kind", "¤ belongs to the section's own holder", "take it out")
	}
	if h.Stock != "" && !open {
		both := h.InsideMM.OK || h.WidthMM.OK || h.HeightMM.OK || len(h.Layers) > 0
		if both {
			r.addWhole(at, "one-of", holderWord(at)+" has both stock and a size or layers of its own", "keep either stock, or the size with layers")
		}
		return
	}
	checkHolderSize(r, h, at, flat)
}

// checkHolderSize reports what a holder without stock lacks of its size.
func checkHolderSize(r *report, h *Holder, at path, flat bool) {
	round, rectangle := h.Kind == Jacket || h.Kind == Conduit, h.Kind == Wireway
	if round && !h.InsideMM.OK && !flat {
		r.add(at.key("inside_mm"), "missing-key", "¤ is missing", "write it, or stock: kind "+h.Kind+" needs its inside diameter")
	}
	needs := ", or stock: kind wireway"
	if flat {
		needs = ", or inside_mm of a round one: a flat jacket"
	}
	if (rectangle || flat) && !h.WidthMM.OK {
		r.add(at.key("width_mm"), "missing-key", "¤ is missing", "write it"+needs+" needs its inside width")
	}
	if (rectangle || flat) && !h.HeightMM.OK {
		r.add(at.key("height_mm"), "missing-key", "¤ is missing", "write it"+needs+" needs its inside height")
	}
}

func sizeAdvice(h *Holder) string {
	switch h.Kind {
	case Wireway:
		return ", and write width_mm and height_mm"
	case Jacket:
		return ", and write inside_mm, or width_mm and height_mm of a flat one without inside_mm"
	case Conduit:
		return ", and write inside_mm"
	}
	return ""
}

func holderWord(at path) string {
	if st := at.steps(); len(st) > 1 {
		return "its holder"
	}
	return "the holder"
}

// checkHolderParts looks at what the holders ask of the document around them.
func checkHolderParts(r *report, d *Document) {
	if d.Holder.Kind == NoHolder && len(d.Parts) > 1 {
		r.add(path("").key("holder").key("kind"), "one-bare-part", fmt.Sprintf("holder kind none is one bare part, but there are %d", len(d.Parts)),
			"write kind: open-bundle, or apart where they lie beside each other, or take the other parts out")
	}
	checkApart(r, d)
	for i := range d.Builds {
		at := path("").key("builds").key(d.Builds[i].Name).key("holder").key("kind")
		switch d.Builds[i].Holder.Kind {
		case Wireway, NoHolder, Apart:
			r.add(at, "key-of-kind", "its holder is of kind "+d.Builds[i].Holder.Kind+", but a cable has a jacket", "write kind: jacket with inside_mm, or with width_mm and height_mm of a flat one")
		}
	}
}

// checkPart keeps the keys of a part to those of its kind.
func checkPart(r *report, p *Part, at path) {
	core, cable, rod := p.Kind == Core, p.Kind == Cable, p.Kind == Rod
	if !core && !cable && !rod {
		return
	}
	reject := func(written bool, key, belongs string) {
		if written {
			r.add(at.key(key), "key-of-kind", fmt.Sprintf("¤ belongs to a %s, and this is a %s", belongs, p.Kind), "take it out, or change the kind")
		}
	}
	reject(!core && p.Stock != "", "stock", Core)
	reject(!core && p.Conductor != nil, "conductor", Core)
	reject(!core && p.Type != "", "type", Core)
	reject(!core && p.Role != "", "role", Core)
	reject(!cable && p.Build != "", "build", Cable)
	reject(!rod && p.Diameter.OK, "diameter_mm", Rod)
	reject(!rod && p.BoreMM.OK, "bore_mm", Rod)
	reject(!rod && p.Bore != Bore{}, "bore", Rod)
	reject(!rod && p.Material != "", "material", Rod)
	if cable && len(p.Layers) > 0 {
		r.add(at.key("layers"), "key-of-kind", "¤ belongs to a core or rod, and this is a cable", "write its layers in the holder of its build")
	}
	if turns := cable || core && p.Conductor != nil && !p.Conductor.Round(); !turns && p.TurnDeg.OK {
		r.add(at.key("turn_deg"), "key-of-kind", "¤ turns a cable or a part that is not round, and this "+p.Kind+" is round", "take it out")
	}
	switch {
	case core:
		checkCore(r, p, at)
	case cable:
		checkCable(r, p, at)
	case rod:
		checkRod(r, p, at)
	}
}

func checkCore(r *report, p *Part, at path) {
	if p.Stock == "" && p.Conductor == nil {
		r.add(at.key("conductor"), "missing-key", "¤ is missing", "write conductor: {size: …}, or stock: a wire of the catalogue")
	}
	var both []string
	if p.Conductor != nil {
		both = append(both, "conductor")
	}
	if len(p.Layers) > 0 {
		both = append(both, "layers")
	}
	if p.Type != "" {
		both = append(both, "type")
	}
	if p.Stock != "" && both != nil {
		r.addWhole(at, "one-of", "it has stock, which brings conductor, layers and type, and also "+strings.Join(both, " and ")+" of its own",
			"keep either stock, or the others")
	}
}

func checkCable(r *report, p *Part, at path) {
	switch {
	case p.Build == "":
		r.add(at.key("build"), "missing-key", "¤ is missing", "write it: a cable needs the name of its build")
	case buildOf(r.doc, p.Build) == nil:
		var names []string
		for _, b := range r.doc.Builds {
			names = append(names, b.Name)
		}
		do := "write that build under builds"
		if near := nearest(p.Build, names); near != "" {
			do = "did you mean " + show(near) + "?"
		}
		r.add(at.key("build"), "unknown-build", "there is no build "+show(p.Build), do)
	}
}

func checkRod(r *report, p *Part, at path) {
	if !p.Diameter.OK {
		r.add(at.key("diameter_mm"), "missing-key", "¤ is missing", "write it: a rod needs its diameter")
	}
	if p.Material == "" {
		r.add(at.key("material"), "missing-key", "¤ is missing", "write it: a rod needs a material")
	}
	if p.BoreMM.OK && p.Diameter.OK && p.BoreMM.V >= p.Diameter.V {
		r.add(at.key("bore_mm"), "number-range", "¤ is "+shown(p.BoreMM.V)+", not less than the rod's diameter of "+shown(p.Diameter.V), "write a smaller bore")
	}
	if p.Bore != (Bore{}) && !p.BoreMM.OK {
		r.add(at.key("bore_mm"), "missing-key", "¤ is missing", "write the bore's diameter, or take bore out")
	}
}

func checkMaterialName(r *report, name string, at path) {
	if name == Air {
		r.add(at, "reserved-name", "air is always real air and can't be given other values", "give the material another name, such as my-gas")
	}
}

// Air is the word for air where a material's name may stand.
const Air = "air"
