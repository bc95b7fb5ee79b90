package report

import (
	"beckline/dosing"
	"beckline/dosing/feed"
)

// equipment holds one sentence a code of pumps, tanks, deliveries and dilutions;
// codes that a dose can have too are in the table of warnings.
var equipment = map[string]string{
	feed.CodeDrawdownShort:   "a draw took under 20 s, so the stopwatch is its largest error; draw for longer",
	feed.CodeRepeatsApart:    "draws at one setting are over 3 % apart: air, a worn valve or a suction that draws poorly",
	feed.CodeNotLinear:       "a setting lies over 5 % of full output off the line: draw that setting again",
	feed.CodeNotThroughZero:  "the line does not go through zero: the knob's scale is shifted, so go by this line and not by proportion",
	feed.CodeStrokeUneven:    "output does not go with the stroke: calibrate at the stroke that is used",
	feed.CodeOneSetting:      "all draws are at one setting: a straight line through zero was assumed",
	feed.CodeBeyondDrawn:     "the setting lies outside of what was drawn: draw it down before it is trusted",
	feed.CodeOutputDropped:   "the pump gives over 10 % less than at its last calibration: air lock, worn valve, scale or crystals",
	feed.CodeStrokeOrSpeedAt: "a knob stands below 10 % of its travel, where output is least certain",

	feed.CodeDilutionHeats:   "it warms as it is mixed: add slowly, with stirring, and let it cool",
	feed.CodeDilutionHot:     "it may pass 50 C: in portions, with cooling, in a vessel that bears it",
	feed.CodeDilutionBoils:   "it may pass 90 C and boil or spit: not in one go",
	feed.CodeDilutionFreezes: "the made strength may freeze or crystallise at this temperature",
	feed.CodeProductToWater:  "always the product into the water, never the water into the product",
	feed.CodeScaleWithWater:  "a base makes scale of hard water: thin it with softened water",

	feed.CodeDayTankLarge:    "the day tank holds more than 30 h of feed; the usual limit for a day tank is that (Recommended Standards for Water Works, from memory)",
	feed.CodeTankBelowHeel:   "nothing is left that the pump can take: it draws air",
	feed.CodeLoadDoesNotFit:  "STOP: the load does not fit into the free space",
	feed.CodeStorageUnder30:  "the store holds under 30 days of feed (Wis. Admin. Code NR 811)",
	feed.CodeStorageUnder1p5: "the store holds under one and a half deliveries (Wis. Admin. Code NR 811)",
	feed.CodeDensityOff:      "STOP: the density is not that of the product and strength on the delivery note; do not unload",
	feed.CodeStoreOverFull:   "more is said to be in the tank than its fill mark allows",
	feed.CodeAskStrengths:    "two strengths have this density: a titration must tell which",
}

func equipmentSentence(code string) string {
	if s, ok := equipment[code]; ok {
		return s
	}
	return Sentence(dosing.Warning{Code: code})
}

// FeedProblem turns a refusal of the feed room into a problem with its numbers
// in plain units.
func FeedProblem(err error) *dosing.Problem {
	switch e := err.(type) {
	case *dosing.Problem:
		return e
	case *feed.BadInput:
		p := &dosing.Problem{Kind: dosing.BadInput, Code: "outside_range", Field: e.Field,
			Given: plain(e.Field, e.Value), Accepted: feedAccepted(e)}
		if e.Value == 0 {
			p.Code, p.Given = "missing", ""
		}
		return p
	case *feed.OutOfTable:
		return &dosing.Problem{Kind: dosing.BadInput, Code: "density_outside_table", Field: "gravity",
			Accepted: "a density of " + string(e.Density) + " up to " + Significant(e.High*100, 3) + " % by weight"}
	case *feed.TooSmall:
		return &dosing.Problem{Kind: dosing.NoAnswer, Code: "pump_too_small", Field: "pump", Value: dosing.Some(e.Fraction),
			Accepted: "at most " + litresPerHour(e.Capacity) + " at full speed; a longer stroke, a larger pump, a stronger product"}
	}
	return &dosing.Problem{Kind: dosing.Failed, Code: "failed", Given: err.Error()}
}

// plain writes a value of a field of the feed room in a unit that people use.
func plain(field string, v float64) string {
	switch field {
	case "density":
		return Significant(v, 4) + " kg/m3"
	case "product-temperature", "water-temperature":
		return Fixed(celsius(v), 1) + " C"
	case "strength", "stroke", "speed", "step":
		return Significant(v*100, 4) + " %"
	case "feed":
		return litresPerHour(v)
	}
	return Significant(v, 4)
}

// feedAccepted is what a refusal of the feed room would accept.
func feedAccepted(e *feed.BadInput) string {
	switch e.Field {
	case "drawdowns":
		return "draws whose output rises with the setting"
	case "drawdown":
		return "a volume and a time above 0"
	case "load":
		return "the volume or the mass of the load, one of them, above 0"
	case "make":
		return "--make or --use, one of them, above 0"
	case "tank":
		return "volumes of 0 or more"
	}
	if e.High > 1e300 {
		return "above " + plain(e.Field, e.Low)
	}
	return plain(e.Field, e.Low) + " to " + plain(e.Field, e.High)
}

func litresPerHour(v float64) string {
	return Significant(v*litresPerM3*secondsPerHour, 3) + " L/h"
}

func litres(v float64) Number { return Some(v * litresPerM3) }

func perHourLitres(v float64) Number { return Some(v * litresPerM3 * secondsPerHour) }
