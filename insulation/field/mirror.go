package field

import (
	"kilovet/hv/profile"
	"kilovet/hv/quantity"
)

// mirror is an infinite plane of symmetry: natural, or earthed.
type mirror struct {
	z       quantity.Length
	earthed bool
	side    float64 // +1: the model lies above
}

// findMirror takes out a boundary that stands for an infinite plane and puts in its
// place the line that closes the figure from the axis along the plane.
func findMirror(all []profile.Profile, owners []owner) (*mirror, []profile.Profile, []owner) {
	for i, p := range all {
		if owners[i].kind != ofNatural && owners[i].kind != ofEarth || len(p.Segments) != 1 {
			continue
		}
		others := append(append([]profile.Profile(nil), all[:i]...), all[i+1:]...)
		plane := p.Segments[0]
		if !flat(plane) || !dangles(plane, others) {
			continue
		}
		m := &mirror{z: plane.From.Z, earthed: owners[i].kind == ofEarth, side: oneSided(plane.From.Z, others)}
		if m.side == 0 || m.earthed && m.stoodOn(others, owners, i) {
			continue
		}
		kept := append(append([]owner(nil), owners[:i]...), owners[i+1:]...)
		if rim := m.rim(others); rim > 0 {
			line := profile.Segment{From: profile.Point{Z: m.z}, To: profile.Point{R: rim, Z: m.z}}
			others = append(others, profile.Profile{Name: p.Name, Segments: []profile.Segment{line}})
			kept = append(kept, owner{ofMirror, owners[i].index})
		}
		return m, others, kept
	}
	return nil, all, owners
}

func flat(s profile.Segment) bool {
	return s.Turn == profile.Straight && s.From.Z == s.To.Z
}

// dangles reports whether the outer end of a flat line meets nothing and lies
// farther out than anything else.
func dangles(s profile.Segment, others []profile.Profile) bool {
	outer := s.To
	if s.From.R > s.To.R {
		outer = s.From
	}
	tol := 4e-6 * profile.Extent(others...)
	for _, p := range others {
		for _, seg := range p.Segments {
			for i := range 33 {
				if seg.At(float64(i)/32).R > outer.R-tol {
					return false
				}
			}
		}
	}
	return true
}

// oneSided is +1 if everything lies on or above z, −1 if on or below, else 0.
func oneSided(z quantity.Length, others []profile.Profile) float64 {
	tol := 4e-6 * profile.Extent(others...)
	above, below := true, true
	for _, p := range others {
		for _, s := range p.Segments {
			for i := range 33 {
				at := s.At(float64(i) / 32)
				above, below = above && at.Z >= z-tol, below && at.Z <= z+tol
			}
		}
	}
	switch {
	case above && !below:
		return 1
	case below && !above:
		return -1
	}
	return 0
}

// stoodOn reports whether an electrode touches the plane, which is profile i of all.
func (m *mirror) stoodOn(others []profile.Profile, owners []owner, i int) bool {
	for j, p := range others {
		o := owners[j]
		if j >= i {
			o = owners[j+1]
		}
		if o.kind == ofElectrode && m.rim([]profile.Profile{p}) > 0 {
			return true
		}
	}
	return false
}

// rim is the largest radius at which a profile stands on the plane.
func (m *mirror) rim(others []profile.Profile) (rim quantity.Length) {
	tol := 4e-6 * profile.Extent(others...)
	for _, p := range others {
		for _, s := range p.Segments {
			for _, end := range []profile.Point{s.From, s.To} {
				if end.Z-m.z <= tol && m.z-end.Z <= tol {
					rim = max(rim, end.R)
				}
			}
		}
	}
	return rim
}
