package section

import (
	"slices"

	"gopkg.in/yaml.v3"
)

// The tables below are the format: every key that is read, in the order in which it is written. A key that comes to the format
// is one line here (of surroundings in their own file), one field of its type, and its line in the list of later keys taken out.

// Blocks of the format that a later version reads.
const (
	laterDrawings = "drawings and prices"
	laterTime     = "time, length and electricity"
)

func later(block string, keys ...string) map[string]string {
	m := map[string]string{}
	for _, k := range keys {
		m[k] = block
	}
	return m
}

func merge(maps ...map[string]string) map[string]string {
	out := map[string]string{}
	for _, m := range maps {
		for k, v := range m {
			out[k] = v
		}
	}
	return out
}

// versionKey leads every file. It is no part of the Document: migrate deals with it before the rest.
const versionKey = "packrise"

var versionField = field[Document]{
	key:   versionKey,
	read:  func(*report, *yaml.Node, path, *Document) {},
	node:  func(*Document) *yaml.Node { return numberNode(FormatVersion) },
	check: func(*report, *Document, path) {},
}

var documentTable = &table[Document]{
	what: "a design", block: true,
	fields: slices.Concat([]field[Document]{
		versionField,
		on("title", func(d *Document) *string { return &d.Title }, text{free: true}),
		on("notes", func(d *Document) *string { return &d.Notes }, text{free: true}),
		need(on("surroundings", func(d *Document) *Surroundings { return &d.Surroundings }, surroundingsTable)),
		need(on("holder", func(d *Document) *Holder { return &d.Holder }, holderTable)),
		on("parts", func(d *Document) *[]Part { return &d.Parts }, list[Part]{partTable, true, 0}),
		on("builds", func(d *Document) *[]Build { return &d.Builds }, dict[Build]{what: "a build", elem: buildTable, name: func(b *Build) *string { return &b.Name }}),
		on("loads", func(d *Document) *[]Load { return &d.Loads }, list[Load]{loadTable, true, 0}),
		on("materials", func(d *Document) *[]Material { return &d.Materials },
			dict[Material]{what: "a material", elem: materialTable, name: func(m *Material) *string { return &m.Name }, rules: checkMaterialName}),
	}, documentRatings, []field[Document]{
		on("stock_used", func(d *Document) *[]StockRow { return &d.StockUsed }, stockCodec{}),
	}),
	later: merge(later(laterDrawings, "buildup", "prices", "sheet"), later(laterTime, "terminals", "route")),
}

var holderTable = &table[Holder]{
	what: "a holder", block: true,
	fields: []field[Holder]{
		need(on("kind", func(h *Holder) *string { return &h.Kind }, oneOf{what: "holder kind", words: holderKinds})),
		on("inside_mm", func(h *Holder) *Opt[float64] { return &h.InsideMM }, optNumber{positive}),
		on("width_mm", func(h *Holder) *Opt[float64] { return &h.WidthMM }, optNumber{positive}),
		on("height_mm", func(h *Holder) *Opt[float64] { return &h.HeightMM }, optNumber{positive}),
		on("stock", func(h *Holder) *string { return &h.Stock }, text{}),
		on("sides", func(h *Holder) *Sides { return &h.Sides }, optional[Sides]{sidesTable}),
		on("layers", func(h *Holder) *[]Layer { return &h.Layers }, list[Layer]{layerTable, false, MaxLayers}),
		on("fill", func(h *Holder) *string { return &h.Fill }, text{}),
		on("clearance_mm", func(h *Holder) *Opt[float64] { return &h.ClearanceMM }, optNumber{notNegative}),
		on("string_emissivity", func(h *Holder) *Opt[float64] { return &h.StringEmissivity }, optNumber{emissive}),
		on("length_m", func(h *Holder) *Opt[float64] { return &h.LengthM }, optNumber{positive}),
		on("touch_limit_c", func(h *Holder) *Opt[float64] { return &h.TouchLimitC }, optNumber{temperature}),
	},
	rules: checkHolder,
}

var sidesTable = &table[Sides]{what: "sides", fields: []field[Sides]{
	on("left", func(s *Sides) *Side { return &s.Left }, sideCodec{}),
	on("right", func(s *Sides) *Side { return &s.Right }, sideCodec{}),
	on("top", func(s *Sides) *Side { return &s.Top }, sideCodec{}),
	on("bottom", func(s *Sides) *Side { return &s.Bottom }, sideCodec{}),
}}

var layerTable = &table[Layer]{
	what: "a layer",
	fields: []field[Layer]{
		need(on("material", func(l *Layer) *string { return &l.Material }, text{})),
		need(on("thickness_mm", func(l *Layer) *float64 { return &l.ThicknessMM }, number{positive})),
		on("screen", func(l *Layer) *Screen { return &l.Screen }, some[Screen]{screenTable}),
	},
}

