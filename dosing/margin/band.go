package margin

import (
	"math"

	"beckline/dosing"
)

// Band is the 95 % range of the finished pH along a curve of doses, mol/L of
// the (first) solved addition's chemical, for drawing beside the curve. Each reading is moved by
// its half-width either way and what the pH does is added up in squares, upward
// and downward apart, so the band is as lopsided as the curve; it is not a
// substitute for draws. A dose at which the water has no pH gives NaN. The error
// is a *dosing.Problem, as from Of; also where no dose was solved for.
func Band(r *dosing.Result, tol Tolerances, doses []float64) ([]Range, error) {
	m, err := newModel(r, tol)
	if err != nil {
		return nil, err
	}
	if len(m.feeds) == 0 {
		return nil, &dosing.Problem{Kind: dosing.BadInput, Code: "missing", Field: "product"}
	}
	out := make([]Range, len(doses))
	up, down := make([]float64, len(doses)), make([]float64, len(doses))
	middle := make([]float64, len(doses))
	for j, d := range doses {
		middle[j] = m.finished(m.k, m.raw, m.with(d))
	}
	values := m.values()
	at := append([]thermo(nil), m.thermos...)
	for i := range m.varied {
		low, high := m.bandSide(values, at, i, -1), m.bandSide(values, at, i, 1)
		for j, d := range doses {
			a, b := low.pH(m, d)-middle[j], high.pH(m, d)-middle[j]
			rise, fall := max(a, b, 0), min(a, b, 0)
			up[j] += rise * rise
			down[j] += fall * fall
		}
	}
	for j := range doses {
		out[j] = Range{max(middle[j]-math.Sqrt(down[j]), 0), min(middle[j]+math.Sqrt(up[j]), 14)}
	}
	return out, nil
}

// with are the answered doses with another one of the first product.
func (m *model) with(dose float64) doses {
	d := m.answered()
	d[0] = dose
	return d
}

// bandEnd is one reading at one end of its interval.
type bandEnd struct {
	moved
	fed doses // real doses over those set
}

func (m *model) bandSide(values []float64, at []thermo, i int, sign float64) bandEnd {
	v := &m.varied[i]
	end := bandEnd{moved: moved{water: m.raw, k: m.k, ok: true}, fed: doses{1, 1}}
	switch factor := 1 + sign*v.half/v.value; v.kind {
	case ofFlow:
		end.fed = doses{1 / factor, 1 / factor}
	case ofStrength:
		end.fed[v.of] = factor
	default:
		end.moved = m.move(values, at, i, sign)
	}
	return end
}

func (e *bandEnd) pH(m *model, dose float64) float64 {
	if !e.ok {
		return math.NaN()
	}
	d := m.with(dose)
	return m.finished(e.k, e.water, doses{d[0] * e.fed[0], d[1] * e.fed[1]})
}
