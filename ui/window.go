package ui

import (
	"fmt"
	"io"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/dialog"
	"fyne.io/fyne/v2/theme"

	"packrise/solver/catalog"
	"packrise/solver/section"
	"packrise/ui/keep"
)

// Options of a window.
type Options struct {
	Catalog  *catalog.Catalog
	Document *section.Document // to begin with
	Path     string            // its file, "" for none
	Warnings []section.Problem // what its reader warned of
	Version  string            // for About
	Trace    io.Writer         // one line for each thing that a script may wait for; nil: none
	Open     string            // a file that the window shall open itself and say why it can't, "" for none
	KeepIn   string            // folder for unsaved work that can't be kept beside its file; "": nothing is kept aside
	Rooms    Rooms             // for tests
}

// Window is the program's window on one design.
type Window struct {
	app     fyne.App
	win     fyne.Window
	desk    *Desk
	view    *SectionView
	frame   *frame
	content *fyne.Container
	cmds    *commands
	status  *quietLine
	putLine fyne.CanvasObject
	menu    *menus
	asks    *asks
	version string
	trace   *tracer

	dialog  dialog.Dialog // the one that is open, for tests and so that there is only one
	saving  bool          // a save is under way
	savedBy []func()      // what waits for it
	quiet   string        // said in the status line until the document changes

	keeper  *keeper
	decided bool            // about unsaved work, on closing
	missing map[string]bool // recent files that are not there
}

// Preferences of the program.
const (
	prefRecent  = "recent"
	prefLook    = "look"
	prefFlow    = "flow"
	prefWidth   = "window.width"
	prefHeight  = "window.height"
	prefFolder  = "folder"
	prefDetails = "details.width"
	prefList    = "list.height"
)

// NewWindow makes the window on a design.
func NewWindow(a fyne.App, o Options) *Window {
	w := &Window{app: a, win: a.NewWindow("Packrise"), version: o.Version}
	a.Settings().SetTheme(NewTheme(Look(a.Preferences().StringWithFallback(prefLook, string(LookSystem)))))
	w.desk = NewDeskWith(o.Catalog, o.Document, o.Rooms)
	w.desk.path, w.desk.opened = o.Path, o.Warnings
	if o.Path != "" {
		w.remember(o.Path)
	}
	w.view = NewSectionView(w.desk)
	w.view.SetFlow(a.Preferences().Bool(prefFlow))
	w.trace = newTracer(w, o.Trace)
	w.build()
	w.menu = newMenus(w)
	w.win.SetMainMenu(w.menu.main)
	w.win.SetPadded(false)
	w.win.SetContent(w.content)
	w.win.SetMaster()
	w.win.SetCloseIntercept(w.quit)
	w.shortcuts()
	width, height := a.Preferences().Float(prefWidth), a.Preferences().Float(prefHeight)
	if width < 600 || height < 400 {
		width, height = 1400, 875
	}
	w.win.Resize(fyne.NewSize(float32(width), float32(height)))
	w.win.SetOnDropped(w.dropped)
	w.keeper = newKeeper(w, o.KeepIn, keep.Me())
	w.desk.Listen(w.changed)
	w.changed(ChangedDocument | ChangedFile)
	w.checkRecent()
	if o.Open != "" {
		w.load(o.Open)
	}
	return w
}

// build makes the panes and lays them out.
func (w *Window) build() {
	k := w.desk
	w.asks = newAsks(w, NewDetails(k))
	w.cmds = newCommands(w)
	w.putLine = NewPutLine(k)
	w.status = newQuietLine()
	c := w.cmds
	sentence := NewSentenceView(k, w.relayout)
	sentence.OnProblems, sentence.OnAssumed = w.showProblems, w.showSurroundings
	f := &frame{
		sentence: sentence,
		bar:      newBar(w.putLine, []fyne.CanvasObject{c.settle, c.layUp, c.undo, c.fit, c.out, c.in}, []fyne.CanvasObject{c.advice, c.details}),
		ladder:   NewLadder(k),
		section:  w.view,
		status:   w.status,
		details:  w.asks.side,
		list:     NewWireList(k),
		caution:  newCaution(),

		ladderLine:   newFill(theme.ColorNameSeparator),
		detailLine:   newFill(theme.ColorNameSeparator),
		detailsWidth: float32(w.app.Preferences().Float(prefDetails)),
		listHeight:   float32(w.app.Preferences().Float(prefList)),
	}
	f.gripSide = newGrip(true, func(by float32) {
		f.detailsWidth = max(detailsLeast, f.details.Size().Width-by)
		w.relayout()
	}, func() { w.app.Preferences().SetFloat(prefDetails, float64(f.detailsWidth)) })
	f.gripList = newGrip(false, func(by float32) {
		f.listHeight = max(listLeast, f.list.Size().Height-by)
		w.relayout()
	}, func() { w.app.Preferences().SetFloat(prefList, float64(f.listHeight)) })
	w.frame = f
	w.content = &fyne.Container{Layout: f, Objects: f.objects()}
	w.view.OnActivated = func(string) { w.focusDetails() }
}

// changed follows the desk.
func (w *Window) changed(c Changed) {
	if c&ChangedDocument != 0 {
		w.quiet = ""
	}
	w.win.SetTitle(w.title())
	w.cmds.follow(w.desk)
	w.status.SetText(w.statusText())
	if w.menu != nil {
		w.menu.follow()
	}
	w.keeper.changed(c)
	w.trace.changed(c)
}

// title is the design's name with a mark while it isn't saved.
func (w *Window) title() string {
	mark := ""
	if w.desk.Dirty() {
		mark = "*"
	}
	return fmt.Sprintf("%s%s – Packrise", w.desk.Name(), mark)
}

func (w *Window) statusText() string {
	if w.quiet != "" {
		return w.quiet
	}
	return w.desk.Status()
}

// say writes into the quiet line until the document changes.
func (w *Window) say(s string) {
	w.quiet = s
	w.status.SetText(w.statusText())
}

func (w *Window) relayout() {
	if w.content != nil {
		w.content.Layout.Layout(w.content.Objects, w.content.Size())
	}
}

// toggleDetails folds the details away or opens them.
func (w *Window) toggleDetails() {
	show := !w.frame.showsDetails(w.frame.size.Width)
	w.frame.detailsShown = &show
	w.relayout()
}

// focusDetails opens the details and puts the keyboard into them.
func (w *Window) focusDetails() {
	show := true
	w.frame.detailsShown = &show
	w.relayout()
	if f, ok := w.frame.details.(interface{ FocusFirst() }); ok {
		f.FocusFirst()
	}
	w.trace.line("focus %T", w.win.Canvas().Focused())
}

// Show puts the window on the screen.
func (w *Window) Show() { w.win.Show() }

// ShowAndRun shows the window and runs the program until it is closed.
func (w *Window) ShowAndRun() {
	w.win.Show()
	w.app.Run()
	w.Close()
}

// Close ends what runs beside the window.
func (w *Window) Close() {
	w.keeper.close(w.decided)
	w.asks.close()
	w.view.Close()
	w.desk.Close()
}

// quit closes the window, after the question about unsaved work.
func (w *Window) quit() {
	if w.saving {
		w.savedBy = append(w.savedBy, w.quit)
		return
	}
	w.guard("closing", func() {
		w.decided = true
		size := w.win.Canvas().Size()
		w.app.Preferences().SetFloat(prefWidth, float64(size.Width))
		w.app.Preferences().SetFloat(prefHeight, float64(size.Height))
		w.win.SetCloseIntercept(nil)
		w.desk.mute()
		w.win.Close()
	})
}
