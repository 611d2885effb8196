// Package harmonic owns part maps per angular harmonic, multipole translations and round walls. It must not know anything else.
package harmonic
