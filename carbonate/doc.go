// Package carbonate models the carbonate system of a water: its pH, alkalinity
// and inorganic carbon, each from the other two, with temperature-dependent
// constants, activities, ion pairs and minor acids, and what follows from them.
// Pure functions on floats: no units text, no input or output.
//
// Conventions. pH is the hydrogen-ion activity. Amounts are mol/L (taken as
// mol/kg), alkalinity eq/L, temperature K. Alkalinity is the proton condition
// with reference species CO2, SO4, NH4+, H2PO4-, H4SiO4, B(OH)3, F-, HOCl and
// the uncharged organic acids:
//
//	Alk = -H + OH + HCO3 + 2CO3 + CaHCO3 + 2CaCO3 + MgHCO3 + 2MgCO3 + CaOH + MgOH
//	      - HSO4 - H3PO4 + HPO4 + 2PO4 + NH3 + H3SiO4 + B(OH)4 - HF + OCl
//	      + Ac + HCOO + H2Cit + 2HCit + 3Cit
//
// It is conserved by mixing, and dosing adds to it linearly.
//
// Range: 0 to 50 C, ionic strength to 0.5 mol/L. Outside, a *RangeError.
//
// Where to find a published method:
//
//	equilibrium constants        constants.go   ConstantsAt; sources beside each row
//	Davies activity equation     activity.go    activity.at
//	ion pairs, mass action       point.go       point.sweep
//	minor acids                  minors.go      point.sweepMinors
//	carbon from pH and Alk       dic.go         Constants.FromPH
//	pH from carbon and Alk       ph.go          Constants.Solve, SolveByBracket
//	either, carbon measured      carbon.go      Constants.FromCarbon, CarbonAt, AlkalinityAt
//	dose to a pH                 titrate.go     Constants.DoseToPH
//	Langelier index, exact       saturation.go  State.SaturationIndex
//	CCPP (SM 2330)               saturation.go  State.CCPP
//	buffer intensity, Van Slyke  buffer.go      State.BufferIntensity
//	CSMR, Larson ratio           ratios.go      Water.ChlorideSulfateRatio, LarsonRatio
//	blend by flow                blend.go       Blend
//	aeration                     aerate.go      State.Aerate
//
// Not here, on purpose: pairs of sodium and potassium (with them the standard
// buffers fit worse), CaHPO4 (its effect on alkalinity is at most the total
// phosphate), precipitation as a process in time, gas transfer rates, and
// reactions of chlorine beyond its own dissociation.
package carbonate
