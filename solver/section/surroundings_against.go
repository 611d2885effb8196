package section

import "gopkg.in/yaml.v3"

// Against is where a part of the outline rests against a wall or a floor. Its middle lies where a ray from the outline's centre (the centroid of its
// area; of a round one its centre) in the direction AtDeg meets it, half of it to each side by length.
type Against struct {
	AtDeg float64 // counterclockwise from +x: −90 is below
	Share float64 // of the perimeter, above 0 and at most 1
	Is    Side    // SideInsulated, or SideFixed: the outer surface is held at FixedC there
}

// restCodec is the codec of what the outline rests against: insulated or {fixed_c: …}.
type restCodec struct{}

func (restCodec) read(r *report, n *yaml.Node, at path) Side { return sideCodec{}.read(r, n, at) }
func (restCodec) node(s Side) *yaml.Node                     { return sideCodec{}.node(s) }

func (restCodec) check(r *report, s Side, at path) {
	if s.Kind == SideFixed {
		fixedTable.check(r, s, at)
		return
	}
	switch {
	case s.FixedC != 0:
		r.add(at, "key-of-kind", "¤ has a temperature but is not held at one", "write {fixed_c: …}")
	case s.Kind != SideInsulated:
		r.add(at, "unknown-word", "¤ is "+show(s.Kind)+", but what the outside rests against insulates or has a temperature", "write insulated, or {fixed_c: …}")
	}
}

var againstTable = &table[Against]{
	what: "against",
	fields: []field[Against]{
		need(on("at_deg", func(a *Against) *float64 { return &a.AtDeg }, number{between(-360, 360, "degrees")})),
		need(on("share", func(a *Against) *float64 { return &a.Share }, number{emissive})),
		need(on[Against, Side]("is", func(a *Against) *Side { return &a.Is }, restCodec{})),
	},
	rules: func(r *report, a *Against, at path) {
		if a.Share == 1 && a.Is.Kind == SideInsulated {
			r.add(at.key("share"), "no-way-out", "the whole outside rests against something insulating: no heat can leave", "write a smaller share, or is: {fixed_c: …}")
		}
	},
}

// checkAgainst keeps against to holders with one outline that is no rectangle.
func checkAgainst(r *report, d *Document) {
	if d.Surroundings.Against == nil {
		return
	}
	at := path("").key("surroundings").key("against")
	switch d.Holder.Kind {
	case Wireway:
		r.add(at, "key-of-kind", "¤ does not belong to a wireway, whose sides are told one by one", "take it out, and use holder.sides")
	case Apart:
		r.add(at, "key-of-kind", "¤ does not belong to bodies apart, each of which has an outside of its own", "take it out, or draw the body that rests against something by itself")
	}
}
