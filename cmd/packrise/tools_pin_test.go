package main

import (
	_ "fyne.io/fyne/v2/test"
	_ "github.com/google/go-cmp/cmp"
	_ "github.com/rogpeppe/go-internal/testscript"
	_ "pgregory.net/rapid"
)
