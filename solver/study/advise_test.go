package study

import (
	"context"
	"errors"
	"math"
	"os"
	"slices"
	"strings"
	"testing"
	"time"

	"packrise/assets"
	"packrise/solver/section"
)

// TestAdvise holds every change to a full solution of its own document by a fresh study: the gain, what governs, what it costs.
func TestAdvise(t *testing.T) {
	names := []string{"nine-in-emt"}
	if testing.Short() {
		names = []string{"filled-control-cable"}
	}
	if os.Getenv("PACKRISE_SOAK") != "" {
		names = append(names, "stage-multicore", "robot-umbilical", "wireway-38", "harness-altitude", "filled-control-cable", "roof-strings", "strings-spread")
	}
	for _, name := range names {
		d := demo(t, name)
		ctx := context.Background()
		o := Options{AssumeIdle: true}
		start := time.Now()
		a, err := New(cat).Advise(ctx, d, nil, o)
		if err != nil {
			t.Fatal(name, err)
		}
		t.Logf("%s: %s governs, %.1f K; %d looked at, %d solved, %.2f s", name, a.Governs, a.RoomK, a.Screened, a.Solved, time.Since(start).Seconds())
		s := New(cat)
		last := math.Inf(1)
		for i := range a.Changes {
			c := &a.Changes[i]
			t.Logf("  %s", c.Sentence())
			if c.GainK > last+0.05 || c.GainK < leastGainK {
				t.Errorf("%s: %s gains %.2f K after %.2f K", name, c.Text, c.GainK, last)
			}
			last = c.GainK
			if problems := section.Check(c.Doc); len(problems) > 0 {
				t.Errorf("%s: %s: %v", name, c.Text, problems)
			}
			r, err := s.solve(ctx, scaleAll(c.Doc, a.Factor), o)
			if err != nil {
				t.Fatal(err)
			}
			if g := r.Governing; g.Part != c.Governs || math.Abs(g.MarginK-a.RoomK-c.GainK) > 0.02 {
				t.Errorf("%s: %s: %s with %.2f K, solved anew %s with %.2f K", name, c.Text, c.Governs, a.RoomK+c.GainK, g.Part, g.MarginK)
			}
		}
		if len(a.Changes) < 2 || len(a.Changes) > mostChanges {
			t.Errorf("%s: %d changes", name, len(a.Changes))
		}
	}
}

// kinds of the changes, with the first of each.
func firsts(a *Advice) map[string]*Change {
	out := map[string]*Change{}
	for i := range a.Changes {
		if c := &a.Changes[i]; out[c.Kind] == nil {
			out[c.Kind] = c
		}
	}
	return out
}

// TestAdvisePaint: a bright tube radiates more under paint; the coat goes on a tube of the catalogue and on one of its own sizes, alike.
func TestAdvisePaint(t *testing.T) {
	const tube = `
packrise: 1
surroundings: {kind: still-air, ambient_c: 30}
holder: HOLDER
materials: {ins: {k_w_mk: 0.2}}
parts: [{id: W, kind: core, conductor: {area_mm2: 4}, layers: [{material: ins, thickness_mm: 1}], at_mm: [0, -5], limit_c: 90}]
loads: [{id: a, conductors: [W], current_a: 30}]
`
	var gains []float64
	for _, h := range []string{"{kind: conduit, stock: emt-1/2}", "{kind: conduit, inside_mm: 15.7988, layers: [{material: galvanised-steel, thickness_mm: 1.0668}]}"} {
		a, err := New(cat).Advise(context.Background(), read(t, strings.Replace(tube, "HOLDER", h, 1)), nil, Options{})
		if err != nil {
			t.Fatal(err)
		}
		c := firsts(a)[ChangePaint]
		if c == nil || c.GainK < 1 {
			t.Fatalf("%s: %+v", h, c)
		}
		gains = append(gains, c.GainK)
	}
	if math.Abs(gains[0]-gains[1]) > 0.2 {
		t.Errorf("gains %v", gains)
	}
}

