package ui

import (
	"fmt"
	"strings"

	"packrise/render"
	"packrise/solver/rating"
	"packrise/solver/section"
	"packrise/solver/study"
)

// State is the colour of the sentence's edge. It never speaks alone: the sentence begins with the same word.
type State int

// States.
const (
	Unknown State = iota // solving, or nothing to judge
	Within               // everything is within its limit, its band too where that is known
	Close                // everything is within its limit, but a band reaches over one
	Over                 // something is over its limit, or no steady temperature exists
	Refusal              // the section can't be solved as it is
)

// Sentence returns the answer as the two lines on top, and its state. They always belong to the picture that Scene returns.
func (k *Desk) Sentence() (answer, assumed string, state State) {
	r, fresh := k.Result()
	switch {
	case k.Failure() != nil:
		return "The calculation failed: " + k.Failure().Error() + ".", "Undo the last step, or save the design and report this.", Refusal
	case r != nil && (fresh || !k.Stale()):
		answer, assumed = r.Sentence()
		assumed = k.assumptions(assumed)
		if better, state, ok := k.ratedAnswer(); ok {
			return better, assumed, state
		}
		return answer, assumed, stateOf(r)
	}
	if len(k.Document().Parts) == 0 {
		return "Nothing in the section yet.", "Type what goes in, such as 12 thhn or 4G1.5, and press Enter.", Unknown
	}
	if answer, more := k.refusal(); answer != "" {
		return answer, more, Refusal
	}
	return "Solving …", "", Unknown
}

// stateOf is the colour of the result's state word.
func stateOf(r *rating.Result) State {
	switch r.State() {
	case rating.Within:
		return Within
	case rating.OverWord:
		return Over
	}
	return Unknown
}

// refusal puts the first problem that stops the work into a sentence and says how many more there are.
func (k *Desk) refusal() (first, more string) {
	refused := refusedOf(k.Problems())
	if len(refused) == 0 {
		return "", ""
	}
	p := refused[0]
	first = "Not solved: " + p.What + "."
	more = upperFirst(p.Do)
	if more != "" {
		more += "."
	}
	switch n := len(refused) - 1; {
	case n == 1:
		more += " One more problem stands behind it."
	case n > 1:
		more += fmt.Sprintf(" %d more problems stand behind it.", n)
	}
	return first, strings.TrimSpace(more)
}

func refusedOf(all []section.Problem) []section.Problem {
	var refused []section.Problem
	for _, p := range all {
		if p.Severity == section.Refused {
			refused = append(refused, p)
		}
	}
	return refused
}

func upperFirst(s string) string {
	if s == "" {
		return s
	}
	r := []rune(s)
	return strings.ToUpper(string(r[:1])) + string(r[1:])
}

// Scene returns what the pictures show. Shapes and readings always belong together: while a newer answer is awaited it is the older section with
// its own numbers, after staleAfter the new section without any.
func (k *Desk) Scene() render.Scene {
	s := render.Scene{
		Title:    k.Document().Title,
		AmbientC: k.Document().Surroundings.AmbientC.V,
		Selected: k.selection,
		Pointed:  k.pointed,
		Caution:  rating.Caution,
		Status:   k.Status(),
	}
	s.Answer, s.Assumed, _ = k.Sentence()
	if text, known := k.Amperes(); known { // what leaves the desk leads with what may be relied on
		s.Assumed = text + " " + s.Assumed + "."
	}
	shapes, _ := k.Shapes()
	s.Shapes = shapes
	s.Bad = badIDs(k.Problems())
	r, fresh := k.Result()
	if r == nil || !fresh && k.Stale() {
		s.Stale = r != nil
		return s
	}
	s.Shapes, s.Readings, s.AmbientC, s.Notes = r.Shapes, r.Readings(), r.AmbientC, r.Notes
	s.Bad = nil
	if r.Solved() {
		s.Field = r
	}
	s.Bands = k.bands()
	s.Heated, s.Heaters = k.heaters()
	if id, ok := k.governs(); ok {
		for i := range s.Readings {
			s.Readings[i].Governs = s.Readings[i].ID == id
		}
	}
	return s
}

// governs returns what governs with the bands in sight, once they are known: where only the band of another part reaches over its limit, that one.
func (k *Desk) governs() (id string, ok bool) {
	if r := k.Ratings(); r != nil && r.Bands != nil {
		id = r.Governs()
	}
	return id, id != ""
}

// governing returns what governs the answer shown, by the bands where they are known; "" for nothing.
func (k *Desk) governing() string {
	if id, ok := k.governs(); ok {
		return id
	}
	if r, _ := k.Result(); r != nil && r.Governing != nil {
		return r.Governing.Part
	}
	return ""
}

// bands are P5 and P95 of all readings, °C; nil before they are known.
func (k *Desk) bands() map[string][2]float64 {
	rated := k.Ratings()
	if rated == nil || rated.Bands == nil {
		return nil
	}
	out := map[string][2]float64{}
	note := func(i int, id string) {
		if low, high, ok := rated.Band(i); ok {
			out[id] = [2]float64{low, high}
		}
	}
	for i, c := range rated.Base.Conductors {
		note(i, c.ID)
	}
	for i, o := range rated.Base.Others {
		note(len(rated.Base.Conductors)+i, o.ID)
	}
	return out
}

// heaters returns the one selected conductor and what percent of its rise each other one gives to it; "" where none or several are selected, within
// a drag, and while nobody knows.
func (k *Desk) heaters() (id string, percent map[string]int) {
	r := k.Ratings()
	if r == nil || r.Heaters == nil || k.Drafting() || len(k.selection) != 1 {
		return "", nil
	}
	id = k.selection[0]
	if i := indexIn(r.Base, id); i < 0 || i >= len(r.Base.Conductors) { // the shares of other things are loads'
		return "", nil
	}
	h, ok := r.Heaters.Of(id)
	if !ok {
		return "", nil
	}
	percent = map[string]int{}
	for _, s := range h.Shares {
		if s.From != id && s.From != study.Around {
			percent[s.From] = s.Percent
		}
	}
	return id, percent
}

// shownShapes returns the shapes of the scene.
func (k *Desk) shownShapes() []section.Shape {
	if r, fresh := k.Result(); r != nil && (fresh || !k.Stale()) {
		return r.Shapes
	}
	shapes, _ := k.Shapes()
	return shapes
}

// badIDs returns the parts that stop the work.
func badIDs(all []section.Problem) []string {
	var ids []string
	for _, p := range refusedOf(all) {
		ids = append(ids, p.IDs...)
	}
	return ids
}

// Status returns the quiet line: heat in and out, numerical error, time.
func (k *Desk) Status() string {
	r, fresh := k.Result()
	if r == nil || !fresh && k.Stale() {
		if k.Solving() {
			return "solving …"
		}
		return ""
	}
	return statusLine(r, k.Draft())
}

// statusLine says how the answer came about.
func statusLine(r *rating.Result, draft bool) string {
	s := r.Balance()
	if draft {
		s += " · coarse while dragging"
	}
	return strings.TrimPrefix(s, " · ")
}
