package report

import (
	"fmt"
	"math"
	"strings"

	"beckline/dosing"
	"beckline/dosing/margin"
)

// WithMargin returns the document with how far off its answer may be. usual says
// that the tolerances are the usual ones, since none were given.
func (d Document) WithMargin(m margin.Margin, usual bool) Document {
	d.margin, d.usual, d.trusted = &m, usual, true
	return d
}

// WithoutMargin returns the document saying that no margin could be worked out.
func (d Document) WithoutMargin() Document {
	d.margin, d.trusted = nil, true
	return d
}

// WithWorking returns the document with the text of its worked sheet.
func (d Document) WithWorking(sheet string) Document {
	d.working = sheet
	return d
}

// addTrust adds what was asked for beside the answer: the margin, the other ways,
// the worked sheet.
func (d Document) addTrust(o *object) {
	if d.trusted {
		o.add("margin", d.marginJSON())
	}
	if d.ways != nil {
		o.add("ways", d.waysJSON())
	}
	if d.working != "" {
		o.add("working", strings.Split(strings.TrimSuffix(d.working, "\n"), "\n"))
	}
}

// marginSpec is one figure of a margin, in the unit of its key.
type marginSpec struct {
	key   string
	value func(m *margin.Margin, s *dosing.Station) Number
}

// marginSpecs are the ranges in their fixed order. The dose and feed are those
// of the (first) product solved for.
var marginSpecs = []marginSpec{
	{key: "dose_mg_l_low", value: func(m *margin.Margin, s *dosing.Station) Number { return doseEnd(m, s, m.Dose.Low) }},
	{key: "dose_mg_l_high", value: func(m *margin.Margin, s *dosing.Station) Number { return doseEnd(m, s, m.Dose.High) }},
	{key: "finished_ph_low", value: func(m *margin.Margin, _ *dosing.Station) Number { return Some(m.FinishedPH.Low) }},
	{key: "finished_ph_high", value: func(m *margin.Margin, _ *dosing.Station) Number { return Some(m.FinishedPH.High) }},
	{key: "feed_kg_d_low", value: func(m *margin.Margin, _ *dosing.Station) Number { return massEnd(m, m.Mass.Low) }},
	{key: "feed_kg_d_high", value: func(m *margin.Margin, _ *dosing.Station) Number { return massEnd(m, m.Mass.High) }},
	{key: "feed_l_h_low", value: func(m *margin.Margin, _ *dosing.Station) Number { return volumeEnd(m, m.Volume.Low) }},
	{key: "feed_l_h_high", value: func(m *margin.Margin, _ *dosing.Station) Number { return volumeEnd(m, m.Volume.High) }},
}

func doseEnd(m *margin.Margin, s *dosing.Station, v float64) Number {
	if !m.Solved || s == nil {
		return Number{}
	}
	return Some(v * s.Addition.Product.Chemical.MolarMass * milli)
}

func massEnd(m *margin.Margin, v float64) Number {
	if !m.Solved || !m.HasFlow {
		return Number{}
	}
	return Some(v * secondsPerDay)
}

func volumeEnd(m *margin.Margin, v float64) Number {
	if !m.Solved || !m.HasFlow || !m.HasVolume {
		return Number{}
	}
	return Some(v * litresPerM3 * secondsPerHour)
}

// marginJSON is the margin with every key; null where there is none at all.
func (d Document) marginJSON() any {
	if d.margin == nil {
		return nil
	}
	m := d.margin
	var o, shares object
	for _, s := range marginSpecs {
		o.add(s.key, s.value(m, d.result.Dose()))
	}
	for _, s := range m.Shares {
		shares.add(s.Reading, Some(s.Fraction))
	}
	o.add("shares", shares)
	o.addText("repeat", m.Repeat)
	o.add("method", string(m.Method))
	o.addText("reason", string(m.Reason))
	o.add("drawn", m.Drawn)
	return o
}

// MarginColumns are Columns with those of a margin ahead of the last two.
func MarginColumns() []Column {
	columns := Columns()
	last := len(columns) - 2
	out := append([]Column(nil), columns[:last]...)
	for _, s := range marginSpecs {
		out = append(out, Column{Name: s.key, Number: true})
	}
	out = append(out, Column{Name: "repeat"}, Column{Name: "method"})
	return append(out, columns[last:]...)
}

