package evidence

import (
	"kilovet/hv/circuit"
	"kilovet/hv/gun"
	"kilovet/hv/quantity"
)

// gunPoint is what a gun draws, and the bias that it charges itself to where nothing
// else sets it.
type gunPoint struct {
	emission quantity.Current
	floats   bool // nothing but the gun's own current sets the bias
	bias     quantity.Voltage
}

// gunInFault is the gun with a fault: its emission by its law where the fault touches
// what makes the bias, else as it was.
func (e *Evidence) gunInFault() (gunPoint, error) {
	return remember(e, "gun in fault", func() (gunPoint, error) {
		emission, err := e.Healthy().Emission()
		if err != nil || e.chain.Bias == nil {
			return gunPoint{emission: emission}, err
		}
		was := circuit.Build(e.chain, circuit.Setting{Peak: e.chain.Drive.Peak.V, Emission: emission})
		is := was
		if e.condition.Fault.Edit != nil {
			is = e.condition.Fault.Edit(was)
		}
		if is.Element("gun") == nil || biasIs(is) == biasIs(was) {
			return gunPoint{emission: emission}, nil
		}
		law, err := e.lawInFault()
		if err != nil {
			return gunPoint{}, err
		}
		return e.settles(law, biasIs(is))
	})
}

// biasSetter is what sets the voltage between cathode and control electrode.
type biasSetter struct {
	joined, source bool
	voltage        quantity.Voltage
	resistance     quantity.Resistance // zero where nothing sets it
}

func biasIs(c *circuit.Circuit) biasSetter {
	cathode, _ := c.Node("cathode")
	control, _ := c.Node("control")
	switch source, resistor := c.Element("bias.source"), c.Element("bias.resistor"); {
	case cathode == control:
		return biasSetter{joined: true}
	case source != nil:
		return biasSetter{source: true, voltage: source.Wave.Amplitude}
	case resistor != nil:
		return biasSetter{resistance: resistor.Resistance}
	}
	return biasSetter{}
}

// lawInFault is the emission law through the healthy point, or the stated one.
func (e *Evidence) lawInFault() (gun.Law, error) {
	if !e.chain.Gun.Emission.Set() {
		return e.statedLaw()
	}
	law, err := e.readLaw()
	return e.limited(law, err)
}

// settles is where a law comes to rest with what is left of the bias. With nothing left
// the cathode charges itself until the emission stops or the clamp conducts.
func (e *Evidence) settles(law gun.Law, b biasSetter) (gunPoint, error) {
	switch {
	case b.joined:
		return gunPoint{emission: law.ZeroBias()}, nil
	case b.source:
		p, err := law.FixedBias(b.voltage)
		return gunPoint{emission: p.Emission}, err
	case b.resistance > 0:
		p, err := law.SelfBias(b.resistance)
		return gunPoint{emission: p.Emission}, err
	}
	rest := law.Cutoff()
	if c := e.chain.Bias.Clamp; c != nil {
		rest = min(rest, c.Voltage.V)
	}
	return gunPoint{emission: law.At(rest), floats: true, bias: rest}, nil
}

// withBias holds the bias that a gun has charged itself to.
func (e *Evidence) withBias(c *circuit.Circuit) (*circuit.Circuit, error) {
	if !e.chain.Gun.IsFitted() || e.condition.State != Working {
		return c, nil
	}
	p, err := e.gunInFault()
	if err != nil || !p.floats {
		return c, err
	}
	if c.Element("bias.clamp") != nil {
		return c.Hold("bias.clamp", p.bias), nil
	}
	return c.Charge("bias.self", "cathode", "control", p.bias), nil
}
