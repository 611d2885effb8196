package catalog

import (
	"io/fs"
	"maps"
	"slices"
	"strings"
	"testing"
	"testing/fstest"

	"packrise/assets"
)

// files is a copy of the catalogue that may be spoilt.
func files(t testing.TB) fstest.MapFS {
	t.Helper()
	out := fstest.MapFS{}
	names, err := fs.Glob(assets.Catalog, "catalog/*.yaml")
	if err != nil || len(names) < 8 {
		t.Fatal(names, err)
	}
	for _, name := range names {
		text, err := fs.ReadFile(assets.Catalog, name)
		if err != nil {
			t.Fatal(err)
		}
		out[name] = &fstest.MapFile{Data: text}
	}
	return out
}

// Every row says where it is from: a standard with edition and clause, or that it is from memory.
func TestEveryRowHasItsSource(t *testing.T) {
	c := Load()
	for _, group := range Groups {
		ids := c.order(group)
		if len(ids) == 0 {
			t.Errorf("no rows of the group %s", group)
		}
		for _, id := range ids {
			text, _ := c.Row(group, id)
			if !strings.Contains(text, "standard: ") || !strings.Contains(text, "clause: ") && !strings.Contains(text, "from_memory: true") {
				t.Errorf("%s %s has no source:\n%s", group, id, text)
			}
		}
	}
	for typ, st := range c.thickness {
		if st.source.Text == "" {
			t.Errorf("thickness of %s has no source", typ)
		}
	}
}

// Lists hand out copies.
func TestListsAreCopies(t *testing.T) {
	c := Load()
	c.Materials()[0].ID = "spoilt"
	c.Wires()[0].ID = "spoilt"
	c.Sizes(true)[0] = "spoilt"
	if c.Materials()[0].ID == "spoilt" || c.Wires()[0].ID == "spoilt" || c.Sizes(true)[0] == "spoilt" {
		t.Error("a list can be written to")
	}
	if len(c.Materials()) < 35 || len(c.WireTypes()) < 30 || len(c.Wires()) < 140 || len(c.Holders()) < 90 {
		t.Errorf("%d materials, %d types, %d wires, %d holders", len(c.Materials()), len(c.WireTypes()), len(c.Wires()), len(c.Holders()))
	}
}

