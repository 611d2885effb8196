package rules

import (
	"os"
	"path/filepath"
	"regexp"
	"slices"
	"strings"
	"testing"

	"packrise/assets"
)

func TestShipped(t *testing.T) {
	want := []string{"nec-310", "nec-310-17", "nec-annex-b", "nec-376-22", "nec-378-22", "nec-ch9", "iec-52", "uk-trunking", "iec-60204", "vde-0298-4", "ac-43-13"}
	if got := Shipped().IDs(); !slices.Equal(got, want) {
		t.Errorf("%v, want %v", got, want)
	}
	for _, id := range want {
		info, ok := Shipped().Info(id)
		if !ok || info.Title == "" || info.Edition == "" || info.Source.Text == "" || info.Informative != (id == "nec-annex-b") || info.FillOnly != (id == "nec-ch9" || id == "uk-trunking") {
			t.Errorf("%s: %+v", id, info)
		}
	}
	if _, ok := Shipped().Info("nec"); ok {
		t.Error("nec is known")
	}
	if Shipped().terminals == nil || Shipped().devices == nil {
		t.Error("terminals or devices are missing")
	}
	lying, err := assets.Catalog.ReadDir("catalog/rules")
	if err != nil || len(lying) != len(files) {
		t.Errorf("%d files lie in the assets, %d are read: %v", len(lying), len(files), err)
	}
}

func TestUnknownRuleSet(t *testing.T) {
	r := Run{AmbientC: 30, Holder: emt1(), Conductors: wires(t, "w", 3, "12 AWG", "", thhnWire("12 AWG"))}
	out, problems := Shipped().Apply(r, []string{"nec-301", "nec-310"})
	if len(out) != 1 || len(problems) != 1 || !strings.HasPrefix(problems[0].String(), `there is no rule set "nec-301"; the nearest is nec-310; there are nec-310, `) {
		t.Errorf("%d outcomes, %v", len(out), problems)
	}
}

// TestOwnRuleSet reads a person's file and rates by it beside the program's own tables: 14 A × 0.60 (seven conductors) × 0.87 (40 °C, B.52.14).
func TestOwnRuleSet(t *testing.T) {
	text, err := os.ReadFile(filepath.Join("testdata", "ours.yaml"))
	if err != nil {
		t.Fatal(err)
	}
	b, problems := Shipped().Add("ours.yaml", text)
	if len(problems) > 0 {
		t.Fatal(problems)
	}
	r := Run{AmbientC: 40, Holder: Holder{Kind: Jacket, InsideMM: 12}, Conductors: wires(t, "w", 7, "1.5 mm2", "", Conductor{RatingC: 90, OutsideMM: 2.5})}
	out, problems := b.Apply(r, []string{"chain"})
	if len(problems) > 0 || !out[0].Applies {
		t.Fatal(problems, out)
	}
	near(t, "own rule", out[0].Conductors[0].A, 14*0.6*0.87, 1e-9)
	if got, want := out[0].Conductors[0].Steps[1].Text, "14 A × 0.60 (4–10 current-carrying conductors, house factors, from memory) = 8.4 A"; got != want {
		t.Errorf("%q, want %q", got, want)
	}
	if out[0].Fill == nil || out[0].Fill.Limit != 0.8 {
		t.Errorf("%+v", out[0].Fill)
	}
	if b.IDs()[len(b.IDs())-1] != "chain" || slices.Contains(Shipped().IDs(), "chain") {
		t.Error("the shipped book was changed, or the own rule set is not last")
	}
	if _, problems := b.Add("again.yaml", text); len(problems) != 3 {
		t.Errorf("the same file twice: %v", problems)
	}
}

