package pack

// SmallestHolder searches for the smallest circle into which the radii fit; it returns centres about the origin and the circle's radius.
func SmallestHolder(radii []float64, seed uint64) ([]Disc, float64) {
	best, r := LayUp(radii)
	if len(radii) == 0 {
		return best, r
	}
	for _, largest := range []bool{false, true} {
		if d, nr, ok := nested(radii, largest); ok && nr < r {
			best, r = d, nr
		}
	}
	return best, r
}
