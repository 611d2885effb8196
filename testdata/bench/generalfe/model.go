package main

import (
	"errors"
	"math"

	"packrise/solver/section"
)

const metalK = 385 // W/mK: the metal is nearly of one temperature, at most 0.005 K off (testdata/fe-cases/README.md)

// mark tells the conductivity, and the heat per metre, of the region that a point lies in.
type mark struct {
	at      section.Point
	k, heat float64
	metal   bool
}

// model is what FreeFem++ is given.
type model struct {
	lines
	marks               []mark
	fillK               float64
	film, ambient, edge float64 // W/m²K, °C; mm of true outside
}

// build draws a document of round cores in a conduit or wireway with a fixed film.
func build(d *section.Document, level float64) (*model, error) {
	m := &model{film: d.Surroundings.FilmWM2K.Or(math.NaN()), ambient: d.Surroundings.AmbientC.Or(math.NaN())}
	m.alpha = stretch / level
	k := map[string]float64{}
	for _, material := range d.Materials {
		k[material.Name] = material.KWMK
	}
	m.fillK = k[d.Holder.Fill]
	heats := map[string]float64{}
	for _, load := range d.Loads {
		for _, id := range load.Conductors {
			heats[id] += load.HeatWM.V
		}
	}
	var surfaces []*curve
	for _, p := range d.Parts {
		if p.Conductor == nil || !p.Conductor.DiameterMM.OK || !p.At.OK {
			return nil, errors.New("only placed round cores of a given diameter are drawn")
		}
		surfaces = append(surfaces, m.core(p, k, heats[p.ID]))
	}
	walls := m.wall(&d.Holder, k)
	for i, a := range surfaces {
		for _, b := range surfaces[:i] {
			m.facing(a, b)
		}
		for _, w := range walls {
			m.facing(a, w)
		}
	}
	for _, s := range surfaces {
		m.close(s)
	}
	m.speck(surfaces[0].at)
	m.close(walls...)
	return m, nil
}

// core adds a part's metal and inner layers and returns its surface, which is not closed yet.
func (m *model) core(p section.Part, k map[string]float64, heat float64) *curve {
	r := p.Conductor.DiameterMM.V / 2
	at := p.At.V
	m.marks = append(m.marks, mark{at, metalK, heat, true})
	for _, layer := range p.Layers {
		m.close(circle(at, r, m.alpha*layer.ThicknessMM))
		m.marks = append(m.marks, mark{at: section.Point{X: at.X + r + layer.ThicknessMM/2, Y: at.Y}, k: k[layer.Material]})
		r += layer.ThicknessMM
	}
	return circle(at, r, m.alpha*neckEnd*r)
}

// wall adds the outer faces of the wall's layers and returns the inner outline, which is not closed yet. A rectangle has its lower left corner at (0, 0).
func (m *model) wall(h *section.Holder, k map[string]float64) []*curve {
	round := h.InsideMM.OK
	w, t := h.WidthMM.V, 0.0
	outline := func(t, hmax float64) []*curve {
		if round {
			return []*curve{circle(section.Point{}, h.InsideMM.V/2+t, hmax)}
		}
		return box(-t, section.Point{X: w + t, Y: h.HeightMM.V + t}, hmax)
	}
	for n, layer := range h.Layers {
		m.marks = append(m.marks, mark{at: section.Point{X: w + t + layer.ThicknessMM/2, Y: h.HeightMM.V / 2}, k: k[layer.Material]})
		if round {
			m.marks[len(m.marks)-1].at.X += h.InsideMM.V / 2
		}
		t += layer.ThicknessMM
		ring := outline(t, m.alpha*layer.ThicknessMM)
		m.edge = 0
		for _, c := range ring {
			c.outside = n == len(h.Layers)-1
			m.edge += c.length
		}
		m.close(ring...)
	}
	if round {
		return outline(0, m.alpha*h.InsideMM.V/8)
	}
	return outline(0, m.alpha*(w+h.HeightMM.V)/16)
}

// speck puts the shortest segment into metal, where it changes no temperature.
func (m *model) speck(at section.Point) {
	m.segments = append(m.segments, [2]int{m.node(section.Point{X: at.X, Y: at.Y + 0.5}), m.node(section.Point{X: at.X, Y: at.Y + 0.5 + shortest})})
	m.outside = append(m.outside, false)
}

// facing grades two surfaces where they come close: two parts, or a part and the inner outline of the wall.
func (m *model) facing(a, b *curve) {
	if b.r == 0 {
		s := b.along(a.at, 0)
		q := b.place(s)
		d := math.Hypot(q.X-a.at.X, q.Y-a.at.Y)
		p := section.Point{X: a.at.X + (q.X-a.at.X)*a.r/d, Y: a.at.Y + (q.Y-a.at.Y)*a.r/d}
		m.neck(a, b, p, q, a.r, a.r)
		return
	}
	d := math.Hypot(b.at.X-a.at.X, b.at.Y-a.at.Y)
	if d == 0 {
		return // in the middle of the wall
	}
	ux, uy := (b.at.X-a.at.X)/d, (b.at.Y-a.at.Y)/d
	radius, smaller, side := 1/(1/a.r+1/b.r), min(a.r, b.r), -1.0
	if d < max(a.r, b.r) { // a within the wall b: both on the side away from b's middle
		radius, ux, uy, side = 1/(1/a.r-1/b.r), -ux, -uy, 1
	}
	p := section.Point{X: a.at.X + ux*a.r, Y: a.at.Y + uy*a.r}
	q := section.Point{X: b.at.X + side*ux*b.r, Y: b.at.Y + side*uy*b.r}
	m.neck(a, b, p, q, radius, smaller)
}
