package rating

import (
	"math"

	"packrise/solver/section"
)

// bounds returns the box (mm) around the outer surface.
func (s *scene) bounds() [4]float64 {
	t := 0.0
	for _, l := range s.holder.layers {
		t += l.thickness / mm
	}
	if s.apart() && len(s.bodies) > 0 {
		return s.outerBox()
	}
	if s.holder.kind == section.Wireway {
		return [4]float64{-t, -t, s.holder.w/mm + t, s.holder.h/mm + t}
	}
	if s.holder.flat {
		x, y := s.holder.w/mm/2+t, s.holder.h/mm/2+t
		return [4]float64{-x, -y, x, y}
	}
	if s.hulled() {
		return boxOf(hullLoop(s.drawn()))
	}
	r := s.holder.radius/mm + t
	if s.holder.kind == section.NoHolder && len(s.parts) > 0 {
		r = s.parts[0].outer() / mm
	}
	return [4]float64{s.origin.X - r, s.origin.Y - r, s.origin.X + r, s.origin.Y + r}
}

// boxOf is the upright box round points.
func boxOf(points []section.Point) [4]float64 {
	b := [4]float64{math.Inf(1), math.Inf(1), math.Inf(-1), math.Inf(-1)}
	for _, p := range points {
		b = [4]float64{min(b[0], p.X), min(b[1], p.Y), max(b[2], p.X), max(b[3], p.Y)}
	}
	return b
}

// Bounds returns the box (mm) around the outer surface: part of render's Field.
func (r *Result) Bounds() (x0, y0, x1, y1 float64) {
	return r.bounds[0], r.bounds[1], r.bounds[2], r.bounds[3]
}

// layerK returns the conductivity (W/mK) of what lies between the parts, at its own temperature, and of the holder's layers.
func (s *scene) layerK(a answered) []float64 {
	k := []float64{a.air.k(-1, s.holder.fill)}
	for _, l := range s.holder.layers {
		k = append(k, l.material.k)
	}
	return k
}

// LayerK returns the conductivities (W/mK) of what lies between the parts and of the holder's layers, from the inside outwards, for
// pictures of the heat flow; nil where nothing was solved. Not to be written to.
func (r *Result) LayerK() []float64 { return r.layerK }

// Solved tells whether there is a field to draw.
func (r *Result) Solved() bool { return r.field != nil }

// Row fills dst with °C at (x0 + i·dx, y), lengths in mm, NaN outside: part of render's Field. Safe for concurrent use.
func (r *Result) Row(dst []float64, y, x0, dx float64) {
	if r.field == nil {
		for i := range dst {
			dst[i] = math.NaN()
		}
		return
	}
	r.field.Row(dst, (y-r.origin.Y)*mm, (x0-r.origin.X)*mm, dx*mm)
}

// Readings returns what is known of every shape and layer, for pictures. It is empty when nothing was solved.
func (r *Result) Readings() []section.Reading {
	if r.field == nil {
		return nil
	}
	out := make([]section.Reading, 0, len(r.Conductors)+len(r.Others))
	for _, c := range r.Conductors {
		out = append(out, section.Reading{
			ID: c.ID, Kind: section.Core, TempC: c.JudgedC(), LimitC: c.LimitC, Assumed: c.LimitAssumed, CurrentA: c.CurrentA, HeatWM: c.HeatWM,
			Hottest: c.ID == r.Hottest, Unloaded: c.HeatWM == 0, LoadKnown: c.LoadKnown, Governs: r.governs(c.ID),
		})
	}
	for _, o := range r.Others {
		out = append(out, section.Reading{
			ID: o.ID, Kind: o.Kind, TempC: o.TempC, LimitC: o.LimitC, Assumed: o.LimitAssumed, Unloaded: true, LoadKnown: true, Governs: r.governs(o.ID),
		})
	}
	return out
}

func (r *Result) governs(id string) bool { return r.Governing != nil && r.Governing.Part == id }
