package main

import (
	"fmt"
	"os"
	"path/filepath"

	"packrise/render"
	"packrise/solver/rating"
)

type drawCommand struct {
	File     string `arg:"" help:"Section document (YAML)."`
	Output   string `short:"o" required:"" help:"Picture to write (.png)." placeholder:"OUT.png"`
	Accuracy string `enum:"draft,standard,fine" default:"standard" help:"draft, standard or fine."`
	Width    int    `default:"1400" help:"Width in pixels."`
	Height   int    `default:"1000" help:"Height in pixels."`
	Dark     bool   `help:"Dark background."`
	Flow     bool   `help:"Draw heat-flow lines."`
}

// Sizes of a picture that are worth drawing.
const (
	smallest = 320
	largest  = 12000
)

// Run solves the design and writes its picture.
func (c *drawCommand) Run(a *app) error {
	if c.Width < smallest || c.Height < smallest || c.Width > largest || c.Height > largest {
		return fmt.Errorf("%w: a picture of %d × %d pixels; write between %d and %d", errInput, c.Width, c.Height, smallest, largest)
	}
	if filepath.Ext(c.Output) != ".png" {
		return fmt.Errorf("%w: %s does not end in .png; that is the only kind of picture written", errInput, c.Output)
	}
	r := a.answer(c.File, c.Accuracy, false)
	if r == nil {
		return nil
	}
	s := sceneOf(r)
	s.Flow = c.Flow
	if err := writePicture(c.Output, s, c.Width, c.Height, render.Style{Dark: c.Dark, Scale: 1}); err != nil {
		return fmt.Errorf("write %s: %w", c.Output, err)
	}
	answer, _ := r.Sentence()
	fmt.Fprintf(a.out, "%s\n%s\n", c.Output, answer)
	return nil
}

// writePicture writes aside and renames, so that an older picture survives a failure.
func writePicture(path string, s render.Scene, w, h int, st render.Style) error {
	f, err := os.CreateTemp(filepath.Dir(path), ".picture-*")
	if err != nil {
		return err
	}
	defer os.Remove(f.Name())
	if err := render.WritePNG(f, s, w, h, st); err != nil {
		f.Close()
		return err
	}
	if err := f.Chmod(0o644); err != nil {
		f.Close()
		return err
	}
	if err := f.Close(); err != nil {
		return err
	}
	return os.Rename(f.Name(), path)
}

// sceneOf hands an answer to the pictures.
func sceneOf(r *rating.Result) render.Scene {
	answer, assumed := r.Sentence()
	s := render.Scene{
		Shapes: r.Shapes, Readings: r.Readings(), AmbientC: r.AmbientC, Title: r.Title, Answer: answer, Assumed: assumed,
		Notes: r.Notes, Status: r.Balance(), Caution: rating.Caution,
	}
	if r.Solved() {
		s.Field = r
	}
	return s
}
