// Command packrise opens the window on a design: how hot does each run of a packed section get, which one governs, and by how much. Without a
// display it solves the demo and writes its picture.
package main

import (
	"context"
	"errors"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"runtime/debug"
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/app"

	_ "packrise/cmd/packrise/internal/locale" // before the toolkit
	"packrise/solver/catalog"
	"packrise/solver/section"
	"packrise/ui"
	"packrise/ui/keep"
)

const help = `packrise – how hot each run of a packed section gets, and which one governs

  packrise            open the window on a demo design
  packrise FILE       open the window on a design (.yaml)
  packrise --version  print the version
  packrise --help     print this

Without a display the design is solved and its picture is written into the current folder. For scripts there is packrise-cli.
`

func main() { os.Exit(run(os.Args[1:], os.Stdout, os.Stderr)) }

// run is the program; it returns the exit status: 0 done, 2 the input is wrong, 3 the program failed.
func run(args []string, out, errs io.Writer) int {
	path := ""
	for _, a := range args {
		switch {
		case a == "--help" || a == "-h":
			fmt.Fprint(out, help)
			return 0
		case a == "--version":
			fmt.Fprintln(out, "packrise", version())
			return 0
		case strings.HasPrefix(a, "-") || path != "":
			fmt.Fprintf(errs, "packrise: %q is one too many; write packrise FILE, or packrise --help\n", a)
			return 2
		default:
			path = a
		}
	}
	why := whyNoDisplay(os.Getenv)
	if why != "" {
		d, _, status := begin(path, errs)
		if d == nil {
			return status
		}
		fmt.Fprintf(out, "packrise: there is no display (%s), so the picture goes into a file\n", why)
		return withoutDisplay(catalog.Load(), d, path, out, errs)
	}
	return window(path, errs)
}

// window opens the window. A file that can't be opened does not stop it: it says why itself, for those who started it with the mouse.
func window(path string, errs io.Writer) int {
	o := ui.Options{Path: path, Version: version(), Trace: trace()}
	d, warnings, _ := begin(path, errs)
	if d == nil {
		status := 0
		o.Path, o.Open = "", path
		if d, warnings, status = begin("", errs); d == nil {
			return status
		}
	}
	folder, err := keep.Folder()
	if err != nil {
		fmt.Fprintln(errs, "packrise: unsaved work is not kept aside:", err)
	}
	o.Catalog, o.Document, o.Warnings, o.KeepIn = catalog.Load(), d, warnings, folder
	ui.NewWindow(newApp(), o).ShowAndRun()
	return 0
}

// begin reads the design that the window opens on: the file, or a demo.
func begin(path string, errs io.Writer) (*section.Document, []section.Problem, int) {
	if path == "" {
		d, err := ui.FirstDesign()
		if err != nil {
			fmt.Fprintln(errs, "packrise:", err)
			return nil, nil, 3
		}
		return d, nil, 0
	}
	d, problems, err := section.Open(path)
	if err != nil {
		fmt.Fprintln(errs, "packrise:", err)
		return nil, nil, 2
	}
	if d == nil {
		for i, p := range problems {
			if i == 50 {
				fmt.Fprintf(errs, "… and %d more\n", len(problems)-i)
				break
			}
			fmt.Fprintln(errs, p.At(path))
		}
		return nil, nil, 2
	}
	return d, problems, 0
}

// withoutDisplay solves the design by the same engine and writes its picture.
func withoutDisplay(cat *catalog.Catalog, d *section.Document, path string, out, errs io.Writer) int {
	name := "packrise-demo.png"
	if path != "" {
		name = strings.TrimSuffix(filepath.Base(path), filepath.Ext(path)) + ".png"
	}
	answer, problems, err := ui.Picture(context.Background(), cat, d, name)
	if errors.Is(err, ui.ErrRefused) {
		for _, p := range problems {
			fmt.Fprintln(errs, p.At(path))
		}
		return 2
	}
	if err != nil {
		fmt.Fprintln(errs, "packrise:", err)
		return 3
	}
	full, err := filepath.Abs(name)
	if err != nil {
		full = name
	}
	fmt.Fprintf(out, "%s\n%s\n", answer, full)
	return 0
}

// trace is where lines for scripts go, nil unless the environment asks for them.
func trace() io.Writer {
	if os.Getenv("PACKRISE_TRACE") == "" {
		return nil
	}
	return os.Stderr
}

func newApp() fyne.App {
	app.SetMetadata(fyne.AppMetadata{
		ID: "app.packrise", Name: "Packrise", Version: version(), Icon: ui.Icon(),
		Migrations: map[string]bool{"fyneDo": true}, // widgets are touched through fyne.Do only: the toolkit need not check
	})
	a := app.NewWithID("app.packrise")
	a.SetIcon(ui.Icon())
	return a
}

// version is what the build says of itself.
func version() string {
	info, ok := debug.ReadBuildInfo()
	if !ok || info.Main.Version == "" || info.Main.Version == "(devel)" {
		return "development"
	}
	return info.Main.Version
}
