package ui

import (
	"context"
	"math"

	"fyne.io/fyne/v2"

	"packrise/solver/quantity"
	"packrise/solver/section"
	"packrise/solver/study"
)

// seatingSeed begins the search: the same design gives the same answer.
const seatingSeed = 1

// showSeating searches for the best seating.
func (a *asks) showSeating() {
	a.askIn("Best seating", fyne.NewSize(560, 360), &askSheet{
		before: "Conductors of equal outside diameter change places until no exchange gives more margin. Pinned parts stay, and the parts of a group keep the group's places.",
		work: func(ctx context.Context, s *study.Study, d *section.Document, o study.Options) (any, error) {
			return s.Seat(ctx, d, seatingSeed, o)
		},
		answered: func(answer any) ([]string, []fyne.CanvasObject) {
			s := answer.(*study.Seating)
			if len(s.Swaps) == 0 {
				return seatingWords(s), nil
			}
			return seatingWords(s), []fyne.CanvasObject{a.applyButton("Apply", "best seating", s.Doc)}
		},
	})
}

// seatingWords say what a search found, a sentence each.
func seatingWords(s *study.Seating) []string {
	if s.Why != "" {
		return []string{upperFirst(fullStop(s.Why))}
	}
	out := []string{
		"As it is: " + seatWords(&s.Present),
		"Random seatings: " + wholeKelvins(s.MeanK) + " of margin on average, " + wholeKelvins(s.WorstK) + " in the worst of " + written(float64(s.Random)) + ", by estimate.",
	}
	if len(s.Swaps) == 0 {
		out = append(out, "No seating that was tried has more margin: leave it as it is.")
	} else {
		out = append(out, "The best that was found: "+seatWords(&s.Best))
		text := counted(len(s.Swaps), "part") + " would move: "
		var moves []string
		for _, w := range s.Swaps {
			moves = append(moves, w[0]+" to the place of "+w[1])
		}
		out = append(out, text+someIDs(moves, 8)+".")
	}
	return append(out, counted(s.Movable, "conductor")+" could change places, "+written(float64(s.Fixed))+" could not; "+
		counted(s.Searched, "seating")+" estimated, "+written(float64(s.Solved))+" solved in full.")
}

func seatWords(s *study.Seat) string {
	limit := s.TempC + s.MarginK
	return withUnit(marginWords(s.TempC, limit), "K") + " of margin, " + s.Governs + " governs at " + withUnit(degrees(s.TempC, section.Some(limit)), "°C") +
		"; all loads together could be " + study.Percent(s.Factor) + " of what they are, by the limits alone."
}

// wholeKelvins is a difference in whole kelvins.
func wholeKelvins(k float64) string {
	if math.IsInf(k, 0) || math.IsNaN(k) {
		return "nothing"
	}
	return withUnit(quantity.Trimmed(k, 0), "K")
}
