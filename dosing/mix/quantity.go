package mix

import (
	"beckline/carbonate"
	"beckline/dosing"
)

// Quantity is a figure of the finished water that a mix can be asked to keep
// within a range.
type Quantity int

// The quantities and the units of their limits.
const (
	PH              Quantity = iota + 1 // activity scale, 0 to 14
	Alkalinity                          // eq/L, as the finished water would be titrated
	SaturationIndex                     // calcite, dimensionless
	CCPP                                // mol/L of CaCO3, negative where the water dissolves it
	Sodium                              // mol/L
	Calcium                             // mol/L
	ChlorideSulfate                     // chloride over sulfate by mass
	Magnesium                           // mol/L
	Chloride                            // mol/L
	Sulfate                             // mol/L
	DIC                                 // mol/L of C
)

// Quantities lists all of them in the order in which lists show them.
func Quantities() []Quantity {
	out := make([]Quantity, 0, DIC)
	for q := PH; q <= DIC; q++ {
		out = append(out, q)
	}
	return out
}

// QuantityNamed finds a quantity by its Field.
func QuantityNamed(name string) (Quantity, bool) {
	for _, q := range Quantities() {
		if q.Field() == name {
			return q, true
		}
	}
	return 0, false
}

// Field is the quantity's name as a reading or figure on the command line.
func (q Quantity) Field() string {
	switch q {
	case PH:
		return "ph"
	case Alkalinity:
		return "alkalinity"
	case SaturationIndex:
		return "si"
	case CCPP:
		return "ccpp"
	case Sodium:
		return "sodium"
	case Calcium:
		return "calcium"
	case ChlorideSulfate:
		return "chloride-sulfate"
	case Magnesium:
		return "magnesium"
	case Chloride:
		return "chloride"
	case Sulfate:
		return "sulfate"
	case DIC:
		return "dic"
	}
	return ""
}

// quantityOf reads a quantity off a solved water.
func quantityOf(s *carbonate.State, q Quantity, byTitration bool) (v float64, ok bool) {
	t := &s.Water.Totals
	switch q {
	case PH:
		return s.PH, true
	case Alkalinity:
		return dosing.Target{Kind: dosing.TargetAlkalinity}.Figure(s, byTitration)
	case SaturationIndex:
		v, _, ok := s.SaturationIndex()
		return v, ok
	case CCPP:
		v, err := s.CCPP()
		return v, err == nil
	case ChlorideSulfate:
		return s.Water.ChlorideSulfateRatio()
	}
	if c, ok := q.component(); ok {
		return t[c], true
	}
	return 0, false
}

// component is the total that a quantity is, for those that are one.
func (q Quantity) component() (carbonate.Component, bool) {
	switch q {
	case Sodium:
		return carbonate.Sodium, true
	case Calcium:
		return carbonate.Calcium, true
	case Magnesium:
		return carbonate.Magnesium, true
	case Chloride:
		return carbonate.Chloride, true
	case Sulfate:
		return carbonate.Sulfate, true
	case DIC:
		return carbonate.Carbon, true
	}
	return 0, false
}
