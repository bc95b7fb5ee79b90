package feed

import "math"

// Strength is what a density tells.
type Strength struct {
	Strength      float64   // kg/kg, the least with this density
	Others        []float64 // further strengths of the same density, rising; where there are any the density does not tell which
	AtTemperature bool      // false: the table of 20 C was used for want of another
	PerKgM3       float64   // change of the strength, kg/kg, for 1 kg/m3 more: how sharp the hydrometer must be
	Source        string
	Codes         []string
}

// Specific gravity is stated against water of 4 C, 15.6 C (60 F) or 20 C; kg/m3.
const (
	WaterAt4C  = 999.97 // from memory
	WaterAt60F = 999.01 // from memory
	WaterAt20C = 998.2  // from memory
)

// hydrometer is how near, kg/m3, a density must be to the end of a table to be
// taken as it: half the last figure of a hydrometer.
const hydrometer = 0.5

// StrengthAt finds the strength, kg/kg, of a product of this table from a density
// in kg/m3 (specific gravity times that of its water) measured at K. Where the
// density passes a maximum (sulfuric acid near 98 %) more than one strength fits.
// Errors: *BadInput for a density or temperature that no product has;
// *OutOfTable, its Strength NaN, where the table does not reach the density.
func (d Density) StrengthAt(kgPerM3, kelvin float64) (Strength, error) {
	if !(kgPerM3 >= leastDensity && kgPerM3 <= greatestDensity) {
		return Strength{}, &BadInput{Field: "density", Value: kgPerM3, Low: leastDensity, High: greatestDensity}
	}
	if kelvin == 0 {
		kelvin = referenceKelvin
	}
	if !(kelvin >= leastKelvin && kelvin <= greatestKelvin) {
		return Strength{}, &BadInput{Field: "product-temperature", Value: kelvin, Low: leastKelvin, High: greatestKelvin}
	}
	rows := d.Rows()
	var s Strength
	var found []float64
	const pieces = 20 // between two rows: the warm table bends a little there
	last, lastAt := math.NaN(), 0.0
	nearest, nearestAt := math.Inf(1), 0.0
	top := d.Greatest()
	for i := range rows {
		from := rows[i].Strength
		to := top
		if i+1 < len(rows) {
			to = rows[i+1].Strength
		}
		for j := range pieces + 1 {
			w := from + (to-from)*float64(j)/pieces
			at, err := d.atTemperature(w, kelvin)
			if err != nil {
				continue
			}
			v := at.KgPerM3 - kgPerM3
			if math.Abs(v) < nearest {
				nearest, nearestAt = math.Abs(v), w
				s.AtTemperature, s.Source = at.AtTemperature, at.Source
			}
			if v == 0 || last*v < 0 {
				root := w
				if v != 0 {
					root = lastAt + (w-lastAt)*last/(last-v)
				}
				if len(found) == 0 && w > lastAt {
					s.PerKgM3 = (w - lastAt) / (v - last)
				}
				if n := len(found); n == 0 || root > found[n-1]+1e-9 {
					found = append(found, root)
				}
			}
			last, lastAt = v, w
		}
	}
	if len(found) == 0 && nearest <= hydrometer {
		found = append(found, nearestAt) // at the end or the top of the table
	}
	if len(found) == 0 {
		return Strength{}, &OutOfTable{Density: d, Strength: math.NaN(), High: d.Greatest()}
	}
	s.Strength, s.Others = found[0], found[1:]
	if len(s.Others) > 0 {
		s.Codes = append(s.Codes, CodeAskStrengths)
	}
	if !s.AtTemperature {
		s.Codes = append(s.Codes, CodeDensityAt20C)
	}
	return s, nil
}

// perKelvin is the change of density with temperature between 0 and 40 C,
// kg/m3 per K, by strength.
type perKelvin struct{ strength, slope float64 }

const perryWarm = "change of density between 0 and 40 C from Perry's Chemical Engineers' Handbook, densities of aqueous solutions, from memory"

// expansion holds the substances for which the change is remembered well enough
// to help: ferric chloride and alum are not among them. Water itself bends (0
// between 0 and 8 C, -0.3 at 30 C); a solution of a few per cent is therefore
// only good to 2 kg/m3.
var expansion = map[Density][]perKelvin{
	SodiumHydroxide: {{0, -0.19}, {0.10, -0.43}, {0.20, -0.54}, {0.30, -0.62}, {0.40, -0.68}, {0.50, -0.73}, {0.52, -0.73}},
	SulfuricAcid: {{0, -0.19}, {0.10, -0.43}, {0.20, -0.59}, {0.30, -0.68}, {0.50, -0.79}, {0.60, -0.84}, {0.70, -0.92},
		{0.80, -1.03}, {0.90, -1.07}, {0.93, -1.05}, {0.98, -1.01}, {1.00, -1.0}},
	HydrochloricAcid: {{0, -0.19}, {0.10, -0.32}, {0.20, -0.45}, {0.30, -0.59}, {0.36, -0.66}, {0.42, -0.7}},
}

const (
	coldestWarm = 273.15 - 5 // K, where the changes are still used
	hottestWarm = 273.15 + 45
)

// atTemperature is At with the density of 20 C moved by the change with
// temperature where no table has the temperature and the change is known.
func (d Density) atTemperature(strength, kelvin float64) (Found, error) {
	found, err := d.At(strength, kelvin)
	if err != nil || found.AtTemperature {
		return found, err
	}
	rows := expansion[d]
	if kelvin < coldestWarm || kelvin > hottestWarm {
		return found, nil
	}
	for i := 1; i < len(rows); i++ {
		a, b := rows[i-1], rows[i]
		if strength >= a.strength && strength <= b.strength {
			slope := a.slope + (b.slope-a.slope)*(strength-a.strength)/(b.strength-a.strength)
			found.KgPerM3 += slope * (kelvin - referenceKelvin)
			found.AtTemperature = true
			found.Source = join(found.Source, perryWarm)
			return found, nil
		}
	}
	return found, nil
}
