package spacing

import (
	"fmt"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var clearance = rule.Rule{
	ID: "spacing.clearance", Title: "Clearance",
	Demands: "The distance through the medium is at least what the tables ask for at the highest voltage over states and corners; in vacuum, oil and solids what working stress asks for.",
	Applies: "Every spacing but those in gases other than air, where the breakdown estimate decides.",
	Margin:  "marginal with less than 10 % in hand",
	Concern: rule.Life,
	Sources: []rule.Source{
		{Text: "IEC 60664-1:2020 Table F.8, case A unless impulse tested", Mark: rule.Read, Governs: true},
		{Text: "IEC 60664-1:2020 Table F.2 where mains or drive reach the gap", Mark: rule.Read},
	},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: "clearance  = \"20 mm\"\ncreepage   = \"30 mm\"", Becomes: "clearance  = \"1.2 mm\"\ncreepage   = \"30 mm\""}},
		Changes: []rule.Change{{Rule: "spacing.clearance", Subject: "drive lead to the enclosure", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(e, func(s *chain.Spacing) (rule.Finding, string) {
			if s.Of != nil && !s.Clearance.Set() {
				return rule.Finding{}, "a surface of a feedthrough whose gap is judged apart"
			}
			if otherGas(s) {
				return rule.Finding{}, "no table asks for a clearance in gases other than air: the breakdown estimate decides"
			}
			return distance(e, s, "spacing.clearance", s.Clearance, func(x evidence.Spacing) gap.Result[quantity.Length] { return x.Assessment.ClearanceNeeded }), ""
		})
	},
}

var creepage = rule.Rule{
	ID: "spacing.creepage", Title: "Creepage distance",
	Demands: "The distance along the surface is at least what the tables ask for at the highest lasting voltage, and never less than the clearance needed.",
	Applies: "Every spacing in air or on a printed board, and surfaces in other media where a creepage distance, the material or the ribs of one are given: in vacuum from a tested surface or the practice of alumina, in nitrogen and sulphur hexafluoride at 800 mbar or more as in air, elsewhere from a tested surface; without one too short where the medium alone would need more, in oil and along joints of solids enough where pollution degree 1 in air would be, and unassessed between.",
	Margin:  "marginal with less than 10 % in hand",
	Concern: rule.Life,
	Sources: []rule.Source{{Text: "IEC 60664-1:2020 Table F.5", Mark: rule.Read, Governs: true}},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `creepage   = "150 mm"`, Becomes: `creepage   = "30 mm"`}},
		Changes: []rule.Change{{Rule: "spacing.creepage", Subject: "gun feedthrough, air side", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		return each(e, func(s *chain.Spacing) (rule.Finding, string) {
			if !s.Creepage.Set() && (!inAir(s) || s.Of != nil) && !surfaceTold(s) {
				return rule.Finding{}, "creepage is judged on surfaces in air, and in other media where one is given"
			}
			return distance(e, s, "spacing.creepage", s.Creepage, func(x evidence.Spacing) gap.Result[quantity.Length] { return x.Assessment.CreepageNeeded }), ""
		})
	},
}

// surfaceTold reports whether what is told of a spacing in another medium than a solid is told
// of a surface, so that there is one.
func surfaceTold(s *chain.Spacing) bool {
	return s.Of == nil && s.Medium.V != "solid" && (s.Material.Set() || s.CTI.Set() || s.Ribs != nil)
}

func otherGas(s *chain.Spacing) bool { return s.Medium.V == "gas" && s.Gas.Or("air") != "air" }

func inAir(s *chain.Spacing) bool {
	return s.Medium.V == "air" || s.Medium.V == "printed board" || s.Medium.V == "gas" && s.Gas.Or("air") == "air"
}

func gaseous(s *chain.Spacing) bool { return s.Medium.V == "air" || s.Medium.V == "gas" }

// classTaken is what is taken for granted where a spacing does not say what it has to do.
func classTaken(s *chain.Spacing) []string {
	if s.Insulation.Set() {
		return nil
	}
	return []string{"insulation is basic where the spacing does not say; reinforced asks for more"}
}

