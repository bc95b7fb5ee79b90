package tui

// history holds the sheets before and after the present one.
type history struct {
	past, future []sheet
}

// deepest is how many steps can be undone.
const deepest = 200

// keep remembers a sheet that an edit is about to replace.
func (h *history) keep(s sheet) {
	h.past = append(h.past, s.clone())
	if len(h.past) > deepest {
		h.past = h.past[1:]
	}
	h.future = nil
}

// back returns the sheet before now, and remembers now for forward.
func (h *history) back(now sheet) (sheet, bool) {
	if len(h.past) == 0 {
		return now, false
	}
	s := h.past[len(h.past)-1]
	h.past = h.past[:len(h.past)-1]
	h.future = append(h.future, now.clone())
	return s, true
}

// forward undoes a back.
func (h *history) forward(now sheet) (sheet, bool) {
	if len(h.future) == 0 {
		return now, false
	}
	s := h.future[len(h.future)-1]
	h.future = h.future[:len(h.future)-1]
	h.past = append(h.past, now.clone())
	return s, true
}
