package tui

import (
	"fmt"
	"math"
	"strconv"

	"beckline/dosing"
	"beckline/dosing/margin"
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
	target    dosing.Optional
	band      []margin.Range // of the pH, at equal steps like ph, for the readings' tolerances; nil where there is none
}

// samples is how many doses a curve is computed at.
const samples = 25

// bandSamples is how many doses the band is computed at; it is drawn by marks
// that stand apart.
const bandSamples = 13

// doseCurve computes the curve of a result by giving the solved addition other
// doses. An empty curve comes back where nothing was solved.
func doseCurve(r *dosing.Result, tol margin.Tolerances) curve {
	s := r.Dose()
	if s == nil || s.Dose <= 0 {
		return curve{}
	}
	perMole := s.Addition.Product.Chemical.MolarMass * 1000
	k := curve{dose: s.Dose * perMole, at: r.Finished().Figures.PH}
	if r.Case.Target.Kind == dosing.TargetPH {
		k.target = dosing.Some(r.Case.Target.Value)
	}
	k.top = niceAbove(k.dose * 1.4)
	k.step = niceAbove(k.dose * 0.01)
	doses := make([]float64, samples+1)
	for i := range samples {
		doses[i] = k.top / perMole * float64(i) / (samples - 1)
	}
	doses[samples] = (k.dose + k.step) / perMole
	points := dosing.PHAfter(r, doses)
	k.low, k.high = math.Inf(1), math.Inf(-1)
	for _, ph := range points[:samples] {
		if !ph.Given {
			break
		}
		k.ph = append(k.ph, ph.Value)
		k.low, k.high = min(k.low, ph.Value), max(k.high, ph.Value)
	}
	more := points[samples]
	if len(k.ph) < 2 || !more.Given {
		return curve{}
	}
	k.moves = more.Value - k.at
	k.low, k.high = math.Floor(k.low), math.Ceil(k.high)
	if k.high-k.low < 1 {
		k.high = k.low + 1
	}
	every := make([]float64, bandSamples)
	for i := range every {
		every[i] = k.top / perMole * float64(i) / (bandSamples - 1)
	}
	if band, err := margin.Band(r, tol, every); err == nil {
		k.band = band
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

// bandAt interpolates the band at a share of the dose axis.
func (k curve) bandAt(share float64) (margin.Range, bool) {
	x := share * (bandSamples - 1)
	i := int(x)
	if i+1 >= len(k.band) {
		return margin.Range{}, false
	}
	a, b, f := k.band[i], k.band[i+1], x-float64(i)
	r := margin.Range{Low: a.Low + f*(b.Low-a.Low), High: a.High + f*(b.High-a.High)}
	if math.IsNaN(r.Low) || math.IsNaN(r.High) {
		return r, false
	}
	return margin.Range{Low: max(r.Low, k.low), High: min(r.High, k.high)}, r.High > k.low && r.Low < k.high
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
	if k.target.Given && k.target.Value > k.low && k.target.Value < k.high {
		c.Set(plotX-1, y+k.row(k.target.Value, plotHeight), '▸', canvas.Faint)
	}
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

// bandApart is how many columns of dots stand between two marks of the band.
const bandApart = 8

// row is the row of cells, from the top, in which a pH lies.
func (k curve) row(ph float64, height int) int { return k.part(ph, height) }

// part is in which of so many equal parts of the axis, from the top, a pH lies.
// One on a boundary, as a target often is, must not flicker with the last bits.
func (k curve) part(ph float64, height int) int {
	return min(max(int((k.high-ph)/(k.high-k.low)*float64(height)+1e-6), 0), height-1)
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
		j := k.part(ph, rows)
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
	for i := 1; i < columns; i += bandApart {
		r, ok := k.bandAt((float64(i) + 0.5) / float64(columns))
		if !ok {
			continue
		}
		top, bottom := k.part(r.High, rows), k.part(r.Low, rows)
		for d := top; d <= bottom; d++ {
			cells[d/4*width+i/2] |= brailleDot[i%2][d%4]
		}
	}
	for i, bits := range cells {
		if bits != 0 {
			c.Set(x+i%width, y+i/width, 0x2800+bits, canvas.Curve)
		}
	}
}

func (k curve) marks(c *canvas.Canvas, x, y, width, height int) {
	for i := range width {
		if r, ok := k.bandAt((float64(i) + 0.5) / float64(width)); ok && i%2 == 0 {
			for row := k.row(r.High, height); row <= k.row(r.Low, height); row++ {
				c.Set(x+i, y+row, ':', canvas.Curve)
			}
		}
		if ph, ok := k.phAt((float64(i) + 0.5) / float64(width)); ok {
			c.Set(x+i, y+k.row(ph, height), '.', canvas.Curve)
		}
	}
}

// trimNumber writes an axis end without zeros that say nothing.
func trimNumber(v float64) string { return strconv.FormatFloat(v, 'g', 4, 64) }
