package fields

import (
	"fmt"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/field"
	"kilovet/insulation/vacuum"
	"kilovet/rules/build"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var (
	emissionSource = rule.Source{Text: "emission becomes measurable at 10 kV/mm on smooth metal (abstract)", Mark: rule.Read, Governs: true}
	comfortSource  = rule.Source{Text: "up to 5 kV/mm comfortable, 5 to 10 kV/mm needs polish and conditioning", Mark: rule.Memory}
	ionisingSource = rule.Source{Text: "air does not ionise below the field where gain and loss of electrons balance; above it a gap needs its streamer integral", Mark: rule.Derived, Governs: true}
	oilSource      = rule.Source{Text: "2 kV/mm in small oil gaps under DC", Mark: rule.Practice}
	coronaSource   = rule.Source{Text: "corona makes ozone and noise, it does not break a gap; sparks against an insulator eat it", Mark: rule.Practice}
)

const strengthID = "field.strength"

var strength = rule.Rule{
	ID: strengthID, Title: "Field on electrodes",
	Demands: "The computed field on each electrode, and in gas on each insulator, stays below what its medium takes without discharge.",
	Applies: "Every computed field: in vacuum up to 10 kV/mm; in gas up to the field at which an avalanche along the field line grows to a streamer; in oil up to the working stress of small gaps.",
	Margin:  "in vacuum marginal above 5 kV/mm, in gas above 91 % of onset; corona between electrodes is marginal, against an insulator it fails",
	Concern: rule.Equipment,
	Sources: []rule.Source{emissionSource, comfortSource, ionisingSource, coronaSource, oilSource},
	Example: rule.Example{
		Of:    "plate",
		Swaps: []rule.Swap{{Was: `voltage = "-20 kV"`, Becomes: `voltage = "-60 kV"`}},
		Changes: []rule.Change{
			{Rule: "field.strength", Subject: "gun lead-through/pin", Verdict: rule.Fails},
			{Rule: "field.strength", Subject: "gun lead-through/plate", Verdict: rule.Marginal},
			{Rule: "field.breakdown", Subject: "gun lead-through/pin", Verdict: rule.Fails},
			{Rule: "field.breakdown", Subject: "gun lead-through/plate", Verdict: rule.Fails},
		},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(e, strengthID, "no field is computed", func(f *build.Arrangement, s *field.Solution, start rule.Finding) []rule.Finding {
			return judgeStrength(e, f, s, start)
		})
	},
}

// judgeStrength judges each electrode of an arrangement, and in gas each bare insulator.
func judgeStrength(e *evidence.Evidence, f *build.Arrangement, s *field.Solution, start rule.Finding) (all []rule.Finding) {
	var places []evidence.Where
	judge := func(subject string, w evidence.Where, body string) {
		one := start
		one.Subject = subject
		w = e.ClearOfEdges(f, w)
		all, places = append(all, judgePlace(e, f, w, body, one)), append(places, w)
	}
	for _, name := range s.Electrodes() {
		for _, body := range facing(f, s, name) {
			judge(subject(f, name, body), evidence.Where{Electrode: name, Body: body}, body)
		}
	}
	if f.Medium.V == "air" || f.Medium.V == "gas" {
		for _, name := range s.Bare() {
			if !evidence.Open(f, name) {
				judge(subject(f, name, field.Medium), evidence.Where{Beside: name}, field.Medium)
			}
		}
	}
	return sized(all, func(i int) ([]evidence.Answer, error) { return e.PlaceAnswers(f, places[i]) })
}

func judgePlace(e *evidence.Evidence, f *build.Arrangement, w evidence.Where, body string, finding rule.Finding) rule.Finding {
	p, err := e.Stress(f, w)
	if err != nil {
		return lacking(f, finding, err)
	}
	finding.Under = p.Text()
	finding.Because = told(p, w)
	finding.Remedy = "round the electrode, widen the gap, or lower the voltage"
	finding = finding.Assume(taken(e, f)...)
	switch g := e.Filling(f, body); g.Medium {
	case "vacuum":
		finding.Sources = []rule.Source{emissionSource, comfortSource}
		return finding.Most(rule.Of(p.Strength), rule.Of(vacuum.EmissionField), float64(vacuum.EmissionField/vacuum.ComfortableField)-1).WithoutRemedyIfMet()
	case "air", "gas":
		return judgeInGas(e, f, w, p, finding)
	case "oil":
		return judgeInOil(e, f, w, p, finding)
	default:
		return finding.Lacking(lack.Range("fields in %s are computed, not judged", string(g.Medium)))
	}
}

// judgeInOil compares with the working stress, which is that of small gaps.
func judgeInOil(e *evidence.Evidence, f *build.Arrangement, w evidence.Where, p evidence.Stress, finding rule.Finding) rule.Finding {
	c, err := e.Critical(f, w)
	if err != nil {
		return lacking(f, finding, err)
	}
	limit, err := insulation.WorkingAlong(e.Filling(f, p.Body), c.Line)
	if err != nil {
		return lacking(f, finding, err)
	}
	finding.Sources = rule.Cited(limit.Sources)
	finding.Because += "; along " + quantity.Text(c.Line.Gap()) + " of field line"
	return finding.Assume(limit.Assumptions...).Most(rule.Of(p.Strength), rule.Of(limit.Value), limits.DistanceMargin).WithoutRemedyIfMet()
}

// judgeInGas compares with the ionising field first, which needs no line, then with the
// onset along the line.
func judgeInGas(e *evidence.Evidence, f *build.Arrangement, w evidence.Where, p evidence.Stress, finding rule.Finding) rule.Finding {
	limit, source, err := insulation.Ionising(e.Filling(f, p.Body))
	if err != nil {
		return lacking(f, finding, err)
	}
	finding.Sources = []rule.Source{ionisingSource, {Text: source.Text, Mark: rule.Mark(source.Mark)}}
	if quantity.AtMost(p.Strength, limit) {
		return finding.Most(rule.Of(p.Strength), rule.Of(limit), 0).WithoutRemedyIfMet()
	}
	finding.Because += fmt.Sprintf("; above %s, where the gas begins to ionise", quantity.Text(limit))
	c, err := e.Critical(f, w)
	if err != nil {
		return lacking(f, finding, err)
	}
	onset, err := c.Limit()
	if err != nil {
		return lacking(f, finding, err)
	}
	finding.Sources = append(rule.Cited(onset.Sources), coronaSource)
	finding.Because += fmt.Sprintf("; the streamer integral along %s of field line is %.3g times what a discharge takes", quantity.Text(c.Line.Gap()), float64(c.Streamer))
	finding = finding.Assume(onset.Assumptions...).Most(rule.Of(p.Strength), rule.Of(onset.Value), limits.DistanceMargin)
	if finding.Verdict != rule.Fails {
		return finding.WithoutRemedyIfMet()
	}
	if c.Traced.Closed || w.Beside != "" {
		finding.Because += "; the sparks end on an insulator and eat it"
		return finding
	}
	finding.Because += "; corona, which does not cross the gap by itself"
	finding.Verdict = rule.Marginal
	return finding
}
