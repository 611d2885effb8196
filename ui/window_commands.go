package ui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"

	"packrise/solver/section"
)

// shortcuts are the keys that no menu item can have: those without a modifier, and the second key for Redo.
func (w *Window) shortcuts() {
	c := w.win.Canvas()
	c.AddShortcut(&desktop.CustomShortcut{KeyName: fyne.KeyZ, Modifier: fyne.KeyModifierControl | fyne.KeyModifierShift}, func(fyne.Shortcut) { w.redo() })
	c.AddShortcut(&desktop.CustomShortcut{KeyName: fyne.KeyEqual, Modifier: fyne.KeyModifierControl}, func(fyne.Shortcut) { w.view.Zoom(zoomStep) })
	c.SetOnTypedKey(func(e *fyne.KeyEvent) {
		switch {
		case w.dialog != nil:
			if e.Name == fyne.KeyEscape {
				w.hide()
			}
		case e.Name != fyne.KeyTab:
			w.view.TypedKey(e)
		}
	})
	w.view.OnKey = func(e *fyne.KeyEvent) {
		if e.Name == fyne.KeyF1 {
			w.showKeyboard()
		}
	}
}

// typing returns the text field that has the keyboard and a text of its own that is not entered yet: undo and redo are its own then.
func (w *Window) typing() interface {
	Undo()
	Redo()
} {
	switch f := w.win.Canvas().Focused().(type) {
	case *fieldEntry:
		if f.Text != f.in.text {
			return f
		}
	case *putEntry:
		if f.Text != "" {
			return f
		}
	case interface {
		Undo()
		Redo()
	}:
		return f
	}
	return nil
}

// undo takes back what was typed into the field that has the keyboard, else the last step.
func (w *Window) undo() {
	if f := w.typing(); f != nil {
		f.Undo()
		return
	}
	w.desk.Undo()
}

func (w *Window) redo() {
	if f := w.typing(); f != nil {
		f.Redo()
		return
	}
	w.desk.Redo()
}

func (w *Window) selectAll() {
	if f, ok := w.win.Canvas().Focused().(fyne.Shortcutable); ok {
		f.TypedShortcut(&fyne.ShortcutSelectAll{})
		return
	}
	w.desk.SelectAll()
}

func (w *Window) settle() {
	if d := w.desk.Document(); d.Holder.Kind == section.Apart {
		w.say("a row …")
		w.desk.Settle(func(err error) {
			w.arranged(err)
			if err == nil {
				w.say(inRowWords(d))
			}
		})
		return
	}
	w.say("settling …")
	w.desk.Settle(w.arranged)
}

// inRowWords say what settling does to bodies apart.
func inRowWords(d *section.Document) string {
	for _, p := range d.Parts {
		if !p.At.OK {
			return "what had no place lies in a row, a diameter apart"
		}
	}
	return "bodies apart stay where they are drawn"
}

func (w *Window) layUp() {
	w.say("laying up …")
	w.desk.LayUp(w.arranged)
}

// arranged ends settling and laying up.
func (w *Window) arranged(err error) {
	if err != nil {
		w.say("")
		w.showMessage("Nothing was moved", sentence(err))
		return
	}
	if w.quiet != "" {
		w.say("")
	}
}

// makeRoom pushes the others off the selected part.
func (w *Window) makeRoom() {
	if s := w.desk.Selection(); len(s) == 1 {
		held := topsOf(s)[0]
		w.desk.MakeRoom(held, func(ok bool) {
			if !ok {
				w.showMessage("Nothing was moved", "There is no room to push the others off "+held+": take something out or use a larger "+holderWord(w.desk.Document().Holder.Kind)+".")
			}
		})
	}
}

func (w *Window) toggleIsotherms() {
	w.view.SetIsotherms(!w.view.Isotherms())
	w.menu.follow()
}

// toggleFlow shows or hides the heat-flow lines, for good.
func (w *Window) toggleFlow() {
	w.view.SetFlow(!w.view.Flow())
	w.app.Preferences().SetBool(prefFlow, w.view.Flow())
	w.menu.follow()
}

// setLook changes between light and dark, for good.
func (w *Window) setLook(l Look) {
	w.app.Preferences().SetString(prefLook, string(l))
	w.app.Settings().SetTheme(NewTheme(l))
	w.view.Refresh()
	w.menu.follow()
}

func (w *Window) focusPutLine() {
	if f, ok := w.putLine.(interface{ Focus() }); ok {
		f.Focus()
		return
	}
	if f, ok := w.putLine.(fyne.Focusable); ok {
		w.win.Canvas().Focus(f)
	}
}