// distance judges a given distance against the needed one.
func distance(e *evidence.Evidence, s *chain.Spacing, id string, given document.Given[quantity.Length], needed func(evidence.Spacing) gap.Result[quantity.Length]) rule.Finding {
	f := finding(id, concern(s), rule.AtLeast, s)
	if given.Set() {
		f.Place = given.Place
	}
	x, err := e.Spacing(s)
	if err != nil {
		return f.Lacking(err)
	}
	need := needed(x)
	if need.Lack != nil {
		return unneeded(e, f, s, x, given, need.Lack)
	}
	f.Under = x.Under.Text()
	if id == "spacing.creepage" {
		f.Under = x.Lasting.Text()
	}
	f.Sources = append(rule.Cited(need.Sources), shown(need.Answer)...)
	f.Because = fmt.Sprintf("%s peak, %s lasting: %s", quantity.Text(x.Voltages.Peak), quantity.Text(x.Voltages.LongTerm), need.Because)
	if stands := x.Assessment.Breakdown; stands.Lack == nil && id == "spacing.clearance" {
		f.Because += "; by physics it stands " + quantity.Text(stands.Value)
	}
	if !given.Set() {
		return f.Lacking(lack.Key(given.Key))
	}
	counted, taken, err := countedOf(id, x, given.V)
	if err != nil {
		return f.Lacking(err)
	}
	f.Because += taken
	f = shareOf(f, x)
	f = f.Least(rule.Of(counted), rule.Of(need.Value), limits.DistanceMargin).Assume(need.Assumptions...).Assume(classTaken(s)...).Assume(transients(e, s, x, counted)...).Assume(coverTaken(id, x, need.Value, counted)...)
	f = f.Assume(laboratoryTaken(x, counted)...)
	if f.Verdict != rule.Meets {
		f.Remedy = furtherApart(e, s, x, f, given, need.Value+given.V-counted)
	}
	return f
}

// furtherApart is what to do about a distance that is too short, or only assumed to do.
func furtherApart(e *evidence.Evidence, s *chain.Spacing, x evidence.Spacing, f rule.Finding, given document.Given[quantity.Length], need quantity.Length) string {
	if assumedOnly(f, limits.DistanceMargin) {
		return confirm
	}
	way := wider(s, given, need)
	switch f.Rule {
	case "spacing.clearance":
		way = clearanceFor(e, s, x, way)
	case "spacing.creepage":
		way = alongBoth(s, x, need)
	}
	return alternatives(way, lowered(f.Rule, x), "lower the voltage")
}

// transients is what is taken for granted of those of the mains.
func transients(e *evidence.Evidence, s *chain.Spacing, x evidence.Spacing, counted quantity.Length) []string {
	if !inAir(s) {
		return nil
	}
	return e.TransientsTaken(s, x, func(more quantity.Length) bool { return quantity.AtLeast(counted, more*(1+limits.DistanceMargin)) })
}

// countedOf is the part of a given distance that counts, and what is said of the rest.
func countedOf(id string, x evidence.Spacing, given quantity.Length) (counted quantity.Length, taken string, err error) {
	if id != "spacing.creepage" {
		return given, "", nil
	}
	if counted, taken, err = x.Surface(); taken != "" {
		taken = "; " + taken
	}
	return counted, taken, err
}

// unneeded is the finding where no distance that is needed is known.
func unneeded(e *evidence.Evidence, f rule.Finding, s *chain.Spacing, x evidence.Spacing, given document.Given[quantity.Length], why *lack.Lack) rule.Finding {
	switch {
	case f.Rule == "spacing.creepage" && untested(why):
		return bounded(f, s, x, why)
	case f.Rule == "spacing.clearance" && tooSharp(s, x):
		return neverEnough(e, f, s, x, why)
	case (inAir(s) || s.Medium.V == "vacuum" && f.Rule == "spacing.creepage") && given.Set() && why.Kind == lack.Outside:
		return pastTables(f, s, x, given, why)
	}
	f = f.Lacking(why)
	if given.Set() && why.Kind != lack.Missing {
		f.Remedy = alternatives(againstWork(s, x), f.Remedy)
	}
	return f
}

// lowered is the highest peak that a clearance in air meets the table for.
func lowered(id string, x evidence.Spacing) string {
	v, err := x.PeakMet()
	if id != "spacing.clearance" || err != nil || quantity.AtLeast(v, x.Voltages.Peak) {
		return ""
	}
	return "keep the peak under " + quantity.Text(v)
}
