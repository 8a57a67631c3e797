package field

import (
	"kilovet/hv/profile"
	"kilovet/hv/quantity"
)

// Earthed is the name under which the earthed boundary counts as an electrode.
const Earthed = "earthed boundary"

// Medium is the name of what fills the space between the bodies.
const Medium = "medium"

// Arrangement is a figure of revolution whose field is wanted.
type Arrangement struct {
	Permittivity float64              // of the medium, relative; 0 stands for 1
	Resistivity  quantity.Resistivity // of the medium; 0 stands for a perfect insulator
	Electrodes   []Electrode
	Dielectrics  []Dielectric
	Boundaries   []Boundary
}

// Electrode is a conductor of one potential; its outline may be open where the
// model ends, and may come in pieces.
type Electrode struct {
	Name     string
	Profiles []profile.Profile
}

// Dielectric is an insulating body. Its outline is closed, by the axis if need be.
type Dielectric struct {
	Name         string
	Permittivity float64              // relative
	Resistivity  quantity.Resistivity // 0: not given
	Profile      profile.Profile
}

// BoundaryKind says what happens where the model ends.
type BoundaryKind int

const (
	// Natural lets no flux through: a plane of symmetry, or a place where the field
	// runs along.
	Natural BoundaryKind = iota
	// Earth is a conductor at zero.
	Earth
)

// Boundary is where the model ends. A single flat one, z constant, that reaches
// farther out than anything else and has all else on one side, is an infinite plane.
type Boundary struct {
	Kind    BoundaryKind
	Profile profile.Profile
}

// owner says what a profile of the arrangement is.
type owner struct {
	kind  ownerKind
	index int // into Electrodes, Dielectrics, Boundaries
}

type ownerKind int

const (
	ofElectrode ownerKind = iota
	ofDielectric
	ofNatural
	ofEarth
	ofMirror
)

// outlines lists all profiles of an arrangement with their owners.
func (a *Arrangement) outlines() (all []profile.Profile, owners []owner, faults profile.Faults) {
	add := func(p profile.Profile, k ownerKind, i int) {
		all, owners = append(all, p), append(owners, owner{k, i})
	}
	for i, e := range a.Electrodes {
		for _, p := range e.Profiles {
			add(p, ofElectrode, i)
		}
	}
	for i, d := range a.Dielectrics {
		closed, err := d.Profile.ClosedByAxis()
		if f, bad := err.(profile.Faults); bad {
			faults = append(faults, f...)
		}
		add(closed, ofDielectric, i)
	}
	for i, b := range a.Boundaries {
		kind := ofNatural
		if b.Kind == Earth {
			kind = ofEarth
		}
		add(b.Profile, kind, i)
	}
	return all, owners, faults
}
