package curve_test

import (
	"bytes"
	"encoding/xml"
	"errors"
	"image"
	"image/color"
	"image/png"
	"io"
	"math"
	"strings"
	"testing"

	"beckline/dosing"
	"beckline/dosing/curve"
)

func titration(t *testing.T) curve.Series {
	t.Helper()
	s, err := curve.Titration(upland(), 0)
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// texts are the words in an SVG, which must be well-formed XML.
func texts(t *testing.T, svg []byte) string {
	t.Helper()
	d := xml.NewDecoder(bytes.NewReader(svg))
	var words []string
	inside := ""
	for {
		token, err := d.Token()
		if err == io.EOF {
			return strings.Join(words, "|")
		}
		if err != nil {
			t.Fatal(err)
		}
		switch e := token.(type) {
		case xml.StartElement:
			inside = e.Name.Local
		case xml.EndElement:
			inside = ""
		case xml.CharData:
			if inside == "text" || inside == "title" {
				words = append(words, string(e))
			}
		}
	}
}

// TestSVG: labelled axes with their units, the target and the working point, the
// fonts inside, nothing to be fetched, and the same bytes every time.
func TestSVG(t *testing.T) {
	p := curve.Picture{Title: "Titration of <this> water", Footer: "Confirm at the bench.", Series: []curve.Series{titration(t)}}
	var b, again bytes.Buffer
	if err := p.SVG(&b); err != nil {
		t.Fatal(err)
	}
	words := texts(t, b.Bytes())
	for _, want := range []string{"Titration of <this> water", "dose of sodium hydroxide (mg/L as NaOH)", "pH of the finished water",
		"target 8.40", "15.85 mg/L as NaOH", "Confirm at the bench."} {
		if !strings.Contains(words, want) {
			t.Errorf("%q is not in %s", want, words)
		}
	}
	if !bytes.Contains(b.Bytes(), []byte("@font-face")) || !bytes.Contains(b.Bytes(), []byte("url(data:font")) {
		t.Error("the fonts are not inside")
	}
	if bytes.Contains(b.Bytes(), []byte("url(http")) || bytes.Contains(b.Bytes(), []byte("<image")) {
		t.Error("something is to be fetched")
	}
	if err := p.SVG(&again); err != nil || !bytes.Equal(b.Bytes(), again.Bytes()) {
		t.Error("the second picture differs", err)
	}
}

// TestPNG: the size asked for, greys only, and ink on paper.
func TestPNG(t *testing.T) {
	s := seasons(t)
	second, err := curve.OverTemperature(upland(), curve.Span(273.15, 297.15, 13), curve.HoldReadings)
	if err != nil {
		t.Fatal(err)
	}
	p := curve.Picture{Title: "Seasons", Series: []curve.Series{s, second}, Width: 100, Height: 80, Dots: 127}
	var b bytes.Buffer
	if err := p.PNG(&b); err != nil {
		t.Fatal(err)
	}
	img, err := png.Decode(&b)
	if err != nil {
		t.Fatal(err)
	}
	size := img.Bounds().Size()
	if math.Abs(float64(size.X)-500) > 2 || math.Abs(float64(size.Y)-400) > 2 {
		t.Errorf("%v", size)
	}
	dark := 0
	for y := range size.Y {
		for x := range size.X {
			r, g, bl, a := img.At(x, y).RGBA()
			if r != g || g != bl || a != 0xffff {
				t.Fatalf("pixel %d,%d is %v", x, y, img.At(x, y))
			}
			if r < 0x8000 {
				dark++
			}
		}
	}
	if share := float64(dark) / float64(size.X*size.Y); share < 0.005 || share > 0.2 {
		t.Errorf("%.3f of the picture is dark", share)
	}
	if corner(img) != (color.Gray{Y: 255}) {
		t.Errorf("the margin is %v", corner(img))
	}
}

func corner(img image.Image) color.Color { return color.GrayModel.Convert(img.At(0, 0)) }

// TestPictureGap: a point without an answer leaves a gap, so its neighbours are
// not joined.
func TestPictureGap(t *testing.T) {
	whole := seasons(t)
	gap := seasons(t)
	gap.Working, whole.Working = nil, nil
	gap.Points[6].Y, gap.Points[6].Result = dosing.None, nil
	count := func(s curve.Series) int {
		var b bytes.Buffer
		if err := (curve.Picture{Series: []curve.Series{s}}).SVG(&b); err != nil {
			t.Fatal(err)
		}
		return strings.Count(b.String(), "stroke-width:1.4")
	}
	if a, b := count(whole), count(gap); a != 1 || b != 2 {
		t.Errorf("%d line without a gap, %d with one", a, b)
	}
}

// TestPictureWorking: two series through one working point mark it once; a dose
// is written with four figures at most.
func TestPictureWorking(t *testing.T) {
	s := seasons(t)
	s2, err := curve.OverTemperature(upland(), curve.Span(273.15, 297.15, 13), curve.HoldReadings)
	if err != nil {
		t.Fatal(err)
	}
	acid, err := curve.Titration(wash(), 0)
	if err != nil {
		t.Fatal(err)
	}
	for want, series := range map[string][]curve.Series{"15.85 mg/L as NaOH": {s, s2}, "466.4 mg/L as H2SO4": {acid}} {
		var b bytes.Buffer
		if err := (curve.Picture{Series: series}).SVG(&b); err != nil {
			t.Fatal(err)
		}
		if n := strings.Count(texts(t, b.Bytes()), want); n != 1 {
			t.Errorf("%q stands %d times in %s", want, n, texts(t, b.Bytes()))
		}
	}
}

// TestPictureOfWaters: the waters' names stand on the axis.
func TestPictureOfWaters(t *testing.T) {
	var waters []curve.Water
	for _, month := range []string{"Jan", "Feb", "Mar", "Apr", "May", "Jun", "Jul", "Aug"} {
		waters = append(waters, curve.Water{Name: month, Readings: upland().Readings})
	}
	s, err := curve.OverWaters(upland(), waters) // all alike: a flat line
	if err != nil {
		t.Fatal(err)
	}
	var b bytes.Buffer
	if err := (curve.Picture{Title: "A year", Series: []curve.Series{s}}).SVG(&b); err != nil {
		t.Fatal(err)
	}
	if words := texts(t, b.Bytes()); !strings.Contains(words, "Jan|Feb|Mar") || strings.Contains(words, "NaN") {
		t.Error(words)
	}
}

func TestPictureRefusals(t *testing.T) {
	s := seasons(t)
	empty := s
	empty.Points = nil
	many := curve.Picture{}
	for range 7 {
		many.Series = append(many.Series, s)
	}
	for name, c := range map[string]struct {
		p    curve.Picture
		want error
	}{
		"nothing":         {curve.Picture{}, curve.ErrNothingToDraw},
		"no answers":      {curve.Picture{Series: []curve.Series{empty}}, curve.ErrNothingToDraw},
		"different axes":  {curve.Picture{Series: []curve.Series{s, titration(t)}}, curve.ErrDifferentAxes},
		"too many":        {many, curve.ErrTooManySeries},
		"too small":       {curve.Picture{Series: []curve.Series{s}, Width: 10}, curve.ErrPictureSize},
		"not a number":    {curve.Picture{Series: []curve.Series{s}, Height: math.Inf(1)}, curve.ErrPictureSize},
		"dots too coarse": {curve.Picture{Series: []curve.Series{s}, Dots: 5}, curve.ErrPictureSize},
	} {
		var b bytes.Buffer
		if err := c.p.PNG(&b); !errors.Is(err, c.want) || b.Len() != 0 {
			t.Errorf("%s: %v, %d bytes", name, err, b.Len())
		}
	}
}
