package section

import (
	"path/filepath"
	"strings"
	"testing"
)

const feCases = "../../testdata/fe-cases"

// Files of the reference cases that use keys or kinds of later blocks, with a part of the sentence that refuses them.
var laterCases = map[string]string{
	"s01_sector4.yaml":       "key `conductor.shape` belongs to surroundings and shapes",
	"s02b_flat_air.yaml":     "a flat jacket",
	"s03_bar_two_wires.yaml": "key `conductor.shape` belongs to surroundings and shapes",
}

func feFiles(t testing.TB) []string {
	files, err := filepath.Glob(filepath.Join(feCases, "*.yaml"))
	if err != nil || len(files) != 34 {
		t.Fatalf("%d reference cases, %v; want 34", len(files), err)
	}
	return files
}

func TestReadReferenceCases(t *testing.T) {
	for _, file := range feFiles(t) {
		name := filepath.Base(file)
		d, problems, err := Open(file)
		if err != nil {
			t.Fatal(err)
		}
		want, later := laterCases[name]
		switch {
		case !later && (d == nil || len(problems) > 0):
			t.Errorf("%s: %v", name, problems)
		case later && (d != nil || !strings.Contains(problems[0].Sentence(), want)):
			t.Errorf("%s: %v; want %q", name, problems, want)
		case later:
			continue
		}
		if d.Title+".yaml" != name || len(d.Parts) == 0 || !d.Surroundings.AmbientC.OK {
			t.Errorf("%s reads as %q with %d parts", name, d.Title, len(d.Parts))
		}
		text, err := Write(d)
		if err != nil {
			t.Errorf("%s: %v", name, err)
			continue
		}
		again, problems := Read(text)
		if len(problems) > 0 || !Equal(d, again) {
			t.Errorf("%s is not written as it was: %v", name, problems)
		}
	}
}
