package tui

import (
	"errors"
	"strconv"
	"strings"

	"beckline/dosing"
	"beckline/dosing/entry"
	"beckline/dosing/reading"
	"beckline/dosing/report"
)

// Solver answers a case; dosing.Solve is the one in use. Its error is a
// *dosing.Problem.
type Solver func(dosing.Case) (*dosing.Result, error)

// evaluation is what a sheet amounts to: an answer, or why there is none.
type evaluation struct {
	bad     map[string]string // by field: what is wrong and what is accepted
	unsure  map[string]string // by field: an unusual value that nobody confirmed, and why
	missing []string          // names of fields that an answer needs
	result  *dosing.Result    // nil where nothing could be computed
	solved  bool              // the result holds the dose
	refusal *dosing.Problem   // the readings are fine and there is no such dose
	failure *dosing.Problem   // anything else that stands in the way
	curve   curve
	trust   trust
	alarms  []alarm
	line    []lineStep // whose waters the result holds, in its order
}

// inspect looks at each place by itself: what cannot be used there, and what is
// unusual and unconfirmed. It solves nothing.
func inspect(s sheet) evaluation {
	e := evaluation{bad: map[string]string{}, unsure: map[string]string{}}
	for _, st := range s.stations() {
		for _, p := range st.places {
			e.look(s, p)
		}
	}
	return e
}

// evaluate computes everything that the screen shows of a sheet.
func evaluate(s sheet, solve Solver) evaluation {
	e := inspect(s)
	e.line = s.steps()
	for i, a := range s.Adds {
		if a.missing() {
			e.missing = append(e.missing, "dose-"+strconv.Itoa(i+1))
		}
	}
	for _, p := range s.problems() {
		switch {
		case p.Code == "missing":
			e.missing = append(e.missing, p.Field)
		case p.Field == reading.DoseField: // found at its place already
		case e.bad[p.Field] == "" && p.Field != "":
			e.bad[p.Field] = report.ProblemLine(p)
		case p.Field == "" && e.failure == nil:
			e.failure = p
		}
	}
	if len(e.bad)+len(e.unsure) > 0 || e.failure != nil {
		return e
	}
	if len(e.missing) == 0 {
		e.answer(s, solve)
		return e
	}
	for _, name := range e.missing {
		if isReading(name) || strings.HasPrefix(name, "dose-") {
			return e
		}
	}
	e.waterOnly(s, solve) // only the target or the product is still to come
	return e
}

// look checks what stands at one place.
func (e *evaluation) look(s sheet, p place) {
	text := s.text(p)
	if p.kind != numberPlace || text == "" {
		return
	}
	switch {
	case p.add >= 0:
		e.lookDose(s, p, text)
		return
	case p.name == mostUse:
		if _, err := useLevelOf(text); err != nil {
			e.bad[p.name] = err.Error()
		}
		return
	}
	v, err := p.field.Parse(text)
	if err != nil {
		e.bad[p.name] = ownName(p, err).Error()
		return
	}
	if s.plant != nil && isReading(p.name) {
		warning, problem := s.plant.CheckReading(p.field, v.SI, v.Given)
		if problem != nil {
			e.bad[p.name] = report.ProblemLine(problem)
			return
		}
		if _, own := s.plant.Usual[p.name]; own {
			v.Unusual = warning != nil
			if v.Unusual {
				v.UnusualWhy = report.Sentence(*warning)
			}
		}
	}
	if v.Unusual && s.Accepted[p.name] != text && !isLimit(p.name) {
		e.unsure[p.name] = v.UnusualWhy
	}
}

// ownName puts the place's own name into a refusal of its field.
func ownName(p place, err error) error {
	var e *reading.Error
	if isLimit(p.name) && errors.As(err, &e) {
		own := *e
		own.Field = p.label
		return &own
	}
	return err
}

// lookDose checks a number of a given step by itself.
func (e *evaluation) lookDose(s sheet, p place, text string) {
	a := feedEntry{Product: s.Adds[p.add].Product}
	*a.number(p.part) = text
	if p.part == demandPart {
		a.Residual = "0"
	}
	alone := s
	alone.Values, alone.Adds = map[string]string{"ph": "7", "alkalinity": "50", "temperature": "10"}, []feedEntry{a}
	c, err := alone.caseFor(entry.NeedWater)
	var problem *dosing.Problem
	if errors.As(err, &problem) && problem.Field == reading.DoseField {
		e.bad[p.name] = report.ProblemLine(problem)
		return
	}
	if err != nil || s.Accepted[p.name] == text {
		return
	}
	for _, note := range c.Notes {
		if note.Code == "unusual_dose" {
			e.unsure[p.name] = report.Sentence(note)
		}
	}
}

// answer solves the whole case.
func (e *evaluation) answer(s sheet, solve Solver) {
	c, err := s.caseFor(entry.NeedDose)
	if err != nil {
		e.refuse(err)
		return
	}
	r, err := solve(c)
	if err != nil {
		e.refuse(err)
		if e.refusal != nil || len(e.missing) > 0 {
			e.waterOnly(s, solve)
		}
		return
	}
	e.result, e.solved = r, true
	e.trust = trustOf(s, r)
	e.curve = doseCurve(r, s.tolerances())
	e.alarms = limitsPassed(s, r)
}

// waterOnly works out the water up to the dose that is asked for: the raw water
// and what is fed ahead. Where that cannot be had, the raw water alone.
func (e *evaluation) waterOnly(s sheet, solve Solver) {
	c, err := s.caseFor(entry.NeedWater)
	if err != nil {
		e.refuse(err)
		return
	}
	c.Target = dosing.Target{}
	c.Additions = c.Additions[:min(s.ahead(), len(c.Additions))]
	r, err := solve(c)
	if err != nil && len(c.Additions) > 0 {
		c.Additions = nil
		r, err = solve(c)
	}
	if err == nil {
		e.result = r
	} else if e.refusal == nil {
		e.refuse(err)
	}
}

// refuse files a problem under what it means for the screen.
func (e *evaluation) refuse(err error) {
	var p *dosing.Problem
	if !errors.As(err, &p) {
		p = &dosing.Problem{Kind: dosing.Failed, Code: "failed", Accepted: err.Error()}
	}
	switch {
	case p.Kind == dosing.NoAnswer:
		e.refusal = p
	case p.Code == "missing" || p.Code == "calcium_needed":
		e.missing = append(e.missing, p.Field)
	case p.Kind == dosing.BadInput && p.Field != "":
		e.bad[p.Field] = report.ProblemLine(p)
	default:
		e.failure = p
	}
}
