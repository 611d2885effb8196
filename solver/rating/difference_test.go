package rating

import (
	"testing"

	"packrise/solver/heat"
)

// TestDifferenceSees makes sure that an engine never keeps a model of another shape.
func TestDifferenceSees(t *testing.T) {
	base := func() heat.Problem {
		return heat.Problem{
			Parts: []heat.Part{
				{In: -1, Radius: 1e-3, Core: heat.Metal, Form: heat.Form{Kind: heat.Bar, W: 2e-3, H: 1e-3}},
				{In: -1, Radius: 1e-3, X: 5e-3, Core: heat.Metal, Rings: []heat.Ring{{K: 0.2, Thickness: 1e-3}}},
			},
			Wall: heat.Wall{Shape: heat.Rect, W: 0.02, H: 0.02}, MediumK: 0.03,
		}
	}
	a := base()
	for name, change := range map[string]struct {
		do   func(*heat.Problem)
		want int
	}{
		"nothing":        {func(*heat.Problem) {}, same},
		"heat":           {func(p *heat.Problem) { p.Parts[0].Heat = 3 }, same},
		"a place":        {func(p *heat.Problem) { p.Parts[1].X = 6e-3 }, 1},
		"two places":     {func(p *heat.Problem) { p.Parts[0].X, p.Parts[1].X = 1e-3, 6e-3 }, other},
		"a turn":         {func(p *heat.Problem) { p.Parts[0].Form.Turn = 1 }, other},
		"a form":         {func(p *heat.Problem) { p.Parts[0].Form.W = 3e-3 }, other},
		"a layer":        {func(p *heat.Problem) { p.Parts[1].Rings = []heat.Ring{{K: 0.2, Thickness: 2e-3}} }, other},
		"the wall":       {func(p *heat.Problem) { p.Wall.W = 0.03 }, other},
		"the clearance":  {func(p *heat.Problem) { p.Clearance = 1e-4 }, other},
		"the emissivity": {func(p *heat.Problem) { p.Parts[1].Emissivity = 0.5 }, other},
	} {
		b := base()
		change.do(&b)
		if got := difference(&a, &b); got != change.want {
			t.Errorf("%s: %d, want %d", name, got, change.want)
		}
	}
}
