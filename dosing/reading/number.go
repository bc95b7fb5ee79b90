package reading

import (
	"math"
	"strconv"
	"strings"
	"unicode"
)

// longest is the longest text, in bytes, that is looked at for one value.
const longest = 1024

const anyNumber = "one number, such as 7.2"

// Number reads a number as people and spreadsheets write it.
//
//	7.2  7,2  .5  1e3  −5  +5     a point or one comma is decimal
//	1 200  1,200,000  1.200.000   spaces, or repeated separators, in threes are thousands
//	1,200.5  1.200,5              both kinds: the last is the decimal one
//	1,200                         refused: 1200 or 1.2?
//
// The result is finite. Refused with an *Error: an empty text, NaN and
// infinities, numbers too large or too small to hold, hexadecimal, digits other
// than 0 to 9, stray signs, control characters, anything after the number.
func Number(text string) (float64, error) {
	if err := readable(text); err != nil {
		return 0, err
	}
	s := trim(text)
	number, rest := splitNumber(s)
	if rest != "" {
		return 0, refuseNumber(s, rest, text)
	}
	return parseNumber(number, text)
}

// readable refuses texts that are not worth reading further.
func readable(text string) error {
	switch {
	case len(text) > longest:
		return refuse(CodeTooLong, text, anyNumber)
	case unprintable(text):
		return refuse(CodeControlCharacters, text, anyNumber)
	case trim(text) == "":
		return refuse(CodeEmpty, text, anyNumber)
	}
	return nil
}

func refuse(code, given, accepted string) *Error {
	return &Error{Code: code, Given: Clean(given), Accepted: accepted}
}

// splitNumber cuts a text into the longest start that has the letters of a
// number and what follows it. It accepts more than parseNumber does, so that
// parseNumber can say what is wrong with it.
func splitNumber(s string) (number, rest string) {
	runes := []rune(s)
	i := 0
	if i < len(runes) && isSign(runes[i]) {
		i++
	}
	end := i // just after the last digit or separator
	for i < len(runes) {
		r := runes[i]
		if isDigit(r) || r == '.' || r == ',' {
			i++
			end = i
			continue
		}
		// A space belongs to the number only between two digits.
		if isSpace(r) && i > 0 && i+1 < len(runes) && isDigit(runes[i-1]) && isDigit(runes[i+1]) {
			i++
			continue
		}
		break
	}
	if exp := exponentEnd(runes, end); exp > end {
		end = exp
	}
	return string(runes[:end]), trim(string(runes[end:]))
}

// exponentEnd returns the index after an exponent that starts at i, or i where
// there is none: "5e" is five English degrees, "5e3" is five thousand.
func exponentEnd(runes []rune, i int) int {
	if i == 0 || i >= len(runes) || (runes[i] != 'e' && runes[i] != 'E') {
		return i
	}
	j := i + 1
	if j < len(runes) && isSign(runes[j]) {
		j++
	}
	k := j
	for k < len(runes) && isDigit(runes[k]) {
		k++
	}
	if k == j {
		return i
	}
	return k
}

// notNumber finds the code for a text whose start or end is no number.
func notNumber(s, rest string) string {
	for _, r := range s {
		if unicode.IsDigit(r) && !isDigit(r) {
			return CodeOtherDigits
		}
	}
	bare := strings.ToLower(strings.TrimLeftFunc(s, isSign))
	switch {
	case s != "" && strings.ContainsRune("<>\u2264\u2265", []rune(s)[0]):
		return CodeNotMeasured
	case strings.HasPrefix(bare, "0x"):
		return CodeHex
	case bare == "nan", bare == "inf", bare == "infinity", strings.HasPrefix(bare, "∞"):
		return CodeNotFinite
	case signFirst(s) && !signFirst(bare) && trim(bare) != bare: // "- 5"
		return CodeStraySign
	case rest != s && (signFirst(rest) || strings.HasPrefix(rest, "±")):
		return CodeStraySign
	}
	return CodeNotANumber
}

func signFirst(s string) bool { return s != "" && isSign([]rune(s)[0]) }

// refuseNumber is the refusal of a text that notNumber has a code for.
func refuseNumber(s, rest, text string) *Error {
	code := notNumber(s, rest)
	if code == CodeNotMeasured {
		return refuse(code, text, "the figure to work with, or nothing where none was measured")
	}
	return refuse(code, text, anyNumber)
}

