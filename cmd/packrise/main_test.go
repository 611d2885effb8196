package main

import (
	"bytes"
	"image/png"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

func TestWhyNoDisplay(t *testing.T) {
	for _, c := range []struct {
		env  map[string]string
		want string
	}{
		{nil, "DISPLAY is not set"},
		{map[string]string{"WAYLAND_DISPLAY": "wayland-0"}, "xwayland"},
		{map[string]string{"DISPLAY": ":63999"}, "nothing answers"},
		{map[string]string{"DISPLAY": "nonsense"}, "names none"},
		{map[string]string{"DISPLAY": "desk.example:0"}, ""},
	} {
		got := whyNoDisplay(func(k string) string { return c.env[k] })
		if c.want == "" && got != "" || !strings.Contains(got, c.want) {
			t.Errorf("%v: %q, want %q", c.env, got, c.want)
		}
	}
}

// runIn runs the program without a display in a folder of its own.
func runIn(t *testing.T, args ...string) (status int, out, errs string, folder string) {
	t.Helper()
	folder = t.TempDir()
	t.Chdir(folder)
	t.Setenv("DISPLAY", "")
	t.Setenv("WAYLAND_DISPLAY", "")
	var o, e bytes.Buffer
	status = run(args, &o, &e)
	return status, o.String(), e.String(), folder
}

func TestWithoutDisplayThePictureIsWritten(t *testing.T) {
	status, out, errs, folder := runIn(t)
	if status != 0 || errs != "" {
		t.Fatalf("status %d, %s", status, errs)
	}
	lines := strings.Split(strings.TrimSpace(out), "\n")
	if len(lines) != 3 || !strings.Contains(lines[0], "no display") || !strings.HasSuffix(lines[2], "packrise-demo.png") {
		t.Fatalf("it says %q", out)
	}
	f, err := os.Open(filepath.Join(folder, "packrise-demo.png"))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	if _, err := png.Decode(f); err != nil {
		t.Error(err)
	}
}

func TestArguments(t *testing.T) {
	if status, out, _, _ := runIn(t, "--help"); status != 0 || !strings.Contains(out, "packrise FILE") {
		t.Errorf("status %d, %q", status, out)
	}
	if status, out, _, _ := runIn(t, "--version"); status != 0 || !strings.HasPrefix(out, "packrise ") {
		t.Errorf("status %d, %q", status, out)
	}
	if status, _, errs, _ := runIn(t, "--nonsense"); status != 2 || !strings.Contains(errs, "--nonsense") {
		t.Errorf("status %d, %q", status, errs)
	}
	if status, _, errs, _ := runIn(t, "gone.yaml"); status != 2 || !strings.Contains(errs, "gone.yaml") {
		t.Errorf("status %d, %q", status, errs)
	}
	bad := filepath.Join(t.TempDir(), "bad.yaml")
	if err := os.WriteFile(bad, []byte("packrise: 1\nnonsense: 2\n"), 0o644); err != nil {
		t.Fatal(err)
	}
	if status, _, errs, _ := runIn(t, bad); status != 2 || !strings.Contains(errs, "bad.yaml:2: ") {
		t.Errorf("status %d, %q", status, errs)
	}
}
