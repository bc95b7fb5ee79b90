package feed

import (
	"math"
	"strings"
	"testing"
)

// Exact definitions: US gallon, avoirdupois pound and ounce, US fluid ounce.
const (
	gallon     = 3.785411784e-3 // m3
	millionGal = 1e6 * gallon
	day        = 86400.0
	pound      = 0.45359237 // kg
	ounce      = pound / 16
	fluidOunce = gallon / 128
	minute     = 60.0
	mgL        = 1e-3 // kg/m3
	cl2ToNaOCl = 74.442 / 70.906
	fToH2SiF6  = 144.09 / (6 * 18.998)
	lbPerGal   = pound / gallon // kg/m3
)

// poundFactor is what the sources lose with their rounded 8.34 lb in a million
// gallons at 1 mg/L, which is 8.3454 by the definitions of pound and gallon.
const poundFactor = 8.3454/8.34 - 1

// batch is a feed into a volume of water in m3, taken as that volume a second:
// kg/s and m3/s are then kg and m3.
func batch(t *testing.T, in Input, waterM3 float64) Rates {
	t.Helper()
	in.Flow = waterM3
	r, err := Compute(in)
	if err != nil {
		t.Fatal(err)
	}
	return r
}

// worked recomputes each published example with Compute; the key is the case,
// its inputs and its unit. The published answers, their tolerances and their
// sources stand in the file of check values.
var worked = map[string]func(t *testing.T) float64{
	"average chlorine dose|11 US gal of 0.5 % w/v NaOCl into 40000 US gal|mg/L": func(t *testing.T) float64 {
		w, err := SodiumHypochlorite.Fraction(5)
		if err != nil {
			t.Fatal(err)
		}
		// What 1 mg/L as chlorine takes tells what 11 gallons give.
		r := batch(t, Input{PureMass: mgL * cl2ToNaOCl, Strength: w, Form: Liquid, Density: SodiumHypochlorite}, 40000*gallon)
		return 11 * gallon / r.VolumePerSecond
	},
	"dry alum feed|flow 15 MGD; dose 18 mg/L|lb/day": func(t *testing.T) float64 {
		return dryAlum(t) / pound * day
	},
	"dry alum feed|flow 15 MGD; dose 18 mg/L|lb/h": func(t *testing.T) float64 {
		return dryAlum(t) / pound * 3600
	},
	"dry alum feed|flow 15 MGD; dose 18 mg/L|lb/min": func(t *testing.T) float64 {
		return dryAlum(t) / pound * minute
	},
	"tank disinfection solution|550 US gal at 200 mg/L; 12.5 % available by weight|lb": func(t *testing.T) float64 {
		return asHeavyAsWater(t).MassPerSecond / pound
	},
	"tank disinfection solution|550 US gal at 200 mg/L; 12.5 % available by weight; 8.34 lb/gal|US gal": func(t *testing.T) float64 {
		return asHeavyAsWater(t).VolumePerSecond / gallon
	},
	"disinfection dose, 45 % product|0.37 MG at 100 mg/L; 45 % strength|lb": func(t *testing.T) float64 {
		return batch(t, Input{PureMass: 100 * mgL, Strength: 0.45, Form: Solid}, 0.37*millionGal).MassPerSecond / pound
	},
	"alum feed, 15 % product|8 MGD at 90 mg/L; 15 %|lb/day": func(t *testing.T) float64 {
		return batch(t, Input{PureMass: 90 * mgL, Strength: 0.15, Form: Liquid, Density: LiquidAlum}, 8*millionGal/day).MassPerSecond / pound * day
	},
	"alum feed, 15 % product|8 MGD at 65 mg/L; 15 %|lb/day": func(t *testing.T) float64 {
		return batch(t, Input{PureMass: 65 * mgL, Strength: 0.15, Form: Liquid, Density: LiquidAlum}, 8*millionGal/day).MassPerSecond / pound * day
	},
	"volume from dose|20 lb chlorine gives 4 mg/L|MG": func(t *testing.T) float64 {
		return 20 / (batch(t, Input{PureMass: 4 * mgL, Strength: 1, Form: Gas}, millionGal).MassPerSecond / pound)
	},
	"tank dose|cylinder 40 ft diameter, 30 ft deep; 9 mg/L|lb": func(t *testing.T) float64 {
		foot := 0.3048
		return batch(t, Input{PureMass: 9 * mgL, Strength: 1, Form: Gas}, math.Pi/4*math.Pow(40*foot, 2)*30*foot).MassPerSecond / pound
	},
	"feed from flow|250 gpm; 21 mg/L|lb/day": func(t *testing.T) float64 {
		return batch(t, Input{PureMass: 21 * mgL, Strength: 1, Form: Solid}, 250*gallon/minute).MassPerSecond / pound * day
	},
	"load removed|1.2 MGD; 50 mg/L; 70 % removed|lb/day": func(t *testing.T) float64 {
		return batch(t, Input{PureMass: 0.70 * 50 * mgL, Strength: 1, Form: Solid}, 1.2*millionGal/day).MassPerSecond / pound * day
	},
	"hypochlorite feed|1.5 MGD; 2.5 mg/L|lb/day": func(t *testing.T) float64 {
		return byWeight(t).PurePerSecond / pound * day
	},
	"hypochlorite feed|1.5 MGD; 2.5 mg/L; 12.5 %; 10.2 lb/gal|US gal/day": func(t *testing.T) float64 {
		return byWeight(t).VolumePerSecond / gallon * day
	},
	"strength of a liquid|65 %; SG 1.21|lb/US gal":                                                    func(t *testing.T) float64 { return inOneGallon(t, 0.65, 1.21) },
	"strength of a liquid|30 % aluminium sulfate; SG 1.16|lb/US gal":                                  func(t *testing.T) float64 { return inOneGallon(t, 0.30, 1.16) },
	"strength of a liquid|12 %; SG 1.41 (not a real hypochlorite density: arithmetic only)|lb/US gal": func(t *testing.T) float64 { return inOneGallon(t, 0.12, 1.41) },

	"fluorosilicic acid feed for 1.0 mg/L in finished water|22 % H2SiF6; natural fluoride 0.1 mg/L|lb per MG": func(t *testing.T) float64 { return fluoride(t, 0.22) },
	"fluorosilicic acid feed for 1.0 mg/L in finished water|23 % H2SiF6; natural fluoride 0.1 mg/L|lb per MG": func(t *testing.T) float64 { return fluoride(t, 0.23) },
	"fluorosilicic acid feed for 1.0 mg/L in finished water|24 % H2SiF6; natural fluoride 0.1 mg/L|lb per MG": func(t *testing.T) float64 { return fluoride(t, 0.24) },
	"fluorosilicic acid feed for 1.0 mg/L in finished water|25 % H2SiF6; natural fluoride 0.1 mg/L|lb per MG": func(t *testing.T) float64 { return fluoride(t, 0.25) },
	"fluorosilicic acid feed for 1.0 mg/L in finished water|26 % H2SiF6; natural fluoride 0.1 mg/L|lb per MG": func(t *testing.T) float64 { return fluoride(t, 0.26) },
	"fluorosilicic acid feed for 1.0 mg/L in finished water|27 % H2SiF6; natural fluoride 0.1 mg/L|lb per MG": func(t *testing.T) float64 { return fluoride(t, 0.27) },
	"fluorosilicic acid feed for 1.0 mg/L in finished water|28 % H2SiF6; natural fluoride 0.1 mg/L|lb per MG": func(t *testing.T) float64 { return fluoride(t, 0.28) },

	"well chlorination, 12 trade % hypochlorite|casing 6 inch; 100 ft of water|US fl oz": func(t *testing.T) float64 {
		w, err := SodiumHypochlorite.Fraction(120 * cl2ToNaOCl)
		if err != nil {
			t.Fatal(err)
		}
		return batch(t, Input{PureMass: 50 * mgL * cl2ToNaOCl, Strength: w, Form: Liquid, Density: SodiumHypochlorite}, 146.9*gallon).VolumePerSecond / fluidOunce
	},
	// Volumes of the wells from the same table.
	"well chlorination, 65 % calcium hypochlorite|casing 6 inch; 100 ft of water|oz":  func(t *testing.T) float64 { return well(t, 146.9) },
	"well chlorination, 65 % calcium hypochlorite|casing 8 inch; 100 ft of water|oz":  func(t *testing.T) float64 { return well(t, 261.1) },
	"well chlorination, 65 % calcium hypochlorite|casing 10 inch; 100 ft of water|oz": func(t *testing.T) float64 { return well(t, 408) },
	"well chlorination, 65 % calcium hypochlorite|casing 12 inch; 100 ft of water|oz": func(t *testing.T) float64 { return well(t, 587.5) },
	"batch chlorination|3000 US gal; 7 mg/L; 70 % available|lb": func(t *testing.T) float64 {
		return batch(t, Input{PureMass: 7 * mgL, Strength: 0.70, Form: Solid}, 3000*gallon).MassPerSecond / pound
	},
	"alum stock dilution|10.0 L wanted at 64.7 g/L as Al2(SO4)3.14H2O|g": func(t *testing.T) float64 {
		return batch(t, Input{PureMass: 64.7, Strength: 1, Form: Solid}, 0.010).MassPerSecond * 1000
	},
	"factor|1 mg/L in 1 US MG|lb": func(t *testing.T) float64 {
		return batch(t, Input{PureMass: mgL, Strength: 1, Form: Solid}, millionGal).MassPerSecond / pound
	},
}

