package ui

import (
	"runtime"
	"testing"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/test"

	"packrise/solver/section"
)

// hand works a canvas the way a person does: button down, several moves, button up.
type hand struct {
	v    *SectionView
	k    *Desk
	l    *loop
	mods fyne.KeyModifier
}

// testView is a canvas of 700 × 500 on a solved design in a test window.
func testView(t *testing.T) (*hand, *SectionView) {
	t.Helper()
	k, l := testDesk(t, testDesign())
	return testViewOn(t, k, l)
}

func testViewOn(t *testing.T, k *Desk, l *loop) (*hand, *SectionView) {
	t.Helper()
	v := NewSectionView(k)
	w := test.NewWindow(v)
	w.SetPadded(false)
	w.Resize(fyne.NewSize(700, 500))
	t.Cleanup(func() { v.Close(); w.Close() })
	l.solved(t, k)
	l.until(t, "the picture", func() bool {
		return v.pic != nil && !v.pic.coarse && v.pic.view == v.camera.view(v.pic.view.W, v.pic.view.H, v.density)
	})
	return &hand{v: v, k: k, l: l}, v
}

// over returns where a place of the section is on the canvas.
func (h *hand) over(p section.Point) fyne.Position { return h.v.camera.toUnits(p, h.v.Size()) }

// on returns where the middle of a part is on the canvas.
func (h *hand) on(t *testing.T, id string) fyne.Position { return h.over(at(t, h.k, id)) }

func (h *hand) event(p fyne.Position, b desktop.MouseButton) *desktop.MouseEvent {
	return &desktop.MouseEvent{PointEvent: fyne.PointEvent{Position: p, AbsolutePosition: p}, Button: b, Modifier: h.mods}
}

func (h *hand) press(p fyne.Position) { h.v.MouseDown(h.event(p, desktop.MouseButtonPrimary)) }

func (h *hand) click(p fyne.Position) {
	h.press(p)
	h.v.MouseUp(h.event(p, desktop.MouseButtonPrimary))
}

// pull moves the pressed pointer in steps, as the driver reports it.
func (h *hand) pull(from, to fyne.Position) {
	const steps = 8
	last := from
	for i := 1; i <= steps; i++ {
		f := float32(i) / steps
		p := fyne.NewPos(from.X+f*(to.X-from.X), from.Y+f*(to.Y-from.Y))
		h.v.Dragged(&fyne.DragEvent{
			PointEvent: fyne.PointEvent{Position: p, AbsolutePosition: p},
			Dragged:    fyne.NewDelta(p.X-last.X, p.Y-last.Y),
		})
		last = p
	}
}

// drag is a whole drag with the main button.
func (h *hand) drag(t *testing.T, from, to fyne.Position) {
	t.Helper()
	h.press(from)
	h.pull(from, to)
	h.v.DragEnd()
	h.v.MouseUp(h.event(to, desktop.MouseButtonPrimary))
	h.l.until(t, "the drop", func() bool { return !h.k.Drafting() })
}

func (h *hand) key(n fyne.KeyName) { h.v.TypedKey(&fyne.KeyEvent{Name: n}) }

func TestWheelZoomsAtThePointer(t *testing.T) {
	h, v := testView(t)
	p := h.on(t, "L3")
	under := v.camera.toMM(p, v.Size())
	for _, dy := range []float32{25, 25, -25, 100, -300} {
		scale := v.camera.scale
		v.Scrolled(&fyne.ScrollEvent{PointEvent: fyne.PointEvent{Position: p}, Scrolled: fyne.NewDelta(0, dy)})
		near(t, "under the pointer", v.camera.toMM(p, v.Size()), under, 1e-4)
		if (dy > 0) != (v.camera.scale > scale) {
			t.Errorf("wheel by %g took the scale from %g to %g", dy, scale, v.camera.scale)
		}
	}
	v.Fit()
	if !v.fitted || v.camera.cx != 0 {
		t.Errorf("Fit looks at %+v", v.camera)
	}
}

func TestViewLeavesNoGoroutines(t *testing.T) {
	before := runtime.NumGoroutine()
	l := newLoop()
	k := NewDeskWith(testCatalog(), testDesign(), l.rooms(Rooms{}))
	v := NewSectionView(k)
	v.Resize(fyne.NewSize(300, 200))
	v.Close()
	k.Close()
	for range 100 {
		if runtime.NumGoroutine() <= before {
			return
		}
		time.Sleep(10 * time.Millisecond)
	}
	t.Errorf("%d goroutines, %d before", runtime.NumGoroutine(), before)
}

// TestWordsWaitForThePicture: whenever answers are told of, within a drag and after it, the picture in sight is of the same answer.
func TestWordsWaitForThePicture(t *testing.T) {
	h, v := testView(t)
	told, drafts := 0, 0
	ladder := NewLadder(h.k)
	h.k.Listen(func(c Changed) {
		if c&ChangedResult == 0 || h.k.Stale() {
			return
		}
		told++
		if h.k.Draft() {
			drafts++
		}
		if v.pic.serial != h.k.answer.serial {
			t.Errorf("the words are of answer %d, the picture of %d", h.k.answer.serial, v.pic.serial)
		}
	})
	from := h.on(t, "L1")
	h.press(from)
	for i := range 12 {
		before := told
		h.v.Dragged(&fyne.DragEvent{PointEvent: fyne.PointEvent{Position: from.AddXY(0, float32(3*i+4))}})
		h.l.until(t, "a frame", func() bool {
			if ladder.Refresh(); ladder.scene.Field != v.pic.scene.Field {
				t.Error("the ladder and the picture show different answers")
			}
			return told > before
		})
	}
	h.v.DragEnd()
	h.v.MouseUp(h.event(from, desktop.MouseButtonPrimary))
	h.l.until(t, "the drop", func() bool { return !h.k.Drafting() })
	h.l.solved(t, h.k)
	if drafts == 0 || told <= drafts {
		t.Errorf("told %d times, %d drafts", told, drafts)
	}
}

// A canvas that has no room for a picture doesn't keep the words waiting.
func TestWordsDoNotWaitForNoPicture(t *testing.T) {
	k, l := testDesk(t, testDesign())
	v := NewSectionView(k)
	t.Cleanup(v.Close)
	told := false
	k.Listen(func(c Changed) { told = told || c&ChangedResult != 0 })
	l.until(t, "an answer", func() bool { return told })
}
