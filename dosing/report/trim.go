package report

import (
	"fmt"

	"beckline/dosing"
	"beckline/dosing/bench/trim"
)

// Trim is one reading of the finished water beside what the setting in force
// should give, and the way to a new setting.
type Trim struct {
	Report *trim.Report
	Result *dosing.Result
	At     int          // station of the feed that is trimmed
	For    *trim.Reason // the cause that the steps go by, nil for no steps
	Plan   *trim.Plan
}

// TrimSheet is the answer about a correction.
func TrimSheet(in Trim) Sheet {
	r, at := in.Report, &in.Result.Stations[in.At]
	grams := at.Addition.Product.Chemical.MolarMass * milli
	dose := func(o dosing.Optional) Number { return scaled(o, grams) }
	s := Sheet{Name: "trim"}
	verdict := fmt.Sprintf("Measured pH %s, expected %s: off by %s, more than the %s that the readings allow", Fixed(r.Measured, 2),
		Fixed(r.Expected, 2), asIndex.write(r.Difference), Fixed(r.Allowed, 2))
	if r.Within {
		verdict = fmt.Sprintf("Measured pH %s, expected %s: off by %s, which the readings allow (%s)",
			Fixed(r.Measured, 2), Fixed(r.Expected, 2), asIndex.write(r.Difference), Fixed(r.Allowed, 2))
		if in.Plan == nil {
			verdict += ". Leave the setting; read again"
		}
	}
	s.Head = append(s.Head, verdict)
	if in.Plan != nil {
		last := in.Plan.Steps[len(in.Plan.Steps)-1]
		s.Head = append(s.Head, fmt.Sprintf("If %s: go from %s to %s mg/L in %d steps; do its test first", in.For.Cause.Name(),
			asDose.write(at.Dose*grams), asDose.write(last.Dose*grams), len(in.Plan.Steps)))
	}
	s.Figures = []Figure{
		worded("product", "", at.Addition.Product.Name),
		worded("basis", "doses are", "mg/L as "+Basis(at.Addition.Product.Chemical)),
		number("measured_ph", "", "", Some(r.Measured), asPH),
		number("expected_ph", "", "", Some(r.Expected), asPH),
		number("difference_ph", "", "", Some(r.Difference), asIndex),
		number("allowed_ph", "", "", Some(r.Allowed), asPH),
		truth("within", "", r.Within),
		number("dose_mg_l", "dose in force", "mg/L", Some(at.Dose*grams), asDose),
		number("implied_mg_l", "dose that would give the reading", "mg/L", dose(r.Implied), asDose),
		number("corrected_mg_l", "to set, if the dose is what is off", "mg/L", dose(r.Corrected), asDose),
		number("change_percent", "which changes it by", "%", onlyIf(r.Corrected.Given, r.Change*100), rounding{decimals: 1, signed: true}),
		number("low_mg_l", "the likely causes ask for", "mg/L", dose(r.Low), asDose),
		number("high_mg_l", "to", "mg/L", dose(r.High), asDose),
	}
	reasons := SheetTable{Key: "reasons", Title: "What may be wrong, likeliest first, each as if alone; and its two-minute test"}
	for _, c := range r.Reasons {
		size, unit := causeSize(c)
		reasons.Rows = append(reasons.Rows, []Figure{
			worded("cause", "", string(c.Cause)),
			worded("name", "cause", c.Cause.Name()),
			number("size", "", unit, Some(size), asFine),
			worded("unit", "", unit),
			number("deviations", "sigma", "", Some(c.Deviations), rounding{decimals: 1, significant: 2}),
			number("weight", "weight", "%", Some(c.Weight*100), rounding{decimals: 0}),
			number("set_mg_l", "set", "mg/L", dose(c.Dose), asDose),
			worded("test", "", c.Cause.Test()),
		})
		reasons.Notes = append(reasons.Notes, fmt.Sprintf("would be %s %s; %s", causeText(size, unit), unit, c.Cause.Test()))
	}
	s.Tables = append(s.Tables, reasons, stepsTable(in, at, grams))
	if p := in.Plan; p != nil {
		s.Figures = append(s.Figures, worded("planned_for", "", string(in.For.Cause)), worded("reason", "reason for passing the plant's limit", p.Reason))
		for _, b := range p.Beyond {
			s.Warnings = append(s.Warnings, Notice{"beyond_plant_limit", b.Limit, fmt.Sprintf("the plan passes the plant's own %s, for the reason stated: %s", b.Limit, p.Reason)})
		}
	}
	s.Handle(at.Addition.Product.Caution)
	return s
}

// causeSize is a cause's size in a unit that people use.
func causeSize(c trim.Reason) (float64, string) {
	switch c.Cause.Unit() {
	case "share":
		return c.Size * 100, "%"
	case "mol/L":
		return c.Size * carbonDioxideMass * milli, "mg/L CO2"
	}
	return c.Size, c.Cause.Unit()
}

func causeText(size float64, unit string) string {
	if unit == "pH" {
		return asIndex.write(size)
	}
	return asCCPP.write(size)
}

func stepsTable(in Trim, at *dosing.Station, grams float64) SheetTable {
	t := SheetTable{Key: "steps", Title: "Steps: set, wait, read; outside the stop limits go back one step and look for the cause"}
	if in.Plan == nil {
		return t
	}
	minutes := func(o dosing.Optional) Number { return scaled(o, 1.0/60) }
	for i, p := range in.Plan.Steps {
		share := 0.0
		if at.Dose > 0 {
			share = p.Dose / at.Dose
		}
		feeds := at.Feed.HasFlow && at.Feed.HasVolume && share > 0
		t.Rows = append(t.Rows, []Figure{
			number("number", "no.", "", Some(float64(i+1)), rounding{}),
			number("dose_mg_l", "dose", "mg/L", Some(p.Dose*grams), asDose),
			number("feed_l_h", "feed", "L/h", onlyIf(feeds, at.Feed.VolumePerSecond*share*litresPerM3*secondsPerHour), asFeed),
			number("pump_percent", "pump", "%", onlyIf(at.Feed.HasPump && share > 0, at.Feed.PumpFraction*share*100), asPercent),
			number("wait_low_min", "wait", "min", minutes(p.WaitLow), rounding{decimals: 0}),
			number("wait_high_min", "at most", "min", minutes(p.WaitHigh), rounding{decimals: 0}),
			number("expected_ph", "reads", "pH", Some(p.PH), asPH),
			number("stop_low_ph", "stop under", "pH", Some(p.StopLow), asPH),
			number("stop_high_ph", "stop over", "pH", Some(p.StopHigh), asPH),
		})
	}
	return t
}
