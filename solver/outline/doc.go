// Package outline owns boundary integrals for straight-sided (later hull and non-round) outlines. Lengths in metres, heats in
// W/m, temperatures in K. It must not know anything else.
package outline
