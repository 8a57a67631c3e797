package evidence

import (
	"kilovet/hv/document"
	"kilovet/hv/gun"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// usualExponent is n of the emission law where none is given: an assumption within
// the range of published guns (1.5 for a fixed emitting area, 2 to 2.5 where it grows).
const usualExponent = 2

// Emission is the current the gun draws: none where it is not fitted or cold, else
// as given, else as the law and the bias give it.
func (e *Evidence) Emission() (quantity.Current, error) {
	g := e.chain.Gun
	if !g.IsFitted() || e.condition.State != Working {
		return 0, nil
	}
	if m := e.chain.Multiplier; m != nil && !m.Negative() {
		return 0, lack.Range("an electron gun on a positive supply: its cathode is not below its earthed anode")
	}
	if e.failed() {
		p, err := e.gunInFault()
		return p.emission, err
	}
	if g.Emission.Set() {
		return g.Emission.V, nil
	}
	return e.EmissionByLaw()
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

// statedLaw is the law with the stated scale.
func (e *Evidence) statedLaw() (gun.Law, error) {
	g := e.chain.Gun
	if g == nil {
		return gun.Law{}, lack.Key("gun")
	}
	if err := document.Need(g.Cutoff, g.ZeroBiasEmission); err != nil {
		return gun.Law{}, err
	}
	return gun.New(g.Cutoff.V, g.Exponent.Or(usualExponent), g.ZeroBiasEmission.V)
}

// biased is where a law settles with the described bias.
func (e *Evidence) biased(law gun.Law) (gun.Point, error) {
	b := e.chain.Bias
	switch {
	case b == nil:
		return gun.Point{}, lack.Key("bias")
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
		if !g.Emission.Set() {
			return e.pointByLaw()
		}
		if !g.Cutoff.Set() {
			return gun.Point{}, lack.Key(g.Cutoff.Key)
		}
		bias, err := e.BiasVoltage()
		if err != nil {
			return gun.Point{}, err
		}
		law, err := gun.Through(g.Cutoff.V, g.Exponent.Or(usualExponent), bias, g.Emission.V)
		if err != nil {
			return gun.Point{}, err
		}
		return e.biased(law)
	})
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

// RichardsonLimit is the most the emitting area can give at its temperature.
func (e *Evidence) RichardsonLimit() (quantity.Current, error) {
	g := e.chain.Gun
	if g == nil {
		return 0, lack.Key("gun")
	}
	if err := document.Need(g.EmittingArea, g.CathodeTemperature, g.WorkFunction); err != nil {
		return 0, err
	}
	emitter, err := gun.ForWorkFunction(g.WorkFunction.V)
	if err != nil {
		return 0, err
	}
	return emitter.Limit(g.EmittingArea.V, g.CathodeTemperature.V)
}
