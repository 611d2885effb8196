package ui

import (
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/canvas"
	"fyne.io/fyne/v2/theme"
)

// wireTip is a small box of text beside a cell. It is drawn with the rows and takes nothing from the pointer.
type wireTip struct {
	box   *canvas.Rectangle
	lines []*canvas.Text
}

func newWireTip() *wireTip { return &wireTip{box: canvas.NewRectangle(nil)} }

// wireWindow is what can be seen of the rows.
type wireWindow struct{ top, bottom, right float32 }

// wireTipWidth is the width at which a tip's text wraps.
const wireTipWidth = 360

// show puts the text below the cell, or above it where there is no room below.
func (t *wireTip) show(text string, wrong bool, cell fyne.Position, size fyne.Size, in wireWindow) []fyne.CanvasObject {
	ink := themeColor(theme.ColorNameForeground)
	if wrong {
		ink = themeColor(theme.ColorNameError)
	}
	t.box.FillColor, t.box.StrokeColor, t.box.StrokeWidth = themeColor(theme.ColorNameOverlayBackground), themeColor(theme.ColorNameInputBorder), 1
	t.box.CornerRadius = 3
	const pad = 6
	small := max(12, theme.CaptionTextSize())
	wide, high := float32(0), float32(0)
	words := tipLines(text, small, min(wireTipWidth, in.right-2*pad))
	for len(t.lines) < len(words) {
		t.lines = append(t.lines, &canvas.Text{})
	}
	for i, w := range words {
		t.lines[i].Text, t.lines[i].TextSize, t.lines[i].Color = w, small, ink
		s := t.lines[i].MinSize()
		wide, high = max(wide, s.Width), s.Height
	}
	tall := high*float32(len(words)) + pad
	at := fyne.NewPos(max(0, min(cell.X, in.right-wide-2*pad)), cell.Y+size.Height+2)
	if at.Y+tall > in.bottom && cell.Y-tall-2 >= in.top {
		at.Y = cell.Y - tall - 2
	}
	t.box.Move(at)
	t.box.Resize(fyne.NewSize(wide+2*pad, tall))
	out := []fyne.CanvasObject{t.box}
	for i := range words {
		t.lines[i].Move(at.AddXY(pad, pad/2+float32(i)*high))
		t.lines[i].Resize(t.lines[i].MinSize())
		out = append(out, t.lines[i])
	}
	return out
}

// tipLines breaks a text into lines of a width, at spaces.
func tipLines(text string, size, width float32) []string {
	var lines []string
	line := ""
	for _, w := range strings.Fields(text) {
		next := strings.TrimSpace(line + " " + w)
		if line != "" && textExtent(next, size, fyne.TextStyle{}).Width > width {
			lines = append(lines, line)
			next = w
		}
		line = next
	}
	return append(lines, line)
}
