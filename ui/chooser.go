package ui

import (
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"slices"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/dialog"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"
)

// chooser asks for a file. The toolkit's own dialog empties a file as soon as it is chosen for saving, so this is one of ours; it reads folders beside
// the window and never touches a file.
type chooser struct {
	title, accept string
	ends          []string // of the names that are shown, ".yaml"; the first is added where none is written
	folder, name  string
	saving        bool
	done          func(path string)

	w       *Window
	dialog  *dialog.CustomDialog
	place   *widget.Label
	list    *widget.List
	entry   *pathEntry
	message *widget.Label
	rows    []fileRow
}

// fileRow is one line of the list.
type fileRow struct {
	name string
	dir  bool
}

// pathEntry is an entry in which Escape closes the dialog.
type pathEntry struct {
	widget.Entry
	escaped func()
}

// TypedKey takes Escape and leaves the rest to the entry.
func (e *pathEntry) TypedKey(k *fyne.KeyEvent) {
	if k.Name == fyne.KeyEscape {
		e.escaped()
		return
	}
	e.Entry.TypedKey(k)
}

// choose opens the dialog.
func (w *Window) choose(c chooser) {
	f := &c
	f.w = w
	f.place = widget.NewLabel("")
	f.place.Truncation = fyne.TextTruncateEllipsis
	f.message = widget.NewLabel("")
	f.message.Wrapping = fyne.TextWrapWord
	f.list = widget.NewList(func() int { return len(f.rows) }, newFileLine, f.fillLine)
	f.list.OnSelected = f.chosen
	f.entry = &pathEntry{escaped: w.hide}
	f.entry.ExtendBaseWidget(f.entry)
	f.entry.SetPlaceHolder("a file's name, or a path")
	f.entry.SetText(f.name)
	f.entry.OnSubmitted = func(string) { f.submit() }
	up := widget.NewButtonWithIcon("", theme.Icon(theme.IconNameMoveUp), func() { f.enter(filepath.Dir(f.folder)) })
	home := widget.NewButtonWithIcon("", theme.Icon(theme.IconNameHome), func() {
		if h, err := os.UserHomeDir(); err == nil {
			f.enter(h)
		}
	})
	top := container.NewBorder(nil, nil, container.NewHBox(up, home), nil, f.place)
	body := container.NewBorder(top, container.NewVBox(f.entry, f.message), nil, nil, f.list)
	f.dialog = dialog.NewCustomWithoutButtons(f.title, body, w.win)
	accept := widget.NewButton(f.accept, f.submit)
	accept.Importance = widget.HighImportance
	f.dialog.SetButtons([]fyne.CanvasObject{widget.NewButton("Cancel", w.hide), accept})
	w.show(f.dialog, fyne.NewSize(760, 560))
	f.enter(f.folder)
	w.win.Canvas().Focus(f.entry)
}

func newFileLine() fyne.CanvasObject {
	l := widget.NewLabel("")
	l.Truncation = fyne.TextTruncateEllipsis
	return container.NewBorder(nil, nil, widget.NewIcon(theme.Icon(theme.IconNameFile)), nil, l)
}

func (f *chooser) fillLine(i widget.ListItemID, o fyne.CanvasObject) {
	c := o.(*fyne.Container)
	row := f.rows[i]
	icon := theme.IconNameFile
	if row.dir {
		icon = theme.IconNameFolder
	}
	c.Objects[0].(*widget.Label).SetText(row.name)
	c.Objects[1].(*widget.Icon).SetResource(theme.Icon(icon))
}

// enter shows a folder, which is read beside the window.
func (f *chooser) enter(folder string) {
	f.w.beside(func() func() {
		rows, err := readFolder(folder, f.ends)
		return func() {
			if err != nil {
				f.say(err.Error())
				return
			}
			f.folder, f.rows = folder, rows
			f.place.SetText(folder)
			f.say("")
			f.list.UnselectAll()
			f.list.Refresh()
			f.list.ScrollToTop()
		}
	})
}

// say writes below the entry.
func (f *chooser) say(s string) { f.message.SetText(s) }

// readFolder lists folders first, then the files with one of the endings; hidden ones are left out.
func readFolder(folder string, ends []string) ([]fileRow, error) {
	all, err := os.ReadDir(folder)
	if err != nil {
		return nil, fmt.Errorf("%s can't be read: %w", folder, cause(err))
	}
	var dirs, files []fileRow
	for _, e := range all {
		name, dir := e.Name(), e.IsDir()
		if e.Type()&fs.ModeSymlink != 0 {
			if info, err := os.Stat(filepath.Join(folder, name)); err == nil {
				dir = info.IsDir()
			}
		}
		switch {
		case strings.HasPrefix(name, "."):
		case dir:
			dirs = append(dirs, fileRow{name, true})
		case slices.Contains(ends, strings.ToLower(filepath.Ext(name))):
			files = append(files, fileRow{name, false})
		}
	}
	return append(dirs, files...), nil
}

// cause is the system's reason without the call and the path.
func cause(err error) error {
	var p *fs.PathError
	if errors.As(err, &p) {
		return p.Err
	}
	return err
}

// chosen follows a click in the list: folders are entered, a file's name goes into the entry.
func (f *chooser) chosen(i widget.ListItemID) {
	if i >= len(f.rows) {
		return
	}
	row := f.rows[i]
	if row.dir {
		f.enter(filepath.Join(f.folder, row.name))
		return
	}
	if f.entry.Text == row.name && !f.saving { // a second click
		f.submit()
		return
	}
	f.entry.SetText(row.name)
	f.list.Unselect(i)
}

// submit takes what the entry says: a folder is entered, a file goes to done.
func (f *chooser) submit() {
	text := strings.TrimSpace(f.entry.Text)
	if text == "" {
		f.say("Type a file's name, or choose one from the list.")
		return
	}
	path := absolute(f.folder, text)
	f.w.beside(func() func() {
		info, err := os.Stat(path)
		return func() { f.take(path, info, err) }
	})
}

// absolute reads a path as a person writes it, relative to a folder.
func absolute(folder, text string) string {
	if text == "~" || strings.HasPrefix(text, "~/") {
		if h, err := os.UserHomeDir(); err == nil {
			text = h + text[1:]
		}
	}
	if !filepath.IsAbs(text) {
		text = filepath.Join(folder, text)
	}
	return filepath.Clean(text)
}

// take decides by what is there already.
func (f *chooser) take(path string, info os.FileInfo, err error) {
	switch {
	case err == nil && info.IsDir():
		f.entry.SetText("")
		f.enter(path)
	case !f.saving && err != nil:
		f.say(fmt.Sprintf("%s can't be opened: %v.", path, cause(err)))
	case !f.saving:
		f.finish(path)
	case filepath.Ext(path) == "":
		f.entry.SetText(f.entry.Text + f.ends[0])
		f.submit()
	case !slices.Contains(f.ends, strings.ToLower(filepath.Ext(path))):
		f.say("The name must end in " + strings.Join(f.ends, " or ") + ".")
	case err == nil && path != f.w.desk.Path():
		f.w.ask("Replace "+filepath.Base(path)+"?", "A file of that name is there already. Replace it?", answerOf{"Replace", func() { f.done(path) }})
	default:
		f.finish(path)
	}
}

func (f *chooser) finish(path string) {
	f.w.hide()
	f.done(path)
}
