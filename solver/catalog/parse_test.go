package catalog

import (
	"strings"
	"testing"

	"pgregory.net/rapid"
)

func TestParse(t *testing.T) {
	wire := func(n int, id, size, metal, class, typ, meant string) Parsed {
		return Parsed{Count: n, Wire: id, Size: size, Metal: metal, Class: class, Type: typ, Meant: meant}
	}
	thhn12 := wire(1, "thhn-12", "12 AWG", "copper", Stranded, "thhn", "12 AWG THHN, ⌀ 3.30 mm")
	three := thhn12
	three.Count, three.Meant = 3, "3 × 12 AWG THHN, ⌀ 3.30 mm"
	k25 := wire(1, "h07v-k-2.5", "2.5 mm2", "copper", Flexible, "h07v-k", "2.5 mm² H07V-K, ⌀ 3.70 mm")
	k25x3 := k25
	k25x3.Count, k25x3.Meant = 3, "3 × 2.5 mm² H07V-K, ⌀ 3.70 mm"
	big := wire(1, "thhn-250", "250 kcmil", "copper", Stranded, "thhn", "250 kcmil THHN, ⌀ 18.06 mm")
	holder := func(id, meant string) Parsed { return Parsed{Count: 1, Holder: id, Meant: meant} }
	m25 := holder("m25", "PVC conduit M25, inside ⌀ 21.4 mm")
	emt1 := holder("emt-1", "EMT 1, inside ⌀ 26.6 mm")
	emt114 := holder("emt-1-1/4", "EMT 1-1/4, inside ⌀ 35.1 mm")
	way := holder("wireway-4x4", "wireway 4 × 4 in, inside 101.6 × 101.6 mm")
	filler := Parsed{Count: 1, RodMM: 4, Material: "filler", Meant: "filler, ⌀ 4 mm"}
	hose := Parsed{Count: 1, RodMM: 8, BoreMM: 5, Hose: true, Material: "pur", Meant: "hose of polyurethane (PUR), ⌀ 8 mm, bore 5 mm"}
	cases := map[string]Parsed{
		"12 thhn": thhn12, "12 AWG THHN": thhn12, "thhn 12": thhn12, "THHN-12": thhn12, "12thhn": thhn12, "#12 thhn": thhn12,
		"  12   awg  thhn ": thhn12, "awg 12 thhn": thhn12, "12awg thhn": thhn12, "12 copper stranded thhn": thhn12,
		"3x 12 thhn": three, "3 x 12 thhn": three, "3×12 thhn": three, "3*12 THHN": three, "3x thhn-12": three, "3 x thhn 12": three,
		"2.5 h07v-k": k25, "2,5 h07v-k": k25, "2.5 H07VK": k25, "h07v k 2.5": k25, "2.5 mm² h07v-k": k25, "2,5mm2 h07v-k": k25,
		"3 x 2.5 h07v-k": k25x3, "3x2,5 h07v-k": k25x3,
		"250 thhn": big, "250 kcmil thhn": big, "thhn 250 MCM": big,
		"1/0 thhn":       wire(1, "thhn-1/0", "1/0 AWG", "copper", Stranded, "thhn", "1/0 AWG THHN, ⌀ 12.34 mm"),
		"00 thhn":        wire(1, "thhn-2/0", "2/0 AWG", "copper", Stranded, "thhn", "2/0 AWG THHN, ⌀ 13.51 mm"),
		"12 thhn/thwn-2": wire(1, "thwn-2-12", "12 AWG", "copper", Stranded, "thwn-2", "12 AWG THWN-2, ⌀ 3.30 mm"),
		"12 thhn solid":  wire(1, "", "12 AWG", "copper", Solid, "thhn", "12 AWG solid copper THHN, ⌀ 3.02 mm by the usual insulation"),
		"6 al xhhw-2":    wire(1, "", "6 AWG", "aluminium", Stranded, "xhhw-2", "6 AWG stranded aluminium XHHW-2, ⌀ 6.96 mm by the usual insulation"),
		"12 awg h07v-k":  wire(1, "", "12 AWG", "copper", Flexible, "h07v-k", "12 AWG flexible copper H07V-K, ⌀ 4.02 mm by the usual insulation"),
		"thw 2":          wire(1, "", "2 AWG", "copper", Stranded, "thw", "2 AWG stranded copper THW, ⌀ 10.46 mm by the usual insulation"),
		"2 thw-2":        wire(1, "", "2 AWG", "copper", Stranded, "thw-2", "2 AWG stranded copper THW-2, ⌀ 10.46 mm by the usual insulation"),
		"20 etfe":        wire(1, "etfe-20", "20 AWG", "tinned-copper", Stranded, "etfe", "20 AWG ETFE, ⌀ 1.47 mm"),
		"ptfe 20":        wire(1, "ptfe-200-20", "20 AWG", "copper", Stranded, "ptfe-200", "20 AWG PTFE 200, ⌀ 1.47 mm"),
		"0.14 h05v-k":    wire(1, "", "0.14 mm2", "copper", Flexible, "h05v-k", "0.14 mm² flexible copper H05V-K, thickness of insulation not known"),
		"emt 1":          emt1, "1 emt": emt1, `1" EMT`: emt1, "1 in emt": emt1, "emt-1": emt1, "steel emt 1": emt1,
		"emt 1 1/4": emt114, "1¼ emt": emt114, "emt 1-1/4": emt114,
		"M25": m25, "m 25": m25, "conduit 25": m25, "pvc conduit M25": m25,
		"m25 steel":   holder("m25-steel", "steel conduit M25, inside ⌀ 21.8 mm"),
		"wireway 4x4": way, "4 x 4 wireway": way, "4x4": way, "wireway 4x4 in": way,
		"100x50":             holder("trunking-100x50", "steel trunking 100 × 50 mm, inside 97.6 × 47.6 mm"),
		"100 × 50 mm":        holder("trunking-100x50", "steel trunking 100 × 50 mm, inside 97.6 × 47.6 mm"),
		"duct 60x80":         holder("duct-60x80", "slotted duct 60 × 80 mm, inside 56.6 × 76.6 mm"),
		"pvc trunking 60x40": holder("trunking-pvc-60x40", "PVC trunking 60 × 40 mm, inside 56.8 × 36.8 mm"),
		"pvc schedule 80, 2": holder("pvc80-2", "PVC schedule 80, size 2, inside ⌀ 48.6 mm"),
		"filler 4":           filler, "filler 4 mm": filler, "4 filler": filler, "filler 4,0": filler,
		"rod 4":         {Count: 1, RodMM: 4, Material: "polypropylene", Meant: "rod of polypropylene, ⌀ 4 mm"},
		"rod 1/4 in pe": {Count: 1, RodMM: 6.35, Material: "pe", Meant: "rod of PE, ⌀ 6.35 mm"},
		"2x filler 4":   {Count: 2, RodMM: 4, Material: "filler", Meant: "2 × filler, ⌀ 4 mm"},
		"hose 8/5":      hose, "hose 8x5": hose,
		"hose 8": {Count: 1, RodMM: 8, BoreMM: 5, Hose: true, Material: "pur", Meant: "hose of polyurethane (PUR), ⌀ 8 mm, bore 5 mm (assumed)"},
	}
	c := Load()
	for text, want := range cases {
		if got, err := c.Parse(text); err != nil || got != want {
			t.Errorf("Parse(%q) = %+v, %v\nwant %+v", text, got, err, want)
		}
	}
}

