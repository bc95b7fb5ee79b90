package mix

import "math"

// place is a point that the search has been at.
type place struct {
	x      vector
	v      values
	cost   float64
	missed float64
}

// Tolerances of the search, in scaled rows and costs.
const (
	met          = 1e-9 // a row missed by less holds
	closeEnough  = 1e-9
	finest       = 1e-11 // a step of this size is no step
	longestStep  = 4.0
	descentSteps = 60
	leastFine    = 10.0 // see descent.fine
	stride       = 6    // steps that were no full success, between leaps
	same         = 1e-5 // units of dose within which two places are one
)

// descent is one way down.
type descent struct {
	p      *program
	l      linear
	now    place
	s      slopes
	fresh  bool    // the slopes were looked for here, not followed from elsewhere
	box    float64 // longest step of any dose
	fine   float64 // cost of what is missed, against the cost of the doses
	seen   cuts
	poor   int   // steps that fell short
	anchor place // where the last leap ended
	since  int   // steps since
}

// descend walks from x down to the nearest least cost: at each place the rows
// are taken as straight, the linear program is solved within a box of doses
// around it, and the box grows or shrinks with how well the straight rows
// foretold the true ones. Where the least cost is a corner of the limits, as it
// mostly is, the steps are Newton's and a handful is enough. ok is false where x
// cannot be evaluated.
func (p *program) descend(x vector, steps int) (place, bool) {
	return p.descendFrom(x, steps, nil, nil)
}

// descendFrom is descend with slopes to begin with, where they are at hand from
// nearby, and with a place that is known: it ends as soon as it comes there.
func (p *program) descendFrom(x vector, steps int, from *slopes, known *place) (place, bool) {
	for j := range p.n {
		x[j] = min(max(x[j], p.low[j]), p.high[j])
	}
	d := descent{p: p, box: longestStep, fine: leastFine}
	var ok bool
	if d.now, ok = p.place(x); !ok {
		return d.now, false
	}
	if from != nil {
		d.s = *from
	} else if !d.look() {
		return d.now, false
	}
	d.anchor = d.now
	for range steps {
		if known != nil && d.now.missed <= met && distance(&d.now.x, &known.x) < same {
			break
		}
		if !d.advance() {
			break
		}
	}
	return d.now, true
}

// look works out the slopes where the descent is.
func (d *descent) look() bool {
	d.fresh = d.p.differentiate(&d.now.x, &d.now.v, &d.s)
	return d.fresh
}

// advance makes one step; false ends the descent.
func (d *descent) advance() bool {
	p := d.p
	step, dual, foretold, ok := p.step(&d.l, &d.now, &d.s, d.box, nil, &d.seen)
	if !ok {
		return false
	}
	gain := d.worth(dual, foretold)
	length := distance(&step, &d.now.x)
	if gain <= closeEnough*(1+math.Abs(d.now.cost)) || length < finest {
		// By slopes that were only followed, look again before ending.
		return !d.fresh && d.look()
	}
	next, ok := p.place(step)
	if !ok {
		d.box = 0.25 * length
		return true
	}
	won := d.value(&d.now) - d.value(&next)
	if won < 0.75*gain && next.missed > met {
		// The rows bent away: aim again with what they really were.
		if again, ok := p.correct(&d.l, &d.now, &d.s, d.box, &step, &next); ok && d.value(&again) < d.value(&next) {
			next = again
			won = d.value(&d.now) - d.value(&next)
		}
	}
	good := won >= 0.75*gain
	if good {
		d.box = min(max(d.box, 2*length), 4*longestStep)
	} else if won < 0.25*gain && d.fresh {
		if d.poor++; d.poor%2 == 0 || !p.remember(&d.seen, &next) {
			d.box = 0.4 * length
		}
	}
	taken := won > 0 && won >= 0.01*gain
	if taken {
		if good {
			p.follow(&d.now, &next, &d.s)
		}
		d.now, d.fresh = next, false
	}
	if good {
		return true
	}
	if !d.fresh && !d.look() {
		return false
	}
	if d.since++; d.since == stride {
		d.leap()
	}
	return true
}

// worth is what a step promises, in cost and in what is missed. Getting nearer to
// the limits comes before what that costs: where it would not pay, the price of
// what is missed is raised.
func (d *descent) worth(dual float64, foretold promise) float64 {
	d.fine = max(d.fine, 2*dual)
	dearer, nearer := foretold.cost-d.now.cost, d.now.missed-foretold.missed
	if gain := d.fine*nearer - dearer; d.now.missed > met && nearer > 0.1*d.now.missed && gain < 0.5*d.fine*nearer {
		d.fine = 2 * dearer / nearer
	}
	return d.fine*nearer - dearer
}

// value is what a place is worth to the descent.
func (d *descent) value(at *place) float64 { return at.cost + d.fine*at.missed }

