package cascade

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Cascade is a multiplier and what drives it.
type Cascade struct {
	Symmetrical bool
	Square      bool // drive: a square wave, else a sine

	Coupling  []quantity.Capacitance // one a stage, from the grounded end; of each column
	Smoothing []quantity.Capacitance // one a stage, from the grounded end

	Peak        quantity.Voltage // of the drive, zero to peak, unloaded; of each half
	Frequency   quantity.Frequency
	ForwardDrop quantity.Voltage // of each diode position
	// Unbalance is the mismatch of the halves of a symmetrical drive: they have
	// peak (1 ± half of it).
	Unbalance quantity.Fraction

	SourceResistance quantity.Resistance // in series with the drive
	DiodeResistance  quantity.Resistance // of each diode position
	Inductance       quantity.Inductance // in series with the drive

	Junction       quantity.Capacitance // across each diode position
	BetweenColumns quantity.Capacitance // stray, coupling.k to stage.k
	ToGround       quantity.Capacitance // stray, stage.k to ground
}

// WithEqual fills a cascade with n stages of one capacitance.
func (c Cascade) WithEqual(n int, each quantity.Capacitance) Cascade {
	c.Coupling, c.Smoothing = repeated(n, each), repeated(n, each)
	return c
}

func repeated(n int, each quantity.Capacitance) []quantity.Capacitance {
	list := make([]quantity.Capacitance, n)
	for k := range list {
		list[k] = each
	}
	return list
}

// Stages counts the stages: two capacitors and two diodes each.
func (c Cascade) Stages() int { return len(c.Smoothing) }

// rung is the rise of one stage without load, 2 (peak − forward drop).
func (c Cascade) rung() quantity.Voltage { return 2 * (c.Peak - c.ForwardDrop) }

// NoLoad is the voltage at the top of the smoothing column without load, strays
// and leakage: 2 N (peak − forward drop), since each of the 2N diodes costs its
// forward drop once. The forward drop falls with the current; one given at the
// working current overstates the loss at microamperes.
func (c Cascade) NoLoad() (quantity.Voltage, error) {
	if err := c.sound(); err != nil {
		return 0, err
	}
	return quantity.Voltage(c.Stages()) * c.rung(), nil
}

// sound refuses what is no cascade.
func (c Cascade) sound() error {
	if c.Stages() == 0 || len(c.Coupling) != c.Stages() {
		return lack.Range("a cascade needs at least one stage, with a coupling and a smoothing capacitor each (%d and %d given)",
			len(c.Coupling), len(c.Smoothing))
	}
	for k := range c.Smoothing {
		if !positive(c.Coupling[k]) || !positive(c.Smoothing[k]) {
			return lack.Range("the capacitances of stage %d must be above zero", k+1)
		}
	}
	if !positive(c.Frequency) || !positive(c.Peak) {
		return lack.Range("the drive needs a frequency and a peak above zero")
	}
	if c.ForwardDrop < 0 || !(c.ForwardDrop < c.Peak) {
		return lack.Range("the forward drop of a diode, %s, is not below the peak of the drive, %s: the cascade gives nothing",
			quantity.Text(c.ForwardDrop), quantity.Text(c.Peak))
	}
	return nil
}

// positive is false for NaN and infinities too.
func positive[Q ~float64](v Q) bool { return v > 0 && v <= 1e300 }

// equal gives the one capacitance of a ladder of equal capacitors.
func (c Cascade) equal() (quantity.Capacitance, error) {
	each := c.Smoothing[0]
	for k := range c.Smoothing {
		if !quantity.Equal(c.Coupling[k], each) || !quantity.Equal(c.Smoothing[k], each) {
			return 0, lack.Range("this closed form holds for equal capacitors; those of stage %d differ from the first", k+1)
		}
	}
	return each, nil
}
