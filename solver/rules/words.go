package rules

import (
	"math"
	"strings"

	"packrise/solver/quantity"
)

// orList joins words as in "a, b or c", andList as in "a, b and c".
func orList(words []string) string { return list(words, " or ") }

func andList(words []string) string { return list(words, " and ") }

func list(words []string, last string) string {
	if len(words) < 2 {
		return strings.Join(words, "")
	}
	return strings.Join(words[:len(words)-1], ", ") + last + words[len(words)-1]
}

// trim writes a number for people with what it needs of four decimals.
func trim(v float64) string { return quantity.Trimmed(v, 4) }

// amperes writes a current rounded down to a tenth, as permitted currents are.
func amperes(a float64) string { return quantity.Trimmed(quantity.RoundDown(a, 1), 1) + " A" }

// needed writes a current rounded up to a tenth, as what a load asks of a wire is.
func needed(a float64) string { return quantity.Trimmed(math.Ceil(a*10-1e-9)/10, 1) + " A" }

// factor writes a factor with two decimals, or four where it has more.
func factor(f float64) string {
	if math.Abs(f*100-math.Round(f*100)) < 1e-9 {
		return quantity.Fixed(f, 2)
	}
	return quantity.Trimmed(quantity.RoundDown(f, 4), 4)
}

// times is a step that multiplies: "55 A × 0.70 (7–9 current-carrying conductors, NEC 310.15(C)(1)) = 38.5 A".
func times(kind string, from, f float64, label, clause string, memory bool) Step {
	s := Step{Kind: kind, From: from, Factor: f, To: from * f, Label: label, Clause: clause, FromMemory: memory}
	s.Text = amperes(from) + " × " + factor(f) + " (" + s.where() + ") = " + amperes(s.To)
	return s
}

// base is the step that a table starts from: "55 A (8 AWG copper, 90 °C column, NEC table 310.16)".
func base(a float64, label, clause string, memory bool) Step {
	s := Step{Kind: StepBase, Factor: 1, To: a, Label: label, Clause: clause, FromMemory: memory}
	s.Text = amperes(a) + " (" + s.where() + ")"
	return s
}

func (s Step) where() string {
	text := s.Label
	if s.Clause != "" {
		text += ", " + s.Clause
	}
	if s.FromMemory {
		text += ", from memory"
	}
	return text
}
