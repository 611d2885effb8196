package render

import (
	"reflect"
	"sync"

	"packrise/solver/section"
)

// contourKey tells sets of lines apart.
type contourKey struct {
	field  Field
	view   View
	step   float64
	frame  box
	values string
}

// contourCache keeps the lines of the last picture. They are never written to.
type contourCache struct {
	mu    sync.Mutex
	key   contourKey
	lines [][][]section.Point
}

var lastContours contourCache

// find returns the lines if they were those of the last picture.
func (c *contourCache) find(key contourKey) ([][][]section.Point, bool) {
	if !reflect.ValueOf(key.field).Comparable() {
		return nil, false
	}
	c.mu.Lock()
	defer c.mu.Unlock()
	return c.lines, c.lines != nil && c.key == key
}

func (c *contourCache) keep(key contourKey, lines [][][]section.Point) {
	if !reflect.ValueOf(key.field).Comparable() {
		return
	}
	c.mu.Lock()
	defer c.mu.Unlock()
	c.key, c.lines = key, lines
}
