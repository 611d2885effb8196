package heat

import "context"

// Model is a Problem made ready: the matrix is written once and serves many sets of heats. Not safe for concurrent use.
type Model struct{}

// New checks the geometry (misuse panics: negative radii, a part before its cable, non-finite numbers; overlaps over 1 µm are
// the caller's to exclude and only cost accuracy) and writes the matrix.
func New(p Problem, s Settings) *Model { panic("heat: New is not built") }

// Solve finds the temperatures for the given heats (W/m, one per part, read for Metal parts only); nil means the Problem's own. It starts from
// the last solution. Status is Cancelled when ctx ends first, and the Result then holds the best so far.
func (m *Model) Solve(ctx context.Context, heats []float64) *Result { panic("heat: not built") }

// Influence returns K[i][j] in K per W/m: the rise of part i's Core temperature for 1 W/m made in part j; rows and columns of parts that
// aren't Metal are nil.
func (m *Model) Influence(ctx context.Context) ([][]float64, Status) { panic("heat: not built") }

// Move puts a part of the top level elsewhere and rewrites only its blocks: for dragging. Orders are fixed at the larger of old and new.
func (m *Model) Move(part int, x, y float64) { panic("heat: not built") }

// Ground returns the Core temperatures (K above the common zero) with all heats zero: Ambient, unless sides or bores are held at other
// temperatures.
func (m *Model) Ground(ctx context.Context) ([]float64, Status) { panic("heat: not built") }
