package rules

// fillLimits are the shares of a holder's inside that may be taken, by the number of conductors and cables in it; 0 is no limit of its own.
type fillLimits struct {
	One    float64 `yaml:"one,omitempty"`
	Two    float64 `yaml:"two,omitempty"`
	More   float64 `yaml:"more"`
	Nipple float64 `yaml:"nipple,omitempty"` // in a short raceway, whatever the number
}

// limit returns the share for so many conductors.
func (l fillLimits) limit(n int, nipple bool) float64 {
	switch {
	case nipple && l.Nipple > 0:
		return l.Nipple
	case n == 1 && l.One > 0:
		return l.One
	case n == 2 && l.Two > 0:
		return l.Two
	}
	return l.More
}
