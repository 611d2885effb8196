package quantity

import (
	"cmp"
	"fmt"
	"math"
	"regexp"
	"strconv"
	"strings"
)

// SizeKind is the system in which a conductor size was written.
type SizeKind int

// Systems of conductor sizes.
const (
	AWG   SizeKind = iota + 1 // American wire gauge, ASTM B258
	Kcmil                     // thousands of circular mils
	MM2                       // square millimetres, IEC 60228
)

// Size is a conductor size as written. It is comparable: sizes of one system that mean the same are equal. The zero Size is
// no size.
type Size struct {
	kind SizeKind
	v    float64 // AWG number (1/0 is 0, 4/0 is −3), kcmil or mm²
}

// Range of American wire gauge that is read: 40 is the thinnest, 4/0 (−3) the thickest.
const (
	ThinnestAWG  = 40
	ThickestAWG  = -3
	largestKcmil = 1e5
	largestMM2   = 5e4
)

// MM2PerKcmil is the area of a thousand circular mils: a circular mil is the area of a circle of one mil (0.0254 mm).
const MM2PerKcmil = 1000 * math.Pi / 4 * 0.0254 * 0.0254

// AWGSize returns the size of an AWG number; 1/0 to 4/0 are 0 to −3. It panics outside 40 to 4/0.
func AWGSize(n int) Size {
	if n > ThinnestAWG || n < ThickestAWG {
		panic("quantity: AWG number out of range")
	}
	return Size{AWG, float64(n)}
}

// KcmilSize returns the size of so many thousand circular mils. It panics on a value that is not above zero.
func KcmilSize(kcmil float64) Size {
	if !(kcmil > 0 && kcmil <= largestKcmil) {
		panic("quantity: kcmil out of range")
	}
	return Size{Kcmil, kcmil}
}

// MM2Size returns the size of so many square millimetres. It panics on a value that is not above zero.
func MM2Size(mm2 float64) Size {
	if !(mm2 > 0 && mm2 <= largestMM2) {
		panic("quantity: mm² out of range")
	}
	return Size{MM2, mm2}
}

// Kind returns the system of the size, 0 for the zero Size.
func (s Size) Kind() SizeKind { return s.kind }

// AWG returns the gauge number, 1/0 to 4/0 as 0 to −3; ok is false for other systems.
func (s Size) AWG() (n int, ok bool) { return int(s.v), s.kind == AWG }

// DiameterMM returns the diameter in mm of a solid round wire of this size. For AWG it is the definition, ASTM B258:
// d = 0.005 in × 92^((36−n)/39).
func (s Size) DiameterMM() float64 {
	if s.kind == AWG {
		return 0.005 * 25.4 * math.Pow(92, (36-s.v)/39)
	}
	return math.Sqrt(4 / math.Pi * s.AreaMM2())
}

// AreaMM2 returns the nominal area in mm².
func (s Size) AreaMM2() float64 {
	switch s.kind {
	case AWG:
		d := s.DiameterMM()
		return math.Pi / 4 * d * d
	case Kcmil:
		return s.v * MM2PerKcmil
	}
	return s.v
}

// String returns the canonical text: "12 AWG", "1/0 AWG", "250 kcmil", "2.5 mm2".
func (s Size) String() string {
	switch s.kind {
	case AWG:
		if s.v <= 0 {
			return fmt.Sprintf("%d/0 AWG", 1-int(s.v))
		}
		return fmt.Sprintf("%d AWG", int(s.v))
	case Kcmil:
		return plain(s.v) + " kcmil"
	case MM2:
		return plain(s.v) + " mm2"
	}
	return ""
}

// Pretty returns the text for people: "2.5 mm²", the rest as String.
func (s Size) Pretty() string {
	if s.kind == MM2 {
		return plain(s.v) + " mm²"
	}
	return s.String()
}

// Compare orders sizes by area, thin first.
func (s Size) Compare(t Size) int { return cmp.Compare(s.AreaMM2(), t.AreaMM2()) }

func plain(v float64) string { return strconv.FormatFloat(v, 'f', -1, 64) }

const sizeExamples = `write a size like "12 AWG", "1/0 AWG", "250 kcmil" or "2.5 mm2"`

