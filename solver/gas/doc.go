// Package gas owns what a gas does between surfaces besides conducting: grey, diffuse radiation with view factors from the geometry, and
// convection in large spaces through one air node. Lengths in metres, temperatures in kelvin, heats in W/m (per metre of run). It must not
// know what lies inside the surfaces, nor anything of cables.
//
// Surfaces are circles and convex outlines of straight lines and arcs within one convex outline, cut into patches of one temperature and one radiosity each (R. Siegel and J. R. Howell,
// Thermal Radiation Heat Transfer, chapters 5 and 6: view factors and grey-diffuse enclosures). From a point of a patch the visible
// patches are found exactly, as intervals of the sine of the angle from its normal, which in the plane is what a view factor is
// the half of; a few Gauss points per patch then give A_i F_ij, which is made symmetric and closed.
package gas
