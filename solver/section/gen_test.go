package section

import (
	"fmt"
	"slices"
	"strings"

	"pgregory.net/rapid"
)

// maker draws documents that Check finds nothing wrong with.
type maker struct{ t *rapid.T }

func (m maker) coin(label string) bool { return rapid.Bool().Draw(m.t, label) }

func (m maker) num(lo, hi float64) float64 {
	v := rapid.Float64Range(lo, hi).Draw(m.t, "v")
	switch rapid.IntRange(0, 3).Draw(m.t, "digits") {
	case 0:
		return float64(int(v)) + lo
	case 1:
		return float64(int(v*100))/100 + lo
	}
	return v
}

func (m maker) opt(lo, hi float64) Opt[float64] {
	if m.coin("written") {
		return Some(m.num(lo, hi))
	}
	return Opt[float64]{}
}

// name draws a name that YAML would love to take for something else.
func (m maker) name() string {
	return rapid.OneOf(
		rapid.SampledFrom([]string{
			"pvc", "k0.2", "yes", "No", "null", "~", "1", "1.5", "true", "- a", "a: b", "#1", "a #b", "'", "\"q\"", "[x]", "{y}", "&a", "*b", "!t", "|", ">", "%d", "@x",
			"`", "12 AWG/copper", "2024-01-01", "1:30", "0x1F", ".inf", "<<", "=", "μ-Ω", "电缆", "a,b", "a]", "?", ":", "-", "…",
		}),
		rapid.StringMatching(`[A-Za-z][A-Za-z0-9 .,:#'"-]{0,8}[a-z0-9]`),
	).Draw(m.t, "name")
}

func (m maker) text() string {
	return rapid.OneOf(
		rapid.SampledFrom([]string{"", "one line", "two\nlines", "ends\n", "# no comment\nx", " leads", "trails ", "a\n\n  b\n", "tab\there", "x\n\n", "\n", "---\n...", "bell\a", "é\u2028x", "\r\n", ": ", "k: v\n- x"}),
		rapid.String(),
	).Draw(m.t, "text")
}

func (m maker) id(taken map[string]bool) string {
	for {
		id := strings.ReplaceAll(m.name(), "/", "-")
		if taken[id] {
			id = fmt.Sprintf("%s%d", id, len(taken))
		}
		if !taken[id] {
			taken[id] = true
			return id
		}
	}
}

func (m maker) layers() (out []Layer) {
	for range rapid.IntRange(0, 3).Draw(m.t, "layers") {
		l := Layer{Material: m.name(), ThicknessMM: m.num(0.01, 5)}
		if rapid.IntRange(0, 3).Draw(m.t, "screen") == 0 {
			l.Screen = Screen{m.word([]string{Braid, Foil, Served, Tube, Armour}), m.opt(0.1, 0.8), m.word([]string{"", BondedNone, BondedOne, BondedBoth})}
		}
		out = append(out, l)
	}
	return out
}

func (m maker) word(words []string) string { return rapid.SampledFrom(words).Draw(m.t, "word") }

func (m maker) conductor() *Conductor {
	c := &Conductor{Metal: m.word([]string{"", Copper, TinnedCopper, Aluminium}), Class: m.word([]string{"", Solid, Stranded, Flexible})}
	most := 2
	switch m.word([]string{"", RoundShape, BarShape, SectorShape}) {
	case RoundShape:
		c.Shape = RoundShape
	case BarShape:
		c.Shape, c.WidthMM, c.HeightMM, c.CornerMM = BarShape, Some(m.num(2, 50)), Some(m.num(2, 20)), m.opt(0, 0.5)
		most = 1
	case SectorShape:
		c.Shape, c.AngleDeg, c.RadiusMM, c.CornerMM = SectorShape, Some(m.num(60, 120)), Some(m.num(3, 20)), m.opt(0, 0.5)
		most = 1
	}
	switch rapid.IntRange(0, most).Draw(m.t, "given") {
	case 0:
		c.Size = m.word([]string{"12 AWG", "#12", "1/0", "250 MCM", "2,5 mm²", "2.5 mm2"})
	case 1:
		c.AreaMM2 = Some(m.num(0.01, 500))
	case 2:
		c.DiameterMM = Some(m.num(0.01, 30))
	}
	return c
}

