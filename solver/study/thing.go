package study

import (
	"math"

	"packrise/solver/rating"
	"packrise/solver/section"
)

// thing is what has a temperature: conductors, then everything else, as they stand in a result.
type thing struct {
	id    string
	tempC float64
	limit section.Opt[float64]
	by    string // what sets the limit
}

func things(r *rating.Result) []thing {
	out := make([]thing, 0, len(r.Conductors)+len(r.Others))
	for _, c := range r.Conductors {
		t := c.TempC
		if c.HottestC > t { // insulation beside hotter neighbours
			t = c.HottestC
		}
		out = append(out, thing{c.ID, t, c.LimitC, c.LimitBy})
	}
	for _, o := range r.Others {
		out = append(out, thing{o.ID, o.TempC, o.LimitC, o.LimitBy})
	}
	return out
}

// judge tells how far the i-th thing is from what it may reach, in K: negative is over.
type judge func(i int, t thing) float64

// nominal judges by the limit alone.
func nominal(_ int, t thing) float64 { return t.limit.V - t.tempC }

// closest returns the thing with the least room; ok is false if nothing has a limit or a temperature.
func closest(list []thing, room judge) (at int, k float64, ok bool) {
	k = math.Inf(1)
	for i, t := range list {
		if !t.limit.OK || math.IsNaN(t.tempC) {
			continue
		}
		if m := room(i, t); m < k {
			at, k, ok = i, m, true
		}
	}
	return at, k, ok
}
