package section

import (
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
	"github.com/google/go-cmp/cmp/cmpopts"
	"pgregory.net/rapid"
)

// deep returns a copy that shares nothing with d but the file that it came from.
func deep(t fataler, d *Document) *Document {
	c := *d
	c.Parts = deepParts(d.Parts)
	c.Builds = mapped(d.Builds, func(b Build) Build {
		b.Parts = deepParts(b.Parts)
		b.Holder.Layers = mapped(b.Holder.Layers, id[Layer])
		return b
	})
	c.Holder.Layers = mapped(d.Holder.Layers, id[Layer])
	c.Loads = mapped(d.Loads, func(l Load) Load {
		l.Conductors, l.NotWith = mapped(l.Conductors, id[string]), mapped(l.NotWith, id[string])
		return l
	})
	c.Cases = mapped(d.Cases, func(c Case) Case {
		c.Loads = mapped(c.Loads, id[CaseLoad])
		c.Any = mapped(c.Any, func(a AnyOf) AnyOf { a.Of = mapped(a.Of, id[string]); return a })
		return c
	})
	c.Measurements = mapped(d.Measurements, func(m Measurement) Measurement { m.Loads = mapped(m.Loads, id[CaseLoad]); return m })
	c.Rules.AtMost = mapped(d.Rules.AtMost, func(a AnyOf) AnyOf { a.Of = mapped(a.Of, id[string]); return a })
	c.Rules.Use, c.Rules.Files, c.Reasons = mapped(d.Rules.Use, id[string]), mapped(d.Rules.Files, id[string]), mapped(d.Reasons, id[Reason])
	c.Materials = mapped(d.Materials, id[Material])
	c.StockUsed = mapped(d.StockUsed, id[StockRow])
	if s := exact(d, &c); s != "" {
		t.Fatal("the copy differs: " + s)
	}
	return &c
}

func id[T any](v T) T { return v }

func deepParts(parts []Part) []Part {
	return mapped(parts, func(p Part) Part {
		if p.Conductor != nil {
			c := *p.Conductor
			p.Conductor = &c
		}
		p.Layers = mapped(p.Layers, id[Layer])
		return p
	})
}

func exact(a, b *Document) string {
	return cmp.Diff(a, b, cmpopts.IgnoreUnexported(Document{}), cmpopts.EquateEmpty())
}

// No edit touches the document that it is given, even where later edits share its slices.
func TestEditsNeverTouchTheirDocument(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		docs := []*Document{maker{rt}.document()}
		var copies []*Document
		for range 4 {
			last := docs[len(docs)-1]
			copies = append(copies, deep(rt, last))
			docs = append(docs, edited(rt, last))
			if p := rapid.SampledFrom(append(UnfoldAll(last), Place{ID: "none"})).Draw(rt, "again"); last.Holder.Kind != NoHolder {
				more, _ := Duplicate(last, p.ID) // a second edit of the same document
				_ = PlaceAll(Replace(SetHeat(Unassign(more, p.ID), p.ID, 3), Part{ID: p.ID, Kind: Rod, Diameter: Some(1.0), Material: "x"}), map[string]Point{p.ID: {1, 1}, "C1": {2, 2}})
			}
			for i, c := range copies {
				if s := exact(c, docs[i]); s != "" {
					rt.Fatalf("document %d was touched:\n%s", i, s)
				}
			}
		}
	})
}

func TestEdits(t *testing.T) {
	d, _ := commented(t)
	ids := func(d *Document) string {
		var out []string
		for _, p := range UnfoldAll(d) {
			out = append(out, p.ID)
		}
		return strings.Join(out, " ")
	}
	loads := func(d *Document) string {
		var out []string
		for _, l := range d.Loads {
			s := l.ID + "=" + strings.Join(l.Conductors, ",")
			switch {
			case l.Unknown:
				s += ":?"
			case l.CurrentA.OK:
				s += ":" + shown(l.CurrentA.V) + "A"
			case l.HeatWM.OK:
				s += ":" + shown(l.HeatWM.V) + "W"
			}
			out = append(out, s)
		}
		return strings.Join(out, " ")
	}
	is := func(what, got, want string) {
		t.Helper()
		if got != want {
			t.Errorf("%s: %s; want %s", what, got, want)
		}
	}
	is("parts", ids(d), "L1 L2 H1 H2 C1 C1/a C1/b")
	is("loads", loads(d), "pump=L1,L2:16A heater=H1,H2:? sensor=C1/a:0.1W")
	is("delete a cable", loads(Delete(d, "C1")), "pump=L1,L2:16A heater=H1,H2:?")
	is("delete a nested part", ids(Delete(d, "C1/a", "L1")), "L2 H1 H2 C1 C1/b")
	is("and its load", loads(Delete(d, "C1/a", "L1")), "pump=L2:16A heater=H1,H2:?")
	is("current of a shared load", loads(SetCurrent(d, "L2", Some(9.0))), "pump=L1,L2:9A heater=H1,H2:? sensor=C1/a:0.1W")
	is("unknown current", loads(SetCurrent(d, "C1/a", Opt[float64]{})), "pump=L1,L2:16A heater=H1,H2:? sensor=C1/a:?")
	is("current of an unassigned one", loads(SetCurrent(d, "C1/b", Some(0.0))), "pump=L1,L2:16A heater=H1,H2:? sensor=C1/a:0.1W load-C1-b=C1/b:0A")
	is("split", loads(SetCurrent(Split(d, "L1"), "L1", Some(2.0))), "pump=L2:16A heater=H1,H2:? sensor=C1/a:0.1W load-L1=L1:2A")
	is("unassign", loads(Unassign(Unassign(d, "L1"), "C1/a")), "pump=L2:16A heater=H1,H2:?")
	is("rename nested", loads(RenamePart(d, "C1/a", "x")), "pump=L1,L2:16A heater=H1,H2:? sensor=C1/x:0.1W")
	is("rename cable", ids(RenamePart(d, "C1", "S")), "L1 L2 H1 H2 S S/a S/b")
	c, name := Duplicate(d, "C1")
	is("duplicate", ids(c), "L1 L2 H1 H2 C1 C1/a C1/b C2 C2/a C2/b")
	is("what the copy carries", name+" "+loads(c), "C2 pump=L1,L2:16A heater=H1,H2:? sensor=C1/a:0.1W load-C2=C2/a:0.1W")
	if Find(c, "C2").At.OK {
		t.Error("the copy lies on top of the original")
	}
	is("both cables of a build lose a part", loads(Delete(c, "C2/a")), "pump=L1,L2:16A heater=H1,H2:?")
	is("replaced by a rod", loads(Replace(d, Part{ID: "L1", Kind: Rod})), "pump=L2:16A heater=H1,H2:? sensor=C1/a:0.1W")
	is("nested replaced", Find(Replace(d, Part{ID: "C1/a", Kind: Core, Stock: "s"}), "C1/a").ID, "a")
	is("fresh id", FreshID(d, "L")+FreshID(d, "H")+FreshID(d, "C")+FreshID(d, "x/")+FreshID(d, ""), "L3H3C2x-1P1")
	is("load of", LoadOf(d, "H2").ID, "heater")
	placed := PlaceAll(d, map[string]Point{"L1": {1, 2}, "H2": {3, 4}, "C1/a": {5, 6}, "none": {7, 8}})
	if Find(placed, "L1").At.V != (Point{1, 2}) || Find(placed, "H2").At != Some(Point{3, 4}) || Find(placed, "C1/a").At.V != (Point{5, 6}) {
		t.Error("not all parts are placed")
	}
	if LoadOf(d, "C1/b") != nil || Find(d, "C1/none") != nil || Find(d, "L1/a") != nil || Find(d, "") != nil {
		t.Error("something is found that isn't there")
	}
}

