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
	"kilovet/rules/build"
)

// annulusField is the greatest computed field of an annulus just after switching, as a part
// of what the annulus alone would have where it is narrowest, at most the whole. Of a
// feedthrough with another size no field is computed: it has more than its layers' share in
// the proportion in which the described one has.
func (e *Evidence) annulusField(f *chain.Feedthrough, a Annulus) (gap.Answer[quantity.Fraction], error) {
	d := e.described(f)
	if d == f {
		alone := 1 / (float64(a.Slit.From) * math.Log(float64(a.Slit.To/a.Slit.From))) // coaxial, at its inside, for each volt
		share, err := e.shareByField(f, alone, func(x *build.Arrangement) (Stress, error) {
			return e.FieldPeak(x, e.ClearOfEdges(x, inside(x, a.part)))
		})
		share.Value = min(share.Value, 1)
		return share, err
	}
	for _, was := range e.Annuli(d) {
		if was.part == a.part && was.Field.Lack == nil && was.Switched > 0 {
			more := max(1, was.Field.Value/was.Switched)
			return gap.Answer[quantity.Fraction]{Value: min(a.Switched*more, 1), Because: "in proportion to the described one"}, nil
		}
	}
	return gap.Answer[quantity.Fraction]{}, lack.Failed("no computed field goes with it")
}

// described is the feedthrough of the chain that another is a change of, or is.
func (e *Evidence) described(f *chain.Feedthrough) *chain.Feedthrough {
	for i := range e.chain.Feedthroughs {
		if d := &e.chain.Feedthroughs[i]; d.Name.V == f.Name.V {
			return d
		}
	}
	return f
}

// shareByField is the greatest computed field somewhere in a feedthrough, on either side of
// its plate, as a part of what a coaxial body alone would have there for each volt on the pin.
func (e *Evidence) shareByField(f *chain.Feedthrough, alone float64, find func(*build.Arrangement) (Stress, error)) (gap.Answer[quantity.Fraction], error) {
	most, last := gap.Answer[quantity.Fraction]{}, error(lack.Failed("its field is not worked out"))
	for _, a := range e.Arrangements() {
		if a.From != build.FromFeedthrough || a.Of != f.Name.V || a.Err != nil {
			continue
		}
		p, err := find(a)
		if err != nil {
			last = err
			continue
		}
		on := math.Abs(float64(p.potentials[build.Pin] - p.potentials[build.Plate]))
		if share := quantity.Fraction(float64(p.Strength) / (alone * on)); on > 0 && share > most.Value {
			most.Value = share
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