// notAFeed lists the published sums that are no feed, by case, with the reason.
var notAFeed = map[string]string{
	"product cost":                      "money",
	"alum saving":                       "money",
	"well volume":                       "geometry of a casing",
	"batch chlorination|3000 US gal|lb": "weight of the water itself",
	"batch chlorination|demand 2 mg/L; residual wanted 5 mg/L|mg/L": "a sum of two doses",
	"factor|1 US gal/day|mL/min":                                    "a unit of volume rate, no feed in it",
	"factor|1 lb/day|g/min":                                         "a unit of mass rate, no feed in it",
}

func dryAlum(t *testing.T) float64 {
	return batch(t, Input{PureMass: 18 * mgL, Strength: 1, Form: Solid}, 15*millionGal/day).MassPerSecond
}

// asHeavyAsWater is the source's own simplification of hypochlorite.
func asHeavyAsWater(t *testing.T) Rates {
	return batch(t, Input{PureMass: 200 * mgL, Strength: 0.125, Form: Liquid, Density: SodiumHypochlorite, KgPerM3: 8.34 * lbPerGal}, 550*gallon)
}

func byWeight(t *testing.T) Rates {
	return batch(t, Input{PureMass: 2.5 * mgL, Strength: 0.125, Form: Liquid, KgPerM3: 10.2 * lbPerGal}, 1.5*millionGal/day)
}

