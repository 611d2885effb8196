package main

import (
	"net"
	"os"
	"path/filepath"
	"strings"
)

// whyNoDisplay says in a few words why no window can be opened, "" if one can as far as that can be known. The toolkit ends the program when it finds no
// display, so this is asked first. The window is built for X, which Wayland desktops offer too.
func whyNoDisplay(env func(string) string) string {
	d := env("DISPLAY")
	switch {
	case d == "" && env("WAYLAND_DISPLAY") != "":
		return "only Wayland is offered and the window needs X: install xwayland"
	case d == "":
		return "DISPLAY is not set"
	}
	host, screen, ok := strings.Cut(d, ":")
	if !ok {
		return "DISPLAY is " + d + ", which names none"
	}
	if host != "" && host != "unix" {
		return "" // on another machine: only trying tells
	}
	number, _, _ := strings.Cut(screen, ".")
	if answers(filepath.Join(os.TempDir(), ".X11-unix", "X"+number)) || answers(filepath.Join("/tmp", ".X11-unix", "X"+number)) {
		return ""
	}
	return "nothing answers at DISPLAY " + d
}

// answers tells whether something listens at a socket, in the file system or, on Linux, at its abstract name.
func answers(socket string) bool {
	for _, name := range []string{socket, "@" + socket} {
		if c, err := net.Dial("unix", name); err == nil {
			c.Close()
			return true
		}
	}
	return false
}
