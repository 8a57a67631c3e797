package rules

import (
	"fmt"
	"slices"

	"kilovet/hv/chain"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"
)

// summary says in a few lines what the chain is and does.
func summary(e *evidence.Evidence) []Line {
	c := e.Chain()
	if !e.HasSupply() {
		text := rule.Number(len(c.Spacings), "spacing", "spacings")
		if n := len(c.Feedthroughs); n > 0 {
			text += " and " + rule.Number(n, "feedthrough", "feedthroughs")
		}
		if slices.ContainsFunc(c.Spacings, func(s chain.Spacing) bool { return s.From.Set() }) {
			text += ", on the mains or"
		}
		text += " at stated voltages, no supply"
		return []Line{{"Chain", text}}
	}
	lines := []Line{
		{"Supply", fmt.Sprintf("%s %s multiplier, %s, %s %s at %s", c.Multiplier.Polarity.V, c.Multiplier.Topology.Or("half-wave"),
			stages(c.Multiplier.Stages.V), quantity.Text(c.Drive.Peak.V), c.Drive.Waveform.Or("sine"), quantity.Text(c.Drive.Frequency.V))},
		{"Control", control(e)},
		{"Output", outputLine(e)},
	}
	lines = append(lines, Line{"Ripple", rippleLine(e)})
	if c.Beam != nil {
		lines = append(lines, Line{"Blur", blurLine(e)})
	}
	return append(lines, Line{"Energy", energyLine(e)})
}

func control(e *evidence.Evidence) string {
	c := e.Chain()
	if c.Regulation == nil {
		return "open loop: the output follows drive and load"
	}
	needed, err := e.PeakNeeded()
	if err != nil {
		return "regulated at " + quantity.Text(c.Regulation.Set.V) + "; drive needed: " + err.Error()
	}
	return fmt.Sprintf("regulated at %s; needs %s of drive", quantity.Text(c.Regulation.Set.V), quantity.Text(needed))
}

func stages(n int) string {
	if n == 1 {
		return "1 stage"
	}
	return fmt.Sprintf("%d stages", n)
}

// highest is the state in which the output stands highest, in words.
func highest(e *evidence.Evidence) string {
	if e.Chain().Regulation == nil {
		return "at full drive"
	}
	return "with regulation lost"
}

func outputLine(e *evidence.Evidence) string {
	v, err := e.Potential("output")
	if err != nil {
		return "not known: " + err.Error()
	}
	lost, err := e.In(evidence.Lost).Between("output", "ground")
	if err != nil {
		return fmt.Sprintf("%s working; %s not known: %v", quantity.Text(v), highest(e), err)
	}
	return fmt.Sprintf("%s working, up to %s %s", quantity.Text(v), quantity.Text(lost), highest(e))
}

func rippleLine(e *evidence.Evidence) string {
	if !e.Chain().HasCathode() {
		ripple, err := e.Swing("output", "ground")
		if err != nil {
			return "not known: " + err.Error()
		}
		return quantity.Text(ripple) + " at the output, peak to peak"
	}
	if m, err := e.Measured(); m != nil && err == nil {
		return fmt.Sprintf("%s measured at the cathode, peak to peak", quantity.Text(m.PeakToPeak()))
	}
	ripple, err := e.CathodeRipple()
	if err != nil {
		return "not known: " + err.Error()
	}
	hum, err := e.CathodeHum()
	if err != nil {
		return fmt.Sprintf("%s at the cathode, peak to peak; hum not known: %v", quantity.Text(ripple), err)
	}
	return fmt.Sprintf("%s and %s of hum at the cathode, peak to peak", quantity.Text(ripple), quantity.Text(hum))
}

func blurLine(e *evidence.Evidence) string {
	s, err := e.Spot()
	if err != nil {
		return "not known: " + err.Error()
	}
	return fmt.Sprintf("%s whole spot, %s of it ripple (FW50)%s", quantity.Text(s.TotalFW50), quantity.Text(s.BlurRippleFW50), allowance(e.Chain()))
}

func allowance(c *chain.Chain) string {
	if !c.Beam.BlurAllowance.Set() {
		return ""
	}
	return ", allowed " + quantity.Text(c.Beam.BlurAllowance.V)
}

func energyLine(e *evidence.Evidence) string {
	w, err := e.In(evidence.Lost).StoredEnergy()
	if err != nil {
		return "not known: " + err.Error()
	}
	d, err := e.In(evidence.Lost).SlowestDischarge()
	switch {
	case err != nil:
		return fmt.Sprintf("up to %s stored; discharge not known: %v", quantity.Text(w), err)
	case d.Never:
		return fmt.Sprintf("up to %s stored; %s stays at %s", quantity.Text(w), d.Node, quantity.Text(d.Left))
	}
	return fmt.Sprintf("up to %s stored; 60 V after %s", quantity.Text(w), quantity.Text(d.Time))
}
