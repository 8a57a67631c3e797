package evidence

import (
	"cmp"
	"math"
	"math/cmplx"
	"slices"

	"kilovet/hv/quantity"
	"kilovet/ripple/beam"
)

// disturbing parts what reaches the beam into what blurs within a time and what bands.
func (e *Evidence) disturbing(within quantity.Time) (blurring, banding []beam.Line, err error) {
	m, err := e.Measured()
	if err != nil {
		return nil, nil, err
	}
	if m != nil {
		return m.Record.Lines("measured", within)
	}
	lines, err := e.disturbances()
	if err != nil {
		return nil, nil, err
	}
	return beam.Split(lines, within)
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
	ripple, err := beam.HarmonicLine("ripple", e.chain.Drive.Frequency.V, e.terms(drive))
	if err != nil {
		return nil, err
	}
	slow, err := e.lockedLines()
	return append([]beam.Line{ripple}, slow...), err
}

// lockedLines are the sines that hang on mains and heater, each frequency once: what
// comes by several ways at one frequency is taken to add, since its phases are not known.
func (e *Evidence) lockedLines() ([]beam.Line, error) {
	var lines []beam.Line
	add := func(name string, f quantity.Frequency, amplitude quantity.Voltage) {
		if f <= 0 || amplitude <= 0 {
			return
		}
		for i := range lines {
			if quantity.Equal(lines[i].Frequency, f) {
				lines[i].Amplitude += amplitude
				return
			}
		}
		lines = append(lines, beam.Line{Name: name, Frequency: f, Amplitude: amplitude, Form: beam.Sine()})
	}
	hum, err := e.Hum()
	if err != nil {
		return nil, err
	}
	add("hum", hum.Frequency, quantity.Voltage(cmplx.Abs(hum.Cathode)))
	tip, err := e.TipSwing()
	if err != nil {
		return nil, err
	}
	if tip > 0 {
		f, err := e.heaterFrequency()
		if err != nil {
			return nil, err
		}
		add("heater", f, tip)
	}
	ripple, f, err := e.TipRipple()
	if err != nil {
		return nil, err
	}
	add("heater ripple", f, ripple)
	if warm, err := e.TemperatureSwing(); err == nil && e.biasMovesCathode() {
		add("heater's temperature", warm.Frequency, warm.Bias/2)
	}
	return lines, nil
}

// Tones are hum and harmonics of the drive at the cathode as they are computed, the lowest
// first; nothing where they are not known.
func (e *Evidence) Tones() []beam.Tone {
	var all []beam.Tone
	if slow, err := e.lockedLines(); err == nil {
		for _, l := range slow {
			all = append(all, beam.Tone{Frequency: l.Frequency, Amplitude: l.Amplitude})
		}
	}
	drive, err := e.DriveLines()
	if err != nil {
		return all
	}
	for _, l := range drive {
		all = append(all, beam.Tone{Frequency: l.Frequency, Amplitude: quantity.Voltage(cmplx.Abs(l.Cathode))})
	}
	slices.SortStableFunc(all, func(a, b beam.Tone) int { return cmp.Compare(a.Frequency, b.Frequency) })
	return all
}

// biasMovesCathode reports whether a change of the bias moves the cathode rather than the
// control electrode.
func (e *Evidence) biasMovesCathode() bool {
	b := e.chain.Bias
	return b != nil && b.Fed.Or("control") == "control"
}

// terms are the harmonics that count: the rest lies below a millionth of the largest.
func (e *Evidence) terms(lines []Line) []beam.Harmonic {
	most := 0.0
	for _, l := range lines {
		most = math.Max(most, cmplx.Abs(l.Cathode))
	}
	sign := -1.0 // a cathode further down means more energy
	if e.Ions() {
		sign = 1
	}
	var all []beam.Harmonic
	for k, l := range lines {
		if a := cmplx.Abs(l.Cathode); a > 1e-6*most {
			// Re(c e^jkωt) is |c|·sin(kωt + arg c + π/2).
			all = append(all, beam.Harmonic{Order: k + 1, Amplitude: quantity.Voltage(a), Phase: quantity.Angle(cmplx.Phase(l.Cathode) + sign*math.Pi/2)})
		}
	}
	return all
}

// noise is the rms of resistor and emission noise on the cathode; none where it has no
// bandwidth or does not move the cathode.
func (e *Evidence) noise() quantity.Voltage {
	if m, _ := e.Measured(); m != nil || !e.biasMovesCathode() {
		return 0
	}
	resistor, emission, err := e.BiasNoise()
	if err != nil {
		return 0
	}
	return quantity.Voltage(math.Hypot(float64(resistor), float64(emission)))
}

// BiasNoise is the rms voltage across the bias by thermal noise of its resistor and by shot
// noise of the emission.
func (e *Evidence) BiasNoise() (resistor, emission quantity.Voltage, err error) {
	p, err := e.Gun()
	if err != nil {
		return 0, 0, err
	}
	air, err := e.air().Need()
	if err != nil {
		return 0, 0, err
	}
	if resistor, err = p.ResistorNoise(e.bypass(), air); err != nil {
		return 0, 0, err
	}
	emission, err = p.ShotNoise(e.bypass())
	return resistor, emission, err
}
