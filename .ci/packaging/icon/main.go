// Command icon writes a smaller copy of a picture: icon FROM.png SIZE TO.png. It is run when the program is packaged.
package main

import (
	"errors"
	"fmt"
	"image"
	"image/png"
	"os"
	"strconv"

	"golang.org/x/image/draw"
)

func main() {
	if err := run(os.Args[1:]); err != nil {
		fmt.Fprintln(os.Stderr, "icon:", err)
		os.Exit(1)
	}
}

func run(args []string) error {
	if len(args) != 3 {
		return errors.New("write icon FROM.png SIZE TO.png")
	}
	size, err := strconv.Atoi(args[1])
	if err != nil || size < 1 || size > 4096 {
		return fmt.Errorf("%q is no size in pixels", args[1])
	}
	from, err := os.Open(args[0])
	if err != nil {
		return err
	}
	defer from.Close()
	whole, err := png.Decode(from)
	if err != nil {
		return err
	}
	small := image.NewRGBA(image.Rect(0, 0, size, size))
	draw.CatmullRom.Scale(small, small.Bounds(), whole, whole.Bounds(), draw.Src, nil)
	to, err := os.Create(args[2])
	if err != nil {
		return err
	}
	if err := png.Encode(to, small); err != nil {
		to.Close()
		return err
	}
	return to.Close()
}
