package report

import (
	"fmt"
	"math"
	"strings"

	"beckline/dosing"
	"beckline/dosing/bench"
)

// Bench is a jar that was fitted.
type Bench struct {
	Report  *bench.Report
	Product dosing.Product
	Find    []bench.Unknown
	Target  dosing.Optional // pH wanted
	ByJar   float64         // mol/L to reach it, by the sample as fitted
}

// unknownUnits are the keys, units and factors of what a jar can tell.
var unknownUnits = map[bench.Unknown]struct {
	key, unit string
	factor    float64
	shown     rounding
}{
	bench.Alkalinity:   {"alkalinity", "mg/L as CaCO3", caco3PerEquivalent, asMass},
	bench.Carbon:       {"carbon", "mmol/L", milli, asFine},
	bench.Strength:     {"strength", "of the label", 1, asFine},
	bench.AcidAmount:   {"acid", "mmol/L", milli, asFine},
	bench.AcidPK:       {"acid-pk", "pK", 1, asPH},
	bench.MeterOffset:  {"meter", "pH", 1, rounding{decimals: 3, signed: true}},
	bench.CarbonLost:   {"co2-lost", "mg/L CO2", carbonDioxideMass * milli, asFine},
	bench.Precipitated: {"precipitated", "share", 1, asFine},
}

// unknownOrder lists the unknowns as they are named on the command line.
var unknownOrder = []bench.Unknown{bench.Alkalinity, bench.Carbon, bench.Strength, bench.AcidAmount, bench.AcidPK,
	bench.MeterOffset, bench.CarbonLost, bench.Precipitated}

// UnknownNames are the names by which what a jar can tell is asked for.
func UnknownNames() []string {
	var names []string
	for _, u := range unknownOrder {
		names = append(names, unknownUnits[u].key)
	}
	return names
}

// UnknownNamed finds an unknown by such a name.
func UnknownNamed(name string) (bench.Unknown, bool) {
	for _, u := range unknownOrder {
		if unknownUnits[u].key == name {
			return u, true
		}
	}
	return 0, false
}

// BenchSheet is the answer of a jar.
func BenchSheet(in Bench) Sheet {
	r := in.Report
	s := Sheet{Name: "bench"}
	if in.Target.Given {
		s.Head = append(s.Head, fmt.Sprintf("Dose to pH %s by the jar: %s mg/L as %s", Fixed(in.Target.Value, 2),
			asDose.write(in.ByJar*in.Product.Chemical.MolarMass*milli), Basis(in.Product.Chemical)))
	}
	verdict := "The jar and the model agree: they differ by no more than the readings allow"
	if !r.Agrees {
		verdict = "The jar and the model part by more than the readings allow"
	}
	if r.Freedom < 1 {
		verdict = "As many figures are looked for as there are readings: nothing is left to judge the model by"
	}
	s.Head = append(s.Head, verdict)
	s.Figures = []Figure{
		worded("product", "", in.Product.Name),
		worded("basis", "doses are", "mg/L as "+Basis(in.Product.Chemical)),
		truth("agrees", "", r.Agrees),
		number("chi_square", "sum of squares over their deviations", "", Some(r.ChiSquare), asRatio),
		number("freedom", "readings less what was looked for", "", Some(float64(r.Freedom)), rounding{}),
		number("chance_percent", "chance of as much if all is well", "%", Some(r.Chance*100), rounding{decimals: 1}),
		number("dose_to_target_mg_l", "", "mg/L", onlyIf(in.Target.Given, in.ByJar*in.Product.Chemical.MolarMass*milli), asDose),
	}
	s.Tables = []SheetTable{estimates("estimates", "Found", r.Estimates), readingsOf(in), reasonsOf(r)}
	for _, slip := range r.Order {
		s.Warnings = append(s.Warnings, Notice{"slip_" + string(slip.Kind), "point", "reading " + places(slip.Readings) + ": " + slip.Kind.Name()})
	}
	for _, e := range r.Estimates {
		if e.AtLimit {
			s.Warnings = append(s.Warnings, Notice{"estimate_at_limit", unknownUnits[e.Unknown].key,
				e.Unknown.Name() + " stands at the end of what it may be: the jar does not tell it"})
		}
	}
	s.Handle(in.Product.Caution)
	return s
}

