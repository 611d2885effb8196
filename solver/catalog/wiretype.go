package catalog

// WireType is a trade designation with its limits.
type WireType struct {
	ID, Name   string // thhn, "THHN"
	DryC, WetC float64
	NeverWet   bool   // WetC is 0 and the type must not be wet
	Insulation string // material id
	American   bool   // the trade writes its bare sizes in AWG and kcmil, else in mm²
	Class      string // usual class: solid | stranded | flexible
	Metal      string // usual metal
	Source     Source
}

type typeRow struct {
	ID         string    `yaml:"id"`
	Name       string    `yaml:"name"`
	DryC       float64   `yaml:"dry_c"`
	WetC       float64   `yaml:"wet_c,omitempty"`
	NeverWet   bool      `yaml:"never_wet,omitempty"`
	Insulation string    `yaml:"insulation"`
	Sizes      string    `yaml:"sizes"`
	Class      string    `yaml:"class"`
	Metal      string    `yaml:"metal"`
	Aliases    []string  `yaml:"aliases,omitempty,flow"`
	Source     sourceRow `yaml:"source"`
}

func (r typeRow) key() string { return r.ID }

func (r typeRow) build(cat *Catalog) (WireType, error) {
	var c check
	c.id(r.ID)
	c.name(r.Name)
	c.within("dry_c", r.DryC, 40, 500)
	switch {
	case r.NeverWet && r.WetC != 0:
		c.fail("never_wet stands beside wet_c %g", r.WetC)
	case !r.NeverWet:
		c.within("wet_c", r.WetC, 40, r.DryC)
	}
	c.word("sizes", r.Sizes, "AWG", "mm2")
	c.word("class", r.Class, classes...)
	cat.refers(&c, "insulation", "material", r.Insulation)
	cat.refers(&c, "metal", "metal", r.Metal)
	for _, a := range r.Aliases {
		c.id(a)
	}
	c.sources(r.Source)
	return WireType{
		ID: r.ID, Name: r.Name, DryC: r.DryC, WetC: r.WetC, NeverWet: r.NeverWet, Insulation: r.Insulation,
		American: r.Sizes == "AWG", Class: r.Class, Metal: r.Metal, Source: r.Source.source(),
	}, c.err
}

// WireType returns a wire type by id.
func (c *Catalog) WireType(id string) (WireType, bool) { return c.types.get(id) }

// WireTypes lists the wire types.
func (c *Catalog) WireTypes() []WireType { return c.types.list() }
