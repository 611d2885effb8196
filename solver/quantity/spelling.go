package quantity

// SpellingDistance is the number of letters to insert, delete, change or swap with their neighbour that turn a into b (optimal string
// alignment), for suggesting what a person may have meant. Texts of over 80 letters are only compared by length.
func SpellingDistance(a, b string) int {
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
