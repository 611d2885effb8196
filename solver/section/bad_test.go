package section

import (
	"fmt"
	"strings"
	"testing"
)

// Three good lines: what follows them begins on line 4.
const head = "packrise: 1\nsurroundings: {kind: fixed-wall, ambient_c: 30}\nholder: {kind: jacket, inside_mm: 10}\n"

// bad is a text with all the problems that it has, in the order of the file.
type bad struct {
	name, text string
	want       []wanted
}

type wanted struct {
	line      int
	rule      string
	fragments string // parts of the sentence, between |
}

func core(id, more string) string {
	return "  - {id: " + id + ", kind: core, conductor: {size: 12 AWG}" + more + "}\n"
}

func wholeFiles() []bad {
	return []bad{
		{"empty", "", []wanted{{1, "empty-file", "empty|packrise: 1"}}},
		{"blank", "  \n\n", []wanted{{1, "empty-file", "empty"}}},
		{"comments alone", "# hello\n", []wanted{{1, "empty-file", "only comments"}}},
		{"null", "~\n", []wanted{{1, "wrong-type", "holds nothing and is no design|packrise: 1"}}},
		{"a list", "- 1\n", []wanted{{1, "wrong-type", "holds a list and is no design"}}},
		{"prose", "Dear reader\n", []wanted{{1, "wrong-type", "the single value Dear reader"}}},
		{"binary", "packrise: 1\n\x00\x01", []wanted{{2, "not-text", "binary"}}},
		{"latin 1", "packrise: 1\ntitle: caf\xe9\n", []wanted{{2, "not-text", "not UTF-8|save it as UTF-8"}}},
		{"utf-16", "\xff\xfep\x00a\x00", []wanted{{1, "not-text", "UTF-16"}}},
		{"other yaml", "name: x\nversion: 2\n", []wanted{{1, "missing-key", "`packrise` is missing|no design"}}},
		{"two documents", small + "---\n" + small, []wanted{{6, "many-documents", "second YAML document"}}},
		{"newer version", "packrise: 2\nwhatever: x\n", []wanted{{1, "newer-version", "format version 2|up to 1|newer Packrise"}}},
		{"version 0", "packrise: 0\n", []wanted{{1, "version", "`packrise` is 0|write `packrise: 1`"}}},
		{"version 1.5", "packrise: 1.5\n", []wanted{{1, "version", "1.5"}}},
		{"version text", "packrise: one\n", []wanted{{1, "wrong-type", "holds one where a number belongs"}}},
		{"version huge", "packrise: 1e300\n", []wanted{{1, "version", "1e+300"}}},
		{"cut off in a bracket", head + "parts:\n  - {id: L1, kind: co", []wanted{{5, "not-yaml", "no YAML|may be cut off"}}},
		{"cut off in a quote", head + "title: \"abc\nparts:\n", []wanted{{4, "not-yaml", "no YAML|may be cut off"}}},
		{"tab", head + "parts:\n\t- {id: L1}\n", []wanted{{5, "not-yaml", "indented with a tab|spaces"}}},
		{"wrong indent", head + "parts:\n  - id: L1\n   kind: core\nloads: []\ntitle: x\n", []wanted{{6, "not-yaml", "no YAML|wrong indent"}}},
		{"colon in text", head + "title: a: b\nnotes: x\nparts: []\nloads: []\n", []wanted{{4, "not-yaml", "no YAML"}}},
		{"anchor", head + "title: &t x\n", []wanted{{4, "alias", "anchor"}}},
		{"alias bomb", head + "a: &a [x,x]\nb: &b [*a,*a]\n", []wanted{{4, "alias", "anchor (&)"}}},
		{"merge key", head + "<<: {title: x}\n", []wanted{{4, "unknown-key", "`<<`"}}},
		{"tag", head + "title: !!binary aGk=\n", []wanted{{4, "tag", "!!binary"}}},
		{"nothing else", "packrise: 1\n", []wanted{{1, "missing-key", "`surroundings` is missing"}, {1, "missing-key", "`holder` is missing"}}},
		{"5000 parts", head + "parts:\n" + strings.Repeat(core("x", ""), 5000), []wanted{{4, "too-many-parts", "5000 parts|at most 500"}}},
		{"a part that is none", head + "parts: [3]\n", []wanted{{4, "wrong-type", "part number 1|the single value 3|a part is a mapping"}}},
	}
}

