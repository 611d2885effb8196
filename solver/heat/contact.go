package heat

import (
	"math"

	"packrise/solver/harmonic"
)

// order sets the harmonics of every piece at factor f, going down into the cables.
func (g *region) order(f float64) {
	g.orders = make([]int, len(g.pieces))
	for i := range g.pieces {
		g.settle(i)
	}
	g.clear()
	for i := range g.pieces {
		g.orders[i] = g.orderOf(i, f)
		if c := &g.pieces[i]; c.inside != nil {
			c.inside.port = g.orders[i]
			c.inside.order(f)
		}
	}
}

// orderOf applies the order rule to piece i.
func (g *region) orderOf(i int, f float64) int {
	c := &g.pieces[i]
	low := lowest(f, g.k/c.skin())
	m := low
	for j := range g.pieces {
		if j != i {
			m = max(m, g.orderBeside(c, &g.pieces[j], f, m))
		}
	}
	if g.border != nil {
		return min(max(m, g.border.order(g, c, f, m)), maxOrderBorder)
	}
	return max(m, g.orderAtWall(c, f, m))
}

// maxOrder bounds the harmonics of a piece: a large one that touches small ones needs a/x of them.
const maxOrder = harmonic.MaxOrder

// lowest is the fewest harmonics of any piece at factor f of the order rule, for a medium of ratio times the conductivity of its
// skin. Where the two are alike harmonics die out by themselves.
func lowest(f, ratio float64) int {
	low := 7.0
	if ratio > 0.5 {
		low = 5
	}
	return int(math.Ceil(low * math.Sqrt(f)))
}

// orderBeside is the order that c needs beside d, 0 if it is not above m.
func (g *region) orderBeside(c, d *piece, f float64, m int) int {
	gap := dist(c.at, d.at) - c.a - d.a
	reff := c.a * d.a / (c.a + d.a)
	if _, open := g.border.(*hullWall); open && (c.rod() || d.rod()) {
		f *= rodFactor
	}
	if openEnough(f*c.a, reff, gap, m) {
		return 0
	}
	return contact(f, c.a, reff, gap, g.k, between(c.skin(), d.skin()), func(x float64) float64 {
		return between(c.conductivity(x), d.conductivity(x))
	})
}

// rodFactor is how many more harmonics are kept where a body without layers touches something in a bundle: its hottest place is there.
const rodFactor = 1.5

// rod tells that the piece has neither a temperature of its own nor layers nor an inside.
func (c *piece) rod() bool { return !c.source && c.inside == nil && len(c.stack.Rings) == 0 }

// contact is the order of a piece of radius a at a contact: see harmonic.Scale.
func contact(f, a, reff, gap, k, skin float64, y func(x float64) float64) int {
	return harmonic.Order(f, a, harmonic.Scale(reff, gap, k, skin, y), 0, maxOrder)
}

// openEnough tells whether the gap alone keeps the order within m.
func openEnough(ca, reff, gap float64, m int) bool {
	return gap > 0 && 2.2*2.2*ca*ca < float64(m*m)*2*reff*gap
}

// orderAtWall is the order that c needs beside the round wall, 0 if it is not above m.
func (g *region) orderAtWall(c *piece, f float64, m int) int {
	gap := g.r - math.Hypot(real(c.at), imag(c.at)) - c.a
	reff := math.Min(c.a*g.r/(g.r-c.a), 1e3*c.a)
	if openEnough(f*c.a, reff, gap, m) {
		return 0
	}
	wall := g.facing()
	return contact(f, c.a, reff, gap, g.k, between(c.skin(), face(wall)), func(x float64) float64 {
		n := int(math.Min(math.Max(g.r/x, 1), 2000))
		return between(c.conductivity(x), shows(g.k, wall.Port(n).Rho))
	})
}

// face is the conductivity of a wall's inside.
func face(wall *harmonic.Stack) float64 {
	switch {
	case len(wall.Rings) > 0:
		return wall.Rings[0].K
	case wall.Outer.Kind == harmonic.Held:
		return math.Inf(1)
	case wall.Outer.Kind == harmonic.Medium:
		return wall.Outer.V
	}
	return wall.Inner.V // a film is no material: as if the medium went on
}

// between is the harmonic mean.
func between(y, z float64) float64 {
	if math.IsInf(y, 1) {
		return 2 * z
	}
	if math.IsInf(z, 1) {
		return 2 * y
	}
	if y+z == 0 {
		return 0
	}
	return 2 * y * z / (y + z)
}
