package section

import (
	"strings"
	"testing"

	"gopkg.in/yaml.v3"
	"pgregory.net/rapid"
)

// Any valid document reads back from what is written, and that text is written again to the byte.
func TestRoundTrip(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		d := maker{rt}.document()
		if problems := Check(d); len(problems) > 0 {
			rt.Fatalf("the maker draws a bad document: %v", problems[0])
		}
		text, err := Write(d)
		if err != nil {
			rt.Fatalf("%v\n%s", err, canonical(current.tree(d)))
		}
		again, problems := Read(text)
		if len(problems) > 0 {
			rt.Fatalf("%v\n%s", problems, text)
		}
		if s := diff(d, again); s != "" {
			rt.Fatalf("reads back differently:\n%s\n%s", s, text)
		}
		if got := patched(rt, again); got != string(text) {
			rt.Fatalf("written again it changes:\n%s", changedLines(string(text), got))
		}
	})
}

// restyle draws another way to write the same tree.
func restyle(t *rapid.T, n *yaml.Node, depth int, flow bool) {
	if n.Kind == yaml.ScalarNode {
		if n.Tag == "!!str" && n.Style == 0 && !strings.Contains(n.Value, "\n") {
			n.Style = rapid.SampledFrom([]yaml.Style{0, 0, yaml.DoubleQuotedStyle, yaml.SingleQuotedStyle}).Draw(t, "quotes")
		}
		return
	}
	if !flow {
		n.Style = 0
		if depth > 1 && rapid.Bool().Draw(t, "flow") {
			n.Style, flow = yaml.FlowStyle, true
		}
	}
	for i, c := range n.Content {
		if !flow && rapid.IntRange(0, 3).Draw(t, "comment") == 0 {
			switch isValue := n.Kind == yaml.MappingNode && i%2 == 1; {
			case isValue && c.Kind == yaml.ScalarNode && c.Style != yaml.LiteralStyle:
				c.LineComment = "# line"
			case !isValue:
				c.HeadComment = "# head"
			}
		}
		if n.Kind == yaml.SequenceNode || i%2 == 1 {
			restyle(t, c, depth+1, flow)
		}
	}
}

func edited(t *rapid.T, d *Document) *Document {
	m := maker{t}
	for range rapid.IntRange(1, 4).Draw(t, "edits") {
		var ids []string
		for _, p := range UnfoldAll(d) {
			ids = append(ids, p.ID)
		}
		id := rapid.SampledFrom(append(ids, "none")).Draw(t, "id")
		switch rapid.IntRange(0, 15).Draw(t, "edit") {
		case 0:
			d = Move(d, id, Point{m.num(-9, 9), m.num(-9, 9)})
		case 1:
			d = Delete(d, id)
		case 2:
			if d.Holder.Kind != NoHolder {
				d = Add(d, Part{ID: FreshID(d, "new"), Kind: Core, Conductor: m.conductor(), Layers: m.layers()})
			}
		case 3:
			d = SetCurrent(d, id, m.opt(0, 99))
		case 4:
			d = SetHeat(d, id, m.num(0, 9))
		case 5:
			d = RenamePart(d, id, FreshID(d, "renamed"))
		case 6:
			d = SetLimit(d, id, m.opt(20, 200))
		case 7:
			d = d.With(func(d *Document) { d.Title, d.Notes = m.text(), m.text() })
		case 8:
			d = Split(Unplace(d, id), id)
		case 9:
			if d.Holder.Kind != NoHolder {
				d = SetHolder(d, m.holder(Jacket, Conduit, Wireway, OpenBundle))
			}
		case 10:
			d = d.With(func(d *Document) {
				d.Materials = append([]Material{{Name: "fresh", KWMK: m.num(0.1, 3)}}, d.Materials[min(1, len(d.Materials)):]...)
			})
		case 11:
			d = d.With(func(d *Document) { // turn the order of the parts round
				parts := append([]Part{}, d.Parts...)
				for i := range parts {
					parts[i] = d.Parts[len(parts)-1-i]
				}
				d.Parts = parts
			})
		default:
			d = m.editRatings(d, id)
		}
	}
	return d
}

// A file in any style, edited in any way, is patched and reads back as the edited document; comments on what stayed stay.
func TestPatchFollowsEdits(t *testing.T) {
	fallbacks, all := 0, 0
	rapid.Check(t, func(rt *rapid.T) {
		tree := current.tree(maker{rt}.document())
		restyle(rt, tree, 0, false)
		text := encode(tree)
		d, problems := Read([]byte(text))
		if len(problems) > 0 {
			rt.Fatalf("%v\n%s", problems, text)
		}
		d = edited(rt, d)
		if problems := Check(d); len(problems) > 0 {
			rt.Fatalf("an edit makes a bad document: %v", problems)
		}
		got, err := Write(d)
		if err != nil {
			rt.Fatal(err)
		}
		all++
		if string(d.origin.patch(current.tree(d), false)) != string(got) {
			fallbacks++
			t.Logf("not patched:\n%s\nas\n%s\nto\n%s", text, d.origin.patch(current.tree(d), false), got)
		}
		again, problems := Read(got)
		if len(problems) > 0 || diff(d, again) != "" {
			rt.Fatalf("%v\n%s", problems, diff(d, again))
		}
	})
	t.Logf("%d of %d files were not patched", fallbacks, all)
	if fallbacks*50 > all {
		t.Errorf("%d of %d files could not be patched", fallbacks, all)
	}
}
