package ui

import (
	"errors"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"time"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"
	"fyne.io/fyne/v2/dialog"
	"fyne.io/fyne/v2/widget"

	"packrise/solver/section"
	"packrise/ui/keep"
)

func removeFile(path string) { os.Remove(path) }

// whenFree calls f when no dialog is open.
func (w *Window) whenFree(f func()) {
	if w.desk.closed {
		return
	}
	if w.dialog == nil {
		f()
		return
	}
	r := w.desk.rooms
	r.After(500*time.Millisecond, func() { r.Hop(func() { w.whenFree(f) }) })
}

// offer shows work that was left behind.
func (g *keeper) offer(f keep.Found) {
	f.Kept = slices.DeleteFunc(f.Kept, func(k keep.Kept) bool { return k.File == g.adopted })
	if len(f.Kept)+len(f.Broken) > 0 {
		g.w.trace.line("offered %d, broken %d", len(f.Kept), len(f.Broken))
		g.w.whenFree(func() { g.w.showKept(f) })
	}
}

// findKept looks for work left behind because the person asks.
func (w *Window) findKept() {
	g := w.keeper
	if g == nil {
		w.showMessage("Unsaved work", "Nothing is kept aside: there is no folder for it.")
		return
	}
	designs := w.recent()
	if g.path != "" {
		designs = append(designs, g.path)
	}
	w.beside(func() func() {
		f := keep.Find(g.folder, true, designs...)
		return func() {
			if len(f.Kept)+len(f.Broken) == 0 {
				w.showMessage("Unsaved work", "No unsaved work was left behind, neither beside the recent files nor in "+g.folder+".")
				return
			}
			w.showKept(f)
		}
	})
}

// showKept lists what was left behind. Closing it leaves everything as it is.
func (w *Window) showKept(f keep.Found) {
	rows := container.NewVBox()
	if len(f.Kept) > 0 {
		rows.Add(wrappedLabel("The program ended before this work was saved. What you leave here stays, and is offered again."))
	}
	for i, k := range f.Kept {
		name := widget.NewLabelWithStyle(k.Name, fyne.TextAlignLeading, fyne.TextStyle{Bold: true})
		name.Truncation = fyne.TextTruncateEllipsis
		take := widget.NewButton("Recover", func() {
			w.hide()
			w.recover(k)
		})
		if i == 0 {
			take.Importance = widget.HighImportance
		}
		leave := widget.NewButton("Discard", func() { w.discard(f, i) })
		rows.Add(widget.NewSeparator())
		rows.Add(container.NewBorder(nil, nil, nil, container.NewHBox(leave, take), name))
		rows.Add(wrappedLabel(keptWords(k, time.Now())))
	}
	for _, b := range f.Broken {
		rows.Add(widget.NewSeparator())
		rows.Add(wrappedLabel("A file of kept work can't be read. It was put aside as " + b + "."))
	}
	d := dialog.NewCustomWithoutButtons("Work that was not saved", container.NewVScroll(rows), w.win)
	label := "Later"
	if len(f.Kept) == 0 {
		label = "Close"
	}
	d.SetButtons([]fyne.CanvasObject{widget.NewButton(label, w.hide)})
	w.show(d, fyne.NewSize(620, min(520, 290+float32(len(f.Kept)-1+len(f.Broken))*110)))
}

func wrappedLabel(s string) *widget.Label {
	l := widget.NewLabel(s)
	l.Wrapping = fyne.TextWrapWord
	return l
}

// keptWords say when and where.
func keptWords(k keep.Kept, now time.Time) string {
	s := "Kept " + whenWords(k.At, now)
	if k.Path == "" {
		return s + "; it had no file yet."
	}
	s += "; its file is in " + filepath.Dir(k.Path) + "."
	if k.Changed {
		s += " The file has been changed or is gone since: look at both before you save."
	}
	return s
}

// whenWords write a time as people say it.
func whenWords(at, now time.Time) string {
	at = at.In(now.Location())
	switch days := now.YearDay() - at.YearDay() + 366*(now.Year()-at.Year()); {
	case days == 0:
		return "today at " + at.Format("15:04")
	case at.Year() == now.Year():
		return "on " + at.Format("2 January at 15:04")
	}
	return "on " + at.Format("2 January 2006 at 15:04")
}

// discard takes one of the offered pieces out of sight and shows the others.
func (w *Window) discard(f keep.Found, i int) {
	w.hide()
	folder, k := w.keeper.folder, f.Kept[i]
	w.beside(func() func() {
		err := keep.Discard(folder, k)
		return func() {
			if err != nil {
				w.showMessage("Not discarded", sentence(err))
				return
			}
			w.say("discarded; the newest twenty stay in " + filepath.Join(folder, "discarded"))
			if f.Kept = slices.Delete(slices.Clone(f.Kept), i, i+1); len(f.Kept) > 0 {
				w.showKept(f)
			}
		}
	})
}

var errKeptUnread = errors.New("the kept work can't be read as a design")

// recover puts kept work on the desk, as one step on top of what its file holds, so that undoing it shows the file.
func (w *Window) recover(k keep.Kept) {
	w.guard("recovering "+k.Name, func() {
		w.beside(func() func() {
			d, problems := section.Read(k.Body)
			if d == nil {
				return func() { w.unread(k, problems) }
			}
			var base *section.Document
			var print keep.Print
			var warnings []section.Problem
			if k.Path != "" {
				print, _ = keep.Look(k.Path) // before it is read: what changes between is noticed
				base, warnings, _ = section.Open(k.Path)
			}
			return func() { w.recovered(k, d, base, print, warnings) }
		})
	})
}

func (w *Window) recovered(k keep.Kept, d, base *section.Document, print keep.Print, warnings []section.Problem) {
	g := w.keeper
	g.adopted, g.next = k.File, &print
	if base == nil {
		base = emptyDesign()
	}
	if k.Path == "" {
		g.next = nil
	}
	w.desk.Load(base, k.Path, warnings)
	w.desk.Apply(section.Edit{Name: "recover unsaved work", Do: func(*section.Document) *section.Document { return d }}, false)
	w.trace.line("recovered %s", k.Name)
	w.say("recovered; not saved yet")
	if !w.desk.Dirty() { // the file has it all
		g.adopted = ""
		w.desk.rooms.Beside(func() { removeFile(k.File) })
		return
	}
	g.now()
}

// unread puts kept work aside that is no design, and lists why.
func (w *Window) unread(k keep.Kept, problems []section.Problem) {
	w.beside(func() func() {
		to := keep.Aside(k.File)
		return func() {
			text := sentence(errKeptUnread) + " It was put aside as " + to + "."
			if list := problemList("", problems); list != "" {
				text += "\n\n" + list
			}
			w.showMessage("Not recovered", strings.TrimSpace(text))
		}
	})
}
