package section

import (
	"fmt"
	"strings"
	"testing"
)

// said writes what points at parts and loads.
func said(d *Document) string {
	var out []string
	for _, l := range d.Loads {
		s := l.ID + "=" + strings.Join(l.Conductors, ",")
		if l.Neutral != "" {
			s += " neutral " + l.Neutral
		}
		if len(l.NotWith) > 0 {
			s += " not " + strings.Join(l.NotWith, ",")
		}
		out = append(out, s)
	}
	states := func(list []CaseLoad) (s string) {
		for _, v := range list {
			s += " " + v.Load
			if !v.Off {
				s += fmt.Sprint(":", v.CurrentA)
			}
		}
		return s
	}
	for _, c := range d.Cases {
		s := c.ID + states(c.Loads)
		for _, a := range c.Any {
			s += fmt.Sprintf(" %d of %s", a.Count, strings.Join(a.Of, ","))
		}
		out = append(out, s)
	}
	for _, a := range d.Rules.AtMost {
		out = append(out, fmt.Sprintf("at most %d of %s", a.Count, strings.Join(a.Of, ",")))
	}
	for _, m := range d.Measurements {
		out = append(out, m.ID+" at "+m.At+states(m.Loads))
	}
	for _, v := range d.Reasons {
		out = append(out, v.For)
	}
	return strings.Join(out, "; ")
}

func TestReferencesFollow(t *testing.T) {
	d, _ := ratedFile(t)
	d = SetMeasurement(d, Measurement{ID: "pair", At: "C2/jacket", ReadingC: 50})
	d = SetReason(d, "measurement pair", "read twice")
	const all = "motor-1=L1,L2,L3 neutral N not motor-2; motor-2=M1; starter=K1; bench-heat=H1; night motor-1:20 bench-heat 1 of motor-2,starter; day motor-1:12 motor-2; " +
		"at most 1 of motor-1,motor-2; survey at jacket motor-1:18; pair at C2/jacket; limit L1; limit C1/a; design_margin_k; measurement pair"
	change := func(pairs ...string) string { return strings.NewReplacer(pairs...).Replace(all) }
	for _, c := range []struct {
		name string
		got  *Document
		want string
	}{
		{"nothing", d, all},
		{"rename the neutral", RenamePart(d, "N", "N9"), change("neutral N", "neutral N9")},
		{"rename a conductor", RenamePart(d, "L1", "X"), change("L1", "X")},
		{"rename a cable", RenamePart(d, "C2", "P"), change("C2/", "P/")},
		{"rename in a cable", RenamePart(d, "C1/a", "z"), change("C1/a", "C1/z")},
		{"delete the neutral", Delete(d, "N"), change(" neutral N", "")},
		{"the neutral becomes an earth", SetRole(d, "N", RoleEarth), change(" neutral N", "")},
		{"the neutral becomes a rod", Replace(d, Part{ID: "N", Kind: Rod, Diameter: Some(2.0), Material: "pe"}), change(" neutral N", "")},
		{"delete a cable", Delete(d, "C2"), change("; pair at C2/jacket", "", "; measurement pair", "")},
		{"delete a part with a reason", Delete(d, "L1"), change("L1,", "", "limit L1; ", "")},
		{"delete a load's last conductor", Delete(d, "M1"), change("motor-1,motor-2", "motor-1", " not motor-2", "", "motor-2=M1; ", "", "motor-2,", "", " motor-2;", ";")},
		{"unassign it", Unassign(d, "M1"), change("motor-1,motor-2", "motor-1", " not motor-2", "", "motor-2=M1; ", "", "motor-2,", "", " motor-2;", ";")},
		{"remove the load", RemoveLoad(d, "starter"), change("starter=K1; ", "", ",starter", "")},
		{"and all of any", RemoveLoad(RemoveLoad(d, "starter"), "motor-2"), change("motor-1,motor-2", "motor-1", " not motor-2", "", "motor-2=M1; ", "", "starter=K1; ", "", " 1 of motor-2,starter", "", " motor-2;", ";")},
		{"rename a load", RenameLoad(d, "motor-2", "fan"), change("motor-2", "fan")},
		{"to a name that is taken", RenameLoad(d, "motor-2", "starter"), all},
		{"a load becomes a heat", SetHeat(d, "L1", 3), change(" motor-1:20", "", " motor-1:12", "", " motor-1:18", "")},
		{"split", Split(d, "L3"), change("L2,L3", "L2", "bench-heat=H1", "bench-heat=H1; load-L3=L3 neutral N not motor-2", "bench-heat 1", "bench-heat load-L3:20 1", "motor-2; at", "motor-2 load-L3:12; at", ":18", ":18 load-L3:18")},
		{"remove a survey", RemoveMeasurement(d, "pair"), change("; pair at C2/jacket", "", "; measurement pair", "")},
		{"rename a survey", RenameMeasurement(d, "pair", "two"), change("; pair at", "; two at", "measurement pair", "measurement two")},
		{"exchange what two carry", SwapLoads(d, "L1", "M1"), change("L1,L2", "M1,L2", "=M1", "=L1")},
		{"and what a neutral is", SwapLoads(d, "N", "M1"), change("=M1", "=N", "neutral N", "neutral M1")},
		{"assign", Assign(d, "M1", "starter"), change("motor-1,motor-2", "motor-1", " not motor-2", "", "motor-2=M1; ", "", "motor-2,", "", " motor-2;", ";", "=K1", "=K1,M1")},
		{"not with", SetNotWith(d, "motor-2", "starter"), change(" not motor-2", "", "=M1", "=M1 not starter")},
		{"not with what says so itself", SetNotWith(d, "motor-2", "motor-1", "starter", "motor-2", "none"), change("=M1", "=M1 not starter")},
	} {
		if got := said(c.got); got != c.want {
			t.Errorf("%s:\n%s\nwant\n%s", c.name, got, c.want)
		}
		if p := Check(c.got); len(p) > 0 {
			t.Errorf("%s: %v", c.name, p)
		}
	}
}

