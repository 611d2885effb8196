// Package locale gives the program a locale that the toolkit can read. The toolkit reads it, and complains on stderr, while its packages are initialised;
// this package needs nothing but os, so it is initialised before (packages are, in the order of their paths, as soon as what they import is).
package locale

import "os"

func init() {
	if v, ok := missing(os.Getenv); ok {
		os.Setenv(v, "en_US.UTF-8")
	}
}

// missing returns the variable to set where the locale is none, "C" or "POSIX". The toolkit looks at LC_ALL, then at LANG.
func missing(env func(string) string) (name string, ok bool) {
	name = "LC_ALL"
	if env(name) == "" {
		name = "LANG"
	}
	switch v := env(name); {
	case v == "", v == "C", v == "POSIX", len(v) > 1 && v[:2] == "C.":
		return name, true
	}
	return "", false
}
