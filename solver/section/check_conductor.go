package section

import (
	"math"
	"strings"
)

// given is a key of a conductor and whether it is written.
type given struct {
	key string
	ok  bool
}

// checkConductor keeps the keys of a conductor to those of its shape.
func checkConductor(r *report, c *Conductor, at path) {
	area := []given{{"size", c.Size != ""}, {"area_mm2", c.AreaMM2.OK}}
	bar := []given{{"width_mm", c.WidthMM.OK}, {"height_mm", c.HeightMM.OK}}
	sector := []given{{"angle_deg", c.AngleDeg.OK}, {"radius_mm", c.RadiusMM.OK}}
	diameter, corner := given{"diameter_mm", c.DiameterMM.OK}, given{"corner_mm", c.CornerMM.OK}
	switch c.Shape {
	case BarShape:
		checkShapeKeys(r, c.Shape, at, bar, append(sector, diameter), area)
		if most := math.Min(c.WidthMM.V, c.HeightMM.V) / 2; c.WidthMM.OK && c.HeightMM.OK && c.CornerMM.V > most {
			r.add(at.key("corner_mm"), "number-range", "¤ is "+shown(c.CornerMM.V)+", more than half of the bar's smaller side", "write at most "+shown(most))
		}
	case SectorShape:
		checkShapeKeys(r, c.Shape, at, sector, append(bar, diameter), area)
		checkSector(r, c, at)
	case "", RoundShape:
		checkShapeKeys(r, RoundShape, at, nil, append(append(bar, sector...), corner), nil)
		area = append(area, diameter)
		if n := written(area); len(n) == 0 {
			r.addWhole(at, "one-of", "¤ has none of size, area_mm2 and diameter_mm", "write one of them")
		} else if len(n) > 1 {
			r.addWhole(at, "one-of", "¤ has "+strings.Join(n, " and "), "keep one of them")
		}
	}
}

func written(keys []given) (names []string) {
	for _, g := range keys {
		if g.ok {
			names = append(names, g.key)
		}
	}
	return names
}

// checkKeys reports keys that a conductor of this shape needs or must not have, and several where one may be.
func checkShapeKeys(r *report, shape string, at path, needs, not, one []given) {
	for _, g := range needs {
		if !g.ok {
			r.add(at.key(g.key), "missing-key", "¤ is missing", "write it: a "+shape+" needs it")
		}
	}
	for _, g := range not {
		if g.ok {
			r.add(at.key(g.key), "key-of-kind", "¤ does not belong to a conductor of shape "+shape, "take it out, or write another shape")
		}
	}
	if n := written(one); len(n) > 1 {
		r.addWhole(at, "one-of", "¤ has "+strings.Join(n, " and "), "keep one of them")
	}
}

// checkSector looks at the sizes of a sector.
func checkSector(r *report, c *Conductor, at path) {
	if !c.AngleDeg.OK || !c.RadiusMM.OK {
		return
	}
	if c.AngleDeg.V > 180 {
		r.add(at.key("angle_deg"), "number-range", "¤ is "+shown(c.AngleDeg.V)+", more than half a turn", "write at most 180")
		return
	}
	sin := math.Sin(c.AngleDeg.V * math.Pi / 360)
	if most := c.RadiusMM.V * sin / (1 + sin); c.CornerMM.V > most*(1+1e-9) {
		r.add(at.key("corner_mm"), "number-range", "¤ is "+shown(c.CornerMM.V)+", more than fits into the sector", "write at most "+shown(math.Floor(most*1e4)/1e4))
	}
}
