// Package figure holds the word for one number of a review and the closed list of
// figures a review may hold.
package figure

// Figure is one number with what it means and what it rests on.
type Figure struct {
	ID      string  // of the closed list: "multiplier.mean"
	Subject string  // node, part, spacing or shield it belongs to; may be empty
	State   string  // working, cold or lost; empty where the state does not matter
	What    string  // in a clause
	Value   float64 // in Unit
	Unit    string  // SI without prefix; "1" for fractions
	Basis   string  // how it was obtained
}
