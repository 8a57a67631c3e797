package cascade_test

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/ripple/cascade"
)

// M. S. Naidu and V. Kamaraju, High Voltage Engineering, example 6.1: 8 stages of
// 50 nF on 125 kV peak at 150 Hz, 5 mA. Printed: 248 kV, 12.4 %, 14 stages.
func ExampleCascade_TextbookDrop() {
	c := cascade.Cascade{Peak: 125e3, Frequency: 150}.WithEqual(8, 50e-9)
	noLoad, _ := c.NoLoad()
	book, _ := c.TextbookDrop(5e-3)
	stages, _ := c.StagesForMostOutput(5e-3)
	fmt.Println(quantity.Text(book), quantity.Text(quantity.Fraction(book/noLoad)), stages.ShortStages)
	// Output: 248 kV 12.4 % 14
}

// M. Abdel-Salam et al., High-Voltage Engineering, 2nd ed., chapter 16, example 1:
// doubler of 10 nF and 50 nF, 100 kV rms at 50 Hz, 5 mA. Printed: drop 11.0 kV,
// output 271.8 kV, ripple 2 kV, 3.89 %.
func ExampleCascade_Loaded() {
	c := cascade.Cascade{
		Peak: 141421, Frequency: 50,
		Coupling:  []quantity.Capacitance{10e-9},
		Smoothing: []quantity.Capacitance{50e-9},
	}
	s, _ := c.Loaded(5e-3)
	fmt.Println(quantity.Text(s.Drop()), quantity.Text(s.Output.Mean), quantity.Text(s.Ripple.PeakToPeak()),
		quantity.Text(quantity.Fraction(s.Drop()/s.NoLoad)))
	// Output: 11 kV 271.8 kV 2 kV 3.889 %
}

// A load the charge balance cannot answer for is refused.
func ExampleCascade_Loaded_refused() {
	c := cascade.Cascade{Peak: 1e3, Frequency: 50}.WithEqual(1, 10e-9)
	_, err := c.Loaded(1e-3)
	fmt.Println(err)
	// Output: one period's load moves capacitors by 2 kV, more than 300 V at the 1 kV peak of the drive: the charging pulses are too long for charge balance
}

// The current into a resistor follows from the line of the supply.
func ExampleCascade_Supply() {
	c := cascade.Cascade{Peak: 2e3, Frequency: 40e3, ForwardDrop: 10}.WithEqual(6, 2.2e-9)
	s, _ := c.Supply()
	i := s.Into(200e6)
	fmt.Println(quantity.Text(s.NoLoad), quantity.Text(s.OutputResistance), quantity.Text(i), quantity.Text(s.Voltage(i)))
	// Output: 23.88 kV 1.864 MΩ 118.3 µA 23.66 kV
}

// Amplitudes at the drive frequency and its harmonics, for the filter that follows.
func ExampleWaveform_Harmonic() {
	c := cascade.Cascade{Peak: 2e3, Frequency: 40e3}.WithEqual(4, 1e-9)
	s, _ := c.Loaded(100e-6)
	for k := 1; k <= 3; k++ {
		fmt.Println(k, quantity.Text(s.Ripple.Amplitude(k)))
	}
	// Output:
	// 1 12.73 V
	// 2 1.592 V
	// 3 4.244 V
}

// The doubler's output after whole periods: K. Zhou's handout prints 1, 1.5, 1.75,
// 1.875 of the peak, so it passes 90 % of two peaks in the fourth.
func ExampleCascade_RisePeriods() {
	c := cascade.Cascade{Peak: 1e3, Frequency: 1e3}.WithEqual(1, 1e-6)
	n, _ := c.RisePeriods(0.9)
	fmt.Println(n)
	// Output: 3.5
}
