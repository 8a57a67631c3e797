package beam

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Line is one periodic disturbance of the accelerating voltage.
type Line struct {
	Name      string
	Frequency quantity.Frequency
	Amplitude quantity.Voltage // zero to peak; half the peak to peak of a lopsided form
	Form      Waveform
}

// SampledLine is the line of a computed wave-form (see Sampled).
func SampledLine(name string, f quantity.Frequency, samples []quantity.Voltage) (Line, error) {
	form, amplitude, err := Sampled(samples)
	return Line{name, f, amplitude, form}, err
}

// Harmonic is one term of a periodic disturbance, Amplitude sin(2π Order f t + Phase).
type Harmonic struct {
	Order     int
	Amplitude quantity.Voltage
	Phase     quantity.Angle
}

// samplesPerPeriod of the highest harmonic keep a summed wave-form within 1e-5.
const samplesPerPeriod = 600

// HarmonicLine sums harmonics of one frequency, which keep step with each other, to
// one wave-form; as lines of their own they would be taken to drift apart.
func HarmonicLine(name string, f quantity.Frequency, terms []Harmonic) (Line, error) {
	highest := 1
	for _, h := range terms {
		if h.Order < 1 {
			return Line{}, lack.Range("harmonics are numbered from 1, not %d", h.Order)
		}
		highest = max(highest, h.Order)
	}
	samples := make([]quantity.Voltage, samplesPerPeriod*highest)
	for i := range samples {
		turn := 2 * math.Pi * float64(i) / float64(len(samples))
		for _, h := range terms {
			samples[i] += h.Amplitude * quantity.Voltage(math.Sin(float64(h.Order)*turn+float64(h.Phase)))
		}
	}
	return SampledLine(name, f, samples)
}

// PeakToPeak is twice the amplitude.
func (l Line) PeakToPeak() quantity.Voltage { return 2 * l.Amplitude }

// Distribution of the energies the line makes: e times voltage.
func (l Line) Distribution() Distribution {
	if l.Form.table == nil {
		panic("beam: line without a wave-form")
	}
	return Distribution{l.Form.table, float64(l.Amplitude)}
}

// Split parts lines into those whose period is at most the averaging time, which
// blur, and slower ones, which band: within the time they are a drift. The time is
// the exposure where a whole record is judged, the dwell where one point is.
func Split(lines []Line, averaging quantity.Time) (blurring, banding []Line, err error) {
	if !positive(averaging) {
		return nil, nil, lack.Because("neither exposure nor dwell given", "beam.exposure", "beam.dwell")
	}
	for _, l := range lines {
		if quantity.AtLeast(float64(l.Frequency)*float64(averaging), 1) {
			blurring = append(blurring, l)
		} else {
			banding = append(banding, l)
		}
	}
	return blurring, banding, nil
}

// Disturbance is what lines that keep no step with each other do together.
type Disturbance struct {
	// PeakToPeak is the linear sum of the lines': the most they reach.
	PeakToPeak quantity.Voltage
	// RMS adds in squares.
	RMS quantity.Voltage
	// Energies is their distributions convolved.
	Energies Distribution
}

// Disturb convolves the lines. Those whose frequencies are in a ratio of small
// whole numbers must be given as one wave-form (HarmonicLine).
func Disturb(lines ...Line) (Disturbance, error) {
	var d Disturbance
	parts := make([]Distribution, 0, len(lines))
	for _, l := range lines {
		if !notNegative(l.Amplitude) {
			return d, lack.Range("%s: an amplitude is zero or more, not %s", l.Name, quantity.Text(l.Amplitude))
		}
		parts = append(parts, l.Distribution())
		d.PeakToPeak += l.PeakToPeak()
	}
	d.Energies = Convolve(parts...)
	d.RMS = quantity.Voltage(d.Energies.RMS())
	return d, nil
}
