package ui

import (
	"path/filepath"
	"time"

	"packrise/solver/rating"
	"packrise/solver/section"
	"packrise/ui/keep"
)

const (
	keepWithin = 45 * time.Second // of a change its work is kept aside: with the writing inside a minute
	signOfLife = time.Minute      // between two of them, for other machines
)

// keeper sees to it that no work is lost: it keeps unsaved work aside, marks the design as open here, and knows what its file held. Its methods are
// called on the window's goroutine; the disk is touched beside it.
type keeper struct {
	w      *Window
	folder string // for work that can't be kept beside its file
	me     keep.Owner
	note   *keep.Note
	side   *keep.Side

	history *section.History // of the design that side is for
	path    string           // of its file, whole
	print   keep.Print       // of the file when it was read or written last
	known   bool             // print has been taken
	next    *keep.Print      // print of what is about to be told by the desk
	asked   *keep.Print      // the change that the person was asked about

	kept     *section.Document // in the side file, nil for none
	due      bool              // a timer runs
	writing  bool
	again    bool     // something asked for keeping while it was written
	adopted  string   // side file that was left behind and is on the desk now: it goes when ours is written
	stops    []func() // timer and sign of life
	finished bool
}

// newKeeper returns nil, whose methods do nothing, where there is no folder.
func newKeeper(w *Window, folder string, me keep.Owner) *keeper {
	if folder == "" {
		return nil
	}
	g := &keeper{w: w, folder: folder, me: me, note: keep.NewNote(me), stops: make([]func(), 2)}
	w.desk.beforeLong = g.now
	w.app.Lifecycle().SetOnEnteredForeground(func() {
		g.look()
		w.checkRecent()
	})
	g.beat()
	return g
}

// beat is the sign of life.
func (g *keeper) beat() {
	r := g.w.desk.rooms
	g.stops[1] = r.After(signOfLife, func() {
		g.note.Renew()
		r.Hop(func() {
			if !g.finished {
				g.beat()
			}
		})
	})
}

// changed follows the desk.
func (g *keeper) changed(c Changed) {
	if g == nil || g.finished {
		return
	}
	k := g.w.desk
	path := whole(k.Path())
	switch {
	case k.history != g.history:
		g.begin(path)
	case path != g.path:
		g.mark(path, false)
	case g.next != nil:
		g.print, g.known, g.next = *g.next, true, nil
	}
	switch {
	case c&(ChangedDocument|ChangedFile) == 0:
	case !k.Dirty():
		g.drop()
	case !g.due && k.Document() != g.kept:
		g.due = true
		g.stops[0] = k.rooms.After(keepWithin, func() {
			k.rooms.Hop(func() {
				g.due = false
				g.now()
			})
		})
	}
}

// whole is the path from the root.
func whole(path string) string {
	if path == "" {
		return ""
	}
	if abs, err := filepath.Abs(path); err == nil {
		return abs
	}
	return path
}

// begin is for another design on the desk.
func (g *keeper) begin(path string) {
	first, old := g.history == nil, g.side
	g.history, g.side, g.kept = g.w.desk.history, keep.NewSide(g.me, g.folder), nil
	if old != nil {
		g.w.beside(func() func() {
			old.End()
			return func() {}
		})
	}
	g.mark(path, first)
}

// mark takes the design's path, tells other windows of it, and looks for work left behind: all that there is when the program begins, else that of
// this design.
func (g *keeper) mark(path string, first bool) {
	g.path, g.asked = path, nil
	g.known = g.next != nil
	if g.known {
		g.print, g.next = *g.next, nil
	}
	known, history := g.known, g.history
	designs := []string{}
	if path != "" {
		designs = append(designs, path)
	}
	if first {
		designs = append(designs, g.w.recent()...)
	}
	g.w.beside(func() func() {
		other := g.note.Take(path)
		var print keep.Print
		var err error
		if !known && path != "" {
			print, err = keep.Look(path)
		}
		found := keep.Find(g.folder, first, designs...)
		return func() {
			if g.path != path { // another design came meanwhile, whose note this one may have taken away
				now := g.path
				g.w.desk.rooms.Beside(func() { g.note.Take(now) })
			}
			if g.finished || g.history != history || g.path != path {
				return
			}
			if !g.known && path != "" && err == nil {
				g.print, g.known = print, true
			}
			g.offer(found)
			if other != nil {
				g.w.whenFree(func() { g.askOther(path, *other) })
			}
		}
	})
}

// now keeps unsaved work aside, unless that is done already.
func (g *keeper) now() {
	if g == nil || g.finished || !g.w.desk.Dirty() || g.w.desk.Document() == g.kept {
		return
	}
	if g.writing {
		g.again = true
		return
	}
	g.writing = true
	d, side, adopted := g.w.desk.Document(), g.side, g.adopted
	write := g.writer(d)
	g.w.desk.rooms.Beside(func() {
		file, err := write()
		if err == nil && adopted != "" && file != "" {
			removeFile(adopted)
		}
		g.w.desk.rooms.Hop(func() { g.wrote(d, side, file, adopted, err) })
	})
}

// writer returns what writes a document into the side file, on any goroutine.
func (g *keeper) writer(d *section.Document) func() (string, error) {
	h := keep.Head{Path: g.path, Name: g.w.desk.Name(), At: time.Now().Truncate(time.Second), Base: g.print.Sum}
	side, cat := g.side, g.w.desk.Catalog()
	return func() (string, error) {
		body, err := section.Write(rating.Snapshot(d, cat))
		if err != nil {
			return "", err
		}
		return side.Write(h, body)
	}
}

// wrote ends a keeping.
func (g *keeper) wrote(d *section.Document, side *keep.Side, file, adopted string, err error) {
	g.writing = false
	again := g.again
	g.again = false
	if g.finished {
		return
	}
	switch {
	case g.side != side: // another design came meanwhile
	case err != nil:
		g.w.say("unsaved work was not kept aside: " + err.Error())
	case !g.w.desk.Dirty():
		g.kept = d
		g.drop()
	default:
		g.kept = d
		if g.adopted == adopted {
			g.adopted = ""
		}
		g.w.trace.line("kept %s", file)
	}
	if again {
		g.now()
	}
}

// drop takes the side file away: its work is saved.
func (g *keeper) drop() {
	if g.kept == nil {
		return
	}
	g.kept = nil
	side := g.side
	g.w.beside(func() func() {
		side.Remove()
		return func() {}
	})
}

// close ends the keeping when the window is gone. Work is kept if the person has not decided about it, as when the session ends.
func (g *keeper) close(decided bool) {
	if g == nil || g.finished {
		return
	}
	g.finished = true
	for _, stop := range g.stops {
		if stop != nil {
			stop()
		}
	}
	if g.side != nil {
		if !decided && g.w.desk.Dirty() {
			_, _ = g.writer(g.w.desk.Document())() // nobody is left to be told
		} else {
			g.side.End()
		}
	}
	g.note.End()
}
