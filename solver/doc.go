// Package solver holds no code of its own. Below it lie the rooms of the engine: quantity (units), section (the document), catalog (checked
// tables), pack (where circles go), heat with harmonic, outline and fluid (the temperature field), and rating (cable physics). None of them knows windows
// or pixels. The test beside this file keeps the arrows between all rooms of the program.
package solver
