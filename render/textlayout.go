package render

import (
	"math"
	"strconv"
	"strings"
	"unicode/utf8"

	"packrise/solver/quantity"
	"packrise/solver/section"
)

// Elide shortens a line to a width, ending it in "…"; measure returns the width of a text. Nothing is left of it when not even
// that fits.
func Elide(text string, width float64, measure func(string) float64) string {
	if measure(text) <= width {
		return text
	}
	runes := []rune(text)
	lo, hi := -1, len(runes) // lo fits (−1: nothing does), hi does not
	for hi-lo > 1 {
		mid := (lo + hi) / 2
		if measure(strings.TrimRight(string(runes[:mid]), " ,;·")+"…") <= width {
			lo = mid
		} else {
			hi = mid
		}
	}
	if lo < 0 {
		return ""
	}
	return strings.TrimRight(string(runes[:lo]), " ,;·") + "…"
}

// Wrap breaks a text into lines of at most the width, at spaces and given line breaks; a word wider than that is broken
// anywhere. With most > 0 it returns at most that many lines, the last one elided.
func Wrap(text string, width float64, most int, measure func(string) float64) []string {
	var lines []string
	for _, para := range strings.Split(strings.TrimRight(text, "\n"), "\n") {
		lines = append(lines, wrapOne(para, width, measure)...)
	}
	if most > 0 && len(lines) > most {
		rest := strings.Join(lines[most-1:], " ")
		lines = append(lines[:most-1:most-1], Elide(rest, width, measure))
	}
	return lines
}

func wrapOne(para string, width float64, measure func(string) float64) []string {
	var lines []string
	now := ""
	for _, word := range strings.Fields(para) {
		next := word
		if now != "" {
			next = now + " " + word
		}
		if measure(next) <= width {
			now = next
			continue
		}
		if now != "" {
			lines = append(lines, now)
		}
		for measure(word) > width {
			n := breakAt(word, width, measure)
			if n >= len(word) {
				break
			}
			lines = append(lines, word[:n])
			word = word[n:]
		}
		now = word
	}
	if now != "" || len(lines) == 0 {
		lines = append(lines, now)
	}
	return lines
}

// breakAt returns how many bytes of a word fit, at least one rune.
func breakAt(word string, width float64, measure func(string) float64) int {
	n := 0
	for i, r := range word {
		end := i + utf8.RuneLen(r)
		if n > 0 && measure(word[:end]) > width {
			break
		}
		n = end
	}
	return n
}

// wholeC writes a temperature in whole degrees with a real minus sign, without a unit.
func wholeC(t float64) string {
	r := math.Round(t)
	if r < 0 {
		return "−" + strconv.Itoa(int(-r))
	}
	return strconv.Itoa(int(r))
}

// besideLimit writes a reading's temperature so that it does not stand on the wrong side of its limit.
func besideLimit(r section.Reading) string {
	return quantity.Trimmed(quantity.BesideLimit(r.TempC, r.LimitC.Or(math.NaN())), 1)
}

// marginText says how far below or over its limit something is, so that it agrees with the temperature as written. The reading has a limit.
func marginText(r section.Reading) string {
	k := r.LimitC.V - quantity.BesideLimit(r.TempC, r.LimitC.V)
	if r.Over() {
		return "over by " + quantity.Trimmed(-k, 1) + " K"
	}
	return "margin " + quantity.Trimmed(k, 1) + " K"
}
