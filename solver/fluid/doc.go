// Package fluid owns the properties of air, other gases and water. Temperatures in K, SI throughout.
package fluid
