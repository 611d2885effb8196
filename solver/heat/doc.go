// Package heat owns the heat problem and its answer: Problem, Settings, Result with Status and counters. Plain SI float64, the
// unit in every comment. It must not know cables, YAML or colours.
//
// # How it solves
//
// There is no mesh. A region is one medium: the holder's inside, or a cable's. A piece is a round part in it; its inside is
// eliminated exactly, harmonic by harmonic (package harmonic), and becomes a reflection t_n. A cable is a piece whose inside is a region of its
// own: that is solved once for all that its jacket lets in and becomes a small dense law. What is left are the outgoing amplitudes of the
// pieces, A e = F with A = diag(−sgn t) + S 𝒢 S symmetric, S = √|t|: conjugate gradients or minimal residuals, with sparse blocks.
// A round wall acts by its images; any other border (package outline) is eliminated exactly in every product.
//
// Influence matrices and tangents iterate on many right-hand sides side by side (batch.go, crowd.go, throng.go), so that every coupling is
// fetched once for all of them.
//
// The temperatures are G0 q − Fᵀ A⁻¹ F q/c2, c2 = 1/(2πk), with G0 the logarithms and series resistances. The orders of the harmonics follow from
// the contacts (contact.go) and are the only approximation besides tolerances; what they leave out is estimated in estimate.go.
package heat
