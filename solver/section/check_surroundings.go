package section

import (
	"slices"
	"strings"
)

// kindKey is a key of surroundings that belongs to some kinds only.
type kindKey struct {
	key     string
	written func(*Surroundings) bool
	drop    func(*Surroundings)
	kinds   []string // that take it
	must    []string // that need it
	example string   // for what is missing
}

// amount is a kindKey that holds a number.
func amount(key string, at func(*Surroundings) *Opt[float64], kinds, must []string, example string) kindKey {
	return kindKey{
		key, func(s *Surroundings) bool { return at(s).OK },
		func(s *Surroundings) { *at(s) = Opt[float64]{} }, kinds, must, example,
	}
}

// choice is a kindKey that holds a word.
func choice(key string, at func(*Surroundings) *string, kinds []string) kindKey {
	return kindKey{key, func(s *Surroundings) bool { return *at(s) != "" }, func(s *Surroundings) { *at(s) = "" }, kinds, nil, ""}
}

var (
	inAir   = []string{StillAir, MovingAir, Insulation}
	inFluid = []string{StillAir, MovingAir, Insulation, Water}
	inFlow  = []string{MovingAir, Water}
	inLight = []string{StillAir, MovingAir, Insulation, Vacuum}
	film    = []string{FixedFilm}
	ground  = []string{Buried}
	wrapped = []string{Insulation}
)

var kindKeys = []kindKey{
	amount("film_w_m2k", func(s *Surroundings) *Opt[float64] { return &s.FilmWM2K }, film, film, "a coefficient in W/m²K"),
	amount("air_speed_m_s", func(s *Surroundings) *Opt[float64] { return &s.AirSpeedMS }, inFlow, []string{MovingAir}, "the speed of the air in m/s"),
	choice("air_direction", func(s *Surroundings) *string { return &s.AirDirection }, inFlow),
	amount("altitude_m", func(s *Surroundings) *Opt[float64] { return &s.AltitudeM }, inAir, nil, ""),
	amount("radiant_c", func(s *Surroundings) *Opt[float64] { return &s.RadiantC }, inLight, nil, ""),
	choice("run", func(s *Surroundings) *string { return &s.Run }, inFluid),
	amount("height_m", func(s *Surroundings) *Opt[float64] { return &s.HeightM }, inFluid, nil, ""),
	amount("sun_w_m2", func(s *Surroundings) *Opt[float64] { return &s.SunWM2 }, inLight, nil, ""),
	amount("depth_m", func(s *Surroundings) *Opt[float64] { return &s.DepthM }, ground, ground, "the depth of the axis in m, often 0.7"),
	amount("soil_w_mk", func(s *Surroundings) *Opt[float64] { return &s.SoilWMK }, ground, ground, "the soil's conductivity in W/mK, 0.4 for dry and 1 for moist soil"),
	{
		"wrap", func(s *Surroundings) bool { return s.Wrap != nil },
		func(s *Surroundings) { s.Wrap = nil }, wrapped, wrapped, "{material: …, thickness_mm: …}",
	},
	{
		"against", func(s *Surroundings) bool { return s.Against != nil },
		func(s *Surroundings) { s.Against = nil },
		[]string{StillAir, MovingAir, FixedFilm, Water, Vacuum, Insulation},
		nil, "",
	},
	{
		"wet", func(s *Surroundings) bool { return s.Wet },
		func(s *Surroundings) { s.Wet = false },
		[]string{StillAir, MovingAir, FixedFilm, FixedWall, Buried, Water, Insulation},
		nil, "",
	},
}

// notThere says why a key makes no sense in a kind, where that is not plain.
var notThere = map[string]string{
	FixedWall + " film_w_m2k":   ", which holds the outer surface at ambient_c",
	Buried + " sun_w_m2":        ": the sun does not reach a run in the ground",
	Water + " sun_w_m2":         ": the sun on a run in water is not reckoned",
	Water + " radiant_c":        ": water lets no heat radiation through",
	Buried + " radiant_c":       ": soil lets no heat radiation through",
	Buried + " against":         ": soil lies all round it",
	FixedWall + " against":      ", which holds the whole outer surface at ambient_c",
	Vacuum + " altitude_m":      ", where there is no air",
	Vacuum + " wet":             ", where nothing stays wet",
	StillAir + " air_speed_m_s": ", where the air moves by its own warmth only",
	FixedFilm + " sun_w_m2":     ", whose coefficient stands for all there is",
	FixedFilm + " radiant_c":    ", whose coefficient has the radiation in it",
	FixedFilm + " altitude_m":   ", whose coefficient stands for all there is",
}

// instead names what to write where a key does not belong.
var instead = map[string]string{
	FixedWall + " film_w_m2k":   "take it out, or write kind: fixed-film",
	StillAir + " air_speed_m_s": "take it out, or write kind: moving-air",
	StillAir + " air_direction": "take it out, or write kind: moving-air",
	FixedWall + " against":      "take it out, or write the kind that cools the open part",
}

func checkSurroundings(r *report, s *Surroundings, at path) {
	if !has(surroundingsKinds, s.Kind) {
		return // of no kind: reported already
	}
	for _, k := range kindKeys {
		switch written := k.written(s); {
		case written && !slices.Contains(k.kinds, s.Kind):
			do, ok := instead[s.Kind+" "+k.key]
			if !ok {
				do = "take it out (it belongs to kind " + strings.Join(k.kinds, ", ") + ")"
			}
			r.add(at.key(k.key), "key-of-kind", "¤ does not belong to kind "+s.Kind+notThere[s.Kind+" "+k.key], do)
		case !written && slices.Contains(k.must, s.Kind):
			r.add(at.key(k.key), "missing-key", "¤ is missing", "write it: kind "+s.Kind+" needs "+k.example)
		}
	}
	if !slices.Contains(inFluid, s.Kind) {
		return
	}
	switch {
	case s.Run == Vertical && !s.HeightM.OK:
		r.add(at.key("height_m"), "missing-key", "¤ is missing", "write it: a vertical run needs its height in m")
	case s.Run != Vertical && s.HeightM.OK:
		r.add(at.key("height_m"), "key-of-kind", "¤ belongs to a vertical run", "write run: vertical, or take it out")
	}
}
