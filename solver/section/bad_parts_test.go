package section

import (
	"fmt"
	"strings"
)

func badParts() []bad {
	part := func(p string) string { return head + "parts:\n  - {" + p + "}\n" }
	return []bad{
		{"no id", part("kind: core, stock: x"), []wanted{{5, "missing-key", "part number 1: `id` is missing"}}},
		{"empty id", part(`id: "", kind: core, stock: x`), []wanted{{5, "empty", "part number 1: `id` is empty"}}},
		{"slash", part("id: C1/L1, kind: core, stock: x"), []wanted{{5, "bad-id", "the id C1/L1 holds a /|without /"}}},
		{"space", part(`id: "L1 ", kind: core, stock: x`), []wanted{{5, "bad-name", "begins or ends with a space"}}},
		{"line break in an id", part(`id: "L\n1", kind: core, stock: x`), []wanted{{5, "bad-name", "part L·1|line break"}}},
		{"no kind", part("id: L1, stock: x"), []wanted{{5, "missing-key", "part L1: `kind` is missing"}}},
		{"unknown kind", part("id: L1, kind: cores"), []wanted{{5, "unknown-word", "part kind cores is unknown|`core`"}}},
		{"duplicate id", head + "parts:\n" + core("L1", "") + core("L2", "") + core("L1", ""), []wanted{{7, "duplicate-id", "part L1: its id is also that of the part on line 5"}}},
		{"no conductor", part("id: L1, kind: core"), []wanted{{5, "missing-key", "`conductor` is missing|or stock"}}},
		{"stock and conductor", part("id: L1, kind: core, stock: x, conductor: {size: 4/0}, type: thhn"), []wanted{{5, "one-of", "stock, which brings conductor, layers and type, and also conductor and type|either stock"}}},
		{"no size", part("id: L1, kind: core, conductor: {metal: copper}"), []wanted{{5, "one-of", "`conductor` has none of size, area_mm2 and diameter_mm"}}},
		{"two sizes", part("id: L1, kind: core, conductor: {size: 4/0, area_mm2: 3}"), []wanted{{5, "one-of", "`conductor` has size and area_mm2|keep one"}}},
		{"bare size", part("id: L1, kind: core, conductor: {size: 2.5}"), []wanted{{5, "bad-size", `"2.5" can be gauge or mm²|"2.5 mm2"`}}},
		{"odd size", part("id: L1, kind: core, conductor: {size: thick}"), []wanted{{5, "bad-size", "not a conductor size|12 AWG"}}},
		{"metal", part("id: L1, kind: core, conductor: {size: 4/0, metal: aluminum}"), []wanted{{5, "unknown-word", "metal aluminum is unknown|`aluminium`"}}},
		{"class", part("id: L1, kind: core, conductor: {size: 4/0, class: 5}"), []wanted{{5, "unknown-word", "class 5 is unknown|`flexible`"}}},
		{"role", part("id: L1, kind: core, stock: x, role: ground"), []wanted{{5, "unknown-word", "role ground|`earth`"}}},
		{"rod that carries", part("id: F, kind: rod, diameter_mm: 4, material: pe, conductor: {size: 4/0}"), []wanted{{5, "key-of-kind", "part F: `conductor` belongs to a core, and this is a rod"}}},
		{"rod without", part("id: F, kind: rod"), []wanted{{5, "missing-key", "`diameter_mm` is missing"}, {5, "missing-key", "`material` is missing"}}},
		{"bore too wide", part("id: F, kind: rod, diameter_mm: 4, material: pe, bore_mm: 4"), []wanted{{5, "number-range", "`bore_mm` is 4, not less than the rod's diameter of 4"}}},
		{"bore of no size", part("id: F, kind: rod, diameter_mm: 4, material: pe, bore: air"), []wanted{{5, "missing-key", "`bore_mm` is missing"}}},
		{"turned core", part("id: L1, kind: core, stock: x, turn_deg: 3"), []wanted{{5, "key-of-kind", "`turn_deg` turns a cable"}}},
		{"cable without build", part("id: C1, kind: cable"), []wanted{{5, "missing-key", "`build` is missing"}}},
		{"cable of unknown build", part("id: C1, kind: cable, build: pari") + "builds:\n  pair: {holder: {kind: open-bundle}}\n", []wanted{{5, "unknown-build", "there is no build pari|did you mean pair?"}}},
		{"cable with layers", part("id: C1, kind: cable, build: b, layers: [{material: a, thickness_mm: 1}]") + "builds: {b: {holder: {kind: open-bundle}}}\n", []wanted{{5, "key-of-kind", "`layers` belongs to a core or rod"}}},
		{"build without holder", head + "builds:\n  b: {parts: []}\n", []wanted{{5, "missing-key", "build b: `holder` is missing"}}},
		{"square build", head + "builds:\n  b: {holder: {kind: wireway, width_mm: 3, height_mm: 3}}\n", []wanted{{5, "key-of-kind", "build b: its holder is of kind wireway|jacket"}}},
		{"part of a build", part("id: C1, kind: cable, build: b") + "builds:\n  b:\n    holder: {kind: open-bundle}\n    parts:\n      - {id: a, kind: core}\n", []wanted{{10, "missing-key", "part a of build b: `conductor` is missing"}}},
		{"build in itself", head + "builds:\n  b:\n    holder: {kind: open-bundle}\n    parts: [{id: c, kind: cable, build: b}]\n", []wanted{{5, "endless-build", "build b: it contains itself (b → b)"}}},
		{
			"builds in each other", head + "builds:\n  a: {holder: {kind: open-bundle}, parts: [{id: c, kind: cable, build: b}]}\n  b: {holder: {kind: open-bundle}, parts: [{id: c, kind: cable, build: a}]}\n",
			[]wanted{{5, "endless-build", "build a: it contains itself (a → b → a)"}},
		},
		{"nested too deep", head + "parts: [{id: c, kind: cable, build: b6}]\nbuilds:\n" + nest(6), []wanted{{4, "too-deep", "cables are nested 7 deep, and at most 6"}}},
		{"bomb of builds", head + "parts: [{id: c, kind: cable, build: b5}]\nbuilds:\n" + bomb(5, 100), []wanted{{4, "too-many-parts", "over a million parts|at most 500"}}},
	}
}

