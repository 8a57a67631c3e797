package spacing

import (
	"fmt"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/field"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"
)

// Fields on electrodes in vacuum: comfortable, and where emission is to be expected.
const (
	comfortableInVacuum quantity.Field = 5e6
	emissionInVacuum    quantity.Field = 10e6
)

var (
	emissionSource = rule.Source{Text: "emission becomes measurable at 10 kV/mm on smooth metal (abstract)", Mark: rule.Read, Governs: true}
	comfortSource  = rule.Source{Text: "up to 5 kV/mm comfortable, 5 to 10 kV/mm needs polish and conditioning", Mark: rule.Memory}
	ionisingSource = rule.Source{Text: "air does not ionise below the field where gain and loss of electrons balance; above it a gap needs its streamer integral", Mark: rule.Derived, Governs: true}
)

var fieldStrength = rule.Rule{
	ID: "field.strength", Title: "Field on electrodes",
	Demands: "The computed field on each electrode stays below what its medium takes without discharge.",
	Applies: "Every [[field]]: in vacuum up to 10 kV/mm; in air below the field that ionises; other media are not judged.",
	Margin:  "in vacuum marginal above 5 kV/mm",
	Concern: rule.Equipment,
	Sources: []rule.Source{emissionSource, comfortSource, ionisingSource},
	Example: rule.Example{
		Of:    "plate",
		Swaps: []rule.Swap{{Was: `voltage = "-20 kV"`, Becomes: `voltage = "-60 kV"`}},
		Changes: []rule.Change{
			{Rule: "field.strength", Subject: "gun lead-through/pin", Verdict: rule.Fails},
			{Rule: "field.strength", Subject: "gun lead-through/plate", Verdict: rule.Marginal},
		},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		if len(e.Chain().Fields) == 0 {
			return rule.Over("no field is described")
		}
		var j rule.Judgement
		for i := range e.Chain().Fields {
			j.Findings = append(j.Findings, judgeField(e, &e.Chain().Fields[i])...)
		}
		return j
	},
}

// judgeField judges each electrode of an arrangement, pieces of one name once.
func judgeField(e *evidence.Evidence, f *chain.Field) []rule.Finding {
	start := rule.Finding{Rule: "field.strength", Concern: rule.Equipment, Relation: rule.AtMost, Place: f.Here()}
	s, err := e.FieldOf(f)
	if err != nil {
		start.Subject = f.Name.V
		return []rule.Finding{start.Lacking(err)}
	}
	var all []rule.Finding
	for _, name := range s.Electrodes() {
		one := start
		one.Subject = f.Name.V + "/" + name
		all = append(all, judgeElectrode(e, f, name, one))
	}
	return all
}

func judgeElectrode(e *evidence.Evidence, f *chain.Field, electrode string, finding rule.Finding) rule.Finding {
	p, under, err := e.FieldPeak(f, electrode)
	if err != nil {
		return finding.Lacking(err)
	}
	finding.Under = under.Text()
	finding.Because = fmt.Sprintf("%s at r %s, z %s, good to %s", quantity.Text(p.Strength), quantity.Text(p.At.R), quantity.Text(p.At.Z), quantity.Text(p.Error))
	finding.Remedy = "round the electrode, widen the gap, or lower the voltage"
	if !f.Medium.Set() {
		finding = finding.Assume("what fills " + f.Name.V + " is not given and taken as vacuum")
	}
	switch f.Medium.Or("vacuum") {
	case "vacuum":
		finding.Sources = []rule.Source{emissionSource, comfortSource}
		return finding.Most(rule.Of(p.Strength), rule.Of(emissionInVacuum), float64(emissionInVacuum/comfortableInVacuum)-1).WithoutRemedyIfMet()
	case "air":
		return inAirField(e, p, finding)
	}
	return finding.Lacking(lack.Range("fields in %s are computed, not judged", f.Medium.V))
}

func inAirField(e *evidence.Evidence, p field.Peak, finding rule.Finding) rule.Finding {
	limit, err := critical(e)
	if err != nil {
		return finding.Lacking(err)
	}
	finding.Sources = []rule.Source{ionisingSource}
	if !quantity.AtMost(p.Strength, limit) {
		return finding.Lacking(lack.Range("%s exceeds %s, where air begins to ionise: whether it discharges takes a streamer integral along the line", quantity.Text(p.Strength), quantity.Text(limit)))
	}
	return finding.Most(rule.Of(p.Strength), rule.Of(limit), 0).WithoutRemedyIfMet()
}

// critical is the field below which the site's air does not ionise.
func critical(e *evidence.Evidence) (quantity.Field, error) {
	site := e.Chain().Site
	if site == nil || !site.Altitude.Set() || !site.AirTemperature.Set() {
		return 0, lack.Key("site.altitude", "site.air_temperature")
	}
	s, err := gas.StateOf(gap.Gap{Medium: gap.Air, Altitude: &site.Altitude.V, Temperature: site.AirTemperature.V})
	if err != nil {
		return 0, err
	}
	return quantity.Field(criticalAtNormal * s.Density()), nil
}

// criticalAtNormal is the field of no net ionisation at 20 °C and 101.3 kPa, in volts
// per metre: the slope 24.22 kV/cm of the uniform-field law, below the 26.3 kV/cm of
// measured coefficients.
const criticalAtNormal = 24.22e5
