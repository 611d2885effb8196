package film

import (
	"fmt"
	"math"
	"strconv"
)

// law is a published formula and the range that its authors give.
type law struct {
	name      string // with the year, for a sentence
	number    string // what the range is of
	low, high float64
}

func (l law) has(v float64) bool { return v >= l.low && v <= l.high }

// note is the sentence for v outside the range.
func (l law) note(v float64) string {
	return fmt.Sprintf("%s is used outside its range: %s %s, range %s to %s", l.name, l.number, short(v), short(l.low), short(l.high))
}

// short writes a number with two digits, powers of ten as people write them.
func short(v float64) string {
	if a := math.Abs(v); a != 0 && (a < 0.01 || a >= 1e5) {
		e := math.Floor(math.Log10(a))
		m := v / math.Pow(10, e)
		if s := strconv.FormatFloat(m, 'f', 1, 64); s != "1.0" {
			return s + "·10" + raised(int(e))
		}
		return "10" + raised(int(e))
	}
	if math.Abs(v) >= 1000 {
		return strconv.FormatFloat(v, 'f', 0, 64)
	}
	return strconv.FormatFloat(v, 'g', 3, 64)
}

// raised writes an exponent.
func raised(e int) string {
	const digits = "⁰¹²³⁴⁵⁶⁷⁸⁹"
	out := ""
	for _, c := range strconv.Itoa(e) {
		if c == '-' {
			out += "⁻"
			continue
		}
		out += string([]rune(digits)[c-'0'])
	}
	return out
}
