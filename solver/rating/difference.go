package rating

import (
	"slices"

	"packrise/solver/heat"
)

// What difference found, besides the index of the one part that moved.
const (
	same  = -1
	other = -2
)

// difference compares two heat problems but for the heats and what is outside: same, other, or the index of the only top-level part that moved.
func difference(a, b *heat.Problem) int {
	if a.MediumK != b.MediumK || a.Filling != b.Filling || a.ZeroK != b.ZeroK || a.Pressure != b.Pressure || a.Clearance != b.Clearance || len(a.Parts) != len(b.Parts) || !sameWall(a.Wall, b.Wall) {
		return other
	}
	moved := same
	for i := range a.Parts {
		p, q := a.Parts[i], b.Parts[i]
		if !samePart(p, q) {
			return other
		}
		if p.X == q.X && p.Y == q.Y {
			continue
		}
		if moved != same || p.In >= 0 {
			return other
		}
		moved = i
	}
	return moved
}

// sameWall compares all that stays while films change.
func sameWall(a, b heat.Wall) bool {
	a.Against.Temp = b.Against.Temp
	return a.Against == b.Against && a.Shape == b.Shape && a.R == b.R && a.W == b.W && a.H == b.H && a.Emissivity == b.Emissivity && slices.Equal(a.Rings, b.Rings)
}

// sameOutside compares what heat.Model.Outside changes.
func sameOutside(a, b *heat.Wall) bool {
	return a.Film == b.Film && a.Ambient == b.Ambient && a.Sides == b.Sides && a.Against == b.Against
}

// samePart compares all but place and heat.
func samePart(a, b heat.Part) bool {
	return a.In == b.In && a.Core == b.Core && a.Radius == b.Radius && a.Form == b.Form && a.K == b.K && a.Fixed == b.Fixed && a.Filling == b.Filling &&
		a.Emissivity == b.Emissivity && a.InsideEmissivity == b.InsideEmissivity && slices.Equal(a.Rings, b.Rings)
}
