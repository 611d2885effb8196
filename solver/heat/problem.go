package heat

// Problem is steady conduction in the plane across a run: parts in a medium within a wall. Lengths in metres,
// temperatures in kelvin above any common zero (a caller may pass °C), heats in W/m, conductivities in W/mK.
type Problem struct {
	Parts     []Part
	Wall      Wall
	MediumK   float64 // between the parts of the top level
	Filling   Filling // what the medium does besides; surfaces that radiate need emissivities
	ZeroK     float64 // absolute temperature of the common zero: 273.15 for °C, 0 for K. Radiation needs it
	Pressure  float64 // Pa, of air that moves; 0: the atmosphere's
	Clearance float64 // mean clearance of loose parts from each other and the wall, 0 in a solid; see DEVELOPERS.md, defaults
}

// Core kinds of a part.
type Core int

// What is in the middle of a part.
const (
	Metal     Core = iota // one temperature throughout
	Body                  // a solid of conductivity K, no heat source inside
	Bore                  // a hole filled with a medium of conductivity K
	FixedBore             // a hole whose wall is held at Fixed
	Inside                // a cable: other parts in a medium of conductivity K
)

// Part is a thing within the wall: round, unless its Form says otherwise.
type Part struct {
	In     int     // index of the cable (Core Inside) that this part lies in, −1 for the holder; a cable stands before its parts
	X, Y   float64 // centre: in the holder's coordinates for In = −1, else relative to the cable's centre (turn already applied)
	Core   Core
	Radius float64 // of the core: metal, body, bore or inside
	K      float64 // of a Body, the medium of a Bore or the inside of a cable
	Fixed  float64 // temperature of a FixedBore
	Rings  []Ring  // from Radius outwards
	Heat   float64 // W/m, made in the core (Metal only; 0 elsewhere)
	Form   Form    // of a core or a cable's inside that is not round; Radius is then any that is positive

	Emissivity       float64 // of the outer surface, where it faces a gas
	Filling          Filling // of the medium in a cable
	InsideEmissivity float64 // of a cable's inside
}

// Ring is a layer of a part or a wall.
type Ring struct {
	K         float64 // W/mK
	Thickness float64 // m
}

// Shape of a wall.
type Shape int

// Wall shapes.
const (
	Round    Shape = iota // inside radius R, centre at the origin
	Rect                  // inside W × H, lower left corner at the origin, square outer corners
	BarePart              // no wall: exactly one part of the top level, the film acts on its own outside
	Hull                  // no wall: an open bundle, the film acts on the taut string round the parts and on the parts where they are exposed
	FlatWall              // inside W × H with half-circle ends on the short sides, centre at the origin
)

// Wall is the holder's wall and what is outside it.
type Wall struct {
	Shape Shape
	R     float64
	W, H  float64
	Rings []Ring  // from the inside outwards; none: the boundary acts on the inside outline itself
	Film  float64 // W/m²K on the outside; +Inf: the outside is held at Ambient
	// Ambient temperature outside, for open sides and round walls.
	Ambient    float64
	Emissivity float64 // of the inside, where it faces a gas
	Sides      [4]Side // of a rectangle: Bottom, Right, Top, Left
	Against    Against // of all others
	// Taut winds the string round discs, counterclockwise, with an arc of 2π for one disc; it is needed for a Hull.
	Taut func(x, y, r []float64) []Arc
}

// Indices of Wall.Sides.
const (
	Bottom = iota
	Right
	Top
	Left
)

// SideKind tells how a side's outer face meets the outside.
type SideKind int

// Side kinds.
const (
	Open SideKind = iota
	Insulated
	Held // at Side.Temp
)

// Side of a rectangle.
type Side struct {
	Kind SideKind
	Temp float64 // of a Held side; of an Open one with a film of its own what that film leads to
	Film float64 // Open: W/m²K of this side alone, towards Temp; 0: the wall's Film and Ambient
}

// Accuracy of a solution: draft, standard, fine (C = 0.7, 1, 1.5 of the order rule).
type Accuracy int

// Accuracies.
const (
	Standard Accuracy = iota // the zero value, so that forgetting it is harmless
	Draft
	Fine
)

// Settings modify a solution; the zero value is right for most.
type Settings struct {
	Accuracy Accuracy
	Threads  int // 0: as many as there are processors
}

// Status of a solution.
type Status int

// Statuses.
const (
	Converged Status = iota
	StoppedEarly
	Cancelled
	ThermalRunaway
)

// String returns the status as the command line prints it: converged, stopped-early, cancelled, thermal-runaway.
func (s Status) String() string {
	return [...]string{"converged", "stopped-early", "cancelled", "thermal-runaway"}[s]
}