func badKeys() []bad {
	return []bad{
		{"misspelt top key", head + "titel: x\n", []wanted{{4, "unknown-key", "unknown key `titel`|did you mean `title`?"}}},
		{"unknown key", head + "colour: red\n", []wanted{{4, "unknown-key", "unknown key `colour`|take it out; the keys here are packrise, title,"}}},
		{"misspelt required key", strings.Replace(head, "ambient_c", "ambiente_c", 1), []wanted{{2, "unknown-key", "`surroundings.ambiente_c`|did you mean `ambient_c`?"}}},
		{
			"misspelt key of a layer", head + "parts:\n" + core("L1", ", layers: [{material: pvc, thicknes_mm: 0.5}]"),
			[]wanted{{5, "unknown-key", "part L1|`layers[0].thicknes_mm`|`thickness_mm`"}},
		},
		{"duplicate key", head + "title: a\nnotes: b\ntitle: c\n", []wanted{{6, "duplicate-key", "`title` stands twice, first on line 4"}}},
		{"duplicate version", head + "packrise: 1\n", []wanted{{4, "duplicate-key", "first on line 1"}}},
		{"duplicate material", head + "materials:\n  a: {k_w_mk: 1}\n  a: {k_w_mk: 2}\n", []wanted{{6, "duplicate-key", "material a|line 5"}}},
		{"key that is a list", head + "[a, b]: x\n", []wanted{{4, "wrong-type", "a key is not a word"}}},
		{"later: prices", head + "prices: {}\n", []wanted{{4, "later-key", "drawings and prices"}}},
		{"later: route", head + "route: []\n", []wanted{{4, "later-key", "time, length and electricity"}}},
		{"sector", head + "parts:\n  - {id: S, kind: core, conductor: {shape: sector, size: 4/0, angle_deg: 90}}\n", []wanted{{5, "missing-key", "part S|`conductor.radius_mm`|a sector needs it"}}},
		{"wide sector", head + "parts:\n  - {id: S, kind: core, conductor: {shape: sector, radius_mm: 6, angle_deg: 190}}\n", []wanted{{5, "number-range", "`conductor.angle_deg` is 190"}}},
		{"blunt sector", head + "parts:\n  - {id: S, kind: core, conductor: {shape: sector, radius_mm: 6, angle_deg: 60, corner_mm: 2.1}}\n", []wanted{{5, "number-range", "`conductor.corner_mm` is 2.1|at most 1.9999"}}},
		{"blunt bar", head + "parts:\n  - {id: S, kind: core, conductor: {shape: bar, width_mm: 6, height_mm: 3, corner_mm: 2}}\n", []wanted{{5, "number-range", "`conductor.corner_mm` is 2|at most 1.5"}}},
		{"bar with diameter", head + "parts:\n  - {id: S, kind: core, conductor: {shape: bar, width_mm: 6, height_mm: 3, diameter_mm: 2}}\n", []wanted{{5, "key-of-kind", "`conductor.diameter_mm` does not belong to a conductor of shape bar"}}},
		{"bar of two areas", head + "parts:\n  - {id: S, kind: core, conductor: {shape: bar, width_mm: 6, height_mm: 3, size: 4/0, area_mm2: 15}}\n", []wanted{{5, "one-of", "`conductor` has size and area_mm2"}}},
		{"round with width", head + "parts:\n  - {id: S, kind: core, conductor: {size: 4/0, width_mm: 3}}\n", []wanted{{5, "key-of-kind", "`conductor.width_mm` does not belong to a conductor of shape round"}}},
		{"unknown shape", head + "parts:\n  - {id: S, kind: core, conductor: {shape: sektor, size: 4/0}}\n", []wanted{{5, "unknown-word", "conductor shape sektor is unknown|sector"}}},
		{"decimal comma in braces", strings.Replace(head, "inside_mm: 10", "inside_mm: 10,5", 1), []wanted{{3, "unknown-key", "number `holder.5`|decimal point"}}},
	}
}

