package section

import (
	"os"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
	"github.com/google/go-cmp/cmp/cmpopts"
)

func commented(t testing.TB) (*Document, string) {
	t.Helper()
	text, err := os.ReadFile("testdata/commented.yaml")
	if err != nil {
		t.Fatal(err)
	}
	d, problems := Read(text)
	if len(problems) > 0 {
		t.Fatal(problems)
	}
	return d, string(text)
}

func diff(a, b *Document) string {
	return cmp.Diff(normal(a), normal(b), cmpopts.IgnoreUnexported(Document{}), cmpopts.EquateEmpty())
}

// patched writes d, and fails the test if that was not done by patching the file that it came from.
func patched(t fataler, d *Document) string {
	text := d.origin.patch(current.tree(d), false)
	if text == nil {
		t.Fatal("the origin can't be patched")
	}
	written, err := Write(d)
	if err != nil {
		t.Fatal(err)
	}
	if string(written) != string(text) {
		t.Fatalf("the patched text does not read back:\n%s", text)
	}
	return string(written)
}

// Lines that differ, "- " before the old and "+ " before the new ones.
func changedLines(old, new string) string {
	a, b := strings.Split(old, "\n"), strings.Split(new, "\n")
	lcs := make([][]int, len(a)+1)
	for i := range lcs {
		lcs[i] = make([]int, len(b)+1)
	}
	for i := len(a) - 1; i >= 0; i-- {
		for j := len(b) - 1; j >= 0; j-- {
			if a[i] == b[j] {
				lcs[i][j] = lcs[i+1][j+1] + 1
			} else {
				lcs[i][j] = max(lcs[i+1][j], lcs[i][j+1])
			}
		}
	}
	var out []string
	i, j := 0, 0
	for i < len(a) || j < len(b) {
		switch {
		case i < len(a) && j < len(b) && a[i] == b[j]:
			i, j = i+1, j+1
		case i < len(a) && (j == len(b) || lcs[i+1][j] >= lcs[i][j+1]):
			out = append(out, "- "+a[i])
			i++
		default:
			out = append(out, "+ "+b[j])
			j++
		}
	}
	return strings.Join(out, "\n")
}

func TestUnchangedFileStays(t *testing.T) {
	d, text := commented(t)
	if got := patched(t, d); got != text {
		t.Errorf("changed:\n%s", changedLines(text, got))
	}
	for _, file := range feFiles(t) {
		d, _, err := Open(file)
		if err != nil || d == nil {
			continue
		}
		data, _ := os.ReadFile(file)
		if got := patched(t, d); got != string(data) {
			t.Errorf("%s changed:\n%s", file, changedLines(string(data), got))
		}
	}
}

