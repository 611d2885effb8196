package render

import "io"

// WritePNG draws the whole picture (sentence, ladder, section, status, notes, caution) at w × h pixels.
func WritePNG(out io.Writer, s Scene, w, h int, st Style) error { panic("render: not built") }
