package mix

import (
	"errors"
	"flag"
	"math"
	"math/rand/v2"
	"testing"

	"gonum.org/v1/gonum/mat"
	"gonum.org/v1/gonum/optimize/convex/lp"
)

var programs = flag.Int("programs", 2000, "how many random linear programs are compared with gonum's simplex")

// TestTextbookProgram: the Wyndor Glass example of Hillier & Lieberman,
// Introduction to Operations Research, chapter 3 (from memory): most of
// 3 x + 5 y under x <= 4, 2 y <= 12, 3 x + 2 y <= 18 is 36 at (2, 6), with
// shadow prices 0, 3/2 and 1.
func TestTextbookProgram(t *testing.T) {
	l := &linear{n: 2, m: 3}
	l.cost[0], l.cost[1] = -3, -5
	l.high[0], l.high[1] = 100, 100
	l.a[0][0] = 1
	l.a[1][1] = 2
	l.a[2][0], l.a[2][1] = 3, 2
	for i, b := range []float64{4, 12, 18} {
		l.rowLow[i], l.rowHigh[i] = math.Inf(-1), b
	}
	if got := l.solve(); got != optimal {
		t.Fatalf("outcome %v", got)
	}
	for i, want := range []float64{2, 6} {
		if math.Abs(l.x[i]-want) > 1e-12 {
			t.Errorf("x[%d] = %g, want %g", i, l.x[i], want)
		}
	}
	for i, want := range []float64{0, -1.5, -1} {
		if math.Abs(l.dual[i]-want) > 1e-12 {
			t.Errorf("shadow price %d = %g, want %g", i, l.dual[i], want)
		}
	}
}

// TestProgramsWithGonum: the same random programs as gonum's simplex answers
// them, including those that it refuses as infeasible.
func TestProgramsWithGonum(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 8))
	solved, none, silent := 0, 0, 0
	for k := range *programs {
		l := randomProgram(r)
		want, err := byGonum(l)
		got := l.solve()
		switch {
		case err == nil:
			solved++
			if got != optimal {
				t.Fatalf("program %d: outcome %v, gonum finds %g", k, got, want)
			}
			if miss := l.worst(); miss > 1e-9 {
				t.Fatalf("program %d: misses a bound by %g", k, miss)
			}
			if sum := l.objective(); math.Abs(sum-want) > 1e-7*(1+math.Abs(want)) {
				t.Errorf("program %d: %.12g, gonum %.12g", k, sum, want)
			}
		case errors.Is(err, lp.ErrInfeasible):
			none++
			if got != infeasible {
				t.Fatalf("program %d: outcome %v where gonum finds nothing, bounds missed by %g", k, got, l.worst())
			}
		default:
			silent++
		}
	}
	if solved < *programs/4 || none < *programs/20 {
		t.Fatalf("only %d solved and %d infeasible of %d", solved, none, *programs)
	}
	t.Logf("%d solved, %d infeasible, %d on which gonum fails", solved, none, silent)
}

// TestDegenerateProgramsEnd: many rows through one vertex, where the simplex
// method may go round in circles.
func TestDegenerateProgramsEnd(t *testing.T) {
	r := rand.New(rand.NewPCG(9, 10))
	for k := range 500 {
		l := randomProgram(r)
		for i := range l.m {
			for j := range l.n {
				l.a[i][j] = float64(r.IntN(3) - 1)
			}
			l.rowLow[i], l.rowHigh[i] = 0, 0
			if i%2 == 1 {
				l.rowHigh[i] = math.Inf(1)
			}
		}
		for j := range l.n {
			l.low[j] = 0
		}
		if got := l.solve(); got != optimal {
			t.Fatalf("program %d: outcome %v, though 0 is feasible", k, got)
		}
		if miss := l.worst(); miss > 1e-9 {
			t.Fatalf("program %d: misses a bound by %g", k, miss)
		}
	}
}

