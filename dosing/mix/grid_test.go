package mix

import (
	"errors"
	"flag"
	"math"
	"math/rand/v2"
	"testing"

	"beckline/carbonate"
	"beckline/dosing"
)

var (
	cases  = flag.Int("cases", 200, "how many random mixes are compared with a grid")
	widest = flag.Int("widest", 3, "products in the largest of them; 4 takes minutes")
	finer  = flag.Int("finer", 1, "times as many points a product in the grid")
	seed   = flag.Uint64("seed", 1, "of the random mixes")
)

// randomTask draws a water, products, prices and limits. The ranges lie about
// the water that random doses make, so that many of the tasks have an answer;
// some ranges are then moved away from it.
func randomTask(t testing.TB, r *rand.Rand, n int) (task Task, ok bool) {
	uniform := func(lo, hi float64) float64 { return lo + (hi-lo)*r.Float64() }
	some := func(c carbonate.Component, lo, hi float64) dosing.Optional {
		return dosing.Some(milligrams(c, uniform(lo, hi)))
	}
	task.Base.Readings = dosing.Readings{
		PH:         dosing.Some(uniform(5.8, 8.2)),
		Kelvin:     dosing.Some(273.15 + uniform(1, 30)),
		Alkalinity: dosing.Some(2 * caco3(math.Exp(uniform(math.Log(5), math.Log(200))))),
		Calcium:    dosing.Some(milligrams(carbonate.Calcium, math.Exp(uniform(0, 4.5)))),
		Magnesium:  some(carbonate.Magnesium, 0, 15),
		Sodium:     some(carbonate.Sodium, 1, 40),
		Chloride:   some(carbonate.Chloride, 1, 60),
		Sulfate:    some(carbonate.Sulfate, 1, 80),
	}
	raw, err := dosing.Solve(task.Base)
	if err != nil {
		return task, false
	}
	names := []string{"caustic-25", "lime", "soda-ash", "bicarbonate", "carbon-dioxide", "sulfuric-93",
		"hydrochloric-32", "potassium-hydroxide-45", "magnesium-hydroxide-60"}
	r.Shuffle(len(names), func(i, j int) { names[i], names[j] = names[j], names[i] })
	aim := raw.Finished().Figures.Water
	for _, name := range names[:n] {
		c := candidate(t, name, uniform(0.1, 1))
		most := uniform(0.02, 0.12)
		c.Most = dosing.Some(most / c.Product.Strength)
		if r.Float64() < 0.2 {
			c.Least = dosing.Some(uniform(0.05, 0.4) * c.Most.Value)
		}
		task.Candidates = append(task.Candidates, c)
		if r.Float64() < 0.7 {
			aim = aim.Add(carbonate.Reagent{Adds: c.Product.Chemical.Adds, Equivalents: c.Product.Chemical.Equivalents}, most/c.Product.Chemical.MolarMass*uniform(0, 0.8))
		}
	}
	s, err := carbonate.Solve(aim)
	if err != nil || s.PH < 5.5 || s.PH > 10.5 {
		return task, false
	}
	about := func(q Quantity, chance, narrowest, widest float64) {
		v, ok := quantityOf(&s, q, false)
		if !ok || r.Float64() > chance {
			return
		}
		width := uniform(narrowest, widest)
		low := v - width*uniform(0.05, 0.95)
		if r.Float64() < 0.12 {
			low += width * uniform(-2, 2)
		}
		l := between(q, low, low+width)
		if low, _ := q.span(); l.Low.Value < low {
			l.Low = dosing.None
		}
		switch r.IntN(4) {
		case 0:
			l.Low = dosing.None
		case 1:
			l.High = dosing.None
		}
		if l.Low.Given || l.High.Value > 0 && l.High.Given {
			task.Limits = append(task.Limits, l)
		}
	}
	about(PH, 1, 0.2, 1.2)
	about(Alkalinity, 0.6, 2*caco3(5), 2*caco3(40))
	about(SaturationIndex, 0.5, 0.1, 1)
	about(CCPP, 0.5, caco3(2), caco3(15))
	about(Sodium, 0.4, milligrams(carbonate.Sodium, 4), milligrams(carbonate.Sodium, 25))
	about(Calcium, 0.3, milligrams(carbonate.Calcium, 4), milligrams(carbonate.Calcium, 25))
	about(ChlorideSulfate, 0.3, 0.1, 1)
	return task, len(task.Limits) > 0
}

