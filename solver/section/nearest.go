package section

import (
	"strings"
	"unicode/utf8"
)

// nearest returns the word of list that is spelt most like word, "" if none is near. Distance is the number of single letters to
// add, drop, change or swap with the neighbour (optimal string alignment), letters compared without case; up to a third of the
// letters may differ. A word without its unit ("inside" for "inside_mm") is near.
func nearest(word string, list []string) string {
	word = strings.ToLower(word)
	best, bestD := "", max(1, utf8.RuneCountInString(word)/3)+1
	for _, w := range list {
		d := distance(word, strings.ToLower(w))
		if word != "" && strings.HasPrefix(w, word+"_") {
			d = min(d, 1)
		}
		if d < bestD && d < utf8.RuneCountInString(w) {
			best, bestD = w, d
		}
	}
	return best
}

func distance(a, b string) int {
	s, t := []rune(a), []rune(b)
	if len(s) > 80 || len(t) > 80 {
		return max(len(s), len(t))
	}
	before, last, row := make([]int, len(t)+1), make([]int, len(t)+1), make([]int, len(t)+1)
	for j := range last {
		last[j] = j
	}
	for i := 1; i <= len(s); i++ {
		row[0] = i
		for j := 1; j <= len(t); j++ {
			cost := 1
			if s[i-1] == t[j-1] {
				cost = 0
			}
			row[j] = min(last[j]+1, row[j-1]+1, last[j-1]+cost)
			if i > 1 && j > 1 && s[i-1] == t[j-2] && s[i-2] == t[j-1] {
				row[j] = min(row[j], before[j-2]+1)
			}
		}
		before, last, row = last, row, before
	}
	return last[len(t)]
}
