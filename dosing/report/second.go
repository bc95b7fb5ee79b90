package report

// secondPrefix stands before the columns of the second dose of two.
const secondPrefix = "second_"

// SecondColumns are the columns of the second dose, where two products reach two
// targets: those of the dose with "second_" before them.
func SecondColumns() []Column {
	var columns []Column
	for _, s := range doseSpecs {
		columns = append(columns, Column{Name: secondPrefix + s.key, Number: s.text == nil})
	}
	return columns
}

// SecondCells are the cells of the second dose in the order of SecondColumns,
// empty where there is none.
func (d Document) SecondCells() []string {
	cells := make([]string, len(doseSpecs))
	if solved := d.result.Doses(); len(solved) > 1 {
		for i, f := range Dose(solved[1]) {
			cells[i] = f.Full()
		}
	}
	return cells
}
