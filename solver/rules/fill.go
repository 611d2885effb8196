package rules

import (
	"fmt"
	"math"
	"slices"

	"packrise/solver/quantity"
)

// fillLimits are the shares of a holder's inside that may be taken, by the number of conductors and cables in it; 0 is no limit of its own.
type fillLimits struct {
	One    float64 `yaml:"one,omitempty"`
	Two    float64 `yaml:"two,omitempty"`
	More   float64 `yaml:"more"`
	Nipple float64 `yaml:"nipple,omitempty"` // in a short raceway, whatever the number
	// RoundFrom: for conductors of one size the number that fits is rounded up from this fraction on; 0 never.
	RoundFrom float64 `yaml:"round_from,omitempty"`
	Clause    string  `yaml:"clause"`
}

func (l *fillLimits) check(r *reader) {
	if l == nil {
		return
	}
	r.text("fill.clause", l.Clause)
	for i, v := range []float64{l.One, l.Two, l.Nipple, l.RoundFrom} {
		if v < 0 || v > 1 {
			r.fail("fill.%s is %g; write a share from 0 to 1", []string{"one", "two", "nipple", "round_from"}[i], v)
		}
	}
	if !(l.More > 0 && l.More <= 1) {
		r.fail("fill.more is %g; write the share that may be taken, above 0 and at most 1", l.More)
	}
}

// limit returns the share for so many conductors.
func (l fillLimits) limit(n int, nipple bool) float64 {
	switch {
	case nipple && l.Nipple > 0:
		return l.Nipple
	case n == 1 && l.One > 0:
		return l.One
	case n == 2 && l.Two > 0:
		return l.Two
	}
	return l.More
}

// room is what takes room in a holder: loose cores, cables and rods, each as a circle.
type room struct {
	id      string
	outside float64 // mm
	kind    string  // conductor | cable | rod
}

// rooms lists what lies directly in the holder.
func (r Run) rooms() (out []room) {
	for _, c := range r.Conductors {
		if c.Cable == "" {
			out = append(out, room{c.ID, c.OutsideMM, "conductor"})
		}
	}
	for _, p := range r.Parts {
		out = append(out, room{p.ID, p.OutsideMM, p.Kind})
	}
	return out
}

// fillOf compares the room taken with the rule's limit; nil without a limit or an inside.
func (u rule) fillOf(r Run) *Fill {
	inside := r.Holder.Area()
	if u.fill == nil || !(inside > 0) {
		return nil
	}
	f := &Fill{Rule: u.id, Clause: u.fill.Clause, InsideMM2: inside, limits: *u.fill, nipple: r.Holder.nipple()}
	for _, p := range r.rooms() {
		if p.kind != "rod" {
			f.N++
		}
		f.kinds[slices.Index(roomKinds, p.kind)+1]++
		if !(p.outside > 0) {
			f.Unknown = append(f.Unknown, p.id)
			continue
		}
		f.TakenMM2 += circle(p.outside)
		if f.equal == 0 || math.Abs(f.equal-p.outside) < 0.005*p.outside {
			f.equal = p.outside
		} else {
			f.equal = -1
		}
	}
	f.judge()
	f.Text = f.sentence()
	return f
}

func circle(d float64) float64 { return math.Pi / 4 * d * d }

// judge finds share and limit; conductors of one size may be as many as the rounding of the rule allows.
func (f *Fill) judge() {
	f.Share = f.TakenMM2 / f.InsideMM2
	f.Limit = f.limits.limit(f.N, f.nipple)
	f.Over, f.Rounded = f.Share > f.Limit+1e-9, false
	if f.Over && f.equal > 0 && f.limits.RoundFrom > 0 && f.N > 2 {
		f.Rounded = float64(f.N) <= math.Floor(f.Limit*f.InsideMM2/circle(f.equal)+1-f.limits.RoundFrom+1e-9)
		f.Over = !f.Rounded
	}
}

var roomKinds = []string{"conductor", "cable", "rod"}

// what is "9 conductors", "1 conductor and 2 cables".
func (f *Fill) what() string {
	var words []string
	for i, kind := range append([]string{"part"}, roomKinds...) {
		if f.kinds[i] > 0 {
			words = append(words, numbered(f.kinds[i], kind))
		}
	}
	return andList(words)
}

func (f *Fill) sentence() string {
	if f.kinds == [4]int{} {
		return "Nothing lies in the holder; up to " + trim(100*f.limits.More) + " % of it may be taken (" + f.Clause + ")."
	}
	take := "take"
	if f.kinds[0]+f.kinds[1]+f.kinds[2]+f.kinds[3] == 1 {
		take = "takes"
	}
	s := fmt.Sprintf("%s %s %s mm² of %s mm² inside: %s %% of a limit of %s %% (%s)", f.what(), take, quantity.Fixed(f.TakenMM2, 0), quantity.Fixed(f.InsideMM2, 0),
		quantity.Trimmed(math.Ceil(f.Share*1000-1e-6)/10, 1), trim(100*f.Limit), f.Clause)
	switch {
	case f.Over:
		s += ", which is over"
	case f.Rounded:
		s += ", within it by the note on conductors of one size, which rounds their number up"
	}
	if n := len(f.Unknown); n > 0 {
		s += "; the outside of " + andList(f.Unknown) + " is unknown and not in it"
	}
	return s + "."
}

// MoreOf returns how many more conductors of an outside diameter in mm the rule lets in, 0 when none.
func (f Fill) MoreOf(outsideMM float64) int {
	if !(outsideMM > 0) || f.InsideMM2 <= 0 {
		return 0
	}
	more := 0
	for k := 1; float64(k)*circle(outsideMM) <= f.InsideMM2; k++ {
		g := f
		g.N, g.TakenMM2 = f.N+k, f.TakenMM2+float64(k)*circle(outsideMM)
		if f.equal != 0 && math.Abs(f.equal-outsideMM) >= 0.005*outsideMM {
			g.equal = -1
		} else if f.equal == 0 {
			g.equal = outsideMM
		}
		if g.judge(); !g.Over {
			more = k
		}
	}
	return more
}