// leap is for descents that creep along a curve: it goes on the way that the last
// steps went together, further each time while that pays; a step at each landing
// brings it back to the rows.
func (d *descent) leap() {
	p := d.p
	from, best := d.now, d.now
	length := distance(&d.anchor.x, &from.x)
	for far := 1.0; length > 0 && far <= 64; far *= 2 {
		x := from.x
		for j := range p.n {
			x[j] = min(max(x[j]+far*(from.x[j]-d.anchor.x[j]), p.low[j]), p.high[j])
		}
		landed, ok := p.place(x)
		if !ok {
			break
		}
		back, _, _, ok := p.step(&d.l, &landed, &d.s, 0.3*length*far, nil, nil)
		if !ok {
			break
		}
		if landed, ok = p.place(back); !ok || d.value(&landed) >= d.value(&best) {
			break
		}
		best = landed
	}
	if moved := distance(&best.x, &from.x); moved > 0 {
		d.now, d.box = best, max(d.box, moved)
		d.look()
	}
	d.anchor, d.since = d.now, 0
}

// place evaluates a point.
func (p *program) place(x vector) (place, bool) {
	pl := place{x: x}
	var ok bool
	if pl.v, ok = p.evaluate(&x); !ok {
		return pl, false
	}
	pl.cost, pl.missed = p.judge(&pl.x, &pl.v)
	return pl, true
}

// follow turns the slopes by what a step has shown of them (Broyden 1965, Math.
// Comp. 19, 577-593), which costs nothing, while a look around costs a solve a
// product.
func (p *program) follow(from, to *place, s *slopes) {
	var d vector
	square := 0.0
	for j := range p.n {
		d[j] = to.x[j] - from.x[j]
		square += d[j] * d[j]
	}
	if square == 0 {
		return
	}
	for i := range p.rows {
		if !p.rows[i].kind.bent() {
			continue
		}
		off := to.v[i] - from.v[i]
		for j := range p.n {
			off -= s[i][j] * d[j]
		}
		for j := range p.n {
			if d[j] != 0 {
				s[i][j] += off * d[j] / square
			}
		}
	}
}

// promise is what the straight rows say of a step.
type promise struct{ cost, missed float64 }

// correct repeats a step with the rows' values as they were found at its end.
func (p *program) correct(l *linear, now *place, s *slopes, box float64, step *vector, found *place) (place, bool) {
	var off values
	for i := range p.rows {
		straight := now.v[i]
		for j := range p.n {
			straight += s[i][j] * (step[j] - now.x[j])
		}
		off[i] = found.v[i] - straight
	}
	again, _, _, ok := p.step(l, now, s, box, &off, nil)
	if !ok {
		return place{}, false
	}
	return p.place(again)
}

// step solves the linear program around a place. off, where given, shifts the
// rows; seen, where given, adds what is known from other places. Rows that
// cannot all be met within the box are met as nearly as can be.
func (p *program) step(l *linear, now *place, s *slopes, box float64, off *values, seen *cuts) (x vector, dual float64, foretold promise, ok bool) {
	p.fill(l, now, s, box, off)
	var result outcome
	for i := range p.rows {
		if r := &p.rows[i]; r.give > 0 {
			l.soften(i, r.give)
		}
	}
	held := l.n
	if seen != nil {
		p.cut(l, now, seen)
	}
	result = l.solve()
	if result == infeasible && l.m > len(p.rows) {
		l.m = len(p.rows)
		result = l.solve()
	}
	if result == infeasible {
		// As near as can be, in the sum of what is missed.
		l.n = held
		for i := range p.rows {
			if p.rows[i].give == 0 {
				l.soften(i, 1e4)
			}
		}
		result = l.solve()
	}
	if result != optimal {
		return x, 0, promise{}, false
	}
	for j := range p.n {
		x[j] = l.x[j]
	}
	for i := range p.rows {
		r := &p.rows[i]
		if r.give == 0 && l.n == held {
			dual = max(dual, math.Abs(l.dual[i]))
		}
		v := now.v[i]
		if off != nil {
			v += off[i]
		}
		for j := range p.n {
			v += s[i][j] * (x[j] - now.x[j])
		}
		if m := r.miss(v); r.give > 0 {
			foretold.cost += r.give * m
		} else {
			foretold.missed += m
		}
	}
	for j := range p.n {
		foretold.cost += p.cost[j] * x[j]
	}
	return x, dual, foretold, true
}

// fill writes the straight rows and the box.
func (p *program) fill(l *linear, now *place, s *slopes, box float64, off *values) {
	l.n, l.m = p.n, len(p.rows)
	for j := range p.n {
		l.cost[j] = p.cost[j]
		l.low[j] = max(p.low[j], now.x[j]-box)
		l.high[j] = min(p.high[j], now.x[j]+box)
	}
	for i := range p.rows {
		r := &p.rows[i]
		constant := now.v[i]
		if off != nil {
			constant += off[i]
		}
		for j := range p.n {
			constant -= s[i][j] * now.x[j]
			l.a[i][j] = s[i][j]
		}
		l.rowLow[i], l.rowHigh[i] = r.low-constant, r.high-constant
	}
}

// soften lets row i give way at a price, by a slack on each side.
func (l *linear) soften(i int, price float64) {
	for side := -1.0; side <= 1; side += 2 {
		if side < 0 && math.IsInf(l.rowHigh[i], 0) || side > 0 && math.IsInf(l.rowLow[i], 0) {
			continue
		}
		j := l.n
		l.n++
		for r := range l.m {
			l.a[r][j] = 0
		}
		l.a[i][j] = side
		l.cost[j], l.low[j], l.high[j] = price, 0, 1e6
	}
}

func distance(a, b *vector) float64 {
	d := 0.0
	for j := range a {
		d = max(d, math.Abs(a[j]-b[j]))
	}
	return d
}