var (
	awgWords   = regexp.MustCompile(`^(?:awg|ga|gauge|gage)\.?$`)
	kcmilWords = regexp.MustCompile(`^(?:kcmil|mcm)s?$`)
	mm2Words   = regexp.MustCompile(`^(?:mm ?\^? ?2|sq\.? ?mm|qmm|mm ?sq\.?)$`)
	mmWords    = regexp.MustCompile(`^(?:mm|in|inch|"|mil)$`)
	awgFirst   = regexp.MustCompile(`^(?:(?:awg|no\.?) *#?|#) *(.*)$`)
	aught      = regexp.MustCompile(`^(\d+) ?/ ?0$`)
	zeros      = regexp.MustCompile(`^0{1,4}$`)
	whole      = regexp.MustCompile(`^\d+$`)
	sizeText   = regexp.MustCompile(`^([0-9.,/ +-]*?) *([a-z"#.^ ]+[2.]?)?$`)
)

// ParseSize reads a conductor size: "12 AWG", "12awg", "#12", "AWG 12", "1/0 AWG", "4/0", "00 AWG", "250 kcmil", "250 MCM",
// "2.5 mm2", "2,5 mm²". A bare number is ambiguous and refused. Any kcmil and mm² above zero are read: which of them can be
// bought is the catalogue's business.
func ParseSize(text string) (Size, error) {
	s := strings.ToLower(tidy(text))
	s = strings.NewReplacer("²", "2", "㎟", "mm2").Replace(s)
	if s == "" {
		return Size{}, fmt.Errorf("a conductor size is missing; %s", sizeExamples)
	}
	if m := awgFirst.FindStringSubmatch(s); m != nil {
		number := strings.TrimSpace(m[1])
		if n, unit, ok := strings.Cut(number, " "); ok && awgWords.MatchString(unit) {
			number = n
		}
		return parseAWG(text, strings.TrimSuffix(number, "awg"))
	}
	m := sizeText.FindStringSubmatch(s)
	if m == nil {
		return Size{}, fmt.Errorf("%q is not a conductor size; %s", text, sizeExamples)
	}
	return parseSizeOf(text, m[1], strings.TrimSpace(m[2]))
}

func parseSizeOf(text, number, unit string) (Size, error) {
	switch {
	case awgWords.MatchString(unit), unit == "" && aught.MatchString(number):
		return parseAWG(text, number)
	case kcmilWords.MatchString(unit):
		return parseArea(text, number, Kcmil, largestKcmil)
	case mm2Words.MatchString(unit):
		return parseArea(text, number, MM2, largestMM2)
	case unit == "" && number != "":
		if _, err := ParseNumber(number); err != nil {
			return Size{}, fmt.Errorf("%q is not a conductor size; %s", text, sizeExamples)
		}
		return Size{}, fmt.Errorf(`%q can be gauge or mm²; write "%s AWG" or "%s mm2"`, text, number, number)
	case mmWords.MatchString(unit) && number != "":
		return Size{}, fmt.Errorf(`%q is a length, not a conductor size; write an area like "%s mm2", or give the diameter of the metal`, text, number)
	}
	return Size{}, fmt.Errorf("%q is not a conductor size; %s", text, sizeExamples)
}

// parseAWG reads a gauge number: "12", "1/0", "0" to "0000".
func parseAWG(text, number string) (Size, error) {
	number = strings.TrimSpace(number)
	n, err := 0, error(nil)
	switch m := aught.FindStringSubmatch(number); {
	case m != nil:
		n, err = strconv.Atoi(m[1])
		n = 1 - n
		if err != nil || n > 0 {
			return Size{}, fmt.Errorf(`%q is no gauge; the thick ones are "1/0 AWG" to "4/0 AWG"`, text)
		}
	case zeros.MatchString(number):
		n = 1 - len(number)
	case whole.MatchString(number) && strings.Trim(number, "0") != "":
		if n, err = strconv.Atoi(number); err != nil {
			n = math.MaxInt
		}
	default:
		return Size{}, fmt.Errorf(`%q is no gauge, which is a whole number; write it like "12 AWG" or "1/0 AWG"`, text)
	}
	if n > ThinnestAWG {
		return Size{}, fmt.Errorf(`%q is thinner than 40 AWG, the thinnest that is read; write its area like "0.004 mm2"`, text)
	}
	if n < ThickestAWG {
		return Size{}, fmt.Errorf(`%q is thicker than 4/0 AWG, the thickest gauge; write thicker ones like "250 kcmil"`, text)
	}
	return Size{AWG, float64(n)}, nil
}

func parseArea(text, number string, kind SizeKind, largest float64) (Size, error) {
	v, err := ParseNumber(number)
	if err != nil {
		return Size{}, err
	}
	if v <= 0 {
		return Size{}, fmt.Errorf("%q is not above zero; %s", text, sizeExamples)
	}
	if v > largest {
		return Size{}, fmt.Errorf("%q is larger than any conductor; %s", text, sizeExamples)
	}
	return Size{kind, v}, nil
}
