package evidence

import (
	"math"
	"math/cmplx"

	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/ripple/beam"
)

// Electron is the beam's electron, accelerated from the cathode to ground.
func (e *Evidence) Electron() (beam.Electron, error) {
	v, err := e.Potential("cathode")
	if err != nil {
		return beam.Electron{}, err
	}
	if v >= 0 {
		return beam.Electron{}, lack.Range("the cathode is not below the anode: no beam of electrons")
	}
	return beam.Accelerated(-v)
}

// Spot is the beam at the specimen, what disturbs it within exposure or dwell included.
func (e *Evidence) Spot() (beam.Spot, error) {
	return remember(e, "spot", func() (beam.Spot, error) {
		if e.chain.Beam == nil {
			return beam.Spot{}, lack.Key("beam")
		}
		if e.chain.Gun != nil && !e.chain.Gun.IsFitted() {
			return beam.Spot{}, lack.Failed("without a gun there is no beam")
		}
		electron, err := e.Electron()
		if err != nil {
			return beam.Spot{}, err
		}
		optics, err := e.optics()
		if err != nil {
			return beam.Spot{}, err
		}
		source, err := e.Source()
		if err != nil {
			return beam.Spot{}, err
		}
		blurring, _, err := e.disturbing()
		if err != nil {
			return beam.Spot{}, err
		}
		disturbance, err := beam.Disturb(blurring...)
		if err != nil {
			return beam.Spot{}, err
		}
		return beam.Compute(electron, optics, source, disturbance)
	})
}

func (e *Evidence) optics() (beam.Optics, error) {
	b := e.chain.Beam
	if err := document.Need(b.ChromaticAberration, b.SphericalAberration, b.HalfAngle, b.SourceImage); err != nil {
		return beam.Optics{}, err
	}
	return beam.Optics{Chromatic: b.ChromaticAberration.V, Spherical: b.SphericalAberration.V, Angle: b.HalfAngle.V, SourceImage: b.SourceImage.V}, nil
}

// Source is the energy distribution of the source: measured, else thermal.
func (e *Evidence) Source() (beam.Distribution, error) {
	b, g := e.chain.Beam, e.chain.Gun
	if b != nil && b.EnergyWidth.Set() {
		return beam.GaussianFWHM(b.EnergyWidth.V)
	}
	if g == nil || !g.CathodeTemperature.Set() {
		return beam.Distribution{}, lack.Because("the energy width of the source follows neither from a measurement nor from a temperature", "beam.energy_width", "gun.cathode_temperature")
	}
	return beam.Thermionic(g.CathodeTemperature.V)
}

// Blurring is the time over which a disturbance counts as blur: the exposure where
// given, else the dwell.
func (e *Evidence) blurring() quantity.Time {
	b := e.chain.Beam
	return b.Exposure.Or(b.Dwell.V)
}

// disturbing parts what reaches the cathode into what blurs and what bands.
func (e *Evidence) disturbing() (blurring, banding []beam.Line, err error) {
	lines, err := e.disturbances()
	if err != nil {
		return nil, nil, err
	}
	return beam.Split(lines, e.blurring())
}

// disturbances are ripple and hum at the cathode as lines that keep no step.
func (e *Evidence) disturbances() ([]beam.Line, error) {
	return remember(e, "disturbances", e.disturbLines)
}

func (e *Evidence) disturbLines() ([]beam.Line, error) {
	drive, err := e.DriveLines()
	if err != nil {
		return nil, err
	}
	hum, err := e.Hum()
	if err != nil {
		return nil, err
	}
	ripple, err := beam.HarmonicLine("ripple", e.chain.Drive.Frequency.V, terms(drive))
	if err != nil {
		return nil, err
	}
	tip, err := e.TipSwing()
	if err != nil {
		return nil, err
	}
	lines := []beam.Line{ripple}
	if hum.Frequency > 0 {
		lines = append(lines, beam.Line{Name: "hum", Frequency: hum.Frequency, Amplitude: quantity.Voltage(cmplx.Abs(hum.Cathode)), Form: beam.Sine()})
	}
	if tip > 0 {
		f, err := e.heaterFrequency()
		if err != nil {
			return nil, err
		}
		lines = append(lines, beam.Line{Name: "heater", Frequency: f, Amplitude: tip, Form: beam.Sine()})
	}
	return lines, nil
}

// heaterFrequency is that of an AC heater: its own, else the mains'.
func (e *Evidence) heaterFrequency() (quantity.Frequency, error) {
	if f := e.chain.Heater.Frequency; f.Set() {
		return f.V, nil
	}
	if e.chain.Site == nil {
		return 0, lack.Key("heater.frequency")
	}
	return e.chain.Site.MainsFrequency.Need()
}

// terms are the harmonics that count: the rest lies below a millionth of the largest.
func terms(lines []Line) []beam.Harmonic {
	most := 0.0
	for _, l := range lines {
		most = math.Max(most, cmplx.Abs(l.Cathode))
	}
	var all []beam.Harmonic
	for k, l := range lines {
		if a := cmplx.Abs(l.Cathode); a > 1e-6*most {
			// A·sin(kωt + φ) = Re(c e^jkωt) with φ = arg c + π/2; the cathode is negative, so the energy follows −v.
			all = append(all, beam.Harmonic{Order: k + 1, Amplitude: quantity.Voltage(a), Phase: quantity.Angle(cmplx.Phase(l.Cathode) - math.Pi/2)})
		}
	}
	return all
}

// BlurTotal is the whole spot.
func (e *Evidence) BlurTotal() (quantity.Length, error) {
	s, err := e.Spot()
	return s.TotalFW50, err
}

// Banding is the relative energy swing of what is too slow to blur within the dwell,
// peak to peak.
func (e *Evidence) Banding() (quantity.Fraction, error) {
	b := e.chain.Beam
	if b == nil || !b.Dwell.Set() {
		return 0, lack.Key("beam.dwell")
	}
	lines, err := e.disturbances()
	if err != nil {
		return 0, err
	}
	_, slow, err := beam.Split(lines, b.Dwell.V)
	if err != nil {
		return 0, err
	}
	electron, err := e.Electron()
	if err != nil {
		return 0, err
	}
	sum := 0.0
	for _, l := range slow {
		sum += float64(l.PeakToPeak())
	}
	return quantity.Fraction(sum / float64(electron.Energy())), nil
}

// RippleAllowed is the disturbance at the cathode that just uses up the allowance.
func (e *Evidence) RippleAllowed() (quantity.Voltage, error) {
	s, err := e.Spot()
	if err != nil {
		return 0, err
	}
	allowance, err := e.chain.Beam.BlurAllowance.Need()
	if err != nil {
		return 0, err
	}
	return s.RippleAllowed(allowance)
}
