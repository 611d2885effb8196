package section

import (
	"os"
	"testing"
)

// The form of a new file: blocks apart, each part and load on a line, numbers in full digits.
func TestNewFile(t *testing.T) {
	d, _ := commented(t)
	d = Move(d, "H1", Point{9.99653679643294, -1.0 / 3})
	d = d.With(func(d *Document) {
		d.origin = nil
		d.Notes = "two\nlines"
		d.StockUsed = []StockRow{{"material", "pvc", "k: 1.50\nsource:\n  text: no # remark\n"}, {"wire", "x", "{}"}, {"material", "pur", "{k: 0.2}"}}
	})
	got, err := Write(d)
	if err != nil {
		t.Fatal(err)
	}
	want, err := os.ReadFile("testdata/new.yaml")
	if err != nil {
		t.Fatal(err)
	}
	if string(got) != string(want) {
		t.Errorf("the form changed:\n%s", changedLines(string(want), string(got)))
	}
	again, problems := Read(got)
	if len(problems) > 0 || diff(d, again) != "" {
		t.Errorf("%v\n%s", problems, diff(d, again))
	}
	if Equal(d, again) || len(again.StockUsed) != 3 || again.StockUsed[0] != (StockRow{"material", "pvc", `{k: 1.50, source: {text: "no"}}`}) {
		t.Errorf("rows read back as %v", again.StockUsed)
	}
}
