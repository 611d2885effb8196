package render

import (
	"math"
	"reflect"
	"sync"

	"packrise/solver/section"
)

// coldestCache keeps the lowest temperature of the outer surface of the last field, which every picture of it asks for.
type coldestCache struct {
	mu    sync.Mutex
	field Field
	low   float64
}

var lastColdest coldestCache

func (c *coldestCache) of(s Scene) float64 {
	if s.Field == nil || !reflect.ValueOf(s.Field).Comparable() {
		return coldestOutside(s)
	}
	c.mu.Lock()
	defer c.mu.Unlock()
	if c.field != s.Field {
		c.field, c.low = s.Field, coldestOutside(s)
	}
	return c.low
}

// coldestOutside is the lowest temperature of the outer surface, which is below ambient where a side is held so: nothing inside makes
// cold. It is infinite where there is no field.
func coldestOutside(s Scene) float64 {
	low := math.Inf(1)
	if s.Field == nil {
		return low
	}
	for _, p := range piecesOf(surfaceLoop(s)) {
		back := 1e-6 * between(p.a, p.b)
		if t := fieldAt(s.Field, section.Point{X: (p.a.X+p.b.X)/2 - back*p.normal.X, Y: (p.a.Y+p.b.Y)/2 - back*p.normal.Y}); finite(t) {
			low = min(low, t)
		}
	}
	return low
}

// surfaceLoop is the outer surface as a polygon of short sides, counterclockwise; none where bodies stand apart.
func surfaceLoop(s Scene) []section.Point {
	switch o := outlineOf(s.Shapes); {
	case o.rect != nil:
		return cut(boxLoop(*o.rect))
	case o.poly != nil:
		return cut(o.poly)
	case o.round != nil:
		return roundLoop(section.Point{X: o.round.x, Y: o.round.y}, o.round.r)
	}
	return nil
}
