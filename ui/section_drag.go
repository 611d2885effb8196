package ui

import (
	"fmt"
	"math"
	"slices"
	"strings"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"

	"packrise/render"
	"packrise/solver/section"
)

// dragMode is what the pointer's button is doing.
type dragMode int

const (
	dragNothing dragMode = iota
	dragPressed          // the button is down and nothing has moved yet
	dragParts
	dragPan
	dragOver // cancelled: whatever comes until the button is up is ignored
)

// dragState is one press of the button, from down to up.
type dragState struct {
	mode    dragMode
	id      string // pressed on, "" for none
	button  desktop.MouseButton
	shift   bool
	many    bool // pressed on one of several that were selected
	from    fyne.Position
	last    fyne.Position
	gesture int

	parts  []section.Shape // that move, as they stood
	others []disc          // that stay
	room   room
	grab   section.Point // from the pointer to the centre of the first part when the button went down
	want   section.Point // shift that the pointer wants
	held   section.Point // shift of several parts as far as they may
}

const doubleClick = 350 * time.Millisecond

// MouseDown chooses what is pressed.
func (v *SectionView) MouseDown(e *desktop.MouseEvent) {
	v.at = e.Position
	v.takeFocus()
	if v.drag.mode == dragParts || v.drag.mode == dragPan {
		return // a second button
	}
	id := v.partAt(e.Position)
	v.drag = dragState{mode: dragPressed, button: e.Button, from: e.Position, last: e.Position, shift: e.Modifier&fyne.KeyModifierShift != 0}
	if e.Button != desktop.MouseButtonPrimary || v.keys.space {
		v.drag.mode = dragPan
		return
	}
	v.drag.id = id
	switch {
	case id == "":
	case v.drag.shift:
		v.toggle(id)
	case v.desk.Selected(id):
		v.drag.many = len(v.desk.Selection()) > 1
	default:
		v.desk.Select(id)
	}
}

// toggle adds the part to the selection or takes it out.
func (v *SectionView) toggle(id string) {
	chosen := slices.Clone(v.desk.Selection())
	if i := slices.Index(chosen, id); i >= 0 {
		chosen = slices.Delete(chosen, i, i+1)
	} else {
		chosen = append(chosen, id)
	}
	v.desk.Select(chosen...)
}

// MouseUp ends a drag or counts a click.
func (v *SectionView) MouseUp(e *desktop.MouseEvent) {
	if e.Button != v.drag.button {
		return
	}
	if v.drag.mode == dragPressed {
		v.clicked()
	}
	v.release()
}

// clicked is a press and release in one place.
func (v *SectionView) clicked() {
	switch id := v.drag.id; {
	case id == "" && !v.drag.shift:
		v.desk.Select()
	case id != "" && v.drag.many:
		v.desk.Select(id)
	}
	now := v.keys.now()
	if v.drag.id != "" && v.drag.id == v.keys.clickedID && now.Sub(v.keys.clickedAt) < doubleClick && v.OnActivated != nil {
		v.keys.clickedID = ""
		v.OnActivated(v.drag.id)
		return
	}
	v.keys.clickedID, v.keys.clickedAt = v.drag.id, now
}

// Dragged follows the pointer. Positions are taken as they are: adding up the steps would end one short.
func (v *SectionView) Dragged(e *fyne.DragEvent) {
	v.at = e.Position
	if v.drag.mode == dragPressed {
		v.beginDrag()
	}
	switch v.drag.mode {
	case dragPan:
		v.fitted = false
		v.camera = v.camera.panned(e.Position.X-v.drag.last.X, e.Position.Y-v.drag.last.Y)
		v.drag.last = e.Position
		v.repaint()
	case dragParts:
		v.follow(e.Position)
	}
	v.hover()
}

// beginDrag decides between panning and moving parts.
func (v *SectionView) beginDrag() {
	if v.drag.id == "" || v.drag.shift && !v.desk.Selected(v.drag.id) {
		v.drag.mode = dragPan
		return
	}
	shapes := v.desk.writtenShapes()
	moving := topsOf(append([]string{v.drag.id}, v.desk.Selection()...))
	d := &v.drag
	for _, s := range shapes {
		switch {
		case s.ID == "" || s.Depth > 0:
		case slices.Contains(moving, s.ID):
			d.parts = append(d.parts, s)
		case !s.Unset:
			d.others = append(d.others, disc{s.At, s.InnerR()})
		}
	}
	first := slices.IndexFunc(d.parts, func(s section.Shape) bool { return s.ID == moving[0] })
	if first < 0 {
		d.mode = dragPan
		return
	}
	d.parts[0], d.parts[first] = d.parts[first], d.parts[0]
	p := v.camera.toMM(d.from, v.Size())
	d.grab = section.Point{X: d.parts[0].At.X - p.X, Y: d.parts[0].At.Y - p.Y}
	d.room = roomOf(shapes)
	d.gesture = v.desk.NewGesture()
	d.mode = dragParts
}

