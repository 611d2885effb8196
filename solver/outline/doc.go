// Package outline owns boundary integrals for straight-sided, hull and non-round outlines. Lengths in metres, heats in
// W/m, temperatures in K. It must not know anything else.
//
// The temperature is T = −Σ q/(2πk) ln|z−c| + Re Σ d_m (a/(z−c))^m + Σ∫σ (−ln|z−y|/2π) ds + T_c, in the medium and in every layer of
// the wall alike: each interface carries a single-layer density σ that makes its heat flow continuous there, the outer face one that
// meets the outside, and T_c is fixed by the closure Σq/k + Σ∫σ ds = 0. Densities are Legendre series on straight panels; the
// conditions hold in the mean over as many cells per panel as it has modes, so that heat is conserved exactly. All integrals of a
// panel over a cell are closed forms in Legendre functions of the second kind (Abramowitz and Stegun, Handbook of Mathematical
// Functions, chapter 8).
//
// Metal, foil and paint need no model of their own: because heat is conserved cell by cell, what conducts along a thin good
// conductor comes out of the same densities. At fineness 1 the wall adds a few mK to rises of 20–50 K, 0.7 up to 0.04 K at a steel
// wall, 1.5 under 1 mK. Apart from that the answer is as good as the parts' orders: a part that touches a metal wall needs as many
// harmonics as one that touches its own mirror image, that is, about twice what a plastic wall asks for.
//
// A HullSystem is the same on a bundle's taut string: strings are straight panels; an arc, in the plane of the logarithm, is one too, but for
// something smooth. The arcs' density lies just outside the part's own surface, so that every harmonic of it and of the strings that touch
// counts: what a part sends straight back of those beyond its order is the image in its rim (circle theorem) besides the few that its inner
// layers reflect otherwise. One panel a string and an arc is enough for 1 to 4 mK of 40 K; what moves only rewrites its own.
//
// Shaped solves sections of any convex contours in the same way: metals, insulations, jackets and walls of arcs and straight pieces, each face a
// density on bends. Halving bends where a density is not resolved brings the reference sections within 1 mK.
package outline
