package working

// Sheet is the worked sheet of one result.
type Sheet struct{ Sections []Section }

// Section is a part of the sheet under one heading.
type Section struct {
	Heading string
	Note    string // plain words under the heading; "" for none
	Steps   []Step
}

// Step is one line of working.
type Step struct {
	Name    string // symbol of the outcome
	What    string // plain words
	Formula string // "" for a number taken as given
	Numbers string // the formula with the numbers put in; "" where it has no names
	Value   float64
	Outcome string // Value as shown
	Unit    string // "" for a pure number
	Source  string // "" for plain arithmetic
}
