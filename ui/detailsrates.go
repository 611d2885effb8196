package ui

import (
	"math"
	"slices"
	"strings"

	"packrise/solver/study"
)

// rated is a sentence from the ratings: with less ink while they are those of an older section.
func (t *telling) rated(runs ...run) {
	for i := range runs {
		if runs[i].in == nil {
			runs[i].text = unbroken(runs[i].text)
		}
		if (t.aged || t.agedRatings) && runs[i].in == nil {
			runs[i].tone = old
		}
	}
	t.add(runs...)
}

// heading begins a group of sentences.
func (t *telling) heading(text string) { t.add(run{text: text, tone: strong}) }

// may tells what a conductor may carry: all loads together, its own alone raised, alone here, three of it here; what codes say, and the lowest.
func (t *telling) may(id string) {
	r := t.ratings
	if r == nil {
		t.notRated()
		return
	}
	i := indexIn(r.Base, id)
	if i < 0 || i >= len(r.Base.Conductors) {
		return
	}
	title := "What it may carry"
	if i < len(r.Lowest) && math.IsNaN(r.Lowest[i].DeviceA) {
		title += " (not a device rating)"
	}
	t.heading(title)
	from := len(t.out)
	t.together(r, i)
	t.raised(r, i)
	t.alone(r, i)
	t.lowest(r, i)
	if len(t.out) == from { // nothing is known of it
		t.out = t.out[:from-1]
	}
}

// notRated tells why nothing is rated.
func (t *telling) notRated() {
	a := t.k.amperes()
	if a.wrong {
		t.add(run{text: a.text, tone: alarm})
	} else if a.waits {
		t.add(faint(a.text))
	}
}

// pairWords writes a current twice: to rely on first.
func pairWords(rely, nominal float64) string {
	if math.IsInf(rely, 1) {
		return "any current: nothing reaches its limit"
	}
	return "rely on " + study.Amps(rely) + ", nominal " + study.Amps(nominal)
}

// stopper says what stops a ceiling, where that is another thing.
func stopper(c *study.Ceiling, id string) string {
	switch {
	case c.Hopeless && c.Governs != "":
		return "; " + c.Governs + " has no room left even without it"
	case c.Runaway:
		return "; above that no steady temperature exists"
	case c.Governs != "" && c.Governs != id:
		return "; " + c.Governs + " stops it"
	}
	return ""
}

func (t *telling) together(r *study.Ratings, i int) {
	c := &r.Base.Conductors[i]
	if !c.CurrentA.OK || c.CurrentA.V <= 0 {
		return
	}
	whichever := ""
	if r.Cases != nil {
		whichever = ", whichever case runs"
	}
	now := c.CurrentA.V
	t.rated(say("With all loads scaled together" + whichever + ": " + pairWords(now*r.All.Rely.Factor, now*r.All.Nominal.Factor) + stopper(&r.All.Rely, c.ID) + "."))
}

func (t *telling) raised(r *study.Ratings, i int) {
	c := &r.Base.Conductors[i]
	at := slices.IndexFunc(r.Loads, func(l study.LoadPermit) bool { return l.ID == c.Load })
	if at < 0 {
		return
	}
	l := &r.Loads[at]
	t.rated(say("Its load alone changed, the others as they are: " + pairWords(l.NowA*l.Rely.Factor, l.NowA*l.Nominal.Factor) + stopper(&l.Rely, c.ID) + "."))
}

