package reading

import "strings"

// The codes of an Error. They are stable: scripts may test for them.
const (
	CodeEmpty             = "empty"
	CodeControlCharacters = "control_characters"
	CodeTooLong           = "too_long"
	CodeNotANumber        = "not_a_number"
	CodeNotMeasured       = "detection_limit"
	CodeNotFinite         = "not_finite"
	CodeOverflow          = "number_too_large"
	CodeUnderflow         = "number_too_small"
	CodeHex               = "hexadecimal"
	CodeOtherDigits       = "other_digits"
	CodeStraySign         = "stray_sign"
	CodeAmbiguousNumber   = "ambiguous_number"
	CodeGrouping          = "separators"
	CodeUnknownUnit       = "unknown_unit"
	CodeAmbiguousUnit     = "ambiguous_unit"
	CodeTooLow            = "below_limit"
	CodeTooHigh           = "above_limit"
	CodeDoseForm          = "dose_form"
)

var reasons = map[string]string{
	CodeEmpty:             "is empty",
	CodeControlCharacters: "holds control characters or bytes that are not text",
	CodeTooLong:           "is too long for one value",
	CodeNotANumber:        "is not a number",
	CodeNotMeasured:       "is a limit, not a measured number",
	CodeNotFinite:         "is not a finite number",
	CodeOverflow:          "is too large to work with",
	CodeUnderflow:         "is too small to work with, and not zero",
	CodeHex:               "is not a decimal number",
	CodeOtherDigits:       "has digits other than 0 to 9",
	CodeStraySign:         "has a sign where none can be",
	CodeAmbiguousNumber:   "can be read in two ways",
	CodeGrouping:          "has separators that are neither a decimal point nor thousands",
	CodeUnknownUnit:       "has a unit that is not known here",
	CodeAmbiguousUnit:     "has a unit that cannot be taken as it stands",
	CodeTooLow:            "is below what is accepted",
	CodeTooHigh:           "is above what is accepted",
	CodeDoseForm:          "is not a dose of a product",
}

// Reason puts a code into words that follow the value in a sentence, as in
// "1,200 can be read in two ways". An unknown code gives "cannot be used".
func Reason(code string) string {
	if r, ok := reasons[code]; ok {
		return r
	}
	return "cannot be used"
}

// Error is a refusal of one typed value.
type Error struct {
	Code     string // one of the Code constants
	Field    string // Field.Name, or "" where the field is not known
	Given    string // what was typed, cleaned and cut
	Accepted string // what would be accepted, a phrase for a person
}

// Error gives one plain line: field, what was given, what is wrong with it,
// what would be accepted.
func (e *Error) Error() string {
	var b strings.Builder
	if e.Field != "" {
		b.WriteString(e.Field + ": ")
	}
	b.WriteString(`"` + e.Given + `" ` + Reason(e.Code))
	if e.Accepted != "" {
		b.WriteString("; accepted: " + e.Accepted)
	}
	return b.String()
}