// nest makes builds b0 to bn, each holding a cable of the one before.
func nest(n int) string {
	s := "  b0: {holder: {kind: open-bundle}}\n"
	for i := 1; i <= n; i++ {
		s += fmt.Sprintf("  b%d: {holder: {kind: open-bundle}, parts: [{id: c, kind: cable, build: b%d}]}\n", i, i-1)
	}
	return s
}

// bomb makes builds b0 to bn, each holding so many cables of the one before.
func bomb(n, each int) string {
	s := "  b0: {holder: {kind: open-bundle}}\n"
	for i := 1; i <= n; i++ {
		s += fmt.Sprintf("  b%d:\n    holder: {kind: open-bundle}\n    parts:\n", i)
		for j := range each {
			s += fmt.Sprintf("      - {id: c%d, kind: cable, build: b%d}\n", j, i-1)
		}
	}
	return s
}

func badLoads() []bad {
	base := head + "parts:\n" + core("L1", "") + core("L2", "") +
		"  - {id: F, kind: rod, diameter_mm: 3, material: pe}\n  - {id: C1, kind: cable, build: b}\n" +
		"builds: {b: {holder: {kind: open-bundle}, parts: [{id: L9, kind: core, stock: x}]}}\nloads:\n"
	load := func(lines ...string) string { return base + "  - {" + strings.Join(lines, "}\n  - {") + "}\n" }
	return []bad{
		{"unknown conductor", load("id: a, conductors: [L1, L3], current_a: 3"), []wanted{{11, "unknown-conductor", "load a: there is no conductor L3|did you mean L1?"}}},
		{"far from any", load("id: a, conductors: [welding], current_a: 3"), []wanted{{11, "unknown-conductor", "no conductor welding|add a part"}}},
		{"nested by its own name", load("id: a, conductors: [L9], current_a: 3"), []wanted{{11, "unknown-conductor", "did you mean C1/L9?"}}},
		{"unknown nested", load("id: a, conductors: [C1/L8], current_a: 3"), []wanted{{11, "unknown-conductor", "did you mean C1/L9?"}}},
		{"rod", load("id: a, conductors: [F], current_a: 3"), []wanted{{11, "not-a-conductor", "F is a rod and no conductor|take it out of the load"}}},
		{"cable", load("id: a, conductors: [C1], current_a: 3"), []wanted{{11, "not-a-conductor", "C1 is a cable and no conductor|such as C1/L9"}}},
		{"twice in one", load("id: a, conductors: [L1, L1], current_a: 3"), []wanted{{11, "loaded-twice", "conductor L1 is already in load a"}}},
		{"in two", load("id: a, conductors: [L1], current_a: 3", "id: b, conductors: [L1], heat_w_m: 3"), []wanted{{12, "loaded-twice", "load b: conductor L1 is already in load a"}}},
		{"same id", load("id: a, conductors: [L1], current_a: 3", "id: a, conductors: [L2], heat_w_m: 3"), []wanted{{12, "duplicate-id", "load a: its id is also"}}},
		{"nothing", load("id: a, conductors: [L1]"), []wanted{{11, "one-of", "neither current_a nor heat_w_m|current_a: unknown"}}},
		{"both", load("id: a, conductors: [L1], current_a: unknown, heat_w_m: 0"), []wanted{{11, "one-of", "both current_a and heat_w_m"}}},
		{"negative", load("id: a, conductors: [L1], current_a: -3"), []wanted{{11, "number-range", "load a: `current_a` is −3, but must not be negative"}}},
		{"negative heat", load("id: a, conductors: [L1], heat_w_m: -3"), []wanted{{11, "number-range", "`heat_w_m` is −3"}}},
		{"misspelt unknown", load("id: a, conductors: [L1], current_a: unknwon"), []wanted{{11, "wrong-type", "holds unknwon|the word unknown"}}},
		{"with unit", load("id: a, conductors: [L1], current_a: 16 A"), []wanted{{11, "wrong-type", "holds 16 A|the number alone"}}},
		{"no conductors", load("id: a, current_a: 3"), []wanted{{11, "missing-key", "`conductors` is missing"}}},
		{"empty conductors", load("id: a, conductors: [], current_a: 3"), []wanted{{11, "missing-key", "`conductors` is missing or empty"}}},
		{"conductors of one word", load("id: a, conductors: L1, current_a: 3"), []wanted{{11, "wrong-type", "holds the single value L1|a list"}}},
		{"frequency of heat", load("id: a, conductors: [L1], heat_w_m: 3, frequency_hz: 50"), []wanted{{11, "key-of-kind", "`frequency_hz` belongs to a current"}}},
		{"frequency", load("id: a, conductors: [L1], current_a: 3, frequency_hz: -50"), []wanted{{11, "number-range", "`frequency_hz` is −50"}}},
		{"no id", load("conductors: [L1], current_a: 3"), []wanted{{11, "missing-key", "load number 1: `id` is missing"}}},
		{"stock row", head + "stock_used: {material: {pvc: 3}}\n", []wanted{{4, "wrong-type", "`stock_used.material.pvc`|written anew on the next save"}}},
		{"stock row twice", head + "stock_used: {material: {pvc: {k: 1, k: 2}}}\n", []wanted{{4, "duplicate-key", "stands twice"}}},
	}
}

