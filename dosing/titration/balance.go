package titration

import (
	"fmt"
	"math"

	"beckline/carbonate"
)

// IonCheck compares a titrated alkalinity with the one that the ions leave.
type IonCheck struct {
	Titrated   float64 // eq/L
	FromIons   float64 // eq/L
	Difference float64 // eq/L, titrated less from ions
	Allowed    float64 // eq/L
	Agrees     bool
	Likely     string // what would explain the difference, "" where nothing is known to
}

// AlkalinityFromIons is the alkalinity that makes a water neutral, eq/L: the
// reference species' charges of its totals, since the proton condition is what
// the inert ions leave over. It means something only where all major ions are in
// the totals. The water's own Alkalinity is not used.
func AlkalinityFromIons(w carbonate.Water) float64 {
	w.Alkalinity = 0
	return w.ChargeBalance()
}

// CheckIons compares the titrated alkalinity of a water with that of its ions.
// The allowance is that of Standard Methods 1030 E for the whole balance (from
// memory): 0.2 meq/L up to 3 meq/L of anions, 2 % up to 10 meq/L, 5 % above.
// Errors: *Error where there are no ions to compare with.
func CheckIons(w carbonate.Water) (IonCheck, error) {
	anions := math.Max(w.Alkalinity, 0)
	cations := 0.0
	for i, v := range w.Totals {
		if z := carbonate.Component(i).ReferenceCharge(); z < 0 {
			anions -= z * v
		} else {
			cations += z * v
		}
	}
	if cations == 0 {
		return IonCheck{}, &Error{CodeNoIons, "ions", "no cations measured", "calcium, magnesium, sodium, chloride and sulfate"}
	}
	c := IonCheck{Titrated: w.Alkalinity, FromIons: AlkalinityFromIons(w)}
	c.Difference = c.Titrated - c.FromIons
	switch {
	case anions <= 3e-3:
		c.Allowed = 0.2e-3
	case anions <= 10e-3:
		c.Allowed = 0.02 * anions
	default:
		c.Allowed = 0.05 * anions
	}
	c.Agrees = math.Abs(c.Difference) <= c.Allowed
	if !c.Agrees {
		c.Likely = c.likely()
	}
	return c, nil
}

// slips are factors between a number and what it should have been.
var slips = []struct {
	factor float64
	text   string
}{
	{carbonate.MolarMassHCO3 / (carbonate.MolarMassCaCO3 / 2), "the figure may be mg/L of HCO3, not of CaCO3"},
	{carbonate.MolarMassCaCO3 / 2 / carbonate.MolarMassHCO3, "the figure may be mg/L of CaCO3 taken for HCO3"},
	{10, "the titrant may be ten times weaker than entered"},
	{0.1, "the titrant may be ten times stronger than entered"},
	{5, "the titrant may be 0.02 eq/L, not 0.1"},
	{0.2, "the titrant may be 0.1 eq/L, not 0.02"},
	{2, "the sample may be twice as large as entered"},
	{0.5, "the sample may be half as large as entered"},
}

func (c IonCheck) likely() string {
	if c.FromIons <= 0 {
		return "the ions leave no alkalinity at all: one of them is missing or too high"
	}
	for _, s := range slips {
		if math.Abs(c.Titrated-s.factor*c.FromIons) <= math.Min(c.Allowed, 0.05*c.Titrated) {
			return s.text
		}
	}
	return ""
}

// Text is the comparison in one line.
func (c IonCheck) Text() string {
	verdict := "agree"
	if !c.Agrees {
		verdict = "disagree"
	}
	s := fmt.Sprintf("titrated %s, from the ions %s: they %s within %.1f", milligrams(c.Titrated), milligrams(c.FromIons),
		verdict, AsCaCO3(c.Allowed))
	if c.Likely != "" {
		s += "; " + c.Likely
	}
	return s
}
