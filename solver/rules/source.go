package rules

import (
	"strings"

	"packrise/solver/catalog"
)

type sourceRow struct {
	Standard   string `yaml:"standard"`
	Edition    string `yaml:"edition"`
	Clause     string `yaml:"clause"`
	FromMemory bool   `yaml:"from_memory"`
	Note       string `yaml:"note"`
}

func (s sourceRow) source() catalog.Source {
	var words []string
	for _, w := range []string{s.Standard, s.Edition, s.Clause} {
		if w != "" {
			words = append(words, w)
		}
	}
	return catalog.Source{Text: strings.Join(words, ", "), FromMemory: s.FromMemory, Note: s.Note}
}

// edition is "NFPA 70, 2023".
func (s sourceRow) edition() string {
	if s.Edition == "" {
		return s.Standard
	}
	return s.Standard + ", " + s.Edition
}

// check wants a standard with edition and clause, or a standard that is marked as recalled.
func (s sourceRow) check(r *reader) {
	switch {
	case s.Standard == "":
		r.fail("source.standard is missing; write where the numbers come from")
	case !s.FromMemory && (s.Edition == "" || s.Clause == ""):
		r.fail("source needs edition and clause, or from_memory: true")
	}
}
