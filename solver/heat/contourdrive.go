package heat

import (
	"context"
	"slices"

	"packrise/solver/outline"
)

// drive is what the metals of contours make: heats with everything else that drives a section, unit by itself.
type drive struct{ heats, unit []float64 }

// driven are contours with their drive, as a responder.
type driven struct {
	*outline.Shaped
	drive *drive
}

// RespondTo adds the drive to the sources of the pieces.
func (d *driven) RespondTo(y []float64, src outline.Sources, ground bool) {
	d.Shaped.RespondTo(y, d.drive.with(src, ground), ground)
}

// with puts the drive behind the heats of the pieces.
func (d *drive) with(src outline.Sources, ground bool) outline.Sources {
	heats := d.unit
	if ground {
		heats = d.heats
	}
	src.Q = append(slices.Clip(src.Q), heats...)
	return src
}

// load takes the heats of the contours' metals from those by part.
func (c *contourWall) load(heats []float64) (changed bool) {
	for k, i := range c.plan.metals {
		changed = changed || c.drive.heats[k] != heats[i]
		c.drive.heats[k] = heats[i]
	}
	return changed
}

// loadContours prepares for heats by part.
func (m *Model) loadContours(heats []float64) {
	if m.contours != nil && m.contours.load(heats) && len(m.held) > 0 {
		m.forget() // what held bores have to give hangs on them
	}
}

// contourInfluence returns the rises of all metals for 1 W/m in each, by part, held bores of pieces taking part.
func (m *Model) contourInfluence(ctx context.Context, out [][]float64) Status {
	if !m.prepare(ctx) {
		return Cancelled
	}
	if m.Radiates() {
		k, ok := m.contourTangent(ctx)
		if !ok {
			return Cancelled
		}
		m.spreadContours(k, out)
		return Converged
	}
	g, c := m.top, m.contours
	all := len(g.sources) + len(c.plan.metals)
	k := make([][]float64, all)
	for s := range k {
		k[s] = make([]float64, all)
	}
	for s := range all {
		t, ok := m.contourColumn(ctx, s)
		if !ok {
			return Cancelled
		}
		for i, v := range t {
			k[i][s] = v
		}
	}
	for i := range k { // reciprocal but for what the densities lack
		for j := range i {
			v := (k[i][j] + k[j][i]) / 2
			k[i][j], k[j][i] = v, v
		}
	}
	m.spreadContours(m.reduce(k), out)
	return Converged
}

// spreadContours puts a matrix by source, contours' metals last, in the order of the parts.
func (m *Model) spreadContours(k, out [][]float64) {
	g, c := m.top, m.contours
	pieces := len(g.sources)
	part := func(s int) int {
		if s < pieces {
			return g.sources[s].part
		}
		return c.plan.metals[s-pieces]
	}
	for s := range k {
		i := part(s)
		if m.p.Parts[i].Core != Metal {
			continue
		}
		out[i] = make([]float64, len(m.p.Parts))
		for t, v := range k[s] {
			out[i][part(t)] = v
		}
	}
}

// contourColumn is the rise of every source, contours' metals last, for 1 W/m in source s.
func (m *Model) contourColumn(ctx context.Context, s int) ([]float64, bool) {
	g, c := m.top, m.contours
	_, _, tol := m.set.Accuracy.settings()
	q := make([]float64, len(g.sources))
	set := func(v float64) {
		if s < len(q) {
			q[s] = v
			return
		}
		c.drive.unit[s-len(q)] = v
	}
	set(1)
	f := g.loadColumn(q, false)
	clear(c.drive.unit)
	x := make([]float64, len(f))
	if _, ok := g.iterate(x, f, tol, ended(ctx)); !ok {
		return nil, false
	}
	set(1)
	t := g.temperatures(q, x, false)
	t = append(t, c.temperatures(c.y)...)
	clear(c.drive.unit)
	return t, true
}
