package catalog

import (
	"fmt"

	"gopkg.in/yaml.v3"
)

// Range is a value with the range over which sources disagree; Low = High = V where they do not.
type Range struct{ V, Low, High float64 }

// spanRow is a Range in YAML: a plain number, or {v: …, low: …, high: …}.
type spanRow Range

func (s *spanRow) UnmarshalYAML(n *yaml.Node) error {
	if n.Kind == yaml.ScalarNode {
		var v float64
		if err := n.Decode(&v); err != nil {
			return fmt.Errorf("line %d: %q is not a number", n.Line, n.Value)
		}
		*s = spanRow{v, v, v}
		return nil
	}
	var m struct {
		V    *float64 `yaml:"v"`
		Low  *float64 `yaml:"low"`
		High *float64 `yaml:"high"`
	}
	if err := strict(n, &m); err != nil {
		return err
	}
	if m.V == nil || m.Low == nil || m.High == nil {
		return fmt.Errorf("line %d: a range needs v, low and high", n.Line)
	}
	*s = spanRow{*m.V, *m.Low, *m.High}
	return nil
}

func (s spanRow) MarshalYAML() (any, error) {
	if s.Low == s.V && s.High == s.V {
		return s.V, nil
	}
	var n yaml.Node
	err := n.Encode(struct {
		V    float64 `yaml:"v"`
		Low  float64 `yaml:"low"`
		High float64 `yaml:"high"`
	}{s.V, s.Low, s.High})
	n.Style = yaml.FlowStyle
	return &n, err
}

// IsZero leaves an empty range out of a written row.
func (s spanRow) IsZero() bool { return s == spanRow{} }
