package evidence

import (
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// SupplyCurrent is the mean current that returns to the multiplier: what all that stands
// outside of it brings to ground.
func (e *Evidence) SupplyCurrent() (quantity.Current, error) {
	return remember(e, "supply current", func() (quantity.Current, error) {
		s, err := e.solution()
		if err != nil {
			return 0, err
		}
		ground, _ := s.Circuit.Node(s.Circuit.Reference())
		var sum quantity.Current
		for _, el := range s.Circuit.Elements {
			if el.Role == circuit.Ladder || el.Kind == circuit.Capacitor || el.Kind == circuit.Gap || el.From == el.To {
				continue
			}
			if el.From != ground && el.To != ground {
				continue
			}
			f, err := s.Through(el.Name)
			if err != nil {
				return 0, err
			}
			if el.To == ground {
				sum += f.Mean
			} else {
				sum -= f.Mean
			}
		}
		return quantity.Current(math.Abs(float64(sum))), nil
	})
}

// Sensed is the voltage of the node that the divider senses, against what measuring
// devices refer to: its largest magnitude.
func (e *Evidence) Sensed() (quantity.Voltage, error) {
	node := "output"
	if d := e.chain.Divider; d != nil {
		node = d.Senses.Or(node)
	}
	c, err := e.Circuit()
	if err != nil {
		return 0, err
	}
	return e.Between(node, c.Reference())
}

// Shown is what the meter shows, as the voltage of the sensed node: the reading times the
// ratio of the divider as it should be; negative where the polarity is the wrong one.
func (e *Evidence) Shown() (quantity.Voltage, error) {
	if e.chain.Divider == nil {
		return 0, lack.Key("divider")
	}
	c, err := e.Circuit()
	if err != nil {
		return 0, err
	}
	s, err := e.swing("divider.tap", c.Reference())
	if err != nil {
		return 0, err
	}
	d, err := e.Healthy().Divider()
	if err != nil {
		return 0, err
	}
	ratio, err := d.Ratio()
	shown := s.Mean * quantity.Voltage(ratio)
	if e.chain.Multiplier.Negative() {
		shown = -shown
	}
	return shown, err
}
