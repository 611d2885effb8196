package catalog

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
