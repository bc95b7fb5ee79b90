package curve

import (
	"bytes"
	"errors"
	"fmt"
	"html"
	"image/color"
	"io"
	"math"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/font"
	"gonum.org/v1/plot/plotter"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"gonum.org/v1/plot/vg/vgimg"
	"gonum.org/v1/plot/vg/vgsvg"
)

// Picture is one or more series on the same axes.
type Picture struct {
	Title         string
	Footer        string // one line below, such as what to hold against it
	Series        []Series
	Width, Height float64 // mm, 60 to 1000; 0 means 170 by 120
	Dots          float64 // per inch of a PNG, 36 to 600; 0 means 150
}

const (
	defaultWidth, defaultHeight = 170.0, 120.0
	leastSide, greatestSide     = 60.0, 1000.0
	defaultDots                 = 150.0
	leastDots, greatestDots     = 36.0, 600.0
	marksUpTo                   = 40 // points of a series are marked where there are no more
)

// Errors of a picture.
var (
	ErrNothingToDraw  = errors.New("curve: no point of any series has an answer")
	ErrDifferentAxes  = errors.New("curve: the series do not share their axes")
	ErrTooManySeries  = errors.New("curve: more than 6 series cannot be told apart in grey")
	ErrPictureSize    = errors.New("curve: a picture has 60 to 1000 mm a side and 36 to 600 dots an inch")
	errDrawingStopped = errors.New("curve: the picture could not be drawn")
)

// SVG writes the picture with its fonts inside and its title as the text that a
// screen reader speaks. Errors: those above, and the writer's.
func (p Picture) SVG(w io.Writer) error {
	var b bytes.Buffer
	err := p.draw(&b, func(width, height vg.Length) vg.CanvasWriterTo {
		return vgsvg.NewWith(vgsvg.UseWH(width, height), vgsvg.EmbedFonts(true))
	})
	if err != nil {
		return err
	}
	head, body, found := bytes.Cut(b.Bytes(), []byte("<defs>"))
	if !found {
		return errDrawingStopped
	}
	for _, part := range [][]byte{head, []byte("<title>" + html.EscapeString(p.Title) + "</title>\n<defs>"), body} {
		if _, err := w.Write(part); err != nil {
			return err
		}
	}
	return nil
}

// PNG writes the picture as an image. Errors as SVG.
func (p Picture) PNG(w io.Writer) error {
	dots := orElse(p.Dots, defaultDots)
	if !(dots >= leastDots && dots <= greatestDots) {
		return ErrPictureSize
	}
	return p.draw(w, func(width, height vg.Length) vg.CanvasWriterTo {
		return vgimg.PngCanvas{Canvas: vgimg.NewWith(vgimg.UseWH(width, height), vgimg.UseDPI(int(dots)))}
	})
}

// draw renders on a canvas. The plotting library panics on what it cannot draw;
// that ends here.
func (p Picture) draw(w io.Writer, canvas func(width, height vg.Length) vg.CanvasWriterTo) (err error) {
	width, height := orElse(p.Width, defaultWidth), orElse(p.Height, defaultHeight)
	for _, side := range []float64{width, height} {
		if !(side >= leastSide && side <= greatestSide) {
			return ErrPictureSize
		}
	}
	if err := p.check(); err != nil {
		return err
	}
	defer func() {
		if r := recover(); r != nil {
			err = fmt.Errorf("%w: %v", errDrawingStopped, r)
		}
	}()
	drawn, err := p.plot()
	if err != nil {
		return err
	}
	c := canvas(vg.Length(width)*vg.Millimeter, vg.Length(height)*vg.Millimeter)
	whole := draw.New(c)
	whole.SetColor(color.White)
	whole.Fill(whole.Rectangle.Path())
	inside := draw.Crop(whole, 3*vg.Millimeter, -5*vg.Millimeter, 3*vg.Millimeter, -3*vg.Millimeter)
	if p.Footer != "" {
		style := drawn.X.Tick.Label
		style.XAlign, style.YAlign = draw.XLeft, draw.YBottom
		inside.FillText(style, vg.Point{X: inside.Min.X, Y: inside.Min.Y}, p.Footer)
		inside = draw.Crop(inside, 0, 0, 6*vg.Millimeter, 0)
	}
	drawn.Draw(inside)
	_, err = c.WriteTo(w)
	return err
}

func (p Picture) check() error {
	answered := 0
	for i := range p.Series {
		s := &p.Series[i]
		answered += s.Answered()
		if s.X.Title() != p.Series[0].X.Title() || s.Y.Title() != p.Series[0].Y.Title() || s.Kind != p.Series[0].Kind {
			return ErrDifferentAxes
		}
	}
	switch {
	case answered == 0:
		return ErrNothingToDraw
	case len(p.Series) > len(dashes):
		return ErrTooManySeries
	}
	return nil
}

// Lines differ by their dashes and marks, never by colour alone: black on white
// prints and copies.
var (
	dashes = [][]vg.Length{nil, {6, 3}, {1.5, 2.5}, {8, 3, 1.5, 3}, {3, 3}, {12, 4}}
	marks  = []draw.GlyphDrawer{draw.CircleGlyph{}, draw.SquareGlyph{}, draw.TriangleGlyph{}, draw.CrossGlyph{}, draw.PlusGlyph{}, draw.RingGlyph{}}
	grey   = color.Gray{Y: 110}

	paleGrey = color.Gray{Y: 215}
)

