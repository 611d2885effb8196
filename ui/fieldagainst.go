package ui

import (
	"errors"
	"math"
	"slices"
	"strings"

	"packrise/solver/quantity"
	"packrise/solver/section"
)

// againstKinds are the surroundings in which a part of the outside can rest against something.
var againstKinds = []string{section.StillAir, section.MovingAir, section.FixedFilm, section.Water, section.Vacuum, section.Insulation}

// restsNot is the word for an outside that rests against nothing.
const restsNot = "nothing"

// againstInputs tell what a part of the outside rests against; where and how much of it once it does.
func againstInputs(k *Desk) []*input {
	d := k.Document()
	if !slices.Contains(againstKinds, d.Surroundings.Kind) || d.Holder.Kind == section.Wireway || d.Holder.Kind == section.Apart {
		return nil
	}
	now := d.Surroundings.Against
	if now == nil {
		return []*input{restInput(k, nil)}
	}
	return []*input{restInput(k, now), restAngleInput(k, *now), restShareInput(k, *now)}
}

// restInput is what the outside rests against.
func restInput(k *Desk, now *section.Against) *input {
	in := input{
		key: "against", label: "Rests against", text: restsNot, choices: []string{restsNot, section.SideInsulated},
		about: "A wall or floor that a part of the outside lies on: insulated, or held at a temperature in °C or °F.",
	}
	if now != nil {
		in.text = sideText(now.Is)
		if now.Is.Kind == section.SideFixed {
			in.shown = "held at " + in.text
		}
	}
	return restEdit(in, func(text string) (*section.Against, string, error) {
		is, meant, err := readSide(text, restsNot)
		if err != nil || is == (section.Side{}) {
			return nil, meant, err
		}
		a := section.Against{AtDeg: -90, Share: 0.25}
		if now != nil {
			a = *now
		}
		a.Is = is
		return &a, meant, nil
	})
}

// restAngleInput is where it rests.
func restAngleInput(k *Desk, now section.Against) *input {
	in := input{
		key: "against-at", label: "Rests at", text: angleText(now.AtDeg), choices: angleChoices(),
		about: "The side on which it rests, or the angle of its middle: 0° to the right, 90° up, −90° down.",
	}
	in.shown = in.text
	if in.text == angleMeant(now.AtDeg) {
		in.shown = "at " + in.text
	}
	return restEdit(in, func(text string) (*section.Against, string, error) {
		a := now
		var err error
		a.AtDeg, err = readAngle(text)
		return &a, angleMeant(a.AtDeg), err
	})
}

// restShareInput is how much of the outside rests.
func restShareInput(k *Desk, now section.Against) *input {
	in := input{
		key: "against-share", label: "Share of outside", text: percentText(now.Share),
		about: "How much of the way round rests: 25 % or 0.25. A cable on a floor touches along little, a strap or a bed along more.",
	}
	return restEdit(in, func(text string) (*section.Against, string, error) {
		a := now
		var err error
		a.Share, err = readShare(text)
		return &a, percentText(a.Share) + " of the way round", err
	})
}

// restEdit makes an input of what the outside rests against.
func restEdit(in input, read func(string) (*section.Against, string, error)) *input {
	made := wholeInput(in, func(string) (string, func(*section.Document), error) { return "", nil, nil })
	made.read = func(text string) (string, func(*section.Document) *section.Document, error) {
		a, meant, err := read(text)
		if err == nil && a != nil && a.Share == 1 && a.Is.Kind == section.SideInsulated {
			err = errors.New("where all of the outside rests against something insulating no heat could leave; let less of it rest")
		}
		if err != nil {
			return "", nil, err
		}
		return meant, func(d *section.Document) *section.Document { return section.RestAgainst(d, a) }, nil
	}
	return made
}

// angles by their names.
var angles = []struct {
	name string
	deg  float64
}{{"below", -90}, {"above", 90}, {"to the left", 180}, {"to the right", 0}}

func angleChoices() (out []string) {
	for _, a := range angles {
		out = append(out, a.name)
	}
	return out
}

// angleText names the four sides and writes other angles in degrees.
func angleText(deg float64) string {
	for _, a := range angles {
		if math.Abs(math.Remainder(a.deg-deg, 360)) < 1e-9 {
			return a.name
		}
	}
	return written(deg) + "°"
}

// angleMeant is an angle in degrees.
func angleMeant(deg float64) string { return written(deg) + "°" }

// readAngle understands a side, degrees and radians.
func readAngle(text string) (float64, error) {
	name := squeezed(text)
	for _, a := range angles {
		if name == squeezed(a.name) || strings.HasSuffix(a.name, " "+name) {
			return a.deg, nil
		}
	}
	number, unit := name, 1.0
	if s, ok := strings.CutSuffix(number, "rad"); ok {
		number, unit = s, 180/math.Pi
	}
	for _, u := range []string{"°", "degrees", "deg"} {
		number = strings.TrimSuffix(number, u)
	}
	v, err := quantity.ParseNumber(number)
	if err != nil {
		return 0, errors.New("it takes below, above, to the left, to the right, or an angle in degrees, such as −90")
	}
	if v *= unit; math.Abs(v) > 360 {
		return 0, errors.New("an angle lies between −360° and 360°")
	}
	return v, nil
}

// percentText writes a share.
func percentText(share float64) string { return withUnit(written(100*share), "%") }
