//go:build !linux

package section

import (
	"errors"
	"testing"
)

func mountTiny(string) error { return errors.New("on this system") }

func unmount(string) {}

func asNobody(t *testing.T) { t.Skip("run as an ordinary user") }
