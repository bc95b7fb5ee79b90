package slips

import "strings"

// The letters leave out I, O and Q, which look like digits.
const checkLetters = "ABCDEFGHJKLMNPRSTUVWXYZ"

const (
	checkPrime = 523 // the largest prime that two letters can tell (23 x 23 = 529)
	checkBase  = 2   // a generator modulo 523, so that no two places within 522 weigh alike
)

// Letters are two check letters of a line that is copied by hand: one wrong
// character, or two neighbours changed, always gives other letters, and anything
// else does in 522 of 523 cases. Spaces count once each and not at the ends,
// small letters as capitals. The line must be under 500 characters of plain ASCII
// for that to be certain.
func Letters(line string) string {
	sum, weight := 0, 1
	for _, b := range []byte(strings.ToUpper(strings.Join(strings.Fields(line), " "))) {
		weight = weight * checkBase % checkPrime
		sum = (sum + weight*int(b)) % checkPrime
	}
	return string([]byte{checkLetters[sum/len(checkLetters)], checkLetters[sum%len(checkLetters)]})
}

// Verify tells whether a line still has its letters.
func Verify(line, letters string) bool {
	return strings.EqualFold(strings.TrimSpace(letters), Letters(line))
}
