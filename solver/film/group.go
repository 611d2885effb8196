package film

import "math"

// Arrangement of equal cables near each other in free air.
type Arrangement int

// Arrangements of a Group.
const (
	SideBySide Arrangement = iota
	OneAboveAnother
	Trefoil
)

// Group is a row of IEC 60287-2-1's table of constants for black surfaces in free air: h = z/De^g + e.
type Group struct {
	Name        string
	N           int
	Arrangement Arrangement
	OnWall      bool    // clipped to a vertical wall
	Low, High   float64 // free gap between neighbours over De for which it holds; IEC 60287-2-2, from memory
	z, e, g     float64
}

// GroupLimitM is the largest diameter of the table.
const GroupLimitM = 0.15

// Groups are the table's rows (from memory, see testdata/reference/iec60287_constants.csv). Side by side, gaps of half a diameter (two
// cables) or three quarters (three) and more leave each cable as if alone; one above another it takes 2 and 4.
var groups = []Group{
	{"single cable", 1, SideBySide, false, 0, math.Inf(1), 0.21, 3.94, 0.60},
	{"two touching horizontal", 2, SideBySide, false, 0, 0.5, 0.29, 2.35, 0.50},
	{"three touching horizontal", 3, SideBySide, false, 0, 0.75, 0.62, 1.95, 0.25},
	{"three in trefoil", 3, Trefoil, false, 0, 0.5, 0.96, 1.25, 0.20},
	{"two touching vertical", 2, OneAboveAnother, false, 0, 0.5, 1.42, 0.86, 0.25},
	{"two spaced De vertical", 2, OneAboveAnother, false, 0.5, 2, 0.75, 2.80, 0.30},
	{"three touching vertical", 3, OneAboveAnother, false, 0, 0.5, 1.61, 0.42, 0.20},
	{"three spaced De vertical", 3, OneAboveAnother, false, 0.5, 4, 1.31, 2.00, 0.20},
	{"single cable", 1, SideBySide, true, 0, math.Inf(1), 1.69, 0.63, 0.25},
	{"three in trefoil", 3, Trefoil, true, 0, 0.5, 0.94, 0.79, 0.20},
}

// GroupOf returns the constants for n equal cables with a free gap of gap diameters between neighbours. Beyond the widest gap that a row
// is for, each cable counts as alone. ok is false where the table has no row; take the nearer arrangement and say so.
func GroupOf(n int, a Arrangement, gap float64, onWall bool) (g Group, ok bool) {
	last := -1.0
	for _, g := range groups {
		if g.N != n || g.OnWall != onWall || (n > 1 && g.Arrangement != a) {
			continue
		}
		if gap >= g.Low && gap < g.High || math.IsInf(g.High, 1) {
			return g, true
		}
		last = math.Max(last, g.High)
	}
	if n > 1 && last >= 0 && gap >= last {
		return GroupOf(1, SideBySide, 0, onWall)
	}
	return Group{}, false
}

// Film returns the coefficient (W/m²K, radiation of a black surface included) of one cable of the group with the outside diameter deM at a
// surface riseK above the ambient, and whether the diameter is inside the table's range: IEC 60287-2-1, T4 = 1/(π De h Δθ^¼).
func (g Group) Film(deM, riseK float64) (h float64, inRange bool) {
	return (g.z/math.Pow(deM, g.g) + g.e) * math.Pow(math.Abs(riseK), 0.25), deM <= GroupLimitM
}
