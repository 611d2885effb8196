package section

import (
	"fmt"
	"strings"
	"testing"
)

// many returns a file of 200 parts and 50 loads.
func many() string {
	var b strings.Builder
	b.WriteString(head + "parts:\n")
	for i := range 200 {
		b.WriteString(core(fmt.Sprint("L", i), fmt.Sprintf(", layers: [{material: pvc, thickness_mm: 0.48}], at_mm: [%d.123456789, -4.987654321]", i)))
	}
	b.WriteString("loads:\n")
	for i := range 50 {
		fmt.Fprintf(&b, "  - {id: a%d, conductors: [L%d, L%d, L%d, L%d], current_a: 16}\n", i, 4*i, 4*i+1, 4*i+2, 4*i+3)
	}
	return b.String()
}

func BenchmarkRead200(b *testing.B) {
	data := []byte(many())
	for b.Loop() {
		if d, _ := Read(data); d == nil {
			b.Fatal("not read")
		}
	}
}

func BenchmarkWrite200(b *testing.B) {
	d, _ := Read([]byte(many()))
	d = Move(d, "L100", Point{1, 2})
	for b.Loop() {
		if _, err := Write(d); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkDrag200(b *testing.B) {
	d, _ := Read([]byte(many()))
	h := NewHistory(d)
	x := 0.0
	for b.Loop() {
		x++
		h.Apply(Edit{Name: "move L100", Object: "L100", Gesture: 1, Do: func(d *Document) *Document { return Move(d, "L100", Point{x, 0}) }})
		_ = h.Dirty()
	}
}

func BenchmarkRefuse100MB(b *testing.B) {
	data := make([]byte, 100<<20)
	for b.Loop() {
		if d, _ := Read(data); d != nil {
			b.Fatal("read")
		}
	}
}
