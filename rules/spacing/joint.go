package spacing

import (
	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
)

// Two rules ask for the distance of a spacing: that of clearance, in solids, oil and vacuum
// by the working stress, and that of breakdown. The sizes below serve both.

// comfortable is what a spacing must stand for the comfort of its breakdown rule.
func comfortable(x evidence.Spacing) quantity.Voltage { return x.Asked() / limits.BreakdownComfort }

// longEnough is the distance with which both rules are met with their comfort, the sharpest
// radius kept.
func longEnough(s *chain.Spacing, x evidence.Spacing) (quantity.Length, error) {
	if !s.Clearance.Set() {
		return 0, lack.Key(s.Clearance.Key)
	}
	need := x.Assessment.ClearanceNeeded
	if need.Lack != nil && tooSharp(s, x) {
		return 0, need.Lack
	}
	d, err := x.GapFor(comfortable(x))
	if need.Lack == nil {
		d = max(d, need.Value*(1+limits.DistanceMargin))
	}
	if d <= 0 {
		return 0, err
	}
	return x.StandsFrom(d, comfortable(x))
}

// roundEnough is the sharpest radius with which both rules are met with their comfort at the
// distance there is.
func roundEnough(x evidence.Spacing) (quantity.Length, error) {
	r, err := x.Across().RadiusFor(comfortable(x))
	if err != nil && (x.Assessment.Breakdown.Lack != nil || !quantity.AtMost(comfortable(x), x.Assessment.Breakdown.Value)) {
		return 0, err
	}
	if !x.HasWork() {
		return r, nil
	}
	work, err := x.RadiusAtWork(x.Dimensioned(), 1/(1+limits.DistanceMargin))
	if err != nil && !x.BearsAtWork(x.Dimensioned(), 1/(1+limits.DistanceMargin)) {
		return 0, err
	}
	return max(r, work), nil
}

// againstBoth are the sizes of which each alone serves both rules: the distance, else the
// radius; empty where neither does. The wall of a sleeve has sizes of its own.
func againstBoth(e *evidence.Evidence, s *chain.Spacing, x evidence.Spacing) string {
	if x.Wall != nil {
		return strongerWall(e, s, x)
	}
	if d, err := longEnough(s, x); err == nil {
		if way := resized(s, s.Clearance, d); way != "" {
			return way
		}
	}
	if r, err := roundEnough(x); err == nil {
		return rounded(s, x, r)
	}
	return ""
}

// clearanceFor is the size that serves both rules in place of the distance that serves the
// clearance alone; where none does, that is said.
func clearanceFor(e *evidence.Evidence, s *chain.Spacing, x evidence.Spacing, alone string) string {
	switch both := againstBoth(e, s, x); {
	case both != "":
		return both
	case x.HasWork() && x.Gap.Shape != nil && alone != "" && breaksDown(x):
		return "no one size is enough: the breakdown estimate asks for a larger radius too, beside this: " + alone
	}
	return alone
}

// breaksDown reports whether the breakdown estimate, where there is one at the distance there
// is or at the one that the clearance asks for, is an obstacle of its own.
func breaksDown(x evidence.Spacing) bool {
	if x.Assessment.Breakdown.Lack == nil {
		return true
	}
	need := x.Assessment.ClearanceNeeded
	if need.Lack != nil {
		return false
	}
	a, err := x.StandsOver(need.Value * (1 + limits.DistanceMargin))
	return err == nil && !quantity.AtLeast(a.Value, comfortable(x))
}

// againstWork is the radius with which a spacing bears its peak at work, the distance kept.
func againstWork(s *chain.Spacing, x evidence.Spacing) string {
	r, err := x.RadiusFor(x.Voltages.Peak / quantity.Voltage(evidence.WorkingShare(x.Gap)))
	if err != nil {
		return ""
	}
	return rounded(s, x, r)
}

// conflict says why no single size serves both rules where one of them alone could be met.
func conflict(s *chain.Spacing, x evidence.Spacing) string {
	d, err := x.GapFor(comfortable(x))
	if err != nil || !tooSharp(s, x) {
		return "no one size is enough: take another material or shape"
	}
	way := resized(s, s.Clearance, d)
	if way == "" {
		return "no one size is enough: take another material or shape"
	}
	return "no one size is enough: against breakdown alone it would do to " + way + ", but at this radius no distance bears the voltage at work, and at this distance no radius does; take both larger, or another material"
}

// againstBreakdown are the sizes at which the peak is the comfortable share of what a
// spacing stands, and its distance enough: a distance, a length of surface, a radius. Where
// gap and surface are both too short, both are needed.
func againstBreakdown(e *evidence.Evidence, s *chain.Spacing, x evidence.Spacing) string {
	var size string
	along := ""
	if s.Creepage.Set() {
		if l, note, err := longSurface(x); err == nil {
			if along = resized(s, s.Creepage, l); along != "" {
				along += note
			}
		}
	}
	switch across := againstBoth(e, s, x); {
	case along != "" && across != "":
		size = along + " and " + across
	case along != "":
		size = along + gapShort(s, x)
	case across != "":
		size = across + surfaceShort(s, x)
	case x.HasWork() && s.Clearance.Set() && x.Gap.Shape != nil:
		size = conflict(s, x)
	case !x.HasWork():
		size = bareEnough(s, x)
	}
	return alternatives(size, sided(s, x), medium(x), "lower the voltage")
}

// stillMarginal is said of a size that is enough, but not with the margin.
const stillMarginal = ", marginal still, no size with the margin being known"

// bareEnough is the distance that leaves the peak the share that is allowed, where none is
// known that leaves it the comfortable one; empty where it is there, and where no distance does.
func bareEnough(s *chain.Spacing, x evidence.Spacing) string {
	allowed := x.Asked() / limits.BreakdownShare
	d, err := x.GapFor(allowed)
	if err != nil || !s.Clearance.Set() {
		return ""
	}
	if need := x.Assessment.ClearanceNeeded; need.Lack == nil {
		d = max(d, need.Value*(1+limits.DistanceMargin))
	}
	if d, err = x.StandsFrom(d, allowed); err != nil {
		return ""
	}
	if way := resized(s, s.Clearance, d); way != "" {
		return way + stillMarginal
	}
	return ""
}

// longSurface is the length of surface in vacuum whose flashover leaves the peak its comfortable
// share, else the share that is allowed, where no longer surface is known; and what to say of
// that.
func longSurface(x evidence.Spacing) (l quantity.Length, note string, err error) {
	if l, err = x.SurfaceFor(comfortable(x)); err == nil {
		return l, "", nil
	}
	l, err = x.SurfaceFor(x.Asked() / limits.BreakdownShare)
	return l, stillMarginal, err
}

// alongBoth is the length of surface in vacuum with which its flashover is no obstacle either.
func alongBoth(s *chain.Spacing, x evidence.Spacing, alone quantity.Length) string {
	if x.Gap.Medium == gap.Vacuum {
		if l, note, err := longSurface(x); err == nil && l > alone*(1+limits.DistanceMargin) {
			if way := resized(s, s.Creepage, l); way != "" {
				return way + note
			}
		}
	}
	return wider(s, s.Creepage, alone)
}
