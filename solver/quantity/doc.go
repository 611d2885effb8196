// Package quantity is the one door for units: it reads what a person wrote ("12 AWG", "1/2 in", "2,5 mm²", "104 °F") into SI
// and writes SI back in the unit that was written. It knows nothing of cables, documents or windows.
package quantity
