package rating

import (
	"fmt"
	"math"

	"packrise/solver/catalog"
	"packrise/solver/section"
)

const mm = 1e-3

// resolver gathers a scene and the problems found on the way.
type resolver struct {
	shelf
	scene    scene
	problems []section.Problem
	loads    map[string]*section.Load
	builds   map[string]*section.Build
}

// resolve turns a document into SI with every name looked up. The scene is usable for drawing even when problems are Refused.
func resolve(d *section.Document, cat *catalog.Catalog) (scene, []section.Problem) {
	return resolveVaried(d, cat, Vary{})
}

// resolveVaried is resolve with inputs shifted.
func resolveVaried(d *section.Document, cat *catalog.Catalog, v Vary) (scene, []section.Problem) {
	r := resolved(d, cat, v)
	return r.scene, d.Locate(r.problems)
}

// resolved is a resolver that has done its work.
func resolved(d *section.Document, cat *catalog.Catalog, v Vary) *resolver {
	r := &resolver{loads: map[string]*section.Load{}, builds: map[string]*section.Build{}}
	r.shelf, r.problems = open(d, cat)
	r.shelf.vary = v
	r.scene.doc = d
	r.scene.notes = append(r.scene.notes, r.shelf.notes...)
	for i := range d.Loads {
		for _, id := range d.Loads[i].Conductors {
			r.loads[id] = &d.Loads[i]
		}
	}
	for i := range d.Builds {
		r.builds[d.Builds[i].Name] = &d.Builds[i]
	}
	r.scene.holder = r.enclosure(&d.Holder, "", "holder.")
	r.parts(d.Parts, nest{in: -1})
	r.wrap()
	r.places()
	r.outside()
	r.limits()
	v.outside(&r.scene)
	return r
}

func (r *resolver) refuse(p *section.Problem) bool {
	if p == nil {
		return false
	}
	r.problems = append(r.problems, *p)
	return true
}

// layers looks up a list of layers; key ends in ".".
func (r *resolver) layers(list []section.Layer, id, key string) []layer {
	out := make([]layer, 0, len(list))
	for i, l := range list {
		m, p := r.material(l.Material, id, fmt.Sprintf("%slayers[%d].material", key, i))
		r.refuse(p)
		out = append(out, layer{id: l.Material, material: m, thickness: l.ThicknessMM * mm})
	}
	return out
}

// enclosure resolves a holder, of the section (id "") or of a cable.
func (r *resolver) enclosure(h *section.Holder, id, key string) enclosure {
	e := enclosure{kind: h.Kind, round: h.Kind != section.Wireway, radius: h.InsideMM.V * mm / 2, w: h.WidthMM.V * mm, h: h.HeightMM.V * mm}
	e.layers = r.layers(h.Layers, id, key)
	e.strings = r.vary.emissive(h.StringEmissivity.Or(usualEmissivity))
	if h.Flat() {
		e.flat, e.radius = true, max(e.w, e.h)/2
	}
	if h.Stock != "" {
		r.stockHolder(&e, h, id, key)
	}
	var p *section.Problem
	e.fill, p = r.medium(h.Fill, id, key+"fill")
	r.refuse(p)
	e.gap = -1 // by the default rule, once the parts are known
	if h.ClearanceMM.OK {
		e.gap = h.ClearanceMM.V * mm
	}
	return e
}

