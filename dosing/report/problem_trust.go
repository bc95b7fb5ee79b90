package report

import "maps"

func init() { maps.Copy(reasons, trustReasons) }

// trustReasons are the words of margins, jars, a running plant and the feed
// equipment.
var trustReasons = map[string]string{
	// tolerances, benches, pumps and tanks
	"tolerance_form":            "is not a tolerance of a reading",
	"unknown_reading":           "is not a reading that can have a tolerance",
	"bad_tolerance":             "is a half-width that cannot be used",
	"bad_draws":                 "is a number of draws that is not accepted",
	"tolerance_without_reading": "is the tolerance of a reading that was not given or is not used",
	"no_tolerance":              "leaves no reading to vary",
	"too_few_points":            "are too few readings for what is to be found",
	"unknown_twice":             "is to be found twice",
	"unknown_unknown":           "is not a figure that a jar can tell",
	"cannot_tell_apart":         "cannot be told apart by this jar",
	"outside_model":             "is outside what the model covers",
	"pairs_incomplete":          "do not pair",
	"point_form":                "is not a reading of a jar",
	"draw_form":                 "is not a drawdown",
	"one_of_two":                "is one too many or one too few of two",
	"too_many_steps":            "would need over a hundred steps",
	"unknown_cause":             "is not a cause that was weighed",
	"cause_out_of_reach":        "leaves the target out of reach",
	"not_a_liquid":              "is not a liquid with a density table",
	"density_outside_table":     "is a density that the product's table does not reach",
	"date_form":                 "is not a date and time",
	"column_not_filled":         "has an empty cell where a number is needed",
	"working_failed":            "a line of the worked sheet did not give the number of the answer, which is not given",
	"titration_failed":          "the titration step by step never met the target, so the answer is not given",
}
