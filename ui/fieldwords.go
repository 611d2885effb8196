package ui

import (
	"math"
	"regexp"
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

// shownDegrees rounds a temperature beside its limit.
func shownDegrees(t float64, limit section.Opt[float64]) float64 {
	return quantity.BesideLimit(t, limit.Or(math.NaN()))
}

// degrees formats a temperature beside its limit.
func degrees(t float64, limit section.Opt[float64]) string {
	return quantity.Trimmed(shownDegrees(t, limit), 1)
}

// marginWords formats limit − temperature so that it agrees with the temperature as shown; overWords formats temperature − limit.
func marginWords(t, limit float64) string {
	return quantity.Trimmed(limit-shownDegrees(t, section.Some(limit)), 1)
}

func overWords(t, limit float64) string {
	return quantity.Trimmed(shownDegrees(t, section.Some(limit))-limit, 1)
}

// withUnit joins a number and its unit so that no line ends between them.
func withUnit(number, unit string) string {
	if unit == "" {
		return number
	}
	return number + noBreak + unit
}

// unitAfter finds numbers with a plain space before their unit.
var unitAfter = regexp.MustCompile(`(\d) (A|K|%|°C|W/m|W|mm)([^\pL]|$)`)

// unbroken keeps numbers and their units on one line in a sentence that came from elsewhere.
func unbroken(s string) string { return unitAfter.ReplaceAllString(s, "$1"+noBreak+"$2$3") }

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
