package heat

import "math"

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
		return face(g.facing()) > metalK
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

// metalGap is metalGap if any radius was reduced for it, in the region or in a cable, else 0.
func (s *state) metalGap() float64 {
	for i := range s.pieces {
		p := &s.pieces[i]
		if p.bare && p.piece.a < p.loose || p.inside != nil && p.inside.metalGap() > 0 {
			return metalGap
		}
	}
	return 0
}
