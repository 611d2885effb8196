package section

// Systems of a load ("" means not said).
const (
	DC          = "dc"
	SinglePhase = "single-phase"
	ThreePhase  = "three-phase"
)

// Kinds of protective device. What each trips at by convention is a rating's business; trips_at overrides it.
const (
	Breaker           = "breaker"            // for household and similar installations
	IndustrialBreaker = "industrial-breaker" // moulded case, with an adjustable or fixed thermal release
	MotorBreaker      = "motor-breaker"      // a breaker that is a motor's overload protection too
	Fuse              = "fuse"
	OverloadRelay     = "overload-relay"
	ElectronicBreaker = "electronic-breaker" // measures the current, mostly 24 V
)

// Protection is the device ahead of a load; without a Kind it is unknown.
type Protection struct {
	Kind    string
	RatingA float64
	TripsAt Opt[float64] // conventional tripping current over the rating
}

// Terminals cap the current of each conductor of a load; they are no temperature of the section. At most one is written.
type Terminals struct {
	RatingC Opt[float64] // the marked temperature of a terminal: 60, 75, 90
	RatedA  Opt[float64] // its rated current
}

// Case is one way in which the loads run together. A load that it does not name runs as the design says.
type Case struct {
	ID       string
	AmbientC Opt[float64] // default the surroundings'
	Loads    []CaseLoad   // in the order of the file
	Any      []AnyOf
}

// CaseLoad is a load's state in a case or during a measurement: its current in each conductor, or Off.
type CaseLoad struct {
	Load     string
	CurrentA float64
	Off      bool
}

// AnyOf says that Count of the loads run at a time, whichever, each with its own current, and the others are off.
type AnyOf struct {
	Of    []string
	Count int
}

// Ranges say how far the inputs may be off: to both sides, but for the clearance, which has its two ends.
type Ranges struct {
	AmbientK    Opt[float64]
	LoadPercent Opt[float64]
	FilmPercent Opt[float64]
	Emissivity  Opt[float64]
	ClearanceMM Opt[Span]
	PositionMM  Opt[float64]
}

// Span is a range from Low to High.
type Span struct{ Low, High float64 }

// Words of a measurement ("" means not said).
const (
	Even     = "even"      // the heat along the wire
	FallsOff = "falls-off" // from the hot place to both sides or away from one end: as from a joint
	Closed   = "closed"    // the cover while it was read
	Opened   = "opened"
)

// Measurement is one temperature that was read, with what ran meanwhile.
type Measurement struct {
	ID                   string
	At                   string       // a part's id, or a name of AtNames: "jacket", "outside" …
	ReadingC             float64      // as the instrument showed it
	InstrumentEmissivity Opt[float64] // as set; not written: a contact thermometer
	SurfaceEmissivity    Opt[float64] // of what it was pointed at; default the material's
	ReflectedC           Opt[float64] // temperature of what is mirrored; default the ambient
	AmbientC             Opt[float64] // at that time; default the surroundings'
	Loads                []CaseLoad   // at that time; others as the design says
	LoadedForMin         Opt[float64] // how long before the reading
	Along                string
	Cover                string
}

// Inside says what regime the section lies in where the wiring rules stop ("": building wiring or not said).
const (
	InPanel   = "panel"   // a listed panel or assembly: its own standard counts, not the wiring rules
	InMachine = "machine" // electrical equipment of a machine
)

// Arrangements, where a table asks.
const (
	Bunched      = "bunched"
	LayerWall    = "layer-wall"
	LayerCeiling = "layer-ceiling"
	LayerTray    = "layer-tray"
	LayerLadder  = "layer-ladder"
)

// Rules choose the tables beside the computed values.
type Rules struct {
	Use    []string // ids: nec-310, iec-52 …
	Method string   // reference method of installation: B1, C, E, F, G
	Inside string
	// Arrangement of cables or bundles beside each other: Bunched (also "") or a single layer.
	Arrangement string
	AtMost      []AnyOf  // what can run together beyond the loads' not_with, for counts
	Files       []string // rule sets of the user's own, beside the design
}

// Reason is why something was set that needs one. For is "limit L1", "design_margin_k" or "measurement survey".
type Reason struct{ For, Text string }

// Keys of reasons.
const (
	ReasonLimit       = "limit "          // before a part's id: its limit is above the catalogue's
	ReasonMargin      = "design_margin_k" // the margin is 0
	ReasonMeasurement = "measurement "    // before a measurement's id: its fit raises a permitted current
)

// Forms of a screen.
const (
	Braid  = "braid"
	Foil   = "foil"
	Served = "served" // wires laid round side by side
	Tube   = "tube"   // seamless, corrugated or welded
	Armour = "armour" // wires or tape of steel
)

// How the ends of a screen are bonded ("" means not said).
const (
	BondedNone = "none"
	BondedOne  = "one-end"
	BondedBoth = "both-ends"
)

// Screen is what makes a layer of metal a screen. For heat it stays the layer that it is, whatever it covers; a current in one that is bonded at
// both ends is not reckoned.
type Screen struct {
	Form     string
	Coverage Opt[float64] // share of the circumference's area
	Bonded   string
}

// normalRatings does to the block of ratings what normal does: empty lists are nil.
func normalRatings(d *Document) {
	d.Cases = mapped(d.Cases, func(c Case) Case {
		c.Loads, c.Any = noEmpty(c.Loads), noEmpty(c.Any)
		return c
	})
	d.Measurements = mapped(d.Measurements, func(m Measurement) Measurement {
		m.Loads = noEmpty(m.Loads)
		return m
	})
	d.Rules.Use, d.Rules.AtMost, d.Rules.Files, d.Reasons = noEmpty(d.Rules.Use), noEmpty(d.Rules.AtMost), noEmpty(d.Rules.Files), noEmpty(d.Reasons)
}
