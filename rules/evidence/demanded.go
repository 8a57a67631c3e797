package evidence

import (
	"kilovet/hv/lack"
	"kilovet/insulation"
	"kilovet/insulation/gap"
	"kilovet/insulation/vacuum"
	"kilovet/rules/build"
)

// demanded is a field over what its rule allows there.
func (e *Evidence) demanded(f *build.Arrangement, p Stress, w Where) (float64, error) {
	if !Open(f, p.Body) {
		return e.demandedSolid(f, p)
	}
	g := e.Filling(f, p.Body)
	if g.Medium == gap.Vacuum {
		return float64(p.Strength / vacuum.EmissionField), nil
	}
	if g.Medium == gap.Oil {
		return demandedOil(g, p)
	}
	limit, _, err := insulation.Ionising(g)
	if err != nil || p.Strength <= limit {
		return float64(p.Strength / limit), err
	}
	traced, l, reversed, err := lineFrom(p)
	if err != nil {
		return 0, err
	}
	volts, polarity := across(traced, w, f)
	onset, err := insulation.StrengthAlong(g, l, sharpEnd(polarity, reversed)).Onset.Get()
	return float64(volts / onset), err
}

// demandedOil is the same against the working stress of oil.
func demandedOil(g gap.Gap, p Stress) (float64, error) {
	_, l, _, err := lineFrom(p)
	if err != nil {
		return 0, err
	}
	limit, err := insulation.WorkingAlong(g, l)
	return float64(p.Strength / limit.Value), err
}

func (e *Evidence) demandedSolid(f *build.Arrangement, p Stress) (float64, error) {
	for i := range f.Dielectrics {
		if d := &f.Dielectrics[i]; d.Name.V == p.Body {
			u, err := useOf(p, d)
			if err != nil {
				return 0, err
			}
			return float64(p.Strength / u.allowed()), nil
		}
	}
	return 0, lack.Failed("there is no %s", p.Body)
}
