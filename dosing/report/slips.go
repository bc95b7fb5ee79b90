package report

import (
	"sort"
	"strings"

	"beckline/dosing/slips"
)

// SlipCode is the warning code of a finding.
func SlipCode(f slips.Finding) string { return "slip_" + f.Code }

// SlipSentence says a finding to an operator: the field, the likely cause, what
// points to it, what settles it.
func SlipSentence(f slips.Finding) string {
	var parts []string
	for _, s := range []string{f.Cause, f.Evidence, f.Do} {
		if s = strings.TrimRight(strings.TrimSpace(s), ".;"); s != "" {
			parts = append(parts, s)
		}
	}
	text := strings.Join(parts, "; ")
	text = strings.ReplaceAll(text, "?;", "?")
	if f.Field != "" {
		text = f.Field + ": " + text
	}
	return ASCII(text)
}

// WithSlips returns the document with findings among its warnings. They block
// nothing.
func (d Document) WithSlips(findings []slips.Finding) Document {
	if len(findings) == 0 {
		return d
	}
	all := append([]Notice(nil), d.Warnings...)
	for _, f := range findings {
		all = append(all, Notice{SlipCode(f), f.Field, SlipSentence(f)})
	}
	sort.SliceStable(all, func(i, j int) bool {
		if all[i].Code != all[j].Code {
			return all[i].Code < all[j].Code
		}
		return all[i].Field < all[j].Field
	})
	d.Warnings = all
	return d
}