// Edits that change nothing return the document itself.
func TestIdleEdits(t *testing.T) {
	d, _ := commented(t)
	for name, got := range map[string]*Document{
		"move":         Move(d, "L1", d.Parts[0].At.V),
		"move none":    Move(d, "none", Point{}),
		"place all":    PlaceAll(d, map[string]Point{"none": {}}),
		"delete":       Delete(d, "none", "C1/none"),
		"replace":      Replace(d, d.Parts[0]),
		"replace none": Replace(d, Part{ID: "none"}),
		"current":      SetCurrent(d, "L1", Some(16.0)),
		"of a cable":   SetCurrent(d, "C1", Some(16.0)),
		"of none":      SetCurrent(d, "none", Some(16.0)),
		"limit":        SetLimit(d, "L1", Opt[float64]{}),
		"rename":       RenamePart(d, "L1", "L1"),
		"rename taken": RenamePart(d, "L1", "L2"),
		"rename slash": RenamePart(d, "L1", "a/b"),
		"rename empty": RenamePart(d, "L1", ""),
		"split alone":  Split(d, "C1/a"),
		"split none":   Split(d, "none"),
		"unassign":     Unassign(d, "C1/b"),
		"unplace":      Unplace(d, "H2"),
	} {
		if got != d {
			t.Errorf("%s makes another document", name)
		}
	}
	if c, name := Duplicate(d, "C1/a"); c != d || name != "" {
		t.Error("a nested part is duplicated")
	}
}

// Places of nested parts, by hand: a cable at (10, 0) turned by 90° carries a cable at (0, 2) turned by 30° with a core at (1, 0).
func TestUnfoldPlaces(t *testing.T) {
	d := &Document{
		Parts: []Part{
			{ID: "C", Kind: Cable, Build: "outer", At: Some(Point{10, 0}), TurnDeg: Some(90.0)},
			{ID: "D", Kind: Cable, Build: "inner"},
		},
		Builds: []Build{
			{Name: "outer", Parts: []Part{{ID: "i", Kind: Cable, Build: "inner", At: Some(Point{0, 2}), TurnDeg: Some(30.0)}}},
			{Name: "inner", Parts: []Part{{ID: "k", Kind: Core, At: Some(Point{1, 0})}, {ID: "r", Kind: Rod}}},
		},
	}
	all := UnfoldAll(d)
	want := []Place{
		{ID: "C", Depth: 0, At: Some(Point{10, 0}), TurnDeg: 90},
		{ID: "C/i", Depth: 1, At: Some(Point{8, 0}), TurnDeg: 120},
		{ID: "C/i/k", Depth: 2, At: Some(Point{7.5, 0.8660254037844386}), TurnDeg: 120}, // cos 120° = −1/2, sin 120° = √3/2
		{ID: "C/i/r", Depth: 2, TurnDeg: 120},
		{ID: "D", Depth: 0},
		{ID: "D/k", Depth: 1},
		{ID: "D/r", Depth: 1},
	}
	if s := cmp.Diff(want, all, cmpopts.IgnoreFields(Place{}, "Part"), cmpopts.EquateApprox(0, 1e-12)); s != "" {
		t.Error(s)
	}
	if all[2].Part != &d.Builds[1].Parts[0] {
		t.Error("the part is not the document's own")
	}
	if c := Unfold(d); len(c) != 2 || c[0].ID != "C/i/k" || c[1].ID != "D/k" {
		t.Errorf("conductors: %v", c)
	}
}
