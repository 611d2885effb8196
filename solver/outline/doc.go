// Package outline owns boundary integrals for straight-sided (later hull and non-round) outlines. Lengths in metres, heats in
// W/m, temperatures in K. It must not know anything else.
//
// The temperature is T = −Σ q/(2πk) ln|z−c| + Re Σ d_m (a/(z−c))^m + Σ∫σ (−ln|z−y|/2π) ds + T_c, in the medium and in every layer of
// the wall alike: each interface carries a single-layer density σ that makes its heat flow continuous there, the outer face one that
// meets the outside, and T_c is fixed by the closure Σq/k + Σ∫σ ds = 0. Densities are Legendre series on straight panels; the
// conditions hold in the mean over as many cells per panel as it has modes, so that heat is conserved exactly. All integrals of a
// panel over a cell are closed forms in Legendre functions of the second kind (Abramowitz and Stegun, Handbook of Mathematical
// Functions, chapter 8).
package outline
