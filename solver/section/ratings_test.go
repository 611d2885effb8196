package section

import (
	"os"
	"strings"
	"testing"
)

// ratedFile is a design with every key of the block of ratings; the numbers are invented.
func ratedFile(t testing.TB) (*Document, string) {
	text, err := os.ReadFile("testdata/rated.yaml")
	if err != nil {
		t.Fatal(err)
	}
	d, problems := Read(text)
	if len(problems) > 0 {
		t.Fatal(problems)
	}
	return d, string(text)
}

func TestReadRatings(t *testing.T) {
	d, text := ratedFile(t)
	again, err := Write(d)
	if err != nil || string(again) != text {
		t.Fatalf("%v\n%s", err, changedLines(text, string(again)))
	}
	want := []Load{
		{
			ID: "motor-1", Conductors: []string{"L1", "L2", "L3"}, CurrentA: Some(16.0), FrequencyHz: Some(50.0), System: ThreePhase, Neutral: "N", VoltsV: Some(400.0),
			PowerFactor: Some(0.85), Continuous: true, Motor: true, Nonlinear: true, Protection: Protection{Breaker, 20, Some(1.45)}, NotWith: []string{"motor-2"}, Terminals: Terminals{RatingC: Some(75.0)},
		},
		{ID: "motor-2", Conductors: []string{"M1"}, CurrentA: Some(9.0), Protection: Protection{Kind: Fuse, RatingA: 16}, Terminals: Terminals{RatedA: Some(57.0)}},
		{ID: "starter", Conductors: []string{"K1"}, CurrentA: Some(0.5), StartingDuty: true},
		{ID: "bench-heat", Conductors: []string{"H1"}, HeatWM: Some(5.0)},
	}
	e := d.With(func(d *Document) { d.Loads = want })
	if s := diff(d, e); s != "" {
		t.Error(s)
	}
	c := d.Cases[0]
	if c.ID != "night" || c.AmbientC != Some(10.0) || len(c.Loads) != 2 || c.Loads[0] != (CaseLoad{Load: "motor-1", CurrentA: 20}) || c.Loads[1] != (CaseLoad{Load: "bench-heat", Off: true}) ||
		len(c.Any) != 1 || c.Any[0].Count != 1 || strings.Join(c.Any[0].Of, " ") != "motor-2 starter" {
		t.Errorf("%+v", c)
	}
	if d.Ranges != (Ranges{Some(5.0), Some(10.0), Some(15.0), Some(0.1), Some(Span{0, 0.5}), Some(0.2)}) {
		t.Errorf("%+v", d.Ranges)
	}
	m := d.Measurements[0]
	if m.At != Jacket || m.ReadingC != 61 || m.InstrumentEmissivity != Some(0.95) || m.SurfaceEmissivity != Some(0.25) || m.ReflectedC != Some(30.0) || m.LoadedForMin != Some(90.0) ||
		m.Along != Even || m.Cover != Opened || m.Loads[0] != (CaseLoad{Load: "motor-1", CurrentA: 18}) {
		t.Errorf("%+v", m)
	}
	if d.Rules.Method != "B1" || d.Rules.Inside != InPanel || d.Rules.Arrangement != LayerTray || d.Rules.AtMost[0].Count != 1 || strings.Join(d.Rules.Use, " ") != "nec-310 iec-52" || d.Rules.Files[0] != "ours.yaml" {
		t.Errorf("%+v", d.Rules)
	}
	if d.DesignMarginK != Some(0.0) || d.Reason(ReasonMargin) != "tested at the maker's" || d.LimitReason("L1") != "data sheet 7" || d.LimitReason("L2") != "" || d.LimitReason("C2/a") != "tested" {
		t.Errorf("%+v", d.Reasons)
	}
	if d.Holder.LengthM != Some(0.5) || !d.Parts[0].Pinned || d.Parts[0].Group != "motor-1-phases" || d.Holder.Layers[0].Screen != (Screen{Braid, Some(0.85), BondedBoth}) {
		t.Errorf("%+v %+v", d.Holder, d.Parts[0])
	}
	if !NotTogether(d, "motor-2", "motor-1") || !NotTogether(d, "motor-1", "motor-2") || NotTogether(d, "motor-1", "starter") || NotTogether(d, "motor-1", "motor-1") {
		t.Error("what can't run together")
	}
}

// Comments and the form of what did not change stay where the person wrote them.
func TestPatchRatings(t *testing.T) {
	d, text := ratedFile(t)
	for _, c := range []struct {
		name string
		edit func(*Document) *Document
		want string // the lines that change
	}{
		{"protection", func(d *Document) *Document { return SetProtection(d, "motor-2", Protection{Kind: Fuse, RatingA: 10}) }, "rating_a: 10"},
		{"margin", func(d *Document) *Document { return SetMargin(d, Some(8.0), "") }, "design_margin_k: 8"},
		{"ranges", func(d *Document) *Document {
			v := d.Ranges
			v.AmbientK = Some(7.0)
			return SetRanges(d, v)
		}, "ambient_k: 7"},
		{"case", func(d *Document) *Document { return RenameCase(d, "night", "winter night") }, "id: winter night"},
		{"off", func(d *Document) *Document {
			c := d.Cases[1]
			c.Loads = []CaseLoad{{Load: "motor-1", Off: true}, {Load: "motor-2", CurrentA: 9}}
			return SetCase(d, c)
		}, `motor-1: "off"`},
		{"reason", func(d *Document) *Document { return SetReason(d, "limit L1", "data sheet 8") }, "limit L1: data sheet 8"},
	} {
		got, err := Write(c.edit(d))
		if err != nil || string(got) == text {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		changed := changedLines(text, string(got))
		if !strings.Contains(changed, c.want) || strings.Count(string(got), "#") != strings.Count(text, "#") || strings.Count(changed, "\n") > 8 {
			t.Errorf("%s: changed\n%s", c.name, changed)
		}
	}
}
