package titration

import "fmt"

// Limits of hardness titrations (common practice, no source).
const (
	greatestEDTA     = 0.5    // mol/L
	greatestHardness = 5000.0 // mg/L as CaCO3
	usualEDTA        = 0.01   // mol/L, Standard Methods 2340 C: 1 mL is 1.00 mg of CaCO3
)

// EDTA is one titration of hardness or of calcium with EDTA.
type EDTA struct {
	SampleML float64 // mL, above 0 to 1000
	Molarity float64 // mol/L of EDTA, above 0 to 0.5; the standard takes 0.01
	Titre    Titre
}

// MolarityOf turns a titrant's strength as printed on its bottle, mg of CaCO3
// per mL, into mol/L: 1 mg/mL is 0.009991 mol/L.
func MolarityOf(mgCaCO3PerML float64) float64 { return mgCaCO3PerML / (perEquivalent * 2e-3) }

// Hardness is calcium and magnesium, mol/L, from a titration at pH 10: mL x M /
// mL of sample, since EDTA takes metals one for one (Standard Methods 2340 C:
// mL x mg CaCO3 per mL x 1000 / mL of sample). At pH 12 with a calcium indicator
// the same sum gives calcium alone (Standard Methods 3500-Ca B). Errors: *Error.
func (e EDTA) Hardness() (float64, []Note, error) {
	if bad := within("molarity", e.Molarity, 0, greatestEDTA, true, "mol/L"); bad != nil {
		return 0, nil, bad
	}
	b := Burette{e.SampleML, e.Molarity, e.Titre}
	if err := b.check(); err != nil {
		return 0, nil, err
	}
	m := e.Titre.ML() * e.Molarity / e.SampleML
	mg := 2 * AsCaCO3(m)
	if mg > greatestHardness {
		return 0, nil, &Error{CodeOutsideRange, "molarity", fmt.Sprintf("%s mol/L, which gives %.0f mg/L as CaCO3", short(e.Molarity), mg),
			"readings that give at most 5000 mg/L as CaCO3"}
	}
	var notes []Note
	for _, n := range b.notes() {
		if n.Code != CodeNormality {
			notes = append(notes, n)
		}
	}
	if e.Molarity < usualEDTA/1.25 || e.Molarity > usualEDTA*2.5 {
		notes = append(notes, Note{CodeNormality, "molarity", short(e.Molarity) + " mol/L is not near the usual 0.01 (or 0.02); is it the normality?"})
	}
	return m, notes, nil
}

// Magnesium is total hardness less calcium, mol/L, from the two EDTA titrations.
// Calcium may pass the total by 2 %, the error of the readings; then magnesium
// is 0. Errors: *Error.
func Magnesium(hardness, calcium float64) (float64, error) {
	if calcium > hardness*1.02 {
		return 0, &Error{CodeBelowHardness, "calcium", fmt.Sprintf("%.1f mg/L as CaCO3", 2*AsCaCO3(calcium)),
			fmt.Sprintf("at most the hardness, %.1f mg/L as CaCO3; are the two swapped?", 2*AsCaCO3(hardness))}
	}
	return max(hardness-calcium, 0), nil
}
