package evidence

import (
	"kilovet/hv/document"
	"kilovet/hv/gun"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Exponents of the emission law where none is given: for a triode an assumption within
// the range of published guns (1.5 for a fixed emitting area, 2 to 2.5 where it grows),
// for a diode Child's.
const (
	usualExponent = 2
	diodeExponent = 1.5
)

// Emission is the current the gun draws: none where it is not fitted or cold, else
// as given, else as the law and the bias give it.
func (e *Evidence) Emission() (quantity.Current, error) {
	g := e.chain.Gun
	if !g.IsFitted() || e.condition.State != Working {
		return 0, nil
	}
	if e.failed() {
		p, err := e.gunInFault()
		return p.emission, err
	}
	if err := e.attracted(); err != nil {
		return 0, err
	}
	if g.Emission.Set() && e.share() == 1 {
		return g.Emission.V, nil
	}
	if g.Emission.Set() {
		p, err := e.Gun()
		return p.Emission, err
	}
	return e.EmissionByLaw()
}

// attracted is why electrons do not leave the cathode: the wrong polarity.
func (e *Evidence) attracted() error {
	m := e.chain.Multiplier
	switch {
	case m == nil || m.Negative() != e.chain.Gun.EarthedCathode():
		return nil
	case m.Negative():
		return lack.Range("an electron gun with an earthed cathode on a negative supply: its anode is not above its cathode")
	}
	return lack.Range("an electron gun on a positive supply: its cathode is not below its earthed anode")
}

// share is the part of its full drive the chain works at; the gun's cutoff goes with it.
func (e *Evidence) share() float64 {
	if d := e.condition.Drive; d != 0 {
		return d
	}
	return 1
}

// EmissionByLaw is the emission that the stated law gives with the stated bias.
func (e *Evidence) EmissionByLaw() (quantity.Current, error) {
	p, err := e.pointByLaw()
	return p.Emission, err
}

func (e *Evidence) pointByLaw() (gun.Point, error) {
	return remember(e, "gun by law", func() (gun.Point, error) {
		law, err := e.statedLaw()
		if err != nil {
			return gun.Point{}, err
		}
		return e.biased(law)
	})
}

// statedLaw is the law with the stated scale, at the voltage of the condition.
func (e *Evidence) statedLaw() (gun.Law, error) {
	g := e.chain.Gun
	if g == nil {
		return gun.Law{}, lack.Key("gun")
	}
	if e.DiodeGun() {
		scale, err := g.ZeroBiasEmission.Need()
		if err != nil {
			return gun.Law{}, lack.Because("neither the emission of the diode gun is given nor what it gives by its law", "gun.emission", "gun.zero_bias_emission")
		}
		law, err := gun.Diode(g.Exponent.Or(diodeExponent), scale)
		return e.limited(law, err)
	}
	cutoff, err := e.Cutoff()
	if err != nil {
		return gun.Law{}, joined(err, document.Need(g.ZeroBiasEmission))
	}
	if err := document.Need(g.ZeroBiasEmission); err != nil {
		return gun.Law{}, err
	}
	law, err := gun.New(cutoff, g.Exponent.Or(usualExponent), g.ZeroBiasEmission.V)
	return e.limited(law, err)
}

// limited is a law with the limit of the cathode, where that is known, at the voltage of
// the condition.
func (e *Evidence) limited(law gun.Law, err error) (gun.Law, error) {
	if err != nil {
		return law, err
	}
	if limit, err := e.RichardsonLimit(); err == nil {
		if law, err = law.Limited(limit); err != nil {
			return law, err
		}
	}
	if share := e.share(); share != 1 {
		return law.AtVoltage(share)
	}
	return law, nil
}

// DiodeGun reports whether the gun has no bias: its control electrode, if any, is on the
// cathode's potential.
func (e *Evidence) DiodeGun() bool { return e.chain.Bias == nil }

// biased is where a law settles with the described bias.
func (e *Evidence) biased(law gun.Law) (gun.Point, error) {
	b := e.chain.Bias
	switch {
	case b == nil:
		return law.FixedBias(0)
	case b.Kind.V == "fixed":
		return law.FixedBias(b.Voltage.V)
	}
	return law.SelfBias(b.Resistor.Total())
}

// Gun is the gun's operating point: through the given emission where there is one,
// which sets the scale of the law.
func (e *Evidence) Gun() (gun.Point, error) {
	return remember(e, "gun", func() (gun.Point, error) {
		g := e.chain.Gun
		if !g.IsFitted() || e.condition.State != Working {
			return gun.Point{}, lack.Failed("the gun does not emit")
		}
		if err := e.attracted(); err != nil {
			return gun.Point{}, err
		}
		if !g.Emission.Set() {
			return e.pointByLaw()
		}
		law, err := e.readLaw()
		if law, err = e.limited(law, err); err != nil {
			return gun.Point{}, err
		}
		return e.biased(law)
	})
}

// readLaw is the law through the given emission, at full voltage.
func (e *Evidence) readLaw() (gun.Law, error) {
	g := e.chain.Gun
	limit, known := e.RichardsonLimit()
	if e.DiodeGun() {
		law, err := gun.Diode(g.Exponent.Or(diodeExponent), g.Emission.V)
		if err != nil || known != nil {
			return law, err
		}
		return gun.ThroughLimited(law.Cutoff(), law.Exponent(), 0, g.Emission.V, limit)
	}
	cutoff, err := e.Cutoff()
	if err != nil {
		return gun.Law{}, err
	}
	bias, err := e.statedBias()
	if err != nil {
		return gun.Law{}, err
	}
	if known != nil {
		return gun.Through(cutoff, g.Exponent.Or(usualExponent), bias, g.Emission.V)
	}
	return gun.ThroughLimited(cutoff, g.Exponent.Or(usualExponent), bias, g.Emission.V, limit)
}

// statedBias is the bias that goes with the given emission.
func (e *Evidence) statedBias() (quantity.Voltage, error) {
	b := e.chain.Bias
	if b.Kind.V == "fixed" {
		return b.Voltage.V, nil
	}
	return quantity.Voltage(float64(e.chain.Gun.Emission.V) * float64(b.Resistor.Total())), nil
}

// BiasVoltage is how far the control electrode is below the cathode.
func (e *Evidence) BiasVoltage() (quantity.Voltage, error) {
	b := e.chain.Bias
	if b == nil {
		return 0, lack.Key("bias")
	}
	if b.Kind.V == "fixed" {
		return b.Voltage.V, nil
	}
	i, err := e.Emission()
	return quantity.Voltage(float64(i) * float64(b.Resistor.Total())), err
}

// Emitter is what the cathode emits from: Richardson's constant and the work function.
func (e *Evidence) Emitter() (gun.Emitter, error) {
	g := e.chain.Gun
	if g == nil {
		return gun.Emitter{}, lack.Key("gun")
	}
	w, err := g.WorkFunction.Need()
	if err != nil || !g.RichardsonConstant.Set() {
		if err == nil {
			return gun.ForWorkFunction(w)
		}
		return gun.Emitter{}, err
	}
	return gun.Emitter{Constant: g.RichardsonConstant.V, WorkFunction: w, Source: "as stated", Mark: "stated"}, nil
}

// RichardsonLimit is the most the emitting area can give at its temperature.
func (e *Evidence) RichardsonLimit() (quantity.Current, error) {
	g := e.chain.Gun
	if g == nil {
		return 0, lack.Key("gun")
	}
	if err := document.Need(g.EmittingArea, g.CathodeTemperature, g.WorkFunction); err != nil {
		return 0, err
	}
	emitter, err := e.Emitter()
	if err != nil {
		return 0, err
	}
	return emitter.Limit(g.EmittingArea.V, g.CathodeTemperature.V)
}
