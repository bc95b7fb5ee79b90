package carbonate

// point is the working state of every solver in this package: one water at one
// hydrogen-ion activity, with the free ions and the ionic strength of the last
// pass. It lives on the stack; nothing here allocates.
//
// With the activities known, every species is a product of powers of the free
// ions CO3, SO4, Ca, Mg and of h, so one pass ("sweep") takes each free ion in
// turn from its mass balance. The passes contract fast because pairs hold the
// smaller part of their ions.
type point struct {
	k          *Constants
	t          Totals
	background float64
	imposed    bool // ionic strength is given and stays
	h          float64
	ionic      float64
	act        activity

	// terms of h alone
	hK2, h2K12, kwH, mgH, hs float64

	// free ions, mol/L
	co3, so4, ca, mg float64

	// the other species of the last pass, mol/L
	hyd, oh, hco3, co2             float64
	caHCO3, caCO3, mgHCO3, mgCO3   float64
	caSO4, mgSO4, caOH, mgOH, hso4 float64

	// minor acids of the last pass
	hasMinors  bool
	minorUnit  [minorCount]float64 // eq per mol of each
	minorAlk   float64             // eq/L
	minorI2    float64             // sum of z^2 c
	minorSlope float64             // minus d(minorAlk)/d ln h

	inertI2   float64 // sum of z^2 c of the inert ions
	forCarbon float64 // eq/L of alkalinity left to carbonate, mode alkalinityGiven
}

// balance says what fixes the carbonate in a sweep.
type balance int

const (
	carbonGiven     balance = iota // total carbon in t
	alkalinityGiven                // alkalinity in the call; carbon is the result
	calciteEquilibrium
)

// start prepares the point for a water whose totals are t. Every pass reads p.t
// afresh, so a caller may change it between passes.
func (p *point) start(k *Constants, t *Totals, background float64) {
	p.k, p.t, p.background = k, *t, background
	p.imposed = false
	p.hasMinors = false
	for _, m := range minors {
		if t[m.total] != 0 {
			p.hasMinors = true
			break
		}
	}
	p.minorAlk, p.minorI2, p.minorSlope = 0, 0, 0
	p.refreshInert()
	p.ca, p.mg, p.so4 = t[Calcium], t[Magnesium], t[Sulfate]
	p.co3 = 0
	// A first guess of the ionic strength: all ions free, carbonate as HCO3.
	p.ionic = min(background+0.5*(p.inertI2+4*(p.ca+p.mg+p.so4)+t[Carbon]), MaxIonicStrength)
}

func (p *point) refreshInert() {
	t := &p.t
	p.inertI2 = t[Sodium] + t[Potassium] + t[Chloride] + t[Nitrate] + 4*t[OtherHardness]
}

// setH moves the point to a hydrogen-ion activity.
func (p *point) setH(h float64) {
	k := p.k
	p.h = h
	p.hK2 = h / k.Carbonic2
	p.h2K12 = p.hK2 * h / k.Carbonic1
	inv := 1 / h
	p.kwH = k.Water * inv
	p.mgH = k.MgOH * inv
	p.hs = k.HSO4 * h
}

