package catalog

import (
	"testing"

	"packrise/assets"
)

func BenchmarkRead(b *testing.B) {
	for b.Loop() {
		if _, err := read(assets.Catalog, "catalog"); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkConductor(b *testing.B) {
	c := Load()
	for b.Loop() {
		if _, err := c.Conductor("2,5 mm²", "copper", Flexible); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkWith(b *testing.B) {
	c := Load()
	row, _ := c.Row("conductor", "12 AWG/copper/stranded")
	for b.Loop() {
		if _, _, err := c.With("conductor", "12 AWG/copper/stranded", row); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkParse(b *testing.B) {
	c := Load()
	for b.Loop() {
		if _, err := c.Parse("3x 12 thhn"); err != nil {
			b.Fatal(err)
		}
	}
}
