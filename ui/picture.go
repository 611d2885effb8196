package ui

import (
	"bytes"
	"context"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"

	"packrise/render"
	"packrise/solver/catalog"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// ErrRefused says that a design can't be solved as it is: the problems say why.
var ErrRefused = errors.New("the design can't be solved as it is")

// FirstDesign returns the demo that a window without a file opens on.
func FirstDesign() (*section.Document, error) {
	all := demoDesigns(demoFiles())
	for _, d := range all {
		if d.file == firstDemo {
			return d.doc, nil
		}
	}
	if len(all) == 0 {
		return nil, errors.New("the program carries no demo design")
	}
	return all[0].doc, nil
}

const firstDemo = "robot-umbilical.yaml"

// Picture solves a design without a window and writes its picture as PNG; it returns the answer's sentence.
func Picture(ctx context.Context, cat *catalog.Catalog, d *section.Document, path string) (answer string, problems []section.Problem, err error) {
	r, problems, err := rating.NewEngine(cat).Solve(ctx, d, rating.Options{})
	if err != nil {
		return "", problems, err
	}
	if r == nil {
		return "", problems, ErrRefused
	}
	return sceneLine(r), problems, WritePicture(path, sceneOf(r))
}

// sceneOf is what a picture of a solved design shows.
func sceneOf(r *rating.Result) render.Scene {
	s := render.Scene{
		Shapes: r.Shapes, Readings: r.Readings(), AmbientC: r.AmbientC, Title: r.Title,
		Notes: r.Notes, Status: statusLine(r, false), Caution: rating.Caution,
	}
	if r.Solved() {
		s.Field = r
	}
	s.Answer, s.Assumed = r.Sentence()
	return s
}

func sceneLine(r *rating.Result) string {
	answer, _ := r.Sentence()
	return answer
}

// Size of a saved picture in pixels, and its scale.
const (
	pictureWide  = 2400
	pictureHigh  = 1600
	pictureScale = 2
)

// WritePicture draws the scene on light paper and writes it as PNG, whole or not at all.
func WritePicture(path string, scene render.Scene) error {
	scene.Selected, scene.Pointed = nil, ""
	scene.Heated, scene.Heaters = "", nil
	var png bytes.Buffer
	if err := render.WritePNG(&png, scene, pictureWide, pictureHigh, render.Style{Scale: pictureScale}); err != nil {
		return fmt.Errorf("draw the picture: %w", err)
	}
	aside, err := os.CreateTemp(filepath.Dir(path), ".packrise-*.png")
	if err != nil {
		return reason(path, err)
	}
	defer os.Remove(aside.Name())
	_, err = aside.Write(png.Bytes())
	if err == nil {
		err = aside.Chmod(0o644)
	}
	if e := aside.Close(); err == nil {
		err = e
	}
	if err == nil {
		err = os.Rename(aside.Name(), path)
	}
	if err != nil {
		return reason(path, err)
	}
	return nil
}

// reason names the file and why, without the system's call.
func reason(path string, err error) error {
	var p *fs.PathError
	if errors.As(err, &p) {
		err = p.Err
	}
	return fmt.Errorf("%s can't be written: %w", path, err)
}
