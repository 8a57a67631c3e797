package plan

import (
	"fmt"

	"kilovet/hv/quantity"
)

// ratings notes the voltmeters that the steps would overload.
func (m *maker) ratings() {
	c := m.e.Chain()
	for i := range c.Instruments {
		in := &c.Instruments[i]
		if in.ReadsCurrent() || !in.RatedVoltage.Set() {
			continue
		}
		for _, s := range m.plan.Steps {
			if v := highest(s, in.Name.V); !quantity.AtMost(v, in.RatedVoltage.V) {
				m.plan.Open = append(m.plan.Open, fmt.Sprintf("%s: %s: rated for %s, and may get %s; use another, or take it off before this step", s.Name, in.Name.V, quantity.Text(in.RatedVoltage.V), quantity.Text(v)))
				break
			}
		}
	}
}

// highest is the most that an instrument shows in a step within its bounds.
func highest(s Step, name string) quantity.Voltage {
	for _, r := range s.Readings {
		if r.Instrument == name {
			return quantity.Voltage(r.High)
		}
	}
	return 0
}
