package plan

import (
	"slices"

	"kilovet/hv/chain"
	"kilovet/hv/circuit"
	"kilovet/rules/evidence"
)

// meter is the instrument that a description has without naming it.
const meter = "divider meter"

// driveShare is how well the peak of the drive is set or read: common practice, no
// source.
const driveShare = 0.02

// probeName begins the names of the loads that the instruments are.
const probeName = "instrument "

// Bench is the change of the circuit that connects the described voltmeters.
func Bench(c *chain.Chain) evidence.Fault {
	var fitted []*chain.Instrument
	for i := range c.Instruments {
		if !c.Instruments[i].ReadsCurrent() {
			fitted = append(fitted, &c.Instruments[i])
		}
	}
	if len(fitted) == 0 {
		return evidence.Fault{}
	}
	return evidence.Fault{Name: "the instruments of the plan connected", Edit: func(c *circuit.Circuit) *circuit.Circuit {
		for _, in := range fitted {
			c = c.Bridge(probeName+in.Name.V, in.At.V, in.To.Or("ground"), in.Resistance.V)
		}
		return c
	}}
}

// floating is what a voltmeter between two nodes at high voltage may show by itself, as a
// share of that voltage: common practice, no source.
const floating = 1e-4

// dial is one instrument: how it reads and how far it may be wrong, as a share of what it
// reads and, where it hangs at high voltage, besides.
type dial struct {
	name   string
	unit   string
	error  func(*evidence.Evidence) (float64, error)
	read   func(*evidence.Evidence) (float64, error)
	beside func(*evidence.Evidence) (float64, error) // nil where nothing
}

// dials lists the instruments of a chain, the divider's meter first.
func dials(c *chain.Chain) []dial {
	var all []dial
	if c.Divider != nil && c.Divider.Meter != nil {
		all = append(all, dial{name: meter, unit: "V", error: dividerError, read: func(e *evidence.Evidence) (float64, error) {
			v, err := e.Reads("divider.tap", "ground")
			return float64(v), err
		}})
	}
	for i := range c.Instruments {
		in := &c.Instruments[i]
		d := dial{name: in.Name.V, unit: "V", error: func(*evidence.Evidence) (float64, error) { return float64(in.Accuracy.V), nil },
			read: func(e *evidence.Evidence) (float64, error) {
				v, err := e.Reads(in.At.V, in.To.Or("ground"))
				return float64(v), err
			}}
		if in.ReadsCurrent() {
			d.unit = "A"
			d.read = returnDial.read
		}
		if Floats(in) {
			d.beside = func(e *evidence.Evidence) (float64, error) {
				v, err := e.Between(in.At.V, "ground")
				return floating * float64(v), err
			}
		}
		all = append(all, d)
	}
	return all
}

// returnDial reads the return current without an error of its own.
var returnDial = dial{name: "return of the multiplier", unit: "A", error: func(*evidence.Evidence) (float64, error) { return 0, nil },
	read: func(e *evidence.Evidence) (float64, error) {
		i, err := e.ReturnCurrent()
		return float64(i), err
	}}

// readsReturn reports whether an instrument of a chain reads the return current.
func readsReturn(c *chain.Chain) bool {
	return slices.ContainsFunc(c.Instruments, func(in chain.Instrument) bool { return in.ReadsCurrent() })
}

// Floats reports whether an instrument stands at high voltage itself.
func Floats(in *chain.Instrument) bool { return !in.ReadsCurrent() && in.To.Or("ground") != "ground" }

func dividerError(e *evidence.Evidence) (float64, error) {
	wrong, err := e.DividerError()
	return float64(wrong), err
}

// Readings is what every instrument should show under a condition, with bounds: the
// spread of the parts' tolerances, the setting of the drive and the instrument's own
// error, added up.
func Readings(e *evidence.Evidence, at evidence.Condition) ([]Reading, error) {
	var all []Reading
	for _, d := range dials(e.Chain()) {
		b, err := d.band(e, at)
		if err != nil {
			return nil, err
		}
		all = append(all, Reading{d.name, b})
	}
	return all, nil
}

func (d dial) band(e *evidence.Evidence, at evidence.Condition) (Band, error) {
	b := Band{Unit: d.unit}
	for _, corner := range []evidence.Corner{evidence.Nominal, evidence.AllLow, evidence.AllHigh} {
		at.Corner = corner
		v, err := d.read(e.Under(at))
		if err != nil {
			return b, err
		}
		if corner == evidence.Nominal {
			b.Value, b.Low, b.High = v, v, v
		}
		b.Low, b.High = min(b.Low, v), max(b.High, v)
	}
	at.Corner = evidence.Nominal
	wrong, err := d.error(e.Under(at))
	b.Low -= b.Value * (wrong + driveShare)
	b.High += b.Value * (wrong + driveShare)
	if d.beside == nil || err != nil {
		return b, err
	}
	more, err := d.beside(e.Under(at))
	b.Low, b.High = max(b.Low-more, 0), b.High+more
	return b, err
}

// Value is what the instrument at one place of Readings shows, in SI units and without
// bounds.
func Value(e *evidence.Evidence, place int) (float64, error) {
	return dials(e.Chain())[place].read(e)
}

// Metered are the nodes whose voltage to ground an instrument of the plan shows.
func Metered(c *chain.Chain) (nodes []string) {
	if c.Divider != nil && c.Divider.Meter != nil {
		nodes = append(nodes, "divider.tap")
	}
	for i := range c.Instruments {
		if in := &c.Instruments[i]; !in.ReadsCurrent() && !Floats(in) {
			nodes = append(nodes, in.At.V)
		}
	}
	return nodes
}

// Values is what every instrument shows under a condition, in the order of Readings
// and in SI units, without bounds.
func Values(e *evidence.Evidence, at evidence.Condition) ([]float64, error) {
	var all []float64
	for _, d := range dials(e.Chain()) {
		v, err := d.read(e.Under(at))
		if err != nil {
			return nil, err
		}
		all = append(all, v)
	}
	return all, nil
}