// MarginCells are the document's cells in the order of MarginColumns.
func (d Document) MarginCells() []string {
	more := make([]string, len(marginSpecs)+2)
	if m := d.margin; m != nil {
		for i, s := range marginSpecs {
			if n := s.value(m, d.result.Dose()); n.Given {
				more[i] = Full(n.Value)
			}
		}
		more[len(marginSpecs)], more[len(marginSpecs)+1] = m.Repeat, string(m.Method)
	}
	cells := d.Cells()
	last := len(cells) - 2
	return append(append(append([]string(nil), cells[:last]...), more...), cells[last:]...)
}

// MarginProblemCells are ProblemCells in the order of MarginColumns.
func MarginProblemCells(p *dosing.Problem) []string {
	return append(make([]string, len(marginSpecs)+2), ProblemCells(p)...)
}

// TrustLine says in one sentence how far off the answer may be and which
// reading is worth repeating; "" where no margin was worked out.
func (d Document) TrustLine() string {
	if d.margin == nil {
		return ""
	}
	m := d.margin
	var parts []string
	for i, s := range d.result.Doses() {
		f := &m.Feed
		if i > 0 {
			if f = m.Second; f == nil {
				break
			}
		}
		parts = append(parts, rangeText(f, s, len(d.result.Doses()) > 1))
	}
	parts = append(parts, "finished pH "+span(m.FinishedPH, 1, 2))
	of := "with the tolerances given"
	if d.usual {
		of = "with the usual tolerances"
	}
	return strings.Join(parts, ", ") + " (95 %, " + of + ")" + fromWhat(m)
}

func rangeText(f *margin.Feed, s *dosing.Station, several bool) string {
	text := span(f.Dose, s.Addition.Product.Chemical.MolarMass*milli, -1) + " mg/L"
	if several {
		text += " of " + s.Addition.Product.Name
	}
	switch {
	case f.HasFlow && f.HasVolume:
		text += " = " + span(f.Volume, litresPerM3*secondsPerHour, -1) + " L/h"
	case f.HasFlow:
		text += " = " + span(f.Mass, secondsPerDay, -1) + " kg/d"
	}
	return text
}

// span writes a range with so many decimals, or three digits where that is below 0.
func span(r margin.Range, factor float64, decimals int) string {
	write := func(v float64) string {
		if decimals < 0 {
			return Significant(v*factor, 3)
		}
		return Fixed(v*factor, decimals)
	}
	switch {
	case math.IsNaN(r.Low) || math.IsNaN(r.High):
		return "not known"
	case !r.Reached():
		return write(r.Low) + " or more"
	}
	return write(r.Low) + " to " + write(r.High)
}

// fromWhat names the reading behind most of a margin and the one to repeat.
func fromWhat(m *margin.Margin) string {
	var most margin.Share
	for _, s := range m.Shares {
		if s.Fraction > most.Fraction {
			most = s
		}
	}
	if most.Reading == "" {
		return ""
	}
	part := "most of it"
	if most.Fraction <= 0.5 {
		part = "the largest part"
	}
	text := fmt.Sprintf("; %s from %s", part, readingWords(most.Reading))
	switch m.Repeat {
	case "":
	case most.Reading:
		text += ": read it again first"
	default:
		text += "; read " + readingWords(m.Repeat) + " again first"
	}
	if m.Unreached > 0 && !m.Dose.Reached() {
		text += "; some of the waters within the tolerances cannot be brought there"
	}
	return text
}

// readingWords is a reading's name as people write it.
func readingWords(name string) string {
	words := strings.Fields(name)
	for i, w := range words {
		switch {
		case w == "ph":
			words[i] = "pH"
		case w == "ph-temperature":
			words[i] = "the temperature of the pH reading"
		case w == "dic":
			words[i] = "the inorganic carbon"
		case w == "tds":
			words[i] = "TDS"
		default:
			words[i] = strings.ReplaceAll(w, "-", " ")
		}
	}
	return strings.Join(words, " ")
}

func (d Document) writeTrust(b *strings.Builder) {
	if line := d.TrustLine(); line != "" {
		b.WriteString(Wrap("Trust: "+line, textWidth) + "\n\n")
	}
}
