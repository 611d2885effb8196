// Package fluid owns the properties of air, nitrogen and water (vacuum is their absence) and the pressure of the atmosphere by altitude. Temperatures in K,
// pressures in Pa, SI throughout. It must not know anything else.
//
// Every function stays finite and smooth beyond its range, so that an iteration may pass through; InRange tells whether the answer counts.
package fluid
