package ui

import (
	"math"
	"strings"
	"testing"

	"packrise/solver/catalog"
	"packrise/solver/section"
)

// A conductor that is not round shows its outline, keeps it when its size is typed, and takes its metal from it where none is given.
func TestShapedConductor(t *testing.T) {
	cat := catalog.Load()
	bar := section.Conductor{Shape: section.BarShape, WidthMM: section.Some(20.0), HeightMM: section.Some(5.0)}
	p := section.Part{ID: "B", Kind: section.Core, Conductor: &bar}
	shown := sizeText(cat, p)
	if !strings.Contains(shown, "bar 20 × 5") {
		t.Errorf("shown as %q", shown)
	}
	if c, err := conductorOf(cat, &bar); err != nil || math.Abs(c.AreaM2-100e-6) > 1e-9 {
		t.Errorf("area %g m², %v; want 100 mm²", c.AreaM2, err)
	}
	if c, _, err := readConductor(cat, shown, bar); err != nil || c != bar {
		t.Errorf("its own words become %+v, %v", c, err)
	}
	c, _, err := readConductor(cat, "95 mm²", bar)
	if err != nil || c.Shape != section.BarShape || c.WidthMM != bar.WidthMM || c.Size == "" && !c.AreaMM2.OK {
		t.Errorf("95 mm² makes %+v, %v", c, err)
	}
	if _, _, err := readConductor(cat, "⌀ 3 mm", bar); err == nil {
		t.Error("a bar takes a diameter")
	}
}
