package oil

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// Condition is the state of oil by its standard test.
type Condition string

// The conditions.
const (
	AsNew   Condition = "as new"
	Good    Condition = "good"
	Caution Condition = "to be watched"
	Failed  Condition = "to be replaced or treated"
)

var bandsSource = gap.Source{Text: "bands of IEC 60156 results, laboratory note: above 70 kV new, 50 to 70 good, 30 to 50 caution, below 30 fail", Mark: gap.Read}

// ConditionOf is the condition of oil that broke down at a mean rms voltage in the test of
// IEC 60156: 2.5 mm, 2 kV/s, six breakdowns. The note read drops the first shot and
// averages five, the standard averages all six (memory).
func ConditionOf(test quantity.Voltage) (Condition, gap.Source, error) {
	source := bandsSource.Governing()
	switch {
	case test <= 0:
		return "", source, lack.Because("the test voltage of the oil over 2.5 mm is not given")
	case !quantity.AtMost(test, 70e3):
		return AsNew, source, nil
	case quantity.AtLeast(test, 50e3):
		return Good, source, nil
	case quantity.AtLeast(test, 30e3):
		return Caution, source, nil
	}
	return Failed, source, nil
}

// passes are the assumptions and sources that go with the state of the oil of a gap. Oil
// that failed its test is a lack: it is treated or replaced, not judged.
func passes(g gap.Gap) ([]string, []gap.Source, error) {
	if g.OilTest <= 0 {
		return []string{"the oil passes its standard test: above 30 kV over 2.5 mm, dry, settled and free of bubbles"}, nil, nil
	}
	condition, source, err := ConditionOf(g.OilTest)
	source.Governs = false
	switch {
	case err != nil:
		return nil, nil, err
	case condition == Failed:
		return nil, nil, lack.Range("oil that broke down at %s in the standard test is treated or replaced before it is judged", quantity.Text(g.OilTest))
	case condition == Caution:
		return []string{"the oil is " + string(Caution) + ": " + quantity.Text(g.OilTest) + " in the standard test"}, []gap.Source{source}, nil
	}
	return nil, []gap.Source{source}, nil
}

// DegassingLoss is the part of its strength that an oil gap with a sharp electrode loses
// while the oil stands under some hundred mTorr: half where that is negative or not
// known, a tenth where it is positive. No oil tank is switched on while it is degassed.
func DegassingLoss(sharp gap.Polarity) (quantity.Fraction, gap.Source) {
	source := gap.Source{Text: "Conduction and breakdown mechanisms in transformer oil, IEEE Trans. Plasma Sci. 34 (2006) 467, abstract", Mark: gap.Read, Governs: true}
	if sharp == gap.Positive {
		return 0.1, source
	}
	return 0.5, source
}

// Warning is what to mind, without a figure to judge by.
type Warning struct {
	Subject string
	Text    string
	Source  gap.Source
}

// Warnings are about oil.
func Warnings() []Warning {
	_, degassing := DegassingLoss(gap.Negative)
	degassing.Governs = false
	return []Warning{
		{"degassing", "Never switch on while the oil is still degassed: at some hundred mTorr a negative point keeps half of its strength. After filling let bubbles rise.", degassing},
		{"water", "Water of 10 to 30 ppm can take the standard test from 70 kV to below 30 kV: dry the oil and keep it closed.", gap.Source{Text: "laboratory note on IEC 60156", Mark: gap.Read}},
		{"dirt", "Fresh purified oil is several times as strong as aged or dirty oil.", gap.Source{Text: "Pokryvailo and Carp, IEEE Electr. Insul. Mag. 28(3) 2012, first page", Mark: gap.Read}},
		{"sharp points", "From 9 to 10 kV on a point the current in oil is limited by space charge: the field there is no longer that of the shape.", gap.Source{Text: "Jing et al., IEEE TDEI 2014, abstract", Mark: gap.Read}},
		{"scatter", "Single breakdowns scatter by 7 to 13 %: three deviations below the mean are 0.6 to 0.8 of it.", gap.Source{Text: "Jing et al., IEEE TDEI 2014, abstract; three deviations worked out", Mark: gap.Derived}},
	}
}
