package reading

import (
	"errors"
	"math"
	"strings"
	"testing"
	"unicode/utf8"
)

var numberSeeds = []string{
	"7.2", "7,2", "1,200", "1,200,000", "1.200,5", "1 200", "1\u2009200,5", "-5", "\u22125", "1e3", "1e999", "1e-999",
	"NaN", "inf", "0x1F", "\u0667", "", " ", ".", ",", "-", "--5", "5-", "7\x00", "\x1b[2J", "\xff", "<0.5", "1e", "e3", "∞",
}

// soundError checks what holds for every refusal.
func soundError(t *testing.T, text string, err error) {
	t.Helper()
	var e *Error
	if !errors.As(err, &e) {
		t.Fatalf("%q: the error is a %T", text, err)
	}
	if e.Code == "" || e.Accepted == "" || Reason(e.Code) == "cannot be used" {
		t.Fatalf("%q: %+v does not say what is wrong", text, *e)
	}
	soundEcho(t, text, e.Given)
}

func soundEcho(t *testing.T, text, echo string) {
	t.Helper()
	if n := utf8.RuneCountInString(echo); n > EchoLimit || unprintable(echo) || strings.ContainsAny(echo, "\n\r\t\x1b") {
		t.Fatalf("%q is echoed as %q", text, echo)
	}
}

func FuzzNumber(f *testing.F) {
	for _, s := range numberSeeds {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, text string) {
		x, err := Number(text)
		if math.IsNaN(x) || math.IsInf(x, 0) {
			t.Fatalf("Number(%q) = %v", text, x)
		}
		if err != nil {
			soundError(t, text, err)
			return
		}
		if again, err := Number(sprint(x)); err != nil || again != x {
			t.Fatalf("Number(%q) = %v, written out it is %v, %v", text, x, again, err)
		}
	})
}

func FuzzField(f *testing.F) {
	for i, s := range numberSeeds {
		for j, unit := range []string{"", " mg/L as CaCO3", "°F", " MGD", " mmol/L", " µS/cm", " %", " furlong"} {
			f.Add(i*5+j*7, s+unit)
		}
	}
	fields := Fields()
	f.Fuzz(func(t *testing.T, which int, text string) {
		field := fields[((which%len(fields))+len(fields))%len(fields)]
		v, err := field.Parse(text)
		if err != nil {
			soundError(t, text, err)
			if v != (Value{}) {
				t.Fatalf("%s %q: a value with an error", field.Name, text)
			}
			return
		}
		low, high, open := field.Range()
		if math.IsNaN(v.SI) || v.SI < low || v.SI > high || open && v.SI <= low {
			t.Fatalf("%s %q = %v, outside %v to %v", field.Name, text, v.SI, low, high)
		}
		usualLow, usualHigh := field.Usual()
		if !v.Unusual && (v.SI < usualLow*(1-1e-9)-1e-9 || v.SI > usualHigh*(1+1e-9)+1e-9) {
			t.Fatalf("%s %q = %v passes for usual", field.Name, text, v.SI)
		}
		if v.Unusual != (v.UnusualWhy != "") {
			t.Fatalf("%s %q: unusual without a reason", field.Name, text)
		}
		if _, ok := field.In(v.Unit, v.SI); !ok {
			t.Fatalf("%s %q: unit %q", field.Name, text, v.Unit)
		}
		soundEcho(t, text, v.Given)
	})
}

func FuzzDose(f *testing.F) {
	for _, s := range numberSeeds {
		f.Add("alum-dry=" + s)
		f.Add("hypochlorite-12=" + s + " mg/L as Cl2")
	}
	f.Add("=")
	f.Add("a=b=c")
	f.Add("lime=5 Ca(OH)2")
	f.Fuzz(func(t *testing.T, text string) {
		d, err := ParseDose(text)
		if err != nil {
			soundError(t, text, err)
			return
		}
		if !(d.MgPerLitre >= 0 && d.MgPerLitre <= MostDose) || d.Product == "" {
			t.Fatalf("%q = %+v", text, d)
		}
		if strings.ContainsFunc(d.Basis, func(r rune) bool { return r <= ' ' || r > '~' }) {
			t.Fatalf("%q has the basis %q", text, d.Basis)
		}
		soundEcho(t, text, d.Given)
	})
}
