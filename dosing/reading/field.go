package reading

import (
	"math"
	"slices"
	"strings"
)

// Group says what a field is for.
type Group int

// The groups.
const (
	Reading Group = iota + 1 // measured on the water
	Target                   // wanted of the finished water
	Setting                  // of the product and the pump
)

// Field is one thing that a person can type: a reading, a target or a setting.
type Field struct {
	Name  string // on the command line, without dashes before: "calcium-hardness"
	Key   string // column and JSON key, with its unit: "calcium_hardness_mg_l_caco3"
	Label string // at most 14 characters, for the screen
	Help  string // one line, without a full stop
	Bare  string // unit of a number without one, and of the Key's column; "" where there is none
	Group Group
	Step  float64 // one nudge, in the bare unit

	units    []unit // the bare one first
	find     spellings
	limits   limits
	decimals int  // of the bare unit, that a reading of this kind supports
	figures  int  // the most figures it supports, 0 for four
	trim     bool // trailing zeros say nothing about it
	relative bool // of any size: step and decimals follow the value
}

// Value is a field's value as understood.
type Value struct {
	SI         float64 // finite, within Field.Range
	Unit       string  // name of the unit it was read in
	Given      string  // what was typed, cleaned and cut
	Unusual    bool    // outside Field.Usual
	UnusualWhy string  // what is usual, "" where nothing is unusual
	Limit      float64 // SI, the end of the usual band that was passed; 0 where nothing is unusual
}

// The SI units of Value.SI: pH and saturation index have none; temperatures are
// in K; alkalinities in eq/L; hardnesses in mol/L of Ca + Mg, or of Ca;
// concentrations, DIC and CCPP in mol/L of the formula of their bare unit (C
// and CaCO3 for the last two); flow and pump in m3/s; conductivity in S/m; TDS
// in kg/m3; strength a fraction.

// Fields returns every field, in the order in which tables and problems list
// them. The slice is the caller's to change.
func Fields() []Field { return slices.Clone(table) }

// Lookup finds a field by its command-line name.
func Lookup(name string) (Field, bool) { return search(byName, name) }

// LookupKey finds a field by its column and JSON key.
func LookupKey(key string) (Field, bool) { return search(byKey, key) }

func search(in map[string]int, name string) (Field, bool) {
	if i, ok := in[name]; ok {
		return table[i], true
	}
	return Field{}, false
}

// smallest is the SI value below which a number other than zero is no reading of
// anything; it keeps sums with it away from the end of what floats hold.
const smallest = 1e-30

// Parse reads a value, with a unit or in the bare one. The error is an *Error.
// An empty text is one of code "empty": the caller decides whether that means
// not measured or missing.
func (f Field) Parse(text string) (Value, error) {
	if err := readable(text); err != nil {
		return Value{}, f.complete(err)
	}
	s := trim(text)
	number, rest := splitNumber(s)
	i, err := f.unit(s, number, rest, text)
	if err != nil {
		return Value{}, err
	}
	x, nerr := parseNumber(number, text)
	if nerr != nil {
		return Value{}, f.complete(nerr)
	}
	v := f.units[i].toSI(x)
	if v != 0 && math.Abs(v) < smallest {
		return Value{}, f.complete(refuse(CodeUnderflow, text, anyNumber))
	}
	return f.check(v, i, text)
}

// unit finds the unit after the number, or says what is wrong with it.
func (f Field) unit(s, number, rest, text string) (int, error) {
	if rest == "" {
		return 0, nil
	}
	if !strings.ContainsFunc(number, isDigit) || !startsUnit(rest) {
		return 0, f.complete(refuseNumber(s, rest, text))
	}
	if i, ok := f.find.find(rest); ok {
		return i, nil
	}
	if code := notNumber(s, rest); code == CodeHex || code == CodeOtherDigits {
		return 0, f.complete(refuse(code, text, anyNumber))
	}
	if instead := f.find.instead(rest); instead != "" {
		return 0, &Error{Code: CodeAmbiguousUnit, Field: f.Name, Given: Clean(text), Accepted: instead}
	}
	return 0, &Error{Code: CodeUnknownUnit, Field: f.Name, Given: Clean(text), Accepted: f.unitList()}
}

// startsUnit reports whether a text may be a unit at all.
func startsUnit(rest string) bool {
	first := []rune(rest)[0]
	return strings.ContainsRune("%°µμº˚(℃℉", first) ||
		first >= 'a' && first <= 'z' || first >= 'A' && first <= 'Z' || first == '\u212a'
}

// complete adds the field, and what it accepts where the number parser knew
// nothing better, to an error.
func (f Field) complete(err error) error {
	e := *err.(*Error)
	e.Field = f.Name
	if e.Accepted == anyNumber {
		e.Accepted = f.Accepted()
	}
	return &e
}

// AcceptedBare says what the field accepts where its unit is settled, as in a
// column of a table: the range alone.
func (f Field) AcceptedBare() string { return "a number, " + f.rangeText(0) }

// Accepted says what the field accepts, for a person: the range and the units.
func (f Field) Accepted() string {
	text := f.AcceptedBare()
	if more := f.Units()[1:]; len(more) > 0 {
		text += ", or with " + list(more)
	}
	return text
}

func (f Field) unitList() string {
	names := f.Units()
	if f.Bare == "" {
		return "a number without a unit"
	}
	return list(names) + "; without a unit it is " + f.Bare
}

// list joins names as a sentence does: a, b or c.
func list(names []string) string {
	if len(names) < 2 {
		return strings.Join(names, "")
	}
	last := len(names) - 1
	return strings.Join(names[:last], ", ") + " or " + names[last]
}
