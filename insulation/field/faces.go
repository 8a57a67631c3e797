package field

import (
	"slices"

	"kilovet/hv/quantity"
)

// PeakFacing is the greatest field on an electrode where it borders a body, a dielectric
// or the medium, at least a distance away from every sharp edge. A sharp edge of that
// part of it leaves it without a peak where the distance is zero.
func (f *Field) PeakFacing(electrode, body string, distance quantity.Length) (Peak, error) {
	k, err := f.electrode(electrode)
	if err != nil {
		return Peak{}, err
	}
	if f.mirror != nil && f.mirror.earthed && electrode == Earthed && body == Medium {
		return f.PeakBeyond(electrode, distance)
	}
	in, err := f.filled(body)
	if err != nil {
		return Peak{}, err
	}
	on := func(w *wall) bool { return w.electrode == k }
	return f.search("the electrode "+electrode+" facing "+body, float64(distance)/f.unit, on, in)
}

// PeakBeside is the greatest field in the medium on the free surface of a dielectric, at
// least a distance away from every sharp edge.
func (f *Field) PeakBeside(dielectric string, distance quantity.Length) (Peak, error) {
	k, err := f.body(dielectric)
	if err != nil {
		return Peak{}, err
	}
	medium, _ := f.filled(Medium)
	on := func(w *wall) bool {
		return w.kind == interfaces && (f.regions[w.left].material == k || f.regions[w.right].material == k)
	}
	return f.search("the medium beside "+dielectric, float64(distance)/f.unit, on, medium)
}

// filled tells the regions that a body fills.
func (f *Field) filled(body string) (func(region int) bool, error) {
	k, err := f.body(body)
	return func(r int) bool { return r >= 0 && f.regions[r].material == k }, err
}

// Bodies are the names of all that a field passes through, the medium first if it does.
func (s *Solution) Bodies() (list []string) {
	has := func(k int) bool {
		return slices.ContainsFunc(s.regions, func(r region) bool { return r.material == k })
	}
	if has(0) {
		list = append(list, Medium)
	}
	for i, d := range s.Dielectrics {
		if has(i + 1) {
			list = append(list, d.Name)
		}
	}
	return list
}

// Facing are the bodies that an electrode borders, those of Bodies in their order.
func (s *Solution) Facing(electrode string) (list []string) {
	k := slices.Index(s.names, electrode)
	for _, body := range s.Bodies() {
		material, _ := s.body(body)
		in := func(r int) bool { return r >= 0 && s.regions[r].material == material }
		touches := func(w wall) bool { return w.electrode == k && (in(w.left) || in(w.right)) }
		mirrored := material == 0 && s.mirror != nil && s.mirror.earthed && electrode == Earthed
		if mirrored || slices.ContainsFunc(s.walls, touches) {
			list = append(list, body)
		}
	}
	return list
}

// Bare are the dielectrics with a free surface to the medium.
func (s *Solution) Bare() (list []string) {
	for i, d := range s.Dielectrics {
		if slices.ContainsFunc(s.walls, func(w wall) bool {
			if w.kind != interfaces {
				return false
			}
			a, b := s.regions[w.left].material, s.regions[w.right].material
			return a == 0 && b == i+1 || a == i+1 && b == 0
		}) {
			list = append(list, d.Name)
		}
	}
	return list
}

// Joined are the dielectrics with a free surface to the medium that share an interface with
// one, itself among them.
func (s *Solution) Joined(dielectric string) (list []string) {
	k, err := s.body(dielectric)
	if err != nil {
		return nil
	}
	bare := s.Bare()
	for i, d := range s.Dielectrics {
		touches := func(w wall) bool {
			if w.kind != interfaces {
				return false
			}
			a, b := s.regions[w.left].material, s.regions[w.right].material
			return a == k && b == i+1 || a == i+1 && b == k
		}
		if slices.Contains(bare, d.Name) && (i+1 == k || slices.ContainsFunc(s.walls, touches)) {
			list = append(list, d.Name)
		}
	}
	return list
}
