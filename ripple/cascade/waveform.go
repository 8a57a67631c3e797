package cascade

import (
	"math"
	"math/cmplx"

	"kilovet/hv/quantity"
)

// Waveform is the ripple of narrow pulses: up by Rise at the positive peak of the
// drive (time zero), down evenly by First until the negative peak half a period
// later, down by Fall there, down evenly by Second until the next positive peak.
// Rise = First + Fall + Second. A symmetrical cascade has a negative Fall: its
// output repeats twice a period.
type Waveform struct {
	Period                    quantity.Time
	Rise, First, Fall, Second quantity.Voltage
}

// wave scales the charges of a stage by what one q does to its capacitor.
func wave(b share, step quantity.Voltage) Waveform {
	v := func(charge float64) quantity.Voltage { return quantity.Voltage(charge) * step }
	return Waveform{Rise: v(b.rise), First: v(b.first), Fall: v(b.fall), Second: v(b.second)}
}

func (w Waveform) plus(o Waveform) Waveform {
	return Waveform{w.Period, w.Rise + o.Rise, w.First + o.First, w.Fall + o.Fall, w.Second + o.Second}
}

// corners are the values before and after each pulse, from the value just after
// the pulse at the positive peak.
func (w Waveform) corners() (start, before, after, end quantity.Voltage) {
	before = -w.First
	after = before - w.Fall
	return 0, before, after, after - w.Second
}

// mean is the average over a period, from the value just after time zero.
func (w Waveform) mean() quantity.Voltage {
	start, before, after, end := w.corners()
	return (start + before + after + end) / 4
}

// above places the wave-form so that it stands at top just after time zero.
func (w Waveform) above(top quantity.Voltage) Swing {
	a, b, c, d := w.corners()
	return Swing{Mean: top + w.mean(), Maximum: top + max(a, b, c, d), Minimum: top + min(a, b, c, d)}
}

// PeakToPeak is the ripple from its largest to its smallest value.
func (w Waveform) PeakToPeak() quantity.Voltage {
	s := w.above(0)
	return s.Maximum - s.Minimum
}

// At is the ripple about its mean at a time after the positive peak of the drive;
// at the instant of a pulse, its value after the pulse.
func (w Waveform) At(t quantity.Time) quantity.Voltage {
	_, before, after, end := w.corners()
	x := math.Mod(float64(t/w.Period), 1)
	if x < 0 {
		x++
	}
	if x < 0.5 {
		return quantity.Voltage(2*x)*before - w.mean()
	}
	return after + quantity.Voltage(2*x-1)*(end-after) - w.mean()
}

// Harmonic is the component at k times the drive frequency as a peak phasor X:
// the ripple about its mean is the sum of Re(X exp(j 2π k f t)), t from the
// positive peak of the drive. For a drive counted as sin 2πft from its own zero,
// multiply by exp(−j k π/2). k must be above zero.
//
// The derivative of the wave-form is two jumps and two constant slopes; its
// Fourier integral divided by jω is exact:
//
//	X = [Rise − (−1)^k Fall − (First − Second) (1−(−1)^k)/(jπk)] / (jπk)
//
// so that with a sine drive |X| = [Rise − (−1)^k Fall]/(πk). Narrow pulses
// overstate high harmonics most: a pulse that lasts the angle θ holds no more
// than the harmonics up to about 2π/θ.
func (w Waveform) Harmonic(k int) complex128 {
	if k < 1 {
		panic("cascade: harmonic below the first")
	}
	parity := float64(1 - 2*(k%2)) // (−1)^k
	turn := complex(0, math.Pi*float64(k))
	jumps := complex(float64(w.Rise)-parity*float64(w.Fall), 0)
	slopes := complex(float64(w.First-w.Second)*(1-parity), 0)
	return (jumps - slopes/turn) / turn
}

// Harmonics are the peak phasors of harmonics 1 … count, as [Waveform.Harmonic].
func (w Waveform) Harmonics(count int) []complex128 {
	list := make([]complex128, count)
	for k := range list {
		list[k] = w.Harmonic(k + 1)
	}
	return list
}

// Amplitude is that of harmonic k, zero to peak.
func (w Waveform) Amplitude(k int) quantity.Voltage {
	return quantity.Voltage(cmplx.Abs(w.Harmonic(k)))
}
