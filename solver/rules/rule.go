package rules

import (
	"maps"
	"slices"

	"packrise/solver/catalog"
)

// rule is a rule set: where it applies, which tables it multiplies, what it counts and how full a holder may be.
type rule struct {
	id, title, name, edition string
	source                   catalog.Source
	informative              bool
	holders                  []string // nil: all
	cableHolders             []string // where it rates only cores of cables
	looseHolders             []string // where it rates only loose wires
	metal                    string   // "yes", "no" or "": all
	elsewhere                map[string]string
	otherMetal, panel        string
	currents                 *currents
	ambient                  *ambients
	methods                  map[string]methodsRow
	counting                 counting
	fill                     *fillLimits
	harness                  *harnessRule
	remarks                  []string
}

// counting tells what a rule counts and which tables turn the number into a factor.
type counting struct {
	of             string // conductors | circuits | cores | wires
	tables         []*groupings
	freeUpTo       int    // no factor up to so many
	freeClause     string //
	nipplesFree    string // clause; "" they are not
	controlFree    string // clause; "" control wires count
	neutrals       string // clause of the rules for neutrals, "" none to cite
	apartFree      string // clause; "" parts lying apart count together
	diversityFrom  int    // A2 = A1·√(0.5 N/E), never above A1, from so many on; 0 never
	lightlyLoaded  float64
	lightlyClause  string
	mixedSizes     string     // clause of 1/√n in conduit and trunking; "" none
	cablesTogether *groupings // factor for cables beside each other, when cores are counted cable by cable
}

type methodsRow struct {
	Core  string `yaml:"core"`
	Cable string `yaml:"cable"`
}

type countingRow struct {
	Of             string   `yaml:"of"`
	Tables         []string `yaml:"tables"`
	FreeUpTo       int      `yaml:"free_up_to"`
	FreeClause     string   `yaml:"free_clause"`
	NipplesFree    string   `yaml:"nipples_free"`
	ControlFree    string   `yaml:"control_free"`
	Neutrals       string   `yaml:"neutrals"`
	ApartFree      string   `yaml:"apart_free"`
	DiversityFrom  int      `yaml:"diversity_from"`
	LightlyLoaded  float64  `yaml:"lightly_loaded"`
	LightlyClause  string   `yaml:"lightly_clause"`
	MixedSizes     string   `yaml:"mixed_sizes"`
	CablesTogether string   `yaml:"cables_together"`
}

type ruleRow struct {
	Rule        string                `yaml:"rule"`
	Title       string                `yaml:"title"`
	Name        string                `yaml:"name"`
	Informative bool                  `yaml:"informative"`
	Source      sourceRow             `yaml:"source"`
	Holders     []string              `yaml:"holders"`
	CablesIn    []string              `yaml:"cables_in"`
	LooseIn     []string              `yaml:"loose_in"`
	Metal       string                `yaml:"metal"`
	Elsewhere   map[string]string     `yaml:"elsewhere"`
	OtherMetal  string                `yaml:"other_metal"`
	Panel       string                `yaml:"panel"`
	Currents    string                `yaml:"currents"`
	Ambient     string                `yaml:"ambient"`
	Methods     map[string]methodsRow `yaml:"methods"`
	Counting    countingRow           `yaml:"counting"`
	Fill        *fillLimits           `yaml:"fill"`
	Harness     *harnessRow           `yaml:"harness"`
	Remarks     []string              `yaml:"remarks"`
}

var holderKinds = []string{Jacket, Conduit, Wireway, OpenBundle, Apart, Single}

func (row ruleRow) build(r *reader, b *Book) rule {
	r.id("rule", row.Rule)
	r.text("title", row.Title)
	r.text("name", row.Name)
	row.Source.check(r)
	r.words("holders", row.Holders, holderKinds)
	r.words("cables_in", row.CablesIn, holderKinds)
	r.words("loose_in", row.LooseIn, holderKinds)
	r.words("elsewhere", slices.Sorted(maps.Keys(row.Elsewhere)), holderKinds)
	r.words("methods", slices.Sorted(maps.Keys(row.Methods)), holderKinds)
	r.words("metal", []string{row.Metal}, []string{"yes", "no", ""})
	out := rule{
		id: row.Rule, title: row.Title, name: row.Name, edition: row.Source.edition(), source: row.Source.source(), informative: row.Informative,
		holders: row.Holders, cableHolders: row.CablesIn, looseHolders: row.LooseIn, metal: row.Metal, elsewhere: row.Elsewhere, otherMetal: row.OtherMetal, panel: row.Panel, methods: row.Methods, remarks: row.Remarks,
	}
	out.currents = refer(r, "currents", row.Currents, b.currents)
	out.ambient = refer(r, "ambient", row.Ambient, b.ambients)
	if row.Currents == "" && row.Fill == nil {
		r.fail("neither currents nor fill is there; a rule set needs one of them")
	}
	if row.Currents != "" && row.Harness == nil && row.Ambient == "" {
		r.fail("ambient is missing; name the table of factors for the ambient temperature")
	}
	out.counting = row.Counting.build(r, b, row.Currents != "")
	out.fill = row.Fill
	out.fill.check(r)
	if row.Harness != nil {
		out.harness = row.Harness.build(r, b)
	}
	return out
}

