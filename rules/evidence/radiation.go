package evidence

import (
	"slices"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/hv/xray"
)

// surveyDistance is from the outer surface at which the rate is estimated.
const surveyDistance quantity.Length = 0.1

// Accelerating is the highest voltage that electrons can have, from the cathode or from
// elsewhere in the vessel to the output, over states and corners.
func (e *Evidence) Accelerating() (Extreme[quantity.Voltage], error) {
	node := "output"
	if e.chain.HasCathode() && !e.chain.Gun.EarthedCathode() {
		node = "cathode"
	}
	return Worst(e, []string{node}, func(e *Evidence, n string) (quantity.Voltage, error) { return e.Between(n, "ground") })
}

// AcceleratingIn is that voltage in one state, all parts nominal.
func (e *Evidence) AcceleratingIn(s State) (quantity.Voltage, error) {
	node := "output"
	if e.chain.HasCathode() {
		node = "cathode"
	}
	return e.Under(Condition{State: s}).Between(node, "ground")
}

// Radiation is the air kerma rate 0.1 m outside a shield, at a voltage.
func (e *Evidence) Radiation(s *chain.Shield, u quantity.Voltage) (xray.Estimate, error) {
	return e.RadiationAt(s, u, surveyDistance)
}

// RadiationAt is the air kerma rate at a distance from the outer surface of a shield.
func (e *Evidence) RadiationAt(s *chain.Shield, u quantity.Voltage, from quantity.Length) (xray.Estimate, error) {
	i := slices.IndexFunc(e.chain.Targets, func(t chain.Target) bool { return t.Name.V == s.Target.V })
	if i < 0 {
		return xray.Estimate{}, lack.Key("target")
	}
	t := &e.chain.Targets[i]
	stop, err := e.stop(t, u)
	if err != nil {
		return xray.Estimate{}, err
	}
	distance, err := s.Distance.Need()
	if err != nil {
		return xray.Estimate{}, err
	}
	wall := xray.Wall{Distance: distance + from}
	for _, l := range s.Layers {
		m, err := xray.FindMaterial(l.Material.V)
		if err != nil {
			return xray.Estimate{}, err
		}
		wall.Layers = append(wall.Layers, xray.Layer{Material: m, Thickness: l.Thickness.V})
	}
	return stop.Behind(wall)
}

func (e *Evidence) stop(t *chain.Target, u quantity.Voltage) (xray.Stop, error) {
	material, err := xray.FindTarget(t.Material.V)
	if err != nil {
		return xray.Stop{}, err
	}
	current, err := t.Current.Need()
	return xray.Stop{Target: material, Voltage: u, Current: current}, err
}