// TestAddRefuses: each problem with its line, what is wrong and what to write.
func TestAddRefuses(t *testing.T) {
	good, err := os.ReadFile(filepath.Join("testdata", "ours.yaml"))
	if err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct{ from, to, want string }{
		{"amperes: [6, 14, 26]", "amps: [6, 14, 26]", `ours.yaml:9: unknown key "amps"; the nearest is amperes`},
		{"amperes: [6, 14, 26]", "amperes: [6, 14]", "ours.yaml:2: amperes has 2 values, and 3 are needed"},
		{"amperes: [6, 14, 26]", "amperes: [6, 14, 12]", "ours.yaml:2: amperes fall to 12 at 4 mm2, below those of a thinner size"},
		{"amperes: [6, 14, 26]", "amperes: [6, fourteen, 26]", `ours.yaml:9: "fourteen" is not a number`},
		{"amperes: [6, 14, 26]", "amperes: [6, -14, 26]", "ours.yaml:2: amperes has -14, which is not between 0.001 and 20000"},
		{"sizes: [0.5 mm2, 1.5 mm2, 4 mm2]", "sizes: [0.5 mm2, 1.5, 4 mm2]", `ours.yaml:2: sizes: "1.5" can be gauge or mm²; write "1.5 AWG" or "1.5 mm2"`},
		{"sizes: [0.5 mm2, 1.5 mm2, 4 mm2]", "sizes: [0.5 mm2, 4 mm2, 1.5 mm2]", "ours.yaml:2: sizes are not from thin to thick at 1.5 mm2"},
		{"rating_c: 70", "rating_c: 0", "ours.yaml:2: rating_c is 0; write the conductor temperature of the column in °C"},
		{"factors: [1, 0.6, 0.4]", "factors: [1, 0.6, 0.7]", "ours.yaml:11: factors are not falling at value 3"},
		{"factors: [1, 0.6, 0.4]", "factors: [1, 60, 40]", "ours.yaml:11: factors has 60, which is not between 0.001 and 1"},
		{"up_to: [3, 10, 30]", "up_to: [3, 30, 10]", "ours.yaml:11: up_to is not in rising order at 10"},
		{"rule: chain", "rule: nec-310", `ours.yaml:18: rule "nec-310" is there already; give yours another id`},
		{"rule: chain", "rule: Our Chain", `ours.yaml:18: rule is "Our Chain"; write small letters, digits and hyphens, starting with a letter`},
		{"ambient: iec-52-14", "ambient: iec-52-41", `ours.yaml:18: ambient names table "iec-52-41", which is not there; the nearest is iec-52-14`},
		{"ambient: iec-52-14", "", "ours.yaml:18: ambient is missing; name the table of factors for the ambient temperature"},
		{"currents: chain-currents", "currents: chain-curents", `ours.yaml:18: currents names table "chain-curents", which is not there; the nearest is chain-currents`},
		{"holders: [jacket]", "holders: [jackets]", `ours.yaml:18: holders has "jackets"; write jacket, conduit, wireway, open-bundle, apart or none`},
		{"of: conductors", "of: wire", `ours.yaml:18: counting.of has "wire"; write conductors, circuits, cores or wires`},
		{"more: 0.8", "more: 80", "ours.yaml:18: fill.more is 80; write the share that may be taken, above 0 and at most 1"},
		{`{standard: house rule, edition: "3", clause: sheet 7}`, `{standard: house rule}`, "ours.yaml:2: source needs edition and clause, or from_memory: true"},
		{`{standard: house rule, edition: "3", clause: sheet 7}`, `{edition: "3"}`, "ours.yaml:2: source.standard is missing; write where the numbers come from"},
		{"group: grouping", "group: groups", `ours.yaml:11: group is "groups"; write rule, currents, ambient, grouping, free-air, bundle, altitude, terminals or devices`},
		{"title: House rule for energy chains", "", "ours.yaml:18: title is missing"},
		{"table: chain-grouping", "table: nec-310-15-c1", `ours.yaml:11: table "nec-310-15-c1" is there already; give yours another id`},
		{"rule: chain", "rule: [chain", "ours.yaml:18: this is not YAML: did not find expected ',' or ']'"},
	} {
		if !strings.Contains(string(good), c.from) {
			t.Fatalf("%q is not in the file", c.from)
		}
		b, problems := Shipped().Add("ours.yaml", []byte(strings.Replace(string(good), c.from, c.to, 1)))
		var got []string
		for _, p := range problems {
			got = append(got, p.String())
		}
		if !slices.Contains(got, c.want) || b != Shipped() {
			t.Errorf("%q: %q, want %q", c.to, got, c.want)
		}
	}
	for text, want := range map[string]string{"": "ours.yaml: nothing is in this file; write a rule set that starts with group: rule", "- a\n- b\n": "ours.yaml:1: a sheet starts with group: and the kind of its table"} {
		if _, problems := Shipped().Add("ours.yaml", []byte(text)); len(problems) != 1 || problems[0].String() != want {
			t.Errorf("%q: %v", text, problems)
		}
	}
	two := strings.Replace(strings.Replace(string(good), "amperes: [6, 14, 26]", "amps: [6, 14, 26]", 1), "more: 0.8", "more: 80", 1)
	if _, problems := Shipped().Add("ours.yaml", []byte(two)); len(problems) < 2 {
		t.Errorf("two mistakes: %v", problems)
	}
}

