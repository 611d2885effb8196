package section

// The keys of the block of ratings: of loads, cases, ranges, measurements, rules.

var (
	systems         = []word{{name: DC}, {name: SinglePhase}, {name: ThreePhase}}
	protectionKinds = []word{{name: Breaker}, {name: IndustrialBreaker}, {name: MotorBreaker}, {name: Fuse}, {name: OverloadRelay}, {name: ElectronicBreaker}}
	alongs          = []word{{name: Even}, {name: FallsOff}}
	covers          = []word{{name: Closed}, {name: Opened}}
	arrangements    = []word{{name: Bunched}, {name: LayerWall}, {name: LayerCeiling}, {name: LayerTray}, {name: LayerLadder}}
	insides         = []word{{name: InPanel}, {name: InMachine}}
	screenForms     = []word{{name: Braid}, {name: Foil}, {name: Served}, {name: Tube}, {name: Armour}}
	bondings        = []word{{name: BondedNone}, {name: BondedOne}, {name: BondedBoth}}
)

var screenTable = &table[Screen]{what: "a screen", fields: []field[Screen]{
	need(on("form", func(s *Screen) *string { return &s.Form }, oneOf{what: "screen form", words: screenForms})),
	on("coverage", func(s *Screen) *Opt[float64] { return &s.Coverage }, optNumber{emissive}),
	on("bonded", func(s *Screen) *string { return &s.Bonded }, oneOf{what: "bonding", words: bondings}),
}}

var protectionTable = &table[Protection]{what: "protection", fields: []field[Protection]{
	need(on("kind", func(p *Protection) *string { return &p.Kind }, oneOf{what: "kind of protection", words: protectionKinds})),
	need(on("rating_a", func(p *Protection) *float64 { return &p.RatingA }, number{positive})),
	on("trips_at", func(p *Protection) *Opt[float64] { return &p.TripsAt }, optNumber{between(1, 10, "times the rating")}),
}}

var terminalsTable = &table[Terminals]{
	what: "terminals",
	fields: []field[Terminals]{
		on("rating_c", func(t *Terminals) *Opt[float64] { return &t.RatingC }, optNumber{between(30, 300, "°C")}),
		on("rated_a", func(t *Terminals) *Opt[float64] { return &t.RatedA }, optNumber{positive}),
	},
	rules: checkTerminals,
}

// loadRatings are the keys of a load that ratings need.
var loadRatings = []field[Load]{
	on("system", func(l *Load) *string { return &l.System }, oneOf{what: "system", words: systems}),
	on("neutral", func(l *Load) *string { return &l.Neutral }, text{}),
	on("volts_v", func(l *Load) *Opt[float64] { return &l.VoltsV }, optNumber{positive}),
	on("power_factor", func(l *Load) *Opt[float64] { return &l.PowerFactor }, optNumber{emissive}),
	on("continuous", func(l *Load) *bool { return &l.Continuous }, yesNo{}),
	on("motor", func(l *Load) *bool { return &l.Motor }, yesNo{}),
	on("starting_duty", func(l *Load) *bool { return &l.StartingDuty }, yesNo{}),
	on("nonlinear", func(l *Load) *bool { return &l.Nonlinear }, yesNo{}),
	on("protection", func(l *Load) *Protection { return &l.Protection }, some[Protection]{protectionTable}),
	on("not_with", func(l *Load) *[]string { return &l.NotWith }, list[string]{text{}, false, MaxNamed}),
	on("terminals", func(l *Load) *Terminals { return &l.Terminals }, optional[Terminals]{terminalsTable}),
}

var caseTable = &table[Case]{
	what: "a case",
	fields: []field[Case]{
		need(on("id", func(c *Case) *string { return &c.ID }, ident{})),
		on("ambient_c", func(c *Case) *Opt[float64] { return &c.AmbientC }, optNumber{temperature}),
		on("loads", func(c *Case) *[]CaseLoad { return &c.Loads }, statesCodec),
		on("any", func(c *Case) *[]AnyOf { return &c.Any }, list[AnyOf]{anyTable, false, MaxNamed}),
	},
}

var statesCodec = oneLiner[CaseLoad]{dict[CaseLoad]{what: "a load", elem: stateCodec{}, name: func(s *CaseLoad) *string { return &s.Load }}}

