package working

import (
	"math"

	"beckline/dosing"
)

const (
	shownDigits = 6    // of an outcome
	mostDigits  = 17   // of a number put in: a float64 in full
	shownError  = 2e-6 // how far the line as it stands may be from its value, relative
	drift       = 1e-6 // how far a formula may be from the answer, relative
	nothing     = 1e-9 // absolute, for an outcome of zero
)

// builder makes steps and checks each as it is made.
type builder struct {
	sheet Sheet
	names map[string]float64
	kept  map[string]float64 // of the sources of a blend
	err   error
}

func (b *builder) section(heading, note string) {
	b.sheet.Sections = append(b.sheet.Sections, Section{Heading: heading, Note: note})
}

func (b *builder) add(s Step) {
	last := &b.sheet.Sections[len(b.sheet.Sections)-1]
	last.Steps = append(last.Steps, s)
	b.names[s.Name] = s.Value
}

// given is a number that is read, looked up, or found by repetition.
func (b *builder) given(name, what string, value float64, unit, source string) {
	if b.err != nil {
		return
	}
	b.add(Step{Name: name, What: what, Value: value, Outcome: write(value, shownDigits), Unit: unit, Source: source})
}

// step works a formula from the names so far. want is the answer's own number
// for it; the formula must give that.
func (b *builder) step(name, what, formula, unit, source string, want float64) {
	b.stepWithin(name, what, formula, unit, source, want, nothing*floor(unit))
}

// stepWithin is step where rounding of the answer may show as so much: a
// quotient of small differences.
func (b *builder) stepWithin(name, what, formula, unit, source string, want, slack float64) {
	if b.err != nil {
		return
	}
	e, err := parse(formula)
	if err != nil {
		b.fail(err.Error())
		return
	}
	v, err := e.value(b.names)
	if err != nil {
		b.fail(err.Error())
		return
	}
	if !(math.Abs(v-want) <= drift*math.Abs(want)+slack) {
		b.fail("the sheet's " + name + " is " + write(v, 9) + ", the answer's " + write(want, 9))
		return
	}
	if want == 0 && math.Abs(v) <= nothing*floor(unit) {
		v = 0 // rounding
	}
	s := Step{Name: name, What: what, Formula: formula, Value: v, Outcome: write(v, shownDigits), Unit: unit, Source: source}
	if !e.plain() {
		if s.Numbers, err = b.putIn(e, v, floor(unit)); err != nil {
			b.fail(err.Error())
			return
		}
	}
	b.add(s)
}

// work is a step of plain arithmetic that the answer holds no number of its own
// for.
func (b *builder) work(name, what, formula, unit, source string) {
	if b.err != nil {
		return
	}
	e, err := parse(formula)
	if err == nil {
		var v float64
		if v, err = e.value(b.names); err == nil {
			b.step(name, what, formula, unit, source, v)
			return
		}
	}
	b.fail(err.Error())
}

// putIn writes the numbers in with as few digits as will do.
func (b *builder) putIn(e expression, v, floor float64) (string, error) {
	for digits := shownDigits; ; digits++ {
		text := e.numbers(b.names, digits)
		again, err := parse(text)
		if err != nil {
			return "", err
		}
		got, err := again.value(nil)
		if err != nil {
			return "", err
		}
		if math.Abs(got-v) <= shownError*math.Abs(v)+nothing*floor || digits == mostDigits {
			return text, nil
		}
	}
}

// floor scales what counts as zero: amounts in mol/L are small themselves.
func floor(unit string) float64 {
	if unit == molar || unit == equivalents {
		return 1e-6
	}
	return 1
}

func (b *builder) fail(why string) {
	if b.err == nil {
		b.err = &dosing.Problem{Kind: dosing.Failed, Code: "working_failed", Given: why}
	}
}

// The units of the sheet.
const (
	molar       = "mol/L"
	equivalents = "eq/L"
)
