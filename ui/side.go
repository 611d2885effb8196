package ui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"
)

// side is what stands at the right of the section: the details and, below them or in their place where there is no room for both, the pane with
// the answer to what was asked.
type side struct {
	widget.BaseWidget
	details *Details
	pane    *askPane
}

func newSide(d *Details, p *askPane) *side {
	s := &side{details: d, pane: p}
	p.Hide()
	s.ExtendBaseWidget(s)
	return s
}

// FocusFirst puts the keyboard into the details; a pane that hides them goes.
func (s *side) FocusFirst() {
	if s.pane.Visible() && s.Size().Height < sideBoth {
		s.pane.close()
	}
	s.details.FocusFirst()
}

// sideBoth is the height from which details and pane stand one above the other.
const sideBoth = 400

// MinSize is small: both scroll.
func (s *side) MinSize() fyne.Size { return fyne.NewSize(200, 80) }

// CreateRenderer is for the toolkit.
func (s *side) CreateRenderer() fyne.WidgetRenderer {
	return widget.NewSimpleRenderer(&fyne.Container{Layout: sideLayout{s}, Objects: []fyne.CanvasObject{s.details, s.pane}})
}

type sideLayout struct{ s *side }

func (l sideLayout) MinSize([]fyne.CanvasObject) fyne.Size { return l.s.MinSize() }

func (l sideLayout) Layout(_ []fyne.CanvasObject, s fyne.Size) {
	d, p := l.s.details, l.s.pane
	top := s.Height
	if p.Visible() {
		if top = 0; s.Height >= sideBoth {
			top = max(150, 0.42*s.Height)
		}
		put(p, 0, top, s.Width, s.Height-top)
	}
	setVisible(top > 0, d)
	if top > 0 {
		put(d, 0, 0, s.Width, top)
	}
}

// askPane is a list of answers under a title, with its own scroll. What it shows follows the desk as its owner says.
type askPane struct {
	widget.BaseWidget
	title  *prose
	shut   *widget.Button
	again  *widget.Button
	bar    *widget.ProgressBar
	stop   *widget.Button
	column *fyne.Container
	scroll *container.Scroll
	line   *fill
	head   *fyne.Container
	wait   *fyne.Container
	onShut func()
}

func newAskPane(k *Desk, onShut func()) *askPane {
	p := &askPane{title: newProse(k), bar: widget.NewProgressBar(), line: newFill(theme.ColorNameSeparator), onShut: onShut}
	p.shut = widget.NewButton("Close", p.close)
	p.again = widget.NewButton("Ask again", func() {})
	p.stop = widget.NewButton("Cancel", func() {})
	p.column = &fyne.Container{Layout: &fieldColumn{gap: 4, margin: detailsEdge}}
	p.scroll = container.NewVScroll(p.column)
	p.wait = container.NewBorder(nil, nil, nil, p.stop, p.bar)
	p.head = container.NewBorder(nil, nil, nil, container.NewHBox(p.again, p.shut), container.New(titleLine{}, p.title))
	p.ExtendBaseWidget(p)
	return p
}

// titleLine centres one line of prose.
type titleLine struct{}

// MinSize is small: the title wraps.
func (titleLine) MinSize([]fyne.CanvasObject) fyne.Size { return fyne.NewSize(60, 20) }

// Layout centres it.
func (titleLine) Layout(o []fyne.CanvasObject, s fyne.Size) {
	h := o[0].(*prose).heightFor(s.Width - detailsEdge)
	put(o[0], detailsEdge, max(0, (s.Height-h)/2), s.Width-detailsEdge, h)
}

// close puts the pane away.
func (p *askPane) close() {
	if p.onShut != nil {
		p.onShut()
	}
}

// waiting shows how far it is, with a way to stop.
func (p *askPane) waiting(on bool, cancel func()) {
	p.stop.OnTapped = cancel
	p.bar.SetValue(0)
	setVisible(on, p.wait)
	p.Refresh()
}

// show fills the pane. again is what the button does that asks anew, nil: there is none.
func (p *askPane) show(title string, again func(), rows ...fyne.CanvasObject) {
	p.title.say(run{text: title, tone: strong})
	p.again.OnTapped = again
	setVisible(again != nil, p.again)
	p.column.Objects = rows
	p.column.Layout.Layout(rows, fyne.NewSize(p.scroll.Size().Width, 0))
	p.column.Refresh()
	p.scroll.ScrollToTop()
	p.scroll.Refresh()
	p.head.Refresh()
	p.Refresh()
}

// MinSize is small: the pane scrolls.
func (p *askPane) MinSize() fyne.Size {
	p.ExtendBaseWidget(p)
	return fyne.NewSize(200, 80)
}

// CreateRenderer is for the toolkit.
func (p *askPane) CreateRenderer() fyne.WidgetRenderer {
	return widget.NewSimpleRenderer(&fyne.Container{Layout: askPaneLayout{p}, Objects: []fyne.CanvasObject{p.line, p.head, p.wait, p.scroll}})
}

type askPaneLayout struct{ p *askPane }

func (l askPaneLayout) MinSize([]fyne.CanvasObject) fyne.Size { return l.p.MinSize() }

func (l askPaneLayout) Layout(_ []fyne.CanvasObject, s fyne.Size) {
	p := l.p
	put(p.line, 0, 0, s.Width, 1)
	y := float32(4)
	h := p.head.MinSize().Height
	put(p.head, 0, y, s.Width-6, h)
	y += h + 2
	if p.wait.Visible() {
		h = p.wait.MinSize().Height
		put(p.wait, detailsEdge, y, s.Width-detailsEdge-6, h)
		y += h + 2
	}
	put(p.scroll, 0, y, s.Width, s.Height-y)
}

// revealIn scrolls an object of a scroll's content into sight.
func revealIn(scroll *container.Scroll, o fyne.CanvasObject) {
	top, bottom, at := o.Position().Y, o.Position().Y+o.Size().Height, scroll.Offset
	switch seen := scroll.Size().Height; {
	case top < at.Y:
		at.Y = max(0, top-proseLeading)
	case bottom > at.Y+seen:
		at.Y = bottom - seen + proseLeading
	}
	scroll.ScrollToOffset(at)
}
