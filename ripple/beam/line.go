package beam

import (
	"math"
	"math/cmplx"

	"gonum.org/v1/gonum/dsp/fourier"

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

// sampled keeps a summed wave-form, drawn straight between its samples, within this part
// of its largest harmonic: between N samples harmonic k sags by (π k/N)²/2 of itself.
const sampled = 1e-5

// HarmonicLine sums harmonics of one frequency, which keep step with each other, to
// one wave-form; as lines of their own they would be taken to drift apart.
func HarmonicLine(name string, f quantity.Frequency, terms []Harmonic) (Line, error) {
	highest, most, bent := 1, 0.0, 0.0
	for _, h := range terms {
		if h.Order < 1 {
			return Line{}, lack.Range("harmonics are numbered from 1, not %d", h.Order)
		}
		highest = max(highest, h.Order)
		most = max(most, math.Abs(float64(h.Amplitude)))
		bent += math.Abs(float64(h.Amplitude)) * float64(h.Order) * float64(h.Order)
	}
	if most == 0 || math.IsNaN(bent) || math.IsInf(bent, 0) {
		return SampledLine(name, f, []quantity.Voltage{0, quantity.Voltage(bent)})
	}
	n := convenient(max(4*highest, int(math.Pi*math.Sqrt(bent/most/2/sampled))))
	spectrum := make([]complex128, n/2+1)
	for _, h := range terms {
		// A sin(x + φ) = Re(−jA e^jφ e^jx); half of it on either side of the spectrum.
		spectrum[h.Order] += cmplx.Rect(float64(h.Amplitude)/2, float64(h.Phase)-math.Pi/2)
	}
	return SampledLine(name, f, voltages(fourier.NewFFT(n).Sequence(nil, spectrum)))
}

func voltages(from []float64) []quantity.Voltage {
	all := make([]quantity.Voltage, len(from))
	for i, v := range from {
		all[i] = quantity.Voltage(v)
	}
	return all
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
	// Lines is their distributions convolved, Energies those with noise, where there is any.
	Lines, Energies Distribution
}

// OfCharge is what the disturbance does to particles of so many elementary charges: its
// volts stay, its energies go with the charge.
func (d Disturbance) OfCharge(charges float64) Disturbance {
	d.Energies, d.Lines = d.Energies.Scaled(charges), d.Lines.Scaled(charges)
	return d
}

// unheard is the part of the lines' rms below which noise is left out: it would widen
// nothing by more than 1e-8.
const unheard = 1e-4

// WithNoise adds random noise of an rms voltage, whose values are Gaussian; it has no peak
// to peak and leaves that alone. Noise below a ten-thousandth of the lines' rms changes
// nothing.
func (d Disturbance) WithNoise(rms quantity.Voltage) (Disturbance, error) {
	if rms <= unheard*d.RMS {
		return d, nil
	}
	unit, err := GaussianFWHM(1)
	if err != nil {
		return d, err
	}
	noise := unit.Scaled(float64(rms) / float64(unit.RMS()))
	d.Energies = Convolve(d.Energies, noise)
	d.RMS = quantity.Voltage(math.Hypot(float64(d.RMS), float64(rms)))
	return d, nil
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
	d.Lines = d.Energies
	d.RMS = quantity.Voltage(d.Energies.RMS())
	return d, nil
}
