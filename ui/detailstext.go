package ui

import (
	"math"
	"slices"
	"strconv"
	"strings"

	"packrise/solver/quantity"
	"packrise/solver/rating"
	"packrise/solver/section"
	"packrise/solver/study"
)

// paragraph is one sentence or heading of the details.
type paragraph []run

// telling writes the details' sentences from the document and the answer.
type telling struct {
	k      *Desk
	doc    *section.Document
	shapes []section.Shape
	result *rating.Result // nil: none that may be shown
	aged   bool           // the result belongs to an older section
	out    []paragraph

	ratings     *study.Ratings // nil: none that may be shown
	agedRatings bool           // they belong to an older section
}

// tell returns the sentences about the selection, the title first.
func tell(k *Desk) []paragraph {
	shapes, _ := k.Shapes()
	t := &telling{k: k, doc: k.Document(), shapes: shapes}
	r, fresh := k.Result()
	t.result, t.aged = r, !fresh && k.Stale()
	t.ratings, t.agedRatings = k.shownRatings()
	switch ids := k.Selection(); {
	case len(ids) == 0:
		t.whole()
	case len(ids) > 1:
		t.several(ids)
	default:
		t.one(ids[0])
	}
	return t.out
}

func (t *telling) add(runs ...run) { t.out = append(t.out, runs) }

func say(text string) run   { return run{text: text} }
func faint(text string) run { return run{text: text, tone: quiet} }

// word is an input within a sentence.
func word(in *input) run {
	if in == nil {
		return run{}
	}
	text := strings.ReplaceAll(in.shown, " ", noBreak)
	if text == "" {
		text = orWord(in.hint, "—")
	}
	if in.mixed {
		text = "different"
	}
	r := run{text: text, in: in}
	if in.missing {
		r.tone = strong
	}
	return r
}

// fact is a sentence from the answer: with less ink while the answer is old.
func (t *telling) fact(runs ...run) {
	for i := range runs {
		if t.aged && runs[i].in == nil {
			runs[i].tone = old
		}
	}
	t.add(runs...)
}

func (t *telling) one(id string) {
	p := section.Find(t.doc, id)
	if p == nil {
		return
	}
	in := inputsOf(t.k, []string{id})
	switch p.Kind {
	case section.Core:
		t.core(id, *p, in)
	case section.Rod:
		t.rod(id, *p, in)
	case section.Cable:
		t.cable(id, *p)
	}
	if reason := inputNamed(in, "limit-reason"); reason != nil {
		t.add(say("Its limit is above the catalogue's because "), word(reason), say("."))
	}
	t.place(*p, in)
	t.seat(in)
	t.wrong(id)
}

// core tells of one conductor.
func (t *telling) core(id string, p section.Part, in []*input) {
	cat := t.k.Catalog()
	whole := spelled(cat, p)
	title := paragraph{{text: id, tone: strong}, faint(" · "), word(inputNamed(in, "size"))}
	if whole.Conductor != nil {
		what := " " + strings.ReplaceAll(orWord(whole.Conductor.Metal, section.Copper), "-", " ") + ", " + orWord(whole.Conductor.Class, section.Stranded)
		if mm := t.metal(id); mm > 0 && whole.Conductor.Size != "" {
			what += ", ⌀" + noBreak + withUnit(quantity.Trimmed(mm, 2), "mm")
		}
		title = append(title, faint(what))
	}
	if whole.Type != "" {
		title = append(title, faint(" · "), word(inputNamed(in, "type")))
		if w, ok := cat.WireType(whole.Type); ok {
			title = append(title, faint(", dry "+degreesC(w.DryC)))
		}
	} else if len(whole.Layers) > 0 {
		title = append(title, faint(" · "+layersMeant(cat, whole.Layers)))
	}
	t.out = append(t.out, append(title, t.over(id)...))
	t.carries(id, p, in)
	t.runs(id, inputNamed(in, "limit"))
	t.heaters(id)
	t.worst(id)
	t.may(id)
	t.circuit(in)
	if l := section.LoadOf(t.doc, id); l != nil {
		t.checks(l.ID)
	}
}

// metal is the diameter of a conductor's metal in mm, 0 if unknown.
func (t *telling) metal(id string) float64 {
	for _, s := range t.shapes {
		if s.ID == id && len(s.Rings) > 0 && s.Rings[0].Metal {
			return 2 * s.Rings[0].R1
		}
	}
	return 0
}

// over is the outside diameter at the end of a title.
func (t *telling) over(id string) []run {
	for _, s := range t.shapes {
		if s.ID == id && s.OuterR() > 0 && len(s.Loops) == 0 {
			return []run{faint(" · ⌀" + noBreak + withUnit(quantity.Trimmed(2*s.OuterR(), 2), "mm"))}
		}
	}
	return nil
}

