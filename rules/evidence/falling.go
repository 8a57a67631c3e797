package evidence

import "kilovet/hv/quantity"

// Falling is the potential of a node after switching off, heater and gun cold, through what
// is permanent: at each of the times, from zero on.
func (e *Evidence) Falling(node string) ([]quantity.Time, []quantity.Voltage, error) {
	d, err := e.decay()
	if err != nil {
		return nil, nil, err
	}
	v, err := d.At(node)
	return d.Times, v, err
}

// DischargedAt is the voltage down to which discharges are followed.
func DischargedAt() quantity.Voltage { return discharged }
