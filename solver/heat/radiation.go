package heat

import (
	"math"

	"packrise/solver/gas"
)

// Filling tells what a medium does besides conducting.
type Filling int

// Fillings.
const (
	Solid Filling = iota // nothing
	Gas                  // surfaces radiate through it
	Air                  // and it moves where there is room
)

// ThinnestK is the least conductivity (W/mK) of a gas. Where surfaces touch in a vacuum their contact conducts, nobody knows how well; thinner gases count as
// this one, which carries a twentieth of what radiation does over 1 mm.
const ThinnestK = 3e-4

// thicken raises gases to ThinnestK.
func (p *Problem) thicken() {
	if p.Filling != Solid {
		p.MediumK = math.Max(p.MediumK, ThinnestK)
	}
	for i := range p.Parts {
		if q := &p.Parts[i]; q.Core == Inside && q.Filling != Solid {
			q.K = math.Max(q.K, ThinnestK)
		}
	}
}

// standardPressure, Pa, where none is given.
const standardPressure = 101325

// grain is how finely surfaces are divided: patches per turn of a part and of a wall, and points from which each of them looks.
func (a Accuracy) grain() (part, wall float64, points int) {
	switch a {
	case Draft:
		return 16, 48, 2
	case Fine:
		return 36, 108, 4
	}
	return 24, 72, 3
}

// radiant are the surfaces of one region that radiate to each other through its gas.
type radiant struct {
	discs  []gas.Disc
	out    gas.Outline
	points int
	eps    []float64 // emissivity of each patch
	area   []float64 // m² per metre of run
	first  []int     // patch of each piece, of the wall, and their number
	rims   []rim     // of the pieces
	wall   rim       // of a round wall
	sides  *sides    // of a border
	ends   []float64 // m along a border's patches
	zero   float64   // absolute temperature of the common zero
	stirs  bool
	press  float64 // Pa

	ex    *gas.Exchange // nil until the surfaces have looked about
	spare *gas.Exchange // one that may be that of the same places
	at    []complex128  // where the pieces were when they looked about, nil before

	base  []float64 // K: patch temperatures that emissions are taken about
	still []float64 // W/m: emissions there
	net   []float64 // room for emissions
	warm  []float64 // room for temperatures
	nusselt
}

// nusselt is what convection multiplied conduction by, 1 for none, and whether the formula held.
type nusselt struct {
	nu      float64
	inRange bool
}

// newRadiant divides the surfaces of region g. What an old one, of the same or another region, saw is kept if it is still so.
func (m *Model) newRadiant(g *region, old *radiant) *radiant {
	part, turn, points := m.set.Accuracy.grain()
	grain := gas.Grain{PerTurn: part, Turn: turn}
	for i := range g.pieces {
		c := &g.pieces[i]
		grain.Discs = append(grain.Discs, gas.Disc{C: c.at, R: c.drawn})
	}
	if c, ok := g.border.(*contourWall); ok {
		grain.Discs = append(grain.Discs, c.bodies()...)
	}
	r := &radiant{zero: m.p.ZeroK, press: m.p.Pressure, points: points, stirs: g.filling == Air, nusselt: nusselt{1, true}}
	if r.press == 0 {
		r.press = standardPressure
	}
	r.divide(g, &grain)
	for _, v := range []*[]float64{&r.base, &r.still, &r.net, &r.warm} {
		*v = make([]float64, len(r.area))
	}
	r.eps = m.emissivities(g, r)
	if old != nil {
		if r.spare = old.ex; r.spare == nil {
			r.spare = old.spare
		}
	}
	return r
}

// divide cuts the pieces and the wall into patches.
func (r *radiant) divide(g *region, grain *gas.Grain) {
	r.discs = append(r.discs, grain.Discs...)
	border, _ := g.border.(patched)
	for i := range g.pieces {
		d := &r.discs[i]
		if border != nil {
			d.Cuts, d.Blank = grain.Between(i, border.exposed(i))
		} else {
			d.Cuts = grain.Cuts(i)
		}
		r.rims = append(r.rims, newRim(r.add(d.R, d.Cuts), d.Cuts, d.Blank, maxRim))
	}
	if border == nil {
		cuts := grain.Around(g.wall.R)
		r.out = gas.Ring(g.wall.R, cuts)
		r.wall = newRim(r.add(g.wall.R, cuts), cuts, nil, maxRing)
	} else {
		r.sides = border.divide(grain)
		copy(r.discs[len(g.pieces):], r.sides.bodies)
		r.out = r.sides.outline()
		r.ends = []float64{0}
		for k, l := range r.sides.length {
			r.ends = append(r.ends, r.ends[k]+l)
		}
		r.add(1, r.ends)
	}
	r.first = append(r.first, len(r.area))
}

