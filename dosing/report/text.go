package report

import (
	"fmt"
	"math"
	"strings"

	"beckline/dosing"
)

// textWidth is the longest line of the text, in columns.
const textWidth = 78

// Text returns the answer for people, in plain ASCII at most 78 columns wide:
// the pump setting or feed first, then the dose with its basis, the finished
// and the raw water, warnings, cautions, and how it was checked.
func (d Document) Text() string {
	var b strings.Builder
	doses := d.result.Doses()
	for i, s := range doses {
		if i > 0 {
			b.WriteByte('\n')
		}
		if d.batch != nil {
			d.writeBatch(&b)
		}
		if d.batch == nil || s.Feed.HasFlow {
			b.WriteString(answer(s, d.result.Case.Readings.Flow, len(doses) > 1))
		}
		b.WriteString(doseLines(s, d.targetWords()))
	}
	if len(doses) > 0 {
		b.WriteByte('\n')
	}
	d.writeTrust(&b)
	d.writeAdditions(&b)
	d.writeWaters(&b)
	d.writeWarnings(&b)
	d.writeCautions(&b)
	d.writeChecks(&b)
	d.writeWays(&b)
	if d.working != "" {
		b.WriteString("\nWORKED SHEET\n\n" + d.working)
	}
	return ASCII(b.String())
}

// targetWords is what the doses reach, "" where nothing was asked for.
func (d Document) targetWords() string {
	c := &d.result.Case
	switch {
	case c.Target.Kind == dosing.NoTarget:
		return ""
	case c.Second.Kind == dosing.NoTarget:
		return TargetText(c.Target)
	}
	return TargetText(c.Target) + " and " + TargetText(c.Second)
}

// answer is what to set, in the first line, then the same in other units. Where
// there are several pumps the first line says whose it is.
func answer(s *dosing.Station, flow dosing.Optional, several bool) string {
	figures := Dose(s)
	name := s.Addition.Product.Name
	var first string
	volumes := []string{find(figures, "feed_l_h").ShowUnit(), find(figures, "feed_ml_min").ShowUnit(),
		find(figures, "feed_gal_h").ShowUnit(), perDayGallons(figures)}
	masses := []string{perHour(figures), find(figures, "feed_kg_d").ShowUnit(), find(figures, "feed_lb_d").ShowUnit()}
	switch {
	case s.Feed.HasPump:
		of := ""
		if several {
			of = " of " + name
		}
		first = fmt.Sprintf("Set the pump%s to %s of its %s", of, find(figures, "pump_percent").ShowUnit(), pumpCapacity(s))
	case s.Feed.HasFlow && s.Feed.HasVolume:
		first = "Feed " + volumes[0] + " of " + name + "; with --pump the setting follows"
		volumes = volumes[1:]
	case s.Feed.HasFlow:
		first = "Feed " + masses[0] + " of " + name
		masses = masses[1:]
		if s.Addition.Feed.PumpCapacity.Given {
			first += "; a pump in L/h does not feed a " + formText(s.Addition.Product.Form)
		}
	default:
		first = "Feed " + find(figures, "product_mg_l").ShowUnit() + " of " + name + "; with --flow the feed rates follow"
	}
	lines := []string{first}
	if s.Feed.HasFlow && s.Feed.HasVolume {
		lines = append(lines, "  = "+strings.Join(volumes, " = "))
	}
	if s.Feed.HasFlow {
		lines = append(lines, "  = "+strings.Join(masses, " = ")+" of product as delivered",
			"  into "+flowText(flow)+" of water")
	}
	return strings.Join(lines, "\n") + "\n"
}

// doseLines states the dose on every basis that belongs to it.
func doseLines(s *dosing.Station, target string) string {
	var b strings.Builder
	figures := Dose(s)
	p := s.Addition.Product
	fmt.Fprintf(&b, "\nDose %s", doseText(figures))
	if target != "" {
		fmt.Fprintf(&b, " to reach %s", target)
	}
	fmt.Fprintf(&b, "\n  product: %s, %s", p.Title, p.StrengthText)
	if s.Feed.HasVolume && s.Feed.Density > 0 {
		// Both, since grams in a litre are easily taken for per cent by weight.
		fmt.Fprintf(&b, ", %.0f kg/m3 (%s g/L of %s)", s.Feed.Density,
			Significant(p.Strength*s.Feed.Density, 3), p.Chemical.Formula)
	}
	b.WriteByte('\n')
	if pure := find(figures, "pure_kg_d"); pure.Value.Given {
		fmt.Fprintf(&b, "  %s as %s\n", pure.ShowUnit(), Basis(p.Chemical))
	}
	return Wrap(b.String(), textWidth)
}

// doseText is a dose on its basis, as product, and on the trade's basis.
func doseText(figures []Figure) string {
	s := fmt.Sprintf("%s as %s = %s as product", find(figures, "dose_mg_l").ShowUnit(),
		find(figures, "basis").Text, find(figures, "product_mg_l").ShowUnit())
	if t := find(figures, "trade_dose_mg_l"); t.Value.Given {
		s += fmt.Sprintf(" = %s as %s", t.ShowUnit(), find(figures, "trade_basis").Text)
	}
	return s
}

func perHour(figures []Figure) string {
	n := find(figures, "feed_kg_d").Value
	if !n.Given {
		return "-"
	}
	return asFeed.write(n.Value/24) + " kg/h"
}

func perDayGallons(figures []Figure) string {
	n := find(figures, "feed_gal_h").Value
	if !n.Given {
		return "-"
	}
	return asFeed.write(n.Value*24) + " US gal/d"
}

