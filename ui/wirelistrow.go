package ui

import (
	"math"
	"strconv"
	"strings"

	"packrise/solver/quantity"
	"packrise/solver/rating"
	"packrise/solver/section"
	"packrise/solver/study"
)

// wireRow is one part or layer as the list shows it.
type wireRow struct {
	id, kind string // kind: section.Core, Rod, Cable, "layer", "surface"
	circuit  string
	size     string
	current  string  // as written in the column of amperes
	amperes  float64 // NaN: none
	unknown  bool    // its current is needed and nobody has entered it
	carries  bool    // it is a conductor

	solved bool
	temp   float64
	limit  section.Opt[float64]
	area   float64 // of the conductor's metal in mm², for sorting by size
	remark string
	bad    bool // it stops the work

	wireRated
}

// margin returns limit − temperature; ok is false where there is none, or where it is unknown because the conductor's own heat is.
func (r wireRow) margin() (k float64, ok bool) {
	k = r.limit.V - r.temp
	return k, r.solved && r.limit.OK && !(r.unknown && k >= 0)
}

// over is judged on the unrounded value.
func (r wireRow) over() bool { k, ok := r.margin(); return ok && k < 0 }

// temperature, limitText and marginText are the cells; the unit stands in the header.
func (r wireRow) temperature() string {
	if !r.solved {
		return ""
	}
	t := degrees(r.temp, r.limit)
	if r.unknown { // its own heat is missing
		t = "≥ " + t
	}
	return t
}

func (r wireRow) limitText() string {
	if !r.limit.OK {
		return ""
	}
	return quantity.Trimmed(r.limit.V, 1)
}

func (r wireRow) marginText() string {
	if _, ok := r.margin(); ok {
		return marginWords(r.temp, r.limit.V)
	}
	return ""
}

// wireRows lists conductors in the document's order, then rods and cables, then layers.
func wireRows(k *Desk) []wireRow {
	d := k.Document()
	r, _ := k.Result()
	facts := newWireFacts(d, r, k.Problems())
	facts.rated, _ = k.shownRatings()
	facts.governs = k.governing()
	var cores, others []wireRow
	for _, p := range section.UnfoldAll(d) {
		row := facts.part(k, p)
		if p.Part.Kind == section.Core {
			cores = append(cores, row)
		} else {
			others = append(others, row)
		}
	}
	rows := append(cores, others...)
	return append(rows, facts.layers(d, k)...)
}

// wireFacts are look-ups made once for all rows.
type wireFacts struct {
	result  *rating.Result
	loads   map[string]*section.Load
	answers map[string]wireAnswer
	bad     map[string]string
	sizes   map[string]wireSize
	rated   *study.Ratings // nil: not known
	governs string         // "" for nothing
}

type wireAnswer struct {
	temp    float64
	limit   section.Opt[float64]
	assumed bool
}

type wireSize struct {
	text string
	area float64
}

func newWireFacts(d *section.Document, r *rating.Result, problems []section.Problem) *wireFacts {
	f := &wireFacts{result: r, loads: map[string]*section.Load{}, answers: map[string]wireAnswer{}, bad: map[string]string{}, sizes: map[string]wireSize{}}
	for i := range d.Loads {
		for _, id := range d.Loads[i].Conductors {
			f.loads[id] = &d.Loads[i]
		}
	}
	if r != nil {
		for _, c := range r.Conductors {
			f.answers[c.ID] = wireAnswer{c.JudgedC(), c.LimitC, c.LimitAssumed}
		}
		for _, o := range r.Others {
			f.answers[o.ID] = wireAnswer{o.TempC, o.LimitC, o.LimitAssumed}
		}
	}
	for _, p := range problems {
		if p.Severity != section.Refused {
			continue
		}
		for _, id := range p.IDs {
			if f.bad[id] == "" {
				f.bad[id] = p.What
			}
		}
	}
	return f
}

func (f *wireFacts) part(k *Desk, p section.Place) wireRow {
	row := wireRow{id: p.ID, kind: p.Part.Kind, amperes: math.NaN(), wireRated: unrated}
	size := f.size(k, *p.Part)
	row.size, row.area = size.text, size.area
	answer := p.ID
	switch p.Part.Kind {
	case section.Core:
		f.load(&row, p.Part)
	case section.Cable:
		answer += "/" + section.Jacket
	}
	assumed := f.answer(&row, answer)
	row.remark = f.remark(row, p.Part, answer, assumed)
	return row
}

// answer fills in what was solved and tells whether the limit is assumed.
func (f *wireFacts) answer(row *wireRow, id string) (assumed bool) {
	a, ok := f.answers[id]
	if !ok {
		return false
	}
	row.temp, row.limit, row.solved = a.temp, a.limit, !math.IsNaN(a.temp)
	f.rate(row, id)
	return a.assumed && a.limit.OK
}

