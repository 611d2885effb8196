package solver_test

import (
	"go/parser"
	"go/token"
	"io/fs"
	"path"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"
)

// arrows says who may import whom: in "a < b", b may import a and all that a may import. Rooms that are not built yet stand here too.
const arrows = `
none < cmd/packrise/internal/locale, solver, solver/quantity, assets, solver/pack, solver/harmonic, solver/outline, solver/fluid, ui/latest, ui/keep
solver/fluid < solver/gas, solver/film
solver/harmonic, solver/outline, solver/fluid, solver/gas, solver/film < solver/heat
solver/harmonic < solver/electric
solver/quantity < solver/section
solver/quantity, assets < solver/catalog
solver/quantity, solver/catalog < solver/rules
solver/section, solver/catalog, solver/pack, solver/heat, solver/electric < solver/rating
solver/rating, solver/rules < solver/study
solver/section, solver/catalog < solver/wirelist
solver/section < render
solver/rating, solver/study < render/report
solver/rating, solver/study, render, render/report, solver/wirelist, ui/latest, ui/keep < ui < cmd/packrise
solver/rating, solver/study, render, render/report, solver/wirelist < cmd/packrise-cli
cmd/packrise/internal/locale < cmd/packrise
`

// guests are the libraries that only some rooms may import; the longest prefix counts.
var guests = map[string][]string{
	"fyne.io/fyne/v2":        {"ui", "cmd/packrise"},
	"fyne.io/fyne/v2/app":    {"cmd/packrise"},
	"github.com/fogleman/gg": {"render"},
	"gopkg.in/yaml.v3":       {"solver/section", "solver/catalog", "solver/rules"},
}

const module = "packrise/"

// below maps each room to the rooms that it may import.
func below(t *testing.T) map[string][]string {
	out := map[string][]string{}
	for _, line := range strings.Split(strings.TrimSpace(arrows), "\n") {
		var under []string
		for k, group := range strings.Split(line, "<") {
			rooms := strings.Split(strings.ReplaceAll(group, " ", ""), ",")
			for _, room := range rooms {
				if _, known := out[room]; k == 0 && room != "none" && !known {
					t.Fatalf("the arrows name %q before saying what it may import", room)
				} else if k > 0 {
					out[room] = append(out[room], under...)
				}
			}
			for _, room := range rooms {
				if room != "none" {
					under = append(append(under, room), out[room]...)
				}
			}
		}
	}
	return out
}

// TestArrows reads the import lines of all files but tests, whatever their build tags, so it needs no C compiler. A blank import pins a library and uses
// nothing of it.
func TestArrows(t *testing.T) {
	allowed := below(t)
	seen := 0
	err := filepath.WalkDir("..", func(name string, e fs.DirEntry, err error) error {
		switch base := filepath.Base(name); {
		case err != nil:
			return err
		case e.IsDir() && name != ".." && (strings.HasPrefix(base, ".") || base == "testdata"):
			return filepath.SkipDir
		case e.IsDir() || !strings.HasSuffix(base, ".go") || strings.HasSuffix(base, "_test.go"):
			return nil
		}
		file, err := parser.ParseFile(token.NewFileSet(), name, nil, parser.ImportsOnly)
		if err != nil {
			return err
		}
		room := path.Dir(strings.TrimPrefix(filepath.ToSlash(name), "../"))
		under, known := allowed[room]
		if !known {
			t.Errorf("%s: the room %s is missing from the arrows", name, room)
		}
		seen++
		for _, spec := range file.Imports {
			to, err := strconv.Unquote(spec.Path.Value)
			if err != nil {
				return err
			}
			if inside, ok := strings.CutPrefix(to, module); ok {
				if !slices.Contains(under, inside) {
					t.Errorf("%s: %s may not import %s", name, room, inside)
				}
			} else if hosts := hostsOf(to); hosts != nil && !slices.Contains(hosts, room) && (spec.Name == nil || spec.Name.Name != "_") {
				t.Errorf("%s: only %s may import %s", name, strings.Join(hosts, " and "), to)
			}
		}
		return nil
	})
	if err != nil {
		t.Fatal(err)
	}
	if seen < 50 {
		t.Errorf("only %d files were read", seen)
	}
}

// hostsOf returns the rooms that may import a library, nil when all may.
func hostsOf(to string) []string {
	best := ""
	for prefix := range guests {
		if (to == prefix || strings.HasPrefix(to, prefix+"/")) && len(prefix) > len(best) {
			best = prefix
		}
	}
	return guests[best]
}

// TestArrowsCatch makes sure that the test above can fail.
func TestArrowsCatch(t *testing.T) {
	allowed := below(t)
	for _, c := range []struct {
		from, to string
		want     bool
	}{
		{"solver/rating", "solver/heat", true},
		{"solver/rating", "solver/fluid", true},
		{"cmd/packrise", "assets", true},
		{"solver/study", "solver/rules", true},
		{"solver/rules", "solver/section", false},
		{"solver/rules", "solver/heat", false},
		{"solver/heat", "solver/section", false},
		{"solver/pack", "solver/quantity", false},
		{"render", "solver/rating", false},
		{"solver/section", "render", false},
		{"cmd/packrise-cli", "ui", false},
	} {
		if got := slices.Contains(allowed[c.from], c.to); got != c.want {
			t.Errorf("%s may import %s: %v, want %v", c.from, c.to, got, c.want)
		}
	}
	if slices.Contains(hostsOf("fyne.io/fyne/v2/app"), "ui") || !slices.Contains(hostsOf("fyne.io/fyne/v2/widget"), "ui") || hostsOf("gonum.org/v1/gonum/mat") != nil {
		t.Error("the guests' prefixes do not work")
	}
}
