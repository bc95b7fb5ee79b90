package entry

import (
	"beckline/dosing"
	"beckline/dosing/reading"
)

var targetKinds = map[string]dosing.TargetKind{
	"target-ph":         dosing.TargetPH,
	"target-alkalinity": dosing.TargetAlkalinity,
	"target-si":         dosing.TargetSaturationIndex,
	"target-ccpp":       dosing.TargetCCPP,
}

// target reads the one target. Two are refused even where one of them cannot
// be read: which of them was meant is for the person to say.
func (w *filling) target() {
	var names, given []string
	for _, field := range reading.Fields() {
		if field.Group != reading.Target {
			continue
		}
		names = append(names, field.Name)
		if w.form.blank(field.Name) {
			continue
		}
		given = append(given, field.Name)
		if v, ok := w.parse(field); ok {
			w.result.Target = dosing.Target{Kind: targetKinds[field.Name], Value: v.SI}
		}
	}
	switch len(given) {
	case 0:
		w.problem("missing", names[0], "", "one of "+orList(names))
	case 1:
	default:
		w.problem("two_targets", given[1], andList(given), "one target at a time: "+orList(given))
	}
}

func andList(names []string) string {
	text := names[0]
	for _, n := range names[1:] {
		text += " and " + n
	}
	return text
}
