package ui

import (
	"context"
	"fmt"
	"image/color"
	"testing"
	"time"

	"fyne.io/fyne/v2"

	"packrise/render"
	"packrise/solver/rating"
	"packrise/solver/section"
)

// wirewayOf is a wireway of so many equal cores in rows.
func wirewayOf(n int) *section.Document {
	d := testDesign()
	side := 1
	for side*side < n {
		side++
	}
	inside := section.Some(float64(side)*4.2 + 2)
	core := d.Parts[0]
	d.Holder.Kind, d.Holder.InsideMM = section.Wireway, section.Opt[float64]{}
	d.Holder.WidthMM, d.Holder.HeightMM = inside, inside
	d.Parts, d.Loads[0].Conductors = nil, nil
	for i := range n {
		p := core
		p.ID = fmt.Sprintf("P%d", i+1)
		p.At = section.Some(section.Point{X: 3 + 4.2*float64(i%side), Y: 3 + 4.2*float64(i/side)})
		d.Parts = append(d.Parts, p)
		d.Loads[0].Conductors = append(d.Loads[0].Conductors, p.ID)
	}
	d.Loads[0].CurrentA = section.Some(3.0)
	return d
}

// BenchmarkWindowFollows is what the window's goroutine does for one edit, and for one answer.
func BenchmarkWindowFollows(b *testing.B) {
	for _, n := range []int{7, 37, 200} {
		l := newLoop()
		w := NewWindow(fyne.CurrentApp(), Options{Catalog: testCatalog(), Document: wirewayOf(n), Rooms: l.rooms(Rooms{})})
		w.win.Resize(usualSize)
		for w.desk.Solving() {
			l.run()
			time.Sleep(time.Millisecond)
		}
		b.Run(fmt.Sprintf("edit/%d", n), func(b *testing.B) {
			b.ReportAllocs()
			x := 3.1
			for b.Loop() {
				x += 1e-6
				w.desk.Apply(moveTo("P1", x, 3, 0), false)
			}
		})
		b.Run(fmt.Sprintf("answer/%d", n), func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				w.desk.tell(ChangedResult)
			}
		})
		w.Close()
	}
}

// BenchmarkPaint is what the painter does beside the window: a frame of a drag, and the whole picture.
func BenchmarkPaint(b *testing.B) {
	for _, n := range []int{7, 37, 200} {
		r, problems, err := rating.NewEngine(testCatalog()).Solve(context.Background(), wirewayOf(n), rating.Options{})
		if r == nil {
			b.Fatal(problems, err)
		}
		s := sheet{scene: sceneOf(r), style: render.Style{Scale: 1}, paper: color.White, isotherms: true}
		s.scale = render.ScaleOf(s.scene)
		s.view = render.FitView(s.scene.Shapes, 730, 470, s.style)
		for _, coarse := range []bool{true, false} {
			s.coarse = coarse
			b.Run(fmt.Sprintf("coarse=%v/%d", coarse, n), func(b *testing.B) {
				b.ReportAllocs()
				for b.Loop() {
					(&painter{}).paint(context.Background(), s)
				}
			})
		}
	}
}