// parseNumber reads what splitNumber cut off; text is the whole that was typed,
// for the echo.
func parseNumber(number, text string) (float64, error) {
	mantissa, exponent := number, ""
	if i := strings.IndexAny(number, "eE"); i >= 0 {
		mantissa, exponent = number[:i], number[i+1:]
	}
	sign := ""
	if r := []rune(mantissa); len(r) > 0 && isSign(r[0]) {
		sign, mantissa = asciiSign(string(r[0])), string(r[1:])
	}
	if mantissa == "" {
		code := CodeNotANumber
		if sign != "" {
			code = CodeStraySign
		}
		return 0, refuse(code, text, anyNumber)
	}
	whole, fraction, err := separate(sign, mantissa, text)
	if err != nil {
		return 0, err
	}
	plain := sign + whole + "." + fraction
	if exponent != "" {
		plain += "e" + asciiSign(exponent)
	}
	v, perr := strconv.ParseFloat(plain, 64)
	switch {
	case math.IsInf(v, 0):
		return 0, refuse(CodeOverflow, text, anyNumber)
	case perr != nil:
		return 0, refuse(CodeNotANumber, text, anyNumber)
	case v == 0 && strings.ContainsAny(whole+fraction, "123456789"):
		return 0, refuse(CodeUnderflow, text, anyNumber)
	case v == 0:
		return 0, nil // a typed -0 is a zero
	}
	return v, nil
}

// separate tells the decimal separator from the thousands and returns the
// digits on both sides of it. The mantissa has digits, points, commas and
// spaces only.
func separate(sign, mantissa, text string) (whole, fraction string, err error) {
	points, commas := strings.Count(mantissa, "."), strings.Count(mantissa, ",")
	decimal := -1
	switch {
	case points > 0 && commas > 0: // what it looks like: the last one is decimal
		decimal = strings.LastIndexAny(mantissa, ".,")
		if strings.Count(mantissa, mantissa[decimal:decimal+1]) > 1 {
			return "", "", refuse(CodeGrouping, text, anyNumber)
		}
	case points == 1:
		decimal = strings.Index(mantissa, ".")
	case commas == 1:
		decimal = strings.Index(mantissa, ",")
		if fix := twoReadings(sign, mantissa, decimal); fix != "" {
			return "", "", refuse(CodeAmbiguousNumber, text, fix)
		}
	}
	whole = mantissa
	if decimal >= 0 {
		whole, fraction = mantissa[:decimal], mantissa[decimal+1:]
		if fraction == "" && mantissa[decimal] == ',' {
			return "", "", refuse(CodeGrouping, text, anyNumber)
		}
	}
	joined, ok := ungroup(whole)
	if !ok || !digitsOnly(fraction) || joined+fraction == "" {
		return "", "", refuse(CodeGrouping, text, anyNumber)
	}
	return joined, fraction, nil
}

// twoReadings returns how to write a number whose only separator is a comma
// that could be a decimal comma or a thousands comma, "" where it could not.
func twoReadings(sign, mantissa string, comma int) string {
	whole, after := mantissa[:comma], mantissa[comma+1:]
	if len(whole) < 1 || len(whole) > 3 || len(after) != 3 || whole[0] == '0' ||
		!digitsOnly(whole) || !digitsOnly(after) {
		return ""
	}
	decimal := strings.TrimRight(after, "0")
	if decimal == "" {
		decimal = "0"
	}
	return "write " + sign + whole + after + " or " + sign + whole + "." + decimal
}

// ungroup removes thousands separators: all of one kind, every group but the
// first of three digits, the first not starting with 0. Space characters count
// as one kind.
func ungroup(whole string) (string, bool) {
	if digitsOnly(whole) {
		return whole, true
	}
	var kind rune
	groups := []string{""}
	for _, r := range whole {
		if isDigit(r) {
			groups[len(groups)-1] += string(r)
			continue
		}
		if isSpace(r) {
			r = ' '
		}
		if kind != 0 && r != kind {
			return "", false
		}
		kind = r
		groups = append(groups, "")
	}
	if n := len(groups[0]); n < 1 || n > 3 || groups[0][0] == '0' {
		return "", false
	}
	for _, g := range groups[1:] {
		if len(g) != 3 {
			return "", false
		}
	}
	return strings.Join(groups, ""), true
}

func isDigit(r rune) bool { return r >= '0' && r <= '9' }

// isSign reports plus, hyphen-minus and the Unicode minus.
func isSign(r rune) bool { return r == '+' || r == '-' || r == '\u2212' }

func asciiSign(s string) string { return strings.Replace(s, "\u2212", "-", 1) }

func digitsOnly(s string) bool {
	return !strings.ContainsFunc(s, func(r rune) bool { return !isDigit(r) })
}
