package section

// FormatVersion is the value of the key `packrise` that this program writes and the newest that it reads.
const FormatVersion = 1

// Limits of a document: more is refused with these numbers.
const (
	MaxParts   = 500      // parts after unfolding builds
	MaxNesting = 6        // cables within cables
	MaxBytes   = 16 << 20 // size of a file
	MaxLayers  = 50       // around one part or in one wall
	MaxNamed   = 2000     // builds, and materials of the document's own
)

// Opt is a value that a document may leave out. The zero Opt is "not written", which is never read as zero.
type Opt[T any] struct {
	V  T
	OK bool
}

// Some returns a written value.
func Some[T any](v T) Opt[T] { return Opt[T]{V: v, OK: true} }

// Or returns the value, or otherwise where it was not written.
func (o Opt[T]) Or(otherwise T) T {
	if o.OK {
		return o.V
	}
	return otherwise
}

// Point is a place in the section plane in millimetres, x to the right, y up.
type Point struct{ X, Y float64 }

// Document is one design. It is immutable: an edit returns a new Document that shares what it did not touch, so nobody may
// write to a Document, its slices or what they point to once it has been handed out.
type Document struct {
	Title, Notes  string
	Surroundings  Surroundings
	Holder        Holder
	Parts         []Part
	Builds        []Build
	Loads         []Load
	Materials     []Material
	Cases         []Case
	Ranges        Ranges
	Measurements  []Measurement
	Rules         Rules
	DesignMarginK Opt[float64] // kept below every limit in ratings; default 10
	Reasons       []Reason
	StockUsed     []StockRow // rows of the catalogue that the design used when it was saved

	origin *origin // the file as read: order of keys, style and comments, for the next save; nil for a new design
}

// Kinds of holder.
const (
	Jacket     = "jacket"
	Conduit    = "conduit"
	Wireway    = "wireway"
	OpenBundle = "open-bundle"
	Apart      = "apart"
	NoHolder   = "none"
)

// Holder is what encloses the parts.
type Holder struct {
	Kind              string
	InsideMM          Opt[float64] // round
	WidthMM, HeightMM Opt[float64] // rectangle; of a jacket: flat, with half-circle ends on the short sides
	Stock             string       // a catalogue entry instead of size and layers
	Sides             Sides
	Layers            []Layer // from the inside outwards
	Fill              string  // "" means air
	ClearanceMM       Opt[float64]
	StringEmissivity  Opt[float64] // open bundle: of the inner face of the strings or ties
	LengthM           Opt[float64] // of the section's own holder only; not written: long
	TouchLimitC       Opt[float64] // limit of the outside surface; of the section's own holder only
}

// Sides of a rectangle: how each side's whole outer face meets the surroundings.
type Sides struct{ Left, Right, Top, Bottom Side }

// Kinds of side.
const (
	SideOpen      = "open"
	SideInsulated = "insulated"
	SideFixed     = "fixed"
)

// Side is open (the default, also when Kind is ""), insulated, or held at FixedC.
type Side struct {
	Kind   string
	FixedC float64
}

// Layer is one ring or wall layer.
type Layer struct {
	Material    string
	ThicknessMM float64
	Screen      Screen // of a metal layer; the zero Screen is none
}

// Kinds of part.
const (
	Core  = "core"
	Cable = "cable"
	Rod   = "rod"
)

// Roles of a conductor ("" means line).
const (
	RoleLine    = "line"
	RoleNeutral = "neutral"
	RoleEarth   = "earth"
	RoleControl = "control"
	RoleSpare   = "spare"
	RoleSignal  = "signal" // of a data pair or sensor: said to carry nothing that could warm it
)

