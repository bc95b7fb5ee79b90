package painter

import (
	"strings"

	"beckline/tui/canvas"
)

// Lines is a frame for a terminal without cursor addressing, or for a person
// whom a screen reader reads to: sentences in order, then a prompt with what is
// at hand.
type Lines struct {
	Section    string // sentences are compared with the last ones of the same section
	Statements []string
	Prompt     string
}

// linear turns frames of lines into output that only ever goes on: sentences
// that are new, then the prompt.
type linear struct {
	said   map[string]map[string]bool
	prompt string
}

// frame returns what to send.
func (l *linear) frame(next Lines) []byte {
	if l.said == nil {
		l.said = map[string]map[string]bool{}
	}
	var out strings.Builder
	known := l.said[next.Section]
	now := map[string]bool{}
	for _, s := range next.Statements {
		now[s] = true
		if s == "" || known[s] {
			continue
		}
		if l.prompt != "" {
			out.WriteString("\r\n")
			l.prompt = ""
		}
		out.WriteString(s + "\r\n")
	}
	if !strings.HasPrefix(next.Section, "page") {
		l.said[next.Section] = now
	}
	out.WriteString(l.ask(next.Prompt))
	return []byte(out.String())
}

// ask brings the prompt up to date: what was added is added, what was taken
// back at the end is taken back, anything else is a prompt on a new line.
func (l *linear) ask(prompt string) string {
	old := l.prompt
	l.prompt = prompt
	switch {
	case prompt == old:
		return ""
	case old == "":
		return prompt
	case strings.HasPrefix(prompt, old):
		return prompt[len(old):]
	case strings.HasPrefix(old, prompt):
		return strings.Repeat("\b \b", len([]rune(old[len(prompt):])))
	}
	return "\r\n" + prompt
}

// Wrapped is the same with the sentences broken between words, so that the
// terminal breaks none in the middle of one. A sentence stays one sentence.
func (l Lines) Wrapped(width int) Lines {
	whole := l.Statements
	l.Statements = make([]string, len(whole))
	for i, s := range whole {
		l.Statements[i] = strings.Join(canvas.Wrap(s, width), "\r\n")
	}
	return l
}
