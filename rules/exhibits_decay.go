package rules

import (
	"fmt"
	"math"
	"slices"

	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

// decayCurve shows how the chain runs down after switching off.
func decayCurve(e *evidence.Evidence) []exhibit.Curve {
	at := holding(e)
	if at == nil {
		return nil
	}
	limit := float64(evidence.DischargedAt())
	c := exhibit.Curve{
		ID: "energy.decay", Chapter: exhibit.Energy, Title: "After switching off", Basis: "decay of the whole network",
		X: exhibit.Axis{What: "time after switching off", Unit: "s"}, Y: exhibit.Axis{What: "voltage to ground", Unit: "V", Log: true},
		Levels: []exhibit.Level{{Name: "discharged", Value: limit}},
		Note:   under(at) + "Through what is permanent, heater and gun cold",
	}
	end := shownUntil(at)
	if a := e.Chain().Access; a != nil && a.WaitingTime.Set() {
		if wait := float64(a.WaitingTime.V); wait <= farthest*end {
			end = max(end, 1.05*wait)
			c.Levels = append(c.Levels, exhibit.Level{Name: "waiting time", Value: wait, Along: true})
		} else {
			c.Note += fmt.Sprintf("; the waiting time of %s is far to the right", quantity.Text(a.WaitingTime.V))
		}
	}
	for _, node := range runningDown(at) {
		if l := fall(at, node, end, limit*shownBelow); len(l.Points) > 1 {
			c.Lines = append(c.Lines, l)
		}
	}
	return drawn(c)
}

// What a picture of a decay shows: down to a share of what counts as discharged, somewhat
// longer than the slowest takes, and a waiting time that is at most so many times as long.
const (
	shownBelow = 0.1
	longer     = 1.2
	farthest   = 4.0
)

// holding is the state in which charge is judged: regulation lost where that is known,
// else working; no evidence where neither is.
func holding(e *evidence.Evidence) *evidence.Evidence {
	if !e.HasSupply() {
		return nil
	}
	for _, state := range []evidence.State{evidence.Lost, evidence.Working} {
		at := e.Under(evidence.Condition{State: state})
		if _, err := at.Potential("output"); err == nil {
			return at
		}
	}
	return nil
}

// runningDown is the nodes whose fall is shown: the top of both columns, what hangs on
// them, and the one that takes longest.
func runningDown(e *evidence.Evidence) []string {
	wanted := []string{"multiplier", fmt.Sprintf("coupling.%d", e.Chain().Multiplier.Stages.V), "output", "cathode"}
	if slowest, err := e.SlowestDischarge(); err == nil {
		wanted = append(wanted, slowest.Node)
	}
	var nodes []string
	for _, node := range wanted {
		if !slices.ContainsFunc(nodes, func(n string) bool { return e.Same(n, node) }) {
			nodes = append(nodes, node)
		}
	}
	return nodes
}

// shownUntil is the end of the time axis, in seconds: somewhat after the last node has
// fallen, or, where none ever does, after all is still.
func shownUntil(e *evidence.Evidence) float64 {
	end := 0.0
	for _, node := range e.Discharged() {
		if d, err := e.DischargeOf(node); err == nil && !d.Never {
			end = max(end, float64(d.Time))
		}
	}
	if times, _, err := e.Falling("output"); end == 0 && err == nil {
		end = float64(times[len(times)-1])
	}
	return longer * end
}

// fall is the line of a node, as magnitudes, up to a time and down to a voltage; what stays
// goes on to the end.
func fall(e *evidence.Evidence, node string, end, least float64) exhibit.Line {
	l := exhibit.Line{Name: node}
	times, volts, err := e.Falling(node)
	if err != nil {
		return l
	}
	for i, t := range times {
		v := math.Abs(float64(volts[i]))
		if v < least || float64(t) > end {
			break
		}
		l.Points = append(l.Points, exhibit.Point{X: float64(t), Y: v})
		if i+1 == len(times) {
			l.Points = append(l.Points, exhibit.Point{X: end, Y: v})
		}
	}
	l.Points = exhibit.Thin(l.Points, usualPoints)
	return l
}
