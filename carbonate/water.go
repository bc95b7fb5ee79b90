package carbonate

// Water is the conserved description of a water: what mixing and dosing add up
// linearly. Its pH follows from it (see Solve).
type Water struct {
	Totals     Totals
	Alkalinity float64 // eq/L, the proton condition of doc.go; may be negative after acid
	Background float64 // mol/L of ionic strength that the model's species do not explain, >= 0
	Kelvin     float64 // temperature, K
}
