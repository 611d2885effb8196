package catalog

// Kinds of holder, in the words of the section.
const (
	KindConduit = "conduit"
	KindWireway = "wireway"
)

// Holder is a conduit, wireway or trunking by its trade or metric size.
type Holder struct {
	ID, Name   string  // emt-1, "EMT 1"
	Kind       string  // conduit | wireway (section's words)
	InsideM    float64 // conduit: inside diameter
	WidthM     float64 // wireway: inside
	HeightM    float64 // wireway: inside
	WallM      float64
	Wall       string // material id
	Emissivity float64
	Source     Source
}

const inch = 25.4 // mm

// holderRow gives each length in mm or in inches, and the wall by itself or by the outside.
type holderRow struct {
	ID         string    `yaml:"id"`
	Name       string    `yaml:"name"`
	Kind       string    `yaml:"kind"`
	InsideIn   float64   `yaml:"inside_in,omitempty"`
	InsideMM   float64   `yaml:"inside_mm,omitempty"`
	OutsideIn  float64   `yaml:"outside_in,omitempty"`
	OutsideMM  float64   `yaml:"outside_mm,omitempty"`
	WidthIn    float64   `yaml:"width_in,omitempty"`
	WidthMM    float64   `yaml:"width_mm,omitempty"`
	HeightIn   float64   `yaml:"height_in,omitempty"`
	HeightMM   float64   `yaml:"height_mm,omitempty"`
	WallMM     float64   `yaml:"wall_mm,omitempty"`
	Wall       string    `yaml:"wall"`
	Emissivity float64   `yaml:"emissivity"`
	Source     sourceRow `yaml:"source"`
}

func (r holderRow) key() string { return r.ID }

func (r holderRow) build(cat *Catalog) (Holder, error) {
	var c check
	inside, outside := either(&c, "inside", r.InsideMM, r.InsideIn), either(&c, "outside", r.OutsideMM, r.OutsideIn)
	width, height := either(&c, "width", r.WidthMM, r.WidthIn), either(&c, "height", r.HeightMM, r.HeightIn)
	wall := r.WallMM
	c.id(r.ID)
	c.name(r.Name)
	c.word("kind", r.Kind, KindConduit, KindWireway)
	if r.Kind == KindConduit {
		c.within("inside_mm", inside, 1, 1000)
		if outside != 0 {
			c.within("outside_mm", outside, inside, 1.6*inside)
			wall = (outside - inside) / 2
		}
		c.within("width and height of a conduit", width+height, 0, 0)
	} else {
		c.within("width_mm", width, 5, 2000)
		c.within("height_mm", height, 5, 2000)
		c.within("inside and outside of a wireway", inside+outside, 0, 0)
	}
	c.within("wall_mm", wall, 0.1, 50)
	cat.refers(&c, "wall", "material", r.Wall)
	c.within("emissivity", r.Emissivity, 0.01, 1)
	c.sources(r.Source)
	const mm = 1e-3
	return Holder{r.ID, r.Name, r.Kind, inside * mm, width * mm, height * mm, wall * mm, r.Wall, r.Emissivity, r.Source.source()}, c.err
}

// either returns a length in mm that is written in one of two units.
func either(c *check, key string, mm, in float64) float64 {
	if mm != 0 && in != 0 {
		c.fail("%s_mm and %s_in stand beside each other", key, key)
	}
	return mm + in*inch
}

// Holder returns a holder by id.
func (c *Catalog) Holder(id string) (Holder, bool) { return c.holders.get(id) }

// Holders lists the holders by kind, in each from small to large.
func (c *Catalog) Holders() []Holder { return c.holders.list() }
