package canvas

// asciiOf replaces runes that a plain terminal lacks by the nearest character
// of the same width.
var asciiOf = map[rune]rune{
	'─': '-', '│': '|', '═': '=', '╌': '-', '┄': '-', '╶': '-',
	'▶': '>', '▸': '>', '◂': '<', '▴': '^', '▾': 'v', '→': '>', '←': '<', '↑': '^', '↓': 'v',
	'·': '.', '…': '~', '•': '*', '×': 'x', '−': '-', '–': '-', '—': '-',
	'°': ' ', 'µ': 'u', 'μ': 'u', '²': '2', '³': '3', '¹': '1',
	'’': '\'', '‘': '\'', '“': '"', '”': '"', '≤': '<', '≥': '>', '±': '~', '≈': '~', '✓': '*',
	'\u00a0': ' ', '\u202f': ' ', '\u2009': ' ',
	'┤': '|', '├': '|', '└': '+', '┘': '+', '┌': '+', '┐': '+', '┼': '+', '┴': '+', '┬': '+',
	'█': '#', '▀': '"', '▄': '_', '●': 'O', '■': '=', '┃': '|',
}

// ASCII returns the plain character that stands for r, "?" where there is none.
func ASCII(r rune) rune {
	if r < 0x80 {
		return r
	}
	if a, ok := asciiOf[r]; ok {
		return a
	}
	return '?'
}

// consoleLacks are the runes of ours that the font of a text console lacks.
var consoleLacks = map[rune]bool{'▸': true, '▶': true, '◂': true, '▴': true, '▾': true, '…': true, '−': true,
	'–': true, '—': true, '✓': true, '●': true, '╌': true, '┄': true, '\u202f': true, '\u2009': true}

// Console returns the character of a text console's font that stands for r:
// lines and blocks stay, the rest is as in ASCII.
func Console(r rune) rune {
	if consoleLacks[r] || r >= 0x2800 && r < 0x2900 {
		return ASCII(r)
	}
	return r
}

// Close takes r out where a blank stands before it, and moves what follows up
// to the next blank to the left: what becomes a blank then leaves only one.
func (c *Canvas) Close(r rune) {
	for y := range c.Height {
		row := c.Row(y)
		for x := 0; x < len(row); x++ {
			if row[x].Rune != r || x == 0 || row[x-1].Rune != ' ' {
				continue
			}
			for x+1 < len(row) && row[x].Rune != ' ' {
				row[x] = row[x+1]
				x++
			}
			if row[x].Rune != ' ' { // the row ended before a blank came
				row[x] = Blank
			}
		}
	}
}
