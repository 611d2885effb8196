package render

import (
	"fmt"
	"image"
	"testing"
)

func BenchmarkSectionLayer(b *testing.B) {
	for _, n := range []int{7, 37, 91, 200} {
		b.Run(fmt.Sprint(n), func(b *testing.B) {
			s := hexScene(n)
			s.Field = fastField{s.Field}
			v := FitView(s.Shapes, 900, 900, Style{})
			img := image.NewRGBA(image.Rect(0, 0, 900, 900))
			b.ReportAllocs()
			for b.Loop() {
				SectionLayer(NewRaster(img), s, v, Scale{30, 90}, Style{})
			}
		})
	}
}
