package mix

import "math"

// cuts are places that a descent has looked at and not gone to, with the slopes
// there.
type cuts struct {
	n, next int
	places  [mostCuts]place
	slopes  [mostCuts]slopes
}

const mostCuts = 4

// remember keeps a place that a step overshot to.
func (p *program) remember(seen *cuts, at *place) bool {
	var s slopes
	if !p.differentiate(&at.x, &at.v, &s) {
		return false
	}
	i := seen.next
	seen.places[i], seen.slopes[i] = *at, s
	seen.next = (i + 1) % mostCuts
	seen.n = min(seen.n+1, mostCuts)
	return true
}

// cut adds the tangents of bent rows at remembered places. Where a row's value
// bulges upward, as the CCPP does on the ridge between water short of calcium
// and water short of carbonate, tangents from both sides lie above it and meet
// near the ridge, while one alone would send each step across it. A tangent that
// lies below the value at the present place says nothing and is left out; the
// same the other way up.
func (p *program) cut(l *linear, now *place, seen *cuts) {
	for c := range seen.n {
		at, s := &seen.places[c], &seen.slopes[c]
		for i := range p.rows {
			r := &p.rows[i]
			if !r.kind.bent() || l.m == maxRows || r.give > 0 {
				continue
			}
			constant, here := at.v[i], 0.0
			for j := range p.n {
				constant -= s[i][j] * at.x[j]
				here += s[i][j] * now.x[j]
			}
			here += constant
			low, high := math.Inf(-1), math.Inf(1)
			if here >= now.v[i] {
				low = r.low - constant
			}
			if here <= now.v[i] {
				high = r.high - constant
			}
			if math.IsInf(low, 0) && math.IsInf(high, 0) {
				continue
			}
			for j := range l.n {
				l.a[l.m][j] = 0
			}
			for j := range p.n {
				l.a[l.m][j] = s[i][j]
			}
			l.rowLow[l.m], l.rowHigh[l.m] = low, high
			l.m++
		}
	}
}
