package report

// PerHour is the feed of a dose's figures by mass in an hour, for people: "9.42
// kg/h"; "-" without a flow.
func PerHour(figures []Figure) string { return perHour(figures) }
