package catalog

// Metal is a conductor metal.
type Metal struct {
	ID, Name string
	Rho20    float64 // Ω·m at 20 °C
	Alpha20  float64 // 1/K at 20 °C
	K        float64 // W/mK
	RhoCp    float64 // J/m³K
	Source   Source
}

type metalRow struct {
	ID      string    `yaml:"id"`
	Name    string    `yaml:"name"`
	Rho20   float64   `yaml:"rho20_ohm_m"`
	Alpha20 float64   `yaml:"alpha20_1_k"`
	K       float64   `yaml:"k_w_mk"`
	RhoCp   float64   `yaml:"rho_cp_mj_m3k"`
	Source  sourceRow `yaml:"source"`
}

func (r metalRow) key() string { return r.ID }

func (r metalRow) build(*Catalog) (Metal, error) {
	var c check
	c.id(r.ID)
	c.name(r.Name)
	c.within("rho20_ohm_m", r.Rho20, 1.5e-8, 2e-6)
	c.within("alpha20_1_k", r.Alpha20, 0, 0.01)
	c.within("k_w_mk", r.K, 1, 500)
	c.within("rho_cp_mj_m3k", r.RhoCp, 0.5, 5)
	c.sources(r.Source)
	return Metal{r.ID, r.Name, r.Rho20, r.Alpha20, r.K, r.RhoCp * 1e6, r.Source.source()}, c.err
}

// Metal returns a metal by id.
func (c *Catalog) Metal(id string) (Metal, bool) { return c.metals.get(id) }

// Metals lists the metals.
func (c *Catalog) Metals() []Metal { return c.metals.list() }
