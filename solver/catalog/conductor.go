package catalog

import (
	"fmt"
	"math"
	"slices"

	"packrise/solver/quantity"
)

// Classes of a conductor, in the words of the section: IEC 60228 classes 1, 2 and 5.
const (
	Solid    = "solid"
	Stranded = "stranded"
	Flexible = "flexible"
)

var classes = []string{Solid, Stranded, Flexible}

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

type conductorRow struct {
	ID         string    `yaml:"id"` // "12 AWG/copper/stranded"
	Size       string    `yaml:"size"`
	Metal      string    `yaml:"metal"`
	Class      string    `yaml:"class"`
	AreaMM2    float64   `yaml:"area_mm2"`
	DiameterMM float64   `yaml:"diameter_mm"`
	R20        float64   `yaml:"r20_ohm_km"`
	Formula    bool      `yaml:"formula,omitempty"`
	Source     sourceRow `yaml:"source"`
}

func conductorID(size, metal, class string) string { return size + "/" + metal + "/" + class }

func (r conductorRow) key() string { return r.ID }

func (r conductorRow) build(cat *Catalog) (Conductor, error) {
	var c check
	if r.ID != conductorID(r.Size, r.Metal, r.Class) {
		c.fail("id is not size/metal/class, which is %q", conductorID(r.Size, r.Metal, r.Class))
	}
	c.size(r.Size)
	cat.refers(&c, "metal", "metal", r.Metal)
	c.word("class", r.Class, classes...)
	c.strands(cat, r.Metal, r.AreaMM2, r.DiameterMM, r.R20)
	c.sources(r.Source)
	return Conductor{r.Size, r.Metal, r.Class, r.AreaMM2 * 1e-6, r.DiameterMM * 1e-3, r.R20 * 1e-3, r.Formula, r.Source.source()}, c.err
}

// strands wants area (mm²), diameter (mm) and resistance at 20 °C (Ω/km) that belong together.
func (c *check) strands(cat *Catalog, metal string, area, diameter, r20 float64) {
	c.within("area_mm2", area, 1e-3, 5000)
	circle := math.Pi / 4 * diameter * diameter
	c.within("diameter_mm", diameter, 0.03, 200)
	if fill := area / circle; fill > 1.06 || fill < 0.3 {
		c.fail("%g mm² of metal in a circle of %g mm is not possible", area, diameter)
	}
	if m, ok := cat.Metal(metal); ok {
		pure := m.Rho20 / area * 1e9 // Ω/km
		c.within("r20_ohm_km", r20, 0.97*pure, 1.4*pure)
	}
}

// Conductor returns the row for a size as a person wrote it ("12 AWG", "2,5 mm²"); the error is one sentence that names the nearest sizes.
func (c *Catalog) Conductor(size, metal, class string) (Conductor, error) {
	if row, ok := c.conductors.get(conductorID(size, metal, class)); ok {
		return row, nil // written as the catalogue writes it, the usual case
	}
	s, err := quantity.ParseSize(size)
	if err != nil {
		return Conductor{}, err
	}
	if row, ok := c.conductors.get(conductorID(s.String(), metal, class)); ok {
		return row, nil
	}
	if err := c.known(metal, class); err != nil {
		return Conductor{}, err
	}
	near := c.nearestSizes(s, metal, class)
	if len(near) == 0 {
		return Conductor{}, fmt.Errorf("no table here has %s %s conductors in %s sizes; choose another class, or write area_mm2 in place of size", class, metal, system(s))
	}
	return Conductor{}, noSize(s, metal, class, near, "or write area_mm2 in place of size")
}

// noSize says which sizes are nearest to one that the tables lack.
func noSize(s quantity.Size, metal, class string, near []string, hint string) error {
	return fmt.Errorf("there is no %s %s conductor of %s in the tables; %s; %s", class, metal, s, nearestAre(near), hint)
}

// known checks metal and class.
func (c *Catalog) known(metal, class string) error {
	if _, ok := c.Metal(metal); !ok {
		return fmt.Errorf("%q is not a conductor metal; write %s", metal, orList(c.metals.order))
	}
	if !slices.Contains(classes, class) {
		return fmt.Errorf("%q is not a class of conductor; write %s", class, orList(classes))
	}
	return nil
}

// american tells whether a size belongs to AWG and kcmil.
func american(s quantity.Size) bool { return s.Kind() != quantity.MM2 }

func system(s quantity.Size) string {
	if american(s) {
		return "AWG and kcmil"
	}
	return "mm²"
}

// nearestSizes returns the next thinner and thicker size that the tables have.
func (c *Catalog) nearestSizes(s quantity.Size, metal, class string) []string {
	var thinner, thicker string
	for _, t := range c.sizes[index(american(s))] {
		if _, ok := c.conductors.get(conductorID(t.String(), metal, class)); !ok {
			continue
		}
		if t.Compare(s) < 0 {
			thinner = t.String()
		} else if thicker == "" {
			thicker = t.String()
		}
	}
	return slices.DeleteFunc([]string{thinner, thicker}, func(s string) bool { return s == "" })
}

// listSizes remembers the sizes of the conductors from thin to thick, first mm², then AWG and kcmil.
func (c *Catalog) listSizes() {
	seen := map[string]bool{}
	c.sizes = [2][]quantity.Size{}
	for _, id := range c.conductors.order {
		text := c.conductors.at[id].value.Size
		if seen[text] {
			continue
		}
		seen[text] = true
		s := parsed(text)
		c.sizes[index(american(s))] = append(c.sizes[index(american(s))], s)
	}
	for i := range c.sizes {
		slices.SortFunc(c.sizes[i], quantity.Size.Compare)
	}
}

func index(american bool) int {
	if american {
		return 1
	}
	return 0
}

// Sizes lists canonical sizes from thin to thick: AWG and kcmil if american, else mm².
func (c *Catalog) Sizes(american bool) []string {
	sizes := c.sizes[index(american)]
	out := make([]string, len(sizes))
	for i, s := range sizes {
		out[i] = s.String()
	}
	return out
}
