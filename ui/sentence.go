package ui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/theme"
	"fyne.io/fyne/v2/widget"
)

// SentenceView is the answer on top of the window: a coloured edge, the sentence, and below it what is assumed. Both wrap and never clip.
type SentenceView struct {
	widget.BaseWidget

	// OnProblems is called by the words that lead to the list of problems.
	OnProblems func()
	// OnAssumed is called by the words that lead to what is assumed about the surroundings.
	OnAssumed func()

	desk    *Desk
	edge    *fill
	answer  *prose
	assumed *prose
	width   float32
	moved   func() // the height may have changed
}

// NewSentenceView shows the desk's answer; moved is called when its height may have changed.
func NewSentenceView(k *Desk, moved func()) *SentenceView {
	v := &SentenceView{desk: k, moved: moved}
	v.edge = newFill(ColorNameUnknown)
	v.edge.rect.CornerRadius = 2
	v.answer, v.assumed = newProse(k), newProse(k)
	v.answer.size = func() float32 { return theme.CurrentForWidget(v.answer).Size(theme.SizeNameSubHeadingText) }
	v.ExtendBaseWidget(v)
	v.write()
	k.Listen(func(Changed) { v.write() })
	return v
}

// write puts the desk's sentence into the widget.
func (v *SentenceView) write() {
	answer, assumed, state := v.desk.Sentence()
	before := v.heightFor(v.width)
	v.answer.say(run{text: answer, tone: strong})
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
		Over:    theme.ColorNameError,
		Refusal: ColorNameRefusal,
	}[s])
}

const (
	sentenceMargin = 12
	sentenceEdge   = 5
	sentenceGap    = 10
)

// heightFor returns the height at a width.
func (v *SentenceView) heightFor(width float32) float32 {
	w := max(80, width-2*sentenceMargin-sentenceEdge-sentenceGap)
	h := v.answer.heightFor(w) + 2*sentenceMargin
	if len(v.assumed.runs) > 0 && v.assumed.String() != "" {
		h += v.assumed.heightFor(w) + 4
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
	return []fyne.CanvasObject{r.v.edge, r.v.answer, r.v.assumed}
}

func (r *sentenceRenderer) Layout(s fyne.Size) {
	v := r.v
	v.width = s.Width
	v.edge.Move(fyne.NewPos(sentenceMargin, sentenceMargin))
	v.edge.Resize(fyne.NewSize(sentenceEdge, max(4, s.Height-2*sentenceMargin)))
	x := float32(sentenceMargin + sentenceEdge + sentenceGap)
	w := s.Width - x - sentenceMargin
	h := v.answer.heightFor(w)
	v.answer.Move(fyne.NewPos(x, sentenceMargin))
	v.answer.Resize(fyne.NewSize(w, h))
	v.assumed.Move(fyne.NewPos(x, sentenceMargin+h+4))
	v.assumed.Resize(fyne.NewSize(w, v.assumed.heightFor(w)))
}

func (r *sentenceRenderer) Refresh() {
	r.v.edge.Refresh()
	r.v.answer.Refresh()
	r.v.assumed.Refresh()
	r.Layout(r.v.Size())
}
