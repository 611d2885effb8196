package outline

import (
	"math/cmplx"
	"math/rand/v2"
	"testing"
)

// Patches that are led over to a string that has moved are those that a new division into the same cells makes, and none of their heat is lost; where the
// strings are divided otherwise they stay as they are.
func TestHullPatchesRefit(t *testing.T) {
	r := rand.New(rand.NewPCG(4, 8))
	discs := four()
	for i := range discs {
		discs[i].M = 16
	}
	mirrors := mirrorsOf(discs, -0.7)
	s := NewHull(heap(discs, still), discs, mirrors, 1)
	p := s.Patches(func(complex128) float64 { return 0 })
	moved := append([]Disc(nil), discs...)
	moved[2].C += 0.2e-3 + 0.3e-3i
	u := s.Renew(heap(moved, still), moved, mirrors)
	if p.Follow(u) {
		t.Error("followed a string that has moved")
	}
	if !p.Refit(u) {
		t.Fatal("not led over")
	}
	want := u.Patches(func(complex128) float64 { return 0 })
	if len(want.A) != len(p.A) {
		t.Fatalf("%d patches, %d in a new division", len(p.A), len(want.A))
	}
	src := randomSources(r, moved)
	w, got, fresh := make([]float64, len(p.A)), make([]float64, len(p.A)), make([]float64, len(p.A))
	for k := range w {
		w[k] = 0.2 * r.Float64()
		within(t, "ends", cmplx.Abs(p.A[k]-want.A[k])+cmplx.Abs(p.B[k]-want.B[k]), 0, 1e-15)
		within(t, "length", p.Length[k], want.Length[k], 1e-15)
	}
	y, z := make([]float64, u.Len()), make([]float64, u.Len())
	p.RespondTo(y, src, true, w)
	want.RespondTo(z, src, true, w)
	p.Means(got, y, src)
	want.Means(fresh, z, src)
	for k := range got {
		within(t, "mean", got[k], fresh[k], 1e-9)
	}
	few := append([]Disc(nil), discs...)
	few[2].C = 2.5e-3 + 2.0e-3i // within the others' string
	if v := NewHull(heap(few, still), few, mirrors, 1); p.Refit(v) {
		t.Error("led over to another string")
	}
}