func badNumbers() []bad {
	jacket := func(v string) string { return strings.Replace(head, "inside_mm: 10", "inside_mm: "+v, 1) }
	part := func(more string) string { return head + "parts:\n" + core("L1", more) }
	return []bad{
		{"text", jacket("wide"), []wanted{{3, "wrong-type", "`holder.inside_mm` holds wide where a number belongs|write a number like 1.5"}}},
		{"quoted", jacket(`"10"`), []wanted{{3, "wrong-type", `the text "10"|without quotes`}}},
		{"with unit", jacket("10 mm"), []wanted{{3, "wrong-type", "holds 10 mm|the number alone|the key already names the unit"}}},
		{"comma in a block", strings.Replace(head, "{kind: jacket, inside_mm: 10}", "\n  kind: jacket\n  inside_mm: 10,5", 1), []wanted{{5, "wrong-type", "holds 10,5|write 10.5"}}},
		{"empty", jacket(""), []wanted{{3, "wrong-type", "holds nothing where a number belongs|take the key out"}}},
		{"a list", jacket("[1]"), []wanted{{3, "wrong-type", "holds a list where a number belongs"}}},
		{"true", jacket("true"), []wanted{{3, "wrong-type", "holds true where"}}},
		{"hexadecimal", jacket("0x1F"), []wanted{{3, "wrong-type", "holds 0x1F|a number like 1.5"}}},
		{"octal", jacket("010"), []wanted{{3, "wrong-type", "holds 010|write 10"}}},
		{"underscore", jacket("1_000"), []wanted{{3, "wrong-type", "holds 1_000"}}},
		{"nan", jacket(".nan"), []wanted{{3, "not-finite", "is .nan, not a finite number"}}},
		{"infinite", jacket("-.inf"), []wanted{{3, "not-finite", "-.inf"}}},
		{"overflow", jacket("1e999"), []wanted{{3, "not-finite", "1e999, beyond any finite number"}}},
		{"absurd", jacket("1e12"), []wanted{{3, "number-range", "is 1000000000000, which is beyond anything meant"}}},
		{"tiny", jacket("1e-300"), []wanted{{3, "number-range", "tinier than anything meant"}}},
		{"zero", jacket("0"), []wanted{{3, "number-range", "`holder.inside_mm` is 0, but must be above zero|write a number above zero"}}},
		{"negative", jacket("-1.5"), []wanted{{3, "number-range", "is −1.5, but must be above zero"}}},
		{"ambient below zero kelvin", strings.Replace(head, "ambient_c: 30", "ambient_c: -300", 1), []wanted{{2, "number-range", "is −300|below absolute zero"}}},
		{"film of zero", "packrise: 1\nsurroundings: {kind: fixed-film, ambient_c: 30, film_w_m2k: 0}\nholder: {kind: open-bundle}\n", []wanted{{2, "number-range", "film_w_m2k` is 0, but must be above zero"}}},
		{"negative thickness", part(", layers: [{material: pvc, thickness_mm: -0.5}]"), []wanted{{5, "number-range", "part L1: `layers[0].thickness_mm` is −0.5, but must be above zero"}}},
		{"no thickness", part(", layers: [{material: pvc}]"), []wanted{{5, "missing-key", "part L1: `layers[0].thickness_mm` is missing|a layer needs it"}}},
		{"no material", part(", layers: [{thickness_mm: 1}]"), []wanted{{5, "missing-key", "`layers[0].material` is missing"}}},
		{"one coordinate", part(", at_mm: [1]"), []wanted{{5, "wrong-type", "`at_mm` holds 1 values where two numbers belong|[x, y]"}}},
		{"three coordinates", part(", at_mm: [1,5, 2]"), []wanted{{5, "wrong-type", "holds 3 values|decimal points"}}},
		{"coordinate of text", part(", at_mm: [1, b]"), []wanted{{5, "wrong-type", "`at_mm[1]` holds b"}}},
		{"place of text", part(", at_mm: here"), []wanted{{5, "wrong-type", "holds the single value here where two numbers belong"}}},
		{"limit", part(", limit_c: hot"), []wanted{{5, "wrong-type", "`limit_c` holds hot"}}},
		{"emissivity", head + "materials: {a: {k_w_mk: 1, emissivity: 1.2}}\n", []wanted{{4, "number-range", "material a: `emissivity` is 1.2, but must lie above 0"}}},
		{"absorptivity", head + "materials: {a: {k_w_mk: 1, absorptivity: -1}}\n", []wanted{{4, "number-range", "`absorptivity` is −1, but must lie between 0 and 1"}}},
		{"gas", head + "materials: {a: {k_w_mk: 1, gas: perhaps}}\n", []wanted{{4, "wrong-type", "`gas` holds the single value perhaps where true or false belongs"}}},
		{"no conductivity", head + "materials: {a: {emissivity: 0.9}}\n", []wanted{{4, "missing-key", "material a: `k_w_mk` is missing"}}},
		{"air given values", head + "materials: {air: {k_w_mk: 1}}\n", []wanted{{4, "reserved-name", "material air|always real air|another name"}}},
	}
}

