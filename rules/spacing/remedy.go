package spacing

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

// alternatives joins what could be done.
func alternatives(ways ...string) string {
	var all []string
	for _, w := range ways {
		if w != "" {
			all = append(all, w)
		}
	}
	return strings.Join(all, ", or ")
}

// confirm is what to do about a pass that only its assumptions make marginal.
const confirm = "confirm what was assumed, by the maker's data or a test"

// assumedOnly reports whether only assumptions keep a finding from being met.
func assumedOnly(f rule.Finding, margin float64) bool {
	return f.Verdict == rule.Marginal && f.Margin != nil && quantity.AtLeast(1+*f.Margin, 1+margin) && len(f.Assumptions) > 0
}

// rounded says to which radius the sharper electrode of a spacing must go, its distance
// kept, where that is more than it has.
func rounded(s *chain.Spacing, x evidence.Spacing, r quantity.Length) string {
	if x.Gap.Shape == nil || quantity.AtMost(r, x.Gap.Shape.Sharpest()) {
		return ""
	}
	if f := s.Of; f != nil && f.Sleeve != nil && s.Medium.V == "solid" {
		return fmt.Sprintf("make feedthrough.pin.radius and the bore %s or more, the wall of the sleeve kept", quantity.Text(upward(r)))
	}
	return "round the sharper electrode to " + quantity.Text(upward(r))
}

// resized says which key makes a length and what it must become. A radius of a
// feedthrough is what its gap leaves it; ribs leave less to the straight length.
func resized(s *chain.Spacing, given document.Given[quantity.Length], need quantity.Length) string {
	key, has := given.Key, given.V
	if f := s.Of; f != nil {
		switch {
		case key == "feedthrough.hole.radius" && given.V < f.Hole.Radius.V:
			need, has = need+f.Hole.Radius.V-given.V, f.Hole.Radius.V
		case strings.HasSuffix(key, "sleeve.outer_radius") && given.V < f.Outer().V:
			need, has = need+f.Outer().V-given.V, f.Outer().V
		case key == "feedthrough.air_side.length" && given.V > f.AirSide.Length.V:
			need, has = need-(given.V-f.AirSide.Length.V), f.AirSide.Length.V
		}
	}
	if quantity.AtMost(need, has) {
		return ""
	}
	need = upward(need)
	return fmt.Sprintf("make %s %s or more (%s more)", key, quantity.Text(need), quantity.Text(need-has))
}

// upward rounds a size up to three significant digits, so that what is printed is enough.
func upward(l quantity.Length) quantity.Length {
	step := math.Pow(10, math.Floor(math.Log10(float64(l)))-2)
	return quantity.Length(math.Ceil(float64(l)/step*(1-1e-12)) * step)
}

// wider is what makes a distance meet, its comfort included.
func wider(s *chain.Spacing, given document.Given[quantity.Length], need quantity.Length) string {
	return resized(s, given, need*(1+limits.DistanceMargin))
}

// sided is what it would change to say that the sharper electrode is the negative one.
func sided(s *chain.Spacing, x evidence.Spacing) string {
	v, err := x.IfNegative()
	if err != nil || x.Computed || s.Of != nil || quantity.AtMost(v, x.Assessment.Breakdown.Value) {
		return ""
	}
	return "say spacing.sharper_electrode: if that is the negative one the gap stands " + quantity.Text(v)
}

// medium is another medium that would do at the distance there is.
func medium(x evidence.Spacing) string {
	if x.Gap.Medium != "air" || x.Gap.Shape == nil {
		return ""
	}
	d, err := x.InOil()
	if err != nil || !quantity.AtMost(d, x.Gap.Clearance) {
		return ""
	}
	return fmt.Sprintf("fill it with oil, where %s are enough", quantity.Text(d))
}

// againstCorona are the sizes at which a discharge starts at the peak with its margin.
func againstCorona(s *chain.Spacing, x evidence.Spacing) string {
	v := x.Voltages.Peak * quantity.Voltage(1+limits.DistanceMargin)
	var ways []string
	if r, err := x.RadiusForOnset(v); err == nil {
		ways = append(ways, "round the sharper electrode to "+quantity.Text(upward(r)))
	}
	if d, err := x.GapForOnset(v); err == nil {
		ways = append(ways, resized(s, s.Clearance, d))
	}
	if alternatives(ways...) == "" {
		return "round the sharper electrode and widen the gap: neither alone is enough"
	}
	return alternatives(ways...)
}

// keysOf are the keys of a feedthrough that stand for those of a spacing made from it.
func keysOf(s *chain.Spacing) *strings.Replacer {
	part := strings.TrimPrefix(s.Name.V, s.Of.Name.V+": ")
	side, material := "feedthrough.air_side", "feedthrough.sleeve"
	switch part {
	case chain.VacuumSurface, chain.VacuumGap:
		side = "feedthrough.vacuum_side"
	case chain.BareStrip:
		side, material = "feedthrough.strip", "feedthrough.strip"
	case chain.PinGap, chain.EdgeGap:
		side = "feedthrough.hole"
	case chain.SleeveWall:
		side = "feedthrough.sleeve"
	}
	return strings.NewReplacer("spacing.material, spacing.cti", material+".material", "spacing.material", material+".material", "spacing.cti", material+".cti",
		"spacing.strength", "feedthrough.sleeve.strength", "spacing.shape", side+".shape", "spacing.", side+".")
}

// told is a finding about a part of a feedthrough in the keys of the feedthrough.
func told(f rule.Finding, s *chain.Spacing) rule.Finding {
	if s.Of == nil {
		return f
	}
	keys := keysOf(s)
	f.Because, f.Remedy = keys.Replace(f.Because), keys.Replace(f.Remedy)
	f.Missing = slices.Clone(f.Missing) // they belong to the lack
	for i, m := range f.Missing {
		f.Missing[i] = keys.Replace(m)
	}
	return f
}