// carries tells what a conductor carries and makes.
func (t *telling) carries(id string, p section.Part, in []*input) {
	current, circuit, role := word(inputNamed(in, "current")), word(inputNamed(in, "circuit")), word(inputNamed(in, "role"))
	l := section.LoadOf(t.doc, id)
	switch {
	case l == nil && p.Role == section.RoleEarth:
		t.add(say("It is an "), role, say(" and needs no load."))
		return
	case l == nil:
		t.add(say("It is in no load: its current is "), current, say("; its role: "), role, say("."))
		return
	}
	with := ""
	if others := slices.DeleteFunc(slices.Clone(l.Conductors), func(o string) bool { return o == id }); len(others) > 0 {
		with = ", with " + someIDs(others, 6)
	}
	switch {
	case l.HeatWM.OK:
		t.add(say("It makes a fixed heat of "), current, say(" ("), circuit, say(with+")."))
	case !l.CurrentA.OK:
		t.add(say("Its current is "), current, say(" ("), circuit, say(with+")."))
	case l.CurrentA.V == 0:
		t.add(say("It is idle: it carries "), current, say(" ("), circuit, say(with+")."))
	default:
		end := []run{say(".")}
		if c := t.conductor(id); c != nil && !math.IsNaN(c.HeatWM) {
			heat := say(" and makes " + withUnit(quantity.Significant(c.HeatWM, 2), "W/m") + ".")
			if t.aged {
				heat.tone = old
			}
			end = []run{heat}
		}
		t.add(append([]run{say("It carries "), current, say(" ("), circuit, say(with + ")")}, end...)...)
	}
}

func (t *telling) conductor(id string) *rating.Conductor {
	if t.result == nil {
		return nil
	}
	for i := range t.result.Conductors {
		if c := &t.result.Conductors[i]; c.ID == id {
			return c
		}
	}
	return nil
}

// runs tells a part's temperature, limit and margin.
func (t *telling) runs(id string, limit *input) {
	row, ok := readingOf(t.result, id)
	if !ok || math.IsNaN(row.temp) {
		return
	}
	temp := withUnit(degrees(row.temp, row.limit), "°C") + t.band(id)
	if t.unknown(id) {
		t.fact(say("Without its own heat it runs at "+temp+"; its limit is "), t.limitWord(limit, row.limitWords()), say("."))
		return
	}
	if !row.limit.OK {
		t.fact(say("It runs at "+temp+"; no limit is known: "), t.limitWord(limit, "set one"), say("."))
		return
	}
	by := ""
	if row.by != "" {
		by = " (" + row.by + ")"
	}
	bound := t.limitWord(limit, degreesC(row.limit.V))
	if row.temp > row.limit.V {
		t.fact(run{text: "It runs at " + temp + ", over its limit of ", tone: alarm}, bound, run{text: by + " by " + withUnit(overWords(row.temp, row.limit.V), "K") + ".", tone: alarm})
	} else {
		t.fact(say("It runs at "+temp+"; its limit is "), bound, say(by+", margin "+withUnit(marginWords(row.temp, row.limit.V), "K")+"."))
	}
	t.close(id, row)
	switch governs, hottest := t.k.governing() == id, t.result.Hottest == id; {
	case governs && hottest:
		t.fact(say("It governs, with the smallest margin of all" + strings.TrimSuffix(t.counting(), ",") + ", and is the hottest conductor."))
	case governs:
		t.fact(say("It governs: its margin" + t.counting() + " is the smallest of all."))
	case hottest:
		t.fact(say("It is the hottest conductor, though " + t.governing() + " governs."))
	}
}

// unknown tells whether the conductor's own heat is missing because nobody has said what it carries.
func (t *telling) unknown(id string) bool { return slices.Contains(t.result.Unassigned, id) }

// counting says that the margin is the smallest only with its band.
func (t *telling) counting() string {
	if id, ok := t.k.governs(); ok && (t.result.Governing == nil || t.result.Governing.Part != id) {
		return ", less its band,"
	}
	return ""
}

func (t *telling) governing() string { return orWord(t.k.governing(), "nothing") }

// limitWord is the limit's input where it may be set, under the words that stand there now.
func (t *telling) limitWord(limit *input, now string) run {
	if limit == nil {
		return say(now)
	}
	return run{text: now, in: limit}
}

// counted is a number of things: "1 conductor", "3 conductors".
func counted(n int, what string) string {
	if n == 1 {
		return "1 " + what
	}
	return strconv.Itoa(n) + " " + what + "s"
}

// place tells where a part lies.
func (t *telling) place(p section.Part, in []*input) {
	x, y := word(inputNamed(in, "x")), word(inputNamed(in, "y"))
	if !p.At.OK {
		x.text, y.text = "…", "…"
		t.add(run{text: "It is not placed yet", tone: strong}, say(": drag it in, settle all parts, or give its place: x "), x, say(", y "), y, say("."))
		return
	}
	t.add(say("It lies at x "), x, say(", y "), y, say("."))
}

// wrong tells the problems that concern a part, or all of them for "".
func (t *telling) wrong(id string) {
	for _, p := range t.k.Problems() {
		if id != "" && (!slices.Contains(p.IDs, id) || p.Rule == "unplaced") { // its place is told of already
			continue
		}
		looks := alarm
		if p.Severity == section.Warned {
			looks = plain
		}
		t.add(run{text: upperFirst(p.Sentence()) + ".", tone: looks})
	}
}
