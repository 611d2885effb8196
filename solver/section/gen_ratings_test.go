package section

import (
	"slices"

	"pgregory.net/rapid"
)

// ratings adds a block of ratings that fits the document.
func (m maker) ratings(d *Document) {
	for i := range d.Loads {
		m.rateLoad(d, &d.Loads[i])
	}
	taken := map[string]bool{}
	for range rapid.IntRange(0, 2).Draw(m.t, "cases") {
		d.Cases = append(d.Cases, m.ratedCase(d, m.id(taken)))
	}
	if m.coin("ranges") {
		d.Ranges = Ranges{AmbientK: m.opt(0, 9), LoadPercent: m.opt(0, 30), FilmPercent: m.opt(0, 30), Emissivity: m.opt(0, 0.2), PositionMM: m.opt(0, 2)}
		if m.coin("clearance") {
			low := m.num(0, 1)
			d.Ranges.ClearanceMM = Some(Span{low, low + m.num(0, 1)})
		}
	}
	taken = map[string]bool{}
	for range rapid.IntRange(0, 2).Draw(m.t, "measurements") {
		d.Measurements = append(d.Measurements, m.measurement(d, m.id(taken)))
	}
	if m.coin("rules") {
		d.Rules = Rules{Method: m.word([]string{"", "B1", "C"}), Inside: m.word([]string{"", InPanel, InMachine}), Arrangement: m.word([]string{"", Bunched, LayerTray})}
		if len(d.Loads) > 0 {
			d.Rules.AtMost = append(d.Rules.AtMost, AnyOf{[]string{d.Loads[0].ID}, rapid.IntRange(0, 1).Draw(m.t, "at most")})
		}
		for range rapid.IntRange(0, 2).Draw(m.t, "use") {
			d.Rules.Use = append(d.Rules.Use, m.name())
			d.Rules.Files = append(d.Rules.Files, m.name())
		}
	}
	m.reasons(d)
}

func (m maker) rateLoad(d *Document, l *Load) {
	l.System = m.word([]string{"", DC, SinglePhase, ThreePhase})
	l.VoltsV, l.PowerFactor = m.opt(1, 1000), m.opt(0.1, 0.8)
	if m.coin("said") {
		l.Nonlinear = m.coin("nonlinear")
		l.Continuous, l.Motor = m.coin("continuous"), m.coin("motor")
		l.StartingDuty = !l.Continuous && !l.Motor
	}
	if m.coin("protected") {
		l.Protection = Protection{m.word([]string{Breaker, IndustrialBreaker, MotorBreaker, Fuse, OverloadRelay, ElectronicBreaker}), m.num(1, 99), m.opt(1, 3)}
	}
	switch rapid.IntRange(0, 2).Draw(m.t, "terminals") {
	case 0:
		l.Terminals.RatingC = Some(m.num(60, 90))
	case 1:
		l.Terminals.RatedA = Some(m.num(1, 100))
	}
	for _, p := range Unfold(d) {
		if (p.Part.Role == "" || p.Part.Role == RoleNeutral) && m.coin("neutral") {
			l.Neutral = p.ID
			break
		}
	}
	for i := range d.Loads {
		if d.Loads[i].ID != l.ID && rapid.IntRange(0, 3).Draw(m.t, "apart") == 0 {
			l.NotWith = append(l.NotWith, d.Loads[i].ID)
		}
	}
}

func (m maker) states(d *Document, off bool) (out []CaseLoad) {
	for _, l := range d.Loads {
		switch {
		case !m.coin("stated"):
		case l.HeatWM.OK || off:
			out = append(out, CaseLoad{Load: l.ID, Off: true})
		default:
			out = append(out, CaseLoad{Load: l.ID, CurrentA: m.num(0, 90)})
		}
	}
	return out
}

func (m maker) ratedCase(d *Document, id string) Case {
	c := Case{ID: id, AmbientC: m.opt(-20, 60), Loads: m.states(d, m.coin("off"))}
	for a := range exclusions(d) {
		for i := range c.Loads {
			if c.Loads[i].Load == a {
				c.Loads[i] = CaseLoad{Load: a, Off: true}
			}
		}
	}
	var free []string
	for _, l := range d.Loads {
		if !slices.ContainsFunc(c.Loads, func(s CaseLoad) bool { return s.Load == l.ID }) {
			free = append(free, l.ID)
		}
	}
	if len(free) > 0 && m.coin("any") {
		c.Any = append(c.Any, AnyOf{free, rapid.IntRange(0, len(free)).Draw(m.t, "count")})
	}
	return c
}

