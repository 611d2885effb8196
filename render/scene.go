package render

import (
	"image/color"

	"packrise/solver/section"
)

// Field is what a picture asks of a solution. Lengths in mm, temperatures in °C. A Field does not change: another solution is
// another Field.
type Field interface {
	Bounds() (x0, y0, x1, y1 float64)
	// Row fills dst with temperatures at (x0 + i·dx, y), NaN outside. Safe for concurrent use.
	Row(dst []float64, y, x0, dx float64)
}

// Scene is everything that a picture shows.
type Scene struct {
	Shapes   []section.Shape       // the holder first
	Readings []section.Reading     // empty: not solved
	Field    Field                 // nil: outlines only
	Bands    map[string][2]float64 // P5 and P95 in °C by a reading's id; nil: not known
	AmbientC float64
	Title    string
	Answer   string   // the sentence
	Assumed  string   // its second line
	Notes    []string // what is assumed or left out
	Status   string   // the quiet line below: heat in and out, numerical error, time
	Caution  string

	Selected []string       // ringed
	Pointed  string         // lit up
	Heated   string         // the part whose heaters are shaded, "" for none
	Heaters  map[string]int // percent of its rise that a part gives to it
	Stale    bool           // the readings belong to an older section: greyed
	Draft    bool           // within a drag: lines of equal temperature are drawn more coarsely
	Plain    bool           // without lines of equal temperature
	Flow     bool           // with heat-flow lines, unless Stale or Draft
	Bad      []string       // ids that overlap or lie outside: marked
}

// solved tells whether the scene has temperatures.
func (s Scene) solved() bool { return len(s.Readings) > 0 || s.Field != nil }

// State is the answer in one word.
type State int

// States, the worst last.
const (
	Unknown State = iota // nothing is solved, or nothing has a limit
	Within
	Near
	Over
)

// stateWords are the words with which a sentence begins.
var stateWords = map[State]string{Within: "Within", Near: "Close", Over: "Over"}

// Word returns the state's word as a sentence begins with it, "" for Unknown.
func (t State) Word() string { return stateWords[t] }

// StateOf returns the state of a scene: Over as soon as any reading is, else what the sentence's first word says. A sentence that
// begins with none of the words makes no claim, and neither does the picture.
func StateOf(s Scene) State {
	state, limited := Unknown, false
	for _, r := range s.Readings {
		if r.Over() {
			return Over
		}
		limited = limited || r.LimitC.OK
	}
	for t, w := range stateWords {
		if beginsWithWord(s.Answer, w) {
			return t
		}
	}
	if s.Answer == "" && limited {
		state = Within
	}
	return state
}

// beginsWithWord tells whether a sentence begins with the word, as a whole word.
func beginsWithWord(sentence, word string) bool {
	if len(sentence) < len(word) || sentence[:len(word)] != word {
		return false
	}
	if len(sentence) == len(word) {
		return true
	}
	c := sentence[len(word)] | 0x20
	return c < 'a' || c > 'z'
}

// StateColor returns the palette's colour of a state.
func (p Palette) StateColor(t State) color.NRGBA {
	switch t {
	case Over:
		return p.Over
	case Near:
		return p.Close
	case Within:
		return p.Within
	}
	return p.Quiet
}
