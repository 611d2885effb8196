package rules

import (
	"strconv"

	"packrise/solver/catalog"
)

// Outcome is what one rule set says about a run. Its sentences are for people; every number in them also stands as a value.
type Outcome struct {
	Rule        string // id: nec-310
	Title       string // "NEC table 310.16, in raceway or cable"
	Edition     string // "NFPA 70, 2023"
	Source      catalog.Source
	Informative bool   // an informative variant: shown, never the lowest
	Applies     bool   // false: Why says why, in one sentence, and what applies instead where that is known
	Why         string //
	Counts      []Count
	Factor      float64 // for grouping, where all conductors share one; else NaN
	Conductors  []Rated // in the order of the run
	Allowances  []Allowance
	Fill        *Fill // nil where the rule has no limit of fill or the holder is open
	Harness     *Harness
	Remarks     []Remark
}

// Count is what a rule counted, with a reason for every conductor. It never depends on a current.
type Count struct {
	Group string // id of the cable that is counted by itself; "" is the whole run
	Of    string // "current-carrying conductors", "circuits", "loaded cores", "wires"
	N     int    // the most that can be energised together
	Total int    // without regard to what can't run together
	Items []Counted
	Text  string // "9 current-carrying conductors"
}

// Counted tells whether a conductor counts and why: "line of motor-1", "earth", "spare counts as if it were loaded".
type Counted struct {
	ID     string
	Counts bool
	Why    string
}

// Rated is a conductor's current by the rule.
type Rated struct {
	ID    string
	A     float64 // permitted current in A, not rounded; NaN when the rule gives none
	Steps []Step
	Why   string // without a current: why, and the range of the table where it is outside
}

// Kinds of step.
const (
	StepBase     = "base"     // the table's current
	StepAmbient  = "ambient"  // factor for the ambient temperature
	StepCount    = "count"    // factor for conductors, circuits or cores together
	StepAltitude = "altitude" // factor for thin air
	StepVariant  = "variant"  // the formula of an informative variant
)

// Step is one line of the arithmetic: From × Factor = To, or To alone for the base.
type Step struct {
	Kind         string
	From, Factor float64 // A and –; 0 and 1 for the base
	To           float64 // A
	Label        string  // "7–9 current-carrying conductors"
	Clause       string  // "NEC 310.15(C)(1)"
	FromMemory   bool    // the number was recalled, not read
	Text         string  // "55 A × 0.70 (7–9 current-carrying conductors, NEC 310.15(C)(1)) = 38.5 A"
}

// Allowance is something the rule permits beyond the outcome, as numbers: lightly loaded circuits left out of the count.
type Allowance struct {
	Kind     string   // "lightly-loaded"
	LeftOut  []string // ids of loads
	N        int      // what still counts
	Factor   float64
	Currents map[string]float64 // A by conductor, of those that gain
	Clause   string
	Text     string
}

// Remark is one sentence about the outcome.
type Remark struct {
	Kind string   // "step-ahead", "range", "assumed", "from-memory", "neutral", "control", "mixed-sizes", "panel" …
	IDs  []string // conductors or loads that it is about, nil for all
	Text string
}

// Fill compares the room taken with a rule's limit.
type Fill struct {
	Rule      string // id of the rule set
	Clause    string
	N         int     // conductors and cables that take room
	TakenMM2  float64 // over the insulation
	InsideMM2 float64 // inside the holder
	Share     float64 // taken over inside
	Limit     float64 // share that the rule permits
	Over      bool
	Rounded   bool     // within only because the rule rounds the number of equal conductors up
	Unknown   []string // ids of parts whose outside diameter is unknown: the fill is then a lower bound
	Text      string
	limits    fillLimits
	nipple    bool
	kinds     [4]int  // others, conductors, cables, rods
	equal     float64 // mm, outside diameter of all; −1 when they differ, 0 when nothing is in
}

// Harness is the whole-harness line of AC 43.13-1B: the sum of currents stays within a share of the sum of capacities.
type Harness struct {
	CapacityA float64 // sum of the permitted currents
	Share     float64 // 0.2
	LimitA    float64 // CapacityA × Share
	SumA      float64 // sum of the currents of the loads; NaN while one is unknown
	Text      string
}

// Cap is a current that a terminal permits, whatever the section does.
type Cap struct {
	Conductor string
	Load      string
	A         float64 // NaN: none is known, Text says what to enter
	Kind      string  // "terminal-rating" (a column of table 310.16) | "terminal-rated" (the person's amperes) | "terminal-block" (IEC 60947-7-1) | "unknown"
	Assumed   bool    // nobody stated the terminal
	Clause    string
	Memory    bool
	Text      string
}

// Permitted is a set of permitted currents from one origin: "computed", "nec-310" …
type Permitted struct {
	By string
	A  map[string]float64 // A by conductor
}

// Protected is what protects one load, check by check.
type Protected struct {
	Load    string
	Unknown bool // no device: permitted currents are no device rating
	Checks  []Check
}

// Check is one comparison: Value has to stay within Limit.
type Check struct {
	Kind       string  // "load-device", "device-permitted", "tripping", "continuous-wire", "continuous-device", "motor-wire", "small-conductor"
	By         string  // whose permitted current: "computed", "nec-310"; "" where none takes part
	Conductor  string  // the conductor with the lowest current, "" where none takes part
	Value      float64 // A
	Limit      float64 // A
	Within     bool    // Value ≤ Limit
	Known      bool    // false: a number is missing, Text says which
	NextSizeUp bool    // it exceeds the limit, and NEC 240.4(B) lets the next standard rating stand
	Clause     string
	FromMemory bool
	Text       string
}

// Jam is the jam ratio of three equal conductors drawn into a conduit.
type Jam struct {
	Defined bool    // false: Text says why
	Ratio   float64 // 1.05 × inside diameter over outside diameter of one
	Alarm   bool    // within 2.8 to 3.2
	Text    string
}

// Problem is something wrong with a person's rule file or with the ids of rule sets.
type Problem struct {
	File string
	Line int // 0: none
	Text string
}

// String returns the problem on one line: "ours.yaml:12: …".
func (p Problem) String() string {
	switch {
	case p.File == "":
		return p.Text
	case p.Line == 0:
		return p.File + ": " + p.Text
	}
	return p.File + ":" + strconv.Itoa(p.Line) + ": " + p.Text
}
