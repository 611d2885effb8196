package catalog

// Families of materials, in the order in which Materials lists them.
const (
	FamilyInsulation = "insulation"
	FamilyJacket     = "jacket"
	FamilyFiller     = "filler"
	FamilyWall       = "wall"
	FamilyMetal      = "metal"
	FamilyGas        = "gas"
)

var families = []string{FamilyInsulation, FamilyJacket, FamilyFiller, FamilyWall, FamilyMetal, FamilyGas}

// Material is an insulation, jacket, filler, wall or gas.
type Material struct {
	ID, Name     string
	Family       string // insulation | jacket | filler | wall | metal | gas
	Metal        bool   // a metal, also among the walls
	K            Range  // W/mK
	RhoCp        float64
	Emissivity   Range
	Absorptivity float64
	Gas          bool
	LimitC       Range // lowest limit of the polymer's range in Low; all zero = none
	Source       Source
}

type materialRow struct {
	ID           string    `yaml:"id"`
	Name         string    `yaml:"name"`
	Family       string    `yaml:"family"`
	Metal        bool      `yaml:"metal,omitempty"`
	Gas          bool      `yaml:"gas,omitempty"`
	K            spanRow   `yaml:"k_w_mk"`
	RhoCp        float64   `yaml:"rho_cp_mj_m3k"`
	Emissivity   spanRow   `yaml:"emissivity"`
	Absorptivity float64   `yaml:"absorptivity"`
	LimitC       spanRow   `yaml:"limit_c,omitempty"`
	Source       sourceRow `yaml:"source"`
}

func (r materialRow) key() string { return r.ID }

func (r materialRow) build(*Catalog) (Material, error) {
	var c check
	c.id(r.ID)
	c.name(r.Name)
	c.word("family", r.Family, families...)
	switch {
	case r.Gas:
		c.span("k_w_mk", r.K, 0.005, 0.2)
		c.within("rho_cp_mj_m3k", r.RhoCp, 1e-4, 0.01)
		c.span("emissivity", r.Emissivity, 0, 0)
	case r.Metal:
		c.span("k_w_mk", r.K, 5, 450)
		c.within("rho_cp_mj_m3k", r.RhoCp, 1, 5)
		c.span("emissivity", r.Emissivity, 0.01, 1)
	default:
		c.span("k_w_mk", r.K, 0.01, 5)
		c.within("rho_cp_mj_m3k", r.RhoCp, 0.01, 5)
		c.span("emissivity", r.Emissivity, 0.01, 1)
	}
	if r.Gas != (r.Family == FamilyGas) {
		c.fail("gas is %t in the family %s", r.Gas, r.Family)
	}
	if r.Family == FamilyMetal && !r.Metal {
		c.fail("a row of the family metal needs metal: true")
	}
	c.within("absorptivity", r.Absorptivity, 0, 1)
	if !r.LimitC.IsZero() {
		c.span("limit_c", r.LimitC, 40, 1000)
	}
	c.sources(r.Source)
	return Material{
		r.ID, r.Name, r.Family, r.Metal, Range(r.K), r.RhoCp * 1e6, Range(r.Emissivity), r.Absorptivity, r.Gas, Range(r.LimitC),
		r.Source.source(),
	}, c.err
}

// Material returns a material by id.
func (c *Catalog) Material(id string) (Material, bool) { return c.materials.get(id) }

// Materials lists the materials by family, in each the usual ones first.
func (c *Catalog) Materials() []Material { return c.materials.list() }