// A copy of a cable keeps what is said about the loads in it.
func TestDuplicateKeepsWhatIsSaid(t *testing.T) {
	d, _ := ratedFile(t)
	c, id := Duplicate(d, "M1")
	if got := said(c); id != "M2" || !strings.Contains(got, "neutral N not motor-2,load-M2") || !strings.Contains(got, "load-M2=M2") || !strings.Contains(got, "day motor-1:12 motor-2 load-M2") {
		t.Errorf("%s: %s", id, got)
	}
	if c, id := Duplicate(d, "L1"); c.LimitReason(id) != "data sheet 7" || Find(c, id).Pinned || Find(c, id).LimitC != Some(105.0) {
		t.Errorf("%s: %+v %q", id, Find(c, id), c.LimitReason(id))
	}
	if l := LoadNamed(c, "load-M2"); l.Protection.RatingA != 16 || l.Terminals.RatedA != Some(57.0) {
		t.Errorf("%+v", l)
	}
}

func TestCasesApplied(t *testing.T) {
	d, _ := ratedFile(t)
	d = SetCurrent(d, "M1", Opt[float64]{}) // unknown
	currents := func(d *Document) (s string) {
		for _, l := range d.Loads {
			switch {
			case l.Unknown:
				s += "? "
			case l.HeatWM.OK:
				s += fmt.Sprint(l.HeatWM.V, "W ")
			default:
				s += fmt.Sprint(l.CurrentA.V, " ")
			}
		}
		return s + fmt.Sprint(d.Surroundings.AmbientC.V)
	}
	for _, c := range []struct{ name, got, want string }{
		{"as designed", currents(d), "16 ? 0.5 5W 33"},
		{"night", currents(WithCase(d, "night")), "20 ? 0.5 0W 10"},
		{"day: an unknown load that is off is known", currents(WithCase(d, "day")), "12 0 0.5 5W 33"},
		{"none", currents(WithCase(d, "noon")), "16 ? 0.5 5W 33"},
		{"scaled: heats and unknowns stay", currents(ScaleLoads(d, 1.5)), "24 ? 0.75 5W 33"},
		{"off", currents(SwitchOff(d, "motor-2", "bench-heat", "none")), "16 0 0.5 0W 33"},
		{"a current of a heat is left aside", currents(WithStates(d, []CaseLoad{{Load: "bench-heat", CurrentA: 3}})), "16 ? 0.5 5W 33"},
	} {
		if c.got != c.want {
			t.Errorf("%s: %s; want %s", c.name, c.got, c.want)
		}
	}
	if WithCase(d, "noon") != d || ScaleLoads(d, 1) != d || WithStates(d, nil) != d || SwitchOff(d, "none") != d {
		t.Error("what changes nothing makes a new document")
	}
}

