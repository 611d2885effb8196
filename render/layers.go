package render

import (
	"fmt"
	"strconv"
	"strings"

	"packrise/solver/section"
)

// layerOf makes out which layer a reading of kind "layer" is of: "jacket", "conduit/2" … of the holder, "C1/jacket", "C1/jacket/2"
// … of a cable. It returns the shape that has the layer (nil if it is not there) and the layer's number from 0.
func layerOf(id string, shapes []section.Shape) (owner *section.Shape, index int) {
	rest := id
	for i := range shapes {
		s := &shapes[i]
		switch {
		case s.ID == "" && owner == nil:
			owner = s
		case isInside(id, s.ID) && (owner == nil || len(s.ID) > len(owner.ID)):
			owner, rest = s, id[len(s.ID)+1:]
		}
	}
	if _, n, ok := strings.Cut(rest, "/"); ok {
		if i, err := strconv.Atoi(n); err == nil && i > 0 {
			index = i - 1
		}
	}
	return owner, index
}

// ofHolder tells whether a reading is of the holder's wall or its outer surface.
func ofHolder(r section.Reading, shapes []section.Shape) bool {
	if r.Kind == "layer" {
		owner, _ := layerOf(r.ID, shapes)
		return owner == nil || owner.ID == ""
	}
	return r.Kind == "surface"
}

// layerRing returns the ring of a shape's layer; ok is false if it has none of that number. A rectangle's rings are all layers,
// a round shape's those that do not reach its centre.
func layerRing(s section.Shape, i int) (r section.Ring, ok bool) {
	rings := s.Rings
	if s.Width == 0 {
		rings = wall(s)
	}
	if i < 0 || i >= len(rings) {
		return r, false
	}
	return rings[i], true
}

// wall returns the rings of a round shape that enclose something: those that do not reach its centre.
func wall(s section.Shape) []section.Ring {
	if len(s.Rings) > 0 && s.Rings[0].R0 <= 0 {
		return s.Rings[1:]
	}
	return s.Rings
}

// readingName is what people call the thing that a reading is of: a part by its id, a layer by its owner.
func readingName(r section.Reading, s Scene) string {
	switch r.Kind {
	case "surface":
		return r.ID
	case "layer":
	default:
		return r.ID
	}
	owner, index := layerOf(r.ID, s.Shapes)
	name := "wall"
	switch {
	case owner == nil:
	case owner.ID != "":
		name = owner.ID + " jacket"
	case owner.Kind == section.Jacket || owner.Kind == section.Conduit || owner.Kind == section.Wireway:
		name = owner.Kind
	}
	layers := 0
	for _, q := range s.Readings {
		if o, _ := layerOf(q.ID, s.Shapes); q.Kind == "layer" && o == owner {
			layers++
		}
	}
	if layers > 1 {
		return fmt.Sprintf("%s %d", name, index+1)
	}
	return name
}
