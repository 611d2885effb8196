package study

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"strings"

	"packrise/solver/catalog"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// sizes: the conductors of each load one size up.
func (a *adviser) sizes() {
	inv, _ := rating.Take(a.w, a.s.cat)
	for i := range a.w.Loads {
		l := a.w.Loads[i]
		if !a.warm(&l) || l.HeatWM.OK {
			continue
		}
		dq := map[int]float64{}
		from, to := "", ""
		ok := true
		for _, j := range a.sourcesOf(l.ID) {
			c := a.p.Conductors[j]
			p := section.Find(a.w, c.ID)
			if p == nil || j >= len(inv.Wires) {
				ok = false
				break
			}
			_, was, is, ratio, can := a.s.nextSize(p)
			if !can {
				ok = false
				break
			}
			dq[j] = -c.HeatWM * (1 - ratio)
			from, to = was, is
		}
		if !ok || len(dq) == 0 {
			continue
		}
		conductors := l.Conductors
		a.add(candidate{
			kind: ChangeUpsize, ids: slices.Clone(conductors), room: a.expect(dq, nil), text: fmt.Sprintf("Go one size up on %s: %s in place of %s", l.ID, to, from),
			make: func(d *section.Document) (*section.Document, bool) { return a.s.upsized(d, conductors) },
		})
	}
}

// upsized gives conductors their next size and makes room for them, in the cables that they lie in and in the holder.
func (s *Study) upsized(d *section.Document, conductors []string) (*section.Document, bool) {
	var cables []string
	for _, id := range conductors {
		d = section.OwnBuild(d, id)
		p := section.Find(d, id)
		if p == nil {
			return d, false
		}
		q, _, _, _, ok := s.nextSize(p)
		if !ok {
			return d, false
		}
		q.ID = id
		d = section.Replace(d, q)
		for at := strings.LastIndex(id, "/"); at > 0; at = strings.LastIndex(id[:at], "/") {
			if !has(cables, id[:at]) {
				cables = append(cables, id[:at])
			}
		}
	}
	slices.SortStableFunc(cables, func(a, b string) int { return cmp.Compare(strings.Count(b, "/"), strings.Count(a, "/")) }) // the innermost first
	for _, id := range cables {
		var ok bool
		if d, ok = s.refitBuild(d, section.Find(d, id).Build); !ok {
			return d, false
		}
	}
	return s.refit(d)
}

// refitBuild is refit within a cable.
func (s *Study) refitBuild(d *section.Document, name string) (*section.Document, bool) {
	at := slices.IndexFunc(d.Builds, func(b section.Build) bool { return b.Name == name })
	if at < 0 {
		return d, false
	}
	inner, ok := s.refit(d.With(func(d *section.Document) { d.Holder, d.Parts = d.Builds[at].Holder, d.Builds[at].Parts }))
	return d.With(func(d *section.Document) {
		d.Builds = slices.Clone(d.Builds)
		d.Builds[at].Holder, d.Builds[at].Parts = inner.Holder, inner.Parts
	}), ok
}

// refit pushes parts apart where they overlap; a jacket of its own size grows by up to 15 % when it must.
func (s *Study) refit(d *section.Document) (*section.Document, bool) {
	if at, ok := rating.MakeRoom(d, s.cat, ""); ok {
		return section.PlaceAll(d, at), true
	}
	if h := d.Holder; h.Kind != section.Jacket || h.Flat() || !h.InsideMM.OK {
		return d, false
	}
	for _, grow := range []float64{1.02, 1.05, 1.1, 1.15} {
		wider := wide(d, grow)
		if at, ok := rating.MakeRoom(wider, s.cat, ""); ok {
			return section.PlaceAll(wider, at), true
		}
	}
	return d, false
}

// wide is the design with a holder of its own sizes made larger.
func wide(d *section.Document, by float64) *section.Document {
	h := d.Holder
	up := func(v *section.Opt[float64]) {
		if v.OK {
			v.V = math.Round(v.V*by*100) / 100
		}
	}
	up(&h.InsideMM)
	up(&h.WidthMM)
	up(&h.HeightMM)
	return section.SetHolder(d, h)
}

// nextSize is a core with the next thicker conductor of the same kind, the sizes in words, and what its resistance is of the present one.
func (s *Study) nextSize(p *section.Part) (q section.Part, from, to string, ratio float64, ok bool) {
	q = *p
	if p.Kind != section.Core {
		return q, "", "", 0, false
	}
	if p.Stock != "" {
		return s.nextStock(p)
	}
	c := p.Conductor
	if c == nil || !c.Round() {
		return q, "", "", 0, false
	}
	metal, class := orElse(c.Metal, section.Copper), orElse(c.Class, section.Stranded)
	now, err := s.cat.Conductor(c.Size, metal, class)
	if c.Size == "" {
		now, err = s.cat.ConductorOf(c.AreaMM2.V*1e-6, c.DiameterMM.V*1e-3, metal, class)
	}
	if err != nil {
		return q, "", "", 0, false
	}
	american := strings.Contains(c.Size, "AWG") || strings.Contains(c.Size, "kcmil")
	for _, size := range s.cat.Sizes(american) {
		next, err := s.cat.Conductor(size, metal, class)
		if err != nil || next.AreaM2 < 1.05*now.AreaM2 {
			continue
		}
		q.Conductor = &section.Conductor{Size: next.Size, Metal: c.Metal, Class: c.Class}
		if t, _, ok := s.cat.TypicalWire(next.Size, p.Type); ok && p.Type != "" && len(p.Layers) > 0 {
			q.Layers = slices.Clone(p.Layers)
			q.Layers[0].ThicknessMM = math.Max(q.Layers[0].ThicknessMM, math.Round(t*1e6)/1e3)
		}
		return q, sizeWords(now, c.Size), sizeWords(next, next.Size), next.R20 / now.R20, true
	}
	return q, "", "", 0, false
}

func (s *Study) nextStock(p *section.Part) (q section.Part, from, to string, ratio float64, ok bool) {
	q = *p
	w, found := s.cat.Wire(p.Stock)
	now, err := s.cat.WireConductor(w)
	if !found || err != nil {
		return q, "", "", 0, false
	}
	for _, next := range s.cat.Wires() {
		if next.Type != w.Type || next.Metal != w.Metal || next.Class != w.Class {
			continue
		}
		c, err := s.cat.WireConductor(next)
		if err != nil || c.AreaM2 < 1.05*now.AreaM2 {
			continue
		}
		q.Stock = next.ID
		return q, sizeWords(now, w.Size), sizeWords(c, next.Size), c.R20 / now.R20, true
	}
	return q, "", "", 0, false
}

func sizeWords(c catalog.Conductor, size string) string {
	if size == "" {
		return trimmed(c.AreaM2*1e6) + " mm²"
	}
	return strings.Replace(size, "mm2", "mm²", 1)
}

func orElse(s, otherwise string) string {
	if s == "" {
		return otherwise
	}
	return s
}
