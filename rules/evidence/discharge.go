package evidence

import (
	"kilovet/hv/quantity"
	"kilovet/hv/steady"
)

// Discharge is how long a node stays above 60 V after switching off.
type Discharge struct {
	Node  string
	Time  quantity.Time
	Never bool
	Left  quantity.Voltage // what stays, where it never falls below
}

// Slower reports whether this discharge ends after the other.
func (d Discharge) Slower(o Discharge) bool {
	switch {
	case d.Never != o.Never:
		return d.Never
	case d.Never:
		return d.Left > o.Left
	}
	return d.Time > o.Time || o.Node == ""
}

func discharge(x steady.Ending) Discharge {
	return Discharge{x.Of, x.Time, x.Never, magnitude(x.Rest)}
}

func (e *Evidence) decay() (*steady.Decay, error) {
	return remember(e, "decay", func() (*steady.Decay, error) {
		if own, same := e.itself(); same {
			return own.decay()
		}
		c, v, err := e.charged()
		if err != nil {
			return nil, err
		}
		return steady.Discharge(c, v, discharged)
	})
}

// DischargeOf is the discharge of one node to 60 V through what is permanent.
func (e *Evidence) DischargeOf(node string) (Discharge, error) {
	d, err := e.decay()
	if err != nil {
		return Discharge{}, err
	}
	x, err := d.Node(node)
	return discharge(x), err
}

// SlowestDischarge is the discharge of the node that stays charged longest.
func (e *Evidence) SlowestDischarge() (Discharge, error) {
	d, err := e.decay()
	if err != nil {
		return Discharge{}, err
	}
	return discharge(d.Slowest()), nil
}

// Opened is what stays with one part open.
type Opened struct {
	Part  string
	Worst Discharge
	decay *steady.Decay
}

// OneOpen is the discharge with each diode and each permanent resistor open in turn.
func (e *Evidence) OneOpen() ([]Opened, error) {
	return remember(e, "one open", func() ([]Opened, error) {
		c, v, err := e.charged()
		if err != nil {
			return nil, err
		}
		all, err := steady.DischargeWithOneOpen(c, v, discharged)
		var opened []Opened
		for _, o := range all {
			opened = append(opened, Opened{o.Element, discharge(o.Slowest), o.Decay})
		}
		return opened, err
	})
}

// Residue is what an intact ladder keeps when its top is discharged.
func (e *Evidence) Residue() (quantity.Voltage, error) { return steady.Residue(e.chain.Multiplier) }

// discharged is the voltage to which discharge times are given.
const discharged quantity.Voltage = 60