// TestAddNeverPanics reads broken files.
func TestAddNeverPanics(t *testing.T) {
	good, err := os.ReadFile(filepath.Join("testdata", "ours.yaml"))
	if err != nil {
		t.Fatal(err)
	}
	lines := strings.SplitAfter(string(good), "\n")
	for i := range lines {
		without := slices.Concat(lines[:i], lines[i+1:])
		cut := lines[i]
		if len(cut) > 6 {
			cut = cut[:len(cut)/2] + "\n"
		}
		for _, text := range []string{strings.Join(without, ""), strings.Join(slices.Concat(lines[:i], []string{cut}, lines[i+1:]), ""), strings.Join(lines[:i], "")} {
			b, problems := Shipped().Add("ours.yaml", []byte(text))
			if len(problems) > 0 && b != Shipped() {
				t.Errorf("line %d: a broken file changed the book", i+1)
			}
			r := Run{AmbientC: 30, Holder: Holder{Kind: Jacket}, Conductors: wires(t, "w", 7, "1.5 mm2", "", Conductor{RatingC: 90})}
			b.Apply(r, b.IDs())
		}
	}
}

// FuzzAdd reads anything and, where it reads, rates by it.
func FuzzAdd(f *testing.F) {
	names, err := filepath.Glob(filepath.Join("..", "..", "assets", "catalog", "rules", "*.yaml"))
	if err != nil || len(names) != len(files) {
		f.Fatal(names, err)
	}
	for _, name := range append(names, filepath.Join("testdata", "ours.yaml")) {
		text, err := os.ReadFile(name)
		if err != nil {
			f.Fatal(err)
		}
		for _, sheet := range strings.Split(string(text), "\n---\n") {
			f.Add([]byte(strings.NewReplacer("rule: ", "rule: x-", "table: ", "table: x-").Replace(sheet)))
		}
	}
	r := randomRun(f, 5, 5)
	f.Fuzz(func(t *testing.T, text []byte) {
		b, problems := Shipped().Add("x.yaml", text)
		for _, p := range problems {
			if p.Text == "" {
				t.Errorf("a problem without words: %+v", p)
			}
		}
		if len(problems) == 0 {
			out, _ := b.Apply(r, b.IDs()[len(Shipped().IDs()):])
			b.Terminals(r)
			b.Protect(r, []Permitted{{"computed", map[string]float64{r.Conductors[0].ID: 1}}})
			for _, o := range out {
				if o.Applies == (o.Why != "") {
					t.Errorf("%+v", o)
				}
			}
		}
	})
}

var promises = regexp.MustCompile(`(?i)\bsafe\b|\bsafely\b|complian|\bcomply|\bTODO\b|%!|NaN|Inf\b|  | ,|\(\)`)

// TestNothingIsPromised: no sentence says safe or compliant, none has a hole, and all of a run's sentences end as sentences do.
func TestNothingIsPromised(t *testing.T) {
	for _, s := range []string{"This is safe.", "The run is compliant.", "a margin of %!f(int=3)", "limit NaN A"} {
		if !promises.MatchString(s) {
			t.Errorf("%q is let through", s)
		}
	}
	seen := map[string]bool{}
	for seed := range seeds() {
		r := randomRun(t, seed, seed)
		all, _ := Shipped().Apply(r, Shipped().IDs())
		var texts []string
		var permitted []Permitted
		for _, o := range all {
			texts = append(texts, o.sentences()...)
			texts = append(texts, o.Title, o.Source.String())
			if o.Applies {
				permitted = append(permitted, Permitted{o.Rule, amounts(o)})
			}
		}
		for _, c := range Shipped().Terminals(r) {
			texts = append(texts, c.Text)
		}
		for _, p := range Shipped().Protect(r, permitted) {
			for _, c := range p.Checks {
				if !strings.HasSuffix(c.Text, ".") {
					t.Errorf("%q does not end", c.Text)
				}
				texts = append(texts, c.Text)
			}
		}
		texts = append(texts, JamOf(r).Text)
		for _, s := range texts {
			if !seen[s] && promises.MatchString(s) {
				t.Errorf("%q", s)
			}
			seen[s] = true
		}
	}
	if len(seen) < 400 {
		t.Errorf("only %d sentences", len(seen))
	}
}

func BenchmarkApply(b *testing.B) {
	r := randomRun(b, 3, 3)
	ids := Shipped().IDs()
	for b.Loop() {
		Shipped().Apply(r, ids)
	}
}

func BenchmarkRead(b *testing.B) {
	for b.Loop() {
		if _, problems := readAll(assets.Catalog, "catalog/rules"); len(problems) > 0 {
			b.Fatal(problems)
		}
	}
}

// BenchmarkApplyMost rates 500 conductors of 170 loads, the most that a section holds, by every rule set.
func BenchmarkApplyMost(b *testing.B) {
	r := Run{AmbientC: 30, Holder: wireway4x4()}
	motors(b, &r, "m", 166, "2.5 mm2", Load{CurrentA: 10, Device: Device{"breaker", 16, 1.45}}, Conductor{RatingC: 90, OutsideMM: 4})
	ids := Shipped().IDs()
	for b.Loop() {
		out, _ := Shipped().Apply(r, ids)
		Shipped().Protect(r, []Permitted{{"iec-52", amounts(out[6])}})
	}
}
