package optics

import (
	"fmt"

	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var allowedSource = rule.Source{Text: "the whole disturbance scaled alike until the spot just meets its allowance", Mark: rule.Derived, Governs: true}

var disturbance = rule.Rule{
	ID: "beam.disturbance", Title: "Disturbance against what the allowance leaves",
	Demands: "Ripple and hum at the cathode stay within what the blur allowance leaves.",
	Applies: "Where [beam] states a blur allowance that leaves something for a disturbance.",
	Margin:  "marginal with less than 10 % in hand",
	Concern: rule.Performance,
	Sources: []rule.Source{allowedSource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `pickup_to_output      = "0.05 pF"`, Becomes: `pickup_to_output      = "2 pF"`}},
		Changes: []rule.Change{{Rule: "beam.disturbance", Subject: "cathode", Verdict: rule.Fails}, {Rule: "beam.blur", Subject: "beam", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		b := e.Chain().Beam
		if why := noAllowance(e); why != "" {
			return rule.Over(why)
		}
		f := rule.Finding{Rule: "beam.disturbance", Subject: "cathode", Concern: rule.Performance, Relation: rule.AtMost, Place: b.BlurAllowance.Place,
			Under: string(evidence.Working), Sources: []rule.Source{allowedSource}, Remedy: "see the table of what would reach the allowance"}
		s, err := e.Spot()
		if err != nil {
			return rule.One(f.Lacking(err))
		}
		allowed, err := e.RippleAllowed()
		if err != nil {
			return rule.Over(err.Error())
		}
		more, assumed, err := tolerated(e)
		if err != nil {
			return rule.One(f.Lacking(err))
		}
		f.Because = fmt.Sprintf("%s, peak to peak, of the %s that the allowance leaves", quantity.Text(s.Disturbance.PeakToPeak), quantity.Text(allowed))
		if more > 0 {
			f.Because += fmt.Sprintf(", and %s more with the heater's centre resistors at the ends of their tolerance", quantity.Text(more))
		}
		f = f.Most(rule.Of(s.Disturbance.PeakToPeak+more), rule.Of(allowed), limits.BlurMargin)
		return rule.One(f.Assume(append(e.DisturbanceAssumptions(), assumed...)...).WithoutRemedyIfMet())
	},
}

// tolerated is what the tolerance of the heater's centre resistors adds to a computed
// disturbance; a measured one holds it.
func tolerated(e *evidence.Evidence) (quantity.Voltage, []string, error) {
	if m, err := e.Measured(); m != nil || err != nil {
		return 0, nil, err
	}
	return e.TipBeyondNominal()
}

var slowSource = rule.Source{Text: "what is too slow to blur defocuses the spot at its ends and moves the edge of the scanned field; neither may exceed what is allowed for the spot", Mark: rule.Derived, Governs: true}

var hum = rule.Rule{
	ID: "beam.hum", Title: "Hum in a scanned image",
	Demands: "What is slower than the dwell, hum first of all, neither defocuses the spot nor moves the edge of the field by more than the blur allowance.",
	Applies: "Where a blur allowance is stated and something is slower than the dwell.",
	Margin:  "marginal with less than 10 % in hand",
	Concern: rule.Performance,
	Sources: []rule.Source{slowSource},
	Example: rule.Example{
		Swaps: []rule.Swap{{Was: `screen = true, common_mode`, Becomes: `screen = false, common_mode`}, {Was: `dwell                = "1 ms"`, Becomes: `dwell                = "1 ms"
field_width          = "1 mm"`}},
		Changes: []rule.Change{{Rule: "beam.hum", Subject: "hum", Verdict: rule.Fails}, {Rule: "beam.disturbance", Subject: "cathode", Verdict: rule.Fails}, {Rule: "beam.blur", Subject: "beam", Verdict: rule.Fails}, {Rule: "heater.hum", Subject: "cathode", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		b := e.Chain().Beam
		if why := noAllowance(e); why != "" {
			return rule.Over(why)
		}
		f := rule.Finding{Rule: "beam.hum", Subject: "hum", Concern: rule.Performance, Relation: rule.AtMost, Place: b.Dwell.Place,
			Under: string(evidence.Working), Sources: []rule.Source{slowSource}, Remedy: "screen the heater feed, balance its common mode, add capacitance at the cathode, or scan in step with the mains"}
		if err := document.Need(b.Dwell); err != nil {
			return rule.One(f.Lacking(err))
		}
		s, err := e.BandingWithin()
		if err != nil {
			return rule.One(f.Lacking(err))
		}
		if m, _ := e.Measured(); len(s.Lines) == 0 && m == nil && e.Unheated() {
			return rule.One(f.Lacking(lack.Key("heater")))
		}
		if len(s.Lines) == 0 {
			return rule.Over("nothing is slower than the dwell of " + quantity.Text(b.Dwell.V))
		}
		f = moved(e, f, s, "slower than the dwell: "+names(s))
		return rule.One(f.Assume(e.DisturbanceAssumptions()...).WithoutRemedyIfMet())
	},
}

var drift = rule.Rule{
	ID: "beam.drift", Title: "Drift within an exposure",
	Demands: "Divider, reference and bias drift so little within an exposure that neither focus nor field moves by more than the blur allowance.",
	Applies: "Where a blur allowance is stated, and a change of temperature or the stability of the regulation.",
	Margin:  "marginal with less than 10 % in hand",
	Concern: rule.Performance,
	Sources: []rule.Source{slowSource},
	Example: rule.Example{
		Swaps: []rule.Swap{{Was: `air_temperature      = "35 degC"`, Becomes: `air_temperature      = "35 degC"
temperature_change   = "1 K"`}, {Was: `dwell                = "1 ms"`, Becomes: `dwell                = "1 ms"
field_width          = "1 mm"`}},
		Changes: []rule.Change{{Rule: "beam.drift", Subject: "drift", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		b := e.Chain().Beam
		if why := noAllowance(e); why != "" {
			return rule.Over(why)
		}
		if _, err := e.Drifts(); err != nil {
			return rule.Over(err.Error())
		}
		f := rule.Finding{Rule: "beam.drift", Subject: "drift", Concern: rule.Performance, Relation: rule.AtMost, Place: b.BlurAllowance.Place,
			Under: string(evidence.Working), Sources: []rule.Source{slowSource}, Remedy: "steadier air, arms of the divider that follow each other, or a shorter exposure"}
		s, err := e.DriftWithin()
		if err != nil {
			return rule.One(f.Lacking(err))
		}
		return rule.One(moved(e, f, s, "within an exposure: "+names(s)).WithoutRemedyIfMet())
	},
}

// moved judges what is slow by the larger of the disc it defocuses the spot to and the
// movement of the field's edge.
func moved(e *evidence.Evidence, f rule.Finding, s evidence.Slow, cause string) rule.Finding {
	if s.Focus == 0 && s.Edgeless != nil && s.PeakToPeak > 0 {
		return f.Lacking(s.Edgeless)
	}
	allowance := e.Chain().Beam.BlurAllowance.V
	edge := "the edge of the field moves by " + quantity.Text(s.Edge)
	if s.Edgeless != nil {
		edge = "the scanned field is not stated, its edge is not judged"
	}
	f.Because = fmt.Sprintf("%s, %s peak to peak: the focus moves by %s, which blurs to %s at its ends (FW50); %s", cause, quantity.Text(s.PeakToPeak), quantity.Text(s.Focus), quantity.Text(s.Defocus), edge)
	return f.Most(rule.Of(max(s.Defocus, s.Edge)), rule.Of(allowance), limits.BlurMargin)
}

// names lists what is slow.
func names(s evidence.Slow) string {
	text := "nothing"
	for i, l := range s.Lines {
		name := l.Name
		if l.Frequency > 0 {
			name += " at " + quantity.Text(l.Frequency)
		}
		if i == 0 {
			text = name
		} else {
			text += ", " + name
		}
	}
	return text
}
