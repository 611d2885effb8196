package heat

import (
	"math"

	"packrise/solver/harmonic"
)

// metalK is the conductivity (W/mK) above which an outermost layer counts as bare metal; plastics end near 1, steels begin at 15.
const metalK = 5

// metalGap is the gap that bare metal keeps from bare metal, m. Between two equipotential faces in point contact the field has
// no scale of its own, and harmonics converge only algebraically.
const metalGap = 10e-6

// piece is a part made ready for the medium that it lies in.
type piece struct {
	part   int
	at     complex128     // in its region's coordinates
	a      float64        // radius at which it meets the medium: as drawn less its share of the clearance
	drawn  float64        // outer radius as drawn
	loose  float64        // drawn less the clearance; a is smaller by a metal's gap at most
	stack  harmonic.Stack // as drawn, from the core (or the inside of a cable) to the medium
	series float64        // K·m/W from the core (the inside rim of a cable) to the outer rim
	source bool           // heat can leave it by itself: metal, or a bore held at a temperature
	bare   bool           // outermost layer is metal
	inside *region        // of a cable
}

// newPiece prepares part i for a medium of conductivity k.
func newPiece(p *Problem, i int, k float64) piece {
	q := &p.Parts[i]
	c := piece{part: i, at: complex(q.X, q.Y), source: q.Core == Metal || q.Core == FixedBore}
	c.stack = harmonic.Stack{R: q.Radius, Rings: rings(q.Radius, q.Rings), Outer: harmonic.End{Kind: harmonic.Medium, V: k}}
	if c.source {
		c.stack.Inner.Kind = harmonic.Held
	} else {
		c.stack.Inner = harmonic.End{Kind: harmonic.Medium, V: q.K}
	}
	c.series = c.stack.Series()
	c.drawn = c.stack.Outside()
	c.a = c.drawn
	c.bare = c.skin() > metalK
	return c
}

// skin is the conductivity of the outermost layer; +Inf of a bare core.
func (c *piece) skin() float64 {
	switch n := len(c.stack.Rings); {
	case n > 0:
		return c.stack.Rings[n-1].K
	case c.stack.Inner.Kind == harmonic.Held:
		return math.Inf(1)
	}
	return c.stack.Inner.V
}

// rings stacks layers from radius r outwards.
func rings(r float64, layers []Ring) []harmonic.Ring {
	var g []harmonic.Ring
	for _, l := range layers {
		g = append(g, harmonic.Ring{K: l.K, R0: r, R1: r + l.Thickness})
		r += l.Thickness
	}
	return g
}

// loosen takes half the clearance off the radius, never more than a third of the rings' thickness.
func (c *piece) loosen(clearance float64) {
	c.loose = c.drawn - math.Min(clearance/2, (c.drawn-c.stack.R)/3)
	c.a = c.loose
}

// shows is the conductivity that a stack, seen from its medium of conductivity k through a port's reflection t, shows to a field.
func shows(k, t float64) float64 {
	if t <= -1 {
		return math.Inf(1)
	}
	return k * (1 - t) / (1 + t)
}

// at length x (m) the piece shows this conductivity to its medium.
func (c *piece) conductivity(x float64) float64 {
	n := int(math.Min(math.Max(c.drawn/x, 1), 2000))
	return shows(c.stack.Outer.V, c.stack.Port(n).T)
}
