package mix

import "math"

// Sizes of the linear programs of this package: a handful of doses under a
// handful of limits, with one slack a side where a limit may give way.
const (
	maxProducts = 8
	maxRows     = 32
	maxColumns  = maxProducts + 2*maxRows
)

// linear is a linear program: least cost . x with low <= x <= high (finite) and
// rowLow <= a x <= rowHigh (either may be infinite). It holds its own memory so
// that solving allocates nothing.
type linear struct {
	n, m            int
	cost            [maxColumns]float64
	low, high       [maxColumns]float64
	a               [maxRows][maxColumns]float64
	rowLow, rowHigh [maxRows]float64

	x    [maxColumns]float64 // the answer
	dual [maxRows]float64    // cost of a unit of each row's bound, 0 where it does not bind

	// The dictionary: basic variables are t times the nonbasic ones. Variables
	// 0..n-1 are x, n.. the rows' values; without constants, since a row's value
	// is a x and nothing more.
	t        [maxRows][maxColumns]float64
	reduced  [maxColumns]float64 // the cost in terms of the nonbasic variables
	basic    [maxRows]int
	nonbasic [maxColumns]int
	at       [maxColumns]float64 // values of the nonbasic variables
	value    [maxRows]float64    // of the basic ones
}

// outcome of a linear program.
type outcome int

const (
	optimal outcome = iota
	infeasible
	stuck // the step limit; not seen, but never taken for an answer
)

const (
	feasible    = 1e-11 // on a row's value, whose natural size is about 1
	pricing     = 1e-11 // on a reduced cost
	leastPivot  = 1e-10
	blandAfter  = 60 // pivots, from then on by lowest index, which cannot cycle
	pivotsLimit = 2000
)

// solve runs the bounded simplex method on the dictionary: first down the sum of
// the infeasibilities, then down the cost. Doses being bounded, there is no
// unbounded case.
func (l *linear) solve() outcome {
	l.begin()
	pivots := 0
	for {
		done, improved := l.pivot(true, pivots)
		if done {
			break
		}
		if !improved {
			return infeasible
		}
		if pivots++; pivots > pivotsLimit {
			return stuck
		}
	}
	for {
		_, improved := l.pivot(false, pivots)
		if !improved {
			break
		}
		if pivots++; pivots > pivotsLimit {
			return stuck
		}
	}
	l.read()
	return optimal
}

// begin makes the rows' values basic and puts every x at the bound nearer to 0.
func (l *linear) begin() {
	for j := range l.n {
		l.nonbasic[j] = j
		l.reduced[j] = l.cost[j]
		l.at[j] = l.low[j]
		if math.Abs(l.high[j]) < math.Abs(l.low[j]) {
			l.at[j] = l.high[j]
		}
	}
	for i := range l.m {
		l.basic[i] = l.n + i
		copy(l.t[i][:l.n], l.a[i][:l.n])
	}
}

func (l *linear) bounds(variable int) (low, high float64) {
	if variable < l.n {
		return l.low[variable], l.high[variable]
	}
	return l.rowLow[variable-l.n], l.rowHigh[variable-l.n]
}

// revalue works the basic values out afresh, so that rounding does not add up.
func (l *linear) revalue() {
	for i := range l.m {
		v := 0.0
		for j := range l.n {
			v += l.t[i][j] * l.at[j]
		}
		l.value[i] = v
	}
}

