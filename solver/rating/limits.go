package rating

import (
	"fmt"
	"slices"

	"packrise/solver/heat"
	"packrise/solver/section"
)

// Rules of problems that are about limits and devices. All are Warned: the section can be solved. Ratings are refused while
// any part is in Result.Unreasoned.
const (
	RuleNoReason    = "limit-without-reason" // a limit above the catalogue's and no reason for it
	RuleTooCold     = "limit-below-ambient"
	RuleSmallDevice = "device-below-load" // a device rated below the load that it protects
	RuleNoScreen    = "screen-not-metal"
)

// innermost is the limit of the innermost layer that has one, assumed. Layers around it with lower limits are judged by themselves.
func innermost(layers []layer) limit {
	for k := range layers {
		if l := lowest(layers[k : k+1]); l.c.OK {
			return l
		}
	}
	return limit{}
}

// own tells how many layers a part has of its own: all but the wrap of a bare part.
func (s *scene) own(p *item) int {
	if s.doc.Surroundings.Wrap != nil && s.holder.kind == section.NoHolder && p.in < 0 {
		return len(p.layers) - 1
	}
	return len(p.layers)
}

// coverings are the layers of a core or rod that its own limit does not speak for: of another material than its insulation, and usually
// bearing less. A limit that the person gave speaks for all.
func (s *scene) coverings(p *item) (out []int) {
	if p.src.LimitC.OK || !p.limit.c.OK || p.inside != nil {
		return nil
	}
	first := 1
	if !p.metal && p.bore == nil {
		first = 0
	}
	for k := first; k < s.own(p); k++ {
		l := &p.layers[k]
		if l.id != p.insulation() && l.material.usualC.OK && l.material.usualC.V < p.limit.c.V {
			out = append(out, k)
		}
	}
	return out
}

// insulation is the material that the limit of a part is mostly about.
func (p *item) insulation() string {
	if !p.metal {
		return p.src.Material
	}
	if len(p.layers) > 0 {
		return p.layers[0].id
	}
	return ""
}

// addCoverings adds the coverings of a core or rod, each judged at its own hottest face: "L1/layer/2" is the second layer from the inside.
func (s *scene) addCoverings(r *Result, p *item, faces []float64) {
	for _, k := range s.coverings(p) {
		lim := lowest(p.layers[k : k+1])
		r.Others = append(r.Others, Other{
			ID: fmt.Sprintf("%s/layer/%d", p.id, k+1), Kind: "layer", TempC: max(faces[k], faces[k+1]),
			LimitC: lim.c, LimitAssumed: lim.assumed, LimitBy: lim.by,
		})
	}
}

// hottestAt is the hottest place of a conductor's metal and of what its limit speaks for. Beside hot neighbours the insulation of a
// conductor that makes little heat is warmer than its metal.
func (s *scene) hottestAt(p *item, metal float64, faces []float64) float64 {
	last := s.own(p)
	if c := s.coverings(p); len(c) > 0 {
		last = c[0]
	}
	t := metal
	for k := 0; k <= last && k < len(faces); k++ {
		t = max(t, faces[k])
	}
	if t < metal+0.01 { // the last digits of a surface of the metal itself
		return metal
	}
	return t
}

// heats tells whether a conductor is known to make heat of its own.
func (p *item) heats() bool {
	return p.load != nil && !p.load.Unknown && (p.load.CurrentA.V > 0 || p.load.HeatWM.V > 0)
}

// limits looks at limits and devices that the person gave: against the catalogue, the ambient and the loads.
func (r *resolver) limits() {
	type raise struct{ text, reason string }
	raised := map[raise][]string{}
	var order []raise
	for i := range r.scene.parts {
		p := &r.scene.parts[i]
		if !p.src.LimitC.OK {
			continue
		}
		usual := r.usualLimit(p)
		if !usual.c.OK || p.src.LimitC.V <= usual.c.V {
			continue
		}
		reason := r.scene.doc.LimitReason(p.id)
		if reason == "" {
			r.scene.unreasoned = append(r.scene.unreasoned, p.id)
			r.warn(section.Problem{
				Rule: RuleNoReason, IDs: []string{p.id}, Key: "limit_c",
				What: fmt.Sprintf("the limit of %s is %s °C, above the catalogue's %s °C (%s), and no reason is written", p.id, digits(p.src.LimitC.V, 1), digits(usual.c.V, 1), usual.by),
				Do:   fmt.Sprintf("write reasons: {limit %s: why}, or a lower limit; until then nothing is rated", p.id),
			})
			continue
		}
		key := raise{fmt.Sprintf("raised to %s °C, above the catalogue's %s °C (%s)", digits(p.src.LimitC.V, 1), digits(usual.c.V, 1), usual.by), reason}
		if raised[key] == nil {
			order = append(order, key)
		}
		raised[key] = append(raised[key], p.id)
	}
	for _, key := range order {
		r.scene.notes = append(r.scene.notes, fmt.Sprintf("limit of %s %s: %s", list(raised[key]), key.text, key.reason))
	}
	if d := r.scene.doc; d.DesignMarginK == section.Some(0.0) {
		r.scene.notes = append(r.scene.notes, "no design margin is kept: "+d.Reason(section.ReasonMargin))
	}
	r.coldLimits()
	r.smallDevices()
	r.screens()
}

