package cascade

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// TextbookDrop is the drop the books print for a half-wave cascade, to compare
// with: it lets every smoothing capacitor lose the charge of a whole period before
// the coupling capacitors are refilled. With equal capacitors it is
// I/(fC) (2n³/3 + n²/2 − n/6); the drop of the maximum lies n(n−1)/4 below, that of
// the mean n/2 above.
//
// Source: M. S. Naidu and V. Kamaraju, High Voltage Engineering, example 6.1 (read
// in a transcription of the book's examples); for lists of capacitors derived.
func (c Cascade) TextbookDrop(load quantity.Current) (quantity.Voltage, error) {
	if err := c.solvable(load); err != nil {
		return 0, err
	}
	if c.Symmetrical || c.Square {
		return 0, lack.Range("the textbook drop is that of a half-wave cascade with a sine drive")
	}
	var drop quantity.Voltage
	for k := range c.Smoothing {
		m := quantity.Voltage(c.Stages() - k)
		drop += m*m*c.perPeriod(load, c.Coupling[k]) + m*(m-1)*c.perPeriod(load, c.Smoothing[k])
	}
	return drop, nil
}
