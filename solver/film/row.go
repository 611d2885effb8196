package film

import "math"

// Row is an arrangement of equal cables beside which a body counts as one of them.
type Row struct {
	N           int // 0 or 1: alone
	Arrangement Arrangement
	Gap         float64 // free gap between neighbours over the diameter
}

// Where the constants of IEC 60287-2-1 are taken: they stand for black cables in a room.
const (
	rowRoomK             = 298.15
	rowColdest, rowRises = 20.0, 80.0 // K, rises between which they are used
	leastShare           = 0.1
)

// Reach is the gap, in diameters, from which cables of this arrangement count as alone; 0 if the table has none.
func (r Row) Reach() (far float64) {
	for _, g := range groups {
		if g.N == r.N && g.Arrangement == r.Arrangement && !g.OnWall && r.N > 1 {
			far = math.Max(far, g.High)
		}
	}
	return far
}

// law is the row's coefficient over Δθ^¼: the table's at the spacings it is for, touching and one diameter, straight between them and to
// that of a single cable at the gap from which cables count as alone, so that nothing jumps while a cable is moved.
func (r Row) law(deM float64) float64 {
	value := func(g *Group) float64 { return g.z/math.Pow(deM, g.g) + g.e }
	alone := value(&groups[0])
	lastGap, last := -1.0, 0.0
	for i := range groups {
		g := &groups[i]
		if g.N != r.N || g.OnWall || r.N < 2 || g.Arrangement != r.Arrangement {
			continue
		}
		at, v := 0.0, value(g)
		if g.Low > 0 {
			at = 1
		}
		if lastGap >= 0 && r.Gap < at {
			return last + (v-last)*(r.Gap-lastGap)/(at-lastGap)
		}
		lastGap, last = at, v
	}
	far := r.Reach()
	if lastGap < 0 || r.Gap >= far {
		return alone
	}
	return last + (alone-last)*(r.Gap-lastGap)/(far-lastGap)
}

// Open is the share of the row's worst placed cable that sees no neighbour.
func (r Row) Open() float64 {
	if r.N < 2 {
		return 1
	}
	l := 1 + r.Gap
	bodies := [][]Disc{{{R: 0.5}}}
	for k := 1; k < r.N; k++ {
		d := Disc{X: l * float64(2*k-3), R: 0.5} // on both sides of the first
		if r.Arrangement == Trefoil {
			d.X, d.Y = l*(float64(k)-1.5), l*math.Sqrt(0.75)
		}
		bodies = append(bodies, []Disc{d})
	}
	seen, _ := Views(bodies)
	sum := 0.0
	for _, v := range seen[0] {
		sum += v
	}
	return 1 - sum/math.Pi
}

// Sheltered is what is left of the natural convection of a cable alone for each cable of the row. It is such that black cables of one
// temperature, which radiate past each other only, give off together with it what IEC 60287-2-1 has for the row over what it has for a
// single cable: the radiation that neighbours block is in its constants and must not be taken off twice. Never above 1: where the table says as
// if alone, what is blocked is blocked all the same.
func (r Row) Sheltered(deM, open, riseK float64) float64 {
	if r.N < 2 {
		return 1
	}
	d := math.Min(deM, GroupLimitM)
	rise := math.Min(math.Max(math.Abs(riseK), rowColdest), rowRises)
	s := rowRoomK + rise
	black := stefan * (s*s + rowRoomK*rowRoomK) * (s + rowRoomK)
	root := math.Pow(rise, 0.25)
	alone := (Row{N: 1}).law(d)*root - black
	return math.Min(1, math.Max(leastShare, (r.law(d)*root-open*black)/alone))
}
