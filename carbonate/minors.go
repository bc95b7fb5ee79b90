package carbonate

// A minor acid takes no part in ion pairs, so its species follow from h and
// the activity coefficients alone.
type minorAcid struct {
	total     Component
	steps     int // dissociation steps, 1 or 3
	topCharge int // charge of the fully protonated species
	reference int // index of the reference species, counted from the fully protonated one
}

// minors lists them in the order of minorConstants.
var minors = [...]minorAcid{
	{Ammonia, 1, 1, 0},
	{Phosphate, 3, 0, 1},
	{Silica, 1, 0, 0},
	{Boron, 1, 0, 0},
	{Fluoride, 1, 0, 1},
	{Chlorine, 1, 0, 0},
	{Acetate, 1, 0, 0},
	{Formate, 1, 0, 0},
	{Citrate, 3, 0, 0},
}

const minorCount = len(minors)

func (k *Constants) minorConstant(which, step int) float64 {
	switch minors[which].total {
	case Ammonia:
		return k.Ammonium
	case Phosphate:
		return k.Phosphoric[step]
	case Silica:
		return k.Silicic
	case Boron:
		return k.Boric
	case Fluoride:
		return k.Fluoric
	case Chlorine:
		return k.HOCl
	case Acetate:
		return k.Acetic
	case Formate:
		return k.Formic
	default:
		return k.Citric[step]
	}
}

// sweepMinors sets the minor acids' alkalinity, ionic strength and slope at
// the present h and activities. Each species is proportional to h to the minus
// protons lost, so the slope of the mean is minus the variance.
func (p *point) sweepMinors() {
	gamma := [4]float64{p.act.g0, p.act.g1, p.act.g2, p.act.g3}
	p.minorAlk, p.minorI2, p.minorSlope = 0, 0, 0
	inv := 1 / p.h
	for i := range minors {
		m := &minors[i]
		total := p.t[m.total]
		terms := [4]float64{1}
		sum := 1.0
		for j := range m.steps {
			from, to := absolute(m.topCharge-j), absolute(m.topCharge-j-1)
			terms[j+1] = terms[j] * p.k.minorConstant(i, j) * inv * gamma[from] / gamma[to]
			sum += terms[j+1]
		}
		mean, square, charge2 := 0.0, 0.0, 0.0
		for j := range m.steps + 1 {
			f := terms[j] / sum
			w := float64(j - m.reference)
			z := float64(m.topCharge - j)
			mean += w * f
			square += w * w * f
			charge2 += z * z * f
		}
		p.minorUnit[i] = mean
		p.minorAlk += total * mean
		p.minorI2 += total * charge2
		p.minorSlope += total * (square - mean*mean)
	}
}

func absolute(z int) int {
	if z < 0 {
		return -z
	}
	return z
}
