package titration

import (
	"encoding/csv"
	"math"
	"os"
	"strconv"
	"testing"
)

// TestRegressionNorris compares the line and its standard errors with the
// certified values of the NIST Statistical Reference Datasets, linear
// regression, Norris (values from memory, as are the data: ten figures agree, so
// both are right).
func TestRegressionNorris(t *testing.T) {
	f, err := os.Open("testdata/norris.csv")
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	r := csv.NewReader(f)
	r.Comment = '#'
	rows, err := r.ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	var x, y []float64
	for _, row := range rows[1:] {
		a, _ := strconv.ParseFloat(row[0], 64)
		b, _ := strconv.ParseFloat(row[1], 64)
		y, x = append(y, a), append(x, b)
	}
	if len(x) != 36 {
		t.Fatalf("%d rows", len(x))
	}
	l := fit(x, y)
	for _, c := range []struct {
		name      string
		got, want float64
	}{
		{"intercept", l.intercept, -0.262323073774029},
		{"slope", l.slope, 1.00211681802045},
		{"standard error of the intercept", l.interceptError, 0.232818234301152},
		{"standard error of the slope", l.slopeError, 0.429796848199937e-3},
		{"residual standard deviation", l.residual, 0.884796396144373},
		{"R squared", l.determination, 0.999993745883712},
	} {
		if math.Abs(c.got-c.want) > 1e-10*math.Abs(c.want) {
			t.Errorf("%s: %.15g, certified %.15g", c.name, c.got, c.want)
		}
	}
}

// TestZeroOfLine: where a line meets zero, its standard error against the exact
// spread over all sign patterns of equal errors, which is what the formula to
// first order means.
func TestZeroOfLine(t *testing.T) {
	x := []float64{5, 6, 7, 8, 9, 10}
	const noise = 1e-4
	var sum, sumError float64
	n := 1 << len(x)
	for pattern := range n {
		y := make([]float64, len(x))
		for i := range x {
			y[i] = 2 * (x[i] - 4)
			if pattern>>i&1 == 1 {
				y[i] += noise
			} else {
				y[i] -= noise
			}
		}
		l := fit(x, y)
		sum += (l.zero - 4) * (l.zero - 4)
		sumError += l.zeroError * l.zeroError
	}
	spread, stated := math.Sqrt(sum/float64(n)), math.Sqrt(sumError/float64(n))
	if math.Abs(stated/spread-1) > 1e-3 {
		t.Errorf("stated standard error %g, true spread %g", stated, spread)
	}
}

// TestStudent: half of the 95 % interval over the standard error is Student's t
// of n - 2 degrees of freedom, 2.776 for six points (printed tables).
func TestStudent(t *testing.T) {
	l := fit([]float64{1, 2, 3, 4, 5, 6}, []float64{1.1, 1.9, 3.2, 3.9, 5.1, 5.8})
	if q := l.zeroWithin / l.zeroError; math.Abs(q-2.776) > 5e-4 {
		t.Errorf("%g", q)
	}
}