// alone tells of the conductor by itself and of three of it, and the grouping factors that follow, each with its base.
func (t *telling) alone(r *study.Ratings, i int) {
	if i >= len(r.Alone) || r.Alone[i].Why != "" {
		return
	}
	a := &r.Alone[i]
	if math.IsNaN(a.One.RelyA) {
		return
	}
	text := "Alone here: " + pairWords(a.One.RelyA, a.One.NominalA)
	if !math.IsNaN(a.Three.RelyA) {
		text += ". Three of it loaded here: " + pairWords(a.Three.RelyA, a.Three.NominalA)
	}
	t.rated(say(text + "."))
	c := &r.Base.Conductors[i]
	now := c.CurrentA.V * r.All.Rely.Factor
	if !(now > 0) || math.IsInf(now, 1) {
		return
	}
	var factors []string
	factor := func(base float64, name string) {
		if base > 0 && !math.IsInf(base, 1) {
			factors = append(factors, factorWords(now/base)+" against "+name)
		}
	}
	factor(a.Three.RelyA, "three loaded here")
	factor(a.One.RelyA, "alone here")
	if len(factors) > 0 {
		t.rated(say("Grouping factor " + strings.Join(factors, ", ") + "."))
	}
}

// lowest tells what codes, terminal and device say, and which current is the lowest.
func (t *telling) lowest(r *study.Ratings, i int) {
	if i >= len(r.Lowest) {
		return
	}
	l := &r.Lowest[i]
	beside := besideWords(r, l)
	if len(beside) > 0 && !math.IsNaN(l.Computed) {
		beside = beside[1:] // computed is told above
	}
	if !math.IsNaN(l.DeviceA) {
		beside = append(beside, study.Amps(l.DeviceA)+" is the rating of its device")
	}
	if len(beside) > 0 {
		t.rated(say("Beside it: " + strings.Join(beside, "; ") + "."))
	}
	if !math.IsNaN(l.A) {
		t.rated(run{text: "The lowest: " + study.Amps(l.A) + ", " + lowestName(l) + ".", tone: strong})
	}
	if l.Differs && !math.IsNaN(l.Computed) {
		t.rated(faint("A table and the computed current differ by more than 20 %."))
	}
}

// checks tells where load, device and permitted current do not fit, and what happens at the device's tripping current.
func (t *telling) checks(load string) {
	r := t.ratings
	if r == nil {
		return
	}
	for i := range r.Protected {
		p := &r.Protected[i]
		if p.Load != load {
			continue
		}
		for _, c := range p.Checks {
			if c.Known && !c.Within && !c.NextSizeUp {
				t.rated(run{text: c.Text, tone: alarm})
			}
		}
	}
	for i := range r.Faults {
		if f := &r.Faults[i]; f.Load == load {
			looks := plain
			if f.Over() {
				looks = alarm
			}
			t.rated(run{text: f.Sentence(), tone: looks})
		}
	}
}

// heaters tells who heats a part.
func (t *telling) heaters(id string) {
	if t.ratings == nil {
		return
	}
	if h, ok := t.ratings.Heaters.Of(id); ok {
		t.rated(say(h.Sentence()))
	}
}

// worst tells in which case a part is hottest, where that is not the loads as written.
func (t *telling) worst(id string) {
	r := t.ratings
	if r == nil || r.Cases == nil {
		return
	}
	for _, w := range r.Cases.Worst {
		if w.ID != id || w.Case == "" {
			continue
		}
		off := ""
		if len(w.Off) > 0 {
			off = " with " + someIDs(w.Off, 6) + " off"
		}
		if math.IsInf(w.TempC, 1) {
			t.rated(run{text: "In the case " + w.Case + off + " no steady temperature exists.", tone: alarm})
			return
		}
		t.rated(say("It is hottest in the case " + w.Case + off + ", at " + withUnit(degrees(w.TempC, noLimit), "°C") + "."))
	}
}

