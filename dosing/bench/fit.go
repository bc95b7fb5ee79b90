package bench

import (
	"math"

	"gonum.org/v1/gonum/mat"
)

// solution is the outcome of one least-squares fit.
type solution struct {
	figures   figures
	find      []Unknown
	predicted []float64 // readings of the meter
	sigma     []float64 // standard deviation of each, pH
	chiSquare float64
	jacobian  *mat.Dense // d(predicted)/d(unknown) over sigma, in units of the unknown's scale
	scale     []float64
}

const (
	fitSteps      = 100
	scoutSteps    = 12    // of a start that may not be the best
	weightings    = 4     // the readings' own deviations hang on the slope, so on the fit
	settledStep   = 1e-9  // of an unknown's scale
	settledGain   = 1e-10 // of the chi-square
	firstDamping  = 1e-3
	mostDamping   = 1e12
	differenceRel = 1e-6 // of an unknown's scale; the model is good to 1e-12
)

// fit finds the unknowns that make the sum of squares of (read - predicted)/sigma
// least, by the method of Levenberg 1944 and Marquardt 1963 with
// differences for derivatives. Unknowns are kept within their span. Where doses are unsure too,
// sigma holds that part through the slope of the curve (effective variance), and
// the fit is done again with the slopes of its outcome.
func (m *model) fit(start figures, find []Unknown, steps int) (*solution, error) {
	s := &solution{figures: start, find: find, scale: make([]float64, len(find))}
	for j, u := range find {
		s.scale[j] = u.scale(&start)
	}
	passes := 1
	if m.t.DoseStep > 0 || m.t.DoseTolerance > 0 {
		passes = weightings
	}
	for range passes {
		if err := m.weigh(s); err != nil {
			return nil, err
		}
		if err := m.descend(s, steps); err != nil {
			return nil, err
		}
	}
	return s, m.differentiate(s)
}

// weigh sets the deviation of every reading.
func (m *model) weigh(s *solution) error {
	s.sigma = make([]float64, len(m.t.Points))
	for i, p := range m.t.Points {
		s.sigma[i] = m.t.sigmaPH()
		if d := m.t.sigmaDose(p.Dose); d > 0 {
			slope, err := m.slope(&s.figures, i)
			if err != nil {
				return err
			}
			s.sigma[i] = math.Hypot(s.sigma[i], slope*d)
		}
	}
	return nil
}

// predict fills in the predictions and chi-square of a set of figures.
func (m *model) predict(s *solution, f *figures) (predicted []float64, chiSquare float64, err error) {
	predicted = make([]float64, len(m.t.Points))
	for i := range predicted {
		if predicted[i], err = m.reading(f, i); err != nil {
			return nil, 0, err
		}
		r := (m.t.Points[i].PH - predicted[i]) / s.sigma[i]
		chiSquare += r * r
	}
	return predicted, chiSquare, nil
}

func (m *model) descend(s *solution, steps int) (err error) {
	if s.predicted, s.chiSquare, err = m.predict(s, &s.figures); err != nil {
		return err
	}
	if len(s.find) == 0 {
		return nil
	}
	damping := firstDamping
	for range steps {
		if err := m.differentiate(s); err != nil {
			return err
		}
		moved, gain := 0.0, 0.0
		for damping < mostDamping {
			next, size := s.step(m.t, damping)
			predicted, chiSquare, err := m.predict(s, &next)
			if err == nil && chiSquare <= s.chiSquare {
				moved, gain = size, s.chiSquare-chiSquare
				s.figures, s.predicted, s.chiSquare = next, predicted, chiSquare
				damping = max(damping/10, 1e-12)
				break
			}
			damping *= 10
		}
		if damping >= mostDamping || moved < settledStep || gain <= settledGain*s.chiSquare {
			return nil
		}
	}
	return nil
}

// differentiate sets the weighted Jacobian at the present figures, whose
// predictions are at hand.
func (m *model) differentiate(s *solution) error {
	n := len(m.t.Points)
	if len(s.find) == 0 {
		return nil
	}
	s.jacobian = mat.NewDense(n, len(s.find), nil)
	for j, u := range s.find {
		_, high := u.span()
		h := differenceRel * s.scale[j]
		if s.figures[u]+h > high {
			h = -h
		}
		moved := s.figures
		moved[u] += h
		for i := range n {
			v, err := m.reading(&moved, i)
			if err != nil {
				return err
			}
			s.jacobian.Set(i, j, (v-s.predicted[i])/(moved[u]-s.figures[u])*s.scale[j]/s.sigma[i])
		}
	}
	return nil
}

// step solves the damped normal equations by the QR decomposition of the
// Jacobian with the damping below it, and keeps the figures within their span.
// size is the largest move in units of the scale.
func (s *solution) step(t *Titration, damping float64) (next figures, size float64) {
	n, p := s.jacobian.Dims()
	a := mat.NewDense(n+p, p, nil)
	b := mat.NewVecDense(n+p, nil)
	a.Slice(0, n, 0, p).(*mat.Dense).Copy(s.jacobian)
	for i := range n {
		b.SetVec(i, (t.Points[i].PH-s.predicted[i])/s.sigma[i])
	}
	for j := range p {
		norm := mat.Norm(s.jacobian.ColView(j), 2)
		a.Set(n+j, j, math.Sqrt(damping)*max(norm, 1e-12))
	}
	var x mat.VecDense
	var qr mat.QR
	qr.Factorize(a)
	next = s.figures
	// A near-singular matrix still gives a direction, and damping mends it.
	if err := qr.SolveVecTo(&x, false, b); err != nil && x.Len() != p {
		return next, 0
	}
	for j, u := range s.find {
		low, high := u.span()
		v := min(max(next[u]+x.AtVec(j)*s.scale[j], low), high)
		if math.IsNaN(v) {
			continue
		}
		size = max(size, math.Abs(v-next[u])/s.scale[j])
		next[u] = v
	}
	return next, size
}
