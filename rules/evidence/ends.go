package evidence

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/ripple/beam"
)

// BeamEnds are the nodes between which the particles are accelerated: from the cathode
// where there is one, else from the output, unless said otherwise, to ground or to the
// fed anode.
func (e *Evidence) BeamEnds() (from, to string) {
	from, to = "output", "ground"
	if e.chain.HasCathode() {
		from = "cathode"
	}
	if b := e.chain.Beam; b != nil && b.From.Set() {
		from = b.From.V
	}
	if e.chain.Gun.EarthedCathode() {
		to = "anode"
	}
	return from, to
}

// Ions reports whether the beam is one of positive ions.
func (e *Evidence) Ions() bool { return e.chain.Beam != nil && e.chain.Beam.Particle.V == "ion" }

// Particle is the beam's particle at its final energy.
func (e *Evidence) Particle() (beam.Particle, error) {
	v, err := e.Accelerated()
	if err != nil {
		return beam.Particle{}, err
	}
	if e.Ions() {
		b := e.chain.Beam
		if v <= 0 {
			return beam.Particle{}, lack.Range("positive ions start above the electrode they go to: no beam of ions")
		}
		mass, err := b.MassNumber.Need()
		if err != nil {
			return beam.Particle{}, err
		}
		return beam.AcceleratedIon(v, mass, b.ChargeNumber.Or(1))
	}
	if v >= 0 {
		return beam.Particle{}, lack.Range("the cathode is not below the anode: no beam of electrons")
	}
	return beam.Accelerated(-v)
}

// Accelerated is the mean voltage of the particles' start above their final electrode,
// signed.
func (e *Evidence) Accelerated() (quantity.Voltage, error) {
	from, to := e.BeamEnds()
	v, err := e.Potential(from)
	if err != nil || to == "ground" {
		return v, err
	}
	w, err := e.Potential(to)
	return v - w, err
}

// Spotless is why no spot is reckoned; nil where one is.
func (e *Evidence) Spotless() error {
	b := e.chain.Beam
	switch {
	case b == nil:
		return lack.Key("beam")
	case e.chain.Gun != nil && !e.chain.Gun.IsFitted():
		return lack.Failed("without a gun there is no beam")
	case b.Purpose.Or("probe") != "probe":
		return lack.Failed("the beam is for %s, not a probe: no spot is reckoned", purposes[b.Purpose.V])
	}
	return nil
}

// purposes are the uses other than a probe, in a sentence.
var purposes = map[string]string{"x-ray tube": "an X-ray tube", "other": "another use"}