func (f *wireFacts) load(row *wireRow, p *section.Part) {
	row.carries = true
	l := f.loads[row.id]
	switch {
	case l == nil && p.Role == section.RoleEarth:
		return
	case l == nil:
		row.unknown, row.current = true, unknownWord
		return
	case l.HeatWM.OK:
		row.current = withUnit(written(l.HeatWM.V), "W/m")
	case l.CurrentA.OK:
		row.current, row.amperes = written(l.CurrentA.V), l.CurrentA.V
	default:
		row.unknown, row.current = true, unknownWord
	}
	row.circuit = l.ID
}

// size returns what a part is: "8 AWG THHN", "rod ⌀ 4 mm polypropylene". Equal parts are looked up once.
func (f *wireFacts) size(k *Desk, p section.Part) wireSize {
	key := p.Stock + "|" + p.Type + "|" + p.Kind + "|" + p.Build + "|" + p.Material + "|" + optText(p.Diameter)
	if c := p.Conductor; c != nil {
		key += "|" + c.Size + "|" + optText(c.AreaMM2) + "|" + optText(c.DiameterMM) + "|" + outlineText(c) + "|" + optText(c.CornerMM) + "|" + c.Metal + "|" + c.Class
	} else if p.Kind == section.Core && p.Stock == "" {
		return wireSize{area: math.NaN()}
	}
	if s, ok := f.sizes[key]; ok {
		return s
	}
	s := sizeOf(k, p)
	f.sizes[key] = s
	return s
}

func sizeOf(k *Desk, p section.Part) wireSize {
	cat := k.Catalog()
	switch p.Kind {
	case section.Rod:
		word := "rod"
		if p.BoreMM.OK {
			word = "hose"
		}
		return wireSize{text: word + " ⌀ " + withUnit(written(p.Diameter.V), "mm") + " " + materialName(cat, p.Material), area: math.NaN()}
	case section.Cable:
		return wireSize{text: "cable " + p.Build, area: math.NaN()}
	}
	whole := spelled(cat, p)
	s := wireSize{text: sizeText(cat, p), area: math.NaN()}
	if c, err := conductorOf(cat, whole.Conductor); err == nil {
		s.area = c.AreaM2 * 1e6
	}
	if whole.Conductor != nil && whole.Conductor.Metal == section.Aluminium {
		s.text += " Al"
	}
	if t, ok := cat.WireType(whole.Type); ok {
		s.text += " " + t.Name
	}
	return s
}

// remark is what is notable about a row, the weightiest first.
func (f *wireFacts) remark(row wireRow, p *section.Part, answer string, assumed bool) string {
	var words []string
	add := func(when bool, word string) {
		if when {
			words = append(words, word)
		}
	}
	if p != nil {
		add(!p.At.OK, "not placed")
	}
	add(f.bad[row.id] != "" && (p == nil || p.At.OK), f.bad[row.id])
	add(row.over(), "over")
	add(row.close(), "close")
	add(f.governs != "" && f.governs == answer, "governs")
	add(f.result != nil && f.result.Hottest == answer, "hottest")
	switch {
	case row.unknown && f.loads[row.id] == nil:
		add(true, "unassigned")
	case row.unknown:
		add(true, "current unknown")
	case !math.IsNaN(row.amperes) && row.amperes == 0:
		add(true, "idle")
	}
	if p != nil && p.Role != "" {
		add(true, p.Role)
	}
	add(assumed, "limit assumed")
	return strings.Join(words, ", ")
}

// layers lists the layers of the holder and its outside, where they were solved.
func (f *wireFacts) layers(d *section.Document, k *Desk) []wireRow {
	if f.result == nil {
		return nil
	}
	h := spelledHolder(k.Catalog(), d.Holder)
	var rows []wireRow
	for _, o := range f.result.Others {
		if o.Kind != "layer" && o.Kind != "surface" || strings.HasSuffix(o.ID, "/"+section.Jacket) || strings.Contains(o.ID, "/"+section.Jacket+"/") {
			continue
		}
		row := wireRow{id: o.ID, kind: o.Kind, amperes: math.NaN(), area: math.NaN(), wireRated: unrated}
		if o.Kind == "layer" {
			row.size = layerText(k, h, o.ID)
		} else {
			row.size = "outer surface"
		}
		row.remark = f.remark(row, nil, o.ID, f.answer(&row, o.ID))
		rows = append(rows, row)
	}
	return rows
}

// layerText says what a layer of the holder is, from its id: "jacket", "jacket/2" …
func layerText(k *Desk, h section.Holder, id string) string {
	i := 0
	if _, n, ok := strings.Cut(id, "/"); ok {
		i, _ = strconv.Atoi(n)
		i--
	}
	if i < 0 || i >= len(h.Layers) {
		return ""
	}
	return materialName(k.Catalog(), h.Layers[i].Material) + " " + withUnit(written(h.Layers[i].ThicknessMM), "mm")
}