// A catalogue that can't be right is refused, with the file and what is wrong.
func TestReadRefuses(t *testing.T) {
	for i, k := range []struct{ file, old, bad, want string }{
		{"metals.yaml", "1.7241e-8", "1.7241e-5", "copper: rho20_ohm_m is 1.7241e-05"},
		{"metals.yaml", "3.93e-3", ".inf", "alpha20_1_k is +Inf"},
		{"metals.yaml", "{id: tinned-copper", "{id: copper", "copper stands twice"},
		{"metals.yaml", "group: metal", "group: metals", `group is "metals"; write metal`},
		{"metals.yaml", "rows:", "rows: 3\nx:", "unknown key"},
		{"metals.yaml", "group: metal", "- a", "metals.yaml"},
		{"metals.yaml", "{id: copper,", "{id: Copper,", `"Copper" is not an id`},
		{"materials.yaml", "limit_c: {v: 70, low: 60, high: 105}", "limit_c: {v: 70, low: 75, high: 105}", "pvc: limit_c has low 75, v 70, high 105, which are not in order"},
		{"materials.yaml", "rho_cp_mj_m3k: 1.7,", "rho_cp_mj_m3k: 1700,", "rho_cp_mj_m3k is 1700"},
		{"materials.yaml", "rho_cp_mj_m3k: 1.7,", "rho_cp: 1.7,", `unknown key "rho_cp", the nearest is rho_cp_mj_m3k`},
		{"materials.yaml", "k_w_mk: {v: 0.20, low: 0.141, high: 0.20}", "k_w_mk: 20", "pvc: k_w_mk is 20"},
		{"materials.yaml", "gas: true, ", "", "air: rho_cp_mj_m3k"},
		{"materials.yaml", "family: gas", "family: filler", "gas is true in the family filler"},
		{"materials.yaml", "family: wall", "family: walls", `family is "walls"; write insulation`},
		{"formula.yaml", "fill: 0.7778", "fill: 1.7", "stranded.fill is 1.7"},
		{"formula.yaml", "flexible:", "fine:", "classes lacks flexible"},
		{"formula.yaml", "factor: 1.062", "factor: 1.080", "coating is not in order"},
		{"wire-types.yaml", "insulation: pvc}", "insulation: pcv}", `insulation is "pcv"`},
		{"wire-types.yaml", "dry_c: 75, wet_c: 75", "dry_c: 75, wet_c: 90", "thw: wet_c is 90"},
		{"wire-types.yaml", "never_wet: true", "never_wet: true, wet_c: 60", "never_wet stands beside wet_c 60"},
		{"wire-types.yaml", "never_wet: true, ", "", "wet_c is 0"},
		{"wire-types.yaml", "sizes: AWG", "sizes: awg", `sizes is "awg"`},
		{"wire-types.yaml", "aliases: [ptfe]", "aliases: [thhn/thwn-2]", "are both called thhn/thwn-2"},
		{"conductors-iec.yaml", "copper: 7.41,", "copper: 0.741,", "2.5 mm2/copper/solid: r20_ohm_km is 0.741"},
		{"conductors-iec.yaml", "table: iec", "table: icc", `table is "icc"; write iec or awg`},
		{"conductors-iec.yaml", "size: 4 mm2", "size: 4 mm²", `write "4 mm2"`},
		{"conductors-iec.yaml", "size: 4 mm2", "size: 2.5 mm2", "stands twice"},
		{"conductors-awg.yaml", "thickest: 4/0", "thickest: 9/0", "size"},
		{"conductors-awg.yaml", "thinnest: 40", "thinnest: 44", "within 40 to 4/0"},
		{"conductors-awg.yaml", "diameter_in: 0.092", "diameter_in: 0.92", "mm² of metal in a circle of"},
		{"wires-thhn.yaml", "outside_in: 0.130", "outside_in: 0.0130", "thhn-12: outside_mm is 0.3302 but the conductor alone is 2.3368 mm thick"},
		{"wires-thhn.yaml", "types: [thhn, thwn-2]", "types: [thhn, thwn-3]", `types is "thwn-3"`},
		{"wires-thhn.yaml", "size: 12 AWG", "size: 11.5 AWG", "11.5"},
		{"wires-fixed.yaml", "size: 4 mm2", "size: 4.5 mm2", "no solid copper conductor of 4.5 mm2"},
		{"thickness.yaml", "8 AWG: 45", "8 AWG: 25", "thickness up to 8 AWG"},
		{"thickness.yaml", "types: [mtw]", "types: [tw]", "tw has its thickness twice"},
		{"thickness.yaml", "types: [mtw]", "types: [mtv]", `types is "mtv"`},
		{"thickness.yaml", "steps_mil: {10 AWG: 30, 2 AWG", "steps_mm: {10 AWG: 0.7}, steps_mil: {10 AWG: 30, 2 AWG", "write either steps_mm or steps_mil"},
		{"conduits.yaml", "outside_in: 1.163", "outside_in: 1.040", "emt-1: outside_mm is"},
		{"conduits.yaml", "inside_in: 1.049", "inside_in: 1.049, inside_mm: 26.6", "inside_mm and inside_in stand beside each other"},
		{"conduits.yaml", "kind: conduit", "kind: pipe", `kind is "pipe"; write conduit or wireway`},
		{"wireways.yaml", "width_in: 4,", "width_in: 4, inside_mm: 3,", "inside and outside of a wireway"},
		{"wireways.yaml", "wall_mm: 1.5", "wall_mm: 0", "wall_mm is 0"},
		{"conduits.yaml", "edition: \"2023\", ", "edition: \"\", from_memory: false, ", "already defined"},
		{"wires-thhn.yaml", "edition: \"2023\", ", "", "source needs edition and clause, or from_memory: true"},
		{"wires-thhn.yaml", "standard: NFPA 70", "standard: \"\"", "source.standard is missing"},
	} {
		if testing.Short() && i%8 != 0 {
			continue // reading the catalogue is slow under the race detector
		}
		bad := files(t)
		name := "catalog/" + k.file
		text := strings.Replace(string(bad[name].Data), k.old, k.bad, 1)
		if text == string(bad[name].Data) {
			t.Fatalf("%s doesn't hold %s", k.file, k.old)
		}
		bad[name] = &fstest.MapFile{Data: []byte(text)}
		_, err := read(bad, "catalog")
		if err == nil || !strings.Contains(err.Error(), k.want) || !strings.Contains(err.Error(), k.file) {
			t.Errorf("%s with %s: %v\nwant %s", k.file, k.bad, err, k.want)
		}
	}
}

// Folders inside the catalogue belong to others, and the order of the files doesn't matter.
func TestReadOrder(t *testing.T) {
	shuffled := fstest.MapFS{"catalog/rules/x.yaml": {Data: []byte("nothing: of ours")}}
	good := files(t)
	names := slices.Sorted(maps.Keys(good))
	slices.Reverse(names)
	for i, name := range names {
		shuffled["catalog/"+string(rune('a'+i))+".yaml"] = good[name]
	}
	c, err := read(shuffled, "catalog")
	if err != nil {
		t.Fatal(err)
	}
	for _, group := range Groups {
		a, b := slices.Sorted(slices.Values(c.order(group))), slices.Sorted(slices.Values(Load().order(group)))
		if !slices.Equal(a, b) {
			t.Errorf("the group %s depends on the order of the files", group)
		}
	}
}

func BenchmarkRead(b *testing.B) {
	for b.Loop() {
		if _, err := read(assets.Catalog, "catalog"); err != nil {
			b.Fatal(err)
		}
	}
}
