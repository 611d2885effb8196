package study

import (
	"fmt"
	"math"

	"packrise/solver/quantity"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// knob is what is fitted.
type knob struct {
	name      string
	low, high float64
	now       float64
	turn      func(d *section.Document, v float64) (*section.Document, rating.Vary)
}

func (f *fitter) knob() (k knob, ok bool) {
	if c := f.base.ClearanceMM; c.OK && f.place() != section.Outside {
		return knob{"mean clearance", 0, widestClearance * c.V, c.V, func(d *section.Document, v float64) (*section.Document, rating.Vary) {
			return d.With(func(d *section.Document) { d.Holder.ClearanceMM = section.Some(v) }), rating.Vary{}
		}}, true
	}
	return knob{"film outside", leastFilm, mostFilm, 1, func(d *section.Document, v float64) (*section.Document, rating.Vary) {
		return d, rating.Vary{Film: v}
	}}, hasFilm(f.then)
}

// fit turns one knob inside its plausible range until the reading comes out.
func (f *fitter) fit() error {
	k, ok := f.knob()
	if !ok {
		return f.unexplained(knob{})
	}
	f.out.What, f.out.Low, f.out.High = k.name, k.low, k.high
	miss := func(v float64) (float64, error) {
		d, vary := k.turn(f.then, v)
		r, err := solveVaried(f.ctx, f.s.engines[0], d, f.o, vary)
		if err != nil {
			return 0, err
		}
		_, t, ok := f.find(r)
		if !ok {
			return math.Inf(1), nil
		}
		return t - f.out.SurfaceC, nil
	}
	a, b := k.low, k.high
	fa, err := miss(a)
	if err != nil {
		return err
	}
	fb, err := miss(b)
	if err != nil {
		return err
	}
	if fa*fb > 0 {
		return f.unexplained(k)
	}
	v, err := crossing(miss, a, b, fa, fb)
	if err != nil {
		return err
	}
	f.out.Found, f.out.Value = Fitted, v
	return f.after(k, v)
}

// crossing finds where f is within a twentieth of a kelvin of 0, by regula falsi with the Illinois rule.
func crossing(f func(float64) (float64, error), a, b, fa, fb float64) (v float64, err error) {
	v = a
	for range matchSteps {
		if v = b - fb*(b-a)/(fb-fa); math.IsNaN(v) || math.IsInf(fa, 0) || math.IsInf(fb, 0) {
			v = (a + b) / 2
		}
		y, err := f(v)
		if err != nil {
			return 0, err
		}
		if math.Abs(y) < 0.05 {
			return v, nil
		}
		if y*fb < 0 {
			a, fa = b, fb
		} else {
			fa /= 2
		}
		b, fb = v, y
	}
	return v, nil
}

func (f *fitter) unexplained(k knob) error {
	f.out.Found = Unexplained
	f.out.After, f.out.FullFittedC = f.out.Before, f.out.FullC
	why := "nothing about its outside can be fitted"
	if k.name != "" {
		why = fmt.Sprintf("no %s between %s and %s gives it", k.name, quantity.Trimmed(k.low, 2), quantity.Trimmed(k.high, 2))
	}
	hotter := "hotter"
	if f.out.SurfaceC < f.out.ComputedC {
		hotter = "cooler"
	}
	f.out.Remarks = append(f.out.Remarks, fmt.Sprintf("The section does not explain the reading, which is %s than computed: %s.", hotter, why))
	if f.out.SurfaceC > f.out.HighC {
		f.out.Remarks = append(f.out.Remarks, "It is hotter than the whole band: stop loading it further and look for a joint before any re-rating.")
	} else {
		f.out.Remarks = append(f.out.Remarks, "Check the currents, the drawing and the surroundings; inspect the joints before re-rating.")
	}
	return nil
}

// after rates the section with what was fitted.
func (f *fitter) after(k knob, v float64) error {
	d, vary := k.turn(f.full, v)
	o := f.o
	o.vary = vary
	full, err := f.s.solve(f.ctx, d, o)
	if err != nil {
		return err
	}
	for _, x := range things(full) {
		if x.id == f.out.Governs {
			f.out.FullFittedC = x.tempC
		}
	}
	if f.out.After, err = f.s.pair(f.ctx, f.s.engines[0], d, full, nil, nil, 0, o); err != nil {
		return err
	}
	f.out.Reason = f.full.Reason(section.ReasonMeasurement + f.m.ID)
	if f.out.After.Rely.Factor > f.out.Before.Rely.Factor && f.out.Reason == "" {
		f.out.Raises = true
		f.out.Remarks = append(f.out.Remarks, fmt.Sprintf("With the fit all loads could go to %s in place of %s. That is taken only with a reason: write reasons: {%s%s: why}.",
			Percent(f.out.After.Rely.Factor), Percent(f.out.Before.Rely.Factor), section.ReasonMeasurement, f.m.ID))
	}
	return nil
}
