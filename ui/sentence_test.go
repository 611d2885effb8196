package ui

import (
	"context"
	"strings"
	"testing"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/theme"

	"packrise/solver/catalog"
	"packrise/solver/rating"
	"packrise/solver/section"
	"packrise/solver/study"
)

func TestSentenceTellsTheAnswer(t *testing.T) {
	k, l := testDesk(t, testDesign())
	l.solved(t, k)
	v := NewSentenceView(k, nil)
	if s := v.answer.String(); !strings.HasPrefix(s, "Within. ") || v.edge.name != theme.ColorNamePrimary {
		t.Errorf("%q with an edge of %s", s, v.edge.name)
	}
	if s := v.assumed.String(); !strings.Contains(s, "Ambient 30 °C") {
		t.Errorf("assumed: %q", s)
	}
	k.Apply(section.Edit{Name: "set", Do: func(d *section.Document) *section.Document {
		return section.SetCurrent(d, "L1", section.Some(60.0))
	}}, false)
	l.solved(t, k)
	if s := v.answer.String(); !strings.HasPrefix(s, "Over. ") || v.edge.name != theme.ColorNameError {
		t.Errorf("%q with an edge of %s", s, v.edge.name)
	}
}

func TestSentenceWrapsAndNeverClips(t *testing.T) {
	problem := section.Problem{Rule: "overlap", IDs: []string{"L1"}, What: strings.Repeat("L1 and L2 overlap by 0.3 mm and ", 6) + "so on", Do: "move one of them"}
	refuse := Rooms{
		Solve: func(context.Context, *section.Document, rating.Options) (*rating.Result, []section.Problem, error) {
			return nil, []section.Problem{problem, problem}, nil
		},
		Outline: func(d *section.Document, _ *catalog.Catalog) ([]section.Shape, []section.Problem) {
			return fakeShapes(d), []section.Problem{problem, problem}
		},
	}
	k, l := testDeskWith(t, testDesign(), refuse)
	l.until(t, "the refusal", func() bool { return !k.Solving() })
	v := NewSentenceView(k, nil)
	wide, narrow := v.heightFor(1400), v.heightFor(500)
	if narrow <= wide {
		t.Errorf("%g high at 1400, %g at 500", wide, narrow)
	}
	v.Resize(fyne.NewSize(500, narrow))
	for _, p := range append(v.answer.pieces, v.assumed.pieces...) {
		if p.at.X+p.size.Width > 500-sentenceMargin+1 {
			t.Errorf("%q reaches to %g of 500", p.text, p.at.X+p.size.Width)
		}
	}
	if s := v.assumed.String(); !strings.Contains(s, "One more problem") || !strings.Contains(s, "Show all 2 problems") || v.edge.name != ColorNameRefusal {
		t.Errorf("%q with an edge of %s", s, v.edge.name)
	}
	shown := 0
	v.OnProblems = func() { shown++ }
	last := v.assumed.runs[len(v.assumed.runs)-1]
	last.tap()
	if shown != 1 {
		t.Error("the words that lead to the problems lead nowhere")
	}
}

// TestSentenceKeepsItsHeight: nothing below moves while ratings are worked out anew.
func TestSentenceKeepsItsHeight(t *testing.T) {
	f := newFakeRater()
	k, l := testDeskWith(t, testDesign(), Rooms{Rate: f.rate})
	v := NewSentenceView(k, nil)
	heights := map[float32]bool{}
	note := func() { heights[v.heightFor(1000)] = true }
	l.solved(t, k)
	note()
	f.next <- study.StageBands
	l.until(t, "the bands", func() bool { return k.Ratings() != nil })
	note()
	if !strings.Contains(v.amperes.String(), "to rely on") {
		t.Errorf("it says %q", v.amperes.String())
	}
	k.Apply(setAmperes(15), false)
	note()
	l.solved(t, k)
	note()
	if len(heights) != 1 {
		t.Errorf("heights %v", heights)
	}
}

// TestSentenceOfACloseDesign: a state of its own, told by word and edge.
func TestSentenceOfACloseDesign(t *testing.T) {
	near := func(_ context.Context, d *section.Document, base *rating.Result, _ study.Options) (*study.Ratings, error) {
		r := &study.Ratings{Permits: study.Permits{Base: base}, Doc: d, State: study.Close, StateHere: study.Close, Done: study.Last, Bands: &study.Bands{}}
		for range len(base.Conductors) + len(base.Others) {
			r.Bands.Spreads = append(r.Bands.Spreads, study.Spread{LowK: 5, HighK: 200})
		}
		return r, nil
	}
	k, l := testDeskWith(t, testDesign(), Rooms{Rate: near})
	l.until(t, "ratings", func() bool { return k.Ratings() != nil })
	v := NewSentenceView(k, nil)
	if s := v.answer.String(); !strings.HasPrefix(s, "Close. ") || v.edge.name != ColorNameClose {
		t.Errorf("%q with an edge of %s", s, v.edge.name)
	}
}
