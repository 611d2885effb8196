package ui

import (
	"context"
	"errors"
	"strings"
	"testing"

	"packrise/solver/rating"
	"packrise/solver/section"
	"packrise/solver/study"
)

// fakeRater rates a stage whenever the test says so.
type fakeRater struct {
	asked chan *section.Document
	ended chan *section.Document // given up because the document is another one
	next  chan study.Stage
}

func newFakeRater() *fakeRater {
	return &fakeRater{asked: make(chan *section.Document, 10), ended: make(chan *section.Document, 10), next: make(chan study.Stage)}
}

func (f *fakeRater) rate(ctx context.Context, d *section.Document, base *rating.Result, o study.Options) (*study.Ratings, error) {
	f.asked <- d
	for {
		select {
		case <-ctx.Done():
			f.ended <- d
			return nil, ctx.Err()
		case s := <-f.next:
			r := &study.Ratings{Permits: study.Permits{Base: base}, Doc: d, State: study.Within, Done: s}
			r.All.Nominal.Factor, r.All.Rely.Factor = 1.5, 1.2
			o.Stage(r)
			if s == study.Last {
				return r, nil
			}
		}
	}
}

func setAmperes(a float64) section.Edit {
	return section.Edit{Name: "set", Do: func(d *section.Document) *section.Document {
		return section.SetCurrent(d, "L1", section.Some(a))
	}}
}

func TestDeskRatesWhatItAnswered(t *testing.T) {
	f := newFakeRater()
	k, l := testDeskWith(t, testDesign(), Rooms{Rate: f.rate})
	h := listenTo(k)
	l.solved(t, k)
	if k.Ratings() != nil || !k.Rating() {
		t.Fatal("ratings are there before they were worked out")
	}
	f.next <- study.StageAll
	l.until(t, "the first stage", func() bool { return k.Ratings() != nil })
	if r, _ := k.shownRatings(); r != nil {
		t.Error("currents are shown before they can be relied on")
	}
	if text, known := k.Amperes(); known || text != "Working out what it may carry …" {
		t.Errorf("it says %q", text)
	}
	f.next <- study.StageBands
	l.until(t, "the bands", func() bool { return k.Ratings().Done == study.StageBands })
	if text, known := k.Amperes(); !known || !strings.Contains(text, "may carry 19.2 A to rely on, 24 A nominal") {
		t.Errorf("16 A × 1.2 and × 1.5: it says %q", text)
	}
	f.next <- study.Last
	l.until(t, "the last stage", func() bool { return !k.Rating() })
	if r, aged := k.shownRatings(); r == nil || aged || h.told()&ChangedRatings == 0 {
		t.Error("whole ratings are not shown as they are, or not told of")
	}
	if d := <-f.asked; d != k.Document() {
		t.Error("another document was rated")
	}
}

func TestDeskInterruptsRatingsOfAnOlderDocument(t *testing.T) {
	f := newFakeRater()
	k, l := testDeskWith(t, testDesign(), Rooms{Rate: f.rate})
	l.solved(t, k)
	first := <-f.asked
	f.next <- study.StageBands
	l.until(t, "a stage", func() bool { return k.Ratings() != nil })
	h := listenTo(k)
	k.Apply(setAmperes(10), false)
	if k.Ratings() != nil || h.told()&ChangedRatings == 0 {
		t.Error("ratings of an older document are still given out, or their end is not told")
	}
	if d := <-f.ended; d != first {
		t.Error("another rating was given up")
	}
	if r, aged := k.shownRatings(); r == nil || !aged {
		t.Error("the old ratings are not kept, greyed")
	}
	l.solved(t, k)
	if d := <-f.asked; d != k.Document() {
		t.Error("the new document is not rated")
	}
	f.next <- study.Last
	l.until(t, "the ratings", func() bool { return k.Ratings() != nil && !k.Rating() })
}

func TestDeskDoesNotRateWithinADrag(t *testing.T) {
	f := newFakeRater()
	k, l := testDeskWith(t, testDesign(), Rooms{Rate: f.rate})
	l.solved(t, k)
	<-f.asked
	g := k.NewGesture()
	k.Drag(moveTo("L1", -4.5, 0, g))
	<-f.ended
	l.until(t, "a frame", func() bool { return !k.Solving() })
	if text, _ := k.Amperes(); text != "What it may carry follows at the end of the drag." {
		t.Errorf("within a drag it says %q", text)
	}
	select {
	case <-f.asked:
		t.Error("a frame of a drag is rated")
	default:
	}
	k.Drop(moveTo("L1", -5, 0, g))
	l.until(t, "the drop", func() bool { return !k.Drafting() })
	l.solved(t, k)
	if d := <-f.asked; d != k.Document() {
		t.Error("what was dropped is not rated")
	}
}

func TestDeskKeepsWhyNothingIsRated(t *testing.T) {
	d := section.Unassign(testDesign(), "L3")
	k, l := testDeskWith(t, d, Rooms{Rate: rateOnce})
	l.solved(t, k)
	l.until(t, "the refusal", func() bool { return !k.Rating() })
	v := NewSentenceView(k, nil)
	if got := v.amperes.String(); !strings.HasPrefix(got, "No permitted currents: the currents of L3 are unknown") || len(k.RatingRefusal()) == 0 {
		t.Errorf("it says %q", got)
	}
	if r, _ := k.shownRatings(); r != nil || k.Ratings() != nil {
		t.Error("ratings of a design that can't be rated")
	}
}

func TestDeskTellsOfAFailure(t *testing.T) {
	fail := func(context.Context, *section.Document, *rating.Result, study.Options) (*study.Ratings, error) {
		return nil, errors.New("no memory")
	}
	k, l := testDeskWith(t, testDesign(), Rooms{Rate: fail})
	l.until(t, "the failure", func() bool { return k.RatingFailure() != nil })
	if text, known := k.Amperes(); known || !strings.Contains(text, "no memory") {
		t.Errorf("it says %q", text)
	}
}

// TestDeskRatesForReal goes through the program's own ratings and holds the sentence to them.
func TestDeskRatesForReal(t *testing.T) {
	k, l := testDeskWith(t, testDesign(), Rooms{Rate: rateOnce})
	v := NewSentenceView(k, nil)
	l.until(t, "ratings", func() bool { return k.Ratings() != nil && !k.Rating() })
	r := k.Ratings()
	answer, amperes := r.Sentence()
	if v.answer.String() != unbroken(answer) || v.amperes.String() != unbroken(amperes) || !strings.Contains(answer, "–") {
		t.Errorf("it says %q, %q; want %q, %q", v.answer.String(), v.amperes.String(), answer, amperes)
	}
	if !(r.All.Rely.Factor < r.All.Nominal.Factor) {
		t.Errorf("to rely on %g, nominal %g", r.All.Rely.Factor, r.All.Nominal.Factor)
	}
	if b := k.Scene().Bands["L1"]; !(b[0] < b[1]) {
		t.Errorf("the ladder gets no band: %v", b)
	}
	if got := v.assumed.String(); !strings.Contains(got, "protection unknown for 1 load") {
		t.Errorf("assumed: %q", got)
	}
}
