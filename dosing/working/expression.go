package working

import (
	"fmt"
	"math"
	"strconv"
	"strings"
)

// expression is a formula of numbers, names, + - * / ^, parentheses, sqrt and
// log10, cut into words. ^ binds to the right and closer than a sign.
type expression struct {
	text  string
	words []word
}

type word struct {
	from, to int // in text
	number   float64
	kind     byte // '0' number, 'a' name, 'f' function, else the sign itself
}

func parse(text string) (expression, error) {
	e := expression{text: text}
	for i := 0; i < len(text); {
		c := text[i]
		from := i
		switch {
		case c == ' ':
			i++
			continue
		case digit(c) || c == '.':
			for i < len(text) && (digit(text[i]) || text[i] == '.' || exponent(text, i)) {
				i++
			}
			v, err := strconv.ParseFloat(text[from:i], 64)
			if err != nil {
				return e, fmt.Errorf("working: number in %q: %w", text, err)
			}
			e.words = append(e.words, word{from, i, v, '0'})
		case letter(c):
			for i < len(text) && (letter(text[i]) || digit(text[i])) {
				i++
			}
			kind := byte('a')
			if name := text[from:i]; name == "sqrt" || name == "log10" {
				kind = 'f'
			}
			e.words = append(e.words, word{from, i, 0, kind})
		case strings.IndexByte("+-*/^()", c) >= 0:
			i++
			e.words = append(e.words, word{from, i, 0, c})
		default:
			return e, fmt.Errorf("working: %q in %q", c, text)
		}
	}
	return e, nil
}

func digit(c byte) bool  { return c >= '0' && c <= '9' }
func letter(c byte) bool { return c >= 'a' && c <= 'z' || c >= 'A' && c <= 'Z' || c == '_' }

// exponent tells whether text[i] belongs to the exponent of a number.
func exponent(text string, i int) bool {
	if text[i] == 'e' {
		return i+1 < len(text) && (digit(text[i+1]) || text[i+1] == '-' || text[i+1] == '+')
	}
	return (text[i] == '-' || text[i] == '+') && text[i-1] == 'e'
}

// value works the expression with the names' values.
func (e expression) value(names map[string]float64) (float64, error) {
	w := worker{e: e, names: names}
	v := w.sum()
	if w.err == nil && w.at < len(e.words) {
		w.err = fmt.Errorf("working: %q goes on", e.text)
	}
	return v, w.err
}

// worker works an expression by descent: sum, product, sign, power, atom.
type worker struct {
	e     expression
	names map[string]float64
	at    int
	err   error
}

func (w *worker) next(kinds string) byte {
	if w.at < len(w.e.words) && strings.IndexByte(kinds, w.e.words[w.at].kind) >= 0 {
		w.at++
		return w.e.words[w.at-1].kind
	}
	return 0
}

func (w *worker) sum() float64 {
	v := w.product()
	for {
		switch w.next("+-") {
		case '+':
			v += w.product()
		case '-':
			v -= w.product()
		default:
			return v
		}
	}
}

func (w *worker) product() float64 {
	v := w.sign()
	for {
		switch w.next("*/") {
		case '*':
			v *= w.sign()
		case '/':
			v /= w.sign()
		default:
			return v
		}
	}
}

func (w *worker) sign() float64 {
	if w.next("-") != 0 {
		return -w.sign()
	}
	v := w.atom()
	if w.next("^") != 0 {
		return math.Pow(v, w.sign())
	}
	return v
}

func (w *worker) atom() float64 {
	if w.at >= len(w.e.words) {
		w.fail("ends too soon")
		return 0
	}
	this := w.e.words[w.at]
	name := w.e.text[this.from:this.to]
	w.at++
	switch this.kind {
	case '0':
		return this.number
	case 'a':
		v, ok := w.names[name]
		if !ok {
			w.fail("does not know " + name)
		}
		return v
	case 'f', '(':
		if this.kind == 'f' && w.next("(") == 0 {
			w.fail("wants ( after " + name)
		}
		v := w.sum()
		if w.next(")") == 0 {
			w.fail("wants )")
		}
		switch name {
		case "sqrt":
			return math.Sqrt(v)
		case "log10":
			return math.Log10(v)
		}
		return v
	}
	w.fail("has a stray " + name)
	return 0
}

func (w *worker) fail(why string) {
	if w.err == nil {
		w.err = fmt.Errorf("working: %q %s", w.e.text, why)
	}
}

// numbers is the expression with the names' values written in, to so many
// significant digits; numbers in the formula itself stay as they are.
func (e expression) numbers(names map[string]float64, digits int) string {
	var b strings.Builder
	last := 0
	for _, w := range e.words {
		if w.kind != 'a' {
			continue
		}
		b.WriteString(e.text[last:w.from])
		v := write(names[e.text[w.from:w.to]], digits)
		if v[0] == '-' {
			v = "(" + v + ")"
		}
		b.WriteString(v)
		last = w.to
	}
	b.WriteString(e.text[last:])
	return b.String()
}

// plain tells whether the expression holds no name: its numbers are itself.
func (e expression) plain() bool {
	for _, w := range e.words {
		if w.kind == 'a' {
			return false
		}
	}
	return true
}

// write gives a number to so many significant digits, without idle zeros.
func write(v float64, digits int) string {
	s := strconv.FormatFloat(v, 'g', digits, 64)
	back, err := strconv.ParseFloat(s, 64)
	if err != nil {
		return s
	}
	// Shortest form of the rounded number: 250000 rather than 2.5e+05.
	if a := math.Abs(back); back == 0 || a >= 1e-3 && a < 1e7 {
		return strconv.FormatFloat(back, 'f', -1, 64)
	}
	return strconv.FormatFloat(back, 'e', -1, 64)
}
