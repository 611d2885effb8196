// Package film owns the heat transfer from the outside of a run to its surroundings: natural and forced convection, radiation, sun, soil and
// water, as functions with their published source and range. SI throughout, temperatures in K; coefficients in W/m²K.
//
// Every formula says whether it was asked inside its range and stays finite and continuous outside, so that an iteration may pass through;
// an answer from outside a range carries a note for people. The room must not know of cables, documents or fields.
package film
