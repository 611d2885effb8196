package render

import (
	"fmt"
	"strings"
	"testing"
)

// What heats a part is shaded by how much; the part itself and what gives nothing are not.
func TestHeatersAreShaded(t *testing.T) {
	s := hexScene(7)
	var ids []string
	for _, sh := range s.Shapes {
		if sh.ID != "" {
			ids = append(ids, sh.ID)
		}
	}
	st := Style{}
	draw := func() string {
		c := NewRecorder(900, 700)
		SectionLayer(c, s, FitView(s.Shapes, 900, 700, st), Scale{30, 90}, st)
		return c.String()
	}
	p := sectionPainter{pal: st.Colors()}
	fill := func(percent int) string {
		c := p.shade(percent)
		return fmt.Sprintf("%02x%02x%02x%02x", c.R, c.G, c.B, c.A)
	}
	if got := draw(); strings.Contains(got, "shaded") || strings.Contains(got, fill(40)) {
		t.Error("something is shaded with nothing selected")
	}
	s.Heated, s.Heaters = ids[0], map[string]int{ids[0]: 46, ids[1]: 40, ids[2]: 14, ids[3]: 0}
	got := draw()
	for percent, want := range map[int]int{40: 1, 14: 1, 46: 0} {
		if n := strings.Count(got, fill(percent)); n != want {
			t.Errorf("%d shades for %d %%, want %d", n, percent, want)
		}
	}
	if !strings.Contains(got, "shaded: share of the rise of "+ids[0]) {
		t.Error("nothing says what the shades mean")
	}
	for more := 1; more <= 100; more++ {
		if p.shade(more).A <= p.shade(more-1).A {
			t.Errorf("%d %% is no stronger than %d %%", more, more-1)
		}
	}
}
