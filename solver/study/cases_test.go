package study

import (
	"context"
	"fmt"
	"math"
	"slices"
	"strings"
	"testing"

	"packrise/solver/rating"
	"packrise/solver/section"
)

// row is a flat of n equal cores in a solid, each with a load of its own of amperes(i).
func row(t *testing.T, n int, tail string, amperes func(i int) float64) *section.Document {
	t.Helper()
	var b strings.Builder
	b.WriteString("packrise: 1\nsurroundings: {kind: fixed-film, ambient_c: 30, film_w_m2k: 9}\n")
	b.WriteString("holder: {kind: jacket, inside_mm: 60, fill: sand, layers: [{material: ins, thickness_mm: 1}]}\nmaterials: {sand: {k_w_mk: 0.3}, ins: {k_w_mk: 0.2}}\nparts:\n")
	loads := "loads:\n"
	for i := range n {
		a := 2 * math.Pi * float64(i) / float64(n)
		r := 10 + 12*float64(i%2)
		fmt.Fprintf(&b, "  - {id: W%d, kind: core, conductor: {area_mm2: 1.5}, layers: [{material: ins, thickness_mm: 0.5}], at_mm: [%.3f, %.3f], limit_c: 70}\n", i+1, r*math.Cos(a), r*math.Sin(a))
		loads += fmt.Sprintf("  - {id: l%d, conductors: [W%d], current_a: %g}\n", i+1, i+1, amperes(i))
	}
	return read(t, b.String()+loads+tail)
}

// TestCasesBruteForce: the worst choice of any 3 of 6 is that of all 20 solved in full, for each conductor too; the permitted factor of the
// case is the smallest of theirs.
func TestCasesBruteForce(t *testing.T) {
	d := row(t, 7, "cases: [{id: some, ambient_c: 35, any: [{of: [l1, l2, l3, l4, l5, l6], count: 3}]}, {id: cool, loads: {l7: off}}]\n", func(i int) float64 { return 14 + 4*float64(i%3) })
	s := New(cat)
	ctx := context.Background()
	base, err := s.solve(ctx, d, Options{})
	if err != nil {
		t.Fatal(err)
	}
	got, err := s.Cases(ctx, d, base, nil, nil, Options{})
	if err != nil {
		t.Fatal(err)
	}
	if len(got.List) != 3 || got.List[1].Of != 20 || got.List[1].Searched {
		t.Fatalf("%+v", got.List)
	}
	doc := section.WithCase(d, "some")
	sc := screen{groups: [][]string{d.Cases[0].Any[0].Of}, counts: []int{3}}
	hot := map[string]float64{}
	least := math.Inf(1)
	var worst *rating.Result
	var off []string
	for _, on := range sc.all() {
		r, err := s.solve(ctx, section.SwitchOff(doc, sc.off(on)...), Options{})
		if err != nil {
			t.Fatal(err)
		}
		for _, x := range things(r) {
			if v, ok := hot[x.id]; !ok || x.tempC > v {
				hot[x.id] = x.tempC
			}
		}
		if _, k, _ := closest(things(r), nominal); k < least {
			least, worst, off = k, r, sc.off(on)
		}
	}
	a := got.List[1]
	if math.Abs(a.Result.Governing.MarginK-least) > 0.02 || a.Governs != worst.Governing.Part {
		t.Errorf("worst choice %v off, %.3f K left; solved one by one %v off, %.3f K", a.Off, a.Result.Governing.MarginK, off, least)
	}
	for _, w := range got.Worst {
		if w.Case == "some" && math.Abs(w.TempC-hot[w.ID]) > 0.02 || w.TempC < hot[w.ID]-0.02 {
			t.Errorf("%s: hottest %.2f °C in %q, one by one %.2f °C", w.ID, w.TempC, w.Case, hot[w.ID])
		}
	}
	if a.Rely.Factor >= a.Nominal.Factor || got.Smallest.Rely.Factor > a.Rely.Factor || got.Smallest.Nominal.Factor > got.List[2].Nominal.Factor {
		t.Errorf("%.4f and %.4f, smallest %.4f", a.Nominal.Factor, a.Rely.Factor, got.Smallest.Rely.Factor)
	}
	// every choice at the case's own factor is inside
	for _, on := range sc.all() {
		r, err := s.solve(ctx, scaleAll(section.SwitchOff(doc, sc.off(on)...), a.Nominal.Factor), Options{})
		if err != nil {
			t.Fatal(err)
		}
		if r.Governing.MarginK < -0.05 {
			t.Errorf("%v off at factor %.4f: %.3f K over", sc.off(on), a.Nominal.Factor, -r.Governing.MarginK)
		}
	}
	t.Log(a.Sentence())
}

