package build

import (
	"fmt"
	"math"
	"math/cmplx"
	"slices"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// sharpEdges are the radii of the edges of described electrodes where two straight pieces
// meet: 0 as they are drawn, where another radius rounds them off between the pieces.
func sharpEdges(f *chain.Field) (all []Dimension) {
	for i := range f.Electrodes {
		strokes := f.Electrodes[i].Profile
		for k := 1; k+1 < len(strokes); k++ {
			e, straight := edgeAt(strokes, k)
			if !straight {
				continue
			}
			all = append(all, Dimension{
				Name: fmt.Sprintf("edge radius of %s at r %s, z %s", f.Electrodes[i].Name.V, quantity.Text(quantity.Length(real(e.at))), quantity.Text(quantity.Length(imag(e.at)))),
				Key:  "field.electrodes.profile", Near: &e.at,
				With: func(v quantity.Length) *Arrangement { return e.rounded(f, i, k, float64(v)) },
			})
		}
	}
	return all
}

// bend is where two straight pieces of an outline meet.
type bend struct {
	before, at, after complex128
}

// edgeAt is the bend at the end of a stroke.
func edgeAt(strokes []chain.Stroke, k int) (bend, bool) {
	if strokes[k].Centre.Set() || strokes[k+1].Centre.Set() {
		return bend{}, false
	}
	before, ok0 := plane(startOf(strokes[k-1]))
	at, ok1 := plane(strokes[k].To)
	after, ok2 := plane(strokes[k+1].To)
	b := bend{before, at, after}
	return b, ok0 && ok1 && ok2 && math.Abs(b.turn()) > 1e-6
}

// turn is the angle by which an outline turns at a bend, positive to the left.
func (b bend) turn() float64 { return cmplx.Phase((b.after - b.at) / (b.at - b.before)) }

// rounded is a field in which an arc takes the place of a bend.
func (b bend) rounded(f *chain.Field, i, k int, radius float64) *Arrangement {
	a := &Arrangement{Field: mapped(f, func(x complex128) complex128 { return x })}
	if !(radius > 0) {
		return a
	}
	in, out := b.at-b.before, b.after-b.at
	cut := radius * math.Tan(math.Abs(b.turn())/2)
	if cut >= cmplx.Abs(in) || cut >= cmplx.Abs(out) {
		a.Err = lack.Range("the straight pieces beside the edge are too short for a larger radius")
		return a
	}
	in, out = in/complex(cmplx.Abs(in), 0), out/complex(cmplx.Abs(out), 0)
	side, turn := 1i, "left"
	if b.turn() < 0 {
		side, turn = -1i, "right"
	}
	start := b.at - in*complex(cut, 0)
	arc := f.Electrodes[i].Profile[k]
	point := arc.To
	at := func(x complex128) func(complex128) complex128 { return func(complex128) complex128 { return x } }
	arc.To, arc.Centre = moved(point, at(b.at+out*complex(cut, 0))), moved(point, at(start+side*in*complex(radius, 0)))
	arc.Turn.V, arc.Turn.Place = turn, point.Place
	strokes := a.Electrodes[i].Profile
	strokes[k].To = moved(point, at(start))
	a.Electrodes[i].Profile = slices.Insert(strokes, k+1, arc)
	return a
}