// add counts the patches between cuts on a circle of radius r, and returns the first of them.
func (r *radiant) add(radius float64, cuts []float64) (first int) {
	first = len(r.area)
	r.first = append(r.first, first)
	for k := 1; k < len(cuts); k++ {
		r.area = append(r.area, radius*(cuts[k]-cuts[k-1]))
	}
	return first
}

// emissivities lists those of the patches of region g.
func (m *Model) emissivities(g *region, r *radiant) []float64 {
	var e []float64
	for i := range g.pieces {
		for range r.rims[i].n {
			e = append(e, m.p.Parts[g.pieces[i].part].Emissivity)
		}
	}
	if r.sides != nil && r.sides.eps != nil {
		return append(e, r.sides.eps...)
	}
	wall := m.p.Wall.Emissivity
	if g.part >= 0 {
		wall = m.p.Parts[g.part].InsideEmissivity
	}
	for range r.out.Segments {
		e = append(e, wall)
	}
	return e
}

// look lets the pieces look about, all of them or those that have moved; false if stop asked for an end.
func (r *radiant) look(g *region, threads int, stop func() bool) bool {
	if r.sides != nil && !r.sides.measure(stop) {
		return false
	}
	if r.ex == nil {
		if r.spare != nil && r.spare.Alike(r.discs, r.out, r.points) {
			r.ex = gas.NewExchange(r.spare.Enclosure, r.eps)
		} else {
			for i := range g.pieces {
				r.discs[i].C = g.pieces[i].at
			}
			e := gas.NewEnclosure(r.discs, r.out, r.points, threads, stop)
			if e == nil {
				return false
			}
			r.ex = gas.NewExchange(e, r.eps)
		}
		r.spare = nil
	}
	for i := range g.pieces {
		if at := g.pieces[i].at; at != r.ex.Centre(i) {
			r.ex.Move(i, at, threads)
		}
	}
	r.at = r.at[:0]
	for i := range g.pieces {
		r.at = append(r.at, g.pieces[i].at)
	}
	return true
}

// strays is how far any piece has moved since it looked about; +Inf if it has not.
func (r *radiant) strays(g *region) float64 {
	if len(r.at) != len(g.pieces) {
		return math.Inf(1)
	}
	far := 0.0
	for i := range g.pieces {
		far = math.Max(far, dist(g.pieces[i].at, r.at[i]))
	}
	return far
}

// stir finds the convection at patch temperatures t, K.
func (r *radiant) stir(t []float64) {
	if r.stirs {
		r.nu, r.inRange = r.ex.Stir(t, r.press)
	}
}

// checkShine panics on misuse of what radiation needs.
func (p *Problem) checkShine() {
	ok := good(p.ZeroK, p.Pressure) && p.ZeroK >= 0 && p.Pressure >= 0
	share := func(e float64) { ok = ok && e >= 0 && e <= 1 }
	share(p.Wall.Emissivity)
	for i := range p.Parts {
		share(p.Parts[i].Emissivity)
		share(p.Parts[i].InsideEmissivity)
	}
	if !ok {
		panic(badShine)
	}
}

// radiates tells whether surfaces radiate to each other through the region's medium.
func (g *region) radiates() bool {
	if _, ok := g.border.(patched); g.border != nil && !ok {
		return false
	}
	return g.filling != Solid
}

// opens tells whether the region or anything in it radiates.
func (g *region) opens() bool {
	if g.radiates() {
		return true
	}
	for i := range g.pieces {
		if in := g.pieces[i].inside; in != nil && in.opens() {
			return true
		}
	}
	return false
}

// openLaw stands for a cable whose inside radiates: it is not eliminated.
func (g *region) openLaw() *law {
	l := &law{n: 2 * g.heard(), open: true, definite: true, u: make([][]float64, len(g.sources))}
	l.sign = make([]float64, l.n)
	return l
}

// leastScale is the least scale of a piece's harmonics among radiating surfaces, whose emissions go out and come in beside what is reflected.
const leastScale = 0.1

// wallShare is how much a round wall's harmonics count for the temperatures of its patches.
const wallShare = 0.02
