package evidence

import (
	"fmt"
	"math/cmplx"
	"strings"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/ripple/cascade"
	"kilovet/ripple/network"
)

// NoLoad is 2 N (peak − forward drop) at the drive of the condition.
func (e *Evidence) NoLoad() (quantity.Voltage, error) {
	c, err := e.Cascade()
	if err != nil {
		return 0, err
	}
	return c.NoLoad()
}

// MultiplierMean is the magnitude of the mean at the top of the smoothing column.
func (e *Evidence) MultiplierMean() (quantity.Voltage, error) {
	v, err := e.Potential("multiplier")
	if err != nil {
		return 0, err
	}
	if e.chain.Multiplier.Negative() {
		v = -v
	}
	if v < 0 {
		return 0, lack.Range("the load pulls the output through zero: the multiplier cannot feed it")
	}
	return v, nil
}

// MultiplierMinimum is the smallest magnitude at the top of the smoothing column;
// zero where it passes through zero.
func (e *Evidence) MultiplierMinimum() (quantity.Voltage, error) {
	s, err := e.swing("multiplier", "ground")
	return max(s.Least, -s.Greatest, 0), err
}

// Drop is what the mean lies below no load, and why.
type Drop struct {
	Total, Load, Stray, Source quantity.Voltage
	// Ripple at the top, peak to peak, of the circuit without what opposes the drive, and
	// of that without strays as well: what the closed form is to be compared with.
	RippleStiff, RippleIdeal quantity.Voltage
	// Split is the reason why the drop could not be split, Rest why what the load takes
	// is not told apart; nil where they are.
	Split, Rest error
}

// Drop is the drop of the multiplier. It is split by solving the circuit again
// without what opposes the drive, then without strays and leakage as well.
func (e *Evidence) Drop() (Drop, error) {
	return remember(e, "drop", func() (Drop, error) {
		none, err := e.NoLoad()
		if err != nil {
			return Drop{}, err
		}
		mean, err := e.MultiplierMean()
		if err != nil {
			return Drop{}, err
		}
		d := Drop{Total: none - mean}
		d.Split = e.split(&d, mean)
		return d, nil
	})
}

func (e *Evidence) split(d *Drop, mean quantity.Voltage) error {
	c, err := e.Circuit()
	if err != nil {
		return err
	}
	stiff := stiffDrive(c)
	withStrays, err := e.topOf(stiff)
	if err != nil {
		return err
	}
	ideal, err := e.topOf(strayless(stiff))
	if err != nil {
		return err
	}
	d.Source, d.Stray = magnitude(withStrays.Mean)-mean, magnitude(ideal.Mean)-magnitude(withStrays.Mean)
	d.RippleStiff, d.RippleIdeal = withStrays.PeakToPeak(), ideal.PeakToPeak()
	d.Load = d.Total - d.Source - d.Stray
	if d.Load < 0 && e.chain.Drive.Unbalance.V > 0 {
		d.Rest = lack.Failed("the stronger half of the drive raises the output by more than the load takes: what the load takes of the drop is not told apart")
	}
	return nil
}

// topOf is how the top of an edited circuit moves.
func (e *Evidence) topOf(c *circuit.Circuit) (network.Swing, error) {
	p, err := e.solve(c, beside{}, true)
	if err != nil {
		return network.Swing{}, err
	}
	return p.between("multiplier", "ground")
}

// stiffDrive takes away what stands in series with the drive and in the diodes.
func stiffDrive(c *circuit.Circuit) *circuit.Circuit {
	for _, el := range c.Elements {
		if strings.HasPrefix(el.Name, "drive.resistance") || strings.HasPrefix(el.Name, "drive.inductance") {
			c = c.Short(el.Name)
		}
	}
	return c.Each(func(el *circuit.Element) bool {
		if el.Kind == circuit.Diode {
			el.Rectifier.On = 0
		}
		return true
	})
}

// strayless takes away the multiplier's strays, junction capacitance and leakage.
func strayless(c *circuit.Circuit) *circuit.Circuit {
	return c.Each(func(el *circuit.Element) bool {
		if el.Kind == circuit.Diode && el.Role == circuit.Ladder {
			el.Rectifier.Junction, el.Rectifier.Leakage = 0, 0
		}
		return !strings.HasPrefix(el.Name, "stray.")
	})
}

// Harmonic is the amplitude of a node's ripple at k times the drive frequency.
func (e *Evidence) Harmonic(node string, k int) (quantity.Voltage, error) {
	s, err := e.solution()
	if err != nil {
		return 0, err
	}
	v, err := s.harmonic(node, "ground", k)
	return quantity.Voltage(cmplx.Abs(v)), err
}

