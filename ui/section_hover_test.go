package ui

import (
	"strings"
	"testing"

	"packrise/solver/section"
)

func TestHoverReadsOut(t *testing.T) {
	h, v := testView(t)
	v.MouseMoved(h.event(h.on(t, "L1"), 0))
	if h.k.Pointed() != "L1" {
		t.Errorf("points at %q", h.k.Pointed())
	}
	if s := v.hint.text(); !strings.HasPrefix(s, "L1 ") || !strings.Contains(s, "°C, limit 70") {
		t.Errorf("reads out %q", s)
	}
	v.MouseMoved(h.event(h.over(section.Point{X: 0, Y: 0}), 0))
	if s := v.hint.text(); h.k.Pointed() != "" || !strings.HasSuffix(s, "°C here") {
		t.Errorf("between the parts it reads out %q", s)
	}
	v.MouseOut()
	if s := v.hint.text(); s != "" {
		t.Errorf("reads out %q without a pointer", s)
	}
}
