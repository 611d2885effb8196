package quantity

import (
	"fmt"
	"math"
	"strings"
)

// Celsius is an absolute temperature in °C.
type Celsius float64

// Kelvins is a difference of temperatures in K.
type Kelvins float64

// AbsoluteZero is 0 K.
const AbsoluteZero Celsius = -273.15

// Minus returns the difference c − d.
func (c Celsius) Minus(d Celsius) Kelvins { return Kelvins(c - d) }

// Plus returns the temperature that is higher by k.
func (c Celsius) Plus(k Kelvins) Celsius { return c + Celsius(k) }

// Kelvin returns the absolute temperature in K.
func (c Celsius) Kelvin() float64 { return float64(c - AbsoluteZero) }

// FromKelvin returns the temperature of so many K above absolute zero.
func FromKelvin(k float64) Celsius { return Celsius(k) + AbsoluteZero }

// String returns the temperature for people with one decimal: "71.2 °C", "−40.0 °C".
func (c Celsius) String() string { return Fixed(float64(c), 1) + " °C" }

// String returns the difference for people with one decimal: "16.9 K", "−3.2 K".
func (k Kelvins) String() string { return Fixed(float64(k), 1) + " K" }

// ParseTemperature reads a temperature: "40", "40 °C", "104F", "313.15 K". A number without a unit is in °C. Below absolute
// zero is refused.
func ParseTemperature(text string) (Celsius, error) {
	number, unit := split(tidy(text))
	if number == "" {
		return 0, fmt.Errorf(`%q is not a temperature; write one like "40 °C" or "104 °F"`, text)
	}
	v, err := ParseNumber(number)
	if err != nil {
		return 0, err
	}
	word := strings.TrimLeft(strings.ToLower(strings.NewReplacer("℃", "c", "℉", "f", "º", "°").Replace(unit)), "° ")
	var c Celsius
	switch strings.TrimPrefix(word, "deg ") {
	case "", "c", "degc", "celsius":
		c = Celsius(v)
	case "f", "degf", "fahrenheit":
		c = Celsius((v - 32) / 1.8)
	case "k", "kelvin":
		c = Celsius(v - 273.15)
	default:
		return 0, fmt.Errorf(`%q has a unit that is not read; write °C, °F or K, like "40 °C"`, text)
	}
	if c < AbsoluteZero || math.IsInf(float64(c), 0) {
		return 0, fmt.Errorf("%q is below absolute zero (%s273.15 °C); write a temperature like %q", text, Minus, "40 °C")
	}
	return c, nil
}
