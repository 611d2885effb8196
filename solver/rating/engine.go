package rating

import (
	"context"

	"packrise/solver/catalog"
	"packrise/solver/heat"
	"packrise/solver/section"
)

// Engine answers for documents and keeps the prepared heat model between calls, so that a document that differs from the
// last one by currents or by one part's place is solved again in a few milliseconds. Not safe for concurrent use: one Engine
// belongs to one runner.
type Engine struct{}

// NewEngine returns an engine that looks things up in cat.
func NewEngine(cat *catalog.Catalog) *Engine { panic("rating: not built") }

// Options of one solution.
type Options struct {
	Accuracy   heat.Accuracy
	AssumeIdle bool // count unknown and unassigned currents as 0
}

// Solve resolves and solves. The result is nil when a problem is Refused; all problems of substance come at once. An error is only
// for a failure of the program.
func (e *Engine) Solve(ctx context.Context, d *section.Document, o Options) (*Result, []section.Problem, error) {
	panic("rating: not built")
}

// Outline returns the shapes to draw without solving, with unplaced parts marked Unset beside the holder, and all problems of substance. Shapes are returned as far as they
// can be made out even when there are problems.
func Outline(d *section.Document, cat *catalog.Catalog) ([]section.Shape, []section.Problem) {
	panic("rating: not built")
}

// Snapshot returns the document with stock_used set to the rows of cat that it uses: call it before Save.
func Snapshot(d *section.Document, cat *catalog.Catalog) *section.Document {
	panic("rating: not built")
}

// Settle, LayUp and MakeRoom return the edit that places the parts of the top level.
func Settle(d *section.Document, cat *catalog.Catalog) (map[string]section.Point, error) {
	panic("rating: not built")
}

// LayUp places the parts of a round holder in concentric layers.
func LayUp(d *section.Document, cat *catalog.Catalog) (map[string]section.Point, error) {
	panic("rating: not built")
}

// MakeRoom pushes the others apart so that the part held stays where it is; ok is false if there is no room.
func MakeRoom(d *section.Document, cat *catalog.Catalog, held string) (at map[string]section.Point, ok bool) {
	panic("rating: not built")
}

// Bounds returns the box (mm) around the outer surface: part of render's Field.
func (r *Result) Bounds() (x0, y0, x1, y1 float64) { panic("rating: not built") }

// Row fills dst with °C at (x0 + i·dx, y), lengths in mm, NaN outside: part of render's Field. Safe for concurrent use.
func (r *Result) Row(dst []float64, y, x0, dx float64) { panic("rating: not built") }

// Readings returns what is known of every shape and layer, for pictures.
func (r *Result) Readings() []section.Reading { panic("rating: not built") }

// Sentence returns the answer as the two lines that stand on top of the window and of every export: the state word ("Within", "Over") with
// what governs, and what is assumed.
func (r *Result) Sentence() (answer, assumed string) { panic("rating: not built") }

// Caution is the standing caution of every window, picture and report.
const Caution = "A calculation aid. Local codes, the maker's data and licensed practice decide; where the code's value is lower, it governs. Joints, faults and damage are not covered."