// TestAdviseSwap: the cold core of a low limit sits in the middle; swapping it outwards is found, with what it costs.
func TestAdviseSwap(t *testing.T) {
	text := strings.Replace(aHeats, "at_mm: [0, 2.4]", "at_mm: [0, 0]", 1)
	text = strings.Replace(text, "current_a: 20", "current_a: 24", 1)
	d := section.Add(read(t, text), section.Part{
		ID: "X", Kind: section.Core, Conductor: &section.Conductor{AreaMM2: section.Some(1.0)}, Layers: []section.Layer{{Material: "ins", ThicknessMM: 0.5}},
		LimitC: section.Some(90.0), At: section.Some(section.Point{X: 0, Y: -5}), Role: section.RoleSpare,
	})
	a, err := New(cat).Advise(context.Background(), d, nil, Options{AssumeIdle: true})
	if err != nil {
		t.Fatal(err)
	}
	for i := range a.Changes {
		t.Log(a.Changes[i].Sentence())
	}
	kinds := firsts(a)
	if a.Governs != "B" || kinds[ChangeSwap] == nil || kinds[ChangeMove] == nil {
		t.Fatalf("%s governs; %v", a.Governs, kinds)
	}
	if c := kinds[ChangeSwap]; !slices.Contains(c.IDs, "B") || c.GainK <= 0 || !(c.AtK > 0) {
		t.Errorf("%+v", c)
	}
	if c := kinds[ChangeUpsize]; c == nil || c.CopperKgM <= 0 {
		t.Errorf("one size up: %+v", c)
	}
}

// TestAdviseRunaway: without a steady temperature all is compared at lower currents, and the changed designs keep the currents as written.
func TestAdviseRunaway(t *testing.T) {
	d := section.ScaleLoads(read(t, aHeats), 8)
	a, err := New(cat).Advise(context.Background(), d, nil, Options{})
	if err != nil {
		t.Fatal(err)
	}
	if !(a.Factor < 1) || len(a.Changes) == 0 || !strings.Contains(a.Now(), "no steady temperature") {
		t.Fatalf("factor %g, %d changes: %s", a.Factor, len(a.Changes), a.Now())
	}
	c := firsts(a)[ChangeCut]
	if c == nil || math.Abs(section.LoadNamed(c.Doc, "motor").CurrentA.V-0.8*160) > 1e-9 {
		t.Errorf("%+v", c)
	}
}

// TestAdviseStops: cancelled, nothing more is solved; an unknown current is refused; without limits nothing is advised.
func TestAdviseStops(t *testing.T) {
	ctx, stop := context.WithCancel(context.Background())
	d := read(t, aHeats)
	stop()
	if _, err := New(cat).Advise(ctx, d, nil, Options{}); !errors.Is(err, context.Canceled) {
		t.Errorf("cancelled: %v", err)
	}
	unknown := section.ChangeLoad(d, "bell", func(l *section.Load) { l.CurrentA, l.Unknown = section.Opt[float64]{}, true })
	var no *Refusal
	if _, err := New(cat).Advise(context.Background(), unknown, nil, Options{}); !errors.As(err, &no) {
		t.Errorf("unknown: %v", err)
	}
	bare := read(t, strings.NewReplacer(", limit_c: 70", "").Replace(oneWire))
	a, err := New(cat).Advise(context.Background(), bare, nil, Options{})
	if err != nil || len(a.Changes) > 0 || a.Governs != "" {
		t.Errorf("%+v, %v", a, err)
	}
}

// TestAdviseCases: of a design with cases the worst is what all is compared in; cutting a load that the case names cuts it there.
func TestAdviseCases(t *testing.T) {
	d := section.SetCase(read(t, aHeats), section.Case{ID: "peak", AmbientC: section.Some(35.0), Loads: []section.CaseLoad{{Load: "motor", CurrentA: 25}}})
	d = section.SetCase(d, section.Case{ID: "night", AmbientC: section.Some(10.0)})
	a, err := New(cat).Advise(context.Background(), d, nil, Options{})
	if err != nil {
		t.Fatal(err)
	}
	if a.Case != "peak" || !strings.Contains(a.Now(), "In case peak") {
		t.Fatalf("%q: %s", a.Case, a.Now())
	}
	kinds := firsts(a)
	if c := kinds[ChangeCut]; c == nil || section.CaseNamed(c.Doc, "peak").Loads[0].CurrentA != 20 || section.LoadNamed(c.Doc, "motor").CurrentA.V != 16 {
		t.Errorf("cut: %+v", c)
	}
	if c := kinds[ChangeOff]; c == nil || !section.CaseNamed(c.Doc, "peak").Loads[0].Off {
		t.Errorf("off: %+v", c)
	}
	if c := kinds[ChangeAmbient]; c == nil || math.Abs(c.GainK-lowerK) > 0.6 || // resistances fall too
		section.CaseNamed(c.Doc, "peak").AmbientC.V != 30 {
		t.Errorf("ambient: %+v", c)
	}
	s := New(cat)
	for i := range a.Changes {
		c := &a.Changes[i]
		r, err := s.solve(context.Background(), section.WithCase(c.Doc, "peak"), Options{})
		if err != nil || math.Abs(r.Governing.MarginK-a.RoomK-c.GainK) > 0.02 {
			t.Errorf("%s: %.2f K more, solved anew %.2f K", c.Text, c.GainK, r.Governing.MarginK-a.RoomK)
		}
	}
}

