package section

import (
	"fmt"
	"strings"

	"gopkg.in/yaml.v3"
)

// word is one of the words that a key takes.
type word struct{ name string }

var (
	surroundingsKinds = []word{
		{name: StillAir}, {name: MovingAir}, {name: FixedFilm}, {name: FixedWall}, {name: Buried}, {name: Water}, {name: Vacuum}, {name: Insulation},
	}
	holderKinds = []word{
		{name: Jacket},
		{name: Conduit},
		{name: Wireway},
		{name: OpenBundle},
		{name: NoHolder},
		{name: Apart},
	}
	partKinds       = []word{{name: Core}, {name: Cable}, {name: Rod}}
	roles           = []word{{name: RoleLine}, {name: RoleNeutral}, {name: RoleEarth}, {name: RoleControl}, {name: RoleSpare}, {name: RoleSignal}}
	conductorShapes = []word{{name: RoundShape}, {name: BarShape}, {name: SectorShape}}

	metals    = []word{{name: Copper}, {name: TinnedCopper}, {name: Aluminium}}
	classes   = []word{{name: Solid}, {name: Stranded}, {name: Flexible}}
	sideKinds = []word{{name: SideOpen}, {name: SideInsulated}}

	// other spellings of words, for the suggestion
	alsoWritten = map[string]string{
		"aluminum": Aluminium, "al": Aluminium, "cu": Copper, "tinned copper": TinnedCopper, "tinned": TinnedCopper, "class 1": Solid, "class 2": Stranded,
		"class 5": Flexible, "1": Solid, "2": Stranded, "5": Flexible, "fine-stranded": Flexible, "pe": RoleEarth, "ground": RoleEarth, "phase": RoleLine, "data": RoleSignal,
		"tray": Wireway, "trunking": Wireway, "pipe": Conduit, "tube": Conduit, "sheath": Jacket, "bundle": OpenBundle, "air": StillAir, "wire": Core,
		"conductor": Core, "filler": Rod, "hose": Rod, "closed": SideInsulated,
	}
)

// oneOf is the codec of a key that takes one of a few words.
type oneOf struct {
	text
	what  string // "surroundings kind"
	words []word
}

func (c oneOf) names() []string {
	var out []string
	for _, w := range c.words {
		out = append(out, w.name)
	}
	return out
}

func (c oneOf) check(r *report, v string, at path) {
	if v == "" {
		return
	}
	for _, w := range c.words {
		if w.name == v {
			return
		}
	}
	do := "write one of " + strings.Join(c.names(), ", ")
	near := alsoWritten[strings.ToLower(v)]
	if near == "" || !has(c.words, near) {
		near = nearest(v, c.names())
	}
	if near != "" {
		do = "did you mean `" + near + "`? " + do
	}
	r.add(at, "unknown-word", fmt.Sprintf("%s %s is unknown", c.what, show(v)), do)
}

func has(words []word, name string) bool {
	for _, w := range words {
		if w.name == name {
			return true
		}
	}
	return false
}

// sideCodec is the codec of one side: open, insulated or {fixed_c: …}.
type sideCodec struct{}

var fixedTable = &table[Side]{what: "a fixed temperature", fields: []field[Side]{
	need(on("fixed_c", func(s *Side) *float64 { return &s.FixedC }, number{temperature})),
}}

func (sideCodec) read(r *report, n *yaml.Node, at path) Side {
	if n.Kind == yaml.MappingNode {
		s := fixedTable.read(r, n, at)
		s.Kind = SideFixed
		return s
	}
	return Side{Kind: text{}.read(r, n, at)}
}

func (sideCodec) node(s Side) *yaml.Node {
	if s.Kind == SideFixed {
		return fixedTable.node(s)
	}
	return text{}.node(s.Kind)
}

func (sideCodec) check(r *report, s Side, at path) {
	if s.Kind == SideFixed {
		fixedTable.check(r, s, at)
		return
	}
	if s.FixedC != 0 {
		r.add(at, "key-of-kind", "¤ has a temperature but is not held at one", "write {fixed_c: …}")
	}
	oneOf{what: "side", words: sideKinds}.check(r, s.Kind, at)
}

// boreCodec is the codec of what a hose holds: air, a material or {fixed_c: …}.
type boreCodec struct{}

var boreFixed = &table[Bore]{what: "a fixed temperature", fields: []field[Bore]{
	need(on("fixed_c", func(b *Bore) *Opt[float64] { return &b.FixedC }, optNumber{temperature})),
}}

func (boreCodec) read(r *report, n *yaml.Node, at path) Bore {
	if n.Kind == yaml.MappingNode {
		return boreFixed.read(r, n, at)
	}
	return Bore{Material: text{}.read(r, n, at)}
}

func (boreCodec) node(b Bore) *yaml.Node {
	if b.FixedC.OK {
		return boreFixed.node(b)
	}
	return text{}.node(b.Material)
}

func (boreCodec) check(r *report, b Bore, at path) {
	if b.FixedC.OK && b.Material != "" {
		r.add(at, "one-of", "¤ has both a material and a temperature", "choose one of them")
	}
	optNumber{temperature}.check(r, b.FixedC, at.key("fixed_c"))
	text{}.check(r, b.Material, at)
}
