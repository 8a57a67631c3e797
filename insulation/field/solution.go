package field

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"kilovet/hv/lack"
	"kilovet/hv/profile"
	"kilovet/hv/quantity"
)

// vacuumPermittivity ε₀ in F/m, 8.8541878128(13)e-12 (CODATA 2018).
const vacuumPermittivity = 8.8541878128e-12

// Solution is the field of an arrangement for one volt on each electrode in turn and
// none on the others. It serves every condition: fields add up.
type Solution struct {
	*solver
	coarse, fine *solved
}

// Solve works out the electrostatic field of an arrangement. What is wrong with the
// outlines comes as profile.Faults; a figure that cannot be resolved within the work
// limit as a lack.
func Solve(a Arrangement) (*Solution, error) { return Fine.Solve(a) }

// Aim is how many times the errors may be what Solve and SolveResistive allow.
type Aim float64

// Fine is for what is printed, Rough for searches whose end is looked at finely or that
// have something in hand: its peaks are off by some parts in a thousand.
const (
	Fine  Aim = 1
	Rough Aim = 8
)

// Solve is Solve with that aim.
func (aim Aim) Solve(a Arrangement) (*Solution, error) {
	m, err := newModel(&a, false)
	if err != nil {
		return nil, err
	}
	return m.solution(aim)
}

func (m *model) solution(aim Aim) (*Solution, error) {
	s := newSolver(m)
	s.aim = float64(aim)
	return s.solution(s.firstMesh())
}

// solution refines a first division.
func (s *solver) solution(panels []*panel) (*Solution, error) {
	coarse, fine, err := s.adapt(panels)
	if err != nil {
		return nil, err
	}
	return &Solution{solver: s, coarse: coarse, fine: fine}, nil
}

// Work says what the solution took.
func (s *Solution) Work() Work { return s.work }

// Electrodes are the names of all electrodes, the earthed boundary last if the model
// has one.
func (s *Solution) Electrodes() []string { return slices.Clone(s.names) }

// electrode is the number of an electrode.
func (s *Solution) electrode(name string) (int, error) {
	if i := slices.Index(s.names, name); i >= 0 {
		return i, nil
	}
	return 0, lack.Range("there is no electrode %q; there are %s", name, strings.Join(s.names, ", "))
}

// Field is the field for stated potentials.
type Field struct {
	*Solution
	volts        []float64 // of each group
	values, less *values   // fine and coarse
}

// Under is the field when each electrode has its potential. All must be given; the
// earthed boundary is at zero. Electrodes that touch must have the same.
func (s *Solution) Under(potentials map[string]quantity.Voltage) (*Field, error) {
	f := &Field{Solution: s, volts: make([]float64, s.groups)}
	if err := s.checkPotentials(potentials); err != nil {
		return nil, err
	}
	for i, name := range s.names {
		f.volts[s.group[i]] = float64(potentials[name])
	}
	f.values, f.less = s.superpose(s.fine, f.volts), s.superpose(s.coarse, f.volts)
	return f, nil
}

// Range is the lowest and the highest potential of all electrodes.
func (f *Field) Range() (low, high quantity.Voltage) {
	low, high = quantity.Voltage(slices.Min(f.volts)), quantity.Voltage(slices.Max(f.volts))
	return low, high
}

func (s *Solution) checkPotentials(potentials map[string]quantity.Voltage) error {
	var missing []string
	for _, name := range s.names {
		if _, given := potentials[name]; !given && name != Earthed {
			missing = append(missing, name)
		}
	}
	if len(missing) > 0 {
		return lack.Because("the potential of "+strings.Join(missing, ", ")+" is not given", missing...)
	}
	for _, name := range sortedKeys(potentials) {
		if _, err := s.electrode(name); err != nil {
			return err
		}
		if v := float64(potentials[name]); math.IsNaN(v) || math.IsInf(v, 0) || name == Earthed && v != 0 {
			return lack.Range("the potential of %s cannot be %v", name, v)
		}
	}
	same := func(a, b string) bool { return quantity.Equal(potentials[a], potentials[b]) }
	if faults := s.apart(same); len(faults) > 0 {
		return faults
	}
	return nil
}

func sortedKeys(m map[string]quantity.Voltage) []string {
	var keys []string
	for k := range m {
		keys = append(keys, k)
	}
	slices.Sort(keys)
	return keys
}

