package quantity

import (
	"fmt"
	"math"
	"strings"
)

// ParseCurrent reads a current (r.m.s. or direct) into A: "16", "16 A", "500 mA", "1,2 kA". A negative one is refused: what a
// conductor carries has no sign.
func ParseCurrent(text string) (amperes float64, err error) {
	number, unit := split(tidy(text))
	if number == "" {
		return 0, fmt.Errorf(`%q is not a current; write one like "16 A" or "500 mA"`, text)
	}
	v, err := ParseNumber(number)
	if err != nil {
		return 0, err
	}
	switch unit {
	case "", "A", "a", "amp", "amps", "ampere", "amperes":
	case "mA", "ma":
		v /= 1000
	case "kA", "ka", "KA":
		v *= 1000
	case "µA", "μA", "uA":
		v /= 1e6
	default:
		return 0, fmt.Errorf(`%q has a unit that is not read; write A, mA or kA, like "16 A"`, text)
	}
	if v < 0 {
		return 0, fmt.Errorf("%q is negative, but heat knows no direction; write %q", text, strings.TrimPrefix(plain(v), "-")+" A")
	}
	if math.IsInf(v, 0) {
		return 0, fmt.Errorf(`%q is too large to be meant; write a current like "16 A"`, text)
	}
	return v, nil
}

// FormatCurrent writes a current in A for people: "16 A", "0.5 A" as "500 mA". At most three digits that matter below 100 A
// and whole amperes from there. For a permitted current see RoundDown.
func FormatCurrent(amperes float64) string {
	a := math.Abs(amperes)
	switch {
	case a == 0:
		return "0 A"
	case a < 0.9995:
		return Significant(amperes*1000, 3) + " mA"
	case a < 100:
		return Significant(amperes, 3) + " A"
	}
	return Trimmed(amperes, 0) + " A"
}
