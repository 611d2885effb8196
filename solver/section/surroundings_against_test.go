package section

import (
	"strings"
	"testing"
)

// badAgainst: what a part of the outside rests against.
func badAgainst() []bad {
	in := func(kind, against string) string {
		return strings.Replace(head, "{kind: fixed-wall, ambient_c: 30}", "{ambient_c: 30, kind: "+kind+", against: {"+against+"}}", 1)
	}
	one := func(name, against, rule, fragments string) bad {
		return bad{name, in("still-air", against), []wanted{{2, rule, fragments}}}
	}
	const floor = "at_deg: -90, share: 0.25, is: insulated"
	return []bad{
		one("no place", "share: 0.2, is: insulated", "missing-key", "`surroundings.against.at_deg` is missing"),
		one("no share", "at_deg: 0, is: insulated", "missing-key", "`surroundings.against.share` is missing"),
		one("no end", "at_deg: 0, share: 0.2", "missing-key", "`surroundings.against.is` is missing"),
		one("share of nothing", "at_deg: 0, share: 0, is: insulated", "number-range", "`surroundings.against.share` is 0, but must lie above 0 and not above 1"),
		one("more than all", "at_deg: 0, share: 1.2, is: insulated", "number-range", "is 1.2, but must lie above 0 and not above 1"),
		one("round and round", "at_deg: 400, share: 0.2, is: insulated", "number-range", "is 400, but must lie between −360 and 360 degrees"),
		one("open", "at_deg: 0, share: 0.2, is: open", "unknown-word", "`surroundings.against.is` is open, but what the outside rests against insulates or has a temperature|write insulated, or {fixed_c: …}"),
		one("held at nothing", "at_deg: 0, share: 0.2, is: {}", "missing-key", "`surroundings.against.is.fixed_c` is missing"),
		one("below absolute zero", "at_deg: 0, share: 0.2, is: {fixed_c: -300}", "number-range", "below absolute zero"),
		one("misspelt", "at_deg: 0, share: 0.2, is: insulated, shar: 1", "unknown-key", "`surroundings.against.shar`"),
		one("no way out", "at_deg: 0, share: 1, is: insulated", "no-way-out", "no heat can leave|smaller share, or is: {fixed_c: …}"),
		{"buried", in("buried, depth_m: 1, soil_w_mk: 1", floor), []wanted{{2, "key-of-kind", "`surroundings.against` does not belong to kind buried: soil lies all round it"}}},
		{"held all round", in("fixed-wall", floor), []wanted{{2, "key-of-kind", "does not belong to kind fixed-wall, which holds the whole outer surface at ambient_c"}}},
		{
			"wireway", strings.Replace(in("still-air", floor), "{kind: jacket, inside_mm: 10}", "{kind: wireway, width_mm: 9, height_mm: 9}", 1),
			[]wanted{{2, "key-of-kind", "does not belong to a wireway|use holder.sides"}},
		},
	}
}

func TestBadAgainst(t *testing.T) {
	for _, c := range badAgainst() {
		t.Run(c.name, func(t *testing.T) { checkBad(t, c) })
	}
}

// TestAgainst: what is written is read back and written alike, and an edit changes nothing else.
func TestAgainst(t *testing.T) {
	text := strings.Replace(head, "{kind: fixed-wall, ambient_c: 30}", "{kind: still-air, ambient_c: 30, against: {at_deg: 0, share: 0.25, is: {fixed_c: 66}}}", 1)
	d, problems := Read([]byte(text))
	if len(problems) > 0 {
		t.Fatal(problems)
	}
	want := Against{AtDeg: 0, Share: 0.25, Is: Side{Kind: SideFixed, FixedC: 66}}
	if a := d.Surroundings.Against; a == nil || *a != want {
		t.Fatalf("%+v", a)
	}
	if got, err := Write(d); err != nil || string(got) != text {
		t.Errorf("%v: written as\n%s", err, got)
	}
	free := RestAgainst(d, nil)
	if free.Surroundings.Against != nil || d.Surroundings.Against == nil {
		t.Error("the edit is no edit")
	}
	want.Is = Side{Kind: SideInsulated}
	back := RestAgainst(free, &want)
	want.Share = 0.5
	if a := back.Surroundings.Against; a.Share != 0.25 || a.Is.Kind != SideInsulated {
		t.Errorf("%+v", a)
	}
	if s := Surround(back, Buried, nil).Surroundings; s.Against != nil {
		t.Error("stays in the ground")
	}
}
