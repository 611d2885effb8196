package pack

// Disc is a round part.
type Disc struct {
	X, Y, R float64
	Fixed   bool // must stay where it is
}

// Box is the inside of a holder. Round: R > 0, centre at the origin. Rectangle: W, H > 0, lower left corner at the origin. All zero: no
// wall.
type Box struct{ R, W, H float64 }

// Settle lets the discs fall (towards −y) until they rest on each other and the wall. Same seed, same result; never an overlap. The error is
// one sentence when they do not fit; the discs' places are ignored except for Fixed ones.
func Settle(discs []Disc, in Box, seed uint64) ([]Disc, error) { panic("pack: not built") }

// LayUp places discs in concentric layers, in the given order from the centre outwards, the way that a cable is laid: (1+6+12 for equals), each layer touching the one
// below; it returns the places and the radius of the circle that holds them.
func LayUp(radii []float64) ([]Disc, float64) { panic("pack: not built") }

// PushApart removes overlaps with the least movement. The disc with index held (−1: none) stays where it is unless the wall forbids it. gap is the least
// distance to keep between discs and to the wall. ok is false if no place without overlap was found; the discs are then returned as they came.
func PushApart(discs []Disc, in Box, held int, gap float64) (placed []Disc, ok bool) {
	panic("pack: not built")
}

// Enclose returns the smallest circle around the discs as they lie.
func Enclose(discs []Disc) (x, y, r float64) { panic("pack: not built") }

// SmallestHolder searches for the smallest circle into which the radii fit; it returns centres about the origin and the circle's radius.
func SmallestHolder(radii []float64, seed uint64) ([]Disc, float64) { panic("pack: not built") }

// Overlap returns the deepest overlap, of two discs (i, j) or of a disc with the wall (j = −1); depth ≤ 0 when there is none.
func Overlap(discs []Disc, in Box) (i, j int, depth float64) { panic("pack: not built") }

// Arc is a piece of the taut-string hull: the arc of disc Disc from angle From to angle To (radians, counterclockwise), followed by a straight string to
// the next arc's disc.
type Arc struct {
	Disc     int
	From, To float64
}

// Hull returns the taut string round the discs, counterclockwise, its perimeter and the total length of its straight strings.
func Hull(discs []Disc) (arcs []Arc, perimeter, strings float64) { panic("pack: not built") }
