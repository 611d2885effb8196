package rating

import (
	"math"
	"strconv"
	"strings"
)

// minus is the real minus sign of everything that people read.
const minus = "−"

// digits formats v with up to n decimals, without trailing zeros.
func digits(v float64, n int) string {
	s := strconv.FormatFloat(v, 'f', n, 64)
	if strings.Contains(s, ".") {
		s = strings.TrimRight(strings.TrimRight(s, "0"), ".")
	}
	if s == "-0" {
		s = "0"
	}
	return strings.Replace(s, "-", minus, 1)
}

// degrees formats a temperature beside its limit: the nearest whole kelvin, but a digit more where rounding would carry it onto
// or across the limit (rounded away from the limit then).
func degrees(t, limit float64, hasLimit bool) string {
	near := math.Round(t)
	if !hasLimit || t == limit || (near != limit && (t > limit) == (near > limit)) {
		return digits(near, 0)
	}
	if t > limit {
		return digits(math.Ceil(t*10)/10, 1)
	}
	return digits(math.Floor(t*10)/10, 1)
}

// kelvins formats a margin: whole kelvins rounded down, one digit more within a kelvin of zero.
func kelvins(m float64) string {
	if math.Abs(m) < 1 {
		return digits(math.Floor(m*10)/10, 1)
	}
	return digits(math.Floor(m), 0)
}

// list joins ids for a sentence and cuts a long list.
func list(ids []string) string {
	const most = 6
	if len(ids) > most {
		return strings.Join(ids[:most], ", ") + " and " + strconv.Itoa(len(ids)-most) + " more"
	}
	return strings.Join(ids, ", ")
}
