package ui

import (
	"fmt"
	"slices"
	"strings"

	"packrise/solver/catalog"
	"packrise/solver/section"
)

// spelledHolder returns a holder with what its stock stands for written out: size and wall.
func spelledHolder(cat *catalog.Catalog, h section.Holder) section.Holder {
	row, ok := cat.Holder(h.Stock)
	if h.Stock == "" || !ok {
		return h
	}
	h.Stock = ""
	if row.Kind == section.Wireway {
		h.WidthMM, h.HeightMM = section.Some(micrometres(row.WidthM*1e3)), section.Some(micrometres(row.HeightM*1e3))
	} else {
		h.InsideMM = section.Some(micrometres(row.InsideM * 1e3))
	}
	if len(h.Layers) == 0 && row.WallM > 0 {
		h.Layers = []section.Layer{{Material: row.Wall, ThicknessMM: micrometres(row.WallM * 1e3)}}
	}
	return h
}

// withHolder returns d in a holder of the catalogue. Parts keep their place relative to the middle; what is not of the holder's size stays.
func withHolder(cat *catalog.Catalog, d *section.Document, row catalog.Holder) *section.Document {
	now := section.Holder{Kind: row.Kind, Stock: row.ID, Fill: d.Holder.Fill, ClearanceMM: d.Holder.ClearanceMM, LengthM: d.Holder.LengthM, TouchLimitC: d.Holder.TouchLimitC}
	if row.Kind == d.Holder.Kind {
		now.Sides = d.Holder.Sides
	}
	from, to := middleOf(cat, d.Holder), middleOf(cat, now)
	return withMiddle(section.SetHolder(d, now), from, to)
}

// withMiddle returns d with its parts where they were from another middle.
func withMiddle(d *section.Document, from, to section.Point) *section.Document {
	if from == to {
		return d
	}
	return d.With(func(d *section.Document) {
		parts := slices.Clone(d.Parts)
		for i := range parts {
			if p := &parts[i]; p.At.OK {
				p.At.V.X += to.X - from.X
				p.At.V.Y += to.Y - from.Y
			}
		}
		d.Parts = parts
	})
}

// middleOf returns the middle of a holder in its own coordinates.
func middleOf(cat *catalog.Catalog, h section.Holder) section.Point {
	h = spelledHolder(cat, h)
	if h.Kind != section.Wireway {
		return section.Point{}
	}
	return section.Point{X: h.WidthMM.V / 2, Y: h.HeightMM.V / 2}
}

func findHolder(cat *catalog.Catalog, text string) (catalog.Holder, error) {
	want := squeezed(text)
	for _, h := range cat.Holders() {
		if squeezed(h.ID) == want || squeezed(h.Name) == want {
			return h, nil
		}
	}
	return catalog.Holder{}, notFound("conduit or wireway", strings.TrimSpace(text), cat.Nearest("holder", strings.ToLower(strings.TrimSpace(text)), 3))
}

func holderMeant(h catalog.Holder) string {
	if h.Kind == section.Wireway {
		return fmt.Sprintf("%s, inside %s × %s mm", h.Name, written(h.WidthM*1e3), written(h.HeightM*1e3))
	}
	return fmt.Sprintf("%s, inside ⌀ %s mm", h.Name, written(h.InsideM*1e3))
}
