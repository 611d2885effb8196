package catalog

// Source says where a row's numbers come from.
type Source struct {
	Text       string // standard or handbook, edition, clause or table
	FromMemory bool   // recalled, not seen
	Note       string // disagreements, roundings, extrapolation
}

// Range is a value with the range over which sources disagree; Low = High = V where they do not.
type Range struct{ V, Low, High float64 }

// Metal is a conductor metal.
type Metal struct {
	ID, Name string
	Rho20    float64 // Ω·m at 20 °C
	Alpha20  float64 // 1/K at 20 °C
	K        float64 // W/mK
	RhoCp    float64 // J/m³K
	Source   Source
}

// Conductor is one size of one metal and class.
type Conductor struct {
	Size         string  // canonical: "12 AWG", "250 kcmil", "2.5 mm2"
	Metal, Class string  // section's words: copper | tinned-copper | aluminium; solid | stranded | flexible
	AreaM2       float64 // nominal metal area
	DiameterM    float64 // over the strands
	R20          float64 // Ω/m at 20 °C
	Formula      bool    // below or beside the standard's table: by its formula, and Source.Note says so
	Source       Source
}

// Material is an insulation, jacket, filler, wall or gas.
type Material struct {
	ID, Name     string
	Family       string  // insulation | jacket | filler | wall | metal | gas
	K            Range   // W/mK
	RhoCp        float64 // J/m³K
	Emissivity   Range
	Absorptivity float64
	Gas          bool
	LimitC       Range // lowest limit of the polymer's range in Low; all zero = none
	Source       Source
}

// WireType is a trade designation with its limits.
type WireType struct {
	ID, Name   string // thhn, "THHN"
	DryC, WetC float64
	NeverWet   bool   // WetC is 0 and the type must not be wet
	Insulation string // material id
	Source     Source
}

// Wire is a finished wire whose outside diameter a standard gives.
type Wire struct {
	ID, Name    string
	Size        string
	Metal       string
	Class       string
	DiameterM   float64 // outside
	Type        string  // wire type id
	Insulation  string  // material id; its thickness fills from the conductor to DiameterM
	Source      Source
	Abbreviated string // how people write it: "12 thhn"
}

// Holder is a conduit, wireway or trunking by its trade or metric size.
type Holder struct {
	ID, Name   string // emt-1, "EMT 1"
	Kind       string // conduit | wireway (section's words)
	InsideM    float64
	WidthM     float64
	HeightM    float64
	WallM      float64
	Wall       string // material id
	Emissivity float64
	Source     Source
}

// Catalog is the whole look-up. It is immutable.
type Catalog struct{}

// Load reads and checks every file of the embedded catalogue. It panics on a bad file: the loader test keeps that from shipping.
func Load() *Catalog { panic("catalog: Load is not built") }

// Metal returns a metal by id.
func (c *Catalog) Metal(id string) (Metal, bool) { panic("catalog: not built") }

// Conductor returns the row for a size as a person wrote it ("12 AWG", "2,5 mm²"); the error is one sentence that names the nearest sizes.
func (c *Catalog) Conductor(size, metal, class string) (Conductor, error) {
	panic("catalog: not built")
}

// ConductorOf returns a conductor that is given by its metal area (m²) or, with area 0, by the diameter of its metal (m): resistance by ρ/A.
func (c *Catalog) ConductorOf(areaM2, diameterM float64, metal, class string) (Conductor, error) {
	panic("catalog: not built")
}

// Material returns a material by id.
func (c *Catalog) Material(id string) (Material, bool) { panic("catalog: not built") }

// WireType returns a wire type by id.
func (c *Catalog) WireType(id string) (WireType, bool) { panic("catalog: not built") }

// Wire returns a finished wire by id.
func (c *Catalog) Wire(id string) (Wire, bool) { panic("catalog: not built") }

// Holder returns a holder by id.
func (c *Catalog) Holder(id string) (Holder, bool) { panic("catalog: not built") }

// Nearest returns up to n ids of the group ("material", "type", "wire", "holder", "metal") that are spelt most like id.
func (c *Catalog) Nearest(group, id string, n int) []string { panic("catalog: not built") }

// Materials, WireTypes, Wires and Holders list rows in the order in which people expect them (family or kind, then size).
func (c *Catalog) Materials() []Material { panic("catalog: not built") }

// WireTypes lists the wire types.
func (c *Catalog) WireTypes() []WireType { panic("catalog: not built") }

// Wires lists the finished wires.
func (c *Catalog) Wires() []Wire { panic("catalog: not built") }

// Holders lists the holders.
func (c *Catalog) Holders() []Holder { panic("catalog: not built") }

// Sizes lists canonical sizes from thin to thick: AWG and kcmil if american, else mm².
func (c *Catalog) Sizes(american bool) []string { panic("catalog: not built") }

// Row returns a row as one YAML mapping, for stock_used. Groups: "material", "type", "wire", "holder", "metal", "conductor"
// (id "12 AWG/copper/stranded").
func (c *Catalog) Row(group, id string) (yaml string, ok bool) { panic("catalog: not built") }

// With returns a catalogue in which the given row stands in place of the catalogue's own; changed tells whether they differ. The error is one
// sentence.
func (c *Catalog) With(group, id, yaml string) (cat *Catalog, changed bool, err error) {
	panic("catalog: not built")
}

// Parsed is what the line to put things in understood.
type Parsed struct {
	Count  int    // "3x 12 thhn": 3
	Wire   string // finished wire id, "" if none
	Holder string // holder id, "" if none
	Size   string // conductor size, with Type
	Metal  string
	Class  string
	Type   string  // wire type id
	RodMM  float64 // "filler 4": diameter
	Meant  string  // how it was understood, for people: "3 × 12 AWG THHN, ⌀ 3.30 mm"
}

// Parse reads what a person typed into the line: "12 thhn", "3x 2.5 h07v-k", "emt 1", "filler 4". The error says in one sentence what
// was not understood and gives an example.
func (c *Catalog) Parse(text string) (Parsed, error) { panic("catalog: not built") }

// TypicalWire returns insulation thickness (m) for a size and wire type where no finished wire is listed, with its source; ok is false if
// nothing is known.
func (c *Catalog) TypicalWire(size, typ string) (thicknessM float64, src Source, ok bool) {
	panic("catalog: not built")
}