func badKinds() []bad {
	holder := func(h string) string {
		return strings.Replace(head, "{kind: jacket, inside_mm: 10}", h, 1)
	}
	return []bad{
		{"misspelt surroundings", strings.Replace(head, "fixed-wall", "fixed-wal", 1), []wanted{{2, "unknown-word", "surroundings kind fixed-wal is unknown|did you mean `fixed-wall`? write one of still-air, moving-air, fixed-film, fixed-wall"}}},
		{"no kind", strings.Replace(head, "kind: fixed-wall, ", "", 1), []wanted{{2, "missing-key", "`surroundings.kind` is missing"}}},
		{"no ambient", strings.Replace(head, ", ambient_c: 30", "", 1), []wanted{{2, "missing-key", "`surroundings.ambient_c` is missing"}}},
		{"no film", strings.Replace(head, "fixed-wall", "fixed-film", 1), []wanted{{2, "missing-key", "`surroundings.film_w_m2k` is missing|needs a coefficient in W/m²K"}}},
		{"film on a wall", strings.Replace(head, "30}", "30, film_w_m2k: 3}", 1), []wanted{{2, "key-of-kind", "does not belong to kind fixed-wall"}}},
		{"apart", holder("{kind: apart}"), []wanted{{2, "apart-outside", "fixed-wall holds the one outer surface|kind: fixed-film"}}},
		{"apart, wrapped", strings.Replace(holder("{kind: apart}"), "fixed-wall", "insulation, wrap: {material: pvc, thickness_mm: 2}", 1), []wanted{{2, "apart-outside", "insulation wraps a section as a whole|open-bundle"}}},
		{"apart with a wall", strings.Replace(holder("{kind: apart, layers: [{material: pvc, thickness_mm: 1}]}"), "fixed-wall", "still-air", 1), []wanted{{3, "key-of-kind", "`holder.layers` does not belong to kind apart, which has no wall"}}},
		{"tray", holder("{kind: tray}"), []wanted{{3, "unknown-word", "holder kind tray is unknown|`wireway`"}}},
		{"no inside", holder("{kind: conduit}"), []wanted{{3, "missing-key", "`holder.inside_mm` is missing|or stock"}}},
		{"no height", holder("{kind: wireway, width_mm: 10}"), []wanted{{3, "missing-key", "`holder.height_mm` is missing"}}},
		{"flat jacket", holder("{kind: jacket, width_mm: 10}"), []wanted{{3, "missing-key", "`holder.height_mm` is missing|flat jacket"}}},
		{"flat and round", holder("{kind: jacket, inside_mm: 3, width_mm: 10}"), []wanted{{3, "key-of-kind", "`holder.width_mm` does not belong to kind jacket"}}},
		{"flat conduit", holder("{kind: conduit, width_mm: 10, height_mm: 4, inside_mm: 2}"), []wanted{{3, "key-of-kind", "`holder.width_mm`"}, {3, "key-of-kind", "`holder.height_mm`"}}},
		{"round wireway", holder("{kind: wireway, width_mm: 10, height_mm: 4, inside_mm: 3}"), []wanted{{3, "key-of-kind", "`holder.inside_mm` does not belong to kind wireway"}}},
		{"conduit with sides", holder("{kind: conduit, inside_mm: 10, sides: {left: insulated}}"), []wanted{{3, "key-of-kind", "`holder.sides`|no rectangle"}}},
		{"strings of a conduit", holder("{kind: conduit, inside_mm: 10, string_emissivity: 0.5}"), []wanted{{3, "key-of-kind", "`holder.string_emissivity`|no strings"}}},
		{"bright strings", holder("{kind: open-bundle, string_emissivity: 1.5}"), []wanted{{3, "number-range", "`holder.string_emissivity` is 1.5|above 0 and not above 1"}}},
		{"bundle with layers", holder("{kind: open-bundle, layers: [{material: a, thickness_mm: 1}]}"), []wanted{{3, "key-of-kind", "`holder.layers`|no wall"}}},
		{"stock and size", holder("{kind: conduit, stock: emt-1, inside_mm: 20}"), []wanted{{3, "one-of", "the holder has both stock and a size"}}},
		{"side", holder("{kind: wireway, width_mm: 9, height_mm: 9, sides: {left: closed}}"), []wanted{{3, "unknown-word", "side closed is unknown|`insulated`"}}},
		{"side without temperature", holder("{kind: wireway, width_mm: 9, height_mm: 9, sides: {left: {}}}"), []wanted{{3, "missing-key", "`holder.sides.left.fixed_c` is missing"}}},
		{"unknown side", holder("{kind: wireway, width_mm: 9, height_mm: 9, sides: {up: open}}"), []wanted{{3, "unknown-key", "`holder.sides.up`"}}},
		{"two bare parts", holder("{kind: none}") + "parts:\n" + core("L1", "") + core("L2", ""), []wanted{{3, "one-bare-part", "there are 2|open-bundle"}}},
		{"fill of nothing", holder("{kind: none, fill: air}"), []wanted{{3, "key-of-kind", "`holder.fill`|encloses nothing"}}},
	}
}

