package working_test

import (
	"fmt"
	"math"
	"strconv"
	"strings"
	"unicode"
)

// This file reads a sheet's text back and works its lines, with an evaluator of
// its own: two stacks, by the strength of the signs.

// line is one step as it stands in the text.
type line struct {
	name    string
	parts   []string // what stands after each =, the last with its unit
	written string   // for messages
}

// read cuts a sheet's text into its steps.
func read(text string) ([]line, error) {
	var lines []line
	for i, row := range strings.Split(text, "\n") {
		if len(row) > 78 {
			return nil, fmt.Errorf("row %d has %d columns: %s", i+1, len(row), row)
		}
		for _, r := range row {
			if r > unicode.MaxASCII {
				return nil, fmt.Errorf("row %d is not ASCII: %s", i+1, row)
			}
		}
		if !strings.HasPrefix(row, "      ") {
			continue // a heading or words
		}
		rest := strings.TrimSpace(row)
		switch name, after, ok := strings.Cut(rest, " = "); {
		case ok && !strings.ContainsAny(name, " ("):
			lines = append(lines, line{name: name, parts: []string{after}, written: row})
		case strings.HasPrefix(rest, "= "):
			last := &lines[len(lines)-1]
			last.parts = append(last.parts, rest[2:])
			last.written += "\n" + row
		default:
			last := &lines[len(lines)-1]
			last.parts[len(last.parts)-1] += " " + rest
			last.written += "\n" + row
		}
	}
	return lines, nil
}

// words cuts an expression.
func words(text string) []string {
	var out []string
	for i := 0; i < len(text); {
		c := rune(text[i])
		j := i + 1
		switch {
		case c == ' ':
			i++
			continue
		case unicode.IsDigit(c) || c == '.':
			for j < len(text) && (unicode.IsDigit(rune(text[j])) || text[j] == '.' || text[j] == 'e' ||
				(text[j] == '-' || text[j] == '+') && text[j-1] == 'e') {
				j++
			}
		case unicode.IsLetter(c):
			for j < len(text) && (unicode.IsLetter(rune(text[j])) || unicode.IsDigit(rune(text[j])) || text[j] == '_') {
				j++
			}
		}
		out = append(out, text[i:j])
		i = j
	}
	return out
}

// work evaluates an expression of numbers alone.
func work(text string) (float64, error) {
	var values []float64
	var signs []string
	strength := map[string]int{"+": 1, "-": 1, "*": 2, "/": 2, "minus": 3, "^": 4, "sqrt": 5, "log10": 5}
	pop := func() error {
		s := signs[len(signs)-1]
		signs = signs[:len(signs)-1]
		unary := s == "minus" || s == "sqrt" || s == "log10"
		if need := 2; len(values) < need && !unary || len(values) < 1 {
			return fmt.Errorf("%q lacks a number", text)
		}
		x := values[len(values)-1]
		values = values[:len(values)-1]
		if unary {
			values = append(values, map[string]func(float64) float64{
				"minus": func(x float64) float64 { return -x }, "sqrt": math.Sqrt, "log10": math.Log10}[s](x))
			return nil
		}
		a := &values[len(values)-1]
		switch s {
		case "+":
			*a += x
		case "-":
			*a -= x
		case "*":
			*a *= x
		case "/":
			*a /= x
		case "^":
			*a = math.Pow(*a, x)
		}
		return nil
	}
	before := "("
	for _, w := range words(text) {
		switch {
		case w == "(" || w == "sqrt" || w == "log10":
			signs = append(signs, w)
		case w == ")":
			for len(signs) > 0 && signs[len(signs)-1] != "(" {
				if err := pop(); err != nil {
					return 0, err
				}
			}
			if len(signs) == 0 {
				return 0, fmt.Errorf("%q has a stray )", text)
			}
			signs = signs[:len(signs)-1]
		case strength[w] > 0:
			if w == "-" && (before == "(" || strength[before] > 0) {
				w = "minus"
			}
			for w != "minus" && w != "^" && len(signs) > 0 && strength[signs[len(signs)-1]] >= strength[w] {
				if err := pop(); err != nil {
					return 0, err
				}
			}
			for w == "^" && len(signs) > 0 && strength[signs[len(signs)-1]] > strength[w] {
				if err := pop(); err != nil {
					return 0, err
				}
			}
			signs = append(signs, w)
		default:
			v, err := strconv.ParseFloat(w, 64)
			if err != nil {
				return 0, fmt.Errorf("%q in %q", w, text)
			}
			values = append(values, v)
		}
		before = w
	}
	for len(signs) > 0 {
		if err := pop(); err != nil {
			return 0, err
		}
	}
	if len(values) != 1 {
		return 0, fmt.Errorf("%q leaves %d numbers", text, len(values))
	}
	return values[0], nil
}