// grid is the brute force: it knows the mathematics of the program only for
// turning a point into a water; costs and limits it takes from the task.
type grid struct {
	s       *solver
	price   vector // money per unit of dose
	best    float64
	found   bool
	x       vector
	near    vector
	nearest float64
}

// missed is by how much a water misses the limits, in all.
func (g *grid) missed(x *vector) float64 {
	state, err := g.s.set.k.Solve(g.s.p.at(x))
	if err != nil {
		return math.Inf(1)
	}
	sum := 0.0
	for i := range g.s.t.Limits {
		l := &g.s.t.Limits[i]
		v, ok := quantityOf(&state, l.Quantity, false)
		if !ok {
			return math.Inf(1)
		}
		if sum += l.miss(v) / g.s.unitOf(l); sum > 1 {
			break
		}
	}
	return sum
}

func (g *grid) visit(x *vector) {
	cost := 0.0
	for j := range g.s.p.n {
		if x[j] > 0 && x[j] < g.s.least[j] {
			return
		}
		cost += g.price[j] * x[j]
	}
	if g.found && cost >= g.best {
		return
	}
	missed := g.missed(x)
	if missed == 0 {
		g.best, g.x, g.found = cost, *x, true
	}
	if missed < g.nearest {
		g.near, g.nearest = *x, missed
	}
}

// search walks all doses, then finer grids around the best of them.
func (g *grid) search(points int) {
	p := g.s.p
	g.nearest = math.Inf(1)
	low, high := p.low, p.high
	for range 5 {
		var x vector
		g.walk(0, points, &x, &low, &high)
		around := g.near
		if g.found {
			around = g.x
		}
		for j := range p.n {
			half := 1.5 * (high[j] - low[j]) / float64(points-1)
			low[j], high[j] = max(0, around[j]-half), min(p.high[j], around[j]+half)
		}
	}
}

func (g *grid) walk(j, points int, x, low, high *vector) {
	if j == g.s.p.n {
		g.visit(x)
		return
	}
	for i := range points {
		x[j] = low[j] + (high[j]-low[j])*float64(i)/float64(points-1)
		g.walk(j+1, points, x, low, high)
	}
}

// TestNeverBeatenByGrid: on random tasks no point of a grid over all doses is
// cheaper than the answer, and where the answer is that there is none, no point
// of the grid keeps to the limits. The other way round a grid proves nothing: a
// mix that it steps over is still a mix. Those answers must be few, and are held
// to the limits like all others, by figures that know nothing of the search.
func TestNeverBeatenByGrid(t *testing.T) {
	r := rand.New(rand.NewPCG(*seed, 2))
	both, neither, thin := 0, 0, 0
	for k := 0; k < *cases; {
		n := 2 + r.IntN(*widest-1)
		task, ok := randomTask(t, r, n)
		if !ok {
			continue
		}
		k++
		s, problem := newSolver(task)
		if problem != nil {
			t.Fatalf("case %d: %v", k, problem)
		}
		g := grid{s: s}
		for j := range task.Candidates {
			g.price[j] = s.p.unit[j] * s.set.perMol[j]
		}
		g.search(map[int]int{2: 40, 3: 14, 4: 8}[n] * *finer)
		a, err := Solve(task)
		var no *Infeasible
		switch {
		case err != nil && !errors.As(err, &no):
			t.Errorf("case %d: %v", k, err)
		case err != nil && g.found:
			t.Errorf("case %d: no mix is said to exist, the grid finds one at %g: %v", k, g.best, g.x)
		case err != nil:
			neither++
			if len(no.Alone) == 0 && len(no.Together) == 0 {
				t.Errorf("case %d: nothing is said of why there is no mix", k)
			}
			for _, r := range no.Alone {
				checkRelaxation(t, task, r)
			}
		default:
			var x vector
			for _, d := range a.Best.Doses {
				x[d.Candidate] = d.Amount / s.p.unit[d.Candidate]
			}
			if m := g.missed(&x); m > 3*closure {
				t.Errorf("case %d: the mix misses its limits by %g", k, m)
			}
			if !g.found {
				thin++
				break
			}
			both++
			if g.best < a.Best.CostM3*(1-1e-6) {
				t.Errorf("case %d: costs %.9g, the grid finds %.9g", k, a.Best.CostM3, g.best)
			}
		}
	}
	t.Logf("%d answered by both, %d by neither, %d thinner than the grid", both, neither, thin)
	if both < *cases/2 || neither < *cases/40 || thin > *cases/20 {
		t.Errorf("%d, %d and %d of %d say little", both, neither, thin, *cases)
	}
}
