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

// shown rounds a temperature beside its limit: to the nearest whole kelvin, but a tenth away from the limit where whole kelvins
// would carry it onto or across the limit.
func shown(t, limit float64, hasLimit bool) float64 {
	near := math.Round(t)
	switch {
	case !hasLimit || t == limit || (near != limit && (t > limit) == (near > limit)):
		return near
	case t > limit:
		return math.Ceil(t*10) / 10
	}
	return math.Floor(t*10) / 10
}

// degrees formats a temperature beside its limit.
func degrees(t, limit float64, hasLimit bool) string { return digits(shown(t, limit, hasLimit), 1) }

// margin formats limit − temperature so that it agrees with the temperature as shown.
func margin(t, limit float64) string { return digits(limit-shown(t, limit, true), 1) }

// list joins ids for a sentence and cuts a long list.
func list(ids []string) string {
	const most = 6
	if len(ids) > most {
		return strings.Join(ids[:most], ", ") + " and " + strconv.Itoa(len(ids)-most) + " more"
	}
	return strings.Join(ids, ", ")
}
