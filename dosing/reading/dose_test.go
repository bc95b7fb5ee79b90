package reading

import (
	"errors"
	"math"
	"testing"
)

func TestParseDoseAccepts(t *testing.T) {
	for text, want := range map[string]Dose{
		"alum-dry=22":                                        {Product: "alum-dry", MgPerLitre: 22},
		"alum-dry = 22 mg/L":                                 {Product: "alum-dry", MgPerLitre: 22},
		"alum-dry=22,5":                                      {Product: "alum-dry", MgPerLitre: 22.5},
		"alum-liquid=22 mg/L product":                        {Product: "alum-liquid", MgPerLitre: 22, Basis: "product"},
		"hypochlorite-12=1.2 mg/L Cl2":                       {Product: "hypochlorite-12", MgPerLitre: 1.2, Basis: "Cl2"},
		"hypochlorite-12=1.2 Cl2":                            {Product: "hypochlorite-12", MgPerLitre: 1.2, Basis: "Cl2"},
		"hypochlorite-12=1.2mg/L as Cl₂":                     {Product: "hypochlorite-12", MgPerLitre: 1.2, Basis: "Cl2"},
		"hydrofluorosilicic-23=700 ug/L F":                   {Product: "hydrofluorosilicic-23", MgPerLitre: 0.7, Basis: "F"},
		"ferric-chloride-40=5 ppm Fe":                        {Product: "ferric-chloride-40", MgPerLitre: 5, Basis: "Fe"},
		"pacl-10=3 mg/L Al2O3":                               {Product: "pacl-10", MgPerLitre: 3, Basis: "Al2O3"},
		"lime=5 mg/L as Ca(OH)2":                             {Product: "lime", MgPerLitre: 5, Basis: "Ca(OH)2"},
		"alum-dry=5 mg/L Al2(SO4)3.14.3H2O":                  {Product: "alum-dry", MgPerLitre: 5, Basis: "Al2(SO4)3.14.3H2O"},
		"lime=0":                                             {Product: "lime"},
		"lime=10000":                                         {Product: "lime", MgPerLitre: 10000},
		"sulfuric-93=10 g/L":                                 {Product: "sulfuric-93", MgPerLitre: 10000},
		"lime=5 mg per L":                                    {Product: "lime", MgPerLitre: 5},
		"caustic-25=8.345404 lb/MG":                          {Product: "caustic-25", MgPerLitre: 1}, // pound over a million US gallons, NIST SP 811 (from memory)
		"caustic 25=9":                                       {Product: "caustic 25", MgPerLitre: 9},
		"ammonium-sulfate-40\u00a0=\u00a01\u00a0mg/L\u00a0N": {Product: "ammonium-sulfate-40", MgPerLitre: 1, Basis: "N"},
	} {
		got, err := ParseDose(text)
		if err != nil || got.Product != want.Product || got.Basis != want.Basis ||
			math.Abs(got.MgPerLitre-want.MgPerLitre) > 1e-6*want.MgPerLitre || got.Given != Clean(text) {
			t.Errorf("ParseDose(%q) = %+v, %v, want %+v", text, got, err, want)
		}
	}
}

func TestParseDoseRefuses(t *testing.T) {
	for text, code := range map[string]string{
		"": CodeEmpty, "alum-dry": CodeDoseForm, "=5": CodeDoseForm, "alum-dry=": CodeDoseForm, "alum-dry 22": CodeDoseForm,
		"alum-dry=-1": CodeTooLow, "alum-dry=10001": CodeTooHigh, "alum-dry=11 g/L": CodeTooHigh,
		"alum-dry=abc": CodeNotANumber, "alum-dry=NaN": CodeNotFinite, "alum-dry=1e999": CodeOverflow,
		"alum-dry=1,200": CodeAmbiguousNumber, "alum-dry=0x5": CodeHex, "alum-dry=5-6": CodeStraySign, "alum-dry=\u0665": CodeOtherDigits,
		"alum-dry=5 L/h": CodeUnknownUnit, "alum-dry=5 mg/L as": CodeUnknownUnit, "alum-dry=5 mg/L of Al": CodeUnknownUnit,
		"alum-dry=5 m%": CodeUnknownUnit, "alum-dry=5\x1b[m": CodeControlCharacters, "a=b=c": CodeNotANumber,
	} {
		d, err := ParseDose(text)
		var e *Error
		if !errors.As(err, &e) || e.Code != code || e.Field != DoseField || e.Accepted == "" || d != (Dose{}) {
			t.Errorf("ParseDose(%q) = %+v, %v, want the code %s", text, d, err, code)
		}
	}
}
