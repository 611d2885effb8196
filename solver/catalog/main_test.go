package catalog

import (
	"flag"
	"os"
	"testing"
)

// Property tests draw the same values in each run; PACKRISE_SOAK=1 draws many more, others each time.
func TestMain(m *testing.M) {
	flag.Parse()
	set := func(name, value string) {
		if err := flag.Set(name, value); err != nil {
			panic(err)
		}
	}
	set("rapid.nofailfile", "true")
	if os.Getenv("PACKRISE_SOAK") == "1" {
		set("rapid.checks", "20000")
	} else if f := flag.Lookup("rapid.seed"); f.Value.String() == f.DefValue {
		set("rapid.seed", "20260")
	}
	os.Exit(m.Run())
}
