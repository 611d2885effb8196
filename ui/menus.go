package ui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/driver/desktop"
)

// menus is the menu bar. Every shortcut of the program sits on one of its items, since text fields swallow all others. An item without a modifier only
// tells its key: those are handled by the canvas and the window.
type menus struct {
	w    *Window
	main *fyne.MainMenu

	recent, undo, redo, holder, makeRoom, erase, duplicate *fyne.MenuItem
	isotherms, flow, details                               *fyne.MenuItem
	looks                                                  map[Look]*fyne.MenuItem
	shown                                                  string // what follow showed last
}

func ctrl(k fyne.KeyName) fyne.Shortcut {
	return &desktop.CustomShortcut{KeyName: k, Modifier: fyne.KeyModifierControl}
}

func ctrlShift(k fyne.KeyName) fyne.Shortcut {
	return &desktop.CustomShortcut{KeyName: k, Modifier: fyne.KeyModifierControl | fyne.KeyModifierShift}
}

// bareKey is shown on the item; the toolkit never fires it.
func bareKey(k fyne.KeyName) fyne.Shortcut { return &desktop.CustomShortcut{KeyName: k} }

func item(label string, s fyne.Shortcut, f func()) *fyne.MenuItem {
	m := fyne.NewMenuItem(label, f)
	m.Shortcut = s
	return m
}

func newMenus(w *Window) *menus {
	m := &menus{w: w, looks: map[Look]*fyne.MenuItem{}}
	m.main = fyne.NewMainMenu(m.file(), m.edit(), m.section(), w.asks.menu(), m.view(), m.help())
	m.follow()
	return m
}

func (m *menus) file() *fyne.Menu {
	w := m.w
	demos := fyne.NewMenuItem("Open demo", nil)
	demos.ChildMenu = fyne.NewMenu("", m.demos()...)
	m.recent = fyne.NewMenuItem("Recent", nil)
	m.recent.ChildMenu = fyne.NewMenu("")
	quit := item("Quit", ctrl(fyne.KeyQ), w.quit)
	quit.IsQuit = true
	return fyne.NewMenu("File",
		item("New", ctrl(fyne.KeyN), w.newDesign),
		item("Open …", ctrl(fyne.KeyO), w.chooseOpen),
		demos, m.recent,
		fyne.NewMenuItem("Recover unsaved work …", w.findKept),
		fyne.NewMenuItemSeparator(),
		item("Save", ctrl(fyne.KeyS), func() { w.save(nil) }),
		item("Save as …", ctrlShift(fyne.KeyS), func() { w.saveAs(nil) }),
		item("Save picture …", ctrl(fyne.KeyP), w.choosePicture),
		fyne.NewMenuItemSeparator(),
		quit,
	)
}

func (m *menus) demos() []*fyne.MenuItem {
	var items []*fyne.MenuItem
	for _, d := range demoDesigns(demoFiles()) {
		items = append(items, fyne.NewMenuItem(d.title, func() { m.w.openDemo(d) }))
	}
	return items
}

func (m *menus) edit() *fyne.Menu {
	w := m.w
	m.undo = item("Undo", &fyne.ShortcutUndo{}, w.undo)
	m.redo = item("Redo", &fyne.ShortcutRedo{}, w.redo)
	m.erase = item("Delete", bareKey(fyne.KeyDelete), w.desk.DeleteSelection)
	m.duplicate = item("Duplicate", ctrl(fyne.KeyD), w.desk.DuplicateSelection)
	return fyne.NewMenu("Edit",
		m.undo, m.redo,
		fyne.NewMenuItemSeparator(),
		m.duplicate, m.erase,
		item("Select all", &fyne.ShortcutSelectAll{}, w.selectAll),
		fyne.NewMenuItemSeparator(),
		item("Put something in", ctrl(fyne.KeyL), w.focusPutLine),
		item("Edit the selection", bareKey(fyne.KeyReturn), w.focusDetails),
	)
}

