package outline

// Disc is a round part as the wall sees it: centre, outer radius, highest harmonic.
type Disc struct {
	C complex128
	A float64
	M int
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
}

// System is a Rect with its parts, discretised and factorised: unknowns y are the densities on its outlines and the constant T_c. Safe for
// concurrent use after New.
type System struct{}

// Sources are what the parts send out: Q[j] net heat (W/m) and D[j][m-1] multipole coefficients d_m (K) of disc j, in the convention T = −Σ q/(2πk) ln|z−c| + Re Σ d_m
// (a/(z−c))^m.
type Sources struct {
	Q []float64
	D [][]complex128
}

// New discretises the outlines (elements graded to corners and to the discs' gaps; fineness 1 is standard, 0.7 draft, 1.5 fine) and factorises.
func New(r Rect, discs []Disc, fineness float64) *System { panic("outline: New is not built") }

// Len returns the number of unknowns.
func (s *System) Len() int { panic("outline: not built") }

// Respond solves for the wall's unknowns given the parts' sources; ground adds the drive of sides and ambient (absolute temperatures), without it they
// count as 0.
func (s *System) Respond(src Sources, ground bool) (y []float64) { panic("outline: not built") }

// Incoming adds to b[i][n] (n = 0 … M_i) the coefficients of the wall's field about disc i: Re Σ b_n ((z−c)/a)^n. b_0 includes T_c.
func (s *System) Incoming(y []float64, b [][]complex128) { panic("outline: not built") }

// At adds nothing for the parts: it is the wall's own field in the medium, T_c included.
func (s *System) At(y []float64, z complex128) float64 { panic("outline: not built") }

// InWall returns the temperature inside the wall's layers at z, given the whole solution; NaN outside the outer face.
func (s *System) InWall(y []float64, src Sources, z complex128) float64 { panic("outline: not built") }

// Faces returns, for the whole solution, the hottest temperature at the inner face of each layer and then outside, the mean temperature of the
// outer surface, and the heat through each side's outer face (W/m, out positive).
func (s *System) Faces(y []float64, src Sources) (hottest []float64, mean float64, out [4]float64) {
	panic("outline: not built")
}
