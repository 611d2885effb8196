package study

import (
	"fmt"
	"math"
	"strconv"
	"strings"
)

const ratingsTable = "../../testdata/validation/ratings.md"

// preface is the table's head: what it is, and where everything else is held.
const preface = `# Permitted currents: published, computed, to rely on

Written by ` + "`make validate`" + `. Every row is a document of its own, answered as the program answers it: **computed** is the largest current with everything within
its limit (all loads scaled together; within 0.1 K, rounded down), **to rely on** the largest with P95 of every temperature inside its limit and the design margin of 10 K kept,
**rule** what the rule set says of the same document, **lowest** the least of to rely on, the rule and the terminal, with what it comes from. **ratio** is computed over
published. Amperes in one conductor throughout, except where a family gives factors. Nothing is tuned; one set of defaults ([README.md](README.md)). A table
cell is a rounded, careful figure, and from ten conductors on NEC 310.15(C)(1) reckons with loads that do not all run at once.

Where outside checks of ratings are held, apart from this table:

| check | where |
|---|---|
| nine 12 AWG and nine 8 AWG in 1-inch EMT within 5 % of 21.6 and 35 A | here, and solver/study TestCodesBesideComputed |
| single insulated wire in a fixed film against the closed form, 0.1 % | solver/study TestClosedForm |
| tied bundles of 3, 7, 12, 19 (CHECKS 8) | here; three gauges in [table.md](table.md) |
| IEC method E, B1, C, F, G (CHECKS 9) | method E here; all of them in [table.md](table.md); the tables themselves in solver/rules TestIECTables, TestIECFigures |
| NEC 310.17, DIN VDE 0298-4 (CHECKS 10) | here; also at 90 °C and unfilled in [table.md](table.md) |
| ambient factors √((Tc−Ta)/(Tc−30)) (CHECKS 11) | tables: solver/rules TestAmbientRule; computed: solver/study TestAmbientComputed |
| skin factor (CHECKS 11) | solver/rating TestSkin |
| fill counts (CHECKS 12) | solver/rules TestNumberOfWires, TestMixedFill; through documents solver/study TestFillDocuments, TestFitTube |
| packing ratios (CHECKS 12) | solver/pack |
| AC 43.13-1B examples step by step | solver/rules TestHarnessExamples; through documents solver/study TestHarnessDocuments |
| every cell of the NEC, IEC, VDE and AC tables | solver/rules, reference tests |
| terminals: 12 AWG in free air with 75 °C terminals 25 A | solver/study TestTerminalCaps; columns and blocks solver/rules |
| hand-model temperatures of the scenarios, ±12 K | solver/study TestScenarioTemperatures |
`

func writePublished(all []publishing, rows []held) string {
	var b strings.Builder
	b.WriteString(preface)
	for i := range all {
		f := &all[i]
		fmt.Fprintf(&b, "\n## %s\n\nPublished: %s.\nConditions: %s.\nDrawn: %s.\n", f.name, f.source, f.conditions, f.drawn)
		switch {
		case f.high > 0:
			fmt.Fprintf(&b, "Band of the ratio: %.2f–%.2f.\n", f.low, f.high)
		default:
			b.WriteString("Reported, no band.\n")
		}
		unit := "A"
		if f.factor {
			unit = "×"
		}
		fmt.Fprintf(&b, "\n| case | published, %s | computed | to rely on | rule | lowest | because | governs | ratio |\n|---|---|---|---|---|---|---|---|---|\n", unit)
		for _, h := range rows {
			if h.family != f {
				continue
			}
			ratio := ""
			if r := h.nominal / h.row.figure; !math.IsNaN(r) {
				ratio = strconv.FormatFloat(r, 'f', 3, 64)
			}
			fmt.Fprintf(&b, "| %s | %s | %s | %s | %s | %s | %s | %s | %s |\n", h.row.name, figure(h.row.figure), figure(h.nominal), figure(h.rely), figure(h.table), figure(h.lowest), h.because, h.governs, ratio)
		}
	}
	return b.String()
}

// figure writes four significant digits, rounded down as permitted currents are, and nothing for what is not known.
func figure(a float64) string {
	if math.IsNaN(a) || math.IsInf(a, 0) {
		return ""
	}
	if a == 0 {
		return "0"
	}
	step := math.Pow(10, math.Floor(math.Log10(math.Abs(a)))-3)
	return strconv.FormatFloat(math.Floor(a/step+1e-6)*step, 'g', 4, 64)
}
