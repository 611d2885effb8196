package ui

import "packrise/solver/section"

// writtenShapes are the shapes with the parts of the top level where the document has them: parts of a bundle are drawn apart by their clearance, but
// touch as they are written, and what is held against them has to touch them there.
func (k *Desk) writtenShapes() []section.Shape {
	shapes, _ := k.Shapes()
	places := map[string]section.Point{}
	d := k.Document()
	for i := range d.Parts {
		if p := &d.Parts[i]; p.At.OK {
			places[p.ID] = p.At.V
		}
	}
	out := append([]section.Shape(nil), shapes...)
	for i := range out {
		if s := &out[i]; s.ID != "" && s.Depth == 0 && !s.Unset {
			if at, ok := places[s.ID]; ok {
				s.At = at
			}
		}
	}
	return out
}