var partTable = &table[Part]{
	what: "a part",
	fields: []field[Part]{
		need(on("id", func(p *Part) *string { return &p.ID }, ident{})),
		need(on("kind", func(p *Part) *string { return &p.Kind }, oneOf{what: "part kind", words: partKinds})),
		on("stock", func(p *Part) *string { return &p.Stock }, text{}),
		on("conductor", func(p *Part) **Conductor { return &p.Conductor }, pointer[Conductor]{conductorTable}),
		on("build", func(p *Part) *string { return &p.Build }, text{}),
		on("diameter_mm", func(p *Part) *Opt[float64] { return &p.Diameter }, optNumber{positive}),
		on("bore_mm", func(p *Part) *Opt[float64] { return &p.BoreMM }, optNumber{positive}),
		on("bore", func(p *Part) *Bore { return &p.Bore }, boreCodec{}),
		on("material", func(p *Part) *string { return &p.Material }, text{}),
		on("layers", func(p *Part) *[]Layer { return &p.Layers }, list[Layer]{layerTable, false, MaxLayers}),
		on("type", func(p *Part) *string { return &p.Type }, text{}),
		on("role", func(p *Part) *string { return &p.Role }, oneOf{what: "role", words: roles}),
		on("at_mm", func(p *Part) *Opt[Point] { return &p.At }, place{}),
		on("turn_deg", func(p *Part) *Opt[float64] { return &p.TurnDeg }, optNumber{anyNumber}),
		on("limit_c", func(p *Part) *Opt[float64] { return &p.LimitC }, optNumber{temperature}),
		on("pinned", func(p *Part) *bool { return &p.Pinned }, yesNo{}),
		on("group", func(p *Part) *string { return &p.Group }, text{}),
	},
	rules: checkPart,
}

var conductorTable = &table[Conductor]{
	what: "a conductor",
	fields: []field[Conductor]{
		on("shape", func(c *Conductor) *string { return &c.Shape }, oneOf{what: "conductor shape", words: conductorShapes}),
		on("width_mm", func(c *Conductor) *Opt[float64] { return &c.WidthMM }, optNumber{positive}),
		on("height_mm", func(c *Conductor) *Opt[float64] { return &c.HeightMM }, optNumber{positive}),
		on("angle_deg", func(c *Conductor) *Opt[float64] { return &c.AngleDeg }, optNumber{positive}),
		on("radius_mm", func(c *Conductor) *Opt[float64] { return &c.RadiusMM }, optNumber{positive}),
		on("corner_mm", func(c *Conductor) *Opt[float64] { return &c.CornerMM }, optNumber{notNegative}),
		on("size", func(c *Conductor) *string { return &c.Size }, sizeCodec{}),
		on("area_mm2", func(c *Conductor) *Opt[float64] { return &c.AreaMM2 }, optNumber{positive}),
		on("diameter_mm", func(c *Conductor) *Opt[float64] { return &c.DiameterMM }, optNumber{positive}),
		on("metal", func(c *Conductor) *string { return &c.Metal }, oneOf{what: "metal", words: metals}),
		on("class", func(c *Conductor) *string { return &c.Class }, oneOf{what: "class", words: classes}),
	},
	rules: checkConductor,
}

var buildTable = &table[Build]{
	what: "a build", block: true,
	fields: []field[Build]{
		need(on("holder", func(b *Build) *Holder { return &b.Holder }, inline[Holder]{holderTable})),
		on("parts", func(b *Build) *[]Part { return &b.Parts }, list[Part]{partTable, true, 0}),
	},
}

var loadTable = &table[Load]{
	what: "a load",
	fields: slices.Concat([]field[Load]{
		need(on("id", func(l *Load) *string { return &l.ID }, ident{})),
		need(on("conductors", func(l *Load) *[]string { return &l.Conductors }, list[string]{text{}, false, 0})),
		currentField(),
		on("heat_w_m", func(l *Load) *Opt[float64] { return &l.HeatWM }, optNumber{notNegative}),
		on("frequency_hz", func(l *Load) *Opt[float64] { return &l.FrequencyHz }, optNumber{notNegative}),
	}, loadRatings),
	later: later(laterTime, "duty", "length_m", "drop_limit_percent", "harmonics_percent", "phase_deg", "parallel"),
	rules: checkLoad,
}

var materialTable = &table[Material]{
	what: "a material",
	fields: []field[Material]{
		need(on("k_w_mk", func(m *Material) *float64 { return &m.KWMK }, number{positive})),
		on("rho_cp_mj_m3k", func(m *Material) *Opt[float64] { return &m.RhoCpMJM3K }, optNumber{positive}),
		on("limit_c", func(m *Material) *Opt[float64] { return &m.LimitC }, optNumber{temperature}),
		on("emissivity", func(m *Material) *Opt[float64] { return &m.Emissivity }, optNumber{emissive}),
		on("absorptivity", func(m *Material) *Opt[float64] { return &m.Absorptivity }, optNumber{share}),
		on("gas", func(m *Material) *bool { return &m.Gas }, yesNo{}),
		on("source", func(m *Material) *string { return &m.Source }, text{free: true}),
	},
}
