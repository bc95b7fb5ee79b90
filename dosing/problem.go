package dosing

import "fmt"

// ProblemKind sorts the reasons for not answering; commands turn it into the
// exit code.
type ProblemKind int

// The kinds.
const (
	NoAnswer ProblemKind = iota + 1 // the readings are fine and no dose does it
	BadInput                        // a reading that cannot be used
	Failed                          // the program itself failed
)

// Problem is a refusal or an answer of "no". Given and Accepted are plain text
// for the person who typed; numbers for programs stand beside them. Sentences
// are composed in report.
type Problem struct {
	Kind     ProblemKind
	Code     string // snake_case, stable: out_of_reach, target_met, wrong_side, missing, ...
	Field    string // command-line name of the reading or setting, without dashes before
	Given    string
	Accepted string

	// The number refused and what would be accepted, in the SI unit of the field,
	// where no typed text is at hand; report writes them out.
	Value, Low, High Optional

	// For a target that cannot be reached.
	Target     Target
	Nearest    Optional // the nearest reachable value of the target's figure, in its unit
	NearestAt  Optional // the dose there, mol/L
	CouldReach []string // names of products that could
}

// Error gives a short form for logs and tests; people see report's sentence.
func (p *Problem) Error() string {
	return fmt.Sprintf("%s: %s: given %q: accepted: %s", p.Code, p.Field, p.Given, p.Accepted)
}
