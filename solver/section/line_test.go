package section

import "testing"

// TestLocate: problems found after reading get the line of their key, or of their part.
func TestLocate(t *testing.T) {
	d, problems := Read([]byte(`packrise: 1
surroundings: {kind: fixed-film, ambient_c: 30, film_w_m2k: 9}
holder:
  kind: conduit
  inside_mm: 20
parts:
  - {id: L1, kind: core, stock: a, at_mm: [0, 0]}
  - id: C1
    kind: cable
    build: lead
    at_mm: [5, 0]
builds:
  lead:
    holder: {kind: jacket, inside_mm: 7}
    parts:
      - id: L1
        kind: core
        conductor: {size: 12 AWG}
        layers:
          - {material: pvc, thickness_mm: 1}
        at_mm: [0, 0]
`))
	if len(problems) > 0 {
		t.Fatal(problems)
	}
	for _, c := range []struct {
		id, key string
		line    int
	}{
		{"L1", "at_mm", 7},
		{"C1", "build", 10},
		{"C1/L1", "layers[0].material", 20},
		{"C1/L1", "at_mm", 21},
		{"", "holder.inside_mm", 5},
		{"C1", "builds.lead.holder.kind", 14},
		{"gone", "at_mm", 0},
	} {
		got := d.Locate([]Problem{{IDs: []string{c.id}, Key: c.key}})[0].Line
		if got != c.line {
			t.Errorf("%s %s: line %d, want %d", c.id, c.key, got, c.line)
		}
	}
}