func (m maker) part(id string, builds []string) Part {
	p := Part{ID: id, LimitC: m.opt(-50, 250), Pinned: m.coin("pinned")}
	if m.coin("group") {
		p.Group = m.name()
	}
	if m.coin("placed") {
		p.At = Some(Point{m.num(-50, 50), m.num(-50, 50)})
	}
	switch kind := rapid.IntRange(0, 3).Draw(m.t, "kind"); {
	case kind == 0:
		p.Kind, p.Diameter, p.Material, p.Layers = Rod, Some(m.num(2, 9)), m.name(), m.layers()
		if m.coin("hose") {
			p.BoreMM = Some(m.num(0.1, 1))
			p.Bore = rapid.SampledFrom([]Bore{{}, {Material: "air"}, {Material: "oil"}, {FixedC: Some(0.0)}, {FixedC: Some(15.5)}}).Draw(m.t, "bore")
		}
	case kind == 1 && len(builds) > 0:
		p.Kind, p.Build, p.TurnDeg = Cable, m.word(builds), m.opt(-360, 360)
	case kind == 2:
		p.Kind, p.Stock = Core, m.name()
	default:
		p.Kind, p.Conductor, p.Layers = Core, m.conductor(), m.layers()
		if m.coin("type") {
			p.Type = m.name()
		}
		if !p.Conductor.Round() {
			p.TurnDeg = m.opt(-360, 360)
		}
		p.Role = m.word([]string{"", RoleLine, RoleNeutral, RoleEarth, RoleControl, RoleSpare, RoleSignal})
	}
	return p
}

func (m maker) parts(n int, builds []string) (out []Part) {
	taken := map[string]bool{}
	for range rapid.IntRange(0, n).Draw(m.t, "parts") {
		out = append(out, m.part(m.id(taken), builds))
	}
	return out
}

func (m maker) holder(kinds ...string) Holder {
	h := Holder{Kind: m.word(kinds)}
	if h.Kind == NoHolder {
		return h
	}
	h.ClearanceMM = m.opt(0, 2)
	if m.coin("fill") {
		h.Fill = m.name()
	}
	if h.Kind == OpenBundle || h.Kind == Apart {
		h.StringEmissivity = m.opt(0.05, 0.9)
		return h
	}
	if h.Kind == Wireway && m.coin("sides") {
		side := func() Side {
			return rapid.SampledFrom([]Side{{}, {Kind: SideOpen}, {Kind: SideInsulated}, {Kind: SideFixed, FixedC: 40}, {Kind: SideFixed}}).Draw(m.t, "side")
		}
		h.Sides = Sides{side(), side(), side(), side()}
	}
	switch {
	case m.coin("stock"):
		h.Stock = m.name()
		return h
	case h.Kind == Wireway:
		h.WidthMM, h.HeightMM = Some(m.num(1, 200)), Some(m.num(1, 200))
	default:
		h.InsideMM = Some(m.num(1, 100))
	}
	h.Layers = m.layers()
	return h
}

func (m maker) loads(d *Document) (out []Load) {
	taken := map[string]bool{}
	for _, p := range Unfold(d) {
		switch {
		case len(out) > 0 && m.coin("same load"):
			l := &out[len(out)-1]
			l.Conductors = append(l.Conductors, p.ID)
		case m.coin("loaded"):
			l := Load{ID: m.id(taken), Conductors: []string{p.ID}}
			switch rapid.IntRange(0, 2).Draw(m.t, "load") {
			case 0:
				l.CurrentA, l.FrequencyHz = Some(m.num(0, 100)), m.opt(0, 400)
			case 1:
				l.Unknown = true
			case 2:
				l.HeatWM = Some(m.num(0, 50))
			}
			out = append(out, l)
		}
	}
	return out
}