var anyTable = &table[AnyOf]{what: "a choice of loads", fields: []field[AnyOf]{
	need(on("of", func(a *AnyOf) *[]string { return &a.Of }, list[string]{text{}, false, MaxNamed})),
	need(on("count", func(a *AnyOf) *int { return &a.Count }, whole{})),
}}

var rangesTable = &table[Ranges]{what: "ranges", fields: []field[Ranges]{
	on("ambient_k", func(v *Ranges) *Opt[float64] { return &v.AmbientK }, optNumber{notNegative}),
	on("load_percent", func(v *Ranges) *Opt[float64] { return &v.LoadPercent }, optNumber{percent}),
	on("film_percent", func(v *Ranges) *Opt[float64] { return &v.FilmPercent }, optNumber{percent}),
	on("emissivity", func(v *Ranges) *Opt[float64] { return &v.Emissivity }, optNumber{share}),
	on("clearance_mm", func(v *Ranges) *Opt[Span] { return &v.ClearanceMM }, spanCodec{}),
	on("position_mm", func(v *Ranges) *Opt[float64] { return &v.PositionMM }, optNumber{notNegative}),
}}

var percent = between(0, 100, "%")

var measurementTable = &table[Measurement]{
	what: "a measurement",
	fields: []field[Measurement]{
		need(on("id", func(m *Measurement) *string { return &m.ID }, ident{})),
		need(on("at", func(m *Measurement) *string { return &m.At }, text{})),
		need(on("reading_c", func(m *Measurement) *float64 { return &m.ReadingC }, number{temperature})),
		on("instrument_emissivity", func(m *Measurement) *Opt[float64] { return &m.InstrumentEmissivity }, optNumber{emissive}),
		on("surface_emissivity", func(m *Measurement) *Opt[float64] { return &m.SurfaceEmissivity }, optNumber{emissive}),
		on("reflected_c", func(m *Measurement) *Opt[float64] { return &m.ReflectedC }, optNumber{temperature}),
		on("ambient_c", func(m *Measurement) *Opt[float64] { return &m.AmbientC }, optNumber{temperature}),
		on("loads", func(m *Measurement) *[]CaseLoad { return &m.Loads }, statesCodec),
		on("loaded_for_min", func(m *Measurement) *Opt[float64] { return &m.LoadedForMin }, optNumber{notNegative}),
		on("along", func(m *Measurement) *string { return &m.Along }, oneOf{what: "course along the wire", words: alongs}),
		on("cover", func(m *Measurement) *string { return &m.Cover }, oneOf{what: "state of the cover", words: covers}),
	},
}

var rulesTable = &table[Rules]{what: "rules", fields: []field[Rules]{
	on("use", func(v *Rules) *[]string { return &v.Use }, list[string]{text{}, false, MaxNamed}),
	on("method", func(v *Rules) *string { return &v.Method }, text{}),
	on("inside", func(v *Rules) *string { return &v.Inside }, oneOf{what: "place", words: insides}),
	on("arrangement", func(v *Rules) *string { return &v.Arrangement }, oneOf{what: "arrangement", words: arrangements}),
	on("at_most", func(v *Rules) *[]AnyOf { return &v.AtMost }, list[AnyOf]{anyTable, false, MaxNamed}),
	on("files", func(v *Rules) *[]string { return &v.Files }, list[string]{text{}, false, MaxNamed}),
}}

// documentRatings are the keys of a design that ratings need.
var documentRatings = []field[Document]{
	on("cases", func(d *Document) *[]Case { return &d.Cases }, list[Case]{caseTable, true, MaxNamed}),
	on("ranges", func(d *Document) *Ranges { return &d.Ranges }, flow[Ranges]{rangesTable}),
	on("measurements", func(d *Document) *[]Measurement { return &d.Measurements }, list[Measurement]{measurementTable, true, MaxNamed}),
	on("rules", func(d *Document) *Rules { return &d.Rules }, flow[Rules]{rulesTable}),
	on("design_margin_k", func(d *Document) *Opt[float64] { return &d.DesignMarginK }, optNumber{notNegative}),
	on("reasons", func(d *Document) *[]Reason { return &d.Reasons },
		dict[Reason]{what: "a reason", elem: reasonCodec{}, name: func(v *Reason) *string { return &v.For }}),
}
