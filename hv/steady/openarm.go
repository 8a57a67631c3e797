package steady

import (
	"slices"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// OpenLowerArm is the magnitude of the tap voltage with all strings of the lower
// arm open, the meter unplugged and no clamp, the sensed node staying where it was.
func (d *Divider) OpenLowerArm() (quantity.Voltage, error) {
	return d.tapWithout(meter, clamp, leakage)
}

// OpenLowerArmMetered is the same with the meter connected; a lack without one.
func (d *Divider) OpenLowerArmMetered() (quantity.Voltage, error) {
	if d.part.Meter == nil {
		return 0, lack.Key("divider.meter")
	}
	return d.tapWithout(clamp, leakage)
}

// OpenLowerArmClamped is the same with the clamp in place and the meter unplugged:
// the clamp's voltage where the upper arm can drive its leakage that far, else what
// the leakage leaves. A lack without a clamp.
func (d *Divider) OpenLowerArmClamped() (quantity.Voltage, error) {
	if d.part.Clamp == nil {
		return 0, lack.Key("divider.clamp")
	}
	v, err := d.tapWithout(meter)
	return min(v, d.part.Clamp.Voltage.V), err
}

// tapWithout is the tap's voltage with the lower arm and some more left out.
func (d *Divider) tapWithout(names ...string) (quantity.Voltage, error) {
	names = append(names, lowerArm)
	open := d.circuit.Each(func(e *circuit.Element) bool { return !slices.Contains(names, e.Name) })
	state, err := Held(open, Fixed{d.senses, d.sensed})
	if err != nil {
		return 0, err
	}
	v, err := state.Potential(tap)
	return magnitude(v), err
}