func (r *resolver) warn(p section.Problem) {
	p.Severity = section.Warned
	r.problems = append(r.problems, p)
}

// usualLimit is what the catalogue says of a part: its wire type's limit, else the lowest of the usual limits of its layers.
func (r *resolver) usualLimit(p *item) (out limit) {
	typ := p.src.Type
	if w, ok := r.cat.Wire(p.src.Stock); ok && typ == "" {
		typ = w.Type
	}
	if t, ok := r.cat.WireType(typ); ok && p.metal {
		switch {
		case !r.scene.doc.Surroundings.Wet:
			return limit{c: section.Some(t.DryC), by: t.Name + ", dry"}
		case !t.NeverWet:
			return limit{c: section.Some(t.WetC), by: t.Name + ", wet"}
		}
		return limit{}
	}
	materials := make([]material, 0, 4)
	if !p.metal && p.inside == nil && p.bore == nil {
		if m, problem := r.material(p.src.Material, p.id, "material"); problem == nil {
			materials = append(materials, m)
		}
	}
	for _, l := range p.layers[:r.scene.own(p)] {
		materials = append(materials, l.material)
	}
	for _, m := range materials {
		if m.usualC.OK && (!out.c.OK || m.usualC.V < out.c.V) {
			out = limit{c: m.usualC, by: m.name}
		}
	}
	return out
}

// coldLimits warns of limits that the ambient alone passes, those of one kind together.
func (r *resolver) coldLimits() {
	ambient := r.scene.doc.Surroundings.AmbientC
	cold := map[limit]*section.Problem{}
	var order []limit
	below := func(id, key string, l limit) {
		switch {
		case !l.c.OK || !ambient.OK || l.c.V >= ambient.V:
		case cold[l] != nil:
			cold[l].IDs = append(cold[l].IDs, id)
		default:
			cold[l] = &section.Problem{Rule: RuleTooCold, IDs: []string{id}, Key: key, Do: "choose what bears the ambient, or mend one of the two"}
			order = append(order, l)
		}
	}
	for i := range r.scene.parts {
		p := &r.scene.parts[i]
		if p.inside != nil && !p.limit.c.OK {
			below(p.id+"/"+section.Jacket, "build", lowest(p.layers))
		}
		below(p.id, "limit_c", p.limit)
	}
	below(r.scene.holder.kind, "holder.layers", lowest(r.scene.holder.layers))
	below(section.Outside, "holder.touch_limit_c", r.scene.touch())
	for _, l := range order {
		p := *cold[l]
		p.What = fmt.Sprintf("the limit of %s is %s °C (%s), below the ambient of %s °C", list(p.IDs), digits(l.c.V, 1), l.by, digits(ambient.V, 1))
		r.warn(p)
	}
}

// smallDevices warns of devices that would trip on the load that they protect.
func (r *resolver) smallDevices() {
	for i := range r.scene.doc.Loads {
		l := &r.scene.doc.Loads[i]
		if l.Protection.Kind == "" || !l.CurrentA.OK || l.CurrentA.V <= l.Protection.RatingA {
			continue
		}
		r.warn(section.Problem{
			Rule: RuleSmallDevice, IDs: []string{l.ID}, Key: fmt.Sprintf("loads[%d].protection", i),
			What: fmt.Sprintf("load %s carries %s A, and its %s is rated %s A", l.ID, digits(l.CurrentA.V, 2), l.Protection.Kind, digits(l.Protection.RatingA, 2)),
			Do:   "write the device or the current as it is",
		})
	}
}

// screens says what is not reckoned of screens, and warns of those that are no metal.
func (r *resolver) screens() {
	var both []string
	look := func(id, key string, written []section.Layer) {
		for k, l := range written {
			if l.Screen.Form == "" {
				continue
			}
			if m, problem := r.material(l.Material, id, key); problem == nil && !m.metal {
				r.warn(section.Problem{
					Rule: RuleNoScreen, IDs: []string{id}, Key: fmt.Sprintf("%slayers[%d].screen", key, k),
					What: fmt.Sprintf("%s: its %s screen is of %s, which is no metal", subject(id), l.Screen.Form, m.name), Do: "name the metal, or take screen out",
				})
			}
			if l.Screen.Bonded == section.BondedBoth && !slices.Contains(both, subject(id)) {
				both = append(both, subject(id))
			}
		}
	}
	look("", "holder.", r.scene.doc.Holder.Layers)
	for i := range r.scene.parts {
		p := &r.scene.parts[i]
		look(p.id, "", p.src.Layers)
		if b := r.builds[p.src.Build]; p.inside != nil && b != nil {
			look(p.id, "builds."+b.Name+".holder.", b.Holder.Layers)
		}
	}
	if both != nil {
		r.scene.notes = append(r.scene.notes, fmt.Sprintf("currents in screens bonded at both ends (%s) are left out: too cool where conductors are far apart or single", list(both)))
	}
}

// JudgedC is what the limit of a conductor is held against, and what is shown of it: its metal, or its insulation beside hotter neighbours, °C.
func (c *Conductor) JudgedC() float64 {
	if c.HottestC > c.TempC {
		return c.HottestC
	}
	return c.TempC
}

// faces returns the hottest temperatures of a part's faces, nil where there are none.
func faces(h *heat.Result, i int) []float64 {
	if h == nil || i >= len(h.Surfaces) {
		return nil
	}
	return h.Surfaces[i]
}
