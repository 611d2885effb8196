package heat

// Result is the answer for one set of heats.
type Result struct {
	Core     []float64   // per part: Metal its temperature; Body, Bore: the hottest place of it; FixedBore: Fixed; Inside: hottest place of the inside medium's rim
	Surfaces [][]float64 // per part: hottest temperature at the inner face of each ring, then at the outside; len(Rings)+1
	WallMax  []float64   // hottest temperature at the inner face of each wall ring, then outside; len(Wall.Rings)+1
	WallMean float64     // mean temperature of the outer surface

	Generated float64    // W/m: Σ heats
	Released  float64    // W/m through the outside, integrated there and not set equal to Generated
	Absorbed  []float64  // W/m taken up by each part's FixedBore, 0 elsewhere
	SideOut   [4]float64 // W/m through the outside of each side of a rectangle
	// AgainstOut is what of Released (W/m) goes into what a part of the outside rests against.
	AgainstOut float64

	Status     Status
	Unknowns   int     // real unknowns
	Steps      int     // of the iteration
	Radiates   bool    // surfaces radiate to each other
	Frozen     bool    // radiation as it was before a part moved the last millimetre; only of a Draft
	Nusselt    float64 // how many times more heat crosses the holder's air, where it is free, than by conduction; 1 where it does not move
	Beyond     bool    // the formula for that is beyond its range
	ErrorK     float64 // estimate of the largest error of any Core temperature
	PartErrorK []float64
	MetalGap   float64 // m: how far bare metal was held from bare metal that it touches; 0 where none does
	Field      Field
	Bodies     []*Result // of a Group: each member's own; nil else
}

// Field is the temperature anywhere in the section.
type Field interface {
	// Row fills dst with temperatures at (x0 + i·dx, y) in the holder's coordinates, NaN outside the outer surface. Safe for concurrent use.
	Row(dst []float64, y, x0, dx float64)
	// At is Row for one point.
	At(x, y float64) float64
}
