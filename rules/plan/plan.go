// Package plan makes the plan of a first power-up: cold checks, steps of the drive
// with what every instrument should then read, and how to end. Everything in it is
// computed from the described chain; it is plain data with boxes left to fill in.
package plan

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
)

// Plan is a first power-up step by step.
type Plan struct {
	// Polarity is that of the output as described: positive or negative.
	Polarity string

	Cold   []Check
	Before []string // to do before the first voltage
	Steps  []Step
	Stops  []string // what ends every step at once
	Survey []Survey
	Trips  []Trip
	After  []string // how to end
	// Takes is what the plan takes for granted; Open what could not be planned, and why.
	Takes, Open []string
}

// Band is a value with the bounds it should lie between, in SI units.
type Band struct {
	Value, Low, High float64
	Unit             string
}

// Holds reports whether a value lies between the bounds, with the slack of comparisons.
func (b Band) Holds(v float64) bool {
	return quantity.AtLeast(v, b.Low) && quantity.AtMost(v, b.High)
}

// Text says the value and its bounds.
func (b Band) Text() string {
	d := quantity.DimensionOf(b.Unit)
	if quantity.Equal(b.Low, b.High) {
		return d.Text(b.Value)
	}
	return fmt.Sprintf("%s (%s to %s)", d.Text(b.Value), d.Text(b.Low), d.Text(b.High))
}

// Check is made with everything switched off, unplugged and earthed first.
type Check struct {
	What, Across string
	// Number is how many like parts are each checked in this way, What naming the first
	// and the last of them.
	Number   int
	With     string // instrument and voltage
	Expected Band   // no unit where Words says what is expected
	Words    string
}

// Gun says what of the gun is connected in a step.
type Gun string

// The states of the gun during a first power-up.
const (
	Apart Gun = "gun disconnected"
	Still Gun = "gun connected, filament off"
	Lit   Gun = "gun connected, filament on"
	None  Gun = "no gun"
)

// Step is one level of the drive, held for a while.
type Step struct {
	Name      string // unique
	Gun       Gun
	Share     float64
	Condition evidence.Condition
	Peak      quantity.Voltage // of the drive, to set, zero to peak
	Output    quantity.Voltage // mean at the output, signed
	Polarity  string           // that the step proves: positive or negative; empty in the others
	Ripple    *quantity.Voltage
	Return    *quantity.Current // mean, in the multiplier's return: more is leakage or corona
	// Within are the bounds of the return current by tolerances and drive, without the error
	// of an instrument; no unit where an instrument of the plan reads it, or where it is not
	// known.
	Within    Band
	Power     quantity.Power // that the drive gives
	Readings  []Reading
	Discharge evidence.Discharge
	Dwell     quantity.Time
	First     []string // to do before this step
}

// Reading is what one instrument should show.
type Reading struct {
	Instrument string
	Band
}

// Survey is a place where radiation is measured in a step.
type Survey struct {
	Shield, Step string
	Highest      quantity.KermaRate // estimated, 0.1 m outside
	Open         string             // why there is no estimate
}

// Trip is a protection with its set point and what it should lie between.
type Trip struct {
	What    string
	Set     string
	Working string // the highest that sound working brings
}
