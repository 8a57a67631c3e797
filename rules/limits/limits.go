// Package limits holds what is asked, each limit with its source and its mark.
package limits

import (
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

func practice(text string) rule.Source {
	return rule.Source{Text: text, Mark: rule.Practice, Governs: true}
}

// Usual shares of ratings; common practice, no source.
var (
	DiodeReverse      = Derating{0.70, 0.85, practice("diode reverse voltage at most 85 % of rating, 70 % for comfort")}
	DiodeCurrent      = Derating{0.50, 0.80, practice("mean forward current at most 80 % of rating, 50 % for comfort")}
	DiodeSurge        = Derating{0.70, 1.00, practice("peak current of a single fault at most the single-pulse rating, 70 % for comfort")}
	CapacitorVoltage  = Derating{0.60, 0.80, practice("capacitor voltage at most 80 % of rating, 60 % for comfort")}
	ResistorVoltage   = Derating{0.80, 0.90, practice("resistor voltage at most 90 % of rating, 80 % for comfort")}
	ResistorPower     = Derating{0.50, 0.70, practice("resistor power at most 70 % of the rating at its ambient, 50 % for comfort; rating falls linearly from 70 to 155 degC")}
	InsulationVoltage = Derating{0.80, 1.00, practice("working voltage at most the rating of an insulating part, 80 % for comfort")}
	StartVoltage      = Derating{0.90, 1.00, practice("voltages of a start, a rare event, at most the rating, 90 % for comfort")}
	SinglePulse       = Derating{0.80, 1.00, practice("a single arc at most the single-pulse rating, 80 % for comfort")}
)

// ArcSource says why series resistors are judged by what an arc does to them.
var ArcSource = practice("an arc at the gun drives the stored charge through the series resistors: they stand it as a single pulse")

// Power of a film resistor falls linearly between these: common practice, no source.
const (
	FullPowerTo  quantity.Temperature = 70 + 273.15
	NoPowerAbove quantity.Temperature = 155 + 273.15
)

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
