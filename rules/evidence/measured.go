package evidence

import (
	"fmt"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/hv/trace"
	"kilovet/ripple/beam"
)

// Recorded is the evidence with the record of the measured ripple, read by whoever reads
// files.
func (e *Evidence) Recorded(t *trace.Trace) *Evidence {
	with := *e
	with.trace = t
	return &with
}

// Measured is a ripple that was measured, in place of the computed one.
type Measured struct {
	Record beam.Record
	trace  *trace.Trace
}

// PeakToPeak is that of the samples as they were taken; zero where nothing was measured.
func (m *Measured) PeakToPeak() quantity.Voltage {
	if m == nil {
		return 0
	}
	return m.trace.PeakToPeak()
}

// Sampled is how many samples were taken.
func (m *Measured) Sampled() int { return len(m.trace.Times) }

// mostSamples is how many samples of a record are followed to the blur.
const mostSamples = 1 << 16

// Measured is the measured ripple, that of the working state; nil where none is described.
func (e *Evidence) Measured() (*Measured, error) {
	b := e.chain.Beam
	if b == nil || !b.MeasuredRipple.Set() || e.condition.State != Working {
		return nil, nil
	}
	if e.trace == nil {
		return nil, lack.Because(fmt.Sprintf("the record %q of the measured ripple was not read", b.MeasuredRipple.V), b.MeasuredRipple.Key)
	}
	return remember(e.Under(Condition{}), "measured", func() (*Measured, error) {
		samples, interval := e.trace.Even(mostSamples)
		if !e.Ions() { // a cathode further below its anode is more energy
			for i := range samples {
				samples[i] = -samples[i]
			}
		}
		return &Measured{beam.Record{Samples: samples, Interval: interval}, e.trace}, nil
	})
}

// DisturbanceAssumptions are what the disturbance of the beam takes for granted: of a
// computed one what the ripple rests on, of a measured one that nothing is slower than the
// record.
func (e *Evidence) DisturbanceAssumptions() []string {
	m, err := e.Measured()
	if m == nil || err != nil {
		all := e.RippleAssumptions()
		if e.Unheated() {
			all = append(all, "no hum comes with the heater, of which nothing is described")
		}
		return all
	}
	var all []string
	if lasts := m.Record.Duration(); !quantity.AtLeast(float64(lasts), float64(e.averaging())) {
		all = append(all, "nothing disturbs the beam that is slower than the measured record of "+quantity.Text(lasts))
	}
	if m.Sampled() > len(m.Record.Samples) {
		all = append(all, fmt.Sprintf("the measured record is followed in %d of its %d samples", len(m.Record.Samples), m.Sampled()))
	}
	return all
}
