package main

import (
	_ "github.com/alecthomas/kong"
	_ "github.com/fogleman/gg"
	_ "golang.org/x/image/font/gofont/goregular"
	_ "gonum.org/v1/gonum/mat"
	_ "gopkg.in/yaml.v3"
)
