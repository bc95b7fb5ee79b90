package tui

import (
	"fmt"
	"strings"

	"beckline/dosing"
	"beckline/dosing/reading"
	"beckline/dosing/report"
)

// The limits that a person may enter beside the readings. None of them changes
// an answer: they are held against it.
const (
	mostUse    = "most-product" // certified maximum use level, mg/L of product
	mostPH     = "most-ph"
	mostSodium = "most-sodium"
)

// limitPlace makes the place of a limit that is in the terms of a reading.
func limitPlace(name, label, of, help string) place {
	p := lookupPlace(of)
	p.name, p.label, p.help, p.blank = name, label, help, "not set"
	return p
}

// useLevel is the place of the product's certified maximum use level.
func (s sheet) useLevel() place {
	p := place{kind: numberPlace, name: mostUse, label: "max. use level", unit: "mg/L product", add: -1, blank: "not set",
		help: "certified maximum use level from the product's certificate, mg/L of product as delivered"}
	if s.plant != nil {
		if own := s.plant.Site().ProductNamed(s.Product); own != nil && own.MaximumUse.Given {
			p.blank = report.Significant(own.MaximumUse.Value*1000, 4)
		}
	}
	return p
}

// finishedLimits are the places of what the finished water must not pass.
func (s sheet) finishedLimits() []place {
	places := []place{
		limitPlace(mostPH, "pH at most", "ph", "your plant's own ceiling of the finished pH; passing it is an alarm"),
		limitPlace(mostSodium, "sodium at most", "sodium", "your plant's own ceiling of sodium in the finished water; passing it is an alarm"),
	}
	if s.plant == nil {
		return places
	}
	for i, name := range []string{"ph", "sodium"} {
		if b, ok := s.plant.Finished[name]; ok && b.High.Given {
			places[i].blank = places[i].field.Show(b.High.Value)
		}
	}
	return places
}

func isLimit(name string) bool { return name == mostUse || name == mostPH || name == mostSodium }

// useLevelOf reads the maximum use level, kg of product per m3.
func useLevelOf(text string) (dosing.Optional, error) {
	if strings.TrimSpace(text) == "" {
		return dosing.None, nil
	}
	d, err := reading.ParseDose("product=" + text)
	if err != nil || d.MgPerLitre <= 0 || d.Basis != "" && !strings.EqualFold(d.Basis, "product") {
		return dosing.None, fmt.Errorf("max. use level %q cannot be used; accepted: above 0 to 10000 mg/L of product", reading.Clean(text))
	}
	return dosing.Some(d.MgPerLitre / 1000), nil
}

// alarm is one limit that the answer passes, in words.
type alarm struct{ text string }

// limitsPassed holds the answer against the limits entered and those of the
// plant file, and picks the warnings that are alarms.
func limitsPassed(s sheet, r *dosing.Result) []alarm {
	var out []alarm
	say := func(format string, args ...any) { out = append(out, alarm{fmt.Sprintf(format, args...)}) }
	fin := &r.Finished().Figures
	for _, l := range []struct {
		name, what string
		value      dosing.Optional
	}{{mostPH, "pH", dosing.Some(fin.PH)}, {mostSodium, "sodium", fin.Sodium}} {
		p := limitPlace(l.name, "", map[string]string{mostPH: "ph", mostSodium: "sodium"}[l.name], "")
		text := s.Limits[l.name]
		if text == "" {
			continue
		}
		v, err := p.field.Parse(text)
		if err != nil {
			continue // its field says so
		}
		unit := strings.TrimSuffix(" "+shortUnit(p.unit), " ")
		switch {
		case !l.value.Given:
			say("%s of the finished water is not known: enter it for the raw water, to hold it against %s%s", l.what, p.field.Show(v.SI), unit)
		case l.value.Value > v.SI*(1+1e-9):
			say("%s %s%s of the finished water is over your limit of %s%s", l.what, p.field.Show(l.value.Value), unit, p.field.Show(v.SI), unit)
		}
	}
	if s.plant != nil {
		for _, p := range s.plant.CheckFinished(r) {
			say("%s", report.ProblemLine(p))
		}
	}
	for _, w := range r.Warnings {
		if alarms[w.Code] {
			say("%s", report.Sentence(w))
		}
	}
	return out
}

// alarms are the warnings that are alarms: what can hurt people or the works,
// not what limits the figures.
var alarms = map[string]bool{"over_use_level": true, "may_scale": true, "product_may_freeze": true,
	"low_alkalinity_for_coagulation": true, "coagulant_ph_outside": true}