func TestBadInput(t *testing.T) {
	for _, group := range [][]bad{wholeFiles(), badKeys(), badNumbers(), badKinds(), badSurroundings(), badParts(), badLoads(), badRatings()} {
		for _, c := range group {
			t.Run(c.name, func(t *testing.T) { checkBad(t, c) })
		}
	}
}

func checkBad(t *testing.T, c bad) {
	d, problems := Read([]byte(c.text))
	if d != nil {
		t.Error("a document comes back")
	}
	if len(problems) != len(c.want) {
		t.Fatalf("%d problems: %v; want %d", len(problems), problems, len(c.want))
	}
	for i, w := range c.want {
		p := problems[i]
		if p.Line != w.line || p.Rule != w.rule {
			t.Errorf("line %d, rule %s; want %d, %s: %s", p.Line, p.Rule, w.line, w.rule, p.Sentence())
		}
		for _, f := range strings.Split(w.fragments, "|") {
			if !strings.Contains(p.Sentence(), f) {
				t.Errorf("%q lacks %q", p.Sentence(), f)
			}
		}
		if p.Do == "" || strings.HasSuffix(p.Sentence(), ".") || strings.ContainsAny(p.Sentence(), "\n¤") {
			t.Errorf("no proper sentence: %q", p.Sentence())
		}
	}
}

// All problems of a file come at once, in its order.
func TestAllProblemsAtOnce(t *testing.T) {
	text := "packrise: 1\ntitel: x\nsurroundings: {kind: still-air, ambient_c: warm}\nholder: {kind: conduit}\nparts:\n" +
		"  - {id: L1, kind: core, conductor: {size: 3}, layers: [{material: pvc, thickness_mm: 0}]}\n  - {id: L1, kind: rod}\nloads:\n  - {id: a, conductors: [L5]}\n"
	_, problems := Read([]byte(text))
	var got []string
	for _, p := range problems {
		got = append(got, fmt.Sprintf("%d %s %v %s", p.Line, p.Rule, p.IDs, p.Key))
	}
	want := []string{
		"2 unknown-key [] titel", "3 wrong-type [] surroundings.ambient_c", "4 missing-key [] holder.inside_mm",
		"6 bad-size [L1] conductor.size", "6 number-range [L1] layers[0].thickness_mm", "7 missing-key [L1] diameter_mm", "7 missing-key [L1] material", "7 duplicate-id [L1] id",
		"9 one-of [a] ", "9 unknown-conductor [L5] conductors[0]",
	}
	if strings.Join(got, "\n") != strings.Join(want, "\n") {
		t.Errorf("got\n%s\nwant\n%s", strings.Join(got, "\n"), strings.Join(want, "\n"))
	}
	if s := problems[0].At("a.yaml"); s != "a.yaml:2: unknown key `titel`; did you mean `title`?" {
		t.Error(s)
	}
}

// Parts of a build are named by where they stand in the section.
func TestProblemOfABuildNamesItsPlaces(t *testing.T) {
	_, problems := Read([]byte(head + "parts:\n  - {id: C1, kind: cable, build: b}\n  - {id: C2, kind: cable, build: b}\n" +
		"builds:\n  b: {holder: {kind: open-bundle}, parts: [{id: a, kind: core, conductor: {size: 4/0}, limit_c: -999}]}\n"))
	if len(problems) != 1 || strings.Join(problems[0].IDs, " ") != "C1/a C2/a" || problems[0].Key != "limit_c" {
		t.Errorf("%+v", problems)
	}
}

// A file full of complaints does not fill the memory.
func TestProblemsAreBounded(t *testing.T) {
	_, problems := Read([]byte(head + strings.Repeat("materials_: x\n", 1) + "loads:\n" + strings.Repeat("  - {bad: 1}\n", 5000)))
	if len(problems) != maxProblems {
		t.Errorf("%d problems; want %d", len(problems), maxProblems)
	}
}
