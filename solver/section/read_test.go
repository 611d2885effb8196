package section

import (
	"path/filepath"
	"testing"
)

const feCases = "../../testdata/fe-cases"

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
		if d == nil || len(problems) > 0 {
			t.Fatalf("%s: %v", name, problems)
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
