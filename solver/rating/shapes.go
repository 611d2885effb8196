package rating

import (
	"math"

	"packrise/solver/catalog"
	"packrise/solver/heat"
	"packrise/solver/section"
)

// Outline returns the shapes to draw without solving, with unplaced parts marked Unset beside the holder, and all problems of
// substance. Shapes are returned as far as they can be made out even when there are problems.
func Outline(d *section.Document, cat *catalog.Catalog) ([]section.Shape, []section.Problem) {
	s, problems := resolve(d, cat)
	return s.shapes(), problems
}

// shapes draws the scene, the holder first, a cable before its parts.
func (s *scene) shapes() []section.Shape {
	out := make([]section.Shape, 0, len(s.parts)+1)
	out = append(out, s.holderShape())
	s.setAside()
	for i := range s.parts {
		p := &s.parts[i]
		sh := section.Shape{ID: p.id, Kind: p.kind, At: p.abs, Unset: p.unset, Depth: p.depth, Label: p.label}
		if p.radius > 0 {
			sh.Rings = append(sh.Rings, section.Ring{Material: s.coreMaterial(p), Metal: p.metal, R1: p.radius / mm})
		}
		sh.Rings = append(sh.Rings, rings(p.layers, p.radius/mm)...)
		if p.form.Kind != heat.Disc && p.radius > 0 {
			sh.Loops = loops(p.loop, p.layers, p.abs)
		}
		out = append(out, sh)
	}
	return out
}

func (s *scene) coreMaterial(p *item) string {
	switch {
	case p.metal:
		return p.wire.Metal
	case p.inside != nil:
		return p.inside.fill.id
	case p.bore != nil:
		return p.bore.fill.id
	}
	return p.src.Material
}

func rings(layers []layer, r float64) []section.Ring {
	out := make([]section.Ring, len(layers))
	for i, l := range layers {
		out[i] = section.Ring{Material: l.id, Metal: l.material.metal, R0: r, R1: r + l.thickness/mm}
		r = out[i].R1
	}
	return out
}

func (s *scene) holderShape() section.Shape {
	h := &s.holder
	sh := section.Shape{Kind: h.kind}
	switch {
	case s.hulled():
		s.bundleShape(&sh)
	case h.kind == section.Wireway:
		sh.Width, sh.Height = h.w/mm, h.h/mm
		sh.Rings = rings(h.layers, 0)
	case h.kind == section.Apart:
		sh.At = s.origin
		for _, top := range s.together() {
			if len(top) > 1 {
				sh.Loops = append(sh.Loops, hullLoop(s.discsOf(top)))
			}
		}
	case h.kind == section.NoHolder:
		sh.At = s.origin
	default:
		sh.At = s.origin
		sh.Rings = append([]section.Ring{{Material: h.fill.id, R1: h.radius / mm}}, rings(h.layers, h.radius/mm)...)
		if h.flat {
			sh.Loops = loops(h.loop, h.layers, s.origin)
		}
	}
	sh.Against = s.againstLine()
	return sh
}

// setAside places the unset parts of the top level in a column right of everything else, and their inner parts with them.
func (s *scene) setAside() {
	right, top := s.extent()
	x, y := right+2, top
	for i := range s.parts {
		p := &s.parts[i]
		if p.in >= 0 || p.src.At.OK {
			continue
		}
		r := p.outer() / mm
		to := section.Point{X: x + r, Y: y - r}
		s.shift(i, to.X-p.abs.X, to.Y-p.abs.Y)
		y -= 2*r + 1
	}
}

// extent returns the right edge and the upper edge (mm) of the holder and the placed parts.
func (s *scene) extent() (right, top float64) {
	h := &s.holder
	t := 0.0
	for _, l := range h.layers {
		t += l.thickness / mm
	}
	right, top = math.Inf(-1), math.Inf(-1)
	switch h.kind {
	case section.Wireway:
		right, top = h.w/mm+t, h.h/mm+t
	case section.Jacket, section.Conduit:
		right, top = h.radius/mm+t, h.radius/mm+t
	}
	for i := range s.parts {
		if p := &s.parts[i]; !p.unset {
			right, top = max(right, p.abs.X+p.outer()/mm), max(top, p.abs.Y+p.outer()/mm)
		}
	}
	if math.IsInf(right, 0) {
		return 0, 0
	}
	return right, top
}
