package curve

import (
	"fmt"
	"image/color"
	"math"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/plotter"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
)

// addTarget draws the target across the picture.
func addTarget(out *plot.Plot, s *Series) error {
	if !s.AtY.Given {
		return nil
	}
	y := s.Y.In(s.AtY.Value)
	left, right := ends(s)
	line, err := plotter.NewLine(plotter.XYs{{X: left, Y: y}, {X: right, Y: y}})
	if err != nil {
		return err
	}
	line.Color, line.Width, line.Dashes = grey, vg.Points(1), []vg.Length{4, 3}
	out.Add(line, note{left, y, fmt.Sprintf("target %.*f", s.Y.Decimals, y), true, true})
	return nil
}

// newWorking reports whether a series has a working point that no series before
// it marks already.
func (p Picture) newWorking(i int) bool {
	w := p.Series[i].Working
	if w == nil || !w.Y.Given {
		return false
	}
	for _, s := range p.Series[:i] {
		if v := s.Working; v != nil && near(v.X, w.X) && near(v.Y.Value, w.Y.Value) {
			return false
		}
	}
	return true
}

func near(a, b float64) bool { return math.Abs(a-b) <= 1e-6*math.Abs(b) }

// addWorking marks the plan as it stands.
func addWorking(out *plot.Plot, s *Series) error {
	at := plotter.XYs{{X: s.X.In(s.Working.X), Y: s.Y.In(s.Working.Y.Value)}}
	point, err := plotter.NewScatter(at)
	if err != nil {
		return err
	}
	point.Shape, point.Radius = draw.BoxGlyph{}, vg.Points(4.5)
	ring, err := plotter.NewScatter(at)
	if err != nil {
		return err
	}
	ring.Shape, ring.Radius = draw.RingGlyph{}, vg.Points(7)
	out.Add(point, ring)
	return nil
}

func addWorkingNote(out *plot.Plot, s *Series) {
	x := s.X.In(s.Working.X)
	right, above := freeSide(s, x)
	out.Add(note{x, s.Y.In(s.Working.Y.Value), workingText(s), right, above})
}

// freeSide finds the side of the working point on which the curve is not: a
// rising curve leaves the lower right and the upper left free.
func freeSide(s *Series, x float64) (right, above bool) {
	left, end := ends(s)
	right = x < 0.5*(left+end)
	var before, after *Point
	for i := range s.Points {
		p := &s.Points[i]
		if !p.Y.Given {
			continue
		}
		if s.X.In(p.X) <= x {
			before = p
		} else if after == nil {
			after = p
		}
	}
	rising := before == nil || after == nil || after.Y.Value >= before.Y.Value
	return right, rising != right
}

// workingText gives the dose at the working point, whichever axis it is on.
func workingText(s *Series) string {
	axis, v := s.Y, s.Working.Y.Value
	if s.AtY.Given {
		axis, v = s.X, s.Working.X
	}
	text := fmt.Sprintf("%.*f", fewer(axis.In(v), axis.Decimals), axis.In(v))
	if axis.Unit != "" {
		text += " " + axis.Unit
	}
	return text
}

// fewer lowers a number of decimals until v has at most four figures.
func fewer(v float64, decimals int) int {
	if v == 0 {
		return decimals
	}
	return max(0, min(decimals, 3-int(math.Floor(math.Log10(math.Abs(v))))))
}

// note is a text beside a point, on white so that lines do not cross it.
type note struct {
	x, y         float64 // in the units of the axes
	text         string
	right, above bool // of the point
}

// Plot draws the note.
func (n note) Plot(c draw.Canvas, plt *plot.Plot) {
	xAt, yAt := plt.Transforms(&c)
	style := plt.X.Tick.Label
	style.Rotation, style.XAlign, style.YAlign = 0, draw.XLeft, draw.YBottom
	style.Font = sansFont(9)
	width, height := style.Width(n.text), style.Height(n.text)
	at := vg.Point{X: xAt(n.x) + vg.Points(9), Y: yAt(n.y) + vg.Points(6)}
	if !n.right {
		at.X = xAt(n.x) - vg.Points(9) - width
	}
	if !n.above {
		at.Y = yAt(n.y) - vg.Points(6) - height
	}
	c.SetColor(color.White)
	c.Fill(vg.Rectangle{Min: vg.Point{X: at.X - 1, Y: at.Y - 1}, Max: vg.Point{X: at.X + width + 1, Y: at.Y + height}}.Path())
	c.FillText(style, at, n.text)
}

// ends are the first and last X of a series in the axis's unit.
func ends(s *Series) (left, right float64) {
	left, right = math.Inf(1), math.Inf(-1)
	for i := range s.Points {
		x := s.X.In(s.Points[i].X)
		left, right = min(left, x), max(right, x)
	}
	return left, right
}
