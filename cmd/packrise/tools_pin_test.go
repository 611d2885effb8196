package main

import (
	_ "github.com/google/go-cmp/cmp"
	_ "github.com/rogpeppe/go-internal/testscript"
	_ "fyne.io/fyne/v2/test"
	_ "pgregory.net/rapid"
)
