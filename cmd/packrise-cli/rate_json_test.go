package main

import (
	"bytes"
	"encoding/json"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// wire is one insulated wire with what may go wrong left open.
func wire(surroundings, limit, load string) string {
	return `packrise: 1
surroundings: ` + surroundings + `
holder: {kind: none}
parts: [{id: W, kind: core, conductor: {size: 2.5 mm2, class: flexible}, layers: [{material: ins, thickness_mm: 0.8}], at_mm: [0, 0]` + limit + `}]
materials: {ins: {k_w_mk: 0.2}}
loads: [{id: a, conductors: [W], ` + load + `}]
`
}

// TestRateJSONIsFinite: whatever becomes of a section, the JSON of rate is one valid line without NaN or infinities: null stands for what is not known.
func TestRateJSONIsFinite(t *testing.T) {
	const room = "{kind: still-air, ambient_c: 30}"
	for name, text := range map[string]string{
		"plain":               wire(room, ", limit_c: 70", "current_a: 10"),
		"nothing on":          wire(room, ", limit_c: 70", "current_a: 0"),
		"runaway":             wire(room, ", limit_c: 70", "current_a: 900"),
		"never reached":       wire(room, ", limit_c: 5000", "current_a: 10"),
		"no limit":            wire(room, "", "current_a: 10"),
		"limit under ambient": wire(room, ", limit_c: 20", "current_a: 10"),
		"fixed heat":          wire(room, ", limit_c: 70", "heat_w_m: 5"),
		"unknown":             wire(room, ", limit_c: 70", "current_a: unknown"),
		"vacuum":              wire("{kind: vacuum, ambient_c: 30}", ", limit_c: 70", "current_a: 10"),
		"tripping":            wire(room, ", limit_c: 70", "current_a: 10, protection: {kind: breaker, rating_a: 700}"),
	} {
		file := filepath.Join(t.TempDir(), "section.yaml")
		if err := os.WriteFile(file, []byte(text), 0o600); err != nil {
			t.Fatal(err)
		}
		var out, errs bytes.Buffer
		status := run([]string{"rate", "--json", "--assume-idle", file}, &out, &errs)
		var got map[string]any
		if err := json.Unmarshal(out.Bytes(), &got); err != nil {
			t.Errorf("%s: status %d, %v\n%s%s", name, status, err, out.String(), errs.String())
			continue
		}
		for _, bad := range []string{"NaN", "Inf"} {
			if strings.Contains(out.String(), bad) {
				t.Errorf("%s: %s in %s", name, bad, out.String())
			}
		}
	}
}
