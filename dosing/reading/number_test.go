package reading

import (
	"errors"
	"strings"
	"testing"
)

func TestNumberAccepts(t *testing.T) {
	for text, want := range map[string]float64{
		"7.2": 7.2, "7,2": 7.2, "0,125": 0.125, "12,50": 12.5, "12,3456": 12.3456, "1234,567": 1234.567,
		"0": 0, "-0": 0, "007": 7, ".5": 0.5, ",5": 0.5, "7.": 7, "1.200": 1.2,
		"1,200,000": 1200000, "1.200.000": 1200000, "12,345,678": 12345678,
		"1.200,5": 1200.5, "1,200.5": 1200.5, "1,200,000.25": 1200000.25, "1.200.000,25": 1200000.25,
		"1 200": 1200, "12 345 678": 12345678, "1\u2009200": 1200, "1\u202f200,5": 1200.5, "1\u00a0200.5": 1200.5,
		"1 200,500": 1200.5,
		"-5":        -5, "\u22125": -5, "+5": 5, "\u22120,5": -0.5,
		"1e3": 1000, "1E3": 1000, "1e+3": 1000, "1e-3": 0.001, "1e\u22123": 0.001, "1,5e3": 1500, "2.5E-1": 0.25,
		" 7.2 ": 7.2, "\u00a07.2\u2009": 7.2,
	} {
		got, err := Number(text)
		if err != nil || got != want {
			t.Errorf("Number(%q) = %v, %v, want %v", text, got, err, want)
		}
	}
}

func TestNumberRefuses(t *testing.T) {
	for text, code := range map[string]string{
		"": CodeEmpty, " ": CodeEmpty, "\u00a0": CodeEmpty,
		"abc": CodeNotANumber, "O.5": CodeNotANumber, "7.2 mg/L": CodeNotANumber, "1/2": CodeNotANumber,
		"1_000": CodeNotANumber, "1'200": CodeNotANumber, "e3": CodeNotANumber, "7\u066b2": CodeNotANumber,
		"NaN": CodeNotFinite, "nan": CodeNotFinite, "Inf": CodeNotFinite, "-inf": CodeNotFinite,
		"Infinity": CodeNotFinite, "+infinity": CodeNotFinite, "\u221e": CodeNotFinite,
		"1e999": CodeOverflow, "-1e999": CodeOverflow, "1e-999": CodeUnderflow,
		"0x1F": CodeHex, "-0X1p3": CodeHex,
		"\u0661\u0662": CodeOtherDigits, "\uff17.2": CodeOtherDigits, "7\uff12": CodeOtherDigits, "1e\u0663": CodeOtherDigits,
		"--5": CodeStraySign, "+-5": CodeStraySign, "5-": CodeStraySign, "7-8": CodeStraySign, "- 5": CodeStraySign,
		"-": CodeStraySign, "+": CodeStraySign, "7±0.1": CodeStraySign, "1e--3": CodeNotANumber,
		"1,200": CodeAmbiguousNumber, "12,345": CodeAmbiguousNumber, "123,456": CodeAmbiguousNumber,
		"-1,200": CodeAmbiguousNumber, "1,200e3": CodeAmbiguousNumber,
		"7,": CodeGrouping, ".": CodeGrouping, ",": CodeGrouping, "1,2,3": CodeGrouping, "1.2.3": CodeGrouping,
		"1,20,000": CodeGrouping, "0,200,000": CodeGrouping, "1.20,5": CodeGrouping, "1 20": CodeGrouping,
		"1,200 000": CodeGrouping, "1,200.000.5": CodeGrouping, "7.2 30": CodeGrouping, "1,,200": CodeGrouping,
		"1234,567,890": CodeGrouping, "1,2000,000": CodeGrouping, "1 2000": CodeGrouping, "1 200.000,5": CodeGrouping,
		"7\t": CodeControlCharacters, "7\x00": CodeControlCharacters, "\x1b[31m7": CodeControlCharacters,
		"7\r\n": CodeControlCharacters, "\ufeff7": CodeControlCharacters, "7\u200b": CodeControlCharacters,
		"\u202e7": CodeControlCharacters, "7\xff": CodeControlCharacters,
		"<0.5": CodeNotMeasured, "\u22640.5": CodeNotMeasured, ">14": CodeNotMeasured,
		strings.Repeat("7", 2000): CodeTooLong,
	} {
		got, err := Number(text)
		var e *Error
		if !errors.As(err, &e) || e.Code != code || got != 0 {
			t.Errorf("Number(%.20q) = %v, %v, want the code %s", text, got, err, code)
		}
	}
}

// An ambiguous number is refused with both ways to write it.
func TestAmbiguousNumberNamesBothReadings(t *testing.T) {
	for text, want := range map[string]string{
		"1,200":   "write 1200 or 1.2",
		"12,345":  "write 12345 or 12.345",
		"-1,250":  "write -1250 or -1.25",
		"123,000": "write 123000 or 123.0",
	} {
		_, err := Number(text)
		var e *Error
		if !errors.As(err, &e) || e.Accepted != want {
			t.Errorf("Number(%q): %v, want %q", text, err, want)
		}
	}
}

func TestCleanStripsAndCuts(t *testing.T) {
	for text, want := range map[string]string{
		"7.2":                   "7.2",
		" 7.2\r\n":              "7.2",
		"\x1b[31m7.2\x1b[0m":    "[31m7.2[0m",
		"a\x00b\tc":             "abc",
		"\u202eabc\u200b":       "abc",
		"1\u2009200":            "1 200",
		"\xff\xfe":              "??",
		"µS/cm":                 "µS/cm",
		strings.Repeat("7", 60): strings.Repeat("7", 60),
		strings.Repeat("7", 61): strings.Repeat("7", 57) + "...",
		strings.Repeat("µ", 99): strings.Repeat("µ", 57) + "...",
	} {
		if got := Clean(text); got != want {
			t.Errorf("Clean(%q) = %q, want %q", text, got, want)
		}
	}
}