// pivot makes one step. In the first phase done says that all is feasible;
// improved is false where no step helps.
func (l *linear) pivot(first bool, count int) (done, improved bool) {
	l.revalue()
	gradient := l.reduced
	var side [maxRows]int // -1 below its bounds, 1 above
	if first {
		done = true
		for j := range l.n {
			gradient[j] = 0
		}
		for i := range l.m {
			low, high := l.bounds(l.basic[i])
			v, slack := l.value[i], feasible*(1+math.Abs(l.value[i]))
			switch {
			case v < low-slack:
				side[i] = -1
			case v > high+slack:
				side[i] = 1
			default:
				continue
			}
			done = false
			for j := range l.n {
				gradient[j] += float64(side[i]) * l.t[i][j]
			}
		}
		if done {
			return true, false
		}
	}
	enter, direction := l.entering(&gradient, count >= blandAfter)
	if enter < 0 {
		return false, false
	}
	low, high := l.bounds(l.nonbasic[enter])
	longest, leave, bound := high-low, -1, 0.0
	for i := range l.m {
		rate := direction * l.t[i][enter]
		if math.Abs(rate) < leastPivot {
			continue
		}
		b := l.blocking(i, side[i], rate)
		if math.IsInf(b, 0) {
			continue
		}
		step := max((b-l.value[i])/rate, 0)
		better := step < longest-1e-14
		tie := !better && step <= longest+1e-14 && leave >= 0
		if tie && count < blandAfter {
			tie = math.Abs(l.t[i][enter]) > math.Abs(l.t[leave][enter])
		} else if tie {
			tie = l.basic[i] < l.basic[leave]
		}
		if better || tie {
			longest, leave, bound = min(step, longest), i, b
		}
	}
	if leave < 0 {
		if math.IsInf(longest, 0) {
			return false, false
		}
		l.at[enter] = high
		if direction < 0 {
			l.at[enter] = low
		}
		return false, true
	}
	l.exchange(leave, enter, bound)
	return false, true
}

// entering picks the nonbasic variable that lowers the gradient fastest, or the
// first that does, and the way it moves.
func (l *linear) entering(gradient *[maxColumns]float64, first bool) (enter int, direction float64) {
	enter = -1
	best, lowest := pricing, math.MaxInt
	for j := range l.n {
		low, high := l.bounds(l.nonbasic[j])
		if high <= low {
			continue
		}
		g, way := gradient[j], 1.0
		if l.at[j] != low { // then at its high bound: it may only fall
			g, way = -g, -1
		}
		if -g <= best {
			continue
		}
		if first {
			if -g > pricing && l.nonbasic[j] < lowest {
				enter, direction, lowest = j, way, l.nonbasic[j]
			}
			continue
		}
		enter, direction, best = j, way, -g
	}
	return enter, direction
}

// blocking is the bound at which basic variable i stops a move at this rate. One
// that is out of bounds stops where it comes in.
func (l *linear) blocking(i, side int, rate float64) float64 {
	low, high := l.bounds(l.basic[i])
	switch {
	case side < 0 && rate > 0:
		return low
	case side > 0 && rate < 0:
		return high
	case side != 0:
		return math.Inf(1)
	case rate > 0:
		return high
	}
	return low
}

// exchange makes basic variable i nonbasic at a bound and nonbasic variable j basic.
func (l *linear) exchange(i, j int, bound float64) {
	inv := 1 / l.t[i][j]
	row := &l.t[i]
	for c := range l.n {
		row[c] *= -inv
	}
	row[j] = inv
	for r := range l.m {
		if r == i {
			continue
		}
		f := l.t[r][j]
		if f == 0 {
			continue
		}
		other := &l.t[r]
		other[j] = 0
		for c := range l.n {
			other[c] += f * row[c]
		}
	}
	f := l.reduced[j]
	l.reduced[j] = 0
	for c := range l.n {
		l.reduced[c] += f * row[c]
	}
	l.basic[i], l.nonbasic[j] = l.nonbasic[j], l.basic[i]
	l.at[j] = bound
}

// read takes the answer out of the dictionary.
func (l *linear) read() {
	l.revalue()
	for i := range l.m {
		l.dual[i] = 0
		if v := l.basic[i]; v < l.n {
			l.x[v] = min(max(l.value[i], l.low[v]), l.high[v])
		}
	}
	for j := range l.n {
		if v := l.nonbasic[j]; v < l.n {
			l.x[v] = l.at[j]
		} else {
			l.dual[v-l.n] = l.reduced[j]
		}
	}
}
