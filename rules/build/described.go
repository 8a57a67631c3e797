package build

import (
	"fmt"
	"math"
	"math/cmplx"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Described is an arrangement as it is described. Its dimensions are the size of the
// whole drawing, the radii of edges between two straight pieces, sharp or rounded, and what
// moving a part of it along or across the axis changes.
func Described(f *chain.Field) *Arrangement {
	a := &Arrangement{Field: *f}
	if size := sizeOf(f); size > 0 {
		a.Dimensions = append(a.Dimensions, Dimension{Name: "size of the whole drawing", Key: "field", Value: size, With: func(v quantity.Length) *Arrangement {
			return &Arrangement{Field: mapped(f, func(x complex128) complex128 { return x * complex(float64(v/size), 0) })}
		}})
	}
	for i := range f.Electrodes {
		for k := range f.Electrodes[i].Profile {
			if c, rounded := corner(f.Electrodes[i].Profile, k); rounded {
				a.Dimensions = append(a.Dimensions, rounding(f, i, k, c))
			}
		}
	}
	a.Dimensions = append(append(a.Dimensions, sharpEdges(f)...), movedDimensions(f)...)
	return a
}

func plane(rz document.Given[[]quantity.Length]) (complex128, bool) {
	if len(rz.V) != 2 {
		return 0, false
	}
	return complex(float64(rz.V[0]), float64(rz.V[1])), true
}

func sizeOf(f *chain.Field) quantity.Length {
	most := 0.0
	mapped(f, func(x complex128) complex128 {
		most = math.Max(most, cmplx.Abs(x))
		return x
	})
	return quantity.Length(most)
}

// mapped is a field with all its points moved.
func mapped(f *chain.Field, move func(complex128) complex128) chain.Field {
	out := *f
	out.Electrodes, out.Dielectrics, out.Boundary = nil, nil, nil
	for _, el := range f.Electrodes {
		el.Profile = movedStrokes(el.Profile, move)
		out.Electrodes = append(out.Electrodes, el)
	}
	for _, d := range f.Dielectrics {
		d.Profile = movedStrokes(d.Profile, move)
		out.Dielectrics = append(out.Dielectrics, d)
	}
	for _, b := range f.Boundary {
		b.Profile = movedStrokes(b.Profile, move)
		out.Boundary = append(out.Boundary, b)
	}
	return out
}

func movedStrokes(strokes []chain.Stroke, move func(complex128) complex128) []chain.Stroke {
	out := make([]chain.Stroke, len(strokes))
	for i, s := range strokes {
		s.From, s.To, s.Centre = moved(s.From, move), moved(s.To, move), moved(s.Centre, move)
		out[i] = s
	}
	return out
}

func moved(p document.Given[[]quantity.Length], move func(complex128) complex128) document.Given[[]quantity.Length] {
	x, there := plane(p)
	if !there {
		return p
	}
	x = move(x)
	p.V = []quantity.Length{quantity.Length(real(x)), quantity.Length(imag(x))}
	return p
}

// corner is where the straight pieces beside an arc would meet, if it rounds them off.
func corner(strokes []chain.Stroke, k int) (complex128, bool) {
	if k < 2 || k+1 >= len(strokes) || !strokes[k].Centre.Set() || strokes[k-1].Centre.Set() || strokes[k+1].Centre.Set() {
		return 0, false
	}
	before, ok0 := plane(startOf(strokes[k-2]))
	start, ok1 := plane(strokes[k-1].To)
	end, ok2 := plane(strokes[k].To)
	after, ok3 := plane(strokes[k+1].To)
	centre, ok4 := plane(strokes[k].Centre)
	if !ok0 || !ok1 || !ok2 || !ok3 || !ok4 {
		return 0, false
	}
	u, v := start-before, after-end
	det := imag(cmplx.Conj(u) * v)
	if math.Abs(det) < 1e-6*cmplx.Abs(u)*cmplx.Abs(v) {
		return 0, false
	}
	q := start + u*complex(imag(cmplx.Conj(end-start)*v)/det, 0)
	tangent := func(along, spoke complex128) bool {
		return math.Abs(real(along*cmplx.Conj(spoke))) < 1e-3*cmplx.Abs(along)*cmplx.Abs(spoke)
	}
	return q, tangent(u, start-centre) && tangent(v, end-centre)
}

func startOf(s chain.Stroke) document.Given[[]quantity.Length] {
	if s.From.Set() {
		return s.From
	}
	return s.To
}

// rounding is the radius of an arc that rounds a corner: another one grows or shrinks
// towards the corner, its neighbours follow.
func rounding(f *chain.Field, i, k int, q complex128) Dimension {
	strokes := f.Electrodes[i].Profile
	centre, _ := plane(strokes[k].Centre)
	end, _ := plane(strokes[k].To)
	radius := quantity.Length(cmplx.Abs(end - centre))
	at := strokes[k].To.V
	return Dimension{
		Name: fmt.Sprintf("edge radius of %s at r %s, z %s", f.Electrodes[i].Name.V, quantity.Text(at[0]), quantity.Text(at[1])),
		Key:  "field.electrodes.profile", Value: radius,
		With: func(v quantity.Length) *Arrangement { return reRounded(f, i, k, q, float64(v/radius)) },
	}
}

func reRounded(f *chain.Field, i, k int, q complex128, factor float64) *Arrangement {
	out := mapped(f, func(x complex128) complex128 { return x })
	strokes := out.Electrodes[i].Profile
	towards := func(x complex128) complex128 { return q + (x-q)*complex(factor, 0) }
	before, _ := plane(startOf(f.Electrodes[i].Profile[k-2]))
	start, _ := plane(f.Electrodes[i].Profile[k-1].To)
	end, _ := plane(f.Electrodes[i].Profile[k].To)
	after, _ := plane(f.Electrodes[i].Profile[k+1].To)
	a := &Arrangement{Field: out}
	if factor*cmplx.Abs(start-q) >= cmplx.Abs(before-q) || factor*cmplx.Abs(end-q) >= cmplx.Abs(after-q) {
		a.Err = lack.Range("the straight pieces beside the edge are too short for a larger radius")
		return a
	}
	strokes[k-1].To = moved(strokes[k-1].To, towards)
	strokes[k].To, strokes[k].Centre = moved(strokes[k].To, towards), moved(strokes[k].Centre, towards)
	return a
}
