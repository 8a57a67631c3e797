package evidence

import (
	"slices"

	"kilovet/hv/chain"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/vacuum"
)

// Vessel is the vacuum vessel; without one an empty one, that answers with a lack.
func (e *Evidence) Vessel() vacuum.Vessel {
	v := e.chain.Vacuum
	if v == nil {
		return vacuum.Vessel{}
	}
	return vacuum.Vessel{Gas: gap.Gas(v.Gas.V), LongestPath: v.LongestPath.V, GaugeFactor: v.GaugeFactor.V}
}

// DischargeBand are the pressures at which the highest voltage of the cathode may
// break down the longest path.
func (e *Evidence) DischargeBand() (vacuum.Band, error) {
	most, err := Worst(e, []string{"output"}, func(e *Evidence, n string) (quantity.Voltage, error) { return e.Between(n, "ground") })
	if err != nil {
		return vacuum.Band{}, err
	}
	return e.Vessel().Band(most.Value)
}

// HasVessel reports whether a vacuum is described: by itself, or as the medium of a
// spacing or the side of a feedthrough of a supply.
func (e *Evidence) HasVessel() bool {
	return e.chain.Vacuum != nil || e.HasSupply() && slices.ContainsFunc(e.Spacings(), func(s *chain.Spacing) bool { return s.Medium.V == "vacuum" })
}
