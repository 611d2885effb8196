// Package harmonic owns part maps per angular harmonic, multipole translations, round walls and the sparse symmetric system
// that they make. Lengths in any one unit, conductivities in W/mK. It must not know anything else.
//
// # Conventions
//
// z = x + iy. In a medium of conductivity k the temperature is
//
//	T = −Σ_j q_j/(2πk) ln|z−c_j| + Re Σ_j Σ_{m≥1} d_m (a_j/(z−c_j))^m + the wall's field,
//
// and about disc i the field of everything else is Re Σ_n b_n ((z−c_i)/a_i)^n. Vectors hold the scaled amplitudes
// δ_m = √m d_m (outgoing) and β_n = √n conj(b_n) (incoming) with real and imaginary parts side by side; in these every
// coupling is symmetric under the plain real inner product. The method is Rayleigh's multipole method for arrays of
// cylinders (Rayleigh 1892; Perrins, McKenzie and McPhedran 1979), with the images of a round wall in closed form.
package harmonic
