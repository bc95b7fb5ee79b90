package margin

import (
	"math/rand/v2"
	"sync"

	"gonum.org/v1/gonum/mathext"
	"gonum.org/v1/gonum/stat/distuv"
	"gonum.org/v1/gonum/stat/sampleuv"
)

// The draws are the same each time: a margin that changed from one look to the
// next would not be believed.
const (
	designStream = 20
	// Temperatures are drawn at this many equally likely points, so that each
	// needs its equilibrium constants once.
	temperaturePoints = 1000
)

// column holds one reading's draws in standard deviations. For a temperature
// they stand on the points, and point says on which.
type column struct {
	z     []float64
	point []int
}

var designs struct {
	sync.Mutex
	columns map[design]*column
}

// design is which column: its number, whether it is a temperature's, how long.
type design struct {
	number      int
	temperature bool
	length      int
}

// columnFor is the Latin hypercube sample of a reading, n long. Each reading has
// its own stream, so its draws do not hang on which others vary.
func columnFor(number int, temperature bool, n int) *column {
	designs.Lock()
	defer designs.Unlock()
	key := design{number, temperature, n}
	if c := designs.columns[key]; c != nil {
		return c
	}
	c := &column{z: make([]float64, n)}
	source := rand.NewPCG(designStream, uint64(number))
	if temperature {
		sampleuv.LatinHypercube{Q: distuv.UnitUniform, Src: source}.Sample(c.z)
		points := temperatures()
		c.point = make([]int, n)
		for i, u := range c.z {
			c.point[i] = min(int(u*temperaturePoints), temperaturePoints-1)
			c.z[i] = points[c.point[i]]
		}
	} else {
		sampleuv.LatinHypercube{Q: distuv.UnitNormal, Src: source}.Sample(c.z)
	}
	if designs.columns == nil || len(designs.columns) > 100 {
		designs.columns = map[design]*column{}
	}
	designs.columns[key] = c
	return c
}

// temperatures are the points, in standard deviations: the middles of equally
// likely slices.
var temperatures = sync.OnceValue(func() []float64 {
	z := make([]float64, temperaturePoints)
	for i := range z {
		z[i] = mathext.NormalQuantile((float64(i) + 0.5) / temperaturePoints)
	}
	return z
})
