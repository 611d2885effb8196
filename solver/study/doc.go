// Package study asks what takes many solutions: how much each conductor may carry, how sure that is, what to change first, the best seating,
// what a measurement says, how many more fit. It screens through the working point of an answer (rating.Point) and solves every number that
// it gives in full.
//
// It must not know pixels, the toolkit or file formats.
package study