// badSurroundings: each key belongs to its kinds, and each kind asks for what it needs.
func badSurroundings() []bad {
	in := func(text string) string {
		return strings.Replace(head, "{kind: fixed-wall, ambient_c: 30}", "{ambient_c: 30, "+text+"}", 1)
	}
	one := func(name, text, rule, fragments string) bad {
		return bad{name, in(text), []wanted{{2, rule, fragments}}}
	}
	return []bad{
		one("moving air without speed", "kind: moving-air", "missing-key", "`surroundings.air_speed_m_s` is missing|kind moving-air needs the speed of the air in m/s"),
		one("speed in still air", "kind: still-air, air_speed_m_s: 2", "key-of-kind", "does not belong to kind still-air, where the air moves by its own warmth only|write kind: moving-air"),
		one("storm", "kind: moving-air, air_speed_m_s: 300", "number-range", "is 300, but must lie between 0 and 100 m/s"),
		one("wind backwards", "kind: moving-air, air_speed_m_s: -1", "number-range", "is −1, but must lie between 0 and 100 m/s"),
		one("slanting", "kind: moving-air, air_speed_m_s: 1, air_direction: slanting", "unknown-word", "air direction slanting is unknown|across, along"),
		one("beyond the atmosphere", "kind: still-air, altitude_m: 31000", "number-range", "`surroundings.altitude_m` is 31000, but the model of the atmosphere goes from −1000 to 30000 m|kind: vacuum"),
		one("altitude underground", "kind: buried, depth_m: 1, soil_w_mk: 1, altitude_m: 100", "key-of-kind", "`surroundings.altitude_m` does not belong to kind buried|still-air, moving-air, insulation"),
		one("sun on a buried run", "kind: buried, depth_m: 1, soil_w_mk: 1, sun_w_m2: 900", "key-of-kind", "the sun does not reach a run in the ground"),
		one("sun in water", "kind: water, sun_w_m2: 900", "key-of-kind", "the sun on a run in water is not reckoned"),
		one("too much sun", "kind: still-air, sun_w_m2: 9000", "number-range", "is 9000, but must lie between 0 and 2000 W/m²"),
		{"buried without depth and soil", in("kind: buried"), []wanted{{2, "missing-key", "depth_m` is missing|the depth of the axis in m"}, {2, "missing-key", "soil_w_mk` is missing|0.4 for dry"}}},
		one("depth in air", "kind: still-air, depth_m: 1", "key-of-kind", "`surroundings.depth_m` does not belong to kind still-air|it belongs to kind buried"),
		one("depth of zero", "kind: buried, soil_w_mk: 1, depth_m: 0", "number-range", "must lie between 0.001 and 100 m"),
		one("insulation without wrap", "kind: insulation", "missing-key", "`surroundings.wrap` is missing|{material: …, thickness_mm: …}"),
		one("wrap without thickness", "kind: insulation, wrap: {material: mineral-wool}", "missing-key", "`surroundings.wrap.thickness_mm` is missing"),
		one("wrap in still air", "kind: still-air, wrap: {material: mineral-wool, thickness_mm: 20}", "key-of-kind", "it belongs to kind insulation"),
		one("vertical without height", "kind: still-air, run: vertical", "missing-key", "`surroundings.height_m` is missing|a vertical run needs its height"),
		one("height of a level run", "kind: still-air, height_m: 3", "key-of-kind", "belongs to a vertical run"),
		one("vertical vacuum", "kind: vacuum, run: vertical", "key-of-kind", "`surroundings.run` does not belong to kind vacuum"),
		one("wet vacuum", "kind: vacuum, wet: true", "key-of-kind", "where nothing stays wet"),
		one("film in still air", "kind: still-air, film_w_m2k: 9", "key-of-kind", "it belongs to kind fixed-film"),
		one("radiant in water", "kind: water, radiant_c: 20", "key-of-kind", "water lets no heat radiation through"),
		one("radiant below zero kelvin", "kind: still-air, radiant_c: -300", "number-range", "below absolute zero"),
		one("wet as a word", "kind: still-air, wet: damp", "wrong-type", "where true or false belongs"),
		{
			"touch limit of a build", head + "builds:\n  b: {holder: {kind: jacket, inside_mm: 5, touch_limit_c: 60}}\n",
			[]wanted{{5, "key-of-kind", "build b|`holder.touch_limit_c` belongs to the section's own holder"}},
		},
	}
}
