package report

import (
	"fmt"
	"math"
	"strings"

	"beckline/dosing/hand"
)

// ways are the second and third way to an answer.
type ways struct {
	hand      hand.Answer
	titration hand.Titration
	numbers   bool // shown to people as well
}

// WithWays returns the document with the hand method and the titration step by
// step beside the answer, as two more checks. numbers shows what each gave.
func (d Document) WithWays(a hand.Answer, t hand.Titration, numbers bool) Document {
	d.ways = &ways{a, t, numbers}
	d.Checks = append([]Check(nil), d.Checks...)
	if a.Verdict != hand.Absent {
		d.Checks = append(d.Checks, Check{"hand_method", Some(a.Difference() * d.wayFactor()), a.Check()})
	}
	if t.Verdict != hand.Absent {
		d.Checks = append(d.Checks, Check{"forward_titration", Some((t.Dose - t.Model) * d.wayFactor()), t.Verdict == hand.Agrees})
	}
	return d
}

// wayFactor turns what the ways compare into mg/L of the chemical; a pH stays
// one.
func (d Document) wayFactor() float64 {
	if s := d.result.Dose(); s != nil {
		return s.Addition.Product.Chemical.MolarMass * milli
	}
	return 1
}

// assumptions says what the hand method leaves out.
var assumptions = map[hand.Assumption]string{
	hand.NoOtherAcids:   "other acids than carbonic",
	hand.NoPairs:        "ion pairs of calcium and magnesium",
	hand.NoBisulfate:    "the protons that sulfate takes below pH 4",
	hand.SimpleActivity: "all but a simple rule for the ionic strength",
	hand.OneSet:         "the choice of constants",
	hand.NotNearReach:   "that the product hardly moves this water any more",
}

func assumptionText(a hand.Assumption) string {
	if s, ok := assumptions[a]; ok {
		return s
	}
	return strings.ReplaceAll(string(a), "_", " ")
}

// WaysLine is the agreement of the ways in a word, with the assumption that
// broke where they part; "" where none was tried.
func (d Document) WaysLine() string {
	if d.ways == nil {
		return ""
	}
	titrated := "the titration step by step agrees"
	if d.ways.titration.Verdict == hand.Absent {
		titrated = "there is nothing to titrate"
	}
	switch d.ways.hand.Verdict {
	case hand.Agrees:
		return "Two ways agree: the hand method is within its bound; " + titrated + "."
	case hand.Explained:
		return "Two ways part: the hand method leaves out " + assumptionText(d.ways.hand.Broken) +
			", which counts here (with it they agree); " + titrated + "."
	}
	return "No hand method for this case; " + titrated + "."
}

func (d Document) writeWays(b *strings.Builder) {
	line := d.WaysLine()
	if line == "" {
		return
	}
	b.WriteString(Wrap(line, textWidth) + "\n")
	if !d.ways.numbers {
		return
	}
	a, t := &d.ways.hand, &d.ways.titration
	factor, unit := d.wayFactor(), " mg/L"
	if !a.IsDose && t.Verdict == hand.Absent {
		unit = ""
	}
	write := func(v float64) string { return Significant(v*factor, 5) + unit }
	b.WriteString("\nWays to the answer\n")
	if t.Verdict != hand.Absent {
		fmt.Fprintf(b, "  %-24s%14s\n  %-24s%14s  after %d steps and %d halvings\n", "at the target", write(t.Model),
			"titrated step by step", write(t.Dose), len(t.Steps), t.Halved)
	}
	if a.Verdict == hand.Absent {
		return
	}
	fmt.Fprintf(b, "  %-24s%14s  apart by %s, bound %s\n", "by hand", write(a.Hand), apart(a.Difference()*factor), Significant(a.Bound*factor, 2))
	if a.Steps.Carbon > 0 {
		fmt.Fprintf(b, "    pK1 %s, pK2 %s, pKw %s; carbon %s mmol/L\n", Fixed(a.Steps.Process.PK1, 3), Fixed(a.Steps.Process.PK2, 3),
			Fixed(a.Steps.Process.PKw, 3), Significant(a.Steps.CarbonMet*milli, 4))
	}
	var parts []string
	for _, e := range a.Effects {
		if math.Abs(e.Amount) > 1e-6*math.Abs(a.Model) { // not NaN, nor noise
			parts = append(parts, assumptionText(e.Assumption)+" "+apart(e.Amount*factor))
		}
	}
	if len(parts) > 0 {
		b.WriteString(Wrap("    what the model has besides"+unitIn(unit)+": "+strings.Join(parts, ", "), textWidth) + "\n")
	}
}

func unitIn(unit string) string {
	if unit == "" {
		return ""
	}
	return "," + unit
}

// apart writes a difference with its sign and two digits.
func apart(v float64) string {
	s := Significant(v, 2)
	if v > 0 {
		return "+" + s
	}
	return s
}

// waysJSON gives the numbers of both ways.
func (d Document) waysJSON() any {
	if d.ways == nil {
		return nil
	}
	a, t := &d.ways.hand, &d.ways.titration
	factor := d.wayFactor()
	number := func(there bool, v float64) Number {
		if !there {
			return Number{}
		}
		return Some(v * factor)
	}
	var o, h, f object
	byHand := a.Verdict != hand.Absent
	h.add("verdict", string(a.Verdict))
	h.addText("broken", string(a.Broken))
	h.add("value", number(byHand, a.Hand))
	h.add("model", number(byHand, a.Model))
	h.add("bound", number(byHand, a.Bound))
	effects := object{}
	for _, e := range a.Effects {
		effects.add(string(e.Assumption), number(true, e.Amount))
	}
	h.add("effects", effects)
	there := t.Verdict != hand.Absent
	f.add("verdict", string(t.Verdict))
	f.add("value", number(there, t.Dose))
	f.add("model", number(there, t.Model))
	f.add("steps", len(t.Steps))
	unit := "mg/L"
	if !a.IsDose && !there {
		unit = "pH"
	}
	o.add("unit", unit)
	o.add("hand_method", h)
	o.add("forward_titration", f)
	return o
}