// TestCasesSearched: beyond 2000 choices the worst of any 6 of 16 is searched, is not beaten by chance, and stays under its bound.
func TestCasesSearched(t *testing.T) {
	var of []string
	for i := range 16 {
		of = append(of, fmt.Sprintf("l%d", i+1))
	}
	d := row(t, 16, "cases: [{id: many, any: [{of: ["+strings.Join(of, ", ")+"], count: 6}]}]\n", func(i int) float64 { return 10 + float64(i*7%5) })
	s := New(cat)
	ctx := context.Background()
	base, err := s.solve(ctx, d, Options{})
	if err != nil {
		t.Fatal(err)
	}
	got, err := s.Cases(ctx, d, base, nil, nil, Options{})
	if err != nil {
		t.Fatal(err)
	}
	a := got.List[1]
	if !a.Searched || len(a.Off) != 10 {
		t.Fatalf("%+v", a)
	}
	t.Log(a.Sentence())
	hot := a.Result.Governing.TempC
	if a.BoundC < hot-1e-9 || a.BoundC > hot+3 {
		t.Errorf("bound %.2f °C, found %.2f °C", a.BoundC, hot)
	}
	for n := range 12 {
		off := slices.Clone(of)
		for i := range off { // some order
			j := (i*(2*n+3) + n) % 16
			off[i], off[j] = off[j], off[i]
		}
		r, err := s.solve(ctx, section.SwitchOff(d, off[:10]...), Options{})
		if err != nil {
			t.Fatal(err)
		}
		if r.Governing.MarginK < a.Result.Governing.MarginK-0.02 {
			t.Errorf("%v off is worse: %.2f °C", off[:10], r.Governing.TempC)
		}
	}
}

// TestAtDevices: an unknown current is taken at its device's rating and counted; without a device it stays unknown and is refused.
func TestAtDevices(t *testing.T) {
	d := read(t, oneWire)
	d = section.ChangeLoad(d, "a", func(l *section.Load) { l.CurrentA, l.Unknown = section.Opt[float64]{}, true })
	s := New(cat)
	if _, err := s.Rate(context.Background(), d, nil, Options{}); err == nil {
		t.Error("an unknown current was rated")
	}
	d = section.SetProtection(d, "a", section.Protection{Kind: section.Breaker, RatingA: 16})
	r, err := s.Rate(context.Background(), d, nil, Options{})
	if err != nil {
		t.Fatal(err)
	}
	if a := r.Base.Conductors[0].CurrentA; a != section.Some(16.0) || len(r.AtDevice) != 1 {
		t.Errorf("taken as %v, %v", a, r.AtDevice)
	}
	answer, _ := r.Sentence()
	if !strings.Contains(answer, "rating of its device") || !strings.Contains(strings.Join(r.Base.Notes, "\n"), "16 A") {
		t.Errorf("%s\n%v", answer, r.Base.Notes)
	}
}

// TestRateCases: a case that is over makes the whole answer so, and names itself.
func TestRateCases(t *testing.T) {
	d := read(t, oneWire)
	d = section.SetCase(d, section.Case{ID: "summer", AmbientC: section.Some(66.0)})
	r, err := New(cat).Rate(context.Background(), d, nil, Options{})
	if err != nil {
		t.Fatal(err)
	}
	answer, amperes := r.Sentence()
	if r.StateHere != Within || r.State != Over || !strings.Contains(answer, "Over. Case summer") || !strings.Contains(amperes, "whichever case") {
		t.Errorf("%s here, %s in all: %s %s", r.StateHere, r.State, answer, amperes)
	}
	if r.Cases.NominalIn != "summer" || r.All.Nominal.Factor >= 1 || r.Lowest[0].Computed > 10*r.All.Rely.Factor+1e-9 {
		t.Errorf("%s: %.3f; lowest %.3f", r.Cases.NominalIn, r.All.Nominal.Factor, r.Lowest[0].Computed)
	}
}

