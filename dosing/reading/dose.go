package reading

import (
	"strings"
	"unicode"
)

// Dose is a dose of a product as typed: an amount in a litre of water, and of
// what that is the amount.
type Dose struct {
	Product    string  // as typed, without spaces around it
	MgPerLitre float64 // of the basis; 0 to MostDose
	Basis      string  // as typed: "Cl2", "product", "Al2O3"; "" for a bare dose
	Given      string  // the whole, cleaned and cut
}

// MostDose is the largest dose of anything that is accepted, mg/L.
const MostDose = 10000.0

// DoseField is the command-line name under which doses are given.
const DoseField = "add"

// DoseForm is how a dose is written, for a person.
const DoseForm = "PRODUCT=DOSE, such as alum-dry=22, or with its basis: hypochlorite-12=1.2 mg/L Cl2"

// doseUnits convert to mg/L of the basis.
var doseUnits = []unit{
	{name: "mg/L", also: []string{"ppm", "g/m3", "kg/ML"}, factor: 1},
	{name: "µg/L", also: []string{"ppb", "mg/m3"}, factor: 1e-3},
	{name: "g/L", also: []string{"kg/m3"}, factor: 1e3},
	{name: "lb/MG", also: []string{"lb/Mgal", "lbs/MG"}, factor: pound * 1e6 / (1e6 * usGallon / litre)},
}

var doseSpellings = index(doseUnits, nil)

// ParseDose reads PRODUCT=DOSE: a product's name, an equals sign, a number, and
// if wanted a unit (mg/L where there is none) and the basis of the dose. The
// error is an *Error of field "add".
func ParseDose(text string) (Dose, error) {
	if err := readable(text); err != nil {
		return Dose{}, doseError(err)
	}
	product, amount, found := strings.Cut(trim(text), "=")
	product, amount = trim(product), trim(amount)
	if !found || product == "" || amount == "" {
		return Dose{}, &Error{Code: CodeDoseForm, Field: DoseField, Given: Clean(text), Accepted: DoseForm}
	}
	d, err := parseAmount(amount, text)
	if err != nil {
		return Dose{}, doseError(err)
	}
	d.Product, d.Given = product, Clean(text)
	return d, nil
}

func doseError(err error) error {
	e := *err.(*Error)
	e.Field = DoseField
	if e.Accepted == anyNumber {
		e.Accepted = DoseForm
	}
	return &e
}

// parseAmount reads what stands after the equals sign.
func parseAmount(amount, text string) (Dose, error) {
	number, rest := splitNumber(amount)
	if !strings.ContainsFunc(number, isDigit) || rest != "" && !startsUnit(rest) {
		return Dose{}, refuseNumber(amount, rest, text)
	}
	x, err := parseNumber(number, text)
	if err != nil {
		return Dose{}, err
	}
	if code := notNumber(amount, rest); rest != "" && (code == CodeHex || code == CodeOtherDigits) {
		return Dose{}, refuse(code, text, anyNumber)
	}
	i, basis, ok := unitAndBasis(rest)
	if !ok {
		return Dose{}, refuse(CodeUnknownUnit, text, DoseForm)
	}
	v := doseUnits[i].toSI(x)
	const accepted = "0 to 10000 mg/L"
	switch {
	case v < 0:
		return Dose{}, refuse(CodeTooLow, text, accepted)
	case snap(v, MostDose) > MostDose:
		return Dose{}, refuse(CodeTooHigh, text, accepted)
	}
	return Dose{MgPerLitre: snap(v, MostDose), Basis: basis}, nil
}

// unitAndBasis splits what follows the number: "mg/L Cl2", "mg/L as Al2O3",
// "product", "Cl2" or nothing. A text with a stroke in it has to start with a
// known unit.
func unitAndBasis(rest string) (i int, basis string, ok bool) {
	if rest == "" {
		return 0, "", true
	}
	words := strings.FieldsFunc(rest, isSpace)
	for n := len(words); n > 0; n-- {
		if strings.EqualFold(words[n-1], "as") {
			continue // belongs to the basis
		}
		i, ok := doseSpellings.find(strings.Join(words[:n], " "))
		if !ok {
			continue
		}
		basis, ok := basisOf(words[n:])
		return i, basis, ok
	}
	basis, ok = basisOf(words)
	return 0, basis, ok && basis != ""
}

// basisOf accepts one word of letters, digits, brackets and points, with or
// without "as" before it. Digits below the line become plain ones.
func basisOf(words []string) (string, bool) {
	if len(words) > 1 && strings.EqualFold(words[0], "as") {
		words = words[1:]
	}
	if len(words) == 0 {
		return "", true
	}
	word := lowDigits.Replace(words[0])
	odd := strings.ContainsFunc(word, func(r rune) bool {
		return r > unicode.MaxASCII || !unicode.IsLetter(r) && !isDigit(r) && !strings.ContainsRune("().", r)
	})
	return word, len(words) == 1 && !odd && !strings.EqualFold(word, "as")
}

var lowDigits = strings.NewReplacer(
	"\u2081", "1", "\u2082", "2", "\u2083", "3", "\u2084", "4", "\u2085", "5",
	"\u2086", "6", "\u2087", "7", "\u2088", "8", "\u2089", "9", "\u2080", "0")
