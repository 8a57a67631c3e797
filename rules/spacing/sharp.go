package spacing

import (
	"fmt"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"
)

// tooSharp reports whether the law that asks for a clearance, which names none, says that
// the one there is too little.
func tooSharp(s *chain.Spacing, x evidence.Spacing) bool {
	if !s.Clearance.Set() || x.Gap.Shape == nil {
		return false
	}
	a, err := x.AtWork()
	return err == nil && !quantity.AtLeast(a.Value, x.Dimensioned())
}

// neverEnough is the finding where no clearance is enough: it fails by what is there, and
// only a larger radius helps.
func neverEnough(e *evidence.Evidence, f rule.Finding, s *chain.Spacing, x evidence.Spacing, why *lack.Lack) rule.Finding {
	a, err := x.AtWork()
	if err != nil {
		return f.Lacking(why)
	}
	f.Under = x.Under.Text()
	f.Because = fmt.Sprintf("%s peak, where electrodes of this shape bear %s over %s (%s); %s", quantity.Text(x.Dimensioned()), quantity.Text(a.Value), quantity.Text(x.Gap.Clearance), a.Because, why.Error())
	f.Sources = rule.Cited(a.Sources)
	f = shareOf(f, x).There(false)
	size := againstBoth(e, s, x)
	if size == "" {
		size = conflict(s, x)
	}
	f.Remedy = alternatives(size, "keep the peak under "+quantity.Text(x.Whole()*a.Value/x.Dimensioned()))
	return f
}
