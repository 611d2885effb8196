package ui

import (
	"image"
	"image/color"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/driver/desktop"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"

	"packrise/render"
	"packrise/solver/section"
)

// SectionView is the section, to scale, where parts are pointed at, chosen and dragged. The picture is one raster that is painted beside the window;
// over it lie only the few lines that must follow the pointer at once.
type SectionView struct {
	widget.BaseWidget

	// OnActivated is called for a double click on a part.
	OnActivated func(id string)
	// OnPainted is called when another picture has come.
	OnPainted func()
	// OnKey is called for keys that the canvas has no use for.
	OnKey func(*fyne.KeyEvent)

	desk    *Desk
	painter *painter

	camera     camera
	fitted     bool // the camera follows the size of the window and of the section
	isotherms  bool
	flow       bool
	density    float64 // pixels a unit, as the raster was last asked for
	pic        *picture
	stretched  *image.RGBA // pic as the camera sees it now
	stretchedV render.View

	raster *canvas.Raster
	wanted *canvas.Circle // where the pointer wants the part that it drags
	ghost  *ghost
	hint   *readout

	drag    dragState
	keys    keyState
	focused bool
	over    bool          // the pointer is over the canvas
	at      fyne.Position // of the pointer
}

var (
	_ fyne.Focusable     = (*SectionView)(nil)
	_ fyne.Tabbable      = (*SectionView)(nil)
	_ fyne.Draggable     = (*SectionView)(nil)
	_ fyne.Scrollable    = (*SectionView)(nil)
	_ desktop.Keyable    = (*SectionView)(nil)
	_ desktop.Mouseable  = (*SectionView)(nil)
	_ desktop.Hoverable  = (*SectionView)(nil)
	_ desktop.Cursorable = (*SectionView)(nil)
)

// NewSectionView shows the desk's section.
func NewSectionView(k *Desk) *SectionView {
	v := &SectionView{desk: k, fitted: true, isotherms: true, density: 1}
	v.raster = canvas.NewRaster(v.draw)
	v.wanted = canvas.NewCircle(color.Transparent)
	v.wanted.StrokeWidth = 1.5
	v.wanted.Hide()
	v.hint = newReadout()
	v.ghost = newGhost(v)
	v.painter = newPainter(k.rooms.Hop, v.show)
	v.ExtendBaseWidget(v)
	k.picture = v.changed
	return v
}

// Close ends the painting and waits for it.
func (v *SectionView) Close() { v.painter.close() }

// changed repaints, and tells whether a picture will come. Hints and lines follow the document.
func (v *SectionView) changed(c Changed) bool {
	if c&ChangedFile != 0 && c&ChangedDocument != 0 { // another design
		v.cancelDrag()
		v.fitted = true
	}
	asked := v.repaint()
	v.hover()
	return asked
}

// Fit shows everything, and keeps showing everything when sizes change.
func (v *SectionView) Fit() {
	v.fitted = true
	v.repaint()
}

// Zoom magnifies about the middle, or about the pointer where it is over the canvas.
func (v *SectionView) Zoom(factor float64) {
	about := fyne.NewPos(v.Size().Width/2, v.Size().Height/2)
	if v.over {
		about = v.at
	}
	v.zoomAbout(factor, about)
}

func (v *SectionView) zoomAbout(factor float64, about fyne.Position) {
	if v.camera.scale == 0 {
		return
	}
	v.fitted = false
	v.camera = v.camera.zoomed(factor, about, v.Size())
	v.repaint()
	v.hover()
}

// SetIsotherms shows or hides the lines of equal temperature.
func (v *SectionView) SetIsotherms(on bool) {
	v.isotherms = on
	v.repaint()
}

// Isotherms tells whether the lines of equal temperature are shown.
func (v *SectionView) Isotherms() bool { return v.isotherms }

// SetFlow shows or hides the heat-flow lines.
func (v *SectionView) SetFlow(on bool) {
	v.flow = on
	v.repaint()
}

// Flow tells whether the heat-flow lines are shown.
func (v *SectionView) Flow() bool { return v.flow }

