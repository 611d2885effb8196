package section

import (
	"strings"
	"testing"
)

const small = `packrise: 1
surroundings: {kind: fixed-wall, ambient_c: 30}
holder: {kind: jacket, inside_mm: 10}
parts:
  - {id: L1, kind: core, conductor: {size: 12 AWG}, at_mm: [0, 0]}
`

// Files in unusual dress: whatever way they are written in, an edit is written and the rest stays.
func TestOddFiles(t *testing.T) {
	bom := "\ufeff" + small
	for name, c := range map[string]struct {
		text, keeps string
		patched     bool
	}{
		"windows line ends": {strings.ReplaceAll(small, "\n", "\r\n"), "inside_mm: 10}\r\nparts:\r\n", true},
		"byte order mark":   {bom, "packrise: 1\nsurroundings: {kind", true},
		"no last line end":  {strings.TrimSuffix(small, "\n"), "packrise: 1", true},
		"document marks":    {"%YAML 1.1\n---\n# head\n" + small + "...\n", "# head\npackrise: 1", true},
		"json": {`{"packrise": 1, "surroundings": {"kind": "fixed-wall", "ambient_c": 30},
 "holder": {"kind": "jacket", "inside_mm": 10},
 "parts": [{"id": "L1", "kind": "core", "conductor": {"size": "12 AWG"}, "at_mm": [0, 0]}]}`, `"holder": {"kind": "jacket", "inside_mm": 10},`, true},
		"plain text over lines": {strings.Replace(small, "surroundings", "title: a long\n  title\nsurroundings", 1), "title: a long\n  title\n", true},
		"quoted over lines":     {strings.Replace(small, "surroundings", "notes: \"a long\n  # note\"\nsurroundings", 1), "notes: \"a long\n  # note\"\n", true},
		"folded":                {strings.Replace(small, "surroundings", "notes: >-\n   a\n   # b\n\n# remark\nsurroundings", 1), "notes: >-\n   a\n   # b\n\n# remark\n", true},
		"kept line ends":        {strings.Replace(small, "surroundings", "notes: |+\n   a\n\n\nsurroundings", 1), "notes: |+\n   a\n\n\n", true},
		"dash on its own line":  {strings.Replace(small, "- {id", "-\n    # one\n    {id", 1), "# one", true},
		"question mark key":     {strings.Replace(small, "holder: {", "? holder\n: {", 1), "ambient_c: 30}", false},
		"wide letters":          {strings.Replace(small, "{id: L1", "{type: 電線é, id: L1", 1), "{type: 電線é, id: L1, kind: core", true},
		"strange line ends":     {strings.Replace(small, "surroundings", "title: \"a\u2028b\"\nsurroundings", 1), "packrise: 1", true},
		"empty lists":           {small + "loads: []  # none yet\nbuilds: {}\nmaterials:\n", "loads:  # none yet\n  - {id: load-L1, conductors: [L1], current_a: 3.5}\nbuilds: {}\nmaterials:\n", true},
		"long way to write":     {strings.Replace(small, "[0, 0]", "\n      [\n        0.0, # x\n        0e0  # y\n      ]\n    ", 1), "# x\n", true},
		"deep indent":           {strings.Replace(small, "  - {id: L1", "        -     {id: L1", 1), "        -     {id: L1", true},
	} {
		t.Run(name, func(t *testing.T) {
			d, problems := Read([]byte(c.text))
			if len(problems) > 0 {
				t.Fatal(problems)
			}
			again, err := Write(d)
			if want := strings.TrimPrefix(c.text, "\ufeff"); err != nil || c.patched && string(again) != want {
				t.Fatalf("%v; unchanged it becomes\n%s", err, again)
			}
			d = SetCurrent(Move(Add(d, Part{ID: "N", Kind: Core, Stock: "x"}), "L1", Point{1.5, 2}), "L1", Some(3.5))
			got, err := Write(d)
			if err != nil {
				t.Fatal(err)
			}
			if is := string(d.origin.patch(current.tree(d), false)) == string(got); is != c.patched {
				t.Errorf("patched: %v, want %v:\n%s", is, c.patched, got)
			}
			if !strings.Contains(string(got), c.keeps) {
				t.Errorf("does not keep %q:\n%s", c.keeps, got)
			}
		})
	}
}

// A text that can be written in none of the kinder ways is written as a new file, and one that can't be written at all is an error.
func TestWriteFallsBack(t *testing.T) {
	d, _ := Read([]byte(small))
	broken := *d
	broken.origin = &origin{[]byte("nonsense: {"), d.origin.root}
	text, err := Write(&broken)
	if err != nil || !strings.HasPrefix(string(text), "packrise: 1\n") {
		t.Errorf("%v\n%s", err, text)
	}
	if _, err := Write(&Document{}); err == nil || !strings.Contains(err.Error(), "`surroundings.kind` is missing") {
		t.Errorf("an empty document is written: %v", err)
	}
	huge := d.With(func(d *Document) { d.Notes = strings.Repeat("x", MaxBytes) })
	if _, err := Write(huge); err == nil || !strings.Contains(err.Error(), "`notes` is a text of over 8 MB, and a whole file has at most 16") {
		t.Errorf("a huge text is written: %v", err)
	}
	huge = d.With(func(d *Document) {
		for range 3 {
			d.Materials = append(d.Materials, Material{Name: FreshID(d, "m"), KWMK: 1, Source: strings.Repeat("x", MaxBytes/2)})
			d.Materials[len(d.Materials)-1].Name += strings.Repeat("+", len(d.Materials))
		}
	})
	if testing.Short() {
		return
	}
	if _, err := Write(huge); err == nil || !strings.Contains(err.Error(), "it would be larger than 16 MB") {
		t.Errorf("a huge document is written: %v", err)
	}
}
