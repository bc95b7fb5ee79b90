package tui

import (
	"fmt"
	"math"
	"strconv"

	"beckline/dosing"
	"beckline/tui/canvas"
)

// curve is the finished pH against the dose of the chemical that was solved
// for, with the point that was found.
type curve struct {
	ph        []float64 // at equal steps of the dose from 0 to top
	top       float64   // mg/L of the chemical's formula
	low, high float64   // the axis of pH
	dose      float64   // mg/L
	step      float64   // mg/L, about a hundredth of the dose
	moves     float64   // pH that a step more moves it
	at        float64   // pH at the dose
}

// samples is how many doses a curve is computed at.
const samples = 25

// doseCurve computes the curve of a result by giving the solved addition other
// doses. An empty curve comes back where nothing was solved.
func doseCurve(r *dosing.Result, solve Solver) curve {
	s := r.Dose()
	if s == nil || s.Dose <= 0 {
		return curve{}
	}
	perMole := s.Addition.Product.Chemical.MolarMass * 1000
	k := curve{dose: s.Dose * perMole, at: r.Finished().Figures.PH}
	k.top = niceAbove(k.dose * 1.4)
	k.step = niceAbove(k.dose * 0.01)
	c := r.Case
	c.Target = dosing.Target{}
	c.Additions = append([]dosing.Addition(nil), c.Additions...)
	a := &c.Additions[r.Solved-1]
	a.Solve = false
	a.Feed.PumpCapacity = dosing.None // a pump too small is no reason to end the curve
	k.low, k.high = math.Inf(1), math.Inf(-1)
	for i := range samples {
		a.Dose = dosing.Some(k.top / perMole * float64(i) / (samples - 1))
		point, err := solve(c)
		if err != nil {
			break
		}
		ph := point.Finished().Figures.PH
		k.ph = append(k.ph, ph)
		k.low, k.high = min(k.low, ph), max(k.high, ph)
	}
	a.Dose = dosing.Some((k.dose + k.step) / perMole)
	more, err := solve(c)
	if len(k.ph) < 2 || err != nil {
		return curve{}
	}
	k.moves = more.Finished().Figures.PH - k.at
	k.low, k.high = math.Floor(k.low), math.Ceil(k.high)
	if k.high-k.low < 1 {
		k.high = k.low + 1
	}
	return k
}

// steepness says in words how far a little more of the chemical moves the pH.
// The bounds between the words are our own: twitchy is where one step of a
// hundredth moves the pH further than meters tell apart.
func (k curve) steepness() string {
	word := "twitchy"
	switch size := math.Abs(k.moves); {
	case size < 0.02:
		word = "steady"
	case size < 0.05:
		word = "lively"
	}
	decimals := 2
	if math.Abs(k.moves) < 0.01 {
		decimals = 3
	}
	return trimNumber(k.step) + " mg/L more: pH " + fmt.Sprintf("%+.*f", decimals, k.moves) + ", " + word
}

// niceAbove returns the next of 1, 1.5, 2, 3, 4, 5, 6, 8 times a power of ten,
// so that the axis stays while the dose moves a little.
func niceAbove(v float64) float64 {
	power := math.Pow(10, math.Floor(math.Log10(v)))
	for _, n := range []float64{1, 1.5, 2, 3, 4, 5, 6, 8, 10} {
		if v <= n*power*(1+1e-12) {
			return n * power
		}
	}
	return 10 * power
}

// phAt interpolates the curve at a share of the dose axis.
func (k curve) phAt(share float64) (float64, bool) {
	x := share * (samples - 1)
	i := int(x)
	if i >= len(k.ph)-1 {
		if i == len(k.ph)-1 {
			return k.ph[i], true
		}
		return 0, false
	}
	return k.ph[i] + (x-float64(i))*(k.ph[i+1]-k.ph[i]), true
}

// brailleDot holds the bit of each of the 2 × 4 dots of a cell, by column and row.
var brailleDot = [2][4]rune{{0x01, 0x02, 0x04, 0x40}, {0x08, 0x10, 0x20, 0x80}}

// draw puts the curve into a frame of cells: the axis of pH takes the first
// four columns, the axis of the dose the last row.
func (k curve) draw(c *canvas.Canvas, x, y, width, height int, braille bool) {
	if len(k.ph) == 0 || width < 12 || height < 4 {
		return
	}
	plotX, plotWidth, plotHeight := x+3, width-3, height-1
	c.Right(x+2, y, strconv.Itoa(int(k.high)), canvas.Faint)
	c.Right(x+2, y+plotHeight-1, strconv.Itoa(int(k.low)), canvas.Faint)
	c.Text(plotX, y+plotHeight, "0", canvas.Faint)
	c.Right(x+width, y+plotHeight, trimNumber(k.top), canvas.Faint)
	if braille {
		k.dots(c, plotX, y, plotWidth, plotHeight)
	} else {
		k.marks(c, plotX, y, plotWidth, plotHeight)
	}
	// The working point.
	px := plotX + min(int(k.dose/k.top*float64(plotWidth)), plotWidth-1)
	py := y + k.row(k.at, plotHeight)
	c.Set(px, py, '●', canvas.Curve)
}

// row is the row of cells, from the top, in which a pH lies.
func (k curve) row(ph float64, height int) int {
	return min(max(int((k.high-ph)/(k.high-k.low)*float64(height)), 0), height-1)
}

func (k curve) dots(c *canvas.Canvas, x, y, width, height int) {
	cells := make([]rune, width*height)
	columns, rows := 2*width, 4*height
	last := -1
	for i := range columns {
		ph, ok := k.phAt((float64(i) + 0.5) / float64(columns))
		if !ok {
			break
		}
		j := min(max(int((k.high-ph)/(k.high-k.low)*float64(rows)), 0), rows-1)
		from, to := j, j
		if last >= 0 && last-j > 1 {
			to = last - 1
		} else if last >= 0 && j-last > 1 {
			from = last + 1
		}
		for d := from; d <= to; d++ {
			cells[d/4*width+i/2] |= brailleDot[i%2][d%4]
		}
		last = j
	}
	for i, bits := range cells {
		if bits != 0 {
			c.Set(x+i%width, y+i/width, 0x2800+bits, canvas.Curve)
		}
	}
}

func (k curve) marks(c *canvas.Canvas, x, y, width, height int) {
	for i := range width {
		if ph, ok := k.phAt((float64(i) + 0.5) / float64(width)); ok {
			c.Set(x+i, y+k.row(ph, height), '.', canvas.Curve)
		}
	}
}

// trimNumber writes an axis end without zeros that say nothing.
func trimNumber(v float64) string { return strconv.FormatFloat(v, 'g', 4, 64) }