// pixels returns the size of the picture in device pixels.
func (v *SectionView) pixels() (w, h int) {
	return int(float64(v.Size().Width)*v.density + 0.5), int(float64(v.Size().Height)*v.density + 0.5)
}

// look returns what the camera sees in device pixels; it moves a fitted camera first.
func (v *SectionView) look(shapes []section.Shape) render.View {
	w, h := v.pixels()
	if (v.fitted && v.drag.mode == dragNothing || v.camera.scale == 0) && len(shapes) > 0 {
		v.camera = cameraOf(render.FitView(shapes, w, h, v.style()), v.density)
	}
	return v.camera.view(w, h, v.density)
}

func (v *SectionView) style() render.Style {
	return render.Style{Dark: themeDark(), Scale: v.density}
}

// repaint asks for a new picture, a quick one first, and shows the old one as the camera sees it until then. It is false while there is no room
// for one.
func (v *SectionView) repaint() bool {
	view, ok := v.ask(true)
	if !ok {
		return false
	}
	v.placeLines()
	v.ghost.follow()
	if v.pic == nil || v.pic.view != view {
		v.raster.Refresh()
	}
	return true
}

// ask wants the picture of the scene as it is; ok is false while there is no room for one.
func (v *SectionView) ask(coarse bool) (view render.View, ok bool) {
	w, h := v.pixels()
	if w < 2 || h < 2 {
		return view, false
	}
	scene := v.desk.Scene()
	view = v.look(scene.Shapes)
	if view.PxPerMM <= 0 {
		return view, false
	}
	v.painter.ask(sheet{
		scene: scene, scale: render.ScaleOf(scene), view: view, style: v.style(), paper: themeColor(theme.ColorNameBackground),
		coarse: coarse, isotherms: v.isotherms, flow: v.flow, serial: v.desk.answer.serial,
	})
	return view, true
}

// show takes a finished picture. Outside a drag the whole heat map follows a quick one.
func (v *SectionView) show(p *picture) {
	if v.desk.closed {
		return
	}
	v.pic, v.stretched = p, nil
	v.raster.Refresh()
	v.hover()
	if p.coarse && v.drag.mode != dragParts {
		v.ask(false)
	}
	if v.OnPainted != nil {
		v.OnPainted()
	}
	v.desk.painted(p.serial)
}

// draw is the raster's generator: it only hands out pictures that are there.
func (v *SectionView) draw(w, h int) image.Image {
	if width := float64(v.Size().Width); width > 0 {
		if d := float64(w) / width; d > 0 && (d < v.density*0.99 || d > v.density*1.01) {
			v.density = d
			v.repaint()
		}
	}
	paper := themeColor(theme.ColorNameBackground)
	view := v.camera.view(w, h, v.density)
	switch {
	case v.pic == nil || view.PxPerMM <= 0:
		return image.NewUniform(paper)
	case v.pic.view == view:
		return v.pic.img
	case v.stretched == nil || v.stretchedV != view:
		v.stretched, v.stretchedV = v.pic.seenFrom(view, paper), view
	}
	return v.stretched
}

// Cursor tells what the pointer would do.
func (v *SectionView) Cursor() desktop.Cursor {
	switch {
	case v.drag.mode == dragPan || v.keys.space:
		return desktop.PointerCursor
	case v.desk.Pointed() != "":
		return desktop.PointerCursor
	}
	return desktop.DefaultCursor
}

// CreateRenderer is for the toolkit.
func (v *SectionView) CreateRenderer() fyne.WidgetRenderer { return &sectionRenderer{v} }

type sectionRenderer struct{ v *SectionView }

func (r *sectionRenderer) Destroy()           {}
func (r *sectionRenderer) MinSize() fyne.Size { return fyne.NewSize(160, 120) }

func (r *sectionRenderer) Layout(s fyne.Size) {
	r.v.raster.Resize(s)
	r.v.repaint()
}

func (r *sectionRenderer) Objects() []fyne.CanvasObject {
	v := r.v
	return append([]fyne.CanvasObject{v.raster, v.ghost.raster, v.wanted}, v.hint.objects()...)
}

func (r *sectionRenderer) Refresh() {
	r.v.repaint()
	r.v.raster.Refresh()
}
