package study

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"packrise/solver/catalog"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// classes: the part that governs, and all of its kind, of a type that stands more.
func (a *adviser) classes() {
	g := section.Find(a.w, a.out.Governs)
	if g == nil || g.Kind != section.Core {
		return
	}
	_, name, limit, ok := a.s.hotterType(g, a.w.Surroundings.Wet, a.list[a.at].limit.V)
	if !ok {
		return
	}
	var kin []string
	for _, t := range a.list[:len(a.p.Conductors)] {
		p := section.Find(a.w, t.id)
		if p != nil && t.limit == a.list[a.at].limit && sameMake(p, g) {
			kin = append(kin, t.id)
		}
	}
	for _, ids := range [][]string{{a.out.Governs}, kin} {
		if len(ids) == 0 || len(ids) == 1 && ids[0] != a.out.Governs {
			continue
		}
		text := fmt.Sprintf("Take %s of type %s, %s °C, for %s, where that type may be laid", wireOrWires(ids), name, trimmed(limit), list(ids))
		a.add(candidate{
			kind: ChangeClass, ids: ids, text: text, always: true,
			make: func(d *section.Document) (*section.Document, bool) { return a.s.reclassed(d, ids) },
		})
		if len(kin) == 1 {
			break
		}
	}
}

func wireOrWires(ids []string) string {
	if len(ids) == 1 {
		return "a wire"
	}
	return "wires"
}

// sameMake tells whether two cores are bought as the same wire.
func sameMake(a, b *section.Part) bool {
	size := func(p *section.Part) section.Conductor {
		if p.Conductor == nil {
			return section.Conductor{}
		}
		return *p.Conductor
	}
	return a.Stock == b.Stock && a.Type == b.Type && size(a) == size(b)
}

func (s *Study) reclassed(d *section.Document, ids []string) (*section.Document, bool) {
	for _, id := range ids {
		if strings.Contains(id, "/") {
			d = section.OwnBuild(d, id)
		}
		p := section.Find(d, id)
		if p == nil {
			return d, false
		}
		limit := p.LimitC.V
		if !p.LimitC.OK {
			limit = s.typeLimit(p, d.Surroundings.Wet)
		}
		q, _, _, ok := s.hotterType(p, d.Surroundings.Wet, limit)
		if !ok {
			return d, false
		}
		q.ID = id
		d = section.SetReason(section.Replace(d, q), section.ReasonLimit+id, "")
	}
	if at, ok := rating.MakeRoom(d, s.cat, ""); ok {
		return section.PlaceAll(d, at), true
	}
	return d, true // nested parts are checked by the solver
}

// typeLimit is the limit of a core's type, 0 without one.
func (s *Study) typeLimit(p *section.Part, wet bool) float64 {
	typ := p.Type
	if w, ok := s.cat.Wire(p.Stock); ok && typ == "" {
		typ = w.Type
	}
	t, ok := s.cat.WireType(typ)
	switch {
	case !ok:
		return 0
	case wet:
		return t.WetC
	}
	return t.DryC
}

// widestClass is how far a next class may lie above the present limit, K: wire of a wholly different trade is no next step.
const widestClass = 50

// hotterType is a core of the wire type with the next higher limit around the same conductor.
func (s *Study) hotterType(p *section.Part, wet bool, limit float64) (q section.Part, name string, c float64, ok bool) {
	q = *p
	size, metal, class := "", section.Copper, section.Stranded
	if w, found := s.cat.Wire(p.Stock); found {
		size, metal, class = w.Size, w.Metal, w.Class
	} else if p.Conductor != nil && p.Conductor.Round() {
		size, metal, class = p.Conductor.Size, orElse(p.Conductor.Metal, metal), orElse(p.Conductor.Class, class)
	}
	if size == "" {
		return q, "", 0, false
	}
	american := !strings.Contains(size, "mm")
	stands := func(t catalog.WireType) float64 {
		if wet {
			return t.WetC
		}
		return t.DryC
	}
	var best *catalog.WireType
	var stock string
	for _, t := range s.cat.WireTypes() {
		k := stands(t)
		if t.American != american || t.Metal != metal || k <= limit || k > limit+widestClass || wet && t.NeverWet || best != nil && k >= stands(*best) {
			continue
		}
		id, listed := "", false
		for _, w := range s.cat.Wires() {
			if w.Type == t.ID && w.Size == size && w.Metal == metal && w.Class == class {
				id, listed = w.ID, true
			}
		}
		_, _, known := s.cat.TypicalWire(size, t.ID)
		if p.Stock != "" && !listed || p.Stock == "" && (!known || t.Class != class || len(p.Layers) == 0) {
			continue
		}
		best, stock = &t, id
	}
	if best == nil {
		return q, "", 0, false
	}
	q.LimitC = section.Opt[float64]{}
	if p.Stock != "" {
		q.Stock, q.Type = stock, ""
		return q, best.Name, stands(*best), true
	}
	thick, _, _ := s.cat.TypicalWire(size, best.ID)
	q.Type = best.ID
	q.Layers = slices.Clone(p.Layers)
	q.Layers[0] = section.Layer{Material: best.Insulation, ThicknessMM: math.Round(thick*1e6) / 1e3}
	return q, best.Name, stands(*best), true
}
