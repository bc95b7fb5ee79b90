package report

import (
	"maps"
	"slices"
)

func init() { maps.Copy(reasons, trainReasons) }

// trainReasons are the words of blends, curves, mixes, plants and benches.
var trainReasons = map[string]string{
	// two products, blends and tanks
	"same_product":       "is the same product twice: two doses need two products",
	"blend_out_of_reach": "cannot be reached by any share of these two waters",
	"tank_of_two":        "is for one product and one target",
	// curves
	"curve_points":    "is a number of points that makes no curve",
	"curve_empty":     "has no answer anywhere along the curve",
	"curve_of_blend":  "is that of one water, and this is a blend",
	"different_axes":  "doses of different chemicals do not share an axis",
	"cannot_be_drawn": "cannot be drawn",
	"not_with_dose":   "is not for a titration curve",
	"unknown_word":    "is none of the words that stand here",
	// mixes
	"no_mix":               "stands in the way: no mix of these products keeps to all limits",
	"bad_limit":            "is not a limit that can be read",
	"limit_crossed":        "has its low end above its high end",
	"limit_twice":          "has two ranges",
	"no_price":             "has no price, so it is not among what may be dosed",
	"too_many_products":    "are too many products for one mix",
	"target_twice":         "is the same figure twice: two targets need two figures",
	"dose_range_crossed":   "has a least dose above its ceiling",
	"product_twice":        "is among the products twice",
	"target_beside_limits": "is a target, and a mix has limits instead",
	"fixed_dose_needed":    "needs a dose ahead of a mix",
	"unknown_quantity":     "is no figure that a limit can be of",
	// plants
	"no_plant_file":       "is for a plant file, and there is none",
	"unknown_line":        "is not a line of the plant file",
	"plant_limit":         "is outside what the plant allows of its finished water",
	"outside_plant_limit": "is outside what the plant takes as a reading",
	// benches and small files
	"given_too_often":          "is given too often",
	"file_too_large":           "is too large to be read whole",
	"readings_out_of_order":    "is out of order",
	"end_point":                "is not an end point of this method",
	"end_point_step":           "is not 0.30 pH below the first end point",
	"p_above_total":            "is above the total alkalinity",
	"p_below_ph":               "cannot be at this pH",
	"p_contradicts_alkalinity": "contradicts the total alkalinity",
	"mineral_acidity":          "leaves no alkalinity at all",
	"not_straight":             "make no straight line",
	"no_ions":                  "has nothing to be compared with",
}

// plantFileCodes are the mistakes of a plant file, whose sentence is made where
// the file is read.
var plantFileCodes = []string{"plant_file_unreadable", "plant_file_too_large", "plant_file_syntax", "unknown_key", "wrong_kind",
	"unknown_name", "missing_key", "bad_band", "wider_than_allowed", "bad_name", "newer_format", "contradicting_keys"}

func plantFileCode(code string) bool { return slices.Contains(plantFileCodes, code) }
