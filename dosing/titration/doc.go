// Package titration turns what was read on the bench into the readings that a
// case takes: burettes into alkalinity and hardness, a warm sample's
// conductivity into that at 25 C, a phenolphthalein titre into inorganic carbon.
//
// Volumes are in mL, as burettes and pipettes are marked, and titrant
// concentrations in eq/L (normality) or mol/L; results are in eq/L and mol/L.
// A refusal is an *Error; what was accepted but looks odd comes as Notes.
//
//	published method                               file            function
//	Standard Methods 2320, total alkalinity        burette.go      Burette.Alkalinity
//	  low alkalinity, two end points               lowalk.go       LowAlkalinity.Solve
//	  phenolphthalein and total, five rows         split.go        Split
//	Gran 1952, straight part of a titration curve  gran.go         Gran
//	Standard Methods 2340 C and 3500-Ca B, EDTA    hardness.go     EDTA.Hardness
//	Standard Methods 2510, conductivity            conductivity.go ConductivityAt25
//	Nernst slope of an uncompensated meter         meter.go        Compensated
//	Standard Methods 1030 E, ions                  balance.go      CheckIons
//	carbon from phenolphthalein alkalinity         carbon.go       CarbonFromP
//
// The methods are cited from memory unless a line says otherwise. Waters with
// organic acids, which titrate only in part, and pH read at another temperature
// than the process are solved with the case itself.
//
// Handling: titrants are acids and the indicators may stain or poison; wear eye
// protection, add acid to water, and follow the reagent's label and the
// laboratory's own rules.
package titration
