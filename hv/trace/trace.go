// Package trace reads the record of an oscilloscope, comma-separated columns of time
// and voltage, as voltages at even times. It opens no file.
package trace

import (
	"fmt"
	"math"

	"kilovet/hv/quantity"
)

// Trace is a record in SI units, its times rising.
type Trace struct {
	Times    []quantity.Time
	Voltages []quantity.Voltage
}

// Options say what the record itself may not.
type Options struct {
	// Factor turns a volt of the record into volts at the probe's tip; 1 where zero.
	Factor float64
	// HeaderLines is how many lines stand before the numbers; nil for all that hold none.
	HeaderLines *int
	// TimeUnit and VoltageUnit are the units of the columns; empty for those that the
	// header names, else seconds and volts.
	TimeUnit, VoltageUnit string
}

// Fault is what is wrong with a record, at a line counted from one.
type Fault struct {
	Line         int
	What, Remedy string
}

// Error writes the fault on one line.
func (f *Fault) Error() string {
	text := fmt.Sprintf("line %d: %s", f.Line, f.What)
	if f.Remedy != "" {
		text += "; " + f.Remedy
	}
	return text
}

// Duration is from the first sample to one interval after the last.
func (t *Trace) Duration() quantity.Time {
	n := quantity.Time(len(t.Times))
	return (t.Times[len(t.Times)-1] - t.Times[0]) * n / (n - 1)
}

// PeakToPeak is the greatest less the least voltage.
func (t *Trace) PeakToPeak() quantity.Voltage {
	low, high := math.Inf(1), math.Inf(-1)
	for _, v := range t.Voltages {
		low, high = math.Min(low, float64(v)), math.Max(high, float64(v))
	}
	return quantity.Voltage(high - low)
}

// Even is the record at so many even times from its start, straight between its samples,
// and the interval between them; never more than it has samples.
func (t *Trace) Even(most int) ([]quantity.Voltage, quantity.Time) {
	n := min(most, len(t.Times))
	interval := t.Duration() / quantity.Time(n)
	even := make([]quantity.Voltage, n)
	at := 0
	for i := range even {
		now := t.Times[0] + interval*quantity.Time(i)
		for at < len(t.Times)-2 && t.Times[at+1] <= now {
			at++
		}
		along := quantity.Voltage((now - t.Times[at]) / (t.Times[at+1] - t.Times[at]))
		along = min(along, 1)
		even[i] = t.Voltages[at] + along*(t.Voltages[at+1]-t.Voltages[at])
	}
	return even, interval
}
