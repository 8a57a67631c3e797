package evidence

import (
	"errors"
	"fmt"
	"math"
	"slices"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/profile"
	"kilovet/hv/quantity"
	"kilovet/insulation/field"
	"kilovet/rules/build"
)

// sketch is a described arrangement as outlines, with where they are described.
type sketch struct {
	field.Arrangement
	described map[string][]chain.Stroke // by the name of the outline
	faults    profile.Faults            // of outlines by themselves
}

// sketchOf turns a described field into outlines, each with a name of its own; pieces
// of one name are one electrode.
func sketchOf(f *chain.Field) *sketch {
	s := &sketch{described: map[string][]chain.Stroke{}}
	for _, el := range f.Electrodes {
		p := s.outline(el.Name.V, el.Profile)
		i := slices.IndexFunc(s.Electrodes, func(x field.Electrode) bool { return x.Name == el.Name.V })
		if i < 0 {
			i = len(s.Electrodes)
			s.Electrodes = append(s.Electrodes, field.Electrode{Name: el.Name.V})
		}
		s.Electrodes[i].Profiles = append(s.Electrodes[i].Profiles, p)
	}
	for _, d := range f.Dielectrics {
		s.Dielectrics = append(s.Dielectrics, field.Dielectric{Name: d.Name.V, Permittivity: d.Permittivity.V,
			Resistivity: d.Resistivity.V, Profile: s.outline(d.Name.V, d.Profile)})
	}
	for _, b := range f.Boundary {
		kind := field.Natural
		if b.Kind.V == "earth" {
			kind = field.Earth
		}
		s.Boundaries = append(s.Boundaries, field.Boundary{Kind: kind, Profile: s.outline("boundary", b.Profile)})
	}
	return s
}

// outline builds a profile from the strokes of the description.
func (s *sketch) outline(of string, strokes []chain.Stroke) profile.Profile {
	name := fmt.Sprintf("%s, outline %d", of, len(s.described)+1)
	s.described[name] = strokes
	var list []profile.Stroke
	for _, st := range strokes {
		one := profile.Stroke{From: point(st.From.V), To: point(st.To.V), Centre: point(st.Centre.V)}
		if st.Turn.V == "right" {
			one.Turn = profile.Right
		} else if st.Turn.V == "left" {
			one.Turn = profile.Left
		}
		list = append(list, one)
	}
	p, err := profile.New(name, list)
	var wrong profile.Faults
	if errors.As(err, &wrong) {
		s.faults = append(s.faults, wrong...)
	}
	return p
}

func point(rz []quantity.Length) *profile.Point {
	if len(rz) != 2 {
		return nil
	}
	return &profile.Point{R: rz[0], Z: rz[1]}
}

// place of a fault in the description: its stroke, or the arrangement where it belongs
// to no outline.
func (s *sketch) place(f *chain.Field, wrong profile.Fault) document.Place {
	strokes, known := s.described[wrong.Profile]
	switch {
	case !known:
		return named(f, wrong.Profile)
	case wrong.Stroke >= len(strokes):
		return strokes[len(strokes)-1].Here()
	}
	return strokes[wrong.Stroke].Here()
}

// named is the place of the body of a name, that of the arrangement if there is none.
func named(f *chain.Field, name string) document.Place {
	for _, el := range slices.Backward(f.Electrodes) {
		if el.Name.V == name {
			return el.Name.Place
		}
	}
	for _, d := range slices.Backward(f.Dielectrics) {
		if d.Name.V == name {
			return d.Name.Place
		}
	}
	return f.Here()
}

// Drawn is the outline of a body as a path of straight pieces, arcs by five degrees.
type Drawn struct {
	Body   string
	Points []profile.Point
}

// Outlines are those of the electrodes and dielectrics of an arrangement.
func Outlines(f *build.Arrangement) (all []Drawn) {
	s := sketchOf(&f.Field)
	add := func(body string, p profile.Profile) {
		d := Drawn{Body: body}
		for i, seg := range p.Segments {
			if i == 0 {
				d.Points = append(d.Points, seg.From)
			}
			pieces := 1 + int(math.Abs(float64(seg.Sweep()))*36/math.Pi)
			for k := range pieces {
				d.Points = append(d.Points, seg.At(float64(k+1)/float64(pieces)))
			}
		}
		all = append(all, d)
	}
	for _, el := range s.Electrodes {
		for _, p := range el.Profiles {
			add(el.Name, p)
		}
	}
	for _, d := range s.Dielectrics {
		add(d.Name, d.Profile)
	}
	return all
}
