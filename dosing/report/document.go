package report

import (
	"beckline/dosing"
	"beckline/dosing/batch"
	"beckline/dosing/margin"
)

// Document is a whole answer in the units of its keys. It is made by New from
// a Result and nothing else.
type Document struct {
	Raw      []Figure
	Dose     []Figure // nil where no dose was asked for
	Finished []Figure // the water after the last addition; the raw water where there is none
	Stations []Station
	Warnings []Notice
	Checks   []Check

	result *dosing.Result
	batch  *batch.Plan // nil where no tank is planned

	margin  *margin.Margin // nil where none was worked out
	trusted bool           // a margin was asked for, though there may be none
	usual   bool           // with the usual tolerances
	ways    *ways          // nil where none was tried
	working string         // the worked sheet, "" where none is asked for
}

// Station is one step of the water's path.
type Station struct {
	Kind   string   // "raw", "addition", "aeration" or "contactor"
	Dose   []Figure // nil where no chemical is fed
	Solved bool
	Water  []Figure
}

// Notice is a warning with its sentence.
type Notice struct {
	Code    string
	Field   string // "" for the whole
	Message string
}

// Check is one internal comparison. Value is in the unit of the check: pH for
// closure_ph, mg/L as CaCO3 for alkalinity_balance, mmol/L for carbon_balance.
type Check struct {
	Name   string
	Value  Number
	Agrees bool
}

// New makes the document of a result.
func New(r *dosing.Result) Document {
	d := Document{
		Raw:      Water(&r.Raw().Figures),
		Finished: Water(&r.Finished().Figures),
		result:   r,
	}
	if s := r.Dose(); s != nil {
		d.Dose = Dose(s)
	}
	for i := range r.Stations {
		s := &r.Stations[i]
		step := Station{Kind: "raw", Water: Water(&s.Figures)}
		if s.Addition != nil {
			step.Kind, step.Solved = kindText(s.Addition.Process), s.Solved
			if s.Addition.Process == dosing.ChemicalFeed {
				step.Dose = Dose(s)
			}
		}
		d.Stations = append(d.Stations, step)
	}
	for _, w := range r.Warnings {
		d.Warnings = append(d.Warnings, Notice{w.Code, w.Field, Sentence(w)})
	}
	for _, c := range r.Checks {
		d.Checks = append(d.Checks, Check{c.Name, Some(c.Value * checkFactor(c.Name)), c.Agrees})
	}
	return d
}

func kindText(p dosing.Process) string {
	switch p {
	case dosing.Aeration:
		return "aeration"
	case dosing.LimestoneContactor:
		return "contactor"
	}
	return "addition"
}

// Agrees tells whether every internal comparison agrees. A document of which
// this is false must not be shown as an answer.
func (d Document) Agrees() bool {
	for _, c := range d.Checks {
		if !c.Agrees {
			return false
		}
	}
	return true
}

func checkFactor(name string) float64 {
	switch name {
	case "alkalinity_balance":
		return caco3PerEquivalent
	case "carbon_balance":
		return milli
	}
	return 1
}