func randomProgram(r *rand.Rand) *linear {
	l := &linear{n: 1 + r.IntN(6), m: 1 + r.IntN(9)}
	for j := range l.n {
		l.cost[j] = r.Float64()*2 - 0.5
		l.high[j] = 0.5 + 3*r.Float64()
		if r.Float64() < 0.2 {
			l.low[j] = 0.3 * l.high[j]
		}
	}
	for i := range l.m {
		for j := range l.n {
			if r.Float64() < 0.7 {
				l.a[i][j] = r.NormFloat64()
			}
		}
		mid := 0.5 * r.NormFloat64()
		l.rowLow[i], l.rowHigh[i] = mid-2*r.Float64(), mid+2*r.Float64()
		switch r.IntN(5) {
		case 0:
			l.rowLow[i] = math.Inf(-1)
		case 1:
			l.rowHigh[i] = math.Inf(1)
		case 2:
			if i == 0 {
				l.rowHigh[i] = l.rowLow[i]
			}
		}
	}
	return l
}

func (l *linear) objective() float64 {
	sum := 0.0
	for j := range l.n {
		sum += l.cost[j] * l.x[j]
	}
	return sum
}

// worst is by how much the answer misses a bound.
func (l *linear) worst() float64 {
	miss := 0.0
	for j := range l.n {
		miss = max(miss, l.low[j]-l.x[j], l.x[j]-l.high[j])
	}
	for i := range l.m {
		v := 0.0
		for j := range l.n {
			v += l.a[i][j] * l.x[j]
		}
		miss = max(miss, l.rowLow[i]-v, v-l.rowHigh[i])
	}
	return miss
}

// byGonum writes the program in gonum's form: x - low >= 0, and equalities with
// a slack for every finite bound.
func byGonum(l *linear) (value float64, err error) {
	type line struct {
		a     [maxColumns]float64
		b     float64
		slack float64 // 1 for <=, -1 for >=, 0 for =
	}
	var lines []line
	add := func(a *[maxColumns]float64, b, slack float64) {
		ln := line{a: *a, b: b, slack: slack}
		for j := range l.n {
			ln.b -= a[j] * l.low[j]
		}
		lines = append(lines, ln)
	}
	for i := range l.m {
		if l.rowLow[i] == l.rowHigh[i] {
			add(&l.a[i], l.rowLow[i], 0)
			continue
		}
		if !math.IsInf(l.rowLow[i], 0) {
			add(&l.a[i], l.rowLow[i], -1)
		}
		if !math.IsInf(l.rowHigh[i], 0) {
			add(&l.a[i], l.rowHigh[i], 1)
		}
	}
	constant := 0.0
	for j := range l.n {
		var a [maxColumns]float64
		a[j] = 1
		add(&a, l.high[j], 1)
		constant += l.cost[j] * l.low[j]
	}
	columns := l.n + len(lines)
	a := mat.NewDense(len(lines), columns, nil)
	b := make([]float64, len(lines))
	c := make([]float64, columns)
	copy(c, l.cost[:l.n])
	for i, ln := range lines {
		for j := range l.n {
			a.Set(i, j, ln.a[j])
		}
		a.Set(i, l.n+i, ln.slack)
		b[i] = ln.b
	}
	// A column of zeros (an equality has no slack) is refused by gonum.
	keep := []int{}
	for j := range columns {
		for i := range lines {
			if a.At(i, j) != 0 {
				keep = append(keep, j)
				break
			}
		}
	}
	small := mat.NewDense(len(lines), len(keep), nil)
	cost := make([]float64, len(keep))
	for to, from := range keep {
		cost[to] = c[from]
		for i := range lines {
			small.Set(i, to, a.At(i, from))
		}
	}
	defer func() {
		if recover() != nil {
			err = errors.New("gonum panics")
		}
	}()
	value, _, err = lp.Simplex(cost, small, b, 1e-12, nil)
	return value + constant, err
}

func BenchmarkOwnProgram(b *testing.B) {
	r := rand.New(rand.NewPCG(11, 12))
	l := randomProgram(r)
	for l.n < 6 || l.m < 8 || l.solve() != optimal {
		l = randomProgram(r)
	}
	for b.Loop() {
		l.solve()
	}
}

func BenchmarkGonumProgram(b *testing.B) {
	r := rand.New(rand.NewPCG(11, 12))
	l := randomProgram(r)
	for l.n < 6 || l.m < 8 || l.solve() != optimal {
		l = randomProgram(r)
	}
	for b.Loop() {
		if _, err := byGonum(l); err != nil {
			b.Fatal(err)
		}
	}
}
