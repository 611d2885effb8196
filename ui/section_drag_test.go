package ui

import (
	"math"
	"slices"
	"testing"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/theme"

	"packrise/solver/catalog"
	"packrise/solver/section"
)

func TestDragMovesThePart(t *testing.T) {
	h, _ := testView(t)
	from := at(t, h.k, "L1")
	start := h.on(t, "L1").AddXY(3, -4) // not in the middle: the part must not jump
	h.drag(t, start, start.AddXY(20, 40))
	scale := h.v.camera.scale
	near(t, "after the drag", at(t, h.k, "L1"), section.Point{X: from.X + 20/scale, Y: from.Y - 40/scale}, 1e-3)
	if h.k.UndoName() != "move L1" || h.k.Drafting() {
		t.Errorf("undo is called %q", h.k.UndoName())
	}
	if !slices.Equal(h.k.Selection(), []string{"L1"}) {
		t.Errorf("selected %v", h.k.Selection())
	}
	h.l.solved(t, h.k)
	if _, fresh := h.k.Result(); !fresh {
		t.Error("no fresh answer after the drag")
	}
	h.k.Undo()
	if h.k.UndoName() != "" || at(t, h.k, "L1") != from {
		t.Error("one drag must be one step")
	}
}

func TestTemperaturesFollowTheDrag(t *testing.T) {
	h, _ := testView(t)
	r, _ := h.k.Result()
	before := r.Conductors[0].TempC
	start := h.on(t, "L1")
	h.press(start)
	h.pull(start, h.over(section.Point{X: 0, Y: 0}))
	h.l.until(t, "a frame of the drag", func() bool { r2, fresh := h.k.Result(); return fresh && r2 != r })
	r2, _ := h.k.Result()
	if !h.k.Draft() || r2.Conductors[0].TempC == before {
		t.Errorf("draft %v, L1 %g °C before and %g °C within the drag", h.k.Draft(), before, r2.Conductors[0].TempC)
	}
	if shown := h.k.Scene().Shapes[1].At; shown != at(t, h.k, "L1") {
		t.Errorf("the picture has L1 at %v, the document at %v", shown, at(t, h.k, "L1"))
	}
	h.v.DragEnd()
	h.l.solved(t, h.k)
}

// noRoom is a desk where nothing can be pushed away.
func noRoom(t *testing.T) *hand {
	t.Helper()
	none := func(*section.Document, *catalog.Catalog, string) (map[string]section.Point, bool) { return nil, false }
	k, l := testDeskWith(t, testDesign(), Rooms{MakeRoom: none})
	h, _ := testViewOn(t, k, l)
	return h
}

func apartBy(t *testing.T, k *Desk, a, b string) float64 {
	t.Helper()
	p, q := at(t, k, a), at(t, k, b)
	return math.Hypot(p.X-q.X, p.Y-q.Y)
}

func TestDraggedPartIsHeldAtContact(t *testing.T) {
	h := noRoom(t)
	start := h.on(t, "L1")
	h.press(start)
	h.pull(start, h.on(t, "L2").AddXY(-10, 0))
	h.l.until(t, "the last frame", func() bool { return !h.k.Solving() })
	if d := apartBy(t, h.k, "L1", "L2"); d < 4-1e-3 || d > 4+1e-2 {
		t.Errorf("held %g mm from L2, want touching at 4 mm", d)
	}
	h.v.placeLines()
	if !h.v.wanted.Visible() || h.v.wanted.StrokeColor != themeColor(theme.ColorNameError) {
		t.Error("an impossible place isn't shown as one")
	}
	h.pull(h.on(t, "L2"), h.over(section.Point{X: 40, Y: 0})) // out of the jacket
	h.l.until(t, "the last frame", func() bool { return !h.k.Solving() })
	if p := at(t, h.k, "L1"); math.Hypot(p.X, p.Y) > 8 {
		t.Errorf("dragged through the jacket to %v", p)
	}
	h.key(fyne.KeyEscape)
	if h.v.wanted.Visible() {
		t.Error("the ring stays after Escape")
	}
}

func TestDragPushesOthersAway(t *testing.T) {
	h, _ := testView(t)
	start, target := h.on(t, "L1"), section.Point{X: 3.2, Y: 0}
	h.press(start)
	h.pull(start, h.over(target))
	h.l.until(t, "the last frame", func() bool { return !h.k.Solving() })
	near(t, "L1 within the drag", at(t, h.k, "L1"), target, 0.05)
	if l2 := at(t, h.k, "L2"); l2.X <= 4 || apartBy(t, h.k, "L1", "L2") < 4-2e-3 {
		t.Errorf("L2 was not pushed away: %v", l2)
	}
	h.pull(h.over(target), start.AddXY(-2, 0)) // back again: nothing stays pushed
	h.l.until(t, "the last frame", func() bool { return !h.k.Solving() })
	if l2 := at(t, h.k, "L2"); l2 != (section.Point{X: 4}) {
		t.Errorf("L2 stays pushed at %v", l2)
	}
	h.pull(start, h.over(target))
	h.v.DragEnd()
	h.l.until(t, "the drop", func() bool { return !h.k.Drafting() })
	near(t, "L1 stays where it was dropped", at(t, h.k, "L1"), target, 0.05)
	if l2 := at(t, h.k, "L2"); l2.X <= 4 {
		t.Errorf("after the drop L2 is at %v", l2)
	}
	h.l.solved(t, h.k)
	h.k.Undo()
	if at(t, h.k, "L1").X != -4 || at(t, h.k, "L2").X != 4 || h.k.UndoName() != "" {
		t.Error("drag and room must be one step")
	}
}

