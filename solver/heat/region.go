package heat

import (
	"math"

	"packrise/solver/harmonic"
)

// region is one medium with the pieces that lie in it and what it ends at: the holder's wall, or a cable's jacket.
type region struct {
	k      float64
	r      float64        // inside radius, clearance added; 0 if there is a border
	border border         // nil of a round region
	wall   harmonic.Stack // round: as drawn, from the medium outwards
	pieces []piece
	orders []int

	sys      *harmonic.System
	circle   *harmonic.Circle
	sign     []float64 // of each unknown in A = diag(−sgn) + 𝒢: +1 where the piece conducts better than the medium
	laws     []*law    // of cables, nil for others
	definite bool
	sources  []source
	port     int // harmonics of a cable as a piece outside, 0 of the holder
}

// source is a metal or held bore of the region or of a cable in it.
type source struct {
	piece int
	part  int
	own   int       // index among the sources of its cable, −1 if it is the piece itself
	u     []float64 // scaled outgoing amplitudes of its cable for 1 W/m, nil for the piece itself
}

// c2 is 1/(2πk): K per W/m of a logarithm.
func (g *region) c2() float64 { return 1 / (2 * math.Pi * g.k) }

// newRegion collects the pieces of holder or cable in (−1 for the holder).
func newRegion(p *Problem, in int, k float64) *region {
	g := &region{k: k}
	for i := range p.Parts {
		if p.Parts[i].In == in {
			g.pieces = append(g.pieces, newPiece(p, i, k))
		}
	}
	for i := range g.pieces {
		c := &g.pieces[i]
		if q := &p.Parts[c.part]; q.Core == Inside {
			c.inside = newRegion(p, c.part, q.K)
			c.inside.r = q.Radius
			c.inside.wall = c.stack
		}
		c.loosen(0)
	}
	return g
}

// loosen applies the clearance to the pieces.
func (g *region) loosen(clearance float64) {
	for i := range g.pieces {
		g.pieces[i].loosen(clearance)
	}
}

// settle keeps the pieces inside the round wall: what sticks out counts as touching.
func (g *region) settle(i int) {
	c := &g.pieces[i]
	if g.border != nil {
		g.border.settle(c)
		return
	}
	if c.a > g.r {
		c.a = g.r * (1 - 1e-9)
	}
	if l := math.Hypot(real(c.at), imag(c.at)); l+c.a > g.r {
		c.at *= complex((g.r-c.a)/l, 0)
	}
}

// clear keeps bare metal off bare metal by metalGap, at the cost of the radii. It returns the pieces whose radius changed.
func (g *region) clear() (changed []int) {
	for i := range g.pieces {
		c := &g.pieces[i]
		if !c.bare {
			continue
		}
		need := 0.0
		for j := range g.pieces {
			if d := &g.pieces[j]; j != i && d.bare {
				need = math.Max(need, (metalGap-(dist(c.at, d.at)-c.loose-d.loose))/2)
			}
		}
		if g.metalWall() {
			need = math.Max(need, metalGap-g.wallGap(c))
		}
		if a := c.loose - math.Min(need, math.Min(metalGap, 0.01*c.loose)); a != c.a {
			c.a = a
			changed = append(changed, i)
		}
	}
	return changed
}

// metalWall tells whether the wall's inside is bare metal, or held at one temperature.
func (g *region) metalWall() bool {
	if g.border == nil {
		return face(&g.wall) > metalK
	}
	return g.border.metal()
}

// wallGap is the distance of c's rim, as loosened, from the wall.
func (g *region) wallGap(c *piece) float64 {
	if g.border != nil {
		return g.border.gap(c) + c.a - c.loose
	}
	return g.r - math.Hypot(real(c.at), imag(c.at)) - c.loose
}

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
	if openEnough(f*c.a, reff, gap, m) {
		return 0
	}
	return contact(f, c.a, reff, gap, g.k, between(c.skin(), d.skin()), func(x float64) float64 {
		return between(c.conductivity(x), d.conductivity(x))
	})
}

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
	return contact(f, c.a, reff, gap, g.k, between(c.skin(), face(&g.wall)), func(x float64) float64 {
		n := int(math.Min(math.Max(g.r/x, 1), 2000))
		return between(c.conductivity(x), shows(g.k, g.wall.Port(n).Rho))
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

func dist(a, b complex128) float64 { return math.Hypot(real(a-b), imag(a-b)) }
