package titration

import (
	"fmt"
	"strconv"
	"strings"

	"beckline/carbonate"
)

// The codes of an Error and of a Note. They are stable: scripts may test for them.
const (
	CodeOutsideRange   = "outside_range"         // a bench reading that cannot be
	CodeOrder          = "readings_out_of_order" // end before start, second end point before the first
	CodeEndPoint       = "end_point"             // an end-point pH outside the method
	CodeStep           = "end_point_step"        // the two end points are not 0.30 pH apart
	CodePAboveTotal    = "p_above_total"         // phenolphthalein alkalinity over the total
	CodePBelowPH       = "p_below_ph"            // phenolphthalein alkalinity in a water of no colour
	CodeAcid           = "mineral_acidity"       // the result is below zero
	CodeTooFew         = "too_few_points"        // not enough points on the straight part
	CodeNotStraight    = "not_straight"          // the points do not rise along a line
	CodeBelowHardness  = "calcium_above_hardness"
	CodePContradicts   = "p_contradicts_alkalinity"
	CodeNoIons         = "no_ions"
	CodeTitreSmall     = "titre_small"
	CodeTitreLarge     = "titre_large"
	CodeNormality      = "unusual_normality"
	CodeUnusual        = "unusual_result"
	CodeUseTwoEnds     = "use_two_end_points"
	CodeNotLow         = "alkalinity_not_low"
	CodeNoColour       = "p_missing"
	CodeNormalityDoubt = "titrant_or_electrode_doubtful"
	CodeDuplicates     = "duplicates_disagree"
	CodePHDisagrees    = "ph_disagrees"
)

// Error refuses a bench reading. Given and Accepted are plain text for the
// person at the bench.
type Error struct {
	Code     string
	Field    string // sample, normality, start, end, titrant, ph, p-alkalinity, ...
	Given    string
	Accepted string
}

// Error is one plain line: field, what was given, what would be accepted.
func (e *Error) Error() string {
	s := e.Field + ": " + e.Given
	if e.Accepted != "" {
		s += "; accepted: " + e.Accepted
	}
	return s
}

// Note is something to look at twice about a reading that was accepted.
type Note struct {
	Code  string
	Field string
	Text  string // one plain sentence without a full stop
}

// within refuses a value outside low..high; open keeps low itself out.
func within(field string, v, low, high float64, open bool, unit string) *Error {
	if v >= low && v <= high && !(open && v == low) {
		return nil
	}
	from := short(low)
	if open {
		from = "above " + from
	}
	return &Error{CodeOutsideRange, field, spaced(short(v), unit), spaced(from+" to "+short(high), unit)}
}

// short writes a number with at most five figures.
func short(v float64) string {
	s := strconv.FormatFloat(v, 'g', 5, 64)
	if strings.Contains(s, "e") && v > 1e-9 && v < 1e9 {
		s = strconv.FormatFloat(v, 'f', -1, 64)
	}
	return s
}

func spaced(number, unit string) string {
	if unit == "" {
		return number
	}
	return number + " " + unit
}

// milligrams writes an alkalinity, eq/L, as people read it.
func milligrams(eq float64) string { return fmt.Sprintf("%.1f mg/L as CaCO3", AsCaCO3(eq)) }

// perEquivalent is the mass of CaCO3 in an equivalent, mg: 50 043.5. Standard
// Methods rounds it to 50 000, which reads 0.09 % low.
const perEquivalent = 1000 * carbonate.MolarMassCaCO3 / 2

// AsCaCO3 turns eq/L of alkalinity into mg/L as CaCO3 with the exact factor
// 50 043.5.
func AsCaCO3(eq float64) float64 { return eq * perEquivalent }
