package evidence

import (
	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/hv/steady"
)

// Divider is the divider at work under the condition.
func (e *Evidence) Divider() (*steady.Divider, error) {
	return remember(e, "divider", func() (*steady.Divider, error) {
		part := e.chain.Divider
		if part == nil {
			return nil, lack.Key("divider")
		}
		c, err := e.Circuit()
		if err != nil {
			return nil, err
		}
		sensed, err := e.Potential(part.Senses.Or("output"))
		if err != nil {
			return nil, err
		}
		return steady.Measure(c, part, sensed, e.air())
	})
}

func (e *Evidence) air() document.Given[quantity.Temperature] {
	if e.chain.Site == nil {
		return document.Given[quantity.Temperature]{Place: document.Place{Key: "site.air_temperature"}}
	}
	return e.chain.Site.AirTemperature
}

// DividerError is the worst-case relative error of the divider.
func (e *Evidence) DividerError() (quantity.Fraction, error) {
	return remember(e, "divider error", func() (quantity.Fraction, error) {
		d, err := e.Divider()
		if err != nil {
			return 0, err
		}
		b, err := d.Budget()
		return b.Total, err
	})
}

// OpenLowerArm is the voltage of the tap with the lower arm open, no meter, no clamp.
func (e *Evidence) OpenLowerArm() (quantity.Voltage, error) {
	return ofDivider(e, (*steady.Divider).OpenLowerArm)
}

// MeterWithOpenArm is what the meter sees with the lower arm open: the clamp's
// voltage where there is one that strikes, else what the upper arm drives through it.
func (e *Evidence) MeterWithOpenArm() (quantity.Voltage, error) {
	metered, err := ofDivider(e, (*steady.Divider).OpenLowerArmMetered)
	if err != nil || e.chain.Divider.Clamp == nil {
		return metered, err
	}
	return min(metered, e.chain.Divider.Clamp.Voltage.V), nil
}

func ofDivider[Q ~float64](e *Evidence, of func(*steady.Divider) (Q, error)) (Q, error) {
	d, err := e.Divider()
	if err != nil {
		return 0, err
	}
	return of(d)
}
