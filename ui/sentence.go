package ui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"
)

// SentenceView is the answer on top of the window: a coloured edge, the sentence, the amperes, and below them what is assumed. All wrap and never
// clip. Its height stays while ratings come and go.
type SentenceView struct {
	widget.BaseWidget

	// OnProblems is called by the words that lead to the list of problems.
	OnProblems func()
	// OnAssumed is called by the words that lead to what is assumed about the surroundings.
	OnAssumed func()

	desk    *Desk
	edge    *fill
	answer  *prose
	amperes *prose
	assumed *prose
	width   float32
	kept    reserve
	moved   func() // the height may have changed
}

// NewSentenceView shows the desk's answer; moved is called when its height may have changed.
func NewSentenceView(k *Desk, moved func()) *SentenceView {
	v := &SentenceView{desk: k, moved: moved}
	v.edge = newFill(ColorNameUnknown)
	v.edge.rect.CornerRadius = 2
	v.answer, v.amperes, v.assumed = newProse(k), newProse(k), newProse(k)
	v.answer.size = func() float32 { return theme.CurrentForWidget(v.answer).Size(theme.SizeNameSubHeadingText) }
	v.ExtendBaseWidget(v)
	v.write()
	k.Listen(func(c Changed) {
		if c&ChangedDocument != 0 && c&ChangedFile != 0 { // another design
			v.kept = reserve{}
		}
		v.write()
	})
	return v
}

// write puts the desk's sentence into the widget.
func (v *SentenceView) write() {
	answer, assumed, state := v.desk.Sentence()
	before := v.heightFor(v.width)
	v.answer.say(run{text: unbroken(answer), tone: strong})
	a := v.desk.amperes()
	a.text = unbroken(a.text)
	v.amperes.say(amperesRun(a))
	runs := []run{{text: assumed, tone: quiet}}
	link := func(text string, f *func()) {
		if runs[len(runs)-1].text != "" {
			runs = append(runs, run{text: "  ", tone: quiet})
		}
		runs = append(runs, run{text: text, tap: func() {
			if *f != nil {
				(*f)()
			}
		}})
	}
	if assumed != "" && state != Refusal && len(v.desk.Document().Parts) > 0 {
		link("Change", &v.OnAssumed)
	}
	if n := len(v.desk.Problems()); n > 0 && len(v.desk.Document().Parts) > 0 {
		link(problemCount(n), &v.OnProblems)
	}
	v.assumed.say(runs...)
	v.paint(state)
	if v.moved != nil && v.heightFor(v.width) != before {
		v.moved()
	}
}

// amperesRun gives the line of permitted currents its ink.
func amperesRun(a amperes) run {
	switch {
	case a.waits:
		return run{text: a.text, tone: quiet}
	case a.wrong:
		return run{text: a.text, tone: strong}
	}
	return run{text: a.text}
}

func problemCount(n int) string {
	if n == 1 {
		return "Show the problem"
	}
	return "Show all " + written(float64(n)) + " problems"
}

// paint gives the edge the state's colour.
func (v *SentenceView) paint(s State) {
	v.edge.tint(map[State]fyne.ThemeColorName{
		Unknown: ColorNameUnknown,
		Within:  theme.ColorNamePrimary,
		Close:   ColorNameClose,
		Over:    theme.ColorNameError,
		Refusal: ColorNameRefusal,
	}[s])
}

const (
	sentenceMargin = 12
	sentenceEdge   = 5
	sentenceGap    = 10
)

// reserve keeps the room that the lines have needed at a width, so that nothing below them moves while they are being worked out.
type reserve struct {
	width          float32
	answer, amount float32
}

// amperesLeast is how many lines are kept for the amperes where a section has any parts.
const amperesLeast = 2

// heights returns the room of the answer and the amperes at a width of text.
func (v *SentenceView) heights(w float32) (answer, amount float32) {
	if v.kept.width != w {
		v.kept = reserve{width: w}
	}
	k := &v.kept
	if len(v.desk.Document().Parts) == 0 {
		return v.answer.heightFor(w), 0
	}
	line := textExtent("Mg", v.amperes.textSize(), fyne.TextStyle{}).Height
	k.answer = max(k.answer, v.answer.heightFor(w))
	k.amount = max(k.amount, amperesLeast*line+(amperesLeast-1)*proseLeading, v.amperes.heightFor(w))
	return k.answer, k.amount
}

// heightFor returns the height at a width.
func (v *SentenceView) heightFor(width float32) float32 {
	w := max(80, width-2*sentenceMargin-sentenceEdge-sentenceGap)
	answer, amount := v.heights(w)
	h := answer + 2*sentenceMargin
	if amount > 0 {
		h += amount + proseLeading
	}
	if len(v.assumed.runs) > 0 && v.assumed.String() != "" {
		h += v.assumed.heightFor(w) + proseLeading
	}
	return h
}

// MinSize is the height at the width laid out last.
func (v *SentenceView) MinSize() fyne.Size {
	v.ExtendBaseWidget(v)
	return fyne.NewSize(200, v.heightFor(max(v.width, 200)))
}

// CreateRenderer is for the toolkit.
func (v *SentenceView) CreateRenderer() fyne.WidgetRenderer { return &sentenceRenderer{v} }

type sentenceRenderer struct{ v *SentenceView }

func (r *sentenceRenderer) Destroy()           {}
func (r *sentenceRenderer) MinSize() fyne.Size { return r.v.MinSize() }

func (r *sentenceRenderer) Objects() []fyne.CanvasObject {
	return []fyne.CanvasObject{r.v.edge, r.v.answer, r.v.amperes, r.v.assumed}
}

func (r *sentenceRenderer) Layout(s fyne.Size) {
	v := r.v
	v.width = s.Width
	v.edge.Move(fyne.NewPos(sentenceMargin, sentenceMargin))
	v.edge.Resize(fyne.NewSize(sentenceEdge, max(4, s.Height-2*sentenceMargin)))
	x := float32(sentenceMargin + sentenceEdge + sentenceGap)
	w := s.Width - x - sentenceMargin
	y := float32(sentenceMargin)
	place := func(p *prose, room float32) {
		p.Move(fyne.NewPos(x, y))
		p.Resize(fyne.NewSize(w, room))
		if room > 0 {
			y += room + proseLeading
		}
	}
	answer, amount := v.heights(max(80, w))
	place(v.answer, answer)
	place(v.amperes, amount)
	place(v.assumed, v.assumed.heightFor(w))
}

func (r *sentenceRenderer) Refresh() {
	r.v.edge.Refresh()
	r.v.answer.Refresh()
	r.v.amperes.Refresh()
	r.v.assumed.Refresh()
	r.Layout(r.v.Size())
}