func TestNoRoomLeavesThePartAtContact(t *testing.T) {
	h := noRoom(t)
	h.drag(t, h.on(t, "L1"), h.on(t, "L2"))
	if d := apartBy(t, h.k, "L1", "L2"); d < 4-1e-3 || h.k.UndoName() != "move L1" {
		t.Errorf("%g mm apart, undo %q", d, h.k.UndoName())
	}
}

func TestEscapeCancelsADrag(t *testing.T) {
	h, _ := testView(t)
	start := h.on(t, "L1")
	h.press(start)
	h.pull(start, start.AddXY(30, 0))
	h.key(fyne.KeyEscape)
	h.pull(start.AddXY(30, 0), start.AddXY(60, 0)) // the button is still down
	h.v.DragEnd()
	h.v.MouseUp(h.event(start, desktop.MouseButtonPrimary))
	if at(t, h.k, "L1").X != -4 || h.k.Dirty() || h.k.UndoName() != "" || h.k.RedoName() != "" {
		t.Errorf("L1 at %v, undo %q, redo %q", at(t, h.k, "L1"), h.k.UndoName(), h.k.RedoName())
	}
	if h.v.wanted.Visible() {
		t.Error("the ring of the drag is still there")
	}
	h.drag(t, start, start.AddXY(10, 0)) // and the next drag works
	if h.k.UndoName() != "move L1" {
		t.Error("no drag after a cancelled one")
	}
}

func TestSeveralPartsMoveTogether(t *testing.T) {
	h, _ := testView(t)
	h.k.Select("L1", "L3")
	start := h.on(t, "L1")
	h.drag(t, start, start.AddXY(-10, 10))
	scale := h.v.camera.scale
	near(t, "L1", at(t, h.k, "L1"), section.Point{X: -4 - 10/scale, Y: -10 / scale}, 1e-3)
	near(t, "L3", at(t, h.k, "L3"), section.Point{X: -10 / scale, Y: 5 - 10/scale}, 1e-3)
	if h.k.UndoName() != "move 2 parts" || len(h.k.Selection()) != 2 {
		t.Errorf("undo %q, selected %v", h.k.UndoName(), h.k.Selection())
	}
}

func TestClicksSelect(t *testing.T) {
	h, _ := testView(t)
	h.click(h.on(t, "L1"))
	if !slices.Equal(h.k.Selection(), []string{"L1"}) {
		t.Errorf("selected %v", h.k.Selection())
	}
	h.mods = fyne.KeyModifierShift
	h.click(h.on(t, "L2"))
	if !slices.Equal(h.k.Selection(), []string{"L1", "L2"}) {
		t.Errorf("Shift adds: %v", h.k.Selection())
	}
	h.click(h.on(t, "L1"))
	if !slices.Equal(h.k.Selection(), []string{"L2"}) {
		t.Errorf("Shift takes out: %v", h.k.Selection())
	}
	h.mods = 0
	h.k.Select("L1", "L2")
	h.click(h.on(t, "L2"))
	if !slices.Equal(h.k.Selection(), []string{"L2"}) {
		t.Errorf("a click on one of several: %v", h.k.Selection())
	}
	h.click(h.over(section.Point{X: 0, Y: 0}))
	if len(h.k.Selection()) != 0 {
		t.Errorf("a click beside the parts: %v", h.k.Selection())
	}
	if h.k.UndoName() != "" {
		t.Error("clicks are no steps")
	}
}

func TestDoubleClickActivates(t *testing.T) {
	h, v := testView(t)
	now := time.Unix(1000, 0)
	v.keys.clock = func() time.Time { return now }
	var opened []string
	v.OnActivated = func(id string) { opened = append(opened, id) }
	h.click(h.on(t, "L1"))
	now = now.Add(2 * doubleClick)
	h.click(h.on(t, "L1"))
	if len(opened) != 0 {
		t.Error("two slow clicks are no double click")
	}
	now = now.Add(doubleClick / 2)
	h.click(h.on(t, "L1"))
	h.click(h.on(t, "L2"))
	if !slices.Equal(opened, []string{"L1"}) {
		t.Errorf("opened %v", opened)
	}
}

func TestDragBesideThePartsPans(t *testing.T) {
	h, v := testView(t)
	p := fyne.NewPos(5, 5)
	under := v.camera.toMM(p, v.Size())
	h.drag(t, p, p.AddXY(40, 30))
	near(t, "moved along", v.camera.toMM(p.AddXY(40, 30), v.Size()), under, 1e-3)
	if h.k.Dirty() {
		t.Error("panning changed the document")
	}
	was := v.camera
	h.v.MouseDown(h.event(h.on(t, "L1"), desktop.MouseButtonTertiary))
	h.pull(h.on(t, "L1"), h.on(t, "L1").AddXY(20, 0))
	h.v.DragEnd()
	if v.camera == was || h.k.Dirty() {
		t.Error("the middle button must pan, over a part too")
	}
	v.KeyDown(&fyne.KeyEvent{Name: fyne.KeySpace})
	was = v.camera
	h.drag(t, h.on(t, "L1"), h.on(t, "L1").AddXY(20, 0))
	if v.camera == was || h.k.Dirty() {
		t.Error("Space must pan, over a part too")
	}
}
