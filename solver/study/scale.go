package study

import (
	"slices"

	"packrise/solver/section"
)

// scaleAll multiplies every current of a design. Fixed heats stay.
func scaleAll(d *section.Document, factor float64) *section.Document {
	return section.ScaleLoads(d, factor)
}

// scaleLoads multiplies the currents of the loads named, all of them for nil.
func scaleLoads(d *section.Document, factor float64, ids []string) *section.Document {
	if ids == nil {
		return scaleAll(d, factor)
	}
	return d.With(func(d *section.Document) {
		d.Loads = slices.Clone(d.Loads)
		for i := range d.Loads {
			if l := &d.Loads[i]; l.CurrentA.OK && slices.Contains(ids, l.ID) {
				l.CurrentA.V *= factor
			}
		}
	})
}
