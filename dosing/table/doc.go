// Package table answers a CSV file of readings row by row: the same rows come
// out, in the same order and as they were written, with the answer's columns
// after them. It reads and writes as a stream and holds one row at a time.
//
// Where things are:
//
//	scan.go     the rows of a CSV stream, with a bound on every cell
//	header.go   what the header says: the separator, readings, what must be there
//	answer.go   one row to its answer, or its problem
//	run.go      the stream as a whole
package table
