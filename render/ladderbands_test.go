package render

import (
	"strings"
	"testing"

	"packrise/solver/section"
)

// TestLadderShowsBands: a bar for every rung, and the word of what the band alone takes over its limit.
func TestLadderShowsBands(t *testing.T) {
	s := oneScene()
	shade := "fill " + hex(alpha(lightPalette.Quiet, 0.8)) // of a bar whose rung governs
	s.Readings[0].Governs = true
	_, plain := rungsOf(s, 210, 480, Style{})
	r := &s.Readings[0]
	r.LimitC = section.Some(r.TempC + 5)
	s.Bands = map[string][2]float64{r.ID: {r.TempC - 4, r.TempC + 4}}
	_, within := rungsOf(s, 210, 480, Style{})
	if strings.Contains(within, ` close"`) || !strings.Contains(within, shade) || strings.Contains(plain, shade) {
		t.Errorf("a band inside the limit:\n%s", within)
	}
	s.Bands[r.ID] = [2]float64{r.TempC - 4, r.TempC + 8}
	_, near := rungsOf(s, 210, 480, Style{})
	if !strings.Contains(near, ` close"`) || !strings.Contains(near, hex(lightPalette.Close)) {
		t.Errorf("a band over the limit is not marked:\n%s", near)
	}
	r.LimitC = section.Some(r.TempC - 1)
	if _, over := rungsOf(s, 210, 480, Style{}); strings.Contains(over, ` close"`) || !strings.Contains(over, hex(lightPalette.Over)) {
		t.Errorf("what is over is called close:\n%s", over)
	}
}

// TestBandsStandBesideEachOther: bars that overlap in temperature don't hide each other.
func TestBandsStandBesideEachOther(t *testing.T) {
	r := NewRecorder(210, 480)
	s := hexScene(7)
	l := &ladder{c: r, s: s, sc: ScaleOf(s), k: 1, pal: lightPalette, w: 210, h: 480}
	l.layout()
	middle := (l.sc.Low + l.sc.High) / 2
	steps := []step{
		{banded: true, band: [2]float64{middle - 3, middle + 3}},
		{banded: true, bold: true, band: [2]float64{middle - 2, middle + 4}},
		{banded: true, band: [2]float64{middle - 1, middle + 1}},
	}
	l.bands(steps)
	lefts := map[string]bool{}
	for _, line := range strings.Split(r.String(), "\n") {
		if f := strings.Fields(line); len(f) > 3 && f[0] == "fill" {
			lefts[f[3]] = true
		}
	}
	if strings.Count(r.String(), "fill") != 3 || len(lefts) != 3 {
		t.Errorf("%d places of three bars:\n%s", len(lefts), r.String())
	}
}
