package quantity

import (
	"fmt"
	"math"
	"regexp"
	"strconv"
	"strings"
)

// Minus is the sign that people read; files and JSON use the ASCII hyphen.
const Minus = "−"

var (
	plainNumber  = regexp.MustCompile(`^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d{1,3})?$`)
	groupedComma = regexp.MustCompile(`^[+-]?[1-9]\d{0,2},\d{3}$`)
	grouped      = regexp.MustCompile(`^[+-]?\d{1,3}([ ,.'’]\d{3})+([.,]\d+)?$`)
)

// ParseNumber reads a decimal number with a point or a comma: "1.5" and "1,5" are the same, "1,500" could be read two ways and
// is refused, and so are two separators, hexadecimal numbers, NaN and infinities.
func ParseNumber(text string) (float64, error) {
	s := tidy(text)
	if s == "" {
		return 0, fmt.Errorf("a number is missing; write one like 1.5")
	}
	if groupedComma.MatchString(s) {
		return 0, fmt.Errorf("%q can be read two ways; write %s or %s", text,
			strings.Replace(s, ",", ".", 1), strings.Replace(s, ",", "", 1))
	}
	if strings.Count(s, ",") == 1 && !strings.Contains(s, ".") {
		s = strings.Replace(s, ",", ".", 1)
	}
	if !plainNumber.MatchString(s) {
		return 0, notANumber(text, s)
	}
	v, err := strconv.ParseFloat(s, 64)
	if err != nil || math.IsInf(v, 0) {
		return 0, fmt.Errorf("%q is too large to be meant; write a number like 1.5", text)
	}
	return v + 0, nil // -0 becomes 0
}

func notANumber(text, tidied string) error {
	if grouped.MatchString(tidied) {
		return fmt.Errorf("%q has marks between its thousands; write only digits and one decimal point", text)
	}
	return fmt.Errorf("%q is not a number; write one like 1.5", text)
}

// tidy trims, and turns the minus signs, dashes and spaces that people paste into plain ones.
func tidy(text string) string {
	s := strings.Map(func(r rune) rune {
		switch r {
		case '−', '–', '‒', '﹣', '-':
			return '-'
		case '\u00a0', '\u2009', '\u202f', '\u2007', '\t':
			return ' '
		}
		return r
	}, text)
	return strings.TrimSpace(s)
}

// split parts "12.7 mm" into the number's text and the unit's, with no space around either.
func split(s string) (number, unit string) {
	i := 0
	for i < len(s) && strings.IndexByte("0123456789+-., ", s[i]) >= 0 {
		i++
	}
	// an exponent belongs to the number
	if i > 0 && i < len(s) && (s[i] == 'e' || s[i] == 'E') {
		j := i + 1
		if j < len(s) && (s[j] == '+' || s[j] == '-') {
			j++
		}
		k := j
		for k < len(s) && s[k] >= '0' && s[k] <= '9' {
			k++
		}
		if k > j {
			i = k
		}
	}
	return strings.TrimSpace(s[:i]), strings.TrimSpace(s[i:])
}
