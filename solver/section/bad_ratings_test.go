package section

import "strings"

// badRatings: each key of the block of ratings with what it does not take, and references that point nowhere.
func badRatings() []bad {
	base := head + "parts:\n" + core("L1", "") + core("L2", "") + core("PE", ", role: earth") +
		"  - {id: F, kind: rod, diameter_mm: 3, material: pe}\nloads:\n"
	load := func(more string) string { return base + "  - {id: a, conductors: [L1], current_a: 3, " + more + "}\n" }
	two := base + "  - {id: a, conductors: [L1], current_a: 3, not_with: [b]}\n  - {id: b, conductors: [L2], heat_w_m: 3}\n  - {id: c, conductors: [PE], current_a: 0, not_with: [a]}\n"
	in := func(line string) string { return two + line + "\n" } // it stands on line 13
	one := func(name, text string, line int, rule, fragments string) bad {
		return bad{name, text, []wanted{{line, rule, fragments}}}
	}
	oneCase := func(name, text, rule, fragments string) bad {
		return one(name, in("cases: [{id: night, "+text+"}]"), 13, rule, fragments)
	}
	reading := func(name, text, rule, fragments string) bad {
		return one(name, in("measurements: [{id: m, at: L1, reading_c: 50, "+text+"}]"), 13, rule, fragments)
	}
	return []bad{
		one("system", load("system: ac"), 10, "unknown-word", "load a: system ac is unknown|dc, single-phase, three-phase"),
		one("no such neutral", load("neutral: N"), 10, "unknown-conductor", "load a: there is no conductor N"),
		one("rod as neutral", load("neutral: F"), 10, "not-a-conductor", "F is a rod and no conductor|name the neutral"),
		one("earth as neutral", load("neutral: PE"), 10, "contradiction", "PE is named as the neutral and its role is earth"),
		one("power factor", load("power_factor: 1.2"), 10, "number-range", "`power_factor` is 1.2|above 0 and not above 1"),
		one("volts", load("volts_v: 0"), 10, "number-range", "`volts_v` is 0, but must be above zero"),
		one("continuous", load("continuous: often"), 10, "wrong-type", "`continuous` holds the single value often where true or false belongs"),
		one("starting for hours", load("continuous: true, starting_duty: true"), 10, "contradiction", "load a: a load that runs only while a motor starts"),
		one("device without rating", load("protection: {kind: breaker}"), 10, "missing-key", "`protection.rating_a` is missing|protection needs it"),
		one("device without kind", load("protection: {rating_a: 3}"), 10, "missing-key", "`protection.kind` is missing"),
		{"empty device", load("protection: {}"), []wanted{{10, "missing-key", "`protection.kind`"}, {10, "missing-key", "`protection.rating_a`"}}},
		one("unknown device", load("protection: {kind: fues, rating_a: 3}"), 10, "unknown-word", "kind of protection fues is unknown|did you mean `fuse`?"),
		one("rating of zero", load("protection: {kind: fuse, rating_a: 0}"), 10, "number-range", "`protection.rating_a` is 0"),
		one("trips below its rating", load("protection: {kind: fuse, rating_a: 3, trips_at: 0.9}"), 10, "number-range", "`protection.trips_at` is 0.9, but must lie between 1 and 10"),
		one("not with itself", load("not_with: [a]"), 10, "contradiction", "load a: it can't be energised together with itself"),
		one("not with nobody", load("not_with: [x]"), 10, "unknown-load", "load a: there is no load x|add a load"),
		one("not with it twice", strings.Replace(two, "not_with: [b]", "not_with: [b, b]", 1), 10, "duplicate-name", "load a: load b is named twice"),
		one("two caps", load("terminals: {rating_c: 75, rated_a: 24}"), 10, "one-of", "`terminals` has both rating_c and rated_a"),
		one("terminal in kelvin", load("terminals: {rating_c: 348}"), 10, "number-range", "`terminals.rating_c` is 348, but must lie between 30 and 300 °C"),
		one("length of a build", head+"builds:\n  b: {holder: {kind: jacket, inside_mm: 5, length_m: 60}}\n", 5, "key-of-kind", "build b: `holder.length_m` belongs to the section's own holder"),
		one("empty screen", strings.Replace(head, "inside_mm: 10", "inside_mm: 10, layers: [{material: copper, thickness_mm: 0.2, screen: {}}]", 1), 3, "missing-key", "`holder.layers[0].screen.form` is missing"),
		one("screen over all", strings.Replace(head, "inside_mm: 10", "inside_mm: 10, layers: [{material: copper, thickness_mm: 0.2, screen: {form: foil, coverage: 1.2}}]", 1), 3, "number-range", "coverage` is 1.2"),
		one("pinned", head+"parts:\n"+core("L1", ", pinned: here"), 5, "wrong-type", "part L1: `pinned` holds the single value here"),

		oneCase("unknown load", "loads: {x: 3}", "unknown-load", "case night: there is no load x"),
		one("near a load", base+"  - {id: motor, conductors: [L1], current_a: 3}\ncases: [{id: n, any: [{of: [moter], count: 1}]}]\n", 11, "unknown-load", "case n: there is no load moter|did you mean motor?"),
		oneCase("state", "loads: {a: idle}", "wrong-type", "`loads.a` holds idle where a current belongs|the word off"),
		oneCase("state false", "loads: {a: false}", "wrong-type", "`loads.a` holds false where a current belongs|the word off"),
		oneCase("with unit", "loads: {a: 3 A}", "wrong-type", "`loads.a` holds 3 A|the number alone"),
		oneCase("negative", "loads: {a: -3}", "number-range", "`loads.a` is −3"),
		oneCase("current of a heat", "loads: {b: 3}", "contradiction", "load b is a fixed heat and takes no current|write off"),
		oneCase("given and any", "loads: {a: 3}, any: [{of: [a, b], count: 1}]", "contradiction", "load a stands under loads and in any"),
		oneCase("any twice", "any: [{of: [a], count: 1}, {of: [a], count: 1}]", "contradiction", "load a stands twice in any"),
		oneCase("both run", "loads: {a: 3, c: 1}", "contradiction", "loads a and c both run, but can't be energised together|write off"),
		oneCase("more than there are", "any: [{of: [a, b], count: 3}]", "number-range", "`any[0].count` is 3, more than the 2 loads"),
		oneCase("negative count", "any: [{of: [a, b], count: -1}]", "number-range", "`any[0].count` is −1, but must not be negative"),
		oneCase("broken count", "any: [{of: [a, b], count: 1.5}]", "number-range", "`any[0].count` is 1.5, which is no whole number"),
		oneCase("any of none", "any: [{of: [], count: 0}]", "missing-key", "`any[0].of` is missing or empty"),
		oneCase("no count", "any: [{of: [a]}]", "missing-key", "`any[0].count` is missing"),
		one("two nights", in("cases: [{id: night}, {id: night}]"), 13, "duplicate-id", "case night: its id is also"),
		one("nameless case", in("cases: [{ambient_c: 3}]"), 13, "missing-key", "case number 1: `id` is missing"),

		one("negative range", in("ranges: {ambient_k: -5}"), 13, "number-range", "`ranges.ambient_k` is −5, but must not be negative"),
		one("range of 200 %", in("ranges: {load_percent: 200}"), 13, "number-range", "`ranges.load_percent` is 200, but must lie between 0 and 100 %"),
		one("clearance", in("ranges: {clearance_mm: 0.5}"), 13, "wrong-type", "`ranges.clearance_mm` holds the single value 0.5 where two numbers belong"),
		one("clearance downwards", in("ranges: {clearance_mm: [0.5, 0]}"), 13, "number-range", "goes from 0.5 down to 0|the lower number first"),
		one("negative clearance", in("ranges: {clearance_mm: [-0.5, 0]}"), 13, "number-range", "`ranges.clearance_mm[0]` is −0.5"),

		reading("instrument", "instrument_emissivity: 0", "number-range", "measurement m: `instrument_emissivity` is 0, but must lie above 0 and not above 1"),
		reading("surface", "instrument_emissivity: 0.95, surface_emissivity: 1.5", "number-range", "`surface_emissivity` is 1.5"),
		reading("reflected", "instrument_emissivity: 0.95, reflected_c: -300", "number-range", "`reflected_c` is −300|below absolute zero"),
		reading("no instrument", "reflected_c: 30", "missing-key", "`instrument_emissivity` is missing|a contact thermometer needs none"),
		reading("below ambient", "ambient_c: 60", "below-ambient", "the reading of 50 °C is below its ambient of 60 °C"),
		reading("below ambient, warm mirrored", "ambient_c: 60, instrument_emissivity: 0.95, reflected_c: 70", "below-ambient", "below its ambient"),
		reading("load", "loads: {x: 3}", "unknown-load", "measurement m: there is no load x"),
		reading("time", "loaded_for_min: -1", "number-range", "`loaded_for_min` is −1"),
		reading("along", "along: uneven", "unknown-word", "course along the wire uneven is unknown|even, falls-off"),
		reading("cover", "cover: shut", "unknown-word", "state of the cover shut is unknown|closed, opened"),
		one("nowhere", in("measurements: [{id: m, at: L9, reading_c: 50}]"), 13, "unknown-place", "measurement m: there is no L9 to measure at|did you mean L1?"),
		one("layer of a rod", in("measurements: [{id: m, at: F/jacket, reading_c: 50}]"), 13, "unknown-place", "there is no F/jacket"),
		one("no reading", in("measurements: [{id: m, at: outside}]"), 13, "missing-key", "`reading_c` is missing"),
		one("two surveys", in("measurements: [{id: m, at: outside, reading_c: 9}, {id: m, at: jacket/2, reading_c: 9}]"), 13, "duplicate-id", "measurement m: its id"),

		one("rules", in("rules: [nec-310]"), 13, "wrong-type", "`rules` holds a list|rules is a mapping"),
		one("one rule", in("rules: {use: nec-310}"), 13, "wrong-type", "`rules.use` holds the single value nec-310|it is a list"),
		one("inside", in("rules: {inside: house}"), 13, "unknown-word", "place house is unknown|panel, machine"),
		one("arrangement", in("rules: {arrangement: heap}"), 13, "unknown-word", "arrangement heap is unknown|bunched, layer-wall"),
		one("at most of what is not there", in("rules: {at_most: [{of: [a, x], count: 1}]}"), 13, "unknown-load", "there is no load x"),
		one("at most more than there are", in("rules: {at_most: [{of: [a], count: 2}]}"), 13, "number-range", "`rules.at_most[0].count` is 2, more than the 1 loads"),
		one("at most twice", in("rules: {at_most: [{of: [a, a], count: 1}]}"), 13, "duplicate-name", "load a is named twice"),
		one("nonlinear", load("nonlinear: partly"), 10, "wrong-type", "`nonlinear` holds the single value partly"),
		one("role", head+"parts:\n"+core("L1", ", role: data"), 5, "unknown-word", "role data is unknown|did you mean `signal`?"),
		one("negative margin", in("design_margin_k: -1"), 13, "number-range", "`design_margin_k` is −1, but must not be negative"),
		one("no margin, no reason", in("design_margin_k: 0"), 13, "no-reason", "`design_margin_k` is 0, which needs a reason|reasons: {design_margin_k: why}"),
		one("empty reason", in("reasons: {limit L1: ' '}"), 13, "empty", "`reasons.limit L1` is empty|it stands on every result"),
		one("reason for nothing", in("reasons: {limit L9: x}"), 13, "unknown-part", "there is no part L9|did you mean limit L1?"),
		one("reason for anything", in("reasons: {ambient: x}"), 13, "unknown-word", "ambient is nothing that takes a reason|limit and a part's id"),
		one("reason for no survey", in("reasons: {measurement m: x}"), 13, "unknown-measurement", "there is no measurement m"),
	}
}
