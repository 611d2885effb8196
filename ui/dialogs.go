package ui

import (
	"fmt"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/dialog"
	"fyne.io/fyne/v2/widget"

	"packrise/solver/rating"
	"packrise/solver/section"
)

// answerOf is a button of a question.
type answerOf struct {
	label string
	then  func()
}

// show opens a dialog in place of the one that is open, no larger than the window.
func (w *Window) show(d dialog.Dialog, size fyne.Size) {
	if w.dialog != nil {
		w.dialog.Hide()
	}
	w.dialog = d
	w.closing(d, nil)
	room := w.win.Canvas().Size()
	d.Resize(fyne.NewSize(min(size.Width, room.Width-40), min(size.Height, room.Height-40)))
	d.Show()
}

// closing calls then when the dialog is closed.
func (w *Window) closing(d dialog.Dialog, then func()) {
	d.SetOnClosed(func() {
		if w.dialog == d {
			w.dialog = nil
		}
		if then != nil {
			then()
		}
	})
}

// hide closes the dialog that is open.
func (w *Window) hide() {
	if w.dialog != nil {
		w.dialog.Hide()
		w.dialog = nil
	}
}

// wrapped is text that wraps and can be scrolled.
func wrapped(text string) (*widget.Label, fyne.CanvasObject) {
	l := widget.NewLabel(text)
	l.Wrapping = fyne.TextWrapWord
	return l, container.NewVScroll(l)
}

// ask puts a question with its answers, and Cancel.
func (w *Window) ask(title, text string, answers ...answerOf) {
	w.askOr("Cancel", title, text, answers...)
}

// askOr is ask with another word for changing nothing.
func (w *Window) askOr(stay, title, text string, answers ...answerOf) {
	_, body := wrapped(text)
	d := dialog.NewCustomWithoutButtons(title, body, w.win)
	buttons := []fyne.CanvasObject{widget.NewButton(stay, w.hide)}
	for i, a := range answers {
		b := widget.NewButton(a.label, func() {
			w.hide()
			a.then()
		})
		if i == 0 {
			b.Importance = widget.HighImportance
		}
		buttons = append(buttons, b)
	}
	d.SetButtons(buttons)
	w.show(d, fyne.NewSize(480, 190))
}

// showMessage says something that has to be read.
func (w *Window) showMessage(title, text string) {
	_, body := wrapped(text)
	w.show(dialog.NewCustom(title, "Close", body, w.win), fyne.NewSize(520, 220))
}

const mostProblems = 50

// showProblemList lists what is wrong with a file, a line each.
func (w *Window) showProblemList(title, file string, problems []section.Problem) {
	_, body := wrapped(problemList(file, problems))
	w.show(dialog.NewCustom(title, "Close", body, w.win), fyne.NewSize(760, 460))
}

// problemList writes at most mostProblems problems, with file and line where there is one.
func problemList(file string, problems []section.Problem) string {
	var lines []string
	for i, p := range problems {
		if i == mostProblems {
			lines = append(lines, fmt.Sprintf("… and %d more.", len(problems)-mostProblems))
			break
		}
		s := upperFirst(p.Sentence()) + "."
		if file != "" {
			s = p.At(file) + "."
		}
		if p.Severity == section.Warned {
			s += " (It can be solved as it is.)"
		}
		lines = append(lines, s)
	}
	return strings.Join(lines, "\n\n")
}

// showProblems lists what is wrong with the section, and what is assumed or left out.
func (w *Window) showProblems() {
	var blocks []string
	if problems := w.desk.Problems(); len(problems) > 0 {
		blocks = append(blocks, problemList("", problems))
	}
	if r, fresh := w.desk.Result(); fresh && len(r.Notes) > 0 {
		blocks = append(blocks, "Assumed or left out:\n\n"+strings.Join(r.Notes, "\n\n"))
	}
	if len(blocks) == 0 {
		blocks = []string{"Nothing is wrong with the section, and nothing is noted."}
	}
	_, body := wrapped(strings.Join(blocks, "\n\n"))
	w.show(dialog.NewCustom("Problems and notes", "Close", body, w.win), fyne.NewSize(760, 460))
}

// showKeyboard is the sheet of shortcuts, made from the menus and from what the canvas understands.
func (w *Window) showKeyboard() {
	grid := container.NewGridWithColumns(2)
	add := func(key, what string) {
		k := widget.NewLabelWithStyle(key, fyne.TextAlignLeading, fyne.TextStyle{Bold: true})
		grid.Add(k)
		grid.Add(widget.NewLabel(what))
	}
	for _, top := range w.menu.main.Items {
		for _, i := range top.Items {
			if key := shortcutText(i.Shortcut); key != "" {
				add(key, top.Label+": "+strings.TrimSuffix(i.Label, " …"))
			}
		}
	}
	for _, k := range canvasKeys {
		add(k[0], k[1])
	}
	w.show(dialog.NewCustom("Keyboard", "Close", container.NewVScroll(grid), w.win), fyne.NewSize(620, 560))
}

// canvasKeys are the keys of the section.
var canvasKeys = [][2]string{
	{"Tab, Shift+Tab", "Next part, part before"},
	{"Arrows", "Shift the selected parts by 0.1 mm"},
	{"Shift+arrows", "Shift them by 1 mm"},
	{"Escape", "Cancel a drag; select nothing"},
	{"Delete", "Take the selected parts out"},
	{"Enter, double click", "Edit the part in the details"},
	{"Click, Shift+click", "Select a part; add it or take it out"},
	{"Wheel, + and −", "Zoom at the pointer"},
	{"Drag beside the parts, middle button, Space+drag", "Shift the view"},
	{"Home", "Show everything"},
}

// shortcutText writes a shortcut as it is on the keys.
func shortcutText(s fyne.Shortcut) string {
	k, ok := s.(fyne.KeyboardShortcut)
	if !ok {
		return ""
	}
	var out string
	for _, m := range []struct {
		mod  fyne.KeyModifier
		name string
	}{{fyne.KeyModifierControl, "Ctrl+"}, {fyne.KeyModifierAlt, "Alt+"}, {fyne.KeyModifierShift, "Shift+"}} {
		if k.Mod()&m.mod != 0 {
			out += m.name
		}
	}
	name := string(k.Key())
	if k.Key() == fyne.KeyReturn {
		name = "Enter"
	}
	return out + name
}

// showAbout says what the program is, and the caution.
func (w *Window) showAbout() {
	text := "Packrise " + w.version + "\n\n" +
		"How hot does each run of a packed section get, which one governs, and by how much?\n\n" + rating.Caution + "\n\nBSD 3-Clause licence."
	_, body := wrapped(text)
	w.show(dialog.NewCustom("About", "Close", body, w.win), fyne.NewSize(560, 330))
}