func TestParseRefuses(t *testing.T) {
	cases := map[string]string{ // text: words that the sentence must hold
		"":                              "nothing is written",
		"hello":                         `"hello" is not understood; write for example`,
		"12":                            `names no wire type; write it as well, for example "12 thhn"`,
		"3x 12":                         `for example "3x 12 thhn"`,
		"12 thnn":                       `"thnn" is no wire type; the nearest are thwn, thhn`,
		"thw-2":                         `the size is missing in "thw-2"`,
		"h07v-k":                        `for example "2.5 h07v-k"`,
		"3 h07v-k":                      "the nearest are 2.5 mm2 and 4 mm2",
		"500 solid xhhw":                "no solid copper conductor of 500 kcmil",
		"2.5 al h07v-k":                 "no table here has flexible aluminium conductors in mm² sizes",
		"41 thhn":                       "40 AWG",
		"12 mm thhn":                    `"12 mm2"`,
		"4G1.5":                         "cable of several cores",
		"5 g 6":                         "cable of several cores",
		"2x2x0.25":                      "cable of several cores",
		"50x100":                        "no holder of 50x100 in the catalogue, the nearest are trunking-100x50 and",
		"3x4":                           `for example "3x 4 h07v-k"`,
		"emt 5":                         "the nearest are emt-1, emt-2 and emt-3",
		"m26":                           "the nearest are m16, m20 and m25",
		"wireway 5x5":                   "the nearest are wireway-6x6",
		"emt":                           "the nearest are emt-1",
		"2x emt 1":                      "one holder",
		"0x 12 thhn":                    "count from 1 to 500",
		"501x 12 thhn":                  "count from 1 to 500",
		"99999999999999999999x 12 thhn": "count from 1 to 500",
		"filler":                        "the diameter is missing",
		"filler abc":                    `"abc" is no diameter`,
		"filler 0":                      "0.1 to 500 mm",
		"filler -4":                     "0.1 to 500 mm",
		"hose 8/0":                      "a bore of 0 mm does not fit",
		"hose 5/8":                      "does not fit into a hose of 5 mm",
		"rod 4 air":                     "which is a gas",
		"12 thhn thhn":                  "is not a conductor size",
		strings.Repeat("12 thhn ", 100): "too long",
	}
	c := Load()
	for text, want := range cases {
		got, err := c.Parse(text)
		switch {
		case err == nil:
			t.Errorf("Parse(%q) = %+v", text, got)
		case !strings.Contains(err.Error(), want):
			t.Errorf("Parse(%q): %v\nwant %s", text, err, want)
		}
	}
}

