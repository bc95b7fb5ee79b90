package dosing

import (
	"beckline/carbonate"
	"beckline/dosing/feed"
)

// Chemical is a pure substance and what one mole of its formula does to a water.
type Chemical struct {
	Formula     string  // NaOH; also the default basis of a dose
	Name        string  // sodium hydroxide
	MolarMass   float64 // g/mol of the formula
	Equivalents float64 // eq of alkalinity added per mole
	Adds        carbonate.Totals
	Bases       []Basis // other bases on which its dose is stated, trade habit first
	Coagulant   Coagulant
}

// Basis is another way to state a dose: mass of this per mole of the formula.
type Basis struct {
	Name     string  // "Cl2", "F", "N", "PO4", "Fe", "Al", "Al2O3"
	Mass     float64 // g of the basis per mole of the chemical's formula
	Habitual bool    // the trade states the dose so; a bare number then warns basis_assumed
}

// Coagulant says which metal hydroxide a coagulant leaves behind.
type Coagulant int

// The coagulant metals.
const (
	NotCoagulant Coagulant = iota
	Aluminium
	Iron
)

// Product is a chemical as delivered.
type Product struct {
	Name         string // caustic-25
	Title        string // "caustic soda 25 %"
	Chemical     Chemical
	Strength     float64      // kg of the chemical's formula per kg of product
	StrengthText string       // how the trade states the strength, e.g. "25 % by weight"
	Form         feed.Form    // liquid, solid, gas
	Density      feed.Density // table by strength and temperature; zero for solids and gases
	Purpose      Purpose
	Caution      string   // key of its safety sheet
	Warns        []string // warning codes that always come with it, e.g. purity_assumed

	Stated         Stating // in what terms the strength is stated; see AtStrength
	StatedStrength float64 // the strength in those terms, a fraction; equals Strength where stated by weight
	ExcessCaustic  float64 // kg of free NaOH per m3 of product, for hypochlorite; already counted in Chemical
}

// Purpose groups products by what they are fed for; only PHControl products are
// offered as ways to reach a target.
type Purpose int

// The purposes.
const (
	PHControl Purpose = iota + 1
	Coagulation
	Disinfection
	Fluoridation
	Inhibitor
	Neutralisation // acids for effluent and wash water; never offered for drinking water
)
