// Package limits holds what is asked, each limit with its source and its mark.
package limits

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/rules/rule"
)

// Derating is how far a rating may be used: marginal above the first share,
// failing above the second.
type Derating struct {
	Marginal, Fails quantity.Fraction
	Source          rule.Source
}

// Margin is the margin below the failing share at which a finding becomes marginal.
func (d Derating) Margin() float64 { return float64(d.Fails/d.Marginal) - 1 }

// InFault is how far a rating may be used in a single fault: all of it, marginal where
// the usual share is passed. Common practice, no source.
func (d Derating) InFault() Derating {
	if d.Fails < 1 {
		d.Marginal = d.Fails
	}
	return Derating{d.Marginal, 1, FaultSource}
}

// TripSource says where trips are set.
var TripSource = practice("a trip stands above the working value with 5 % in hand and below what the parts bear, with a sensor that rests on nothing it guards")

// FaultSource says why ratings count whole in a single fault.
var FaultSource = practice("in a single fault no other part passes its rating; the usual shares are for what lasts")

func practice(text string) rule.Source {
	return rule.Source{Text: text, Mark: rule.Practice, Governs: true}
}

// derated is a derating whose source says its own shares: the failing one first, the
// marginal one second.
func derated(marginal, fails quantity.Fraction, words string) Derating {
	return Derating{marginal, fails, practice(fmt.Sprintf(words, quantity.Text(fails), quantity.Text(marginal)))}
}

// Allowed says how much of a rating may be used at most, in words.
func (d Derating) Allowed() string { return quantity.Text(d.Fails) }

// Comfort says from where on a use of something is marginal, in words.
func (d Derating) Comfort(of string) string {
	return "marginal above " + quantity.Text(d.Marginal) + " of " + of
}

// Usual shares of ratings; common practice, no source.
var (
	DiodeReverse      = derated(0.70, 0.85, "diode reverse voltage at most %s of rating, %s for comfort")
	DiodeCurrent      = derated(0.50, 0.80, "mean forward current at most %s of rating, %s for comfort")
	DiodeSurge        = derated(0.70, 1.00, "peak current of a single fault at most the single-pulse rating, %[2]s for comfort")
	CapacitorVoltage  = derated(0.60, 0.80, "capacitor voltage at most %s of rating, %s for comfort")
	ResistorVoltage   = derated(0.80, 0.90, "resistor voltage at most %s of rating, %s for comfort")
	ResistorPower     = derated(0.50, 0.70, "resistor power at most %s of the rating at its ambient, %s for comfort; rating falls linearly from 70 to 155 degC")
	InsulationVoltage = derated(0.80, 1.00, "working voltage at most the rating of an insulating part, %[2]s for comfort")
	StartVoltage      = derated(0.90, 1.00, "voltages of a start, a rare event, at most the rating, %[2]s for comfort")
	SinglePulse       = derated(0.80, 1.00, "a single arc at most the single-pulse rating, %[2]s for comfort")
)

// ArcSource says why series resistors are judged by what an arc does to them.
var ArcSource = practice("an arc at the gun drives the stored charge through the series resistors: they stand it as a single pulse")

// Shares of half a period that the recovery of a diode may take.
const (
	RecoveryShare   = 0.1
	RecoveryComfort = 0.02
)

// RecoverySource is where they come from.
var RecoverySource = practice("reverse recovery is short against half a period of the drive; the charge it carries back is lost each period")

// FeedTest is the least ratio of the test voltage of a heater feed to its highest
// working voltage: common practice (1.2 to 2 times the working DC voltage), from memory.
const FeedTest = 1.2

// FeedTestSource is where FeedTest comes from.
var FeedTestSource = rule.Source{Text: "insulation test of a feed at 1.2 to 2 times its working DC voltage", Mark: rule.Practice, Governs: true}

// StraySource says why strays are judged.
var StraySource = practice("strays of a picofarad take hundreds of volts of a long multiplier: more than a quarter is a matter of layout, not of the load")

// HumSource says why hum is judged against ripple.
var HumSource = practice("hum through an unscreened heater feed can be a hundred times the ripple that the filter was built for")