// circuit tells of a conductor's load what protects it and how it runs, in words that edit in place.
func (t *telling) circuit(in []*input) {
	device := inputNamed(in, "device")
	if device == nil {
		return
	}
	sentence := paragraph{say("It is protected by "), word(device)}
	if trips := inputNamed(in, "trips"); trips != nil {
		at := word(trips)
		at.text = orWord(withUnitIf(trips.text, "× that"), strings.Replace(trips.hint, ",", noBreak+"× that,", 1))
		sentence = append(sentence, say(", which trips at "), at)
	}
	t.out = append(t.out, append(sentence, say(".")))
	sentence = paragraph{
		say("Its role: "), word(inputNamed(in, "role")), say("; runs three hours or more: "), word(inputNamed(in, "continuous")), say("; a motor: "), word(inputNamed(in, "motor")),
		say("; system: "), word(inputNamed(in, "system")), say("; neutral: "), word(inputNamed(in, "neutral")),
	}
	if never := inputNamed(in, "not-with"); never != nil {
		sentence = append(sentence, say("; never on with: "), word(never))
	}
	t.out = append(t.out, append(sentence, say(".")))
	t.add(say("Its terminals are marked "), word(inputNamed(in, "terminal")), say(" and made for "), word(inputNamed(in, "terminal-current")), say("."))
}

// seat tells what may happen to a part when places are sought, where anybody has said so.
func (t *telling) seat(in []*input) {
	pinned, group := inputNamed(in, "pinned"), inputNamed(in, "group")
	if pinned == nil || group == nil {
		return
	}
	t.add(say("In the search for a better seating it "), word(pinned), say(", in "), word(group), say("."))
}

// rates tells what permitted currents of the whole design depend on.
func (t *telling) rates(in []*input) {
	t.heading("Permitted currents")
	t.notRated()
	t.wholeMay()
	t.largest()
	sentence := paragraph{say("Kept below every limit: "), word(inputNamed(in, "margin"))}
	if reason := inputNamed(in, "margin-reason"); reason != nil {
		sentence = append(sentence, say(", because "), word(reason))
	}
	t.out = append(t.out, append(sentence, say(".")))
	t.add(
		say("Rules beside it: "), word(inputNamed(in, "rules")), say("; "), word(inputNamed(in, "lies-in")), say("; method "), word(inputNamed(in, "method")),
		say("; "), word(inputNamed(in, "arrangement")), say("."),
	)
	t.add(
		say("Bands take as off: ambient ± "), word(inputNamed(in, "range-ambient")), say(", currents ± "), word(inputNamed(in, "range-load")),
		say(", film ± "), word(inputNamed(in, "range-film")), say(", emissivities ± "), word(inputNamed(in, "range-emissivity")),
		say(", places ± "), word(inputNamed(in, "range-position")), say(", clearance "), word(inputNamed(in, "range-clearance")), say("."),
	)
}

// wholeMay tells how far all loads may be scaled, the layers of the holder and the outside with their bands, and what moves the bands most.
func (t *telling) wholeMay() {
	r := t.ratings
	if r == nil {
		return
	}
	t.rated(say("Of the currents as written, all together, " + study.Percent(r.All.Rely.Factor) + " may be relied on, " + study.Percent(r.All.Nominal.Factor) + " nominal" + stopper(&r.All.Rely, "") + "."))
	for _, o := range r.Base.Others {
		if (o.Kind == "layer" || o.Kind == "surface") && o.LimitC.OK && !strings.Contains(o.ID, "/"+"layer") {
			t.rated(say(upperFirst(o.ID) + ": " + withUnit(degrees(o.TempC, o.LimitC), "°C") + t.band(o.ID) + ", limit " + degreesC(o.LimitC.V) + " (" + o.LimitBy + ")."))
		}
	}
	for _, s := range r.Bands.Largest(3) {
		t.rated(faint(s))
	}
}

// band is the band of a part behind its temperature, "" where it is not known.
func (t *telling) band(id string) string {
	low, high, ok := bandOf(t.ratings, id)
	if !ok || t.agedRatings {
		return ""
	}
	return " (" + bandWords(low, high) + ")"
}

// close tells of a part that only its band takes over its limit.
func (t *telling) close(id string, row reading) {
	_, high, ok := bandOf(t.ratings, id)
	if ok && !t.agedRatings && row.limit.OK && row.temp <= row.limit.V && high > row.limit.V {
		t.rated(run{text: "It is close: its band reaches over its limit.", tone: strong})
	}
}
