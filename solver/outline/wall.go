package outline

// Disc is a round part as the wall sees it: centre, outer radius, highest harmonic. Slack is how far Move may take it in each direction
// with the panels still short enough: 0 for a part that stays, about A for one that is being dragged.
type Disc struct {
	C     complex128
	A     float64
	M     int
	Slack float64
}

// Layer of the wall, from the inside outwards.
type Layer struct{ K, Thickness float64 }

// SideKind tells how a side's outer face meets the outside.
type SideKind int

// Side kinds.
const (
	Open SideKind = iota
	Insulated
	Held
	Covered // no outside at all: the medium goes on
)

// Side: Open has Film (W/m²K; +Inf for a fixed wall) to Temp; Held is at Temp.
type Side struct {
	Kind SideKind
	Film float64
	Temp float64
}

// Rect is a rectangular holder: inside W × H with its lower left corner at the origin, layers with square outer corners, one
// Side each for bottom, right, top, left.
type Rect struct {
	W, H    float64
	MediumK float64
	Layers  []Layer
	Sides   [4]Side
	Workers int // goroutines at most, 0 for as many as there are processors
	// Stop, if any, is asked between pieces of work; when it says so New returns nil.
	Stop func() bool
}

// Sources are what the parts send out: Q[j] net heat (W/m) and D[j][m-1] multipole coefficients d_m (K) of disc j, in the convention T = −Σ q/(2πk) ln|z−c| + Re Σ d_m
// (a/(z−c))^m.
type Sources struct {
	Q []float64
	D [][]complex128
}