func TestOnlyWhatChangedIsRewritten(t *testing.T) {
	core := Part{ID: "N1", Kind: Core, Conductor: &Conductor{Size: "10 AWG"}, At: Some(Point{1, 2.5})}
	for name, c := range map[string]struct {
		edit func(*Document) *Document
		want string
	}{
		"move": {func(d *Document) *Document { return Move(d, "L1", Point{3.25, -4.2}) }, `
-   - {id: L1, kind: core, conductor: {size: 12 AWG, metal: copper}, layers: [{material: pvc, thickness_mm: 0.48}], at_mm: [3.0, -4.2]}   # brown
+   - {id: L1, kind: core, conductor: {size: 12 AWG, metal: copper}, layers: [{material: pvc, thickness_mm: 0.48}], at_mm: [3.25, -4.2]}   # brown`},
		"move within a block": {func(d *Document) *Document { return Move(d, "H1", Point{-4, 0.5}) }, `
-       - -4.1     # x
-       - 0
+       - -4     # x
+       - 0.5`},
		"move over lines": {func(d *Document) *Document { return Move(d, "L2", Point{0, 5}) }, `
-       at_mm: [ 0,   4.0 ] }
+       at_mm: [ 0,   5 ] }`},
		"move nested": {func(d *Document) *Document { return Move(d, "C1/b", Point{0.75, 0}) }, `
-       - {id: b, kind: core, conductor: {size: 0.5 mm2}, at_mm: [0.7, 0]}  # green
+       - {id: b, kind: core, conductor: {size: 0.5 mm2}, at_mm: [0.75, 0]}  # green`},
		"place": {func(d *Document) *Document { return Move(d, "H2", Point{1, 1}) }, `
+     at_mm: [1, 1]`},
		"limit in flow": {func(d *Document) *Document { return SetLimit(d, "C1", Some(70.0)) }, `
-   - {id: C1, kind: cable, build: pair, at_mm: [4, 3.5], turn_deg: 30}
+   - {id: C1, kind: cable, build: pair, at_mm: [4, 3.5], turn_deg: 30, limit_c: 70}`},
		"current": {func(d *Document) *Document { return SetCurrent(d, "H1", Some(6.5)) }, `
-   current_a: unknown    # to be measured
+   current_a: 6.5    # to be measured`},
		"current to heat": {func(d *Document) *Document { return SetHeat(d, "L1", 3) }, `
- - {id: pump, conductors: [L1, L2], current_a: 16, frequency_hz: 50}   # name plate
+ - {id: pump, conductors: [L1, L2], heat_w_m: 3}   # name plate`},
		"ambient": {func(d *Document) *Document {
			return d.With(func(d *Document) { d.Surroundings.AmbientC = Some(35.0) })
		}, `
-   ambient_c: 30.0                   # far away
+   ambient_c: 35                   # far away`},
		"fixed wall": {func(d *Document) *Document {
			return SetSurroundings(d, Surroundings{Kind: FixedWall, AmbientC: Some(30.0)})
		}, `
-   kind: fixed-film
+   kind: fixed-wall
-   film_w_m2k: 9                     # constant,
-                                     # radiation included`},
		"delete": {func(d *Document) *Document { return Delete(d, "L1") }, `
-   # the pump
-   - {id: L1, kind: core, conductor: {size: 12 AWG, metal: copper}, layers: [{material: pvc, thickness_mm: 0.48}], at_mm: [3.0, -4.2]}   # brown
- - {id: pump, conductors: [L1, L2], current_a: 16, frequency_hz: 50}   # name plate
+ - {id: pump, conductors: [L2], current_a: 16, frequency_hz: 50}   # name plate`},
		"delete the last": {func(d *Document) *Document { return Delete(d, "C1") }, `
-   - {id: C1, kind: cable, build: pair, at_mm: [4, 3.5], turn_deg: 30}
- - {id: sensor, conductors: [C1/a], heat_w_m: 0.1}`},
		"add": {func(d *Document) *Document { return Add(d, core) }, `
+   - {id: N1, kind: core, conductor: {size: 10 AWG}, at_mm: [1, 2.5]}`},
		"rename": {func(d *Document) *Document { return RenamePart(d, "H1", "Heat") }, `
-   - id: H1
+   - id: Heat
-   - H1      # element 1
+   - Heat      # element 1`},
		"rename a cable": {func(d *Document) *Document { return RenamePart(d, "C1", "S") }, `
-   - {id: C1, kind: cable, build: pair, at_mm: [4, 3.5], turn_deg: 30}
+   - {id: S, kind: cable, build: pair, at_mm: [4, 3.5], turn_deg: 30}
- - {id: sensor, conductors: [C1/a], heat_w_m: 0.1}
+ - {id: sensor, conductors: [S/a], heat_w_m: 0.1}`},
		"rename a material": {func(d *Document) *Document {
			return d.With(func(d *Document) {
				d.Materials = append([]Material{}, d.Materials...)
				d.Materials[0].Name = "wool"
				d.Holder.Layers = append([]Layer{}, d.Holder.Layers...)
				d.Holder.Layers[0].Material = "wool"
			})
		}, `
-     - {material: fleece, thickness_mm: .1}   # wrapping
+     - {material: wool, thickness_mm: .1}   # wrapping
-   fleece: {k_w_mk: 0.06, gas: false, source: "guessed, 2020"}  # wrapping
+   wool: {k_w_mk: 0.06, gas: false, source: "guessed, 2020"}  # wrapping`},
		"drop a layer": {func(d *Document) *Document {
			return d.With(func(d *Document) { d.Holder.Layers = d.Holder.Layers[1:] })
		}, `
-     - {material: fleece, thickness_mm: .1}   # wrapping`},
		"thicken a layer": {func(d *Document) *Document {
			return d.With(func(d *Document) { d.Holder.Layers = []Layer{d.Holder.Layers[0], {Material: "pur", ThicknessMM: 1.5}} })
		}, `
-       thickness_mm: 1.40
+       thickness_mm: 1.5`},
		"title": {func(d *Document) *Document { return d.With(func(d *Document) { d.Title = "Gantry's lead" }) }, `
- title: 'Gantry lead, 6 cores'
+ title: 'Gantry''s lead'`},
		"notes": {func(d *Document) *Document { return d.With(func(d *Document) { d.Notes = "one: line" }) }, `
- notes: |
-   Which core governs when the pump and the heater run together?
- 
-   # this line is text, not a comment
+ notes: 'one: line'`},
		"sides come": {func(d *Document) *Document {
			return SetHolder(d, Holder{Kind: Wireway, WidthMM: Some(30.0), HeightMM: Some(20.0), Layers: d.Holder.Layers, Fill: "air", Sides: Sides{Top: Side{Kind: SideFixed, FixedC: 40}}})
		}, `
-   kind: jacket                      # round
+   kind: wireway                      # round
+   width_mm: 30
+   height_mm: 20
+   sides: {top: {fixed_c: 40}}
-   inside_mm: 1.84e1`},
		"no loads": {func(d *Document) *Document { return d.With(func(d *Document) { d.Loads = nil }) }, `
- loads:
- - {id: pump, conductors: [L1, L2], current_a: 16, frequency_hz: 50}   # name plate
- - id: heater
-   conductors:
-   - H1      # element 1
-   - H2
-   current_a: unknown    # to be measured
- - {id: sensor, conductors: [C1/a], heat_w_m: 0.1}
- `},
		"stock": {func(d *Document) *Document {
			return d.With(func(d *Document) { d.StockUsed = []StockRow{{"material", "pur", "{k_w_mk: 0.2, source: x}"}} })
		}, `
+ 
+ stock_used:
+   material:
+     pur: {k_w_mk: 0.2, source: x}`},
	} {
		t.Run(name, func(t *testing.T) {
			d, text := commented(t)
			d = c.edit(d)
			got := patched(t, d)
			if s := changedLines(text, got); s != strings.TrimPrefix(c.want, "\n") {
				t.Errorf("changed:\n%s", s)
			}
			again, problems := Read([]byte(got))
			if len(problems) > 0 || diff(d, again) != "" {
				t.Errorf("reads back differently: %v\n%s", problems, diff(d, again))
			}
		})
	}
}
