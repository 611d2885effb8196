package render

import (
	"math"
	"reflect"
	"sync"

	"packrise/solver/section"
)

// flow is the heat-flow lines of a field: each carries the same heat from the metal that makes it to the outer surface.
type flow struct {
	each  float64 // W/m
	lines []flowLine
}

// Lines in a picture: about so many for each heated conductor, within a least and a most in all.
const (
	flowPerPart = 16
	flowLeast   = 32
	flowMost    = 110

	flowEdgeParts = 3 // as so many conductors an outline counts through which heat comes in
)

// flowOf finds the lines of a scene. What comes in from outside begins lines, and a metal sends out one for each round amount of its
// own heat and one for each that reaches it from hotter ones, so that as many leave the section as there is heat.
func flowOf(s Scene) *flow {
	metals := metalsOf(s)
	total, heated := 0.0, 0
	for _, m := range metals {
		if m.heat > 0 {
			total, heated = total+m.heat, heated+1
		}
	}
	f := &flow{}
	g, ok := newFlowGrid(s.Field, metals, wallMetal(s))
	if !ok {
		return f
	}
	edge := edgeOf(s, g.h)
	if edge.heat > 0 {
		heated += flowEdgeParts
	}
	if total += edge.heat; !(total > 1e-6) || !finite(total) {
		return f
	}
	f.each = roundStep(total / float64(min(flowMost, max(flowLeast, flowPerPart*heated))))
	arrived := make([]int, len(metals))
	guard := newFlowGuard(4 * g.h)
	send := func(from int, at, out []section.Point) {
		for k := range at {
			if l, ok := g.follow(guard, metals, from, at[k], out[k]); ok {
				if l.to >= 0 {
					arrived[l.to]++
				}
				guard.add(l)
			}
		}
	}
	at, out := seedsOn(edge.pieces, int(math.Round(edge.heat/f.each)))
	send(-1, at, out)
	for i, m := range metals {
		at, out := seedsOn(m.pieces(s.Field, g.h), int(math.Round(m.heat/f.each))+arrived[i])
		send(i, at, out)
	}
	f.lines = guard.lines
	return f
}

// flowCache keeps the lines of the last field. They do not depend on the view and are never written to.
type flowCache struct {
	mu    sync.Mutex
	field Field
	flow  *flow
}

var lastFlow flowCache

func (c *flowCache) of(s Scene) *flow {
	if !reflect.ValueOf(s.Field).Comparable() {
		return flowOf(s)
	}
	c.mu.Lock()
	defer c.mu.Unlock()
	if c.flow == nil || c.field != s.Field {
		c.flow, c.field = flowOf(s), s.Field
	}
	return c.flow
}
