package section

import "slices"

// Surround returns the document in surroundings of another kind. What belongs to both kinds stays, what does not is dropped; keys that the new
// kind needs are left for set, which may be nil.
func Surround(d *Document, kind string, set func(*Surroundings)) *Document {
	return d.With(func(d *Document) {
		s := &d.Surroundings
		s.Kind = kind
		for _, k := range kindKeys {
			if !slices.Contains(k.kinds, kind) {
				k.drop(s)
			}
		}
		if set != nil {
			set(s)
		}
	})
}

// RestAgainst returns the document with a part of its outside resting against something; nil takes that away.
func RestAgainst(d *Document, a *Against) *Document {
	return d.With(func(d *Document) {
		d.Surroundings.Against = nil
		if a != nil {
			b := *a
			d.Surroundings.Against = &b
		}
	})
}
