package limits_test

import (
	"math"
	"testing"

	"kilovet/hv/steady"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

// TestLimitsAreWhatTheirSourcesSay holds every limit against a second copy of its
// figure, written from the source: a limit that moves is noticed.
func TestLimitsAreWhatTheirSourcesSay(t *testing.T) {
	for _, c := range []struct {
		name      string
		got, want float64
	}{
		{"touch, DC (IEC 61010-1 ed. 3, memory)", float64(limits.TouchVoltage), 60},
		{"touch, peak (IEC 61010-1 ed. 3, memory)", float64(limits.TouchPeak), 42.4},
		{"touch, single fault (memory)", float64(limits.FaultVoltage), 120},
		{"touch, current (IEC 61010-1, read)", float64(limits.TouchCurrent), 0.002},
		{"touch, charge (IEC 61010-1, read)", float64(limits.TouchCharge), 45e-6},
		{"touch, energy (IEC 60335-1, EN 50191, read)", float64(limits.TouchEnergy), 0.35},
		{"where charge gives way to energy (read)", float64(limits.ChargeRuleTo), 15000},
		{"bond, resistance (read)", float64(limits.BondResistance), 0.1},
		{"bond, test current (read)", float64(limits.BondTestCurrent), 25},
		{"full power of a film resistor to (practice)", float64(steady.FullPowerTo), 343.15},
		{"no power of a film resistor above (practice)", float64(steady.NoPowerAbove), 428.15},
		{"feed test (practice)", limits.FeedTest, 1.2},
		{"feed test, comfort", limits.FeedTestComfort, 1.5},
		{"headroom", limits.HeadroomMargin, 0.05},
		{"divider error", float64(limits.DividerError), 0.1},
		{"divider error, comfort", float64(limits.DividerComfort), 0.05},
		{"waiting time", limits.WaitingMargin, 0.25},
		{"distances", limits.DistanceMargin, 0.1},
		{"spacing described above", float64(limits.DescribedAbove), 1000},
		{"breakdown", limits.BreakdownShare, 0.8},
		{"breakdown, comfort", limits.BreakdownComfort, 0.5},
		{"quiet below", float64(limits.QuietBelow), 2000},
		{"blur", limits.BlurMargin, 0.1},
		{"X-rays harmless below (read)", float64(limits.HarmlessBelow), 5000},
		{"dose rate, µSv/h over dose per kerma 1.74 (read, memory)", float64(limits.DoseRate) * 3600e6, 1 / 1.74},
		{"strays", float64(limits.StrayShare), 0.25},
		{"strays, comfort", float64(limits.StrayComfort), 0.05},
		{"half-wave ripple", limits.HalfWaveShare, 0.9},
		{"half-wave ripple, comfort", limits.HalfWaveComfort, 0.5},
		{"hum over ripple", limits.HumOverRipple, 10},
		{"recovery", limits.RecoveryShare, 0.1},
	} {
		if !(math.Abs(c.got-c.want) <= 1e-12*c.want) {
			t.Errorf("%s: %g, want %g", c.name, c.got, c.want)
		}
	}
}

func TestDeratingsAreThoseStated(t *testing.T) {
	for _, c := range []struct {
		name            string
		d               limits.Derating
		marginal, fails float64
	}{
		{"diode reverse voltage", limits.DiodeReverse, 0.70, 0.85},
		{"diode current", limits.DiodeCurrent, 0.50, 0.80},
		{"diode surge", limits.DiodeSurge, 0.70, 1.00},
		{"capacitor voltage", limits.CapacitorVoltage, 0.60, 0.80},
		{"resistor voltage", limits.ResistorVoltage, 0.80, 0.90},
		{"resistor power", limits.ResistorPower, 0.50, 0.70},
		{"insulation", limits.InsulationVoltage, 0.80, 1.00},
		{"start voltage", limits.StartVoltage, 0.90, 1.00},
		{"single pulse", limits.SinglePulse, 0.80, 1.00},
	} {
		if float64(c.d.Marginal) != c.marginal || float64(c.d.Fails) != c.fails || c.d.Source.Mark != rule.Practice {
			t.Errorf("%s: %+v", c.name, c.d)
		}
		if !(math.Abs(c.d.Margin()-(c.fails/c.marginal-1)) <= 1e-12) {
			t.Errorf("%s: margin %g", c.name, c.d.Margin())
		}
	}
}