func pumpCapacity(s *dosing.Station) string {
	return Significant(s.Addition.Feed.PumpCapacity.Value*litresPerM3*secondsPerHour, 3) + " L/h"
}

// writeAdditions lists the steps where there is more than the solved one.
func (d Document) writeAdditions(b *strings.Builder) {
	var lines []string
	for i, step := range d.steps() {
		lines = append(lines, Wrap(fmt.Sprintf("  %d. %s", i+1, step), textWidth))
	}
	if len(lines) > 0 {
		b.WriteString("Steps in order\n" + strings.Join(lines, "\n") + "\n\n")
	}
}

// steps says each step of the line in order, nothing where there is no more
// than what was solved for.
func (d Document) steps() []string {
	var lines []string
	other := false
	for _, step := range d.Stations {
		if step.Kind == "raw" {
			continue
		}
		other = other || !step.Solved
		lines = append(lines, fmt.Sprintf("%s, then pH %s", stepText(step), find(step.Water, "ph").Show()))
	}
	if !other {
		return nil
	}
	return lines
}

// stepText names a step, a feed with its dose.
func stepText(step Station) string {
	switch {
	case step.Dose == nil && step.Kind == "contactor":
		return "limestone contactor"
	case step.Dose == nil:
		return step.Kind
	}
	name := find(step.Dose, "product").Text
	if step.Solved {
		name += " (solved)"
	}
	return name + ": " + doseText(step.Dose)
}

// writeWaters sets the finished and the raw water side by side.
func (d Document) writeWaters(b *strings.Builder) {
	dosed := len(d.result.Stations) > 1
	if dosed {
		fmt.Fprintf(b, "%-22s%10s%10s\n", "Water", "finished", "raw")
	} else {
		b.WriteString("Water\n")
	}
	for i, f := range d.Raw {
		finished := d.Finished[i]
		shown := f.Show() != "-" || finished.Show() != "-"
		if !shown && f.Key != "saturation_index" && f.Key != "ccpp_mg_l_caco3" {
			continue // what nobody measured; the index and CCPP are told missing
		}
		line := fmt.Sprintf("  %-20s", f.Label)
		if f.IsText {
			line = fmt.Sprintf("    %-18s", strings.TrimPrefix(f.Label, "ionic strength "))
			if dosed {
				line += fmt.Sprintf("%20s", f.Show())
			} else {
				line += fmt.Sprintf("%12s", f.Show())
			}
		} else if dosed {
			line += fmt.Sprintf("%10s%10s", finished.Show(), f.Show())
		} else {
			line += fmt.Sprintf("%12s", f.Show())
		}
		if f.Unit != "" {
			line += "  " + f.Unit
		}
		b.WriteString(line + "\n")
	}
}

func (d Document) writeWarnings(b *strings.Builder) {
	if len(d.Warnings) == 0 {
		return
	}
	b.WriteString("\nWarnings\n")
	for _, w := range d.Warnings {
		b.WriteString(Wrap("  - "+w.Message, textWidth) + "\n")
	}
}

func (d Document) writeCautions(b *strings.Builder) {
	lines := d.CautionLines()
	if len(lines) == 0 {
		return
	}
	b.WriteString("\nCautions\n")
	for _, line := range lines {
		b.WriteString(Wrap("  "+line, textWidth) + "\n")
	}
}

// writeChecks says how the answer was checked, in one or two lines.
func (d Document) writeChecks(b *strings.Builder) {
	if len(d.Checks) == 0 {
		return
	}
	var parts []string
	for _, c := range d.Checks {
		name, unit := checkLabel(c.Name)
		if name == "" {
			continue
		}
		parts = append(parts, name+" by "+difference(c.Value.Value)+unit)
	}
	b.WriteString("\n" + Wrap("Checked: the water solved afresh by another route differs in "+
		strings.Join(parts, ", in ")+".", textWidth) + "\n")
}

func checkLabel(name string) (label, unit string) {
	switch name {
	case "closure_ph":
		return "pH", ""
	case "alkalinity_balance":
		return "alkalinity", " mg/L"
	case "carbon_balance":
		return "carbon", " mmol/L"
	case "hand_method", "forward_titration": // told by the ways
		return "", ""
	}
	return strings.ReplaceAll(name, "_", " "), ""
}

// difference writes how far two routes are apart, by its size alone. Rounding
// differs from machine to machine, so a difference below any meaning is not told
// from none.
func difference(v float64) string {
	if v = math.Abs(v); v < 1e-9 {
		return "less than 1e-9"
	}
	return fmt.Sprintf("%.0e", v)
}

// TargetText names a target with its value and unit.
func TargetText(t dosing.Target) string {
	switch t.Kind {
	case dosing.TargetAlkalinity:
		return targetFigure(t.Kind, t.Value*caco3PerEquivalent)
	case dosing.TargetCCPP:
		return targetFigure(t.Kind, t.Value*caco3PerMole)
	case dosing.TargetDIC:
		return targetFigure(t.Kind, t.Value*milli)
	}
	return targetFigure(t.Kind, t.Value)
}

// targetFigure names a value of a target's figure, in the unit of its key.
func targetFigure(kind dosing.TargetKind, v float64) string {
	switch kind {
	case dosing.TargetPH:
		return "pH " + Fixed(v, 2)
	case dosing.TargetAlkalinity:
		return "alkalinity " + asMass.write(v) + " mg/L as CaCO3"
	case dosing.TargetSaturationIndex:
		return "saturation index " + asIndex.write(v)
	case dosing.TargetCCPP:
		return "CCPP " + asCCPP.write(v) + " mg/L as CaCO3"
	case dosing.TargetDIC:
		return "inorganic carbon " + asFine.write(v) + " mmol/L"
	}
	return "-"
}
