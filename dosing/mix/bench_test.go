package mix

import (
	"errors"
	"math/rand/v2"
	"testing"
)

// BenchmarkSixUnderEight is a task whose saturation limits do not bind.
func BenchmarkSixUnderEight(b *testing.B) { benchmark(b, sixUnderEight(b)) }

// BenchmarkSixUnderEightSaturated is one in which the CCPP decides, so that the
// search has to look into several valleys.
func BenchmarkSixUnderEightSaturated(b *testing.B) {
	task := sixUnderEight(b)
	task.Limits[2] = between(CCPP, caco3(1), caco3(6))
	a := solve(b, task)
	binds := false
	for _, bound := range a.Best.Binding {
		binds = binds || bound.Quantity == CCPP
	}
	if !binds {
		b.Fatal("the CCPP does not bind")
	}
	benchmark(b, task)
}

// BenchmarkExplained also prices every limit and finds three other mixes.
func BenchmarkExplained(b *testing.B) {
	task := sixUnderEight(b)
	task.Explain, task.Alternatives = true, 3
	benchmark(b, task)
}

// BenchmarkInfeasible finds out what conflicts.
func BenchmarkInfeasible(b *testing.B) {
	task := sixUnderEight(b)
	task.Limits[1] = between(Alkalinity, 2*caco3(130), 2*caco3(140))
	for b.Loop() {
		if _, err := Solve(task); !errors.As(err, new(*Infeasible)) {
			b.Fatal(err)
		}
	}
}

// BenchmarkRandomSix is the mean over random tasks with six products, those
// without an answer included.
func BenchmarkRandomSix(b *testing.B) {
	r := rand.New(rand.NewPCG(21, 22))
	var solvers []*solver
	for len(solvers) < 50 {
		if task, ok := randomTask(b, r, 6); ok {
			s, problem := newSolver(task)
			if problem != nil {
				b.Fatal(problem)
			}
			solvers = append(solvers, s)
		}
	}
	i := 0
	for b.Loop() {
		s := solvers[i%len(solvers)]
		s.p.leastCost(&s.least, 0)
		i++
	}
}

func benchmark(b *testing.B, task Task) {
	for b.Loop() {
		if _, err := Solve(task); err != nil {
			b.Fatal(err)
		}
	}
}
