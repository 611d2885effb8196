package section

import (
	"strings"
	"testing"

	"gopkg.in/yaml.v3"
)

// A format that is one version on, where ambient_c used to be called air_c and before that air_f.
var nextFormat = format{version: 3, migrations: map[int]func(*yaml.Node){
	1: func(root *yaml.Node) {
		for _, n := range child(root, "surroundings").Content {
			if n.Value == "air_f" {
				n.Value = "air_c"
			}
		}
		child(child(root, "surroundings"), "air_c").Value = "40"
	},
	2: func(root *yaml.Node) {
		for _, n := range child(root, "surroundings").Content {
			if n.Value == "air_c" {
				n.Value = "ambient_c"
			}
		}
	},
}}

const oldFile = `# an old file
packrise: 1   # version
surroundings:
  kind: fixed-wall
  air_f: 104   # in the shade
holder: {kind: jacket, inside_mm: 10}   # round
`

func TestMigration(t *testing.T) {
	d, problems := nextFormat.read([]byte(oldFile))
	if len(problems) > 0 || d.Surroundings.AmbientC != Some(40.0) {
		t.Fatalf("%v", problems)
	}
	text, err := nextFormat.write(d.With(func(d *Document) { d.Surroundings.AmbientC = Some(41.0) }))
	want := strings.NewReplacer("packrise: 1 ", "packrise: 3", "air_f: 104  ", "ambient_c: 41", "10}  ", "10}", "  #", " #").Replace(oldFile)
	if err != nil || strings.ReplaceAll(string(text), "  #", " #") != strings.ReplaceAll(want, "  #", " #") {
		t.Errorf("%v; saved as\n%s\nwant\n%s", err, text, want)
	}
	d, problems = nextFormat.read([]byte(strings.Replace(oldFile, "packrise: 1", "packrise: 2", 1)))
	if len(problems) != 2 || problems[0].Rule != "missing-key" || problems[1].Rule != "unknown-key" || problems[1].Line != 5 {
		t.Errorf("%v %v", d, problems)
	}
	_, problems = nextFormat.read([]byte(strings.Replace(oldFile, "packrise: 1", "packrise: 4", 1)))
	if len(problems) != 1 || problems[0].Sentence() != "the design is of format version 4, and this program reads up to 3; open it with a newer Packrise" {
		t.Errorf("%v", problems)
	}
	gap := format{version: 3, migrations: map[int]func(*yaml.Node){2: nextFormat.migrations[2]}}
	_, problems = gap.read([]byte(oldFile))
	if len(problems) != 1 || problems[0].Rule != "version" || problems[0].Line != 2 {
		t.Errorf("%v", problems)
	}
}