// Part is one thing inside the holder.
type Part struct {
	ID        string
	Kind      string
	Stock     string     // core: conductor, layers and type from the catalogue
	Conductor *Conductor // core
	Layers    []Layer    // insulation (core) or covering (rod) from the inside outwards
	Type      string     // wire type
	Role      string
	Build     string       // cable
	TurnDeg   Opt[float64] // cable, and a core whose conductor is not round
	Diameter  Opt[float64] // rod, mm, over the material, under Layers
	BoreMM    Opt[float64] // rod: a hose's bore
	Bore      Bore         // what the bore holds
	Material  string       // rod
	At        Opt[Point]   // not written: the part is unplaced
	LimitC    Opt[float64]
	Pinned    bool   // stays where it is when places are sought
	Group     string // parts of one group stay together when places are sought
}

// Bore is what fills a hose: air (also ""), a material's name, or a temperature it is held at.
type Bore struct {
	Material string
	FixedC   Opt[float64]
}

// Flat tells that a holder is a jacket with half-circle ends.
func (h *Holder) Flat() bool {
	return h.Kind == Jacket && h.WidthMM.OK && h.HeightMM.OK && !h.InsideMM.OK
}

// Round tells that a conductor is.
func (c *Conductor) Round() bool { return c.Shape == "" || c.Shape == RoundShape }

// Metals and classes of a conductor.
const (
	Copper       = "copper"
	TinnedCopper = "tinned-copper"
	Aluminium    = "aluminium"
	Solid        = "solid"    // IEC 60228 class 1
	Stranded     = "stranded" // class 2
	Flexible     = "flexible" // class 5
)

// Shapes of a conductor ("" means round).
const (
	RoundShape  = "round"
	BarShape    = "bar"    // a rectangle with rounded corners
	SectorShape = "sector" // of a disc, eroded and then dilated by the corner radius
)

// Conductor is the metal of a core. Of a round one exactly one of Size, AreaMM2, DiameterMM is written; a bar has WidthMM and HeightMM, a sector AngleDeg
// and RadiusMM, both may have CornerMM and, for the metal in the outline, Size or AreaMM2.
type Conductor struct {
	Shape      string
	WidthMM    Opt[float64]
	HeightMM   Opt[float64]
	AngleDeg   Opt[float64]
	RadiusMM   Opt[float64]
	CornerMM   Opt[float64]
	Size       string
	AreaMM2    Opt[float64]
	DiameterMM Opt[float64]
	Metal      string // "" means copper
	Class      string // "" means stranded
}

// Build is a reusable cable: a jacket and parts of its own.
type Build struct {
	Name   string
	Holder Holder
	Parts  []Part
}

// Load is what a group of conductors carries. Exactly one of CurrentA, Unknown and HeatWM is written.
type Load struct {
	ID           string
	Conductors   []string     // ids, nested ones as C1/L1
	CurrentA     Opt[float64] // r.m.s. in each
	Unknown      bool         // current_a: unknown
	HeatWM       Opt[float64] // a fixed heat per metre of each
	FrequencyHz  Opt[float64]
	System       string
	Neutral      string       // the conductor that is this load's neutral, in Conductors or not
	VoltsV       Opt[float64] // between lines; of single-phase and dc between the two conductors
	PowerFactor  Opt[float64]
	Continuous   bool // said to run three hours or more; false is "not said"
	Motor        bool // a motor's branch circuit
	StartingDuty bool // runs only between a motor and its starter while starting
	Nonlinear    bool // the major part of it is nonlinear: its neutral carries harmonics
	Protection   Protection
	NotWith      []string // loads that can't be energised together with this one; either may name the other
	Terminals    Terminals
}

// Material is a document's own material or its override of the catalogue's.
type Material struct {
	Name         string
	KWMK         float64
	RhoCpMJM3K   Opt[float64]
	LimitC       Opt[float64]
	Emissivity   Opt[float64]
	Absorptivity Opt[float64]
	Gas          bool
	Source       string
}

// StockRow is a row of the catalogue as it stood when the design was saved. Group is the catalogue file's name for its kind
// of row, ID the row's id, YAML the row itself as one YAML mapping.
type StockRow struct{ Group, ID, YAML string }