// topsOf returns the parts of the top level that the ids lie in, each once.
func topsOf(ids []string) []string {
	var tops []string
	for _, id := range ids {
		top, _, _ := strings.Cut(id, "/")
		if !slices.Contains(tops, top) {
			tops = append(tops, top)
		}
	}
	return tops
}

// follow moves the parts towards the pointer.
func (v *SectionView) follow(p fyne.Position) {
	d := &v.drag
	mm, first := v.camera.toMM(p, v.Size()), d.parts[0]
	want := section.Point{X: mm.X + d.grab.X - first.At.X, Y: mm.Y + d.grab.Y - first.At.Y}
	if want == d.want {
		return
	}
	d.want = want
	if len(d.parts) > 1 {
		d.held = heldShift(discsOf(d.parts), d.others, d.room, d.held, want)
	}
	v.desk.Drag(d.edit(v.desk))
	v.placeLines()
}

// edit moves the parts to where the pointer wants them, as far as they may. One part pushes the others away where there is room for that, and is else
// held at the nearest free place.
func (d *dragState) edit(k *Desk) section.Edit {
	e := moveBy(d.parts, d.held, d.gesture)
	if len(d.parts) > 1 {
		return e
	}
	id, want, others, in := d.parts[0].ID, d.wantedDisc(), d.others, d.room
	cat, makeRoom := k.cat, k.rooms.MakeRoom
	want.at = tidied(in.inside(want.at, want.r))
	e.Do = func(base *section.Document) *section.Document {
		if free(want, others, in) {
			return section.Move(base, id, want.at)
		}
		d := section.Move(base, id, want.at)
		if at, ok := makeRoom(d, cat, id); ok {
			return section.PlaceAll(d, at)
		}
		if at, ok := nearestFree(want, others, in); ok {
			return section.Move(base, id, tidied(at))
		}
		return base
	}
	return e
}

func discsOf(shapes []section.Shape) []disc {
	out := make([]disc, len(shapes))
	for i, s := range shapes {
		out[i] = disc{s.At, s.InnerR()}
	}
	return out
}

// A part that is not round counts as the disc within it, so that it can be put anywhere; what then overlaps is marked and said.

// wantedDisc is the first part where the pointer wants it.
func (d *dragState) wantedDisc() disc {
	s := d.parts[0]
	return disc{section.Point{X: s.At.X + d.want.X, Y: s.At.Y + d.want.Y}, s.InnerR()}
}

// moveBy is the edit that moves parts from where they stood.
func moveBy(parts []section.Shape, by section.Point, gesture int) section.Edit {
	at := map[string]section.Point{}
	for _, s := range parts {
		at[s.ID] = tidied(section.Point{X: s.At.X + by.X, Y: s.At.Y + by.Y})
	}
	return section.Edit{
		Name: "move " + someParts(parts), Object: objectOf(parts), Gesture: gesture,
		Do: func(d *section.Document) *section.Document { return section.PlaceAll(d, at) },
	}
}

// tidy rounds millimetres to a tenth of a micrometre.
func tidy(mm float64) float64 { return math.Round(mm*1e4) / 1e4 }

func tidied(p section.Point) section.Point { return section.Point{X: tidy(p.X), Y: tidy(p.Y)} }

func objectOf(parts []section.Shape) string {
	ids := make([]string, len(parts))
	for i, s := range parts {
		ids[i] = s.ID
	}
	return strings.Join(ids, " ")
}

// someParts names parts as they stand behind Undo.
func someParts(parts []section.Shape) string {
	if len(parts) == 1 {
		return parts[0].ID
	}
	return fmt.Sprintf("%d parts", len(parts))
}

// DragEnd ends a drag. The button's release may have come before it or never comes, when the pointer has left the canvas.
func (v *SectionView) DragEnd() { v.release() }

// release leaves the parts where they are.
func (v *SectionView) release() {
	d := v.drag
	v.drag = dragState{}
	if d.mode != dragParts {
		return
	}
	v.placeLines()
	v.desk.Drop(d.edit(v.desk))
	v.repaint()
}

// cancelDrag puts everything back.
func (v *SectionView) cancelDrag() bool {
	if v.drag.mode != dragParts {
		return false
	}
	v.drag = dragState{mode: dragOver, button: v.drag.button}
	v.desk.CancelDraft()
	v.placeLines()
	return true
}

// partAt returns the innermost part under a position, "" for none.
func (v *SectionView) partAt(p fyne.Position) string {
	if v.camera.scale == 0 {
		return ""
	}
	return render.Hit(v.desk.shownShapes(), v.camera.toMM(p, v.Size()))
}

// Scrolled zooms at the pointer; one click of a wheel is ±25.
func (v *SectionView) Scrolled(e *fyne.ScrollEvent) {
	v.at = e.Position
	v.zoomAbout(math.Pow(1.2, float64(e.Scrolled.DY)/25), e.Position)
}
