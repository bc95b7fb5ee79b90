package report

import (
	"fmt"

	"beckline/dosing"
	"beckline/dosing/feed"
)

var (
	asRate   = rounding{decimals: 4, significant: 4, never0: true}
	asShare  = rounding{decimals: 2, significant: 3}
	asVolume = rounding{decimals: 3, significant: 4}
	asTime   = rounding{decimals: 1, significant: 4}
)

// Drawdown is what is said of a pump that was drawn down.
type Drawdown struct {
	Calibration *feed.Calibration
	Stroke      float64         // share at which it is set
	Step        float64         // one step of the speed, a share
	Wanted      dosing.Optional // m3/s
	Setting     feed.Setting    // for Wanted
	Resolution  feed.Resolution // of one step there
	Result      *dosing.Result  // of the water that is dosed, nil where it is not known
	PHPerStep   dosing.Optional
	Product     dosing.Product // zero where not known
}

// DrawdownSheet is the answer of a pump's calibration.
func DrawdownSheet(in Drawdown) (Sheet, error) {
	c := in.Calibration
	s := Sheet{Name: "drawdown"}
	s.Warn("pump", c.Codes...)
	least, most, ratio, err := c.Range(in.Stroke)
	if err != nil {
		return s, err
	}
	line := fmt.Sprintf("The pump gives %s + %s x stroke x speed", litresPerHour(c.Zero), litresPerHour(c.Slope))
	if in.Wanted.Given {
		set := in.Setting
		s.Head = append(s.Head, fmt.Sprintf("Set the speed to %s %% at %s %% stroke for %s",
			Significant(set.Rounded*100, 3), Significant(in.Stroke*100, 3), litresPerHour(in.Wanted.Value)))
		s.Warn("pump", set.Codes...)
	}
	s.Head = append(s.Head, line)
	s.Figures = []Figure{
		number("output_full_l_h", "full output", "L/h", perHourLitres(c.Zero+c.Slope), asRate),
		number("zero_l_h", "", "L/h", perHourLitres(c.Zero), asRate),
		number("slope_l_h", "", "L/h", perHourLitres(c.Slope), asRate),
		number("scatter_l_h", "scatter of a draw (standard deviation)", "L/h", perHourLitres(c.Scatter), asRate),
		number("repeatability_percent", "draws at one setting (st. deviation)", "%", onlyIf(c.HasRepeats, c.Repeatability*100), asShare),
		number("linearity_percent", "furthest setting off the line, of full", "%", Some(c.Linearity*100), asShare),
		number("stroke_percent", "at a stroke of", "%", Some(in.Stroke*100), asShare),
		number("least_l_h", "steady from", "L/h", perHourLitres(least), asRate),
		number("most_l_h", "to", "L/h", perHourLitres(most), asRate),
		number("turndown", "turndown", "to 1", Some(ratio), asShare),
	}
	set := in.Setting
	w := in.Wanted.Given
	s.Figures = append(s.Figures,
		number("wanted_l_h", "feed wanted", "L/h", onlyIf(w, in.Wanted.Value*litresPerM3*secondsPerHour), asRate),
		number("speed_percent", "speed, exactly", "%", onlyIf(w, set.Speed*100), asShare),
		number("set_percent", "speed, on the pump's own steps", "%", onlyIf(w, set.Rounded*100), asShare),
		number("output_l_h", "gives", "L/h", onlyIf(w, set.Output*litresPerM3*secondsPerHour), asRate),
		number("off_percent", "off the feed wanted by", "%", onlyIf(w, set.Off*100), rounding{decimals: 2, significant: 2, signed: true}),
		number("step_l_h", "one step of the speed changes the feed by", "L/h", onlyIf(w && in.Resolution.Rate > 0, in.Resolution.Rate*litresPerM3*secondsPerHour), asRate),
		number("step_feed_percent", "which is, of the feed", "%", onlyIf(w && in.Resolution.Rate > 0, in.Resolution.Share*100), asShare),
		number("step_ph", "and moves the finished pH by", "", scaled(in.PHPerStep, 1), rounding{decimals: 3, significant: 2, signed: true, never0: true}),
	)
	table := SheetTable{Key: "draws", Title: "Draws"}
	for _, d := range c.Draws {
		table.Rows = append(table.Rows, []Figure{
			number("stroke_percent", "stroke", "%", Some(d.Stroke*100), asShare),
			number("speed_percent", "speed", "%", Some(d.Speed*100), asShare),
			number("volume_ml", "volume", "mL", Some(d.Volume*1e6), asVolume),
			number("seconds", "time", "s", Some(d.Seconds), asTime),
			number("measured_l_h", "measured", "L/h", perHourLitres(d.Measured), asRate),
			number("line_l_h", "line", "L/h", perHourLitres(d.Line), asRate),
		})
	}
	s.Tables = []SheetTable{table}
	if in.PHPerStep.Given && abs(in.PHPerStep.Value) > coarseStep {
		s.Warnings = append(s.Warnings, Notice{"pump_step_coarse", "pump", fmt.Sprintf(
			"one step of the pump moves the finished pH by %s: dilute the product or use a smaller pump", Fixed(abs(in.PHPerStep.Value), 2))})
	}
	s.Handle(in.Product.Caution)
	return s, nil
}

// coarseStep is the pH by which one step of a pump should not move the finished
// water (common practice, no source): the accuracy of a meter.
const coarseStep = 0.1

func abs(v float64) float64 { return max(v, -v) }

// onlyIf is a number that is there on a condition.
func onlyIf(there bool, v float64) Number {
	if !there {
		return Number{}
	}
	return Some(v)
}
