// Package pack owns where circles go: settling under gravity, concentric lay-up, pushing overlaps apart, the smallest round
// holder, the taut-string hull. It knows nothing of currents or heat. All lengths share one unit of the caller's choice.
package pack
