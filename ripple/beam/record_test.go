package beam

import (
	"math"
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// recorded is 20 ms of 0.3 V of 50 Hz under 0.5 V of 5 kHz.
func recorded() Record {
	r := Record{Interval: 5e-6}
	for i := range 4000 {
		t := float64(i) * 5e-6
		r.Samples = append(r.Samples, quantity.Voltage(7+0.3*math.Sin(2*math.Pi*50*t)+0.5*math.Sin(2*math.Pi*5e3*t)))
	}
	return r
}

func TestSpectrumShowsTheTones(t *testing.T) {
	tones := recorded().Spectrum()
	near(t, "resolution", float64(tones[0].Frequency), 50, 1e-9)
	near(t, "50 Hz", float64(tones[0].Amplitude), 0.3, 1e-2)
	near(t, "5 kHz", float64(tones[99].Amplitude), 0.5, 1e-9)
	for k, tone := range tones {
		if k > 2 && (k < 97 || k > 101) && tone.Amplitude > 1e-6 {
			t.Errorf("%v V at %v Hz", tone.Amplitude, tone.Frequency)
		}
	}
}

// 40 samples of a period, drawn straight, are a sine within 2.5e-3. A time of 1 ms lets 5 kHz blur and 50 Hz band; a time of the whole record lets all
// blur.
func TestRecordIsPartedByTheTime(t *testing.T) {
	fast, slow, err := recorded().Lines("measured", 1e-3)
	if err != nil || len(fast) != 1 || len(slow) != 1 {
		t.Fatal(fast, slow, err)
	}
	near(t, "fast", float64(fast[0].PeakToPeak()), 1, 1e-6)
	near(t, "its frequency", float64(fast[0].Frequency), 5e3, 1e-9)
	near(t, "slow", float64(slow[0].PeakToPeak()), 0.6, 1e-4)
	near(t, "its frequency", float64(slow[0].Frequency), 50, 1e-9)
	near(t, "disc as of a sine", float64(fast[0].Distribution().DiscFW50()), 0.4040, 2.5e-3)
	fast, slow, err = recorded().Lines("measured", 20e-3)
	if err != nil || len(fast) != 1 || len(slow) != 0 {
		t.Fatal(fast, slow, err)
	}
	near(t, "whole", float64(fast[0].Distribution().RMS()), math.Hypot(0.3, 0.5)/math.Sqrt2, 2.5e-3)
	_, _, err = recorded().Lines("measured", 0)
	lacking(t, "no time", err, lack.Missing)
}

// A tone between two entries of the spectrum is named within a twentieth of their distance
// (the parabola through a raised cosine's logarithms, derived).
func TestToneBetweenTwoEntries(t *testing.T) {
	r := Record{Interval: 1e-5}
	for i := range 5000 {
		r.Samples = append(r.Samples, quantity.Voltage(math.Sin(2*math.Pi*130*float64(i)*1e-5)))
	}
	fast, _, err := r.Lines("measured", 1)
	if err != nil {
		t.Fatal(err)
	}
	if f := float64(fast[0].Frequency); math.Abs(f-130) > 1 {
		t.Errorf("130 Hz in steps of 20 Hz is named %g Hz", f)
	}
}

// Parts add up to the whole, and their variances too.
func TestPartsOfARecordAddUp(t *testing.T) {
	fast, slow, err := recorded().Lines("measured", 3e-3)
	if err != nil {
		t.Fatal(err)
	}
	whole, _ := SampledLine("whole", 1, recorded().Samples)
	near(t, "rms", math.Hypot(float64(fast[0].Distribution().RMS()), float64(slow[0].Distribution().RMS())), float64(whole.Distribution().RMS()), 1e-4)
}

// Derived: noise beside a sine adds to its rms in squares and leaves the peak alone.
func TestNoiseBesideALine(t *testing.T) {
	d, err := Disturb(Line{"hum", 50, 2, Sine()})
	if err != nil {
		t.Fatal(err)
	}
	noisy, err := d.WithNoise(1)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "rms", float64(noisy.RMS), math.Sqrt(3), 1e-5)
	near(t, "of the energies", float64(noisy.Energies.RMS()), math.Sqrt(3), 1e-5)
	near(t, "peak to peak", float64(noisy.PeakToPeak), 4, 1e-12)
	same, _ := d.WithNoise(0)
	near(t, "none", float64(same.Energies.FW50()), float64(d.Energies.FW50()), 1e-12)
}

// A doubly charged ion gains twice the energy from the same volt; everything relative is
// that of the voltage.
func TestIonsOfTwoCharges(t *testing.T) {
	one, err := AcceleratedIon(20e3, 40, 1)
	if err != nil {
		t.Fatal(err)
	}
	two, _ := AcceleratedIon(20e3, 40, 2)
	o := Optics{Chromatic: 9e-3, Angle: 5e-3}
	near(t, "energy", float64(two.Energy()), 40e3, 1e-12)
	near(t, "focus", float64(o.FocusShift(two, 1)), float64(o.FocusShift(one, 1)), 1e-6)
	hum := Line{"hum", 50, 1, Sine()}
	near(t, "defocus", float64(o.DefocusFW50(two, hum)), float64(o.DefocusFW50(one, hum)), 1e-6)
	d, _ := Disturb(hum)
	near(t, "disc", float64(o.ChromaticFW50(two, d.OfCharge(2).Energies)), float64(o.ChromaticFW50(one, d.Energies)), 1e-6)
	near(t, "slow ions are not relativistic", one.Kappa(), 1, 1e-6)
	// The wavelength of argon at 20 kV: h/√(2 m e V), from CODATA's constants.
	near(t, "wavelength", float64(one.Wavelength()), 6.62607015e-34/math.Sqrt(2*40*1.66053906660e-27*1.602176634e-19*20e3), 1e-6)
	_, err = AcceleratedIon(20e3, 0, 1)
	lacking(t, "no mass", err, lack.Outside)
}