// TestChoices: combinations of several groups, and where the number of them ends.
func TestChoices(t *testing.T) {
	s := screen{groups: [][]string{{"a", "b", "c"}, {"d", "e"}}, counts: []int{2, 1}}
	all := s.all()
	if len(all) != 6 || s.number() != 6 {
		t.Fatalf("%d listed, %d counted", len(all), s.number())
	}
	seen := map[string]bool{}
	for _, on := range all {
		off := s.off(on)
		seen[strings.Join(off, " ")] = true
		if len(off) != 2 {
			t.Errorf("%v off", off)
		}
	}
	if len(seen) != 6 {
		t.Errorf("only %v", seen)
	}
	for _, c := range []struct{ n, k, want int }{{22, 3, 1540}, {24, 3, mostChoices + 1}, {5, 0, 1}, {5, 5, 1}, {3, 4, 0}} {
		var of []string
		for i := range c.n {
			of = append(of, fmt.Sprint(i))
		}
		if got := (&screen{groups: [][]string{of}, counts: []int{c.k}}).number(); got != c.want {
			t.Errorf("any %d of %d: %d combinations, want %d", c.k, c.n, got, c.want)
		}
	}
}

// TestCasesRunaway: of any one of two, the one without a steady temperature is found, in whatever order they stand.
func TestCasesRunaway(t *testing.T) {
	for _, of := range [][]string{{"l1", "l2"}, {"l2", "l1"}} {
		d := row(t, 3, "", func(i int) float64 { return []float64{5, 500, 5}[i] })
		d = section.SetCase(d, section.Case{ID: "one", Any: []section.AnyOf{{Of: of, Count: 1}}})
		s := New(cat)
		base, err := s.solve(context.Background(), section.SwitchOff(d, "l2"), Options{})
		if err != nil {
			t.Fatal(err)
		}
		c, err := s.Cases(context.Background(), d, base, nil, nil, Options{})
		if err != nil {
			t.Fatal(err)
		}
		if a := c.List[1]; a.State != Over || !slices.Equal(a.Off, []string{"l1"}) {
			t.Errorf("%v: %s with %v off", of, a.State, a.Off)
		}
	}
}

// TestCasesEnds: none or all of a group, a case without a steady temperature, one that nothing but its ambient tells apart.
func TestCasesEnds(t *testing.T) {
	d := row(t, 4, "", func(int) float64 { return 12 })
	of := []string{"l1", "l2", "l3"}
	d = section.SetCase(d, section.Case{ID: "none", Any: []section.AnyOf{{Of: of, Count: 0}}})
	d = section.SetCase(d, section.Case{ID: "all", Any: []section.AnyOf{{Of: of, Count: 3}}})
	d = section.SetCase(d, section.Case{ID: "wild", Any: []section.AnyOf{{Of: of, Count: 2}}, Loads: []section.CaseLoad{{Load: "l4", CurrentA: 500}}})
	s := New(cat)
	base, err := s.solve(context.Background(), d, Options{})
	if err != nil {
		t.Fatal(err)
	}
	c, err := s.Cases(context.Background(), d, base, nil, nil, Options{})
	if err != nil {
		t.Fatal(err)
	}
	for i := range c.List {
		t.Log(c.List[i].Sentence())
	}
	if n := len(c.List[1].Off); n != 3 {
		t.Errorf("none: %d off", n)
	}
	if a := c.List[2]; len(a.Off) != 0 || math.Abs(a.Result.Governing.MarginK-base.Governing.MarginK) > 0.01 {
		t.Errorf("all: %v off, %.3f K, as written %.3f K", a.Off, a.Result.Governing.MarginK, base.Governing.MarginK)
	}
	if a := c.List[3]; a.State != Over || a.Nominal.Factor >= 0.5 || a.Nominal.Factor <= 0 || !math.IsInf(c.Worst[3].TempC, 1) || c.RelyIn != "wild" {
		t.Errorf("wild: %s, %.4f; worst %+v, smallest in %q", a.State, a.Nominal.Factor, c.Worst[3], c.RelyIn)
	}
}
