package ui

import (
	"image"
	"testing"
)

// barInk returns the columns between which a row of the bars has ink, and how many of its pixels in the middle are opaque.
func barInk(img *image.RGBA, y int) (first, last, solid int) {
	first, last = -1, -1
	for x := range img.Rect.Dx() {
		if a := img.RGBAAt(x, y).A; a > 0 {
			if first < 0 {
				first = x
			}
			last = x
			if a == 255 {
				solid++
			}
		}
	}
	return first, last, solid
}

func TestBarsStandOnOneZeroLine(t *testing.T) {
	b := newBench(t, benchDesign)
	l := NewWireList(b.Desk)
	b.show(l, 1000, 300)
	b.answer(map[string]float64{"L1": 93, "L2": 88, "L10": 40}, nil)
	bars := &wireBars{list: l, first: 0, last: 4}
	for _, scale := range []int{1, 2} {
		w, h := int(l.layout.barWide)*scale, 4*int(l.layout.rowHeight)*scale
		img := bars.draw(w, h).(*image.RGBA)
		zero := int(l.zero() * float64(w))
		row := func(i int) int { return h * (2*i + 1) / 8 }
		over0, over1, solid := barInk(img, row(0))
		if over0 >= zero || over1 > zero+scale {
			t.Errorf("scale %d: what is over stands from %d to %d, zero is %d", scale, over0, over1, zero)
		}
		if n := over1 - over0 + 1; solid == n || solid < n/4 {
			t.Errorf("scale %d: %d of %d pixels of the bar that is over are solid: it is not hatched", scale, solid, n)
		}
		in0, in1, solid := barInk(img, row(1))
		if in0 < zero-scale || in1 <= zero || solid != in1-in0+1 {
			t.Errorf("scale %d: what is within stands from %d to %d, %d solid, zero is %d", scale, in0, in1, solid, zero)
		}
		if _, far, _ := barInk(img, row(2)); far <= in1 || far >= w {
			t.Errorf("scale %d: the larger margin ends at %d, the smaller at %d of %d", scale, far, in1, w)
		}
		if none, _, _ := barInk(img, row(3)); none >= 0 {
			t.Errorf("scale %d: a row without a margin has a bar", scale)
		}
	}
}
