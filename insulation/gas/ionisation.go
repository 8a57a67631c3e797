package gas

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// Ionisation is how fast an avalanche grows: the effective ionisation coefficient over
// the size at which the avalanche counts as a streamer, α/K in 1/m, at normal density
// and by field. At another density δ it is δ α(E/δ)/K.
type Ionisation struct {
	critical quantity.Field // no growth at or under it
	most     quantity.Field // the fit ends here
	rate     func(quantity.Field) float64
	straight bool // the rate is linear in the field, else quadratic
	Source   gap.Source
}

// AirByUniformLaw is α/K = ((E − 24.22)/6.08)² for each cm, E in kV/cm: Schumann's
// form of the coefficient with the constants of the uniform-field law, which it
// reproduces exactly between plates. Around wires and spheres of 0.1 to 50 mm radius
// it meets Peek's onset fields within 7 %; round finer tips it gives lower fields than
// they do.
var AirByUniformLaw = Ionisation{
	critical: uniformField, most: 1e9,
	rate: func(e quantity.Field) float64 {
		over := float64(e-uniformField) / uniformRoot
		return over * over
	},
	Source: gap.Source{Text: "streamer criterion with the ionisation that gives the uniform-field law 24.22 x + 6.08 √x", Mark: gap.Derived},
}

// AirQuadratic is α/p = 1.6 ((E/p) − 2.2)² − 0.3 in mm, kV, bar with K = 9.15, for E/p
// of 2.5 to 7.9 kV/(mm bar) (Petcharaks' form; memory): critical field 26.3 kV/(cm bar).
var AirQuadratic = Ionisation{
	critical: quadraticZero * bar, most: 7.9e6 * bar,
	rate: func(e quantity.Field) float64 {
		over := float64(e)/1e6/bar - 2.2
		return (1.6*over*over - 0.3) * bar / 9.15 * 1e3
	},
	Source: gap.Source{Text: "streamer criterion, α/p = 1.6 (E/p − 2.2)² − 0.3, K = 9.15", Mark: gap.Memory},
}

const (
	bar           = 1.01325           // of normal density in bar
	quadraticZero = 2.6330127018922e6 // V/(m bar): 2.2 + √(0.3/1.6) kV/mm
)

// SF6 is α = 0.027 E − 2400.4 p for each m, E in V/m, p in kPa, K = 18.42 (Abdel-Salam
// et al., High-Voltage Engineering, 2nd ed., ex. 5.2; read): critical field 88.9 kV/(m
// kPa). The linear fit ends at about 200 kV/(m kPa) (memory).
var SF6 = Ionisation{
	critical: 2400.4 / 0.027 * 101.325, most: 200e3 * 101.325, straight: true,
	rate:   func(e quantity.Field) float64 { return (0.027*float64(e) - 2400.4*101.325) / 18.42 },
	Source: gap.Source{Text: "streamer criterion of SF6, Abdel-Salam et al., High-Voltage Engineering, 2nd ed., ex. 5.2", Mark: gap.Read},
}

// ionisationOf is the coefficient that judges in a gas.
func ionisationOf(g gap.Gas) (Ionisation, error) {
	switch g {
	case gap.AirGas:
		return AirByUniformLaw, nil
	case gap.SulphurHexafluoride:
		return SF6, nil
	}
	return Ionisation{}, lack.Range("no ionisation coefficient of %s is known here: only plates are answered", string(g))
}
