// Package rules knows code tables and counting: what a wiring code, a machine standard or a handbook allows each conductor of one run, step by step
// with its clause; terminals that cap the current; devices; fill and fit. Its tables are data in assets/catalog/rules, and people add rule sets of the
// same form. It takes a plain Run and returns plain values. It must not know heat, documents or what the solver computed, and a count never depends on
// a current.
package rules
