package ui

import "packrise/solver/section"

// around tells what meets the outside here and there: sides that are not open, what it rests against, what it may have to be touched.
func (t *telling) around(in []*input) {
	t.sides(in)
	t.rests()
	h := t.doc.Holder
	if h.ClearanceMM.OK {
		if c := inputNamed(in, "clearance"); c != nil {
			t.add(say("Parts that seem to touch stand "), word(c), say(" apart on average."))
		}
	}
	if h.StringEmissivity.OK {
		if e := inputNamed(in, "string-emissivity"); e != nil {
			t.add(say("Its strings have an emissivity of "), word(e), say("."))
		}
	}
	if h.TouchLimitC.OK {
		t.add(say("Its outside may reach "), word(inputNamed(in, "touch")), say(" where people can touch it."))
	}
}

// sides tells of a wireway's sides that are insulated or held.
func (t *telling) sides(in []*input) {
	sides := t.doc.Holder.Sides
	var told paragraph
	for _, n := range sideNames {
		if kind := n.of(&sides).Kind; kind == "" || kind == section.SideOpen {
			continue
		}
		side := inputNamed(in, n.key)
		if side == nil {
			continue
		}
		if len(told) > 0 {
			told = append(told, say("; "))
		}
		told = append(told, say(n.side+" is "), word(side))
	}
	if len(told) > 0 {
		told[0].text = upperFirst(told[0].text)
		t.out = append(t.out, append(told, say(".")))
	}
}

// rests tells what a part of the outside rests against.
func (t *telling) rests() {
	in := againstInputs(t.k)
	if len(in) < 3 {
		return
	}
	rest, at, share := in[0], in[1], in[2]
	t.add(word(share), say(" of its outside rests against something "), word(rest), say(", "), word(at), say("."))
}
