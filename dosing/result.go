package dosing

import (
	"beckline/carbonate"
	"beckline/dosing/feed"
)

// Result is the answer to a Case. Every rendering shows these numbers and
// computes none of its own.
type Result struct {
	Case     Case
	Sources  []Figures // of a blend, each water before it is mixed, in the order of the case
	Stations []Station // the raw water, then one an addition, in order
	Solved   int       // index into Stations of the (first) addition solved for, 0 if none
	Warnings []Warning // sorted by code, then field
	Checks   []Check
}

// Raw is the water before any addition.
func (r *Result) Raw() *Station { return &r.Stations[0] }

// Finished is the water after the last addition.
func (r *Result) Finished() *Station { return &r.Stations[len(r.Stations)-1] }

// Dose is the station of the solved addition, nil where nothing was solved.
func (r *Result) Dose() *Station {
	if r.Solved == 0 {
		return nil
	}
	return &r.Stations[r.Solved]
}

// Doses are the stations of all solved additions, in order: one, or two where
// two targets were asked for.
func (r *Result) Doses() []*Station {
	var out []*Station
	for i := range r.Stations {
		if r.Stations[i].Solved {
			out = append(out, &r.Stations[i])
		}
	}
	return out
}

// Station is the water after one step of its path, and the step.
type Station struct {
	Addition *Addition  // nil for the raw water
	Dose     float64    // mol of formula per litre; zero for the raw water
	Feed     feed.Rates // zero for the raw water
	Solved   bool
	Figures  Figures
}

// Figures is everything the model says of one water. Amounts mol/L (or eq/L),
// temperature K.
type Figures struct {
	Water               carbonate.Water
	PH                  float64
	Alkalinity          float64 // eq/L as it would be measured (differs from Water.Alkalinity with organic acids)
	DIC                 float64
	FreeCO2             float64
	IonicStrength       float64
	IonicStrengthFrom   IonicRoute
	SaturationIndex     Optional // calcite
	SaturationAragonite Optional
	CCPP                Optional // mol/L of CaCO3, negative when the water dissolves it
	BufferIntensity     float64  // eq/L per pH
	ChlorideSulfate     Optional // mass ratio
	LarsonRatio         Optional // (Cl + SO4)/alkalinity, eq/eq
	Calcium             Optional // totals that were measured or dosed, mol/L
	Magnesium           Optional
	Sodium              Optional
	Chloride            Optional
	Sulfate             Optional
}

// IonicRoute says where the ionic strength came from.
type IonicRoute int

// The three routes, first that applies.
const (
	FromConductivity IonicRoute = iota + 1
	FromTDS
	FromIons
)

// Warning is a code, the reading it is about ("" for the whole), and the
// numbers that its sentence needs. Sentences are written in report.
type Warning struct {
	Code  string
	Field string // name as on the command line without dashes before, e.g. "calcium-hardness"
	Given string // what was typed, already cleaned, where there is such a thing
	Value float64
	Limit float64
}

// Check is one internal comparison of the result with an independent route.
type Check struct {
	Name   string  // closure_ph, alkalinity_balance, carbon_balance
	Value  float64 // the difference found (pH; eq/L; mol/L)
	Agrees bool
}
