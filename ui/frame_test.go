package ui

import (
	"testing"

	"fyne.io/fyne/v2"
)

func TestFrameFitsSmallWindows(t *testing.T) {
	for _, size := range []fyne.Size{fyne.NewSize(1024, 640), fyne.NewSize(760, 480), fyne.NewSize(1400, 875), fyne.NewSize(1920, 1080)} {
		w, _ := testWindow(t, testDesign(), size)
		w.frame.Layout(nil, size)
		if open := w.frame.details.Visible(); open != (size.Width >= wideEnough) {
			t.Errorf("%v: details are open %v", size, open)
		}
		w.focusDetails()
		inner := w.win.Canvas().Size()
		for _, o := range w.frame.objects() {
			p, s := o.Position(), o.Size()
			if o.Visible() && (p.X < 0 || p.Y < 0 || p.X+s.Width > inner.Width+3 || p.Y+s.Height > inner.Height+3) {
				t.Errorf("%v: %T at %v of size %v is out of %v", size, o, p, s, inner)
			}
		}
		if s := w.view.Size(); s.Width < sectionLeast-1 || s.Height < 60 {
			t.Errorf("%v: the section is left with %v", size, s)
		}
	}
}
