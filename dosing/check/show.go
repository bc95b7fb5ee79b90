package check

import (
	"encoding/json"
	"fmt"
	"strings"

	"beckline/dosing/report"
)

// Text lists the comparisons for people: value, published value, difference,
// tolerance, and the source once for the values that share it.
func Text(outcomes []Outcome) string {
	var b strings.Builder
	group, source := "", ""
	agreeing := 0
	for _, o := range outcomes {
		if o.Group != group {
			group, source = o.Group, ""
			fmt.Fprintf(&b, "%s\n", group)
		}
		if from := o.origin(); from != source {
			source = from
			b.WriteString(report.Wrap("  "+source, 78) + "\n")
		}
		verdict := "agrees"
		if o.Agrees() {
			agreeing++
		} else {
			verdict = "DISAGREES"
		}
		fmt.Fprintf(&b, "    %s\n      %s, published %s, difference %s, tolerance %s %s: %s\n", o.Name,
			report.Significant(o.Value, 6), report.Full(o.Published), report.Significant(o.Difference(), 2),
			report.Significant(o.Tolerance, 2), o.Unit, verdict)
	}
	fmt.Fprintf(&b, "\n%d of %d published values agree\n", agreeing, len(outcomes))
	return report.ASCII(b.String())
}

// origin is the source with how it was come by, and why the tolerance is so.
func (o Outcome) origin() string {
	s := o.Source + " (" + o.How + ")"
	if o.Note != "" {
		s += "; tolerance: " + o.Note
	}
	return s
}

// JSON lists the comparisons for programs.
func JSON(outcomes []Outcome) ([]byte, error) {
	type line struct {
		Group      string        `json:"group"`
		Name       string        `json:"name"`
		Unit       string        `json:"unit"`
		Value      report.Number `json:"value"`
		Published  report.Number `json:"published"`
		Difference report.Number `json:"difference"`
		Tolerance  report.Number `json:"tolerance"`
		Agrees     bool          `json:"agrees"`
		Source     string        `json:"source"`
		How        string        `json:"how"`
		Note       string        `json:"note"`
	}
	lines := make([]line, len(outcomes))
	for i, o := range outcomes {
		lines[i] = line{o.Group, o.Name, o.Unit, report.Some(o.Value), report.Some(o.Published), report.Some(o.Difference()),
			report.Some(o.Tolerance), o.Agrees(), o.Source, o.How, o.Note}
	}
	text, err := json.MarshalIndent(map[string]any{"comparisons": lines}, "", "  ")
	return append(text, '\n'), err
}
