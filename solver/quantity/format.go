package quantity

import (
	"math"
	"strconv"
	"strings"
)

// Fixed writes v for people with so many decimals and a real minus sign: "71.2", "−3.0", and never "−0.0". NaN and infinities
// are "–".
func Fixed(v float64, decimals int) string {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return "–"
	}
	return sign(strconv.FormatFloat(v, 'f', decimals, 64))
}

// Trimmed writes v as Fixed does, without trailing zeros: "12.7", "3".
func Trimmed(v float64, decimals int) string {
	s := Fixed(v, decimals)
	if strings.Contains(s, ".") {
		s = strings.TrimRight(strings.TrimRight(s, "0"), ".")
	}
	return s
}

// Significant writes v for people with at most so many digits that matter, without exponent or trailing zeros: with 3,
// 0.017241 is "0.0172" and 1234 is "1230".
func Significant(v float64, digits int) string {
	if v == 0 || math.IsNaN(v) || math.IsInf(v, 0) {
		return Trimmed(v, 0)
	}
	r, _ := strconv.ParseFloat(strconv.FormatFloat(v, 'e', digits-1, 64), 64)
	return sign(strconv.FormatFloat(r, 'f', -1, 64))
}

// RoundDown returns v cut to so many decimals towards smaller values, for permitted currents. What lies within 1e-9 of the
// step above counts as that step, so that 16 that was computed as 15.9999999999 stays 16.
func RoundDown(v float64, decimals int) float64 {
	p := math.Pow(10, float64(decimals))
	return math.Floor(v*p+1e-9) / p
}

// Plain writes v for files: shortest text that reads back to the same number, a decimal point, an ASCII minus sign, and an
// exponent only where the digits would run away. It panics on NaN and infinities.
func Plain(v float64) string {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		panic("quantity: a number for a file must be finite")
	}
	if a := math.Abs(v); a != 0 && (a < 1e-6 || a >= 1e15) {
		return strconv.FormatFloat(v, 'g', -1, 64)
	}
	return strconv.FormatFloat(v+0, 'f', -1, 64)
}

func sign(s string) string {
	if rest, ok := strings.CutPrefix(s, "-"); ok {
		if strings.Trim(rest, "0.") == "" {
			return rest
		}
		return Minus + rest
	}
	return s
}
