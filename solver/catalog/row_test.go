package catalog

import (
	"strings"
	"sync"
	"testing"
)

// lookUp returns a row's value as the rest of the program sees it.
func lookUp(c *Catalog, group, id string) (any, bool) {
	switch group {
	case "metal":
		return pack(c.metals.get(id))
	case "material":
		return pack(c.materials.get(id))
	case "type":
		return pack(c.types.get(id))
	case "conductor":
		return pack(c.conductors.get(id))
	case "wire":
		return pack(c.wires.get(id))
	}
	return pack(c.holders.get(id))
}

func pack[V any](v V, ok bool) (any, bool) { return v, ok }

// Every row, written and read back, is the same to the last bit, source included.
func TestEveryRowGoesRound(t *testing.T) {
	c := Load()
	rows := 0
	for _, group := range Groups {
		for _, id := range c.order(group) {
			text, ok := c.Row(group, id)
			if !ok {
				t.Fatalf("%s %s has no row", group, id)
			}
			cat, changed, err := c.With(group, id, text)
			if err != nil || changed {
				t.Fatalf("%s %s: changed %t, %v", group, id, changed, err)
			}
			was, _ := lookUp(c, group, id)
			is, _ := lookUp(cat, group, id)
			if was != is {
				t.Errorf("%s %s came back as\n%+v\nwas\n%+v", group, id, is, was)
			}
			if again, _ := cat.Row(group, id); again != text {
				t.Errorf("%s %s is written differently the second time", group, id)
			}
			rows++
		}
	}
	if rows < 900 {
		t.Errorf("only %d rows", rows)
	}
}

func TestWith(t *testing.T) {
	c := Load()
	row, _ := c.Row("material", "pvc")
	cat, changed, err := c.With("material", "pvc", strings.Replace(row, "v: 0.2,", "v: 0.18,", 1))
	if err != nil || !changed {
		t.Fatal(changed, err)
	}
	if m, _ := cat.Material("pvc"); m.K.V != 0.18 {
		t.Errorf("%+v", m)
	}
	if m, _ := c.Material("pvc"); m.K.V != 0.20 {
		t.Errorf("the catalogue itself was changed: %+v", m)
	}
	// another name or source is not another row
	row, _ = c.Row("holder", "emt-1")
	text := strings.NewReplacer("EMT 1", "inch EMT", "chapter 9 table 4", "table 4").Replace(row)
	if cat, changed, err = c.With("holder", "emt-1", text); err != nil || changed {
		t.Errorf("%t %v", changed, err)
	}
	if h, _ := cat.Holder("emt-1"); h.Name != "inch EMT" || !strings.Contains(h.Source.Text, "table 4") {
		t.Errorf("%+v", h)
	}
}

// A row that this catalogue doesn't have, as in a design from a newer program: type, conductor and wire, in the order of Groups.
func TestWithNewRows(t *testing.T) {
	c := Load()
	const source = "source: {standard: data sheet 7, from_memory: true}\n"
	rows := []struct{ group, id, text string }{
		{"type", "new-type", "id: new-type\nname: NEW\ndry_c: 110\nwet_c: 80\ninsulation: xlpe\nsizes: mm2\nclass: flexible\nmetal: copper\n" + source},
		{"conductor", "3 mm2/copper/flexible", "id: 3 mm2/copper/flexible\nsize: 3 mm2\nmetal: copper\nclass: flexible\narea_mm2: 3\ndiameter_mm: 2.3\nr20_ohm_km: 6.5\n" + source},
		{"wire", "new-type-3", "id: new-type-3\nname: NEW 3\nsize: 3 mm2\nmetal: copper\nclass: flexible\noutside_mm: 3.9\ntype: new-type\ninsulation: xlpe\n" + source},
	}
	if _, _, err := c.With("wire", rows[2].id, rows[2].text); err == nil || !strings.Contains(err.Error(), `type is "new-type", which the catalogue doesn't have`) {
		t.Error(err)
	}
	cat := c
	for _, r := range rows {
		next, changed, err := cat.With(r.group, r.id, r.text)
		if err != nil || !changed {
			t.Fatalf("%s: %t, %v", r.id, changed, err)
		}
		cat = next
	}
	if p, err := cat.Parse("3 new-type"); err != nil || p.Wire != "new-type-3" {
		t.Errorf("%+v, %v", p, err)
	}
	if !strings.Contains(strings.Join(cat.Sizes(false), " "), " 3 mm2 ") || strings.Contains(strings.Join(c.Sizes(false), " "), " 3 mm2 ") {
		t.Error("the sizes are wrong")
	}
	if _, err := c.Conductor("3 mm2", "copper", Flexible); err == nil {
		t.Error("the catalogue itself was changed")
	}
}

