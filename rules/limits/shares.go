package limits

import (
	"kilovet/hv/quantity"
	"kilovet/hv/xray"
)

// Shares and margins of practice that rules judge by; their sources stand beside the
// rules that use them. All are common practice, no source, unless said otherwise.
const (
	// HeadroomMargin is what a regulated drive keeps in hand at full load.
	HeadroomMargin = 0.05
	// DividerError is the largest error with which a reading can be believed, and
	// DividerComfort the one that is comfortable.
	DividerError   quantity.Fraction = 0.10
	DividerComfort quantity.Fraction = 0.05
	// WaitingMargin is what a waiting time keeps in hand over the computed time.
	WaitingMargin = 0.25
	// FeedTestComfort is the comfortable ratio of test voltage to highest working voltage.
	FeedTestComfort = 1.5
	// TripMargin is what the set point of a trip keeps in hand over the working value.
	TripMargin = 0.05
	// DistanceMargin is what distances keep in hand over the tables.
	DistanceMargin = 0.10
	// DescribedAbove is the voltage above which a node needs a described spacing to ground.
	DescribedAbove quantity.Voltage = 1000
	// BreakdownShare is how far a breakdown estimate may be used, BreakdownComfort how far
	// in comfort.
	BreakdownShare   = 0.80
	BreakdownComfort = 0.50
	// QuietBelow is the peak at or below which a gap as wide as the table for sharp
	// electrodes asks is free of corona.
	QuietBelow quantity.Voltage = 2000
	// BlurMargin is what a blur allowance keeps in hand.
	BlurMargin = 0.10
	// LawApart is how far a stated emission may lie from its law, LawComfort in comfort.
	LawApart   quantity.Fraction = 0.25
	LawComfort quantity.Fraction = 0.10
	// EmissionComfort is the share of the cathode's limit above which its temperature
	// governs the emission.
	EmissionComfort = 0.8
	// CutoffApart is the factor by which a stated cutoff may lie outside the band of its
	// estimate; within the band it meets.
	CutoffApart = 2
	// AdjustmentMargin is what the setting of a bias keeps in hand to the ends of its range.
	AdjustmentMargin = 0.10
	// Suppression is the least by which self-bias divides a slow disturbance of the emission
	// where it is said to regulate, SuppressionMargin what it keeps in hand in comfort.
	Suppression       = 2
	SuppressionMargin = 0.5
	// BalanceMargin is what the swing of a heater's tip keeps in hand to all that the blur
	// allowance leaves.
	BalanceMargin = 1
	// FeedMargin is what a heater feed keeps in hand of its rated power.
	FeedMargin = 0.25
)

// Limits about X-rays.
const (
	// HarmlessBelow is the voltage up to which apparatus is exempt outright (French Public
	// Health Code R1333-106, read).
	HarmlessBelow quantity.Voltage = 5e3
	// DoseRate is 1 µSv/h at 0.1 m (UK Ionising Radiations Regulations 1999, read), as the
	// air kerma rate that may give it.
	DoseRate quantity.KermaRate = 1e-6 / 3600 / xray.DosePerKerma
	// DoseComfort is the factor below the limit within which an estimate is marginal:
	// common practice, no source.
	DoseComfort = 3
)

// What surprises in a multiplier; common practice, no source, unless said otherwise.
const (
	// StrayShare is the share of the voltage without load that strays may take.
	StrayShare   quantity.Fraction = 0.25
	StrayComfort quantity.Fraction = 0.05
	// HalfWaveShare is the share of the ripple of a half-wave multiplier from which a
	// symmetrical one has gained nothing, HalfWaveComfort that in comfort.
	HalfWaveShare   = 0.9
	HalfWaveComfort = 0.5
	// HumOverRipple is how far hum may lie above the ripple.
	HumOverRipple = 10
)
