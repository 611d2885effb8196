package section

import (
	"strings"
	"unicode/utf8"

	"packrise/solver/quantity"
)

// nearest returns the word of list that is spelt most like word, "" if none is near. Distance is the number of single letters to
// add, drop, change or swap with the neighbour (optimal string alignment), letters compared without case; up to a third of the
// letters may differ. A word without its unit ("inside" for "inside_mm") is near.
func nearest(word string, list []string) string {
	word = strings.ToLower(word)
	best, bestD := "", max(1, utf8.RuneCountInString(word)/3)+1
	for _, w := range list {
		d := quantity.SpellingDistance(word, strings.ToLower(w))
		if word != "" && strings.HasPrefix(w, word+"_") {
			d = min(d, 1)
		}
		if d < bestD && d < utf8.RuneCountInString(w) {
			best, bestD = w, d
		}
	}
	return best
}