func (m *menus) section() *fyne.Menu {
	w := m.w
	m.holder = item("Holder …", ctrl(fyne.KeyH), w.showHolder)
	m.makeRoom = item("Make room", ctrl(fyne.KeyM), w.makeRoom)
	return fyne.NewMenu("Section",
		item("Settle", ctrl(fyne.KeyG), w.settle),
		item("Lay up", ctrl(fyne.KeyR), w.layUp),
		m.makeRoom,
		fyne.NewMenuItemSeparator(),
		m.holder,
		item("Surroundings …", ctrl(fyne.KeyU), w.showSurroundings),
		fyne.NewMenuItemSeparator(),
		item("Problems and notes …", ctrl(fyne.KeyB), w.showProblems),
	)
}

func (m *menus) view() *fyne.Menu {
	w := m.w
	m.isotherms = item("Isotherms", ctrl(fyne.KeyI), w.toggleIsotherms)
	m.flow = item("Heat-flow lines", ctrl(fyne.KeyF), w.toggleFlow)
	m.details = item("Details", ctrl(fyne.KeyT), w.toggleDetails)
	look := fyne.NewMenuItem("Look", nil)
	for _, l := range []struct {
		look  Look
		label string
	}{{LookSystem, "As the system"}, {LookLight, "Light"}, {LookDark, "Dark"}} {
		m.looks[l.look] = fyne.NewMenuItem(l.label, func() { w.setLook(l.look) })
	}
	look.ChildMenu = fyne.NewMenu("", m.looks[LookSystem], m.looks[LookLight], m.looks[LookDark])
	return fyne.NewMenu("View",
		item("Fit", ctrl(fyne.Key0), w.view.Fit),
		item("Zoom in", ctrl(fyne.KeyPlus), func() { w.view.Zoom(zoomStep) }),
		item("Zoom out", ctrl(fyne.KeyMinus), func() { w.view.Zoom(1 / zoomStep) }),
		fyne.NewMenuItemSeparator(),
		m.isotherms, m.flow, m.details, look,
	)
}

func (m *menus) help() *fyne.Menu {
	return fyne.NewMenu("Help",
		item("Keyboard", bareKey(fyne.KeyF1), m.w.showKeyboard),
		fyne.NewMenuItem("About", m.w.showAbout),
	)
}

// follow brings labels and marks up to the desk. The bar is built anew only when one of them has changed.
func (m *menus) follow() {
	k := m.w.desk
	m.undo.Label, m.undo.Disabled = labelled("Undo", k.UndoName()), k.UndoName() == "" && !k.Drafting()
	m.redo.Label, m.redo.Disabled = labelled("Redo", k.RedoName()), k.RedoName() == ""
	m.holder.Label = upperFirst(holderWord(k.Document().Holder.Kind)) + " …"
	n := len(k.Selection())
	m.erase.Disabled, m.duplicate.Disabled, m.makeRoom.Disabled = n == 0, n == 0, n != 1
	m.isotherms.Checked = m.w.view.Isotherms()
	m.flow.Checked = m.w.view.Flow()
	m.details.Checked = m.w.frame.showsDetails(m.w.frame.size.Width)
	now := m.w.app.Preferences().StringWithFallback(prefLook, string(LookSystem))
	for l, i := range m.looks {
		i.Checked = string(l) == now
	}
	m.followRecent()
	if s := m.String(); s != m.shown {
		m.shown = s
		m.main.Refresh()
	}
}

func labelled(verb, name string) string {
	if name == "" {
		return verb
	}
	return verb + " " + elided(name, 40)
}

// String lists all items with their marks.
func (m *menus) String() string {
	var s string
	var walk func([]*fyne.MenuItem)
	walk = func(items []*fyne.MenuItem) {
		for _, i := range items {
			s += i.Label
			if i.Disabled {
				s += " (off)"
			}
			if i.Checked {
				s += " ✓"
			}
			s += "\n"
			if i.ChildMenu != nil {
				walk(i.ChildMenu.Items)
			}
		}
	}
	for _, top := range m.main.Items {
		walk(top.Items)
	}
	return s
}
