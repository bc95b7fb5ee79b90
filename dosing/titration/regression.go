package titration

import (
	"math"

	"gonum.org/v1/gonum/stat"
	"gonum.org/v1/gonum/stat/distuv"
)

// line is a straight line by least squares, y = Intercept + Slope x, with the
// standard errors of the ordinary model (equal scatter in y, none in x).
type line struct {
	intercept, slope            float64
	interceptError, slopeError  float64
	residual, determination     float64 // standard deviation of y about the line; R squared
	meanX, spreadX              float64 // mean, and sum of squares about it
	zero, zeroError, zeroWithin float64 // where y is 0, its standard error, half its 95 % interval
	points                      int
}

// fit needs three points or more with different x, and a slope that is not 0.
func fit(x, y []float64) line {
	var l line
	l.points = len(x)
	l.intercept, l.slope = stat.LinearRegression(x, y, nil, false)
	l.determination = stat.RSquared(x, y, nil, l.intercept, l.slope)
	n := float64(len(x))
	l.meanX = stat.Mean(x, nil)
	sum := 0.0
	for i := range x {
		d := x[i] - l.meanX
		l.spreadX += d * d
		r := y[i] - l.intercept - l.slope*x[i]
		sum += r * r
	}
	l.residual = math.Sqrt(sum / (n - 2))
	l.slopeError = l.residual / math.Sqrt(l.spreadX)
	l.interceptError = l.residual * math.Sqrt(1/n+l.meanX*l.meanX/l.spreadX)
	l.zero = -l.intercept / l.slope
	// Error of the intersection with y = 0, to first order in the scatter.
	d := l.zero - l.meanX
	l.zeroError = l.residual / math.Abs(l.slope) * math.Sqrt(1/n+d*d/l.spreadX)
	l.zeroWithin = l.zeroError * distuv.StudentsT{Mu: 0, Sigma: 1, Nu: n - 2}.Quantile(0.975)
	return l
}
