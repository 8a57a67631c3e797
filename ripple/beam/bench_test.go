package beam

import (
	"testing"

	"kilovet/hv/quantity"
)

// reviewed is the beam part of one review: source and three lines, one sampled.
func reviewed(t interface{ Fatal(...any) }) (Particle, Optics, Distribution, Disturbance) {
	samples := make([]quantity.Voltage, 512)
	for i := range samples {
		samples[i] = quantity.Voltage(float64(i%256)/512 - 0.1*float64(i/256))
	}
	ripple, err := SampledLine("ripple", 38e3, samples)
	if err != nil {
		t.Fatal(err)
	}
	d, err := Disturb(ripple, Line{"hum", 50, 0.3, Sine()}, Line{"pickup", 76e3, 0.05, Sine()})
	if err != nil {
		t.Fatal(err)
	}
	source, err := GaussianFWHM(1.5)
	if err != nil {
		t.Fatal(err)
	}
	return at(t, 20), Optics{9e-3, 25e-3, 5e-3, 4e-9}, source, d
}

func BenchmarkReview(b *testing.B) {
	for b.Loop() {
		e, o, source, d := reviewed(b)
		s, err := Compute(e, o, source, d)
		if err != nil {
			b.Fatal(err)
		}
		if _, err := s.RippleAllowed(1.2 * s.TotalFW50); err != nil {
			b.Fatal(err)
		}
		if _, err := s.BestAngle(); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkConvolve(b *testing.B) {
	source, ripple := gaussian(b, 1), unit(Sine())
	for b.Loop() {
		Convolve(source, ripple)
	}
}

func BenchmarkDisc(b *testing.B) {
	d := Convolve(gaussian(b, 1), unit(Sine()))
	for b.Loop() {
		d.DiscFW50()
	}
}
