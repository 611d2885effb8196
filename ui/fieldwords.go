package ui

import (
	"math"
	"strconv"
	"strings"

	"packrise/solver/quantity"
	"packrise/solver/section"
)

// minusSign is the real minus sign of everything that people read; noBreak keeps a number and its unit on one line.
const (
	minusSign = quantity.Minus
	noBreak   = "\u00a0"
)

// written formats a number that a person entered: as entered, to a thousandth at most.
func written(v float64) string { return quantity.Trimmed(v, 3) }

// degrees formats a temperature beside its limit, by the rule of the sentence: whole kelvins, but one digit more, rounded away from the
// limit, where rounding would carry it onto or across the limit.
func degrees(t float64, limit section.Opt[float64]) string {
	near := math.Round(t)
	if !limit.OK || t == limit.V || (near != limit.V && (t > limit.V) == (near > limit.V)) {
		return quantity.Trimmed(near, 0)
	}
	if t > limit.V {
		return quantity.Trimmed(math.Ceil(t*10)/10, 1)
	}
	return quantity.Trimmed(math.Floor(t*10)/10, 1)
}

// kelvins formats a margin, by the rule of the sentence: rounded down, one digit more within a kelvin of zero.
func kelvins(m float64) string {
	if math.Abs(m) < 1 {
		return quantity.Trimmed(math.Floor(m*10)/10, 1)
	}
	return quantity.Trimmed(math.Floor(m), 0)
}

// withUnit joins a number and its unit so that no line ends between them.
func withUnit(number, unit string) string {
	if unit == "" {
		return number
	}
	return number + noBreak + unit
}

// someIDs joins ids for a sentence and cuts a long list.
func someIDs(ids []string, most int) string {
	if len(ids) > most+1 {
		return strings.Join(ids[:most], ", ") + " and " + strconv.Itoa(len(ids)-most) + " more"
	}
	return strings.Join(ids, ", ")
}

// plainMinus turns real minus signs back into what a number's reader takes.
func plainMinus(s string) string { return strings.ReplaceAll(s, minusSign, "-") }

// sentence makes an error's text one sentence for people: without the room's prefix, capital first, full stop last.
func sentence(err error) string {
	if err == nil {
		return ""
	}
	s := strings.TrimSpace(err.Error())
	if room, rest, ok := strings.Cut(s, ": "); ok && isRoom(room) {
		s = rest
	}
	if s == "" {
		return ""
	}
	r := []rune(s)
	s = strings.ToUpper(string(r[0])) + string(r[1:])
	if !strings.ContainsAny(s[len(s)-1:], ".?!") {
		s += "."
	}
	return s
}

func isRoom(word string) bool {
	switch word {
	case "catalog", "quantity", "rating", "section", "pack":
		return true
	}
	return false
}