func (row countingRow) build(r *reader, b *Book, needed bool) counting {
	c := counting{
		of: row.Of, freeUpTo: row.FreeUpTo, freeClause: row.FreeClause, nipplesFree: row.NipplesFree, controlFree: row.ControlFree, neutrals: row.Neutrals, apartFree: row.ApartFree,
		diversityFrom: row.DiversityFrom, lightlyLoaded: row.LightlyLoaded, lightlyClause: row.LightlyClause, mixedSizes: row.MixedSizes,
		cablesTogether: refer(r, "counting.cables_together", row.CablesTogether, b.groupings),
	}
	if needed {
		r.words("counting.of", []string{row.Of}, []string{ofConductors, ofCircuits, ofCores, ofWires})
	}
	if needed && len(row.Tables) == 0 && row.Of != ofWires {
		r.fail("counting.tables is missing; name the table of factors by number")
	}
	for _, id := range row.Tables {
		if t := refer(r, "counting.tables", id, b.groupings); t != nil {
			c.tables = append(c.tables, t)
		}
	}
	if c.lightlyLoaded < 0 || c.lightlyLoaded > 1 {
		r.fail("counting.lightly_loaded is %g; write a share from 0 to 1", c.lightlyLoaded)
	}
	if c.freeUpTo < 0 || c.diversityFrom < 0 {
		r.fail("counting.free_up_to and counting.diversity_from are numbers of conductors from 0 up")
	}
	return c
}

// refer looks up a table by id; an empty id is none.
func refer[T any](r *reader, key, id string, tables map[string]*T) *T {
	if id == "" {
		return nil
	}
	t, ok := tables[id]
	if !ok {
		r.fail("%s names table %q, which is not there; the nearest is %s", key, id, nearest(slices.Sorted(maps.Keys(tables)), id))
	}
	return t
}

// words wants each word to be one of a few.
func (r *reader) words(key string, got, want []string) {
	for _, w := range got {
		if !slices.Contains(want, w) {
			r.fail("%s has %q; write %s", key, w, orList(want))
		}
	}
}

// applies tells whether the rule is for this run, else why not, in one sentence.
func (u rule) applies(r Run) (why string, ok bool) {
	switch {
	case r.ListedPanel && u.panel != "":
		return u.name + " does not apply: " + u.panel + ".", false
	case !u.isFor(r):
		return u.name + " does not apply: " + wordOr(u.elsewhere[r.Holder.Kind], "it is for "+orList(slices.Concat(u.holders, u.cableHolders, u.looseHolders))) + ".", false
	case u.metal == "yes" && !r.Holder.Metal, u.metal == "no" && r.Holder.Metal:
		return u.name + " does not apply: " + wordOr(u.otherMetal, "the wall is of the other kind") + ".", false
	}
	return "", true
}

// isFor tells whether the rule rates anything in this kind of holder.
func (u rule) isFor(r Run) bool {
	some := func(cable bool) bool {
		return slices.ContainsFunc(r.Conductors, func(c Conductor) bool { return c.Role != Earth && (c.Cable != "") == cable })
	}
	switch kind := r.Holder.Kind; {
	case slices.Contains(u.cableHolders, kind):
		return some(true)
	case slices.Contains(u.looseHolders, kind):
		return some(false)
	default:
		return len(u.holders) == 0 && len(u.cableHolders) == 0 && len(u.looseHolders) == 0 || slices.Contains(u.holders, kind)
	}
}

// rates tells whether the rule rates this conductor where it lies; why is for the others.
func (u rule) rates(r Run, c Conductor) (why string) {
	switch kind := r.Holder.Kind; {
	case c.Cable == "" && slices.Contains(u.cableHolders, kind):
		return u.name + " is for cables here, and this is a loose wire"
	case c.Cable != "" && slices.Contains(u.looseHolders, kind):
		return u.name + " is for loose wires, and this is a core of a cable"
	}
	return ""
}

func wordOr(s, other string) string {
	if s == "" {
		return other
	}
	return s
}

// method returns the reference method of a conductor, "" where the rule has none.
func (u rule) method(r Run, c Conductor) string {
	if u.methods == nil {
		return ""
	}
	if r.Method != "" {
		return r.Method
	}
	if c.Cable != "" {
		return u.methods[r.Holder.Kind].Cable
	}
	return u.methods[r.Holder.Kind].Core
}
