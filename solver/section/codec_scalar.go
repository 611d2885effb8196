package section

import (
	"fmt"
	"math"
	"regexp"
	"strconv"
	"strings"
	"unicode/utf8"

	"gopkg.in/yaml.v3"

	"packrise/solver/quantity"
)

// Numbers of a document stay within these bounds; what is smaller or larger was never meant and would only upset the solver.
const (
	smallest = 1e-9
	largest  = 1e9
)

// A numberRule says which finite numbers a key takes.
type numberRule struct {
	ok   func(float64) bool
	must string
	do   string
}

var (
	anyNumber   = numberRule{func(float64) bool { return true }, "", ""}
	positive    = numberRule{func(v float64) bool { return v >= smallest }, "must be above zero", "write a number above zero"}
	notNegative = numberRule{func(v float64) bool { return v >= 0 }, "must not be negative", "write zero or more"}
	temperature = numberRule{func(v float64) bool { return v >= float64(quantity.AbsoluteZero) }, "that is below absolute zero (−273.15 °C)", "write a temperature in °C"}
	share       = numberRule{func(v float64) bool { return v >= 0 && v <= 1 }, "must lie between 0 and 1", "write such a share"}
	emissive    = numberRule{func(v float64) bool { return v >= smallest && v <= 1 }, "must lie above 0 and not above 1", "write such a share"}
)

func (rule numberRule) check(r *report, v float64, at path) {
	switch {
	case math.IsNaN(v) || math.IsInf(v, 0):
		r.add(at, "not-finite", "¤ is not a finite number", "write a number")
	case math.Abs(v) > largest:
		r.add(at, "number-range", "¤ is "+shown(v)+", which is beyond anything meant", "write a number in the unit that the key names")
	case v != 0 && math.Abs(v) < smallest && !rule.ok(v) && rule.ok(smallest):
		r.add(at, "number-range", "¤ is "+shown(v)+", tinier than anything meant", "write a number in the unit that the key names")
	case !rule.ok(v):
		r.add(at, "number-range", "¤ is "+shown(v)+", but "+rule.must, rule.do)
	}
}

func shown(v float64) string { return strings.Replace(quantity.Plain(v), "-", quantity.Minus, 1) }

// number is the codec of a required number.
type number struct{ rule numberRule }

func (c number) read(r *report, n *yaml.Node, at path) float64 { return readNumber(r, n, at) }
func (c number) node(v float64) *yaml.Node                     { return numberNode(v) }
func (c number) check(r *report, v float64, at path)           { c.rule.check(r, v, at) }

// optNumber is the codec of a number that may be left out.
type optNumber struct{ rule numberRule }

func (c optNumber) read(r *report, n *yaml.Node, at path) Opt[float64] {
	return Some(readNumber(r, n, at))
}

func (c optNumber) node(v Opt[float64]) *yaml.Node {
	if !v.OK {
		return nil
	}
	return numberNode(v.V)
}

func (c optNumber) check(r *report, v Opt[float64], at path) {
	if v.OK {
		c.rule.check(r, v.V, at)
	}
}

var (
	decimal     = regexp.MustCompile(`^[+-]?(0|[1-9]\d*)?(\.\d*)?([eE][+-]?\d+)?$`)
	digitsFirst = regexp.MustCompile(`^[+-]?\.?\d`)
	notFinite   = regexp.MustCompile(`(?i)^[+-]?\.?(nan|inf|infinity)$`)
	withUnit    = regexp.MustCompile(`^([+-]?[\d.,]*\d)\s*[A-Za-z°%Ω²µ]`)
)

// readNumber reads a plain decimal number. It reports everything else that YAML or a person may take for one.
func readNumber(r *report, n *yaml.Node, at path) float64 {
	if n.Kind != yaml.ScalarNode || isNull(n) {
		r.addLine(at, n.Line, "wrong-type", "¤ holds "+kindName(n)+" where a number belongs", "write a number, or take the key out")
		return 0
	}
	text := n.Value
	if notFinite.MatchString(text) {
		r.add(at, "not-finite", "¤ is "+show(text)+", not a finite number", "write a number")
		return 0
	}
	v, err := strconv.ParseFloat(text, 64)
	plain := n.Style&(yaml.SingleQuotedStyle|yaml.DoubleQuotedStyle|yaml.LiteralStyle|yaml.FoldedStyle) == 0
	switch isDecimal := decimal.MatchString(text) && strings.ContainsAny(text, "0123456789"); {
	case isDecimal && plain && err == nil:
		return v + 0 // −0 is 0
	case isDecimal && err != nil:
		r.add(at, "not-finite", "¤ is "+show(text)+", beyond any finite number", "write a number")
	case isDecimal:
		r.add(at, "wrong-type", "¤ holds the text \""+show(text)+"\" where a number belongs", "write it without quotes")
	default:
		r.add(at, "wrong-type", "¤ holds "+show(text)+" where a number belongs", numberAdvice(text))
	}
	return 0
}

