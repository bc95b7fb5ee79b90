package tui

// lineStep says which step of the water's path a station is, so that old figures
// find it again after the line has changed.
type lineStep struct {
	product string // of the solved step; "" for a given one and for the raw water
	given   feedEntry
}

// steps are the steps of the line from the raw water on, as a result orders its
// stations.
func (s sheet) steps() []lineStep {
	line := []lineStep{{}}
	ahead := s.ahead()
	for i, a := range s.Adds {
		if i == ahead {
			line = append(line, lineStep{product: s.Product})
		}
		line = append(line, lineStep{given: a})
	}
	if ahead == len(s.Adds) {
		line = append(line, lineStep{product: s.Product})
	}
	return line
}

// oldIndex finds where the figures of a station stand in a result that is older
// than the line, -1 where it has none there. The steps that are in both are
// taken in their order. A step that has changed in itself has no old figures: a
// dose must not stand under another chemical than it was worked out for.
func oldIndex(old, now []lineStep, index int) int {
	next := 0
	for i, s := range now {
		found := -1
		for k := next; k < len(old); k++ {
			if old[k] == s {
				found, next = k, k+1
				break
			}
		}
		if i == index {
			return found
		}
	}
	return -1
}
