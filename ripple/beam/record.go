package beam

import (
	"math"
	"math/cmplx"

	"gonum.org/v1/gonum/dsp/fourier"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Record is a measured disturbance at even times; more voltage means more energy.
type Record struct {
	Samples  []quantity.Voltage
	Interval quantity.Time
}

// Duration of the record.
func (r Record) Duration() quantity.Time { return r.Interval * quantity.Time(len(r.Samples)) }

// Tone is one frequency of a spectrum.
type Tone struct {
	Frequency quantity.Frequency
	Amplitude quantity.Voltage // zero to peak
}

// Spectrum is the record's tones from one over its duration up, through a raised-cosine
// window (J. von Hann's), scaled so that a sine shows its own amplitude; between two
// frequencies of the spectrum up to 15 % less.
func (r Record) Spectrum() []Tone {
	n := len(r.Samples)
	if n < 4 {
		return nil
	}
	mean := r.mean()
	windowed := make([]float64, n)
	for i, v := range r.Samples {
		windowed[i] = (float64(v) - mean) * (1 - math.Cos(2*math.Pi*float64(i)/float64(n))) / 2
	}
	spectrum := fourier.NewFFT(n).Coefficients(nil, windowed)
	tones := make([]Tone, 0, len(spectrum)-1)
	for k := 1; k < len(spectrum); k++ {
		tones = append(tones, Tone{quantity.Frequency(float64(k) / float64(r.Duration())), quantity.Voltage(4 * cmplx.Abs(spectrum[k]) / float64(n))})
	}
	return tones
}

func (r Record) mean() float64 {
	sum := 0.0
	for _, v := range r.Samples {
		sum += float64(v)
	}
	return sum / float64(len(r.Samples))
}

// Lines parts the record into what an averaging time blurs and what is slower and bands;
// either may be missing. Each bears the frequency that is strongest in it. Where the
// record is shorter than the time all of it blurs, and what is slower than the record
// was not measured.
func (r Record) Lines(name string, averaging quantity.Time) (blurring, banding []Line, err error) {
	if !positive(averaging) {
		return nil, nil, lack.Because("neither exposure nor dwell given", "beam.exposure", "beam.dwell")
	}
	n := len(r.Samples)
	first := int(math.Ceil(float64(r.Duration()/averaging) * (1 - 1e-9))) // of the spectrum that blurs
	if first <= 1 {
		line, err := SampledLine(name, r.strongest(1, n/2+1), r.Samples)
		return []Line{line}, nil, err
	}
	fast, slow, err := r.parted(name, first)
	return fast, slow, err
}

// parted cuts the spectrum before its entry first.
func (r Record) parted(name string, first int) (fast, slow []Line, err error) {
	n := len(r.Samples)
	fft := fourier.NewFFT(n)
	mean, centred := r.mean(), make([]float64, n)
	for i, v := range r.Samples {
		centred[i] = float64(v) - mean
	}
	spectrum := fft.Coefficients(nil, centred)
	band := func(low, high int) ([]Line, error) {
		part := make([]complex128, len(spectrum))
		copy(part[low:high], spectrum[low:high])
		samples := fft.Sequence(nil, part)
		for i := range samples {
			samples[i] /= float64(n)
		}
		line, err := SampledLine(name, r.strongest(low, high), voltages(samples))
		return []Line{line}, err
	}
	if first < len(spectrum) {
		if fast, err = band(first, len(spectrum)); err != nil {
			return nil, nil, err
		}
	}
	slow, err = band(1, min(first, len(spectrum)))
	return fast, slow, err
}

// strongest is the frequency of the greatest tone among the entries of a spectrum, between
// two of them where its neighbours say so.
func (r Record) strongest(low, high int) quantity.Frequency {
	tones := r.Spectrum()
	at := -1
	for k := max(low-1, 0); k < min(high-1, len(tones)); k++ {
		if at < 0 || tones[k].Amplitude > tones[at].Amplitude {
			at = k
		}
	}
	if at < 0 {
		return quantity.Frequency(float64(low) / float64(r.Duration()))
	}
	return tones[at].Frequency + quantity.Frequency(peakOffset(tones, at)/float64(r.Duration()))
}

// peakOffset is how far from an entry of a windowed spectrum its peak lies, in entries: the
// top of the parabola through the logarithms of three.
func peakOffset(tones []Tone, at int) float64 {
	if at == 0 || at == len(tones)-1 {
		return 0
	}
	left, middle, right := float64(tones[at-1].Amplitude), float64(tones[at].Amplitude), float64(tones[at+1].Amplitude)
	if left <= 0 || middle <= 0 || right <= 0 {
		return 0
	}
	bend := math.Log(left) - 2*math.Log(middle) + math.Log(right)
	if bend >= 0 {
		return 0
	}
	return (math.Log(left) - math.Log(right)) / (2 * bend)
}