func estimates(key, title string, all []bench.Estimate) SheetTable {
	t := SheetTable{Key: key, Title: title}
	for _, e := range all {
		t.Rows = append(t.Rows, estimateRow(e))
	}
	return t
}

func estimateRow(e bench.Estimate) []Figure {
	u := unknownUnits[e.Unknown]
	n := func(key, label string, v float64) Figure { return number(key, label, "", Some(v*u.factor), u.shown) }
	return []Figure{worded("unknown", "", u.key), worded("name", "", e.Unknown.Name()), worded("", "figure", u.key+", "+u.unit),
		n("start", "as read", e.Start), n("value", "found", e.Value), n("standard_error", "+/-", e.StandardError),
		n("low", "95 % from", e.Low), n("high", "to", e.High), worded("unit", "", u.unit), truth("at_limit", "", e.AtLimit)}
}

func readingsOf(in Bench) SheetTable {
	t := SheetTable{Key: "readings", Title: "Readings, and how far they are off the model ([ ] is what they allow)"}
	scale := 0.0
	for _, r := range in.Report.Readings {
		scale = max(scale, math.Abs(r.Residual), 2.5*r.Deviation)
	}
	for i, r := range in.Report.Readings {
		t.Rows = append(t.Rows, []Figure{
			number("number", "no.", "", Some(float64(i+1)), rounding{}),
			number("dose_mg_l", "dose", "mg/L", Some(r.Dose*in.Product.Chemical.MolarMass*milli), asDose),
			number("ph", "pH", "", Some(r.PH), asPH),
			number("predicted_ph", "model", "", Some(r.Predicted), asPH),
			number("residual_ph", "off", "pH", Some(r.Residual), rounding{decimals: 3, signed: true}),
			number("deviation_ph", "", "", Some(r.Deviation), asFine),
			number("saturation_index", "", "", scaled(r.SaturationIndex, 1), asIndex),
			worded("", "low            high", bar(r.Residual, 1.96*r.Deviation, scale)),
		})
	}
	return t
}

// bar draws a residual on a line of 21 places, with the ends of what the reading
// allows.
func bar(v, allowed, scale float64) string {
	const half = 10
	line := []byte(strings.Repeat(" ", 2*half+1))
	at := func(x float64) int { return half + int(math.Round(max(-1, min(1, x/scale))*half)) }
	if scale <= 0 {
		scale = 1
	}
	line[half] = '|'
	line[at(-allowed)], line[at(allowed)] = '[', ']'
	line[at(v)] = '*'
	return string(line)
}

func reasonsOf(r *bench.Report) SheetTable {
	t := SheetTable{Key: "reasons", Title: "What may be the reason, likeliest first; each with what tells"}
	for _, reason := range r.Reasons {
		var parts []string
		for _, e := range reason.Estimates {
			u := unknownUnits[e.Unknown]
			parts = append(parts, fmt.Sprintf("%s %s %s", e.Unknown.Name(), u.shown.write(e.Value*u.factor), u.unit))
		}
		t.Rows = append(t.Rows, []Figure{
			worded("reason", "", string(reason.Code)),
			worded("name", "reason", reason.Code.Name()),
			worded("size", "", strings.Join(parts, ", ")),
			truth("explains", "explains it", reason.Explains),
			worded("test", "", reason.Code.Test()),
			number("chance_percent", "", "%", Some(reason.Chance*100), rounding{decimals: 1}),
		})
		t.Notes = append(t.Notes, strings.Join(parts, ", ")+"; "+reason.Code.Test())
	}
	return t
}

// places lists readings by their number from 1.
func places(at []int) string {
	var parts []string
	for _, i := range at {
		parts = append(parts, fmt.Sprint(i+1))
	}
	return strings.Join(parts, ", ")
}