// DiodeReversePeak is the largest reverse voltage on any diode of the multiplier.
func (e *Evidence) DiodeReversePeak() (quantity.Voltage, error) {
	return largestOf(e, isDiode, (*Evidence).ReversePeak)
}

// CapacitorPeak is the largest voltage on any capacitor of the columns.
func (e *Evidence) CapacitorPeak() (quantity.Voltage, error) {
	return largestOf(e, isColumn, (*Evidence).ElementPeak)
}

func isDiode(el circuit.Element) bool { return el.Kind == circuit.Diode && el.Role == circuit.Ladder }

func isColumn(el circuit.Element) bool {
	return el.Kind == circuit.Capacitor && el.Role == circuit.Ladder
}

// largestOf is the largest of a value over the ladder elements a filter keeps.
func largestOf[Q ~float64](e *Evidence, keep func(circuit.Element) bool, value func(*Evidence, string) (Q, error)) (Q, error) {
	var names []string
	for _, el := range e.Layout().Elements {
		if keep(el) {
			names = append(names, el.Name)
		}
	}
	if len(names) == 0 {
		return 0, lack.Key("multiplier")
	}
	most, err := Largest(e, []Condition{e.condition}, names, value)
	return most.Value, err
}

// DropEstimate is the drop of the mean by charge balance at the current the load draws.
func (e *Evidence) DropEstimate() (quantity.Voltage, error) {
	s, err := e.estimate()
	return s.Drop(), err
}

// RippleEstimate is the ripple by charge balance, peak to peak.
func (e *Evidence) RippleEstimate() (quantity.Voltage, error) {
	s, err := e.estimate()
	return s.Ripple.PeakToPeak(), err
}

func (e *Evidence) estimate() (cascade.State, error) {
	c, err := e.Cascade()
	if err != nil {
		return cascade.State{}, err
	}
	i, err := e.LoadCurrent()
	if err != nil {
		return cascade.State{}, err
	}
	return c.Loaded(i)
}

// StagesForMostOutput is the number of stages that gives most output at this load.
func (e *Evidence) StagesForMostOutput() (int, error) {
	c, err := e.Cascade()
	if err != nil {
		return 0, err
	}
	i, err := e.LoadCurrent()
	if err != nil {
		return 0, err
	}
	best, err := c.StagesForMostOutput(i)
	return best.Stages, err
}

// LoadCurrent is the mean current that the top of the multiplier delivers: what its
// last diode carries, both of them if symmetrical.
func (e *Evidence) LoadCurrent() (quantity.Current, error) {
	var sum quantity.Current
	for _, name := range e.lastDiodes() {
		i, err := e.DiodeMean(name)
		if err != nil {
			return 0, err
		}
		sum += i
	}
	return sum, nil
}

func (e *Evidence) lastDiodes() []string {
	last := fmt.Sprint(2 * e.chain.Multiplier.Stages.V)
	if e.chain.Multiplier.Symmetrical() {
		return []string{"multiplier.diode.a." + last, "multiplier.diode.b." + last}
	}
	return []string{"multiplier.diode." + last}
}

// DiodeCurrentPeak is the largest peak current of any diode of the multiplier.
func (e *Evidence) DiodeCurrentPeak() (quantity.Current, error) {
	return largestOf(e, isDiode, (*Evidence).DiodePeak)
}

// InputPower is the mean power of the drive sources.
func (e *Evidence) InputPower() (quantity.Power, error) {
	s, err := e.solution()
	if err != nil {
		return 0, err
	}
	return s.InputPower(), nil
}

// Ringing says of each state of the chain that is not walked to rest how exactly it is known.
func (e *Evidence) Ringing() (all []string) {
	if !e.HasSupply() {
		return nil
	}
	for _, state := range States {
		if s, err := e.Under(Condition{State: state}).solution(); err == nil && s.Adrift > 0 {
			all = append(all, string(state)+": "+s.Ringing())
		}
	}
	return all
}

// StateAssumptions are what the steady state takes for granted.
func (e *Evidence) StateAssumptions() []string {
	var all []string
	c := e.chain
	if c.Multiplier != nil && c.Multiplier.Symmetrical() && !c.Drive.Unbalance.Set() {
		all = append(all, "both halves of the drive are taken as equal")
	}
	if c.Gun.IsFitted() && c.Gun.Cutoff.Set() && !c.Gun.Exponent.Set() {
		all = append(all, "emission ~ (cutoff − bias)^2")
	}
	return all
}
