package ui

import (
	"errors"
	"fmt"
	"path/filepath"
	"time"

	"packrise/solver/section"
	"packrise/ui/keep"
)

// look notices when another program has changed the file, and asks once.
func (g *keeper) look() {
	if g == nil || g.finished || g.path == "" || !g.known || g.w.saving {
		return
	}
	path, was := g.path, g.print
	g.w.beside(func() func() {
		now, changed, err := was.Changed(path, false)
		return func() {
			switch {
			case g.finished || g.path != path || g.print != was || g.w.saving || err != nil:
			case !changed:
				g.print = now
			case g.asked == nil || now != *g.asked:
				g.asked = &now
				g.w.whenFree(func() { g.askChanged(path, now, nil) })
			}
		}
	})
}

// expect is told the print of a file before the desk tells that it was opened or saved.
func (g *keeper) expect(p keep.Print, err error) {
	if g != nil && err == nil {
		g.next = &p
	}
}

// printOf returns what the file at path held when it was read or written here, nil if that is not known.
func (g *keeper) printOf(path string) *keep.Print {
	if g == nil || !g.known || whole(path) != g.path {
		return nil
	}
	p := g.print
	return &p
}

// changedSince tells whether the file holds something else than it did, beside the window. One that is gone is no reason not to save.
func changedSince(was *keep.Print, path string) (now keep.Print, changed bool) {
	if was == nil {
		return now, false
	}
	now, changed, err := was.Changed(path, true)
	return now, changed && err == nil && now.There
}

// changedBeforeSave asks before something is overwritten.
func (g *keeper) changedBeforeSave(path string, now keep.Print, then func()) {
	g.asked = &now
	if then == nil {
		then = func() {}
	}
	g.now()
	g.askChanged(g.path, now, then)
}

// askChanged puts the question about a file that another program has changed. then is called after a save; nil if nothing is being saved.
func (g *keeper) askChanged(path string, now keep.Print, then func()) {
	if g.finished || g.path != path {
		return
	}
	w, name := g.w, filepath.Base(path)
	w.trace.line("changed on disk %s", name)
	elsewhere := answerOf{"Save under another name", func() { w.saveAs(then) }}
	if !now.There {
		w.ask(name+" is gone", "The file is not in "+filepath.Dir(path)+" any more. The design is still here: keep it, and save it there again when you like, or under another name.",
			answerOf{"Keep mine", func() { g.keepMine(now) }}, elsewhere)
		return
	}
	text := "Another program has changed the file since it was read or saved here."
	mine := answerOf{"Keep mine", func() { g.keepMine(now) }}
	if then != nil {
		mine.then = func() {
			g.keepMine(now)
			w.saveTo(path, then)
		}
		text += " Keep mine writes your design over it."
	} else {
		text += " Keep mine leaves the file as it is until you save."
	}
	w.ask(name+" has changed", text+" Take theirs reads the file; Undo brings yours back.", mine, answerOf{"Take theirs", g.takeTheirs}, elsewhere)
}

// keepMine goes on with the design as it is here: it differs from its file until it is saved.
func (g *keeper) keepMine(now keep.Print) {
	g.print, g.known = now, true
	g.w.desk.Differs()
}

// takeTheirs reads the file as one step that can be undone.
func (g *keeper) takeTheirs() {
	w, path, history := g.w, g.path, g.history
	w.beside(func() func() {
		print, err := keep.Look(path)
		d, problems, openErr := section.Open(path)
		return func() {
			switch err = errors.Join(err, openErr); {
			case g.history != history || g.path != path:
			case openErr != nil:
				w.showMessage("Not taken", sentence(openErr))
			case d == nil:
				w.showProblemList(filepath.Base(path)+" can't be read; yours is still here", path, problems)
			default:
				w.desk.Take(d, problems)
				if err == nil {
					g.print, g.known = print, true
				}
				w.say("took what the file holds; Undo brings yours back")
			}
		}
	})
}

// askOther says that another window has the design open.
func (g *keeper) askOther(path string, other keep.Held) {
	if g.finished || g.path != path {
		return
	}
	g.w.trace.line("open elsewhere %s", filepath.Base(path))
	where := fmt.Sprintf("process %d", other.PID)
	if other.Host != g.me.Host {
		where += " on " + other.Host
	}
	text := fmt.Sprintf("Another window (%s) has had it open since %s. You can work on it in both: who saves second is asked before anything is overwritten. Or work on a copy that has no file yet.",
		where, other.Since.Format("15:04"))
	if time.Since(other.Since) > 20*time.Hour {
		text = fmt.Sprintf("Another window (%s) has it open. You can work on it in both: who saves second is asked before anything is overwritten. Or work on a copy that has no file yet.", where)
	}
	g.w.askOr("Work in both", filepath.Base(path)+" is open elsewhere", text, answerOf{"Work on a copy", g.w.desk.Detach})
}
