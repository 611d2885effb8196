package section

import (
	"fmt"
	"math"
	"strings"

	"gopkg.in/yaml.v3"
)

// some is the codec of a table that is read, written and checked only where it says something: its zero value is no value.
type some[T comparable] struct{ t *table[T] }

func (c some[T]) read(r *report, n *yaml.Node, at path) T { return c.t.read(r, n, at) }

func (c some[T]) node(v T) *yaml.Node {
	var none T
	if v == none {
		return nil
	}
	return c.t.node(v)
}

func (c some[T]) check(r *report, v T, at path) {
	var none T
	if v != none {
		c.t.check(r, v, at)
	}
}

// flow is the codec of a mapping that is written on one line and only where it says something.
type flow[T any] struct{ *table[T] }

func (c flow[T]) node(v T) *yaml.Node {
	n := c.table.node(v)
	if len(n.Content) == 0 {
		return nil
	}
	n.Style = yaml.FlowStyle
	return n
}

// whole is the codec of a number of things. What is not whole becomes −1, which no rule takes.
type whole struct{}

func (whole) read(r *report, n *yaml.Node, at path) int {
	v := readNumber(r, n, at)
	if v != math.Trunc(v) || math.Abs(v) > largest {
		r.add(at, "number-range", "¤ is "+shown(v)+", which is no whole number", "write how many")
		return 0
	}
	return int(v)
}

func (whole) node(v int) *yaml.Node { return numberNode(float64(v)) }

func (whole) check(r *report, v int, at path) {
	if v < 0 {
		r.add(at, "number-range", fmt.Sprintf("¤ is %s, but must not be negative", shown(float64(v))), "write how many of them run, 0 or more")
	}
}

// spanCodec is the codec of [low, high], neither negative.
type spanCodec struct{}

func (spanCodec) read(r *report, n *yaml.Node, at path) Opt[Span] {
	if n.Kind != yaml.SequenceNode || len(n.Content) != 2 {
		r.addLine(at, n.Line, "wrong-type", "¤ holds "+kindName(n)+" where two numbers belong", "write [low, high] with decimal points")
		return Opt[Span]{}
	}
	return Some(Span{readNumber(r, n.Content[0], at.at(0)), readNumber(r, n.Content[1], at.at(1))})
}

func (spanCodec) node(v Opt[Span]) *yaml.Node {
	if !v.OK {
		return nil
	}
	return &yaml.Node{Kind: yaml.SequenceNode, Tag: "!!seq", Style: yaml.FlowStyle, Content: []*yaml.Node{numberNode(v.V.Low), numberNode(v.V.High)}}
}

func (spanCodec) check(r *report, v Opt[Span], at path) {
	if !v.OK {
		return
	}
	notNegative.check(r, v.V.Low, at.at(0))
	notNegative.check(r, v.V.High, at.at(1))
	if v.V.Low > v.V.High {
		r.addWhole(at, "number-range", "¤ goes from "+shown(v.V.Low)+" down to "+shown(v.V.High), "write the lower number first")
	}
}

// offWord is a load's state in a case where a current may stand.
const offWord = "off"

// stateCodec is the codec of a load's state: a current in A, or off.
type stateCodec struct{}

func (stateCodec) read(r *report, n *yaml.Node, at path) CaseLoad {
	switch {
	case n.Kind == yaml.ScalarNode && n.Value == offWord:
		return CaseLoad{Off: true}
	case n.Kind == yaml.ScalarNode && (n.ShortTag() == "!!bool" || n.ShortTag() == "!!str" && !strings.ContainsAny(n.Value, "0123456789")):
		r.add(at, "wrong-type", "¤ holds "+show(n.Value)+" where a current belongs", "write a number of amperes, or the word off")
		return CaseLoad{}
	}
	return CaseLoad{CurrentA: readNumber(r, n, at)}
}

func (stateCodec) node(s CaseLoad) *yaml.Node {
	if s.Off {
		return &yaml.Node{Kind: yaml.ScalarNode, Tag: "!!str", Value: offWord, Style: yaml.DoubleQuotedStyle}
	}
	return numberNode(s.CurrentA)
}

func (stateCodec) check(r *report, s CaseLoad, at path) {
	notNegative.check(r, s.CurrentA, at)
	if s.Off && s.CurrentA != 0 {
		r.add(at, "one-of", "¤ has both a current and off", "keep one of them")
	}
}

// reasonCodec is the codec of a reason's text.
type reasonCodec struct{}

func (reasonCodec) read(r *report, n *yaml.Node, at path) Reason {
	return Reason{Text: text{free: true}.read(r, n, at)}
}

func (reasonCodec) node(v Reason) *yaml.Node { return textNode(v.Text) }

func (reasonCodec) check(r *report, v Reason, at path) {
	if strings.TrimSpace(v.Text) == "" {
		r.add(at, "empty", "¤ is empty", "write the reason: it stands on every result")
		return
	}
	text{free: true}.check(r, v.Text, at)
}
