// Package quantity is the one door for units: it reads what a person wrote ("12 AWG", "1/2 in", "2,5 mm²", "104 °F") into the
// unit that the program counts in (mm, mm², °C, A) and writes numbers for people. It knows nothing of cables, documents or
// windows. Every error is one lower-case sentence that says what to write instead.
package quantity