// inOneGallon is the pure substance in a gallon of product, lb: the sources take
// specific gravity 1 as 8.34 lb/gal.
func inOneGallon(t *testing.T, strength, gravity float64) float64 {
	r := batch(t, Input{PureMass: mgL, Strength: strength, Form: Liquid, KgPerM3: gravity * 8.34 * lbPerGal}, 1)
	return r.PurePerSecond / pound / (r.VolumePerSecond / gallon)
}

func fluoride(t *testing.T, strength float64) float64 {
	return batch(t, Input{PureMass: 0.9 * mgL * fToH2SiF6, Strength: strength, Form: Liquid, Density: FluorosilicicAcid}, millionGal).MassPerSecond / pound
}

func well(t *testing.T, gallons float64) float64 {
	return batch(t, Input{PureMass: 50 * mgL, Strength: 0.65, Form: Solid}, gallons*gallon).MassPerSecond / ounce
}

func TestPublishedFeedSums(t *testing.T) {
	unused := map[string]bool{}
	for key := range worked {
		unused[key] = true
	}
	for _, row := range published(t, "feed.csv") {
		key := row["case"] + "|" + row["inputs"] + "|" + row["unit"]
		if notAFeed[key] != "" || notAFeed[row["case"]] != "" {
			continue
		}
		sum, ok := worked[key]
		if !ok {
			t.Errorf("%s: neither recomputed nor listed as no feed", key)
			continue
		}
		delete(unused, key)
		want, tolerance := number(t, row["published_answer"]), number(t, row["tolerance_rel"])
		if strings.HasPrefix(row["unit"], "lb") {
			tolerance += poundFactor
		}
		if got := sum(t); apart(got, want, tolerance) {
			t.Errorf("%s: got %.6g, published %g within %g\n%s (%s)", key, got, want, tolerance, row["source"], row["how"])
		}
	}
	for key := range unused {
		t.Errorf("%s: no published row of that name", key)
	}
}