func (m maker) measurement(d *Document, id string) Measurement {
	at := []string{Outside, WrapName, Jacket, "conduit/2"}
	for _, p := range UnfoldAll(d) {
		at = append(at, p.ID)
		if p.Part.Kind == Cable {
			at = append(at, p.ID+"/jacket", p.ID+"/jacket/2")
		}
	}
	v := Measurement{
		ID: id, At: m.word(at), ReadingC: m.num(61, 150), AmbientC: m.opt(-20, 60), Loads: m.states(d, false), LoadedForMin: m.opt(0, 600),
		Along: m.word([]string{"", Even, FallsOff}), Cover: m.word([]string{"", Closed, Opened}),
	}
	if m.coin("from afar") {
		v.InstrumentEmissivity, v.SurfaceEmissivity, v.ReflectedC = Some(m.num(0.1, 0.9)), m.opt(0.1, 0.9), m.opt(-40, 60)
	}
	return v
}

func (m maker) reasons(d *Document) {
	reason := func(key string) {
		if text := m.text(); m.coin(key) && text != "" {
			d.Reasons = append(d.Reasons, Reason{key, "x" + text})
		}
	}
	for _, p := range UnfoldAll(d) {
		reason(ReasonLimit + p.ID)
	}
	for _, v := range d.Measurements {
		reason(ReasonMeasurement + v.ID)
	}
	switch rapid.IntRange(0, 2).Draw(m.t, "margin") {
	case 0:
		d.DesignMarginK = Some(m.num(0.1, 20))
	case 1:
		d.DesignMarginK = Some(0.0)
		d.Reasons = append(d.Reasons, Reason{ReasonMargin, "measured, yes: #1"})
	}
}

// editRatings draws an edit of the block of ratings.
func (m maker) editRatings(d *Document, id string) *Document {
	load, other := "none", "none"
	if len(d.Loads) > 0 {
		load = rapid.SampledFrom(d.Loads).Draw(m.t, "load").ID
		other = rapid.SampledFrom(d.Loads).Draw(m.t, "other").ID
	}
	parts := append(UnfoldAll(d), Place{ID: "none"})
	second := rapid.SampledFrom(parts).Draw(m.t, "second").ID
	switch rapid.IntRange(0, 26).Draw(m.t, "rating edit") {
	case 0:
		return SetProtection(d, load, Protection{Kind: Fuse, RatingA: m.num(1, 99)})
	case 1:
		return SetContinuous(d, load, m.coin("on"))
	case 2:
		return SetTerminals(d, load, Terminals{RatedA: Some(m.num(1, 99))})
	case 3:
		return SetSystem(d, load, m.word([]string{"", DC, SinglePhase}))
	case 4:
		return SetNeutral(d, load, id)
	case 5:
		return SetNotWith(d, load, other, "none")
	case 6:
		return SetStartingDuty(SetMotor(d, other, m.coin("on")), load, m.coin("on"))
	case 7:
		return RenameLoad(d, load, "other "+load)
	case 8:
		return RemoveLoad(d, load)
	case 9:
		return SetCase(d, m.ratedCase(d, FreshCaseID(d)))
	case 10:
		return RemoveCase(d, m.caseID(d))
	case 11:
		return RenameCase(d, m.caseID(d), "other case")
	case 12:
		return SetMeasurement(d, m.measurement(d, "new survey"))
	case 13:
		return RenameMeasurement(d, "new survey", "old survey")
	case 14:
		return RemoveMeasurement(d, "new survey")
	case 15:
		return SetRanges(d, Ranges{AmbientK: m.opt(0, 9), ClearanceMM: Some(Span{0, m.num(0, 1)})})
	case 16:
		return SetRules(d, Rules{Use: []string{"nec-310"}, Method: m.word([]string{"", "B1"})})
	case 17:
		return SetMargin(d, m.opt(0, 1), m.word([]string{"", "tested"}))
	case 18:
		if second != "none" {
			return SetReason(d, ReasonLimit+second, m.word([]string{"", "data sheet 7", "two\nlines"}))
		}
	case 19:
		return SetGroup(SetPinned(d, id, m.coin("on")), id, m.word([]string{"", "phases"}))
	case 20:
		return Swap(d, id, second)
	case 21:
		return SwapLoads(d, id, second)
	case 22:
		return Assign(d, id, load)
	case 23:
		return WithoutPart(d, id)
	case 24:
		return ScaleLoads(SwitchOff(d, load), m.num(0, 2))
	case 25:
		return WithCase(d, m.caseID(d))
	case 26:
		return SetRole(d, id, m.word([]string{"", RoleNeutral, RoleEarth, RoleSpare}))
	}
	return d
}

func (m maker) caseID(d *Document) string {
	if len(d.Cases) == 0 {
		return "none"
	}
	return rapid.SampledFrom(d.Cases).Draw(m.t, "case").ID
}
