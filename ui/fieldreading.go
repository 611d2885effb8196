package ui

import (
	"packrise/solver/rating"
	"packrise/solver/section"
)

// reading is the answer for one part or layer, as the panes show it.
type reading struct {
	temp    float64 // °C
	limit   section.Opt[float64]
	assumed bool
	by      string // what sets the limit
}

// noLimit is a temperature's limit where there is none.
var noLimit section.Opt[float64]

// readingOf returns the answer for a part or layer; ok is false where there is none.
func readingOf(r *rating.Result, id string) (reading, bool) {
	if r == nil {
		return reading{}, false
	}
	for i := range r.Conductors {
		if c := &r.Conductors[i]; c.ID == id {
			return reading{c.JudgedC(), c.LimitC, c.LimitAssumed, c.LimitBy}, true
		}
	}
	for i := range r.Others {
		if o := &r.Others[i]; o.ID == id {
			return reading{o.TempC, o.LimitC, o.LimitAssumed, o.LimitBy}, true
		}
	}
	return reading{}, false
}

// limitWords is the limit within a sentence.
func (r reading) limitWords() string {
	if !r.limit.OK {
		return "unknown"
	}
	return degreesC(r.limit.V)
}
