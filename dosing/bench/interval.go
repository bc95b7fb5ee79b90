package bench

import (
	"math"

	"gonum.org/v1/gonum/mat"
	"gonum.org/v1/gonum/stat/distuv"
)

// Estimate is one fitted figure. The interval is the 95 % one from the Jacobian,
// so it is as straight as the curve is near the outcome; unit as the Unknown.
type Estimate struct {
	Unknown       Unknown
	Start         float64 // what the readings or the label said
	Value         float64
	StandardError float64
	Low, High     float64 // may pass what is possible (a carbon below 0): then it is not told from there
	AtLimit       bool    // the fit stopped at the end of what the unknown may be
}

const (
	// mostCondition bounds the condition number of the Jacobian with columns of
	// equal length. Beyond it two unknowns move the curve alike to one part in ten
	// thousand, and readings to 0.01 pH tell nothing of each.
	mostCondition = 1e4
	// disbelief is the chance below which the scatter is more than the readings
	// allow.
	disbelief = 0.01
)

// covariance returns the covariance of the unknowns in units of their scales and
// the condition number of the scaled Jacobian; ok is false where some
// combination of unknowns leaves the curve as it is.
func (s *solution) covariance() (cov *mat.Dense, condition float64, weak []Unknown, ok bool) {
	n, p := s.jacobian.Dims()
	norms := make([]float64, p)
	a := mat.NewDense(n, p, nil)
	for j := range p {
		norms[j] = mat.Norm(s.jacobian.ColView(j), 2)
		if norms[j] == 0 {
			return nil, math.Inf(1), []Unknown{s.find[j]}, false
		}
		for i := range n {
			a.Set(i, j, s.jacobian.At(i, j)/norms[j])
		}
	}
	var svd mat.SVD
	if !svd.Factorize(a, mat.SVDThin) {
		return nil, math.Inf(1), s.find, false
	}
	values := svd.Values(nil)
	var v mat.Dense
	svd.VTo(&v)
	condition = values[0] / values[p-1]
	if !(condition < mostCondition) {
		for j := range p {
			if math.Abs(v.At(j, p-1)) > 0.3 {
				weak = append(weak, s.find[j])
			}
		}
		return nil, condition, weak, false
	}
	cov = mat.NewDense(p, p, nil)
	for i := range p {
		for j := range p {
			sum := 0.0
			for r := range p {
				sum += v.At(i, r) * v.At(j, r) / (values[r] * values[r])
			}
			cov.Set(i, j, sum/(norms[i]*norms[j]))
		}
	}
	return cov, condition, nil, true
}

// estimates reads the intervals off the covariance. Where the readings scatter
// as their tolerance says, that tolerance gives the errors; where they scatter
// more, the scatter does, with Student's factor for the readings to spare.
func (s *solution) estimates(start *figures, cov *mat.Dense, freedom int, agrees bool) []Estimate {
	widen, factor := 1.0, normal95
	if !agrees && freedom > 0 {
		widen = math.Sqrt(max(s.chiSquare/float64(freedom), 1))
		factor = distuv.StudentsT{Sigma: 1, Nu: float64(freedom)}.Quantile(0.975)
	}
	out := make([]Estimate, len(s.find))
	for j, u := range s.find {
		low, high := u.span()
		value := s.figures[u]
		se := math.Sqrt(cov.At(j, j)) * s.scale[j] * widen
		out[j] = Estimate{
			Unknown: u, Start: start[u], Value: value, StandardError: se,
			Low: value - factor*se, High: value + factor*se,
			AtLimit: value == low || value == high,
		}
	}
	return out
}

// correlation turns a covariance into correlations.
func correlation(cov *mat.Dense) [][]float64 {
	p, _ := cov.Dims()
	out := make([][]float64, p)
	for i := range p {
		out[i] = make([]float64, p)
		for j := range p {
			out[i][j] = cov.At(i, j) / math.Sqrt(cov.At(i, i)*cov.At(j, j))
		}
	}
	return out
}

// chance is the probability of a chi-square at least this large where the model
// is right; 1 without readings to spare.
func chance(chiSquare float64, freedom int) float64 {
	if freedom <= 0 {
		return 1
	}
	return distuv.ChiSquared{K: float64(freedom)}.Survival(chiSquare)
}
