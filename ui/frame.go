package ui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"
)

// frame lays out the window: sentence, command row, ladder | section | details, wire list, caution. Details fold away in a narrow window; the borders
// of details and list can be dragged.
type frame struct {
	sentence, bar, ladder, section, status, details, list, caution fyne.CanvasObject
	gripSide, gripList                                             *grip
	ladderLine, detailLine                                         fyne.CanvasObject

	detailsWidth float32 // 0: as the window's size suggests
	listHeight   float32
	detailsShown *bool // what the person chose; nil: as the window's width suggests
	size         fyne.Size
}

// Measures of the frame in the toolkit's units.
const (
	wideEnough   = 1180 // from here the details are shown unless folded
	ladderWide   = 216
	ladderNarrow = 178
	detailsLeast = 260
	sectionLeast = 240
	sectionLow   = 150
	listLeast    = 76
	gripSize     = 5
)

// showsDetails tells whether the details are open at the width.
func (f *frame) showsDetails(width float32) bool {
	if f.detailsShown != nil {
		return *f.detailsShown
	}
	return width >= wideEnough
}

// objects lists what the frame lays out, grips on top.
func (f *frame) objects() []fyne.CanvasObject {
	return []fyne.CanvasObject{
		f.sentence, f.ladder, f.section, f.status, f.details, f.list, f.caution, f.ladderLine, f.detailLine,
		f.bar, // over the panes: what the line says hangs down into them
		f.gripSide, f.gripList,
	}
}

// MinSize lets the window become as small as a small screen.
func (f *frame) MinSize([]fyne.CanvasObject) fyne.Size { return fyne.NewSize(760, 480) }

// Layout places everything.
func (f *frame) Layout(_ []fyne.CanvasObject, s fyne.Size) {
	f.size = s
	y := float32(0)
	for _, o := range []fyne.CanvasObject{f.sentence, f.bar} {
		h := heightAt(o, s.Width)
		put(o, 0, y, s.Width, h)
		y += h
	}
	low := heightAt(f.caution, s.Width)
	put(f.caution, 0, s.Height-low, s.Width, low)
	bottom := s.Height - low

	list := f.listHeight
	if list == 0 {
		list = max(110, 0.25*s.Height)
	}
	list = min(max(list, listLeast), max(listLeast, bottom-y-sectionLow))
	put(f.list, 0, bottom-list, s.Width, list)
	f.middle(s.Width, y, bottom-list)
	put(f.gripList, 0, bottom-list-gripSize/2, s.Width, gripSize)
}

// middle places ladder, section and details between two heights.
func (f *frame) middle(width, top, bottom float32) {
	h := bottom - top
	ladder := float32(ladderWide)
	if width < wideEnough {
		ladder = ladderNarrow
	}
	put(f.ladder, 0, top, ladder, h)
	put(f.ladderLine, ladder, top, 1, h)
	right := width
	open := f.showsDetails(width)
	setVisible(open, f.details, f.gripSide, f.detailLine)
	if open {
		side := f.detailsWidth
		if side == 0 {
			side = min(452, max(300, 0.32*width))
		}
		side = min(max(side, detailsLeast), max(detailsLeast, width-ladder-sectionLeast))
		right = width - side
		put(f.details, right+1, top, side-1, h)
		put(f.detailLine, right, top, 1, h)
		put(f.gripSide, right-gripSize/2, top, gripSize, h)
	}
	line := f.status.MinSize().Height
	put(f.section, ladder+1, top, right-ladder-1, h-line)
	put(f.status, ladder+1, bottom-line, right-ladder-1, line)
}

func setVisible(on bool, objects ...fyne.CanvasObject) {
	for _, o := range objects {
		if on {
			o.Show()
		} else {
			o.Hide()
		}
	}
}

func put(o fyne.CanvasObject, x, y, w, h float32) {
	o.Move(fyne.NewPos(x, y))
	o.Resize(fyne.NewSize(max(0, w), max(0, h)))
}

// heightAt returns how tall an object is at a width.
func heightAt(o fyne.CanvasObject, width float32) float32 {
	if t, ok := o.(tallBy); ok {
		return t.heightFor(width)
	}
	return o.MinSize().Height
}

// grip is a border that can be dragged. It shows as a line.
type grip struct {
	widget.BaseWidget
	upright bool
	dragged func(by float32)
	done    func()
	line    *fill
}

var (
	_ fyne.Draggable     = (*grip)(nil)
	_ desktop.Cursorable = (*grip)(nil)
	_ desktop.Hoverable  = (*grip)(nil)
)

func newGrip(upright bool, dragged func(by float32), done func()) *grip {
	g := &grip{upright: upright, dragged: dragged, done: done, line: newFill(theme.ColorNameSeparator)}
	g.ExtendBaseWidget(g)
	return g
}

// Dragged moves the border. The grip moves along, so each step counts from where it is now.
func (g *grip) Dragged(e *fyne.DragEvent) {
	if g.upright {
		g.dragged(e.Position.X - g.Size().Width/2)
		return
	}
	g.dragged(e.Position.Y - g.Size().Height/2)
}

// DragEnd is the end of it.
func (g *grip) DragEnd() { g.done() }

// Cursor tells the direction.
func (g *grip) Cursor() desktop.Cursor {
	if g.upright {
		return desktop.HResizeCursor
	}
	return desktop.VResizeCursor
}

// MouseIn makes the line stand out.
func (g *grip) MouseIn(*desktop.MouseEvent) { g.tint(theme.ColorNamePrimary) }

// MouseMoved is for the toolkit.
func (g *grip) MouseMoved(*desktop.MouseEvent) {}

// MouseOut makes the line quiet again.
func (g *grip) MouseOut() { g.tint(theme.ColorNameSeparator) }

func (g *grip) tint(n fyne.ThemeColorName) { g.line.tint(n) }

// MinSize is nothing: the frame decides.
func (g *grip) MinSize() fyne.Size { return fyne.NewSize(1, 1) }

// CreateRenderer is for the toolkit.
func (g *grip) CreateRenderer() fyne.WidgetRenderer { return &gripRenderer{g} }

type gripRenderer struct{ g *grip }

func (r *gripRenderer) Destroy()                     {}
func (r *gripRenderer) MinSize() fyne.Size           { return r.g.MinSize() }
func (r *gripRenderer) Objects() []fyne.CanvasObject { return []fyne.CanvasObject{r.g.line} }
func (r *gripRenderer) Refresh()                     { r.g.line.Refresh() }

func (r *gripRenderer) Layout(s fyne.Size) {
	if r.g.upright {
		put(r.g.line, s.Width/2, 0, 1, s.Height)
		return
	}
	put(r.g.line, 0, s.Height/2, s.Width, 1)
}