// A margin of 0 comes and goes with its reason.
func TestMarginAndReason(t *testing.T) {
	d, _ := ratedFile(t)
	d = d.With(func(d *Document) { d.DesignMarginK, d.Reasons = Opt[float64]{}, nil })
	if SetMargin(d, Some(0.0), " ") != d || SetMargin(d, Some(-1.0), "x") != d {
		t.Error("a margin of 0 without a reason, or a negative one")
	}
	none := SetMargin(d, Some(0.0), "type test 12")
	if len(Check(none)) > 0 || none.Reason(ReasonMargin) != "type test 12" || SetReason(none, ReasonMargin, "") != none {
		t.Errorf("%v %+v", Check(none), none.Reasons)
	}
	if back := SetMargin(none, Some(5.0), ""); back.Reason(ReasonMargin) != "" || back.DesignMarginK != Some(5.0) || len(Check(back)) > 0 {
		t.Errorf("%+v", back.Reasons)
	}
}

// What can't run together no longer does in the cases.
func TestNotWithSettlesCases(t *testing.T) {
	d, _ := ratedFile(t)
	d = SetCase(SetNotWith(d, "motor-1"), Case{ID: "both", Loads: []CaseLoad{{Load: "motor-1", CurrentA: 3}, {Load: "motor-2", CurrentA: 4}}})
	d = SetNotWith(d, "motor-1", "motor-2")
	if c := CaseNamed(d, "both"); !c.Loads[1].Off || c.Loads[0].CurrentA != 3 || len(Check(d)) > 0 {
		t.Errorf("%+v %v", c, Check(d))
	}
}

// Taking a part out of one cable leaves the other cables of its build alone, also where cables lie in cables.
func TestWithoutPart(t *testing.T) {
	d, _ := ratedFile(t)
	got := WithoutPart(d, "C1/a")
	if Find(got, "C1/a") != nil || Find(got, "C2/a") == nil || len(got.Builds) != 2 || len(Check(got)) > 0 {
		t.Errorf("%+v %v", got.Builds, Check(got))
	}
	if strings.Contains(said(got), "limit C1/a") || got.LimitReason("C2/a") != "tested" {
		t.Error(said(got))
	}
	inner := func(id string) Part { return Part{ID: id, Kind: Cable, Build: "inner"} }
	open := Holder{Kind: OpenBundle}
	deep := &Document{
		Surroundings: Surroundings{Kind: FixedWall, AmbientC: Some(30.0)}, Holder: open, Parts: []Part{{ID: "A", Kind: Cable, Build: "outer"}, {ID: "B", Kind: Cable, Build: "outer"}},
		Builds: []Build{{"inner", open, []Part{{ID: "k", Kind: Core, Stock: "x"}, {ID: "l", Kind: Core, Stock: "x"}}}, {"outer", open, []Part{inner("x"), inner("y")}}},
	}
	got = WithoutPart(deep, "A/x/k")
	var left []string
	for _, p := range Unfold(got) {
		left = append(left, p.ID)
	}
	if s := strings.Join(left, " "); s != "A/x/l A/y/k A/y/l B/x/k B/x/l B/y/k B/y/l" || len(Check(got)) > 0 {
		t.Errorf("%s %v", s, Check(got))
	}
	if again := WithoutPart(got, "A/x/l"); len(again.Builds) != len(got.Builds) || WithoutPart(d, "none") != d {
		t.Error("a build of its own is made anew")
	}
}

func TestSwap(t *testing.T) {
	d := &Document{Parts: []Part{{ID: "a", At: Some(Point{1, 2}), TurnDeg: Some(9.0)}, {ID: "b", At: Some(Point{3, 4})}, {ID: "c"}}}
	got := Swap(d, "a", "b")
	if Find(got, "a").At != Some(Point{3, 4}) || Find(got, "b").At != Some(Point{1, 2}) || Find(got, "a").TurnDeg != Some(9.0) || Find(got, "b").TurnDeg.OK {
		t.Errorf("%+v", got.Parts)
	}
	if s := Swap(got, "b", "a"); !Equal(s, d) {
		t.Errorf("twice: %+v", s.Parts)
	}
	if s := Swap(d, "a", "c"); Find(s, "a").At.OK || Find(s, "c").At != Some(Point{1, 2}) {
		t.Errorf("%+v", s.Parts)
	}
	if Swap(d, "a", "a") != d || Swap(d, "a", "x") != d {
		t.Error("a swap of nothing")
	}
}
