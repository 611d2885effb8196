package ui

import (
	"os"
	"path/filepath"

	"packrise/solver/rating"
	"packrise/solver/section"
	"packrise/ui/keep"
)

// beside runs f beside the window; what f returns is run on the window's goroutine.
func (w *Window) beside(f func() func()) {
	r := w.desk.rooms
	r.Beside(func() {
		then := f()
		r.Hop(func() {
			if !w.desk.closed {
				then()
			}
		})
	})
}

// guard asks what to do about unsaved work, then goes on with then unless the person stays.
func (w *Window) guard(before string, then func()) {
	w.view.cancelDrag()
	if !w.desk.Dirty() {
		then()
		return
	}
	w.ask("Save "+w.desk.Name()+"?", "It has changes that are not in its file. Save them before "+before+"?",
		answerOf{"Save", func() { w.save(then) }},
		answerOf{"Don't save", then},
	)
}

// newDesign starts with an empty jacket that people can change.
func (w *Window) newDesign() {
	w.guard("starting a new one", func() { w.desk.Load(emptyDesign(), "", nil) })
}

// emptyDesign is an empty jacket in still air, everything in it written out.
func emptyDesign() *section.Document {
	return &section.Document{
		Title:        "New section",
		Surroundings: section.Surroundings{Kind: section.StillAir, AmbientC: section.Some(30.0)},
		Holder: section.Holder{
			Kind: section.Jacket, InsideMM: section.Some(20.0),
			Layers: []section.Layer{{Material: "pvc", ThicknessMM: 1.5}},
		},
	}
}

func (w *Window) openDemo(d demo) {
	w.guard("opening the demo", func() { w.desk.Load(d.doc, "", nil) })
}

// chooseOpen asks for a file and opens it.
func (w *Window) chooseOpen() {
	w.guard("opening another design", func() {
		w.choose(chooser{title: "Open a design", accept: "Open", ends: []string{".yaml", ".yml"}, folder: w.folder(), done: w.load})
	})
}

// open opens a file after the question about unsaved work.
func (w *Window) open(path string) {
	w.guard("opening "+filepath.Base(path), func() { w.load(path) })
}

// load reads a file beside the window. Only a design that can be read takes the place of the open one.
func (w *Window) load(path string) {
	rev := w.desk.Revision()
	w.say("opening " + filepath.Base(path) + " …")
	w.beside(func() func() {
		print, printErr := keep.Look(path) // before it is read: what changes between is noticed
		d, problems, err := section.Open(path)
		open := func() { w.opened(d, path, problems, print, printErr) }
		return func() {
			w.say("")
			switch {
			case err != nil:
				w.forget(path, err)
				w.showMessage("Not opened", sentence(err))
			case d == nil:
				w.showProblemList(filepath.Base(path)+" can't be opened", path, problems)
			case w.desk.Revision() != rev && w.desk.Dirty(): // changed while the file was read
				w.guard("opening "+filepath.Base(path), open)
			default:
				open()
			}
		}
	})
}

func (w *Window) opened(d *section.Document, path string, warnings []section.Problem, print keep.Print, printErr error) {
	w.remember(path)
	w.keeper.expect(print, printErr)
	w.desk.Load(d, path, warnings)
}

// folder is where file dialogs begin.
func (w *Window) folder() string {
	if p := w.desk.Path(); p != "" {
		return filepath.Dir(p)
	}
	if f := w.app.Preferences().String(prefFolder); f != "" {
		return f
	}
	if f, err := os.Getwd(); err == nil {
		return f
	}
	return string(filepath.Separator)
}

// save writes the design into its file, or asks for one; then is called only when it is saved.
func (w *Window) save(then func()) {
	if w.desk.Path() == "" {
		w.saveAs(then)
		return
	}
	w.saveTo(w.desk.Path(), then)
}

// saveAs asks for a file and saves.
func (w *Window) saveAs(then func()) {
	name := filepath.Base(w.desk.Path())
	if w.desk.Path() == "" {
		name = fileName(w.desk.Document().Title) + ".yaml"
	}
	w.choose(chooser{
		title: "Save the design as", accept: "Save", ends: []string{".yaml", ".yml"}, folder: w.folder(), name: name, saving: true,
		done: func(path string) { w.saveTo(path, then) },
	})
}

// saveTo writes beside the window; one save at a time, a second waits for the first.
func (w *Window) saveTo(path string, then func()) {
	if w.saving {
		w.savedBy = append(w.savedBy, func() { w.saveTo(path, then) })
		return
	}
	w.view.cancelDrag()
	d, cat := w.desk.Document(), w.desk.Catalog()
	w.saving = true
	was := w.keeper.printOf(path)
	w.beside(func() func() {
		if now, changed := changedSince(was, path); changed {
			return func() {
				w.saving, w.savedBy = false, nil
				w.keeper.changedBeforeSave(path, now, then)
			}
		}
		err := section.Save(path, rating.Snapshot(d, cat))
		print, printErr := keep.Look(path)
		return func() {
			w.saving = false
			if err != nil {
				w.savedBy = nil
				w.keeper.now()
				w.showMessage("Not saved", sentence(err)+" The design is still open and the old file is as it was.")
				return
			}
			w.remember(path)
			w.keeper.expect(print, printErr)
			w.desk.Saved(d, path)
			w.say("saved " + filepath.Base(path))
			if then != nil {
				then()
			}
			waiting := w.savedBy
			w.savedBy = nil
			for _, f := range waiting {
				f()
			}
		}
	})
}

// fileName makes a file's name of a title.
func fileName(title string) string {
	var out []rune
	for _, r := range title {
		switch {
		case r >= 'a' && r <= 'z', r >= '0' && r <= '9', r == '-', r == '_':
			out = append(out, r)
		case r >= 'A' && r <= 'Z':
			out = append(out, r+'a'-'A')
		case r > 127:
			out = append(out, r)
		case len(out) > 0 && out[len(out)-1] != '-':
			out = append(out, '-')
		}
	}
	for len(out) > 0 && out[len(out)-1] == '-' {
		out = out[:len(out)-1]
	}
	if len(out) == 0 {
		return "section"
	}
	return string(out[:min(len(out), 60)])
}

// choosePicture asks for a file and writes the whole picture into it.
func (w *Window) choosePicture() {
	name := fileName(w.desk.Document().Title)
	if p := w.desk.Path(); p != "" {
		name = filepath.Base(p[:len(p)-len(filepath.Ext(p))])
	}
	w.choose(chooser{
		title: "Save the picture as", accept: "Save", ends: []string{".png"}, folder: w.folder(), name: name + ".png", saving: true,
		done: w.savePicture,
	})
}

func (w *Window) savePicture(path string) {
	scene := w.desk.Scene()
	scene.Plain, scene.Flow = !w.view.Isotherms(), w.view.Flow()
	w.beside(func() func() {
		err := WritePicture(path, scene)
		return func() {
			if err != nil {
				w.showMessage("Picture not saved", sentence(err))
				return
			}
			w.say("saved " + filepath.Base(path))
		}
	})
}