// numberAdvice says what to write in place of a text that is no decimal number.
func numberAdvice(text string) string {
	if m := withUnit.FindStringSubmatch(text); m != nil && !strings.HasPrefix(strings.TrimLeft(text, "+-"), "0x") {
		return "write the number alone, with a decimal point: the key already names the unit"
	}
	if v, err := quantity.ParseNumber(text); err == nil && digitsFirst.MatchString(text) && math.Abs(v) <= largest {
		return "write " + quantity.Plain(v)
	}
	return "write a number like 1.5"
}

// text is the codec of a string: free text may be empty, all others are names.
type text struct{ free bool }

func (c text) read(r *report, n *yaml.Node, at path) string {
	if n.Kind != yaml.ScalarNode {
		r.addLine(at, n.Line, "wrong-type", "¤ holds "+kindName(n)+" where a word belongs", "write a single word or text")
		return ""
	}
	if isNull(n) && c.free {
		return ""
	}
	if isNull(n) || n.Value == "" && !c.free {
		r.add(at, "empty", "¤ is empty", "write what belongs there, or take the key out")
		return ""
	}
	return n.Value
}

func (c text) node(v string) *yaml.Node {
	if v == "" {
		return nil
	}
	return textNode(v)
}

func (c text) check(r *report, v string, at path) {
	if len(v) > MaxBytes/2 {
		r.add(at, "too-large", fmt.Sprintf("¤ is a text of over %d MB, and a whole file has at most %d", MaxBytes>>21, MaxBytes>>20), "shorten it")
	} else if !utf8.ValidString(v) {
		r.add(at, "not-text", "¤ holds bytes that are no text", "write it anew")
	} else if !c.free && v != "" {
		checkName(r, v, at, "¤")
	}
}

// checkName reports what no name may have.
func checkName(r *report, v string, at path, what string) {
	switch {
	case v == "":
		r.add(at, "bad-name", what+" is empty", "give it a name")
	case !utf8.ValidString(v):
		r.add(at, "not-text", what+" holds bytes that are no text", "write it anew")
	case strings.TrimSpace(v) != v:
		r.add(at, "bad-name", what+" begins or ends with a space", "take the space out")
	case strings.ContainsFunc(v, func(c rune) bool {
		return c < ' ' || c == 0x7f || c == 0x85 || c == 0x2028 || c == 0x2029 || c == 0xfeff
	}):
		r.add(at, "bad-name", what+" holds a line break or another character that can't be seen", "write it on one line")
	case utf8.RuneCountInString(v) > 200:
		r.add(at, "bad-name", what+" is longer than 200 letters", "shorten it")
	}
}

// ident is the codec of an id: a name without "/", which is kept for parts of cables.
type ident struct{ text }

func (c ident) check(r *report, v string, at path) {
	c.text.check(r, v, at)
	if strings.Contains(v, "/") {
		r.add(at, "bad-id", fmt.Sprintf("the id %s holds a /, which stands between a cable and its parts", show(v)), "choose an id without /")
	}
}

// yesNo is the codec of true or false; false is not written.
type yesNo struct{}

func (yesNo) read(r *report, n *yaml.Node, at path) bool {
	if n.Kind != yaml.ScalarNode || n.ShortTag() != "!!bool" {
		r.addLine(at, n.Line, "wrong-type", "¤ holds "+kindName(n)+" where true or false belongs", "write true or false")
		return false
	}
	return strings.EqualFold(n.Value, "true")
}

func (yesNo) node(v bool) *yaml.Node {
	if !v {
		return nil
	}
	return &yaml.Node{Kind: yaml.ScalarNode, Tag: "!!bool", Value: "true"}
}

func (yesNo) check(*report, bool, path) {}

// place is the codec of at_mm: [x, y].
type place struct{}

func (place) read(r *report, n *yaml.Node, at path) Opt[Point] {
	if n.Kind != yaml.SequenceNode || len(n.Content) != 2 {
		what := "¤ holds " + kindName(n)
		if n.Kind == yaml.SequenceNode {
			what = fmt.Sprintf("¤ holds %d values", len(n.Content))
		}
		r.addLine(at, n.Line, "wrong-type", what+" where two numbers belong", "write [x, y] in millimetres with decimal points, or take the key out to leave the part unplaced")
		return Opt[Point]{}
	}
	return Some(Point{readNumber(r, n.Content[0], at.at(0)), readNumber(r, n.Content[1], at.at(1))})
}

func (place) node(v Opt[Point]) *yaml.Node {
	if !v.OK {
		return nil
	}
	return &yaml.Node{Kind: yaml.SequenceNode, Tag: "!!seq", Style: yaml.FlowStyle, Content: []*yaml.Node{numberNode(v.V.X), numberNode(v.V.Y)}}
}

func (place) check(r *report, v Opt[Point], at path) {
	if v.OK {
		anyNumber.check(r, v.V.X, at.at(0))
		anyNumber.check(r, v.V.Y, at.at(1))
	}
}
