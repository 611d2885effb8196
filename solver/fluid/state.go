package fluid

// State is a fluid at one temperature and pressure.
type State struct {
	Density      float64 // kg/m³
	Viscosity    float64 // dynamic, Pa·s
	Conductivity float64 // W/mK
	Cp           float64 // at constant pressure, J/kgK
	Expansion    float64 // volumetric, at constant pressure, 1/K; negative in water below 4 °C
	InRange      bool    // the temperature is inside the range of the formulas
}

// Kinematic returns the kinematic viscosity, m²/s.
func (s State) Kinematic() float64 { return s.Viscosity / s.Density }

// Diffusivity returns the thermal diffusivity, m²/s.
func (s State) Diffusivity() float64 { return s.Conductivity / (s.Density * s.Cp) }

// Prandtl returns the Prandtl number.
func (s State) Prandtl() float64 { return s.Viscosity * s.Cp / s.Conductivity }
