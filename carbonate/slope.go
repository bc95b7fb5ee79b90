package carbonate

import "math"

// positiveRoot solves a x^2 + b x - c = 0 for the positive root, a > 0, c >= 0,
// without the cancellation that the schoolbook form has where b is large.
func positiveRoot(a, b, c float64) float64 {
	d := math.Sqrt(b*b + 4*a*c)
	if b >= 0 {
		return 2 * c / (b + d)
	}
	return (d - b) / (2 * a)
}

// slopes of the proton condition at constant activity coefficients. The
// species' dependence on (ln CO3, ln SO4, ln Ca, ln Mg) is the symmetric matrix
//
//	J[i][j] = sum over species of n_i n_j c,
//
// and on ln h the vector r[i] = sum of n_i p c, where n counts the free ions in
// a species and p its protons (minus its hydroxides). With z = J^-1 r,
//
//	d protons / d ln h = sum p^2 c - r.z   at constant totals,
//	d protons / d T_i  = z_i               at constant h.
type slopes struct {
	carbon, sulfate, calcium, magnesium float64 // z
	protons                             float64 // d protons / d ln h, positive
}

func (p *point) slopes(mode balance) slopes {
	if mode == calciteEquilibrium {
		return p.calciteSlopes()
	}
	jCC := p.carbon()
	jSS := p.so4 + p.hso4 + p.caSO4 + p.mgSO4
	jAA := p.calcium()
	jMM := p.mg + p.mgHCO3 + p.mgCO3 + p.mgSO4 + p.mgOH
	jCA, jCM := p.caHCO3+p.caCO3, p.mgHCO3+p.mgCO3
	jSA, jSM := p.caSO4, p.mgSO4
	rC := p.hco3 + 2*p.co2 + p.caHCO3 + p.mgHCO3
	rS := p.hso4
	rA := p.caHCO3 - p.caOH
	rM := p.mgHCO3 - p.mgOH

	// C and SO4 do not pair with each other, nor Ca with Mg: eliminate C and SO4,
	// which leaves two equations. An absent component drops out.
	iC, iS := inverse(jCC), inverse(jSS)
	a := guard(jAA - jCA*jCA*iC - jSA*jSA*iS)
	m := guard(jMM - jCM*jCM*iC - jSM*jSM*iS)
	x := -(jCA*jCM*iC + jSA*jSM*iS)
	bA := rA - jCA*rC*iC - jSA*rS*iS
	bM := rM - jCM*rC*iC - jSM*rS*iS
	det := 1 / (a*m - x*x)
	zA := (bA*m - x*bM) * det
	zM := (a*bM - x*bA) * det
	zC := (rC - jCA*zA - jCM*zM) * iC
	zS := (rS - jSA*zA - jSM*zM) * iS
	if iC == 0 {
		// No carbon yet: what the first of it brings. All its species scale with
		// CO3, so their shares are those of an infinitesimal amount.
		zC = p.protonsPerCarbon()
	}
	square := p.hyd + p.oh + p.hco3 + 4*p.co2 + p.caHCO3 + p.mgHCO3 + p.hso4 + p.caOH + p.mgOH
	return slopes{zC, zS, zA, zM, square - (rC*zC + rS*zS + rA*zA + rM*zM)}
}

// protonsPerCarbon is d protons / d C for the first trace of carbon.
func (p *point) protonsPerCarbon() float64 {
	ratio := p.act.g2 * p.act.inv1
	bicarb := p.hK2 * ratio
	acid := p.h2K12 * p.act.g2 * p.act.inv0
	return (bicarb + 2*acid) / (1 + bicarb + acid)
}

// traceOfNothing, mol/L, is so little that products of such amounts underflow:
// a component below it counts as absent in the slopes.
const traceOfNothing = 1e-100

func inverse(x float64) float64 {
	if x < traceOfNothing {
		return 0
	}
	return 1 / x
}

func guard(x float64) float64 {
	if x < traceOfNothing {
		return 1
	}
	return x
}
