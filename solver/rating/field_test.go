package rating_test

import (
	"testing"

	"github.com/google/go-cmp/cmp"

	"packrise/solver/rating"
)

// LayerK has what is in the document, from the inside outwards.
func TestLayerK(t *testing.T) {
	r := solve(t, parse(t, `packrise: 1
surroundings: {kind: fixed-film, ambient_c: 30, film_w_m2k: 10}
holder: {kind: jacket, inside_mm: 10, fill: soft, layers: [{material: hard, thickness_mm: 1}, {material: soft, thickness_mm: 1}]}
parts:
  - {id: L1, kind: core, conductor: {diameter_mm: 2, metal: copper}, layers: [], at_mm: [0, 0]}
loads:
  - {id: l, conductors: [L1], heat_w_m: 5}
materials:
  soft: {k_w_mk: 0.12}
  hard: {k_w_mk: 0.4}
`), rating.Options{})
	if d := cmp.Diff([]float64{0.12, 0.4, 0.12}, r.LayerK()); d != "" {
		t.Error(d)
	}
}
