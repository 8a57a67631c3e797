package network

// Work counts what a solution cost.
type Work struct {
	Unknowns       int // free potentials
	States         int // charges and inductor currents that make the state
	Guesses        int // solutions between the peaks, for the first guess
	Periods        int // walked in full
	Steps          int // accepted
	Longest        int // of them, in the period that took most
	Factorisations int // of trial steps
	Events         int // switchings of diodes
	Iterations     int // corrections of the state
	Products       int // small changes carried through a period
}

func (w *Work) add(v Work) {
	w.Guesses += v.Guesses
	w.Periods += v.Periods
	w.Steps += v.Steps
	w.Longest = max(w.Longest, v.Longest)
	w.Factorisations += v.Factorisations
	w.Events += v.Events
	w.Iterations += v.Iterations
	w.Products += v.Products
}

// ringing is by how many steps a period took more than any of an ordinary ladder with so
// many diodes.
func (w *Work) ringing(diodes int) int { return max(0, w.Longest-40*diodes) }
