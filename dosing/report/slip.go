package report

import (
	"fmt"
	"strings"
	"time"

	"beckline/dosing"
)

// Widths, in columns, of the slip and of the line for the shift log.
const (
	slipWidth = 72
	logWidth  = 78
)

// slipWaters are the figures of the waters on the slip, in order.
var slipWaters = []string{"ph", "alkalinity_mg_l_caco3", "temperature_c", "dic_mmol_l",
	"saturation_index", "ccpp_mg_l_caco3", "calcium_mg_l"}

// Slip returns the answer as a plain ASCII slip of at most 72 columns for
// copying by hand or mouse. The lines down to the waters are always the same,
// with "-" for what is not known, and the steps in order where more is fed than
// what was solved for; warnings and cautions follow.
func (d Document) Slip() string {
	var b strings.Builder
	line := func(label, text string) {
		b.WriteString(wrapLine(fmt.Sprintf("%-10s %s", label, text), slipWidth) + "\n")
	}
	b.WriteString(strings.Repeat("-", slipWidth) + "\n")
	doses := d.result.Doses()
	if len(doses) == 0 {
		doses = []*dosing.Station{nil}
	}
	for i, s := range doses {
		if i > 0 {
			line("and", "")
		}
		slipDose(line, s)
	}
	for i, step := range d.steps() {
		line(fmt.Sprintf("step %d", i+1), step)
	}
	line("target", orDash(d.targetWords()))
	line("flow", flowText(d.result.Case.Readings.Flow))
	fmt.Fprintf(&b, "%-24s%10s%10s\n", "water", "finished", "raw")
	for _, key := range slipWaters {
		raw, finished := find(d.Raw, key), find(d.Finished, key)
		fmt.Fprintf(&b, "%s\n", strings.TrimRight(fmt.Sprintf("  %-22s%10s%10s  %s",
			raw.Label, finished.Show(), raw.Show(), raw.Unit), " "))
	}
	if trust := d.TrustLine(); trust != "" {
		line("trust", trust)
	}
	line("warnings", orNone(strings.ReplaceAll(d.WarningCodes(), ";", ", ")))
	for _, c := range d.CautionLines() {
		b.WriteString(wrapLine("! "+c, slipWidth) + "\n")
	}
	b.WriteString(strings.Repeat("-", slipWidth) + "\n")
	return ASCII(b.String())
}

// slipDose is the part of the slip about one dose; nil is none.
func slipDose(line func(label, text string), s *dosing.Station) {
	pump, feed, mass, dose, product, pure := "-", "-", "-", "-", "-", "-"
	if s != nil {
		f := Dose(s)
		if s.Feed.HasPump {
			pump = find(f, "pump_percent").ShowUnit() + " of " + pumpCapacity(s)
		}
		if s.Feed.HasFlow && s.Feed.HasVolume {
			feed = joinUnits(f, "feed_l_h", "feed_ml_min", "feed_gal_h")
		}
		if s.Feed.HasFlow {
			mass = perHour(f) + " = " + joinUnits(f, "feed_kg_d", "feed_lb_d")
			pure = find(f, "pure_kg_d").ShowUnit() + " as " + find(f, "basis").Text
		}
		dose = doseText(f)
		product = s.Addition.Product.Name + ", " + s.Addition.Product.StrengthText
	}
	line("pump", pump)
	line("feed", feed)
	line("product", product)
	line("by mass", mass)
	line("pure", pure)
	line("dose", dose)
}

func orDash(s string) string {
	if s == "" {
		return "-"
	}
	return s
}

// LogLine returns one ASCII line of at most 78 columns for the shift log: date
// and time as the caller gives them, product, dose, feed, pump, pH before and
// after. Where it would be too long, the pump and then the feed are left out.
func (d Document) LogLine(when time.Time) string {
	start := when.Format("2006-01-02 15:04")
	raw, finished := find(d.Raw, "ph").Show(), find(d.Finished, "ph").Show()
	s := d.result.Dose()
	if s == nil {
		return ASCII(fmt.Sprintf("%s no dose, pH %s, alkalinity %s", start, raw,
			find(d.Raw, "alkalinity_mg_l_caco3").ShowUnit()))
	}
	f := Dose(s)
	feed, pump := "feed -", "pump -"
	switch {
	case s.Feed.HasFlow && s.Feed.HasVolume:
		feed = find(f, "feed_l_h").ShowUnit()
	case s.Feed.HasFlow:
		feed = perHour(f)
	}
	if s.Feed.HasPump {
		pump = "pump " + find(f, "pump_percent").ShowUnit()
	}
	parts := []string{start, s.Addition.Product.Name, find(f, "dose_mg_l").ShowUnit() + " pure", feed, pump,
		"pH " + raw + " > " + finished}
	for _, other := range d.result.Doses()[1:] { // with two doses one alone would mislead
		parts[1] += " " + parts[2] + " +"
		parts[1] += " " + other.Addition.Product.Name
		parts[2] = find(Dose(other), "dose_mg_l").ShowUnit() + " pure"
	}
	if n := len(d.steps()) - len(d.result.Doses()); n > 0 {
		// The dose alone would mislead whoever repeats it.
		parts[1] = fmt.Sprintf("with %d more fed, %s", n, parts[1])
	}
	for _, leaveOut := range []int{4, 3} {
		if len(strings.Join(parts, " ")) <= logWidth {
			break
		}
		parts = append(parts[:leaveOut:leaveOut], parts[leaveOut+1:]...)
	}
	return ASCII(strings.Join(parts, " "))
}

func joinUnits(figures []Figure, keys ...string) string {
	var parts []string
	for _, key := range keys {
		parts = append(parts, find(figures, key).ShowUnit())
	}
	return strings.Join(parts, " = ")
}

// flowText shows a flow in both of the trade's usual units, since a slip of
// unit here is a slip of dose.
func flowText(flow dosing.Optional) string {
	if !flow.Given {
		return "-"
	}
	perHour := flow.Value * secondsPerHour
	return fmt.Sprintf("%s m3/h = %s US MGD", Significant(perHour, 4), Significant(perHour*24/m3PerMegagallon, 3))
}

func orNone(s string) string {
	if s == "" {
		return "none"
	}
	return s
}