// flux out of an electrode for the solution of a group: ∫ c ∂u/∂n dS in units of the
// model, of which the charge is ε₀ times the unit of length.
func (s *solver) flux(v *solved, electrode, g int) (sum float64) {
	for i := range v.sides {
		sd := &v.sides[i]
		if s.walls[sd.wall].electrode != electrode {
			continue
		}
		for j, ds := range sd.panel.ds {
			sum += 2 * math.Pi * real(sd.panel.x[j]) * ds * s.constants[sd.region] * v.q[g][i][j]
		}
	}
	return sum
}

// fluxes is the flux out of every electrode. On an earthed mirror plane ends what
// the others send out: beyond it there is nothing, at infinity neither.
func (s *solver) fluxes(v *solved, g int) []float64 {
	out, sum := make([]float64, len(s.names)), 0.0
	for k := range s.names {
		out[k] = s.flux(v, k, g)
		sum += out[k]
	}
	if s.mirror != nil && s.mirror.earthed {
		out[len(out)-1] -= sum
	}
	return out
}

// Capacitance is the Maxwell coefficient of two electrodes: the charge on the first
// when the second is at one volt and all others at none. Electrodes that touch count
// as one. Negative for two different ones; of a half model it is half.
func (s *Solution) Capacitance(first, second string) (quantity.Capacitance, error) {
	if s.resistive {
		return 0, lack.Range("a resistive distribution has no capacitances")
	}
	c, err := s.coefficient(first, second)
	return quantity.Capacitance(vacuumPermittivity * c), err
}

// coefficient of two electrodes: metres times the relative constant.
func (s *Solution) coefficient(first, second string) (sum float64, err error) {
	i, err := s.electrode(first)
	if err != nil {
		return 0, err
	}
	j, err := s.electrode(second)
	if err != nil {
		return 0, err
	}
	if s.mirror != nil && s.mirror.earthed && second == Earthed {
		return s.earthColumn(i), nil
	}
	for k, flux := range s.fluxes(s.fine, s.group[j]) {
		if s.group[k] == s.group[i] {
			sum += flux * s.unit
		}
	}
	return sum, nil
}

// earthColumn is the coefficient of an electrode with an earthed mirror plane. The
// plane and infinity being one conductor, the coefficients of a row add up to zero.
func (s *Solution) earthColumn(i int) (sum float64) {
	for g := range s.groups {
		if g == s.group[len(s.names)-1] {
			continue
		}
		for k, flux := range s.fluxes(s.fine, g) {
			if s.group[k] == s.group[i] {
				sum -= flux * s.unit
			}
		}
	}
	return sum
}

// Charge on an electrode.
func (f *Field) Charge(electrode string) (quantity.Charge, error) {
	if f.resistive {
		return 0, lack.Range("a resistive distribution has currents, not charges")
	}
	k, err := f.electrode(electrode)
	return quantity.Charge(vacuumPermittivity * f.outflow(k)), err
}

// outflow of an electrode: volts times metres times the constant.
func (f *Field) outflow(electrode int) (sum float64) {
	for g, v := range f.volts {
		sum += v * f.fluxes(f.fine, g)[electrode] * f.unit
	}
	return sum
}

// Energy of the field, from charges and potentials.
func (f *Field) Energy() (quantity.Energy, error) {
	if f.resistive {
		return 0, lack.Range("a resistive distribution has losses, not energy")
	}
	sum := 0.0
	for k := range f.names {
		sum += f.volts[f.group[k]] * f.outflow(k) / 2
	}
	return quantity.Energy(vacuumPermittivity * sum), nil
}

// bodyName is the name of what fills a region.
func (m *model) bodyName(region int) string {
	if k := m.regions[region].material; k > 0 {
		return m.Dielectrics[k-1].Name
	}
	return Medium
}

// body is the material of that name.
func (m *model) body(name string) (int, error) {
	if name == Medium {
		return 0, nil
	}
	for i, d := range m.Dielectrics {
		if d.Name == name {
			return i + 1, nil
		}
	}
	return 0, lack.Range("there is no dielectric %q", name)
}

// outer turns a point of the model into one of the drawing.
func (m *model) outer(x complex128) profile.Point {
	if math.Abs(real(x)) < 1e-12 {
		x = complex(0, imag(x))
	}
	if math.Abs(imag(x)) < 1e-12 {
		x = complex(real(x), 0)
	}
	return profile.Point{R: quantity.Length(real(x) * m.unit), Z: quantity.Length(imag(x) * m.unit)}
}

func (m *model) inner(p profile.Point) complex128 {
	return complex(float64(p.R)/m.unit, float64(p.Z)/m.unit)
}

func (m *model) describe(x complex128) string { return fmt.Sprint(m.outer(x)) }