// What the catalogue shows can be typed back.
func TestParseReadsItsOwnWords(t *testing.T) {
	c := Load()
	for _, w := range c.Wires() {
		for _, text := range []string{w.ID, w.Abbreviated, strings.ToUpper(w.Abbreviated), w.Name} {
			if p, err := c.Parse(text); err != nil || p.Wire != w.ID {
				t.Errorf("Parse(%q) = %+v, %v; want wire %s", text, p, err, w.ID)
			}
		}
	}
	for _, h := range c.Holders() {
		for _, text := range []string{h.ID, strings.ReplaceAll(h.ID, "-", " "), h.Name} {
			if p, err := c.Parse(text); err != nil || p.Holder != h.ID {
				t.Errorf("Parse(%q) = %+v, %v; want holder %s", text, p, err, h.ID)
			}
		}
	}
	for _, typ := range c.WireTypes() {
		size := sizeExample(typ)
		if p, err := c.Parse("2x " + size + " " + typ.Name); err != nil || p.Type != typ.ID || p.Count != 2 {
			t.Errorf("2x %s %s: %+v, %v", size, typ.Name, p, err)
		}
	}
}

// Whatever is typed, the answer is one thing that exists, or one sentence.
func TestParseAnything(t *testing.T) {
	c := Load()
	words := rapid.SampledFrom([]string{
		"12", "1/0", "2,5", "250", "0", "x", "3x", "×", "awg", "mm²", "kcmil", "thhn", "h07v-k", "thw", "2", "al", "solid", "emt", "1",
		"m25", "4x4", "100x50", "filler", "hose", "8/5", "rod", "pvc", "in", `"`, "-", "#", "g", "é", "\x00", "nan", "1e9", ".", "/",
	})
	rapid.Check(t, func(t *rapid.T) {
		text := strings.Join(rapid.SliceOfN(words, 0, 6).Draw(t, "words"), rapid.SampledFrom([]string{" ", ""}).Draw(t, "between"))
		checkParsed(t, c, text)
	})
}

func FuzzParse(f *testing.F) {
	for _, s := range []string{"3x 12 thhn", "2,5 h07v-k", "emt 1 1/4", "hose 8/5", "4G1.5", "100x50", "\xff\xfe", "3x"} {
		f.Add(s)
	}
	c := Load()
	f.Fuzz(func(t *testing.T, text string) { checkParsed(t, c, text) })
}

func checkParsed(t interface{ Fatalf(string, ...any) }, c *Catalog, text string) {
	p, err := c.Parse(text)
	if err != nil {
		if p != (Parsed{}) || strings.ContainsAny(err.Error(), "\n") || len(err.Error()) < 10 {
			t.Fatalf("Parse(%q) = %+v, %v", text, p, err)
		}
		return
	}
	_, wire := c.Wire(p.Wire)
	_, holder := c.Holder(p.Holder)
	_, typ := c.WireType(p.Type)
	_, material := c.Material(p.Material)
	_, noMetal := c.Conductor(p.Size, p.Metal, p.Class)
	isWire, isHolder, isRod := typ && noMetal == nil, holder, p.RodMM > 0 && material
	if n := count(isWire, isHolder, isRod); n != 1 || p.Count < 1 || p.Count > mostAtOnce || p.Meant == "" || wire && !isWire || p.Wire != "" && !wire {
		t.Fatalf("Parse(%q) = %+v", text, p)
	}
}

func count(of ...bool) (n int) {
	for _, b := range of {
		if b {
			n++
		}
	}
	return n
}

func BenchmarkParse(b *testing.B) {
	c := Load()
	for b.Loop() {
		if _, err := c.Parse("3x 12 thhn"); err != nil {
			b.Fatal(err)
		}
	}
}
