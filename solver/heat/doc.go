// Package heat owns the heat problem and its answer: Problem, Settings, Result with Status and counters. Plain SI float64, the
// unit in every comment. It must not know cables, YAML or colours.
package heat
