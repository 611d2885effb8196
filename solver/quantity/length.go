package quantity

import (
	"fmt"
	"math"
	"regexp"
	"strconv"
	"strings"
)

// LengthUnit is a unit of length by its symbol.
type LengthUnit string

// Units of length.
const (
	Millimetre LengthUnit = "mm"
	Centimetre LengthUnit = "cm"
	Metre      LengthUnit = "m"
	Micrometre LengthUnit = "µm"
	Inch       LengthUnit = "in" // 25.4 mm exactly
	Mil        LengthUnit = "mil"
	Foot       LengthUnit = "ft"
)

// Millimetres returns how many mm the unit has. It panics on a unit that is not one of the constants.
func (u LengthUnit) Millimetres() float64 {
	switch u {
	case Millimetre:
		return 1
	case Centimetre:
		return 10
	case Metre:
		return 1000
	case Micrometre:
		return 0.001
	case Inch:
		return 25.4
	case Mil:
		return 0.0254
	case Foot:
		return 304.8
	}
	panic("quantity: unknown unit of length")
}

var lengthWords = map[string]LengthUnit{
	"mm": Millimetre, "millimetre": Millimetre, "millimetres": Millimetre, "millimeter": Millimetre, "millimeters": Millimetre,
	"cm": Centimetre, "m": Metre, "metre": Metre, "metres": Metre, "meter": Metre, "meters": Metre,
	"µm": Micrometre, "μm": Micrometre, "um": Micrometre, "micron": Micrometre, "microns": Micrometre,
	"in": Inch, "in.": Inch, "inch": Inch, "inches": Inch, `"`: Inch, "″": Inch, "”": Inch, "''": Inch,
	"mil": Mil, "mils": Mil, "thou": Mil, "ft": Foot, "ft.": Foot, "foot": Foot, "feet": Foot, "'": Foot, "′": Foot, "’": Foot,
}

var (
	fraction  = regexp.MustCompile(`^([+-]?)(?:(\d+)(?: +|-| *- *))?(\d+) ?/ ?(\d+)$`)
	vulgar    = regexp.MustCompile(`^([+-]?\d*) ?([¼½¾⅛⅜⅝⅞])$`)
	vulgarOf  = map[string]string{"¼": "1/4", "½": "1/2", "¾": "3/4", "⅛": "1/8", "⅜": "3/8", "⅝": "5/8", "⅞": "7/8"}
	leadingNo = regexp.MustCompile(`^[0-9+\-., /¼½¾⅛⅜⅝⅞]+(?:[eE][+-]?\d+)?`)
)

// ParseLength reads a length into mm: "12.7 mm", "12,7", `0.5"`, "1/2 in", "1 1/2 in", "20 mil". A number without a unit is in
// unit. Fractions are read for inches only.
func ParseLength(text string, unit LengthUnit) (mm float64, err error) {
	s := tidy(text)
	number := strings.TrimSpace(leadingNo.FindString(s))
	word := strings.ToLower(strings.TrimSpace(s[len(leadingNo.FindString(s)):]))
	if number == "" {
		return 0, fmt.Errorf(`%q is not a length; write one like "12.7 mm" or "1/2 in"`, text)
	}
	if word != "" {
		u, ok := lengthWords[word]
		if !ok {
			return 0, fmt.Errorf(`%q has a unit that is not read; write mm, cm, m, in, mil or ft, like "12.7 mm"`, text)
		}
		unit = u
	}
	v, isFraction, err := parseFraction(text, number)
	if isFraction && err == nil && unit != Inch {
		return 0, fmt.Errorf(`%q is a fraction, which is read for inches only; write "%s in" or a decimal number`, text, number)
	}
	if !isFraction {
		v, err = ParseNumber(number)
	}
	if err != nil {
		return 0, err
	}
	if mm = v * unit.Millimetres(); math.IsInf(mm, 0) {
		return 0, fmt.Errorf(`%q is too large to be meant; write a length like "12.7 mm"`, text)
	}
	return mm, nil
}

// parseFraction reads "1/2", "1 1/2", "1-1/2", "1½".
func parseFraction(text, number string) (v float64, is bool, err error) {
	if m := vulgar.FindStringSubmatch(number); m != nil {
		whole, sign := strings.TrimLeft(m[1], "+-"), ""
		if strings.HasPrefix(m[1], "-") {
			sign = "-"
		}
		number = strings.TrimSpace(sign + whole + " " + vulgarOf[m[2]])
		if whole == "" {
			number = sign + vulgarOf[m[2]]
		}
	}
	if !strings.Contains(number, "/") {
		return 0, false, nil
	}
	m := fraction.FindStringSubmatch(number)
	if m == nil {
		return 0, true, fmt.Errorf(`%q is not a fraction; write one like "1/2 in" or "1 1/2 in"`, text)
	}
	whole, _ := strconv.ParseFloat("0"+m[2], 64)
	top, _ := strconv.ParseFloat(m[3], 64)
	bottom, _ := strconv.ParseFloat(m[4], 64)
	if bottom == 0 {
		return 0, true, fmt.Errorf(`%q divides by zero; write a fraction like "1/2 in"`, text)
	}
	v = whole + top/bottom
	if m[1] == "-" {
		v = -v
	}
	return v, true, nil
}

// FormatLength writes a length given in mm in unit for people, with digits that matter to a drawing: a hundredth of a
// millimetre or a thousandth of an inch, and trailing zeros left out.
func FormatLength(mm float64, unit LengthUnit) string {
	decimals := map[LengthUnit]int{Millimetre: 2, Centimetre: 3, Metre: 3, Micrometre: 0, Inch: 3, Mil: 1, Foot: 3}[unit]
	return Trimmed(mm/unit.Millimetres(), decimals) + " " + string(unit)
}