// TestAdviseScreen holds what the first order expects of a change to its full solution: 15 % and 0.5 K where the parts stay, 3 K where they move.
func TestAdviseScreen(t *testing.T) {
	d := read(t, aHeats)
	a := &adviser{s: New(cat), ctx: context.Background(), d: d, out: Advice{Factor: 1}}
	if err := a.start(); err != nil {
		t.Fatal(err)
	}
	a.loads()
	a.sizes()
	a.swaps()
	a.moves()
	screened := 0
	for i := range a.cand {
		c := &a.cand[i]
		doc, ok := c.make(d)
		if !ok {
			continue
		}
		r, err := a.s.solve(a.ctx, doc, a.o)
		if err != nil {
			continue // it can't be built
		}
		screened++
		got, guess := r.Governing.MarginK-a.room, c.room-a.room
		most := map[string]float64{ChangeMove: 3, ChangeSwap: 3}[c.kind]
		if math.Abs(got-guess) > math.Max(most, 0.15*math.Abs(got)+0.5) {
			t.Errorf("%s: expected %.2f K more margin, got %.2f K", c.text, guess, got)
		}
	}
	if screened < 8 {
		t.Errorf("%d changes", screened)
	}
}

// TestAdviseNested: a circuit in a cable goes one size up; that cable's jacket and no other grows for it.
func TestAdviseNested(t *testing.T) {
	if testing.Short() {
		t.Skip("many sections of cables in a tube")
	}
	const cables = `
packrise: 1
surroundings: {kind: still-air, ambient_c: 30}
holder: {kind: conduit, stock: emt-1-1/4}
builds:
  duo:
    holder: {kind: jacket, inside_mm: 8, layers: [{material: pvc, thickness_mm: 1}]}
    parts:
      - {id: L, kind: core, conductor: {size: 2.5 mm2}, layers: [{material: pvc, thickness_mm: 0.8}], at_mm: [-2, 0]}
      - {id: N, kind: core, conductor: {size: 2.5 mm2}, layers: [{material: pvc, thickness_mm: 0.8}], at_mm: [2, 0]}
parts:
  - {id: C1, kind: cable, build: duo, at_mm: [-5.5, -10]}
  - {id: C2, kind: cable, build: duo, at_mm: [5.5, -10]}
  - {id: C3, kind: cable, build: duo, at_mm: [0, 0]}
loads:
  - {id: a, conductors: [C1/L, C1/N], current_a: 15}
  - {id: b, conductors: [C2/L, C2/N], current_a: 12}
  - {id: c, conductors: [C3/L, C3/N], current_a: 5}
`
	d := read(t, cables)
	a, err := New(cat).Advise(context.Background(), d, nil, Options{})
	if err != nil {
		t.Fatal(err)
	}
	for i := range a.Changes {
		t.Log(a.Changes[i].Sentence())
	}
	kinds := firsts(a)
	up := kinds[ChangeUpsize]
	if up == nil || up.GainK < 1 || len(up.Doc.Builds) != 2 || section.Find(up.Doc, "C2/L").Conductor.Size != "2.5 mm2" || section.Find(up.Doc, "C1/N").Conductor.Size == "2.5 mm2" {
		t.Fatalf("%+v", up)
	}
	if up.Doc.Builds[1].Holder.InsideMM.V <= 8 || up.Doc.Builds[0].Holder.InsideMM.V != 8 {
		t.Errorf("jackets of %g and %g mm inside", up.Doc.Builds[0].Holder.InsideMM.V, up.Doc.Builds[1].Holder.InsideMM.V)
	}
	if c := kinds[ChangeOut]; c == nil || c.IDs[0] != "C1" {
		t.Errorf("%+v", c)
	}
}

// BenchmarkAdvise: 37 cores, from nothing prepared.
func BenchmarkAdvise(b *testing.B) {
	raw, err := assets.Designs.ReadFile("designs/robot-umbilical.yaml")
	if err != nil {
		b.Fatal(err)
	}
	d, _ := section.Read(raw)
	for b.Loop() {
		if _, err := New(cat).Advise(context.Background(), d, nil, Options{AssumeIdle: true}); err != nil {
			b.Fatal(err)
		}
	}
}