func (p Picture) plot() (*plot.Plot, error) {
	out := plot.New()
	sans(out)
	out.Title.Text = p.Title
	first := &p.Series[0]
	out.X.Label.Text, out.Y.Label.Text = first.X.Title(), first.Y.Title()
	grid := plotter.NewGrid()
	grid.Horizontal.Color, grid.Vertical.Color = paleGrey, paleGrey
	grid.Horizontal.Width, grid.Vertical.Width = vg.Points(0.5), vg.Points(0.5)
	out.Add(grid)
	// Words first: what is drawn later lies on top, and no word may hide a line.
	for i := range p.Series {
		if err := addTarget(out, &p.Series[i]); err != nil {
			return nil, err
		}
		if p.newWorking(i) {
			addWorkingNote(out, &p.Series[i])
		}
	}
	for i := range p.Series {
		if err := addSeries(out, &p.Series[i], i, len(p.Series) > 1); err != nil {
			return nil, err
		}
	}
	for i := range p.Series {
		if p.newWorking(i) {
			if err := addWorking(out, &p.Series[i]); err != nil {
				return nil, err
			}
		}
	}
	room(out, len(p.Series))
	if first.Kind == ByWater {
		nameTicks(out, first)
	} else {
		out.X.Tick.Marker = plainTicks{}
	}
	out.Y.Tick.Marker = plainTicks{}
	return out, nil
}

// addSeries draws one series in pieces, with a gap where there is no answer.
func addSeries(out *plot.Plot, s *Series, index int, legend bool) error {
	var shown []plot.Thumbnailer
	var all plotter.XYs
	for _, piece := range pieces(s) {
		all = append(all, piece...)
		line, err := plotter.NewLine(piece)
		if err != nil {
			return err
		}
		line.Width = vg.Points(1.4)
		line.Dashes = dashes[index]
		out.Add(line)
		shown = []plot.Thumbnailer{line}
	}
	if len(all) > 0 && len(all) <= marksUpTo {
		points, err := plotter.NewScatter(all)
		if err != nil {
			return err
		}
		points.Shape, points.Radius = marks[index], vg.Points(2.2)
		out.Add(points)
		shown = append(shown, points)
	}
	if legend && len(shown) > 0 {
		out.Legend.Add(s.Name, shown...)
	}
	return nil
}

// pieces are the stretches with answers, in the units of the axes.
func pieces(s *Series) []plotter.XYs {
	var out []plotter.XYs
	open := false
	for i := range s.Points {
		pt := &s.Points[i]
		if !pt.Y.Given {
			open = false
			continue
		}
		if !open {
			out = append(out, nil)
			open = true
		}
		last := &out[len(out)-1]
		*last = append(*last, plotter.XY{X: s.X.In(pt.X), Y: s.Y.In(pt.Y.Value)})
	}
	return out
}

// nameTicks puts the waters' names on the X axis, thinned to what can be read.
func nameTicks(out *plot.Plot, s *Series) {
	var ticks []plot.Tick
	for _, i := range thin(len(s.Points), 24) {
		ticks = append(ticks, plot.Tick{Value: s.X.In(s.Points[i].X), Label: cut(s.Points[i].Name, 14)})
	}
	out.X.Tick.Marker = plot.ConstantTicks(ticks)
	if len(ticks) > 6 {
		out.X.Tick.Label.Rotation = math.Pi / 4
		out.X.Tick.Label.XAlign, out.X.Tick.Label.YAlign = draw.XRight, draw.YCenter
	}
}

// room keeps lines off the frame and the legend, and gives a flat curve some
// height.
func room(out *plot.Plot, series int) {
	legend := 0.0
	if series > 1 {
		legend = 0.07 * float64(series)
	}
	for _, a := range []*plot.Axis{&out.X, &out.Y} {
		span := a.Max - a.Min
		if span <= 1e-9*max(math.Abs(a.Max), 1e-3) {
			span = max(0.2*math.Abs(a.Max), 0.1)
			a.Min, a.Max = a.Min-span/2, a.Max+span/2
			continue
		}
		a.Min, a.Max = a.Min-0.03*span, a.Max+0.05*span
		if a == &out.Y {
			a.Max += legend * span
		}
	}
}

func sansFont(points vg.Length) font.Font {
	return font.Font{Typeface: "Liberation", Variant: "Sans", Size: vg.Points(float64(points))}
}

// sans sets one plain typeface throughout; it comes with the plotting library.
func sans(out *plot.Plot) {
	out.Title.TextStyle.Font = sansFont(12)
	out.Title.Padding = vg.Points(6)
	for _, a := range []*plot.Axis{&out.X, &out.Y} {
		a.Label.TextStyle.Font = sansFont(10)
		a.Tick.Label.Font = sansFont(9)
	}
	out.Legend.TextStyle.Font = sansFont(9)
	out.Legend.Top, out.Legend.Left = true, true
}
