package evidence

import (
	"kilovet/hv/gun"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Regulation is what self-bias does to disturbances of the emission.
type Regulation struct {
	// Suppression is what a slow disturbance is divided by, 1 + loop gain.
	Suppression float64
	// Emission and Resistor are where it has fallen to Halved: more emission, or less
	// resistor, is not regulated.
	Emission quantity.Current
	Resistor quantity.Resistance
	// Whole is the frequency up to which all of it works, None from which nothing of it
	// is left; both zero without a bypass, where strays decide.
	Whole, None quantity.Frequency
}

// Halved is the suppression below which a gun is not said to regulate: the resistor then
// takes away less than half of a disturbance.
const Halved = 2

// GunRegulation is how far a self-biased gun regulates its emission.
func (e *Evidence) GunRegulation() (Regulation, error) {
	if b := e.chain.Bias; b == nil || b.Kind.V != "self" {
		return Regulation{}, lack.Failed("the gun has no self-bias")
	}
	p, err := e.Gun()
	if err != nil {
		return Regulation{}, err
	}
	r := Regulation{Suppression: 1 + p.LoopGain()}
	if r.Emission, r.Resistor, err = p.Law().RegulatesTo(Halved); err != nil {
		return Regulation{}, err
	}
	if e.chain.Bias.Bypass != nil {
		r.Whole, r.None, err = p.RegulatesUpTo(e.bypass())
	}
	return r, err
}

// bypass is the capacitance across the bias, none where there is no bypass.
func (e *Evidence) bypass() quantity.Capacitance {
	c, err := e.Circuit()
	if err != nil || c.Element("bias.bypass") == nil {
		return 0
	}
	return c.Element("bias.bypass").Capacitance
}

// ResistorSetting is what the bias resistor must be set to, and how that is known: what the
// stated law asks for, else what is fitted.
func (e *Evidence) ResistorSetting() (quantity.Resistance, string, error) {
	if r, err := e.ResistorNeeded(); err == nil {
		return r, "the stated emission needs", nil
	}
	return e.chain.Bias.Resistor.Total(), "fitted are", nil
}

// BiasSetting is what a fixed bias must be set to, and how that is known: what the stated
// law asks for, else what is set.
func (e *Evidence) BiasSetting() (quantity.Voltage, string, error) {
	if v, err := e.BiasNeeded(); err == nil {
		return v, "the stated emission needs", nil
	}
	return e.chain.Bias.Voltage.V, "set are", nil
}

// ResistorNeeded is the bias resistor with which the stated law gives the wanted
// emission: the stated one.
func (e *Evidence) ResistorNeeded() (quantity.Resistance, error) {
	return forWanted(e, gun.Law.ResistorFor)
}

// BiasNeeded is the bias with which the stated law gives the stated emission.
func (e *Evidence) BiasNeeded() (quantity.Voltage, error) {
	return forWanted(e, gun.Law.BiasFor)
}

func forWanted[Q quantity.Number](e *Evidence, of func(gun.Law, quantity.Current) (Q, error)) (Q, error) {
	g := e.chain.Gun
	if !g.IsFitted() || e.DiodeGun() {
		return 0, lack.Failed("there is no bias to choose")
	}
	wanted, err := g.Emission.Need()
	if err != nil {
		return 0, err
	}
	law, err := e.statedLaw()
	if err != nil {
		return 0, err
	}
	return of(law, wanted)
}

// GunSensitivities says how strongly the emission follows its causes: as the gun is
// biased, and at a fixed bias of the same size.
type GunSensitivities struct{ Here, Fixed gun.Sensitivities }

// GunSensitivities of the operating point.
func (e *Evidence) GunSensitivities() (s GunSensitivities, err error) {
	p, err := e.Gun()
	if err != nil {
		return s, err
	}
	if s.Here, err = p.Sensitivities(); err != nil {
		return s, err
	}
	s.Fixed, err = p.AtFixedBias().Sensitivities()
	return s, err
}

// EmissionToTemperature is d ln I/d ln T of the gun as it is biased, and at fixed bias.
func (e *Evidence) EmissionToTemperature() (here, fixed float64, err error) {
	p, err := e.Gun()
	if err != nil {
		return 0, 0, err
	}
	emitter, err := e.Emitter()
	if err != nil {
		return 0, 0, err
	}
	t, err := e.chain.Gun.CathodeTemperature.Need()
	if err != nil {
		return 0, 0, err
	}
	if here, err = p.ToTemperature(emitter, t); err != nil {
		return 0, 0, err
	}
	fixed, err = p.AtFixedBias().ToTemperature(emitter, t)
	return here, fixed, err
}