// sweep makes one pass and returns the largest relative change of a free ion
// or of the ionic strength. given is the alkalinity (eq/L) in the mode
// alkalinityGiven and C - Ca (mol/L) in the mode calciteEquilibrium.
func (p *point) sweep(mode balance, given float64) float64 {
	k, t := p.k, &p.t
	p.act.at(k, p.ionic)
	g2 := p.act.g2
	inv0, inv1 := p.act.inv0, p.act.inv1
	ratio := g2 * inv1
	pair := g2 * g2 * inv0

	bicarb := p.hK2 * ratio     // HCO3 per CO3
	acid := p.h2K12 * g2 * inv0 // CO2 per CO3
	caBi := k.CaHCO3 * g2 * bicarb
	caCarb := k.CaCO3 * pair
	mgBi := k.MgHCO3 * g2 * bicarb
	mgCarb := k.MgCO3 * pair
	caSulf := k.CaSO4 * pair
	mgSulf := k.MgSO4 * pair
	p.hyd = p.h * inv1
	p.oh = p.kwH * inv1
	caHyd := k.CaOH * g2 * p.oh
	mgHyd := p.mgH * ratio
	bisulf := p.hs * ratio

	if p.hasMinors {
		p.sweepMinors()
	}

	ca, mg := p.ca, p.mg
	var co3 float64
	switch mode {
	case carbonGiven:
		co3 = t[Carbon] / (1 + bicarb + acid + ca*(caBi+caCarb) + mg*(mgBi+mgCarb))
	case alkalinityGiven:
		// What hydroxide and the other bases leave for carbonate. Below zero on the
		// way is held at zero; below zero at the end contradicts the pH.
		p.forCarbon = given + p.hyd - p.oh - p.minorAlk + bisulf*p.so4 - caHyd*ca - mgHyd*mg
		co3 = max(p.forCarbon, 0) / (2 + bicarb + ca*(caBi+2*caCarb) + mg*(mgBi+2*mgCarb))
	case calciteEquilibrium:
		// a(Ca) a(CO3) = K fixes the product; C - Ca = given then is a quadratic
		// in free Ca: (1 + so4 terms) Ca^2 + given Ca - q (1 + ...) = 0. The two
		// pairs of Ca with carbonate enter both totals and cancel.
		q := k.Calcite / (g2 * g2)
		a := 1 + caSulf*p.so4 + caHyd
		c := q * (1 + bicarb + acid + mg*(mgBi+mgCarb))
		ca = positiveRoot(a, given, c)
		co3 = q / ca
	}
	so4 := t[Sulfate] / (1 + bisulf + ca*caSulf + mg*mgSulf)
	if mode != calciteEquilibrium {
		ca = t[Calcium] / (1 + co3*(caBi+caCarb) + so4*caSulf + caHyd)
	}
	mg = t[Magnesium] / (1 + co3*(mgBi+mgCarb) + so4*mgSulf + mgHyd)

	p.hco3 = bicarb * co3
	p.co2 = acid * co3
	p.caHCO3 = caBi * ca * co3
	p.caCO3 = caCarb * ca * co3
	p.mgHCO3 = mgBi * mg * co3
	p.mgCO3 = mgCarb * mg * co3
	p.caSO4 = caSulf * ca * so4
	p.mgSO4 = mgSulf * mg * so4
	p.caOH = caHyd * ca
	p.mgOH = mgHyd * mg
	p.hso4 = bisulf * so4

	change := max(relative(co3, p.co3), relative(so4, p.so4), relative(ca, p.ca), relative(mg, p.mg))
	p.co3, p.so4, p.ca, p.mg = co3, so4, ca, mg
	if !p.imposed {
		ionic := p.background + p.explainedIonic()
		change = max(change, relative(ionic, p.ionic))
		p.ionic = ionic
	}
	return change
}

// explainedIonic is half the sum of z^2 c over the species of the last pass.
func (p *point) explainedIonic() float64 {
	return 0.5 * (p.inertI2 + p.minorI2 + p.hyd + p.oh + p.hco3 + p.hso4 +
		p.caHCO3 + p.mgHCO3 + p.caOH + p.mgOH + 4*(p.co3+p.so4+p.ca+p.mg))
}

// protons is the excess of protons over the reference of CO3 and the free
// metals, mol/L: alkalinity is 2 C - protons + minor acids, for whatever C.
func (p *point) protons() float64 {
	return p.hyd - p.oh + p.hco3 + 2*p.co2 + p.caHCO3 + p.mgHCO3 + p.hso4 - p.caOH - p.mgOH
}

// alkalinity is the proton condition over the species of the last pass, eq/L.
func (p *point) alkalinity() float64 {
	return -p.hyd + p.oh + p.hco3 + p.caHCO3 + p.mgHCO3 + 2*(p.co3+p.caCO3+p.mgCO3) +
		p.caOH + p.mgOH - p.hso4 + p.minorAlk
}

// carbon is the total inorganic carbon over the species of the last pass.
func (p *point) carbon() float64 {
	return p.co3 + p.hco3 + p.co2 + p.caHCO3 + p.caCO3 + p.mgHCO3 + p.mgCO3
}

// calcium is the total calcium over the species of the last pass.
func (p *point) calcium() float64 {
	return p.ca + p.caHCO3 + p.caCO3 + p.caSO4 + p.caOH
}

const (
	sweepTolerance = 1e-12 // relative, on the predicted remaining error
	sweepLimit     = 400
)

// converge sweeps at constant h until the predicted remaining error is below
// the tolerance. It returns false at the step limit.
func (p *point) converge(mode balance, given float64) bool {
	previous := 1.0
	var ionic secant
	for range sweepLimit {
		before := p.ionic
		change := p.sweep(mode, given)
		if p.ionic > 2 || p.ionic < 0 {
			return true // hopeless; the caller refuses it by its ionic strength
		}
		if settled(change, previous, sweepTolerance) {
			return true
		}
		previous = change
		if !p.imposed {
			p.ionic = ionic.next(before, p.ionic, change)
		}
	}
	return false
}

// settled predicts the error left after a step of this size from the ratio of
// the last two steps. The floor on the ratio keeps one lucky small step from
// ending the iteration early.
func settled(change, previous, tolerance float64) bool {
	ratio := change / previous
	if !(ratio > 0.1) {
		ratio = 0.1
	}
	if ratio > 0.99 {
		return change < tolerance*1e-2
	}
	return change*ratio < tolerance*(1-ratio)
}

func relative(now, before float64) float64 {
	d := now - before
	if d < 0 {
		d = -d
	}
	if now < 0 {
		now = -now
	}
	if d <= 1e-300 {
		return 0
	}
	return d / now
}