// surroundings draws a kind with the keys that it takes.
func (m maker) surroundings() Surroundings {
	s := Surroundings{Kind: m.word([]string{StillAir, MovingAir, FixedFilm, FixedWall, Buried, Water, Vacuum, Insulation}), AmbientC: Some(m.num(-40, 90))}
	for i := range kindKeys {
		k := &kindKeys[i]
		if slices.Contains(k.must, s.Kind) || slices.Contains(k.kinds, s.Kind) && m.coin(k.key) {
			m.put(&s, k.key)
		}
	}
	if s.Run == Vertical {
		s.HeightM = Some(m.num(0.1, 30))
	} else {
		s.HeightM = Opt[float64]{}
	}
	return s
}

func (m maker) put(s *Surroundings, key string) {
	switch key {
	case "film_w_m2k":
		s.FilmWM2K = Some(m.num(0.1, 1000))
	case "air_speed_m_s":
		s.AirSpeedMS = Some(m.num(0, 40))
	case "air_direction":
		s.AirDirection = m.word([]string{Across, Along})
	case "altitude_m":
		s.AltitudeM = Some(m.num(-450, 14000))
	case "radiant_c":
		s.RadiantC = Some(m.num(-40, 90))
	case "run":
		s.Run = m.word([]string{Horizontal, Vertical})
	case "sun_w_m2":
		s.SunWM2 = Some(m.num(0, 900))
	case "depth_m":
		s.DepthM = Some(m.num(0.1, 20))
	case "soil_w_mk":
		s.SoilWMK = Some(m.num(0.1, 2))
	case "wrap":
		s.Wrap = &Layer{Material: m.name(), ThicknessMM: m.num(1, 100)}
	case "against":
		a := Against{AtDeg: m.num(-180, 180), Share: m.num(1, 98) / 100, Is: Side{Kind: SideInsulated}}
		if m.coin("held") {
			a.Is = Side{Kind: SideFixed, FixedC: m.num(-40, 90)}
		}
		s.Against = &a
	case "wet":
		s.Wet = true
	}
}

// document draws a whole valid document without origin.
func (m maker) document() *Document {
	d := &Document{Title: m.text(), Notes: m.text(), Surroundings: m.surroundings()}
	var names []string
	taken := map[string]bool{}
	for range rapid.IntRange(0, 3).Draw(m.t, "builds") {
		name := m.id(taken)
		d.Builds = append(d.Builds, Build{name, m.holder(Jacket, Conduit, OpenBundle), m.parts(3, names)})
		names = append(names, name)
	}
	d.Holder = m.holder(Jacket, Conduit, Wireway, OpenBundle, Apart, NoHolder)
	if d.Holder.Kind == Wireway || d.Holder.Kind == Apart {
		d.Surroundings.Against = nil
	}
	if k := d.Surroundings.Kind; d.Holder.Kind == Apart && (k == FixedWall || k == Insulation) {
		d.Surroundings = Surroundings{Kind: StillAir, AmbientC: d.Surroundings.AmbientC}
	}
	d.Holder.TouchLimitC, d.Holder.LengthM = m.opt(30, 90), m.opt(0.1, 5)
	n := 6
	if d.Holder.Kind == NoHolder {
		n = 1
	}
	d.Parts = m.parts(n, names)
	d.Loads = m.loads(d)
	if m.coin("ratings") {
		m.ratings(d)
	}
	taken = map[string]bool{Air: true}
	for range rapid.IntRange(0, 3).Draw(m.t, "materials") {
		d.Materials = append(d.Materials, Material{m.id(taken), m.num(0.01, 400), m.opt(0.1, 5), m.opt(-50, 300), m.opt(0.01, 0.5), m.opt(0, 0.5), m.coin("gas"), m.text()})
	}
	taken = map[string]bool{}
	for range rapid.IntRange(0, 3).Draw(m.t, "rows") {
		d.StockUsed = append(d.StockUsed, StockRow{
			m.word([]string{"material", "wire", "yes"}), m.id(taken),
			m.word([]string{"{k: 1}", "k: 1.50\nsource:\n  - a # why\n  - {b: null}\n", `{t: "12", d: 2024-01-01, e: ""}`, "{a: {b: [1, 2], c: yes}}"}),
		})
	}
	return d
}
