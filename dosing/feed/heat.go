package feed

// heats lists the products whose dilution warms enough to hurt, with or without
// a number here.
var heats = map[Density]bool{
	SodiumHydroxide: true, PotassiumHydroxide: true, SulfuricAcid: true, HydrochloricAcid: true,
	NitricAcid: true, PhosphoricAcid: true, AquaAmmonia: true, FluorosilicicAcid: true,
}

// Heat is what a dilution gives off.
type Heat struct {
	Known bool // false: it may heat all the same, and no number is known here
	// AtLeast marks figures that are a lower bound: the product is stronger than
	// the table, and its first dilution gives off more than is counted. Show them
	// only as "more than".
	AtLeast     bool
	JoulePerKg  float64 // of the weaker solution
	Rise        float64 // K if nothing is lost, good to about a tenth
	FinalKelvin float64 // K, from the temperatures of product and water; 0 where not Known
	Source      string
}

// enthalpy is the integral heat of solution at 25 C, kJ per mol, in so many mol
// of water per mol.
type enthalpy struct{ water, kilojoule float64 }

const heatTable = "integral heats of solution at 25 C (NBS Circular 500 / Felder & Rousseau, Elementary Principles of Chemical Processes, table B.11), from memory"

var (
	// From solid NaOH; three waters are 42.5 % by weight, the strongest known here.
	causticHeat = []enthalpy{{3, -28.87}, {4, -34.43}, {5, -37.74}, {10, -42.51}, {20, -42.84}, {30, -42.72}, {40, -42.59},
		{50, -42.51}, {100, -42.34}, {200, -42.26}, {500, -42.38}, {1000, -42.47}}
	// From pure liquid H2SO4.
	sulfuricHeat = []enthalpy{{0, 0}, {0.5, -15.73}, {1, -28.07}, {1.5, -36.90}, {2, -41.92}, {3, -48.99}, {4, -54.06}, {5, -58.03},
		{10, -67.03}, {25, -72.30}, {50, -73.34}, {100, -73.97}, {500, -76.73}, {1000, -78.57}}
)

// heatCapacity by strength, kJ/(kg K), near 20 to 40 C, good to about 5 %.
type heatCapacity struct{ strength, value float64 }

const waterCapacity = 4.18

const capacityTable = "heat capacities after Perry's Chemical Engineers' Handbook, from memory, to about 5 %"

var (
	causticCapacity  = []heatCapacity{{0, waterCapacity}, {0.10, 3.77}, {0.20, 3.60}, {0.30, 3.50}, {0.40, 3.40}, {0.50, 3.22}, {0.52, 3.2}}
	sulfuricCapacity = []heatCapacity{{0, waterCapacity}, {0.10, 3.84}, {0.20, 3.47}, {0.30, 3.14}, {0.40, 2.84}, {0.50, 2.53}, {0.60, 2.24},
		{0.70, 2.0}, {0.80, 1.85}, {0.90, 1.63}, {0.93, 1.55}, {0.98, 1.43}, {1, 1.40}}
)

const (
	gramsNaOH  = 39.997
	gramsH2SO4 = 98.079
	gramsH2O   = 18.015
)

// heat is the difference of the integral heats of solution before and after, and
// the rise that it makes of the two temperatures put together.
func (in Dilution) heat(d *Diluted) Heat {
	var table []enthalpy
	var capacity []heatCapacity
	var grams float64
	switch in.Product {
	case SodiumHydroxide:
		table, capacity, grams = causticHeat, causticCapacity, gramsNaOH
	case SulfuricAcid:
		table, capacity, grams = sulfuricHeat, sulfuricCapacity, gramsH2SO4
	default:
		return Heat{}
	}
	before, under := solution(table, in.From, grams)
	after, underToo := solution(table, in.To, grams)
	if underToo {
		return Heat{} // all of it beyond the table
	}
	h := Heat{Known: true, AtLeast: under, Source: heatTable + "; " + capacityTable}
	kilojoule := (before - after) * d.ProductMass * in.From / grams * 1000
	h.JoulePerKg = kilojoule * 1000 / d.Mass
	made := capacityAt(capacity, in.To)
	h.Rise = kilojoule / (d.Mass * made)
	product := d.ProductMass * capacityAt(capacity, in.From)
	water := d.WaterMass * waterCapacity
	h.FinalKelvin = (product*in.ProductKelvin+water*in.WaterKelvin)/(product+water) + h.Rise
	return h
}

// solution is the integral heat at a strength, kJ/mol; beyond tells that there is
// less water than in the table's first row, whose value then stands. Between
// rows the line is straight in n/(n + 1.8), the form of Thomsen's formula for
// sulfuric acid, in which the curve hardly bends.
func solution(table []enthalpy, strength, grams float64) (value float64, beyond bool) {
	n := (1 - strength) / strength * grams / gramsH2O
	if n < table[0].water {
		return table[0].kilojoule, true
	}
	bent := func(n float64) float64 { return n / (n + 1.8) }
	for i := 1; i < len(table); i++ {
		if a, b := table[i-1], table[i]; n <= b.water {
			share := (bent(n) - bent(a.water)) / (bent(b.water) - bent(a.water))
			return a.kilojoule + share*(b.kilojoule-a.kilojoule), false
		}
	}
	return table[len(table)-1].kilojoule, false // so thin that no more is given off
}

func capacityAt(table []heatCapacity, strength float64) float64 {
	for i := 1; i < len(table); i++ {
		if a, b := table[i-1], table[i]; strength <= b.strength {
			return a.value + (b.value-a.value)*(strength-a.strength)/(b.strength-a.strength)
		}
	}
	return table[len(table)-1].value
}
