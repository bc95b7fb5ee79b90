package tui

import (
	"strings"

	"beckline/dosing"
	"beckline/dosing/margin"
	"beckline/dosing/report"
	"beckline/tui/canvas"
)

// trust is how far the readings' tolerances let the answer be off: in two short
// lines, and whole. It is made at first order, from slopes at the answer, since
// it follows every change; where slopes are not good enough it says "about", and
// the whole answer (Y) has the drawn ranges.
type trust struct {
	span, advice string
}

// trustOf works out the trust of a result.
func trustOf(s sheet, r *dosing.Result) trust {
	m, err := margin.Of(r, s.tolerances(), margin.Options{Method: margin.FirstOrder})
	if err != nil || !m.Solved {
		return trust{}
	}
	grams := r.Dose().Addition.Product.Chemical.MolarMass * 1000
	about := ""
	if m.Reason != margin.NoReason {
		about = "about "
	}
	t := trust{span: about + spanText(m.Dose, grams, 3) + " mg/L"}
	ph := spanPH(m.FinishedPH)
	if r.Case.Target.Kind == dosing.TargetPH && ph != "" {
		t.span += ", pH " + ph
	}
	if m.Repeat != "" {
		t.advice = "read " + readingLabel(m.Repeat) + " again first"
	}
	return t
}

// trustMeans says what the ranges are.
const trustMeans = "With the plant's tolerances of the readings, or the usual ones (pH 0.1, alkalinity 3 % or 1 mg/L, " +
	"temperature 0.5 K, flow 3 %, strength 1 %), 95 % of the right doses lie in that range, and the pH in its range if the " +
	"pump is set as shown. The marks along the curve are the same for other doses."

// whole is the trust as one sentence.
func (t trust) whole() string {
	if t.span == "" {
		return ""
	}
	return strings.TrimSuffix(t.span+"; "+t.advice, "; ")
}

func spanText(r margin.Range, factor float64, digits int) string {
	low := report.Significant(max(r.Low*factor, 0), digits)
	if !r.Reached() {
		return low + " or more"
	}
	return low + " to " + report.Significant(r.High*factor, digits)
}

func spanPH(r margin.Range) string {
	if r.Low != r.Low || r.High != r.High {
		return ""
	}
	return report.Fixed(r.Low, 1) + " to " + report.Fixed(r.High, 1)
}

// readingLabel is a reading's name as the fields have it.
func readingLabel(name string) string {
	if p := lookupPlace(name); p.label != "" {
		return p.label
	}
	return strings.ReplaceAll(name, "-", " ")
}

// drawTrust shows the two lines under the curve.
func (m *Model) drawTrust(c *canvas.Canvas, x, y int) {
	c.Text(x, y, canvas.Cut(m.good.trust.span, c.Width-x-1), canvas.Plain)
	c.Text(x, y+1, canvas.Cut(m.good.trust.advice, c.Width-x-1), canvas.Plain)
}
