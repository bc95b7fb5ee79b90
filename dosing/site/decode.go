package site

import (
	"cmp"
	"errors"
	"fmt"
	"slices"
	"strings"

	"github.com/BurntSushi/toml"

	"beckline/dosing/reading"
)

const (
	mostBytes = 128 << 10 // a plant file is some kilobytes; more is another file
	mostKeys  = 3000
	mostDepth = 8 // tables in tables; ours end at 3
)

// node is one key of the file.
type node struct {
	key   string
	path  string // dotted, with the key
	line  int
	value any     // string, int64, float64, bool, time.Time, []any; nil of a table
	table []*node // in the order of the file
}

func (n *node) isTable() bool { return n.value == nil }

// child finds a key of a table, nil where it is not there.
func (n *node) child(key string) *node {
	for _, c := range n.table {
		if c.key == key {
			return c
		}
	}
	return nil
}

// decode parses TOML into a tree whose keys know their lines.
func decode(path string, data []byte) (root *node, err error) {
	// The library panics on its own mistakes; a file must not end the program.
	defer func() {
		if r := recover(); r != nil {
			root, err = nil, &Error{Code: CodeSyntax, Path: path, Given: "cannot be read as TOML"}
		}
	}()
	if len(data) > mostBytes {
		return nil, &Error{Code: CodeTooLarge, Path: path, Given: fmt.Sprintf("%d KiB", len(data)>>10), Accepted: "a plant file of at most 128 KiB"}
	}
	var top map[string]toml.Primitive
	md, err := toml.Decode(string(data), &top)
	if err != nil {
		return nil, syntaxError(path, err)
	}
	if n := len(md.Keys()); n > mostKeys {
		return nil, &Error{Code: CodeTooLarge, Path: path, Given: fmt.Sprintf("%d keys", n), Accepted: "a plant file of at most 3000 keys"}
	}
	d := decoder{md: &md}
	root = &node{table: d.children(top, "", 1)}
	if d.tooDeep != nil {
		return nil, &Error{Code: CodeKind, Path: path, Line: d.tooDeep.line, Key: reading.Clean(d.tooDeep.path), Given: "tables in tables in tables", Accepted: "tables at most three deep"}
	}
	return root, nil
}

// syntaxError keeps the library's words and place.
func syntaxError(path string, err error) *Error {
	e := &Error{Code: CodeSyntax, Path: path, Given: strings.TrimPrefix(oneLine(err.Error()), "toml: ")}
	var parse toml.ParseError
	if errors.As(err, &parse) {
		e.Line, e.Key = parse.Position.Line, reading.Clean(parse.LastKey)
		e.Given = oneLine(parse.Message)
		if parse.Position.Col > 0 {
			e.Given += fmt.Sprintf(" (column %d)", parse.Position.Col)
		}
	}
	return e
}

func oneLine(s string) string {
	return strings.Join(strings.FieldsFunc(s, func(r rune) bool { return r < ' ' || r == 0x7f }), " ")
}

type decoder struct {
	md      *toml.MetaData
	tooDeep *node
}

// probe takes a value out of the library, with its line: the library tells the
// place of a key only in the error of its own unmarshaler.
type probe struct{ value any }

var errProbed = errors.New("probed")

// UnmarshalTOML keeps the value and asks for its place.
func (p *probe) UnmarshalTOML(v any) error {
	p.value = v
	return errProbed
}

func (d *decoder) children(table map[string]toml.Primitive, parent string, depth int) []*node {
	var nodes []*node
	for key, primitive := range table {
		n := &node{key: key, path: key}
		if parent != "" {
			n.path = parent + "." + key
		}
		nodes = append(nodes, n)
		var p probe
		var place toml.ParseError
		if errors.As(d.md.PrimitiveDecode(primitive, &p), &place) {
			n.line = place.Position.Line
		}
		if _, ok := p.value.(map[string]any); !ok {
			n.value = p.value
			continue
		}
		if depth > mostDepth {
			n.line = max(n.line, d.lineBelow(primitive))
			d.tooDeep = n
			continue
		}
		var inner map[string]toml.Primitive
		if err := d.md.PrimitiveDecode(primitive, &inner); err == nil {
			n.table = d.children(inner, n.path, depth+1)
		}
		if n.line == 0 && len(n.table) > 0 { // a table that only its subtables imply
			n.line = n.table[0].line
		}
	}
	slices.SortFunc(nodes, func(a, b *node) int { return cmp.Or(cmp.Compare(a.line, b.line), cmp.Compare(a.key, b.key)) })
	return nodes
}

// lineBelow looks for the line of a table that is only implied, in the first of
// what is below it; 0 where that is far down.
func (d *decoder) lineBelow(primitive toml.Primitive) int {
	for range 10 * mostDepth {
		var inner map[string]toml.Primitive
		if err := d.md.PrimitiveDecode(primitive, &inner); err != nil {
			return 0
		}
		for _, primitive = range inner {
			break
		}
		var p probe
		var place toml.ParseError
		if errors.As(d.md.PrimitiveDecode(primitive, &p), &place) && place.Position.Line > 0 {
			return place.Position.Line
		}
	}
	return 0
}
