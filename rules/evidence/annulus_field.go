package evidence

import (
	"fmt"
	"math"
	"strings"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/field"
	"kilovet/insulation/gap"
	"kilovet/insulation/solid"
	"kilovet/rules/build"
)

// annulusByField is the greatest computed field of an annulus just after switching, on either
// side of the plate, as a part of what the annulus alone would have of the voltage on the pin
// where it is narrowest to the pin: at most the whole.
func (e *Evidence) annulusByField(f *chain.Feedthrough, slit solid.Slit, part string) (gap.Answer[quantity.Fraction], error) {
	alone := 1 / (float64(slit.From) * math.Log(float64(slit.To/slit.From))) // coaxial, at its inside, for each volt
	most, last := gap.Answer[quantity.Fraction]{}, error(lack.Failed("its field is not worked out"))
	for _, a := range e.Arrangements() {
		if a.From != build.FromFeedthrough || a.Of != f.Name.V || a.Err != nil {
			continue
		}
		p, err := e.FieldPeak(a, e.ClearOfEdges(a, inside(a, part)))
		if err != nil {
			last = err
			continue
		}
		on := math.Abs(float64(p.potentials[build.Pin] - p.potentials[build.Plate]))
		if share := quantity.Fraction(float64(p.Strength) / (alone * on)); on > 0 && share > most.Value {
			most.Value = min(share, 1)
			most.Because = fmt.Sprintf("%s at r %s, z %s of the %s", quantity.Text(p.Strength), quantity.Text(p.At.R), quantity.Text(p.At.Z), strings.TrimPrefix(a.Name.V, f.Name.V+", "))
		}
	}
	if most.Value == 0 {
		return most, last
	}
	return most, nil
}

// inside is where the field of an annulus is greatest: on the pin, or in a gap at the hole
// that has a filling of its own, or on the sleeve where the medium fills it.
func inside(a *build.Arrangement, part string) Where {
	if part == chain.InnerAnnulus {
		return Where{Electrode: build.Pin, Body: within(a, build.InnerGap)}
	}
	if within(a, build.OuterGap) == build.OuterGap {
		return Where{Body: build.OuterGap}
	}
	return Where{Beside: build.Sleeve}
}

// within is a space of an arrangement, or its medium where that fills the space too.
func within(a *build.Arrangement, space string) string {
	for _, d := range a.Dielectrics {
		if d.Name.V == space {
			return space
		}
	}
	return field.Medium
}
