package rating

import (
	"math"
	"strconv"
	"strings"

	"packrise/solver/quantity"
)

// minus is the real minus sign of everything that people read.
const minus = quantity.Minus

// digits formats v with up to n decimals, without trailing zeros.
func digits(v float64, n int) string { return quantity.Trimmed(v, n) }

// shown rounds a temperature beside its limit.
func shown(t, limit float64, hasLimit bool) float64 {
	if !hasLimit {
		limit = math.NaN()
	}
	return quantity.BesideLimit(t, limit)
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
