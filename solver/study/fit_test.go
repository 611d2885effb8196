package study

import (
	"context"
	"errors"
	"testing"

	"packrise/solver/heat"
	"packrise/solver/section"
)

// TestFitTube: more 12 AWG in a 1-inch EMT. NEC chapter 9 table 1: 40 % of 864 sq in/1000 (26.6 mm inside, 557 mm²) is 223 mm², one THHN 12 AWG
// takes 8.58 mm² (table 5: 0.0133 sq in), so 26 in all (annex C table C.1: 26, from memory).
func TestFitTube(t *testing.T) {
	if testing.Short() {
		t.Skip("a tube filled step by step")
	}
	d := read(t, `
packrise: 1
surroundings: {kind: still-air, ambient_c: 30}
holder: {kind: conduit, stock: emt-1}
parts:
  - {id: W1, kind: core, stock: thhn-12, at_mm: [-2, -11.4]}
  - {id: W2, kind: core, stock: thhn-12, at_mm: [2, -11.4]}
  - {id: W3, kind: core, stock: thhn-12, at_mm: [0, -8]}
loads: [{id: a, conductors: [W1, W2, W3], current_a: 2}]
`)
	s := New(cat)
	ctx := context.Background()
	f, err := s.Fit(ctx, d, nil, "W3", Options{})
	if err != nil {
		t.Fatal(err)
	}
	t.Log(f.Sentence())
	if !f.Rule.Known || f.Rule.N != 23 || f.Stops != StopsRule || f.N != 23 || f.Next != "emt-1-1/4" {
		t.Errorf("%+v", f)
	}
	if f.Room.N <= f.Rule.N || len(f.Doc.Parts) != 26 {
		t.Errorf("%d find a place, %d parts", f.Room.N, len(f.Doc.Parts))
	}
	// loaded, temperature stops first, and one more than that is not inside
	hot := section.ScaleLoads(d, 9)
	f, err = s.Fit(ctx, hot, nil, "W3", Options{})
	if err != nil {
		t.Fatal(err)
	}
	t.Log(f.Sentence())
	if f.Stops != StopsHeat || f.N == 0 || f.Result.Governing.MarginK < DesignMarginK {
		t.Errorf("%+v", f)
	}
	more, ok := s.oneMore(f.Doc, "W3")
	if !ok {
		t.Fatal("no place for one more")
	}
	r, err := s.solve(ctx, more, Options{})
	if err != nil {
		t.Fatal(err)
	}
	if r.Governing.MarginK >= DesignMarginK {
		t.Errorf("one more leaves %.2f K", r.Governing.MarginK)
	}
}

// TestFitPlaces: every design on the way solves, in holders of all kinds.
func TestFitPlaces(t *testing.T) {
	s := New(cat)
	ctx := context.Background()
	for name, id := range map[string]string{"filled-control-cable": "N", "roof-strings": "S1p", "strings-spread": "S1p"} {
		d := demo(t, name)
		for n := range 6 {
			more, ok := s.oneMore(d, id)
			if !ok {
				if n == 0 && name != "filled-control-cable" {
					t.Errorf("%s: no place for one more", name)
				}
				break
			}
			d = more
		}
		if problems := section.Check(d); len(problems) > 0 {
			t.Errorf("%s: %v", name, problems)
		}
		if r, err := s.solve(ctx, d, Options{AssumeIdle: true}); err != nil || r.Status != heat.Converged {
			t.Errorf("%s: %v", name, err)
		}
	}
}

// TestFitBad: a part that is not there, a bare part.
func TestFitBad(t *testing.T) {
	s := New(cat)
	var no *Refusal
	if _, err := s.Fit(context.Background(), read(t, oneWire), nil, "X", Options{}); !errors.As(err, &no) {
		t.Errorf("%v", err)
	}
	f, err := s.Fit(context.Background(), read(t, oneWire), nil, "W", Options{})
	if err != nil || f.N != 0 || f.Stops != StopsRoom {
		t.Errorf("%+v, %v", f, err)
	}
}