func TestWithRefuses(t *testing.T) {
	c := Load()
	row, _ := c.Row("wire", "thhn-12")
	for _, k := range []struct{ group, id, text, want string }{
		{"cable", "x", row, `"cable" is not a group of the catalogue; write metal, material, type, conductor, wire or holder`},
		{"wire", "thhn-12", "", "thhn-12 is empty"},
		{"wire", "thhn-12", "a: [", "is not YAML"},
		{"wire", "thhn-12", "[1, 2]", "a mapping of key: value is needed"},
		{"wire", "thhn-12", "just words", "a mapping"},
		{"wire", "thhn-12", "&a [*a]", "a mapping"},
		{"wire", "thhn-14", row, `the row in its place calls itself "thhn-12"`},
		{"wire", "thhn-12", strings.Replace(row, "outside_mm", "outsid_mm", 1), `unknown key "outsid_mm", the nearest is outside_mm`},
		{"wire", "thhn-12", strings.Replace(row, "3.302", "thick", 1), "line"},
		{"wire", "thhn-12", strings.Replace(row, "3.302", "2.2", 1), "outside_mm is 2.2 but the conductor alone is 2.3368 mm thick"},
		{"wire", "thhn-12", strings.Replace(row, "3.302", ".nan", 1), "outside_mm is NaN"},
		{"wire", "thhn-12", strings.Replace(row, "3.302", "-3.302", 1), "outside_mm is -3.302"},
		{"wire", "thhn-12", strings.Replace(row, "insulation: pvc", "insulation: pcv", 1), `insulation is "pcv", which the catalogue doesn't have; write pvc`},
		{"wire", "thhn-12", strings.Replace(row, "size: 12 AWG", "size: 12awg", 1), `size is "12awg"; write "12 AWG"`},
		{"wire", "thhn-12", row + "outside_mm: 4\n", "already defined"},
		{"material", "new", "id: new\nname: new\nfamily: filler\nk_w_mk: {v: 1, low: 2, high: 3}\nrho_cp_mj_m3k: 2\nemissivity: 0.9\nabsorptivity: 0.9\nsource: {standard: x, from_memory: true}", "not in order"},
		{"material", "new", "id: new\nname: new\nfamily: filler\nk_w_mk: {v: 1, low: 1}\n", "a range needs v, low and high"},
		{"material", "new", "id: new\nname: new\nfamily: filler\nk_w_mk: much\n", "not a number"},
		{"metal", "new", "id: new\n", "name is missing"},
	} {
		cat, changed, err := c.With(k.group, k.id, k.text)
		if err == nil || !strings.Contains(err.Error(), k.want) || changed || cat != c || strings.Contains(err.Error(), "\n") {
			t.Errorf("%s %s: %v\nwant %s", k.group, k.id, err, k.want)
		}
	}
	if text, ok := c.Row("wire", "no-such"); ok || text != "" {
		t.Error(text)
	}
	if text, ok := c.Row("no-such", "thhn-12"); ok || text != "" {
		t.Error(text)
	}
}

// One catalogue serves many at once, also while rows are laid over it.
func TestCatalogIsSharedSafely(t *testing.T) {
	c := Load()
	row, _ := c.Row("conductor", "12 AWG/copper/stranded")
	var all sync.WaitGroup
	for range 4 {
		all.Go(func() {
			for range 20 {
				if _, _, err := c.With("conductor", "12 AWG/copper/stranded", row); err != nil {
					t.Error(err)
				}
				if _, err := c.Parse("3x 12 thhn"); err != nil {
					t.Error(err)
				}
				c.Sizes(true)
				c.Holders()
			}
		})
	}
	all.Wait()
}

func FuzzWith(f *testing.F) {
	c := Load()
	for _, group := range Groups {
		text, _ := c.Row(group, c.order(group)[0])
		f.Add(group, c.order(group)[0], text)
	}
	f.Fuzz(func(t *testing.T, group, id, text string) {
		cat, changed, err := c.With(group, id, text)
		if err != nil && (cat != c || changed) {
			t.Fatal(changed, err)
		}
		if err == nil {
			if _, ok := cat.Row(group, id); !ok {
				t.Fatal("the row is not there")
			}
		}
	})
}

func BenchmarkWith(b *testing.B) {
	c := Load()
	row, _ := c.Row("conductor", "12 AWG/copper/stranded")
	for b.Loop() {
		if _, _, err := c.With("conductor", "12 AWG/copper/stranded", row); err != nil {
			b.Fatal(err)
		}
	}
}
