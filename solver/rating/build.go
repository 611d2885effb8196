package rating

import (
	"math"

	"packrise/solver/fluid"
	"packrise/solver/heat"
	"packrise/solver/section"
)

// zeroC is 0 °C in K.
const zeroC = 273.15

// spaces are the air-filled regions of a scene, whose conductivity follows their own temperature: the holder (index −1; of bodies apart −1 less the
// body's index), cables and bores by part index.
type spaces map[int]float64 // °C

// airSpaces lists the regions that hold air.
func (s *scene) airSpaces(start float64) spaces {
	out := spaces{}
	if s.apart() {
		for k := range s.bodies {
			if s.holder.fill.air && s.bodies[k].several() {
				out[-1-k] = start
			}
		}
	} else if s.holder.fill.air && s.holder.kind != section.NoHolder {
		out[-1] = start
	}
	for i := range s.parts {
		p := &s.parts[i]
		if (p.inside != nil && p.inside.fill.air) || (p.bore != nil && p.bore.fill.air && !p.bore.fixed.OK) {
			out[i] = start
		}
	}
	return out
}

// hottestHolder is the region between parts of the top level that is hottest: of bodies apart there are several.
func (a spaces) hottestHolder() (region int, t float64, ok bool) {
	for i, v := range a {
		if i < 0 && (!ok || v > t) {
			region, t, ok = i, v, true
		}
	}
	return region, t, ok
}

// k returns the conductivity (W/mK) of what fills a region.
func (a spaces) k(i int, m medium) float64 {
	if m.air {
		return fluid.AirConductivity(a[i] + zeroC)
	}
	return m.k
}

// problems writes the heat problems of a scene, one a body, at given temperatures of its air and, where they are free, given films.
func (s *scene) problems(air spaces, f films) []heat.Problem {
	if !s.apart() {
		return []heat.Problem{s.build(air, f)}
	}
	out := make([]heat.Problem, len(s.bodies))
	for k := range out {
		out[k] = s.buildBody(k, air, f)
	}
	return out
}

// buildBody writes the heat problem of one of several bodies, about its own origin.
func (s *scene) buildBody(k int, air spaces, f films) heat.Problem {
	b := &s.bodies[k]
	p := heat.Problem{
		Parts:   make([]heat.Part, len(b.all)),
		MediumK: air.k(-1-k, s.holder.fill),
		Wall:    heat.Wall{Shape: heat.BarePart, Film: s.filmW, Ambient: s.doc.Surroundings.AmbientC.V},
	}
	if b.several() {
		p.Wall.Shape, p.Wall.Taut = heat.Hull, taut
		if s.formed(-1, b.top) {
			p.Clearance = s.holder.gap
		}
	}
	if s.out.free {
		p.Wall.Film, p.Wall.Ambient = f[k].film, f[k].toward
	}
	place := map[int]int{-1: -1}
	about := func(v, origin float64) float64 { return nanometre * math.Round((v-origin)/nanometre) * mm }
	for n, i := range b.all {
		place[i] = n
		q := s.heatPart(i, air)
		if q.In < 0 {
			q.X, q.Y = about(s.parts[i].abs.X, b.origin.X), about(s.parts[i].abs.Y, b.origin.Y)
		}
		q.In = place[q.In]
		p.Parts[n] = q
	}
	s.shine(&p, b.all)
	return p
}

// build writes the heat problem of a scene of one body. Temperatures are °C throughout.
func (s *scene) build(air spaces, f films) heat.Problem {
	h := &s.holder
	p := heat.Problem{
		Parts:     make([]heat.Part, len(s.parts)),
		MediumK:   air.k(-1, h.fill),
		Clearance: h.gap,
		Wall:      heat.Wall{R: h.radius, W: h.w, H: h.h, Rings: heatRings(h.layers), Film: s.filmW, Ambient: s.doc.Surroundings.AmbientC.V},
	}
	switch h.kind {
	case section.Wireway:
		p.Wall.Shape = heat.Rect
		sides := s.doc.Holder.Sides
		p.Wall.Sides = [4]heat.Side{heat.Bottom: side(sides.Bottom), heat.Right: side(sides.Right), heat.Top: side(sides.Top), heat.Left: side(sides.Left)}
	case section.NoHolder:
		p.Wall.Shape = heat.BarePart
	}
	if s.hulled() {
		p.Wall.Shape, p.Wall.Taut = heat.Hull, taut
		if !s.formed(-1, s.children(-1)) {
			p.Clearance = 0 // the parts have been moved apart
		}
	}
	if h.flat {
		p.Wall.Shape = heat.FlatWall
	}
	if s.out.free {
		s.out.wall(&p.Wall, f)
	}
	s.lean(&p.Wall)
	for i := range s.parts {
		p.Parts[i] = s.heatPart(i, air)
	}
	s.shine(&p, nil)
	return p
}

func side(s section.Side) heat.Side {
	switch s.Kind {
	case section.SideInsulated:
		return heat.Side{Kind: heat.Insulated}
	case section.SideFixed:
		return heat.Side{Kind: heat.Held, Temp: s.FixedC}
	}
	return heat.Side{}
}

func heatRings(layers []layer) []heat.Ring {
	out := make([]heat.Ring, len(layers))
	for i, l := range layers {
		out[i] = heat.Ring{K: l.material.k, Thickness: l.thickness}
	}
	return out
}

func (s *scene) heatPart(i int, air spaces) heat.Part {
	p := &s.parts[i]
	out := heat.Part{In: p.in, X: p.x, Y: p.y, Radius: p.radius, Form: p.form, Rings: heatRings(p.layers)}
	switch {
	case p.metal:
		out.Core = heat.Metal
	case p.inside != nil:
		out.Core, out.K = heat.Inside, air.k(i, p.inside.fill)
	case p.bore != nil && p.bore.fixed.OK:
		out.Core, out.Fixed = heat.FixedBore, p.bore.fixed.V
	case p.bore != nil:
		out.Core, out.K = heat.Bore, air.k(i, p.bore.fill)
	default:
		out.Core, out.K = heat.Body, p.body
	}
	return out
}

// update moves the temperature of every air region to the mean of its surfaces (weighted by circumference) and returns the largest relative
// change of a conductivity.
func (a spaces) update(s *scene, r *heat.Result) float64 {
	worst := 0.0
	for i, old := range a {
		t := s.airTemperature(i, r)
		k0, k1 := fluid.AirConductivity(old+zeroC), fluid.AirConductivity(t+zeroC)
		worst = max(worst, math.Abs(k1/k0-1))
		a[i] = t
	}
	return worst
}

// airTemperature is the mean of the surfaces that face region i, weighted by their circumference.
func (s *scene) airTemperature(i int, r *heat.Result) float64 {
	if i >= 0 && s.parts[i].inside == nil {
		return r.Surfaces[i][0]
	}
	wall := r.WallMax[0]
	around := 0.0
	switch {
	case i >= 0:
		wall, around = r.Surfaces[i][0], s.parts[i].loop(0).Perimeter()
	case s.holder.kind == section.Wireway:
		around = 2 * (s.holder.w + s.holder.h)
	case s.apart():
		b := s.holding(i)
		wall, around = r.Bodies[-1-i].WallMean, b.around
	case s.hulled():
		wall = r.WallMean
		_, around = s.hull()
	default:
		around = s.holder.loop(0).Perimeter()
	}
	sum, weight := wall*around, around
	for _, j := range s.facing(i) {
		c := s.parts[j].outside().Perimeter()
		sum += c * r.Surfaces[j][len(r.Surfaces[j])-1]
		weight += c
	}
	return sum / weight
}
