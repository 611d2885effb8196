package section

func checkTerminals(r *report, t *Terminals, at path) {
	if t.RatingC.OK && t.RatedA.OK {
		r.addWhole(at, "one-of", "¤ has both rating_c and rated_a", "keep one of them")
	}
}
