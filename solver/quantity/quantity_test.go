package quantity

import (
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

type parsed struct {
	text string
	want float64
	err  string // part of the sentence
}

func check(t *testing.T, what string, parse func(string) (float64, error), cases []parsed) {
	t.Helper()
	for _, c := range cases {
		got, err := parse(c.text)
		switch {
		case c.err == "" && (err != nil || math.Abs(got-c.want) > 1e-12*math.Max(1, math.Abs(c.want))):
			t.Errorf("%s(%q) = %v, %v; want %v", what, c.text, got, err, c.want)
		case c.err != "" && (err == nil || !strings.Contains(err.Error(), c.err)):
			t.Errorf("%s(%q) = %v, %v; want an error with %q", what, c.text, got, err, c.err)
		}
	}
}

func TestParseNumber(t *testing.T) {
	check(t, "ParseNumber", ParseNumber, []parsed{
		{"1.5", 1.5, ""},
		{"1,5", 1.5, ""},
		{"15", 15, ""},
		{" 0,125 ", 0.125, ""},
		{"-3", -3, ""},
		{"−3,25", -3.25, ""},
		{"+2", 2, ""},
		{".5", 0.5, ""},
		{",5", 0.5, ""},
		{"5.", 5, ""},
		{"1e3", 1000, ""},
		{"2,5E-3", 0.0025, ""},
		{"1.234", 1.234, ""},
		{"1234,567", 1234.567, ""},
		{"1,23", 1.23, ""},
		{"1,2345", 1.2345, ""},
		{"-0", 0, ""},
		{"1,234", 0, "write 1.234 or 1234"},
		{"12,700", 0, "two ways"},
		{"1,234,5", 0, "thousands"},
		{"1,234,567", 0, "thousands"},
		{"1.234,5", 0, "thousands"},
		{"1 234", 0, "thousands"},
		{"1'234", 0, "thousands"},
		{"1.2.3", 0, "not a number"},
		{"", 0, "missing"},
		{"NaN", 0, "not a number"},
		{"Inf", 0, "not a number"},
		{"-Infinity", 0, "not a number"},
		{"0x1F", 0, "not a number"},
		{"1_000", 0, "not a number"},
		{"1e999", 0, "too large"},
		{"1p3", 0, "not a number"},
		{"ten", 0, "not a number"},
		{"--1", 0, "not a number"},
		{"1 5", 0, "not a number"},
		{"١", 0, "not a number"},
	})
	if v, _ := ParseNumber("-0"); math.Signbit(v) {
		t.Error("-0 keeps its sign")
	}
}

// Units: an inch is 25.4 mm exactly (international yard and pound agreement, 1959), the rest is decimal.
func TestParseLength(t *testing.T) {
	mm := func(s string) (float64, error) { return ParseLength(s, Millimetre) }
	check(t, "ParseLength mm", mm, []parsed{
		{"12.7", 12.7, ""},
		{"12,7", 12.7, ""},
		{"12.7 mm", 12.7, ""},
		{"12.7mm", 12.7, ""},
		{"1.27 cm", 12.7, ""},
		{"0.5 m", 500, ""},
		{"1/2 in", 12.7, ""},
		{`0.5"`, 12.7, ""},
		{"0.5 in", 12.7, ""},
		{"½ in", 12.7, ""},
		{"1 1/2 in", 38.1, ""},
		{"1-1/2 in", 38.1, ""},
		{"1½\"", 38.1, ""},
		{"-1/4 in", -6.35, ""},
		{"−¼ in", -6.35, ""},
		{"3/4″", 19.05, ""},
		{"20 mil", 0.508, ""},
		{"30 thou", 0.762, ""},
		{"2 ft", 609.6, ""},
		{"1.5 Inches", 38.1, ""},
		{"25 µm", 0.025, ""},
		{"25 um", 0.025, ""},
		{"1e2 mm", 100, ""},
		{"-3.5", -3.5, ""},
		{"1/2", 0, `write "1/2 in"`},
		{"1/0 in", 0, "divides by zero"},
		{"1/2/3 in", 0, "not a fraction"},
		{"", 0, "not a length"},
		{"mm", 0, "not a length"},
		{"12 km", 0, "unit that is not read"},
		{"1,234 mm", 0, "two ways"},
		{"1,234,5 mm", 0, "thousands"},
		{"NaN", 0, "not a length"},
		{"1e308 m", 0, "too large"},
		{"12.7 mm 3", 0, "unit that is not read"},
		{"5'6\"", 0, "unit that is not read"},
	})
	check(t, "ParseLength in", func(s string) (float64, error) { return ParseLength(s, Inch) }, []parsed{
		{"1/2", 12.7, ""}, {"0.5", 12.7, ""}, {"12.7 mm", 12.7, ""}, {"2", 50.8, ""},
	})
}

// Fixed points of the Fahrenheit scale: 32 °F = 0 °C, 212 °F = 100 °C, −40 is the same in both; 0 K = −273.15 °C (ITS-90).
func TestParseTemperature(t *testing.T) {
	check(t, "ParseTemperature", func(s string) (float64, error) { c, err := ParseTemperature(s); return float64(c), err }, []parsed{
		{"104F", 40, ""},
		{"104 °F", 40, ""},
		{"40 °C", 40, ""},
		{"40", 40, ""},
		{"40C", 40, ""},
		{"40 c", 40, ""},
		{"−40 °F", -40, ""},
		{"212 f", 100, ""},
		{"32 ℉", 0, ""},
		{"313.15 K", 40, ""},
		{"22,5 ℃", 22.5, ""},
		{"40 deg C", 40, ""},
		{"90 degC", 90, ""},
		{"-273.15", -273.15, ""},
		{"-274", 0, "below absolute zero"},
		{"-1 K", 0, "below absolute zero"},
		{"40 R", 0, "unit that is not read"},
		{"warm", 0, "not a temperature"},
		{"", 0, "not a temperature"},
		{"1,234 °C", 0, "two ways"},
		{"40°", 40, ""},
		{"Inf", 0, "not a temperature"},
	})
	if k := Celsius(90).Minus(73.1); math.Abs(float64(k)-16.9) > 1e-12 || k.String() != "16.9 K" || Kelvins(-3.25).String() != "−3.2 K" {
		t.Errorf("difference is %v", k)
	}
	if c := FromKelvin(300); math.Abs(float64(c)-26.85) > 1e-12 || c.Kelvin() != 300 || c.Plus(13.15).String() != "40.0 °C" {
		t.Errorf("300 K is %v", c)
	}
}

func TestParseCurrent(t *testing.T) {
	check(t, "ParseCurrent", ParseCurrent, []parsed{
		{"16 A", 16, ""},
		{"500 mA", 0.5, ""},
		{"16", 16, ""},
		{"1,5 A", 1.5, ""},
		{"1.2 kA", 1200, ""},
		{"0", 0, ""},
		{"16a", 16, ""},
		{"2 amps", 2, ""},
		{"250 µA", 0.00025, ""},
		{"-16 A", 0, `write "16 A"`},
		{"16 V", 0, "unit that is not read"},
		{"A", 0, "not a current"},
		{"", 0, "not a current"},
		{"1,250 A", 0, "two ways"},
		{"1e308 kA", 0, "too large"},
		{"16 MA", 0, "unit that is not read"},
		{"unknown", 0, "not a current"},
	})
}

func TestFormat(t *testing.T) {
	for _, c := range [][2]string{
		{Fixed(-3.04, 1), "−3.0"},
		{Fixed(-0.04, 1), "0.0"},
		{Fixed(71.26, 1), "71.3"},
		{Fixed(math.NaN(), 1), "–"},
		{Fixed(math.Inf(-1), 0), "–"},
		{Trimmed(12.70, 2), "12.7"},
		{Trimmed(3, 2), "3"},
		{Trimmed(-0.001, 2), "0"},
		{Trimmed(100, 0), "100"},
		{Significant(0.017241, 3), "0.0172"},
		{Significant(1234, 3), "1230"},
		{Significant(-9.999, 3), "−10"},
		{Significant(0, 3), "0"},
		{Significant(1e-9, 2), "0.000000001"},
		{FormatCurrent(16), "16 A"},
		{FormatCurrent(0.5), "500 mA"},
		{FormatCurrent(0), "0 A"},
		{FormatCurrent(123.4), "123 A"},
		{FormatCurrent(18.94), "18.9 A"},
		{FormatLength(12.7, Millimetre), "12.7 mm"},
		{FormatLength(12.7, Inch), "0.5 in"},
		{FormatLength(-3.456, Millimetre), "−3.46 mm"},
		{FormatLength(0.508, Mil), "20 mil"},
		{Plain(9.99653679643294), "9.99653679643294"},
		{Plain(30), "30"},
		{Plain(-0.5), "-0.5"},
		{Plain(1e6), "1000000"},
		{Plain(1.8982025386784e-16), "1.8982025386784e-16"},
		{Plain(math.Copysign(0, -1)), "0"},
		{Plain(1e15), "1e+15"},
		{Plain(0.000001), "0.000001"},
	} {
		if c[0] != c[1] {
			t.Errorf("got %q; want %q", c[0], c[1])
		}
	}
}

func TestRoundDown(t *testing.T) {
	for _, c := range []struct {
		v        float64
		decimals int
		want     float64
	}{{18.99, 1, 18.9}, {18.9, 1, 18.9}, {15.9999999999, 0, 16}, {15.999, 0, 15}, {0.3, 1, 0.3}, {2.3, 1, 2.3}} {
		if got := RoundDown(c.v, c.decimals); got != c.want {
			t.Errorf("RoundDown(%g, %d) = %g; want %g", c.v, c.decimals, got, c.want)
		}
	}
}

// What is written for files reads back to the same number, and what is written for people to the nearest shown.
func TestNumbersRoundTrip(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		v := rapid.Float64Range(-1e9, 1e9).Draw(t, "v")
		if got, err := ParseNumber(Plain(v)); err != nil || got != v {
			t.Fatalf("Plain(%v) = %q reads as %v, %v", v, Plain(v), got, err)
		}
		d := rapid.IntRange(0, 6).Draw(t, "decimals")
		if got, err := ParseNumber(Fixed(v, d)); err != nil || math.Abs(got-v) > 0.5001*math.Pow(10, -float64(d))+math.Abs(v)*1e-15 {
			t.Fatalf("Fixed(%v, %d) = %q reads as %v, %v", v, d, Fixed(v, d), got, err)
		}
		if r := RoundDown(v, 1); r > v+2e-10+math.Abs(v)*1e-15 || r < v-0.1001 {
			t.Fatalf("RoundDown(%v) = %v", v, r)
		}
		mm, err := ParseLength(FormatLength(v, Millimetre), Inch)
		if err != nil || math.Abs(mm-v) > 0.00501+math.Abs(v)*1e-15 {
			t.Fatalf("%q reads as %v mm, %v", FormatLength(v, Millimetre), mm, err)
		}
		if c := Celsius(math.Abs(v)); true {
			if got, err := ParseTemperature(c.String()); err != nil || math.Abs(float64(got-c)) > 0.0501 {
				t.Fatalf("%q reads as %v, %v", c.String(), got, err)
			}
		}
		if got, err := ParseCurrent(FormatCurrent(math.Abs(v))); err != nil || math.Abs(got-math.Abs(v)) > 0.5001+math.Abs(v)*0.005 {
			t.Fatalf("%q reads as %v, %v", FormatCurrent(v), got, err)
		}
	})
}

func FuzzParse(f *testing.F) {
	for _, s := range []string{"1,5", "1/2 in", "½\"", "104 °F", "500 mA", "1e999", "-", "1e", "0x1p4", "1 1/0 in"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, text string) {
		c, err4 := ParseTemperature(text)
		a, err3 := ParseCurrent(text)
		l, err2 := ParseLength(text, Inch)
		n, err1 := ParseNumber(text)
		for i, v := range []float64{n, l, a, float64(c)} {
			if err := []error{err1, err2, err3, err4}[i]; err == nil && (math.IsNaN(v) || math.IsInf(v, 0)) {
				t.Fatalf("parser %d reads %q as %v", i, text, v)
			} else if err != nil && strings.ContainsAny(err.Error(), "\n") && !strings.Contains(text, "\n") {
				t.Fatalf("parser %d: more than a line: %v", i, err)
			}
		}
	})
}
