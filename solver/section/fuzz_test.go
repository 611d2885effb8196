package section

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

// FuzzRead: reading never panics, and what it takes is written, reads back the same, and is then written to the byte. An edit of
// it is written too.
func FuzzRead(f *testing.F) {
	for _, file := range append(feFiles(f), "testdata/commented.yaml", "testdata/rated.yaml") {
		text, err := os.ReadFile(file)
		if err != nil {
			f.Fatal(err)
		}
		if len(text) < 5000 || filepath.Base(filepath.Dir(file)) == "testdata" {
			f.Add(text)
		}
	}
	for _, group := range [][]bad{wholeFiles(), badKeys(), badNumbers(), badKinds(), badParts(), badLoads(), badRatings()} {
		for _, c := range group {
			if len(c.text) < 5000 {
				f.Add([]byte(c.text))
			}
		}
	}
	f.Add([]byte(small))
	f.Add([]byte(strings.ReplaceAll(small, "\n", "\r\n") + "...\n"))
	f.Fuzz(func(t *testing.T, data []byte) { readAny(t, data) })
}

// fataler is what *testing.T and *rapid.T have in common.
type fataler interface {
	Fatal(...any)
	Fatalf(string, ...any)
}

// readAny reports whether the text is a design.
func readAny(t fataler, data []byte) bool {
	d, problems := Read(data)
	for _, p := range problems {
		if s := p.Sentence(); p.What == "" || p.Do == "" || p.Rule == "" || p.Line < 0 || strings.ContainsAny(s, "\n\x00¤") {
			t.Fatalf("no proper problem: %+v", p)
		}
	}
	if (d == nil) != (len(problems) > 0) {
		t.Fatal("a document with problems, or none without")
	}
	if d == nil {
		return false
	}
	text := stable(t, d)
	if !strings.Contains(string(data), "\ufeff") && text != string(data) {
		t.Fatalf("unchanged it is written as\n%s\nwhich differs by\n%q", text, changedLines(string(data), text))
	}
	for _, p := range UnfoldAll(d) {
		d = SetLimit(Move(d, p.ID, Point{1.5, -2}), p.ID, Some(70.0))
	}
	stable(t, SetHolder(d, Holder{Kind: OpenBundle, Fill: "oil: x"}))
	return true
}

func stable(t fataler, d *Document) string {
	text, err := Write(d)
	if err != nil {
		t.Fatal(err)
	}
	again, problems := Read(text)
	if len(problems) > 0 {
		t.Fatalf("what is written is refused: %v\n%s", problems, text)
	}
	if s := diff(d, again); s != "" {
		t.Fatalf("reads back differently:\n%s\n%s", s, text)
	}
	if twice, err := Write(again); err != nil || string(twice) != string(text) {
		t.Fatalf("written again it changes: %v\n%s", err, changedLines(string(text), string(twice)))
	}
	return string(text)
}

// snippets upset what a text means, or only how it looks.
var snippets = []string{
	" ", "  ", "\n", "\n\n", "# c\n", " # c", "\n# c\n", "\n  # c\n", "\t", ",", "'", "\"", "\r", "\r\n", "\u2028", "\u00a0", "- ", ": ", "#", "|", ">", "[]", "{}", "---\n", "...\n",
	"0", "-", "~", "é", "\\", "? ", "&a ", "!", "%", "\ufeff",
}

// TestReadMutated does what FuzzRead does to good files that were spoilt here and there: many of them are still designs.
func TestReadMutated(t *testing.T) {
	_, text := commented(t)
	read, all := 0, 0
	rapid.Check(t, func(rt *rapid.T) {
		s := text
		if rapid.Bool().Draw(rt, "drawn") {
			tree := current.tree(maker{rt}.document())
			restyle(rt, tree, 0, false)
			s = encode(tree)
		}
		for range rapid.IntRange(1, 4).Draw(rt, "spoils") {
			at := rapid.IntRange(0, len(s)).Draw(rt, "at")
			end := min(len(s), at+rapid.IntRange(0, 1).Draw(rt, "drop"))
			s = s[:at] + rapid.SampledFrom(snippets).Draw(rt, "snippet") + s[end:]
		}
		all++
		if readAny(rt, []byte(s)) {
			read++
		}
	})
	if all >= 50 && read*10 < all {
		t.Errorf("only %d of %d spoilt files are designs: the test tells little", read, all)
	}
}
