package section

// checkApart keeps bodies apart to surroundings that leave each an outside of its own.
func checkApart(r *report, d *Document) {
	if d.Holder.Kind != Apart {
		return
	}
	at := path("").key("surroundings").key("kind")
	switch d.Surroundings.Kind {
	case FixedWall:
		r.add(at, "apart-outside", "¤ fixed-wall holds the one outer surface of a section, and bodies apart have several", "write kind: fixed-film with a large film_w_m2k, or draw each body by itself")
	case Insulation:
		r.add(at, "apart-outside", "¤ insulation wraps a section as a whole, and bodies apart are not one", "write holder kind: open-bundle to wrap them together, or give each part the insulation as its outermost layer")
	}
}
