package feed

// Freezing is the temperature at which a product starts to freeze or to drop
// crystals.
type Freezing struct {
	Known  bool    // false: no figure for this product or strength
	Kelvin float64 // K
	Unsure bool    // the sources are weak or disagree: the supplier's curve decides
	Source string
}

// nearEnough is how far outside its rows (kg/kg) a point still holds.
const nearEnough = 0.012

// point is one freezing or crystallisation point.
type point struct {
	strength float64 // kg/kg
	celsius  float64
	unsure   bool
	source   string
}

// Freezing returns where a liquid of a table starts to freeze at a strength
// (kg/kg), on a straight line between known points, and the end's own point up
// to 0.012 beyond it. Points between rows are unsure where either row is.
func (d Density) Freezing(strength float64) Freezing {
	rows := freezing[d]
	for i, b := range rows {
		if strength > b.strength {
			continue
		}
		if i == 0 || strength == b.strength {
			return near(b, strength)
		}
		a := rows[i-1]
		share := (strength - a.strength) / (b.strength - a.strength)
		return Freezing{
			Known: true, Kelvin: celsius(a.celsius + share*(b.celsius-a.celsius)),
			Unsure: a.unsure || b.unsure, Source: join(a.source, b.source),
		}
	}
	if len(rows) == 0 {
		return Freezing{}
	}
	return near(rows[len(rows)-1], strength)
}

// near is a row's own point where the strength is close to it.
func near(p point, strength float64) Freezing {
	if strength < p.strength-nearEnough || strength > p.strength+nearEnough {
		return Freezing{}
	}
	return Freezing{Known: true, Kelvin: celsius(p.celsius), Unsure: p.unsure, Source: p.source}
}

func celsius(c float64) float64 { return c + 273.15 }
