package section

// Kinds of surroundings.
const (
	StillAir   = "still-air"
	MovingAir  = "moving-air"
	FixedFilm  = "fixed-film"
	FixedWall  = "fixed-wall"
	Buried     = "buried"
	Water      = "water"
	Vacuum     = "vacuum"
	Insulation = "insulation"
)

// Words of surroundings.
const (
	Across     = "across" // the flow, to the run
	Along      = "along"
	Horizontal = "horizontal" // the run
	Vertical   = "vertical"
)

// Range of the pressure altitude, m: that of the model of the atmosphere.
const (
	LowestAltitudeM  = -1000
	HighestAltitudeM = 30000
)

// Surroundings are what the section gives its heat to. Which keys a kind takes and needs: see kindKeys.
type Surroundings struct {
	Kind         string
	AmbientC     Opt[float64] // far away; of the ground
	FilmWM2K     Opt[float64] // fixed-film: one constant coefficient, radiation included
	AirSpeedMS   Opt[float64] // moving-air, water
	AirDirection string       // "": along in a wireway, else across
	AltitudeM    Opt[float64] // pressure altitude; default sea level
	RadiantC     Opt[float64] // what the surface radiates to; default the ambient
	Run          string       // "" means horizontal
	HeightM      Opt[float64] // of a vertical run
	SunWM2       Opt[float64] // irradiance from above; default none
	DepthM       Opt[float64] // buried: of the axis
	SoilWMK      Opt[float64] // buried
	Wrap         *Layer       // insulation
	Against      *Against     // what a part of the outside rests against
	Wet          bool         // the wire types' wet limits count
}

var surroundingsTable = &table[Surroundings]{
	what: "surroundings", block: true,
	fields: []field[Surroundings]{
		need(on("kind", func(s *Surroundings) *string { return &s.Kind }, oneOf{what: "surroundings kind", words: surroundingsKinds})),
		need(on("ambient_c", func(s *Surroundings) *Opt[float64] { return &s.AmbientC }, optNumber{temperature})),
		on("film_w_m2k", func(s *Surroundings) *Opt[float64] { return &s.FilmWM2K }, optNumber{positive}),
		on("air_speed_m_s", func(s *Surroundings) *Opt[float64] { return &s.AirSpeedMS }, optNumber{between(0, 100, "m/s")}),
		on("air_direction", func(s *Surroundings) *string { return &s.AirDirection }, oneOf{what: "air direction", words: []word{{name: Across}, {name: Along}}}),
		on("altitude_m", func(s *Surroundings) *Opt[float64] { return &s.AltitudeM }, optNumber{altitude}),
		on("radiant_c", func(s *Surroundings) *Opt[float64] { return &s.RadiantC }, optNumber{temperature}),
		on("run", func(s *Surroundings) *string { return &s.Run }, oneOf{what: "run", words: []word{{name: Horizontal}, {name: Vertical}}}),
		on("height_m", func(s *Surroundings) *Opt[float64] { return &s.HeightM }, optNumber{between(0.001, 1000, "m")}),
		on("sun_w_m2", func(s *Surroundings) *Opt[float64] { return &s.SunWM2 }, optNumber{between(0, 2000, "W/m²")}),
		on("depth_m", func(s *Surroundings) *Opt[float64] { return &s.DepthM }, optNumber{between(0.001, 100, "m")}),
		on("soil_w_mk", func(s *Surroundings) *Opt[float64] { return &s.SoilWMK }, optNumber{between(0.01, 20, "W/mK")}),
		on("wrap", func(s *Surroundings) **Layer { return &s.Wrap }, pointer[Layer]{layerTable}),
		on("against", func(s *Surroundings) **Against { return &s.Against }, pointer[Against]{againstTable}),
		on("wet", func(s *Surroundings) *bool { return &s.Wet }, yesNo{}),
	},
	rules: checkSurroundings,
}

var altitude = numberRule{
	func(v float64) bool { return v >= LowestAltitudeM && v <= HighestAltitudeM },
	"the model of the atmosphere goes from −1000 to 30000 m", "write an altitude inside it, or kind: vacuum",
}

// between is the rule of a number with both ends.
func between(low, high float64, unit string) numberRule {
	span := shown(low) + " and " + shown(high) + " " + unit
	return numberRule{func(v float64) bool { return v >= low && v <= high }, "must lie between " + span, "write a number between " + span}
}