func (r *resolver) stockHolder(e *enclosure, h *section.Holder, id, key string) {
	row, ok := r.cat.Holder(h.Stock)
	if !ok {
		p := unknown("holder", h.Stock, id, key+"stock", r.cat.Nearest("holder", h.Stock, 3))
		r.refuse(&p)
		return
	}
	if row.Kind != h.Kind {
		r.refuse(&section.Problem{
			Rule: "holder-kind", IDs: []string{id}, Key: key + "stock",
			What: fmt.Sprintf("%s is a %s but the stock %s is a %s", subject(id), h.Kind, h.Stock, row.Kind),
			Do:   "write kind: " + row.Kind + ", or choose another stock",
		})
	}
	e.radius, e.w, e.h, e.skin = row.InsideM/2, row.WidthM, row.HeightM, row.Emissivity
	if e.skin > 0 {
		e.skin = r.vary.emissive(e.skin)
	}
	e.round = row.InsideM > 0
	if row.WallM > 0 {
		m, p := r.material(row.Wall, id, key+"stock")
		r.refuse(p)
		e.layers = append([]layer{{id: row.Wall, material: m, thickness: row.WallM}}, e.layers...)
	}
}

// nest is where a list of parts lies.
type nest struct {
	in     int
	depth  int
	prefix string
	turn   float64 // rad
	centre section.Point
	unset  bool
}

func (r *resolver) parts(list []section.Part, n nest) {
	for i := range list {
		p := &list[i]
		it := item{id: n.prefix + p.ID, kind: p.Kind, in: n.in, depth: n.depth, src: p, unset: n.unset || !p.At.OK}
		sin, cos := math.Sincos(n.turn)
		x, y := p.At.V.X*cos-p.At.V.Y*sin, p.At.V.X*sin+p.At.V.Y*cos
		it.x, it.y = x*mm, y*mm
		it.abs = section.Point{X: n.centre.X + x, Y: n.centre.Y + y}
		it.load = r.loads[it.id]
		if !p.At.OK {
			r.refuse(&section.Problem{
				Rule: "unplaced", IDs: []string{it.id}, Key: "at_mm",
				What: it.id + " has no place yet", Do: "give it at_mm: [x, y], or settle the section",
			})
		}
		switch p.Kind {
		case section.Core:
			r.core(&it, p)
			it.form.Turn = n.turn + p.TurnDeg.V*math.Pi/180
		case section.Rod:
			r.rod(&it, p)
		case section.Cable:
			r.cable(&it, p, n)
			continue
		}
		it.skin = r.outermost(&it).emissivity
		r.scene.parts = append(r.scene.parts, it)
	}
}

func (r *resolver) cable(it *item, p *section.Part, n nest) {
	b := r.builds[p.Build]
	if b == nil { // the reader refuses this; a document made in memory may still have it
		r.refuse(&section.Problem{Rule: "unknown-build", IDs: []string{it.id}, Key: "build", What: fmt.Sprintf("%s: construction %q is not there", it.id, p.Build), Do: "add it under builds"})
		return
	}
	e := r.enclosure(&b.Holder, it.id, "builds."+b.Name+".holder.")
	if !e.round || e.radius <= 0 {
		r.refuse(&section.Problem{
			Rule: "build-holder", IDs: []string{it.id}, Key: "builds." + b.Name + ".holder.kind",
			What: fmt.Sprintf("%s: the construction %s has a holder of kind %s", it.id, b.Name, b.Holder.Kind), Do: "a construction needs a round jacket with inside_mm",
		})
		return
	}
	it.inside = &e
	it.radius, it.layers = e.radius, e.layers
	it.label = fmt.Sprintf("%s, ⌀ %s mm", b.Name, digits(2*it.outer()/mm, 2))
	if e.flat {
		it.form = e.form(n.turn + p.TurnDeg.V*math.Pi/180)
		it.label = fmt.Sprintf("%s, %s", b.Name, it.extent())
	}
	if p.LimitC.OK {
		it.limit = limit{c: p.LimitC, by: "given"}
	}
	it.skin = r.outermost(it).emissivity
	r.scene.parts = append(r.scene.parts, *it)
	if n.depth+1 > section.MaxNesting {
		return
	}
	r.parts(b.Parts, nest{
		in: len(r.scene.parts) - 1, depth: n.depth + 1, prefix: it.id + "/", turn: n.turn + p.TurnDeg.V*math.Pi/180,
		centre: it.abs, unset: it.unset,
	})
}
