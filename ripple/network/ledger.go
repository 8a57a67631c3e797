package network

import (
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// Stress is what an element went through in a stretch of time.
type Stress struct {
	Least, Greatest quantity.Voltage // across it, from From to To
	Peak            quantity.Current // largest magnitude; of a diode without its junction's
	Charge          quantity.Charge  // passed from From to To
	Energy          quantity.Energy  // taken up
}

// ReversePeak is the largest voltage against the forward direction.
func (s Stress) ReversePeak() quantity.Voltage { return -s.Least }

// Stresses are those of all elements of a circuit.
type Stresses struct {
	Circuit *circuit.Circuit
	of      []Stress
}

// Of is the stress of one element.
func (s *Stresses) Of(name string) Stress {
	for i := range s.Circuit.Elements {
		if s.Circuit.Elements[i].Name == name {
			return s.of[i]
		}
	}
	panic("network: no element " + name)
}

// ledger adds up stresses step by step.
type ledger struct {
	Stresses
	accounts []account
	ties     []tieAccount
	last     []float64    // by element: current at the end of the step before
	whole    [][3]float64 // by element that a tie needs: current at the stages, that of a diode with its junction's
}

// account is an element whose current is i₀ + g·v + c·dv/dt, and that of a diode or coil.
type account struct {
	span
	index       int     // of the element
	i0, g, c    float64 // c but for the junction of a diode
	junction    float64
	diode, coil int  // or −1
	needed      bool // by a tie
}

// tieAccount is an element whose current is the sum of others'.
type tieAccount struct {
	span
	index int // of the element
	parts []part
}

// part is an element whose current is a part of another's.
type part struct {
	element int
	sign    float64
}

func newLedger(s *system) *ledger {
	n := len(s.c.Elements)
	l := &ledger{Stresses: Stresses{s.c, make([]Stress, n)}, last: make([]float64, n), whole: make([][3]float64, n)}
	view := Periodic{Circuit: s.c, track: &track{system: s}}
	needed := make([]bool, n)
	for i := range s.c.Elements {
		l.of[i].Least, l.of[i].Greatest = quantity.Voltage(math.Inf(1)), quantity.Voltage(math.Inf(-1))
		if e := &s.c.Elements[i]; isTie(e) {
			if t := view.tieAccount(i); t.parts != nil {
				l.ties = append(l.ties, t)
				for _, p := range t.parts {
					needed[p.element] = true
				}
			}
		}
	}
	l.accounts = s.accounts(needed)
	return l
}

// tieAccount is the account of a tie; nothing hangs on one without parts.
func (p *Periodic) tieAccount(i int) tieAccount {
	t := tieAccount{span: p.spanOf(&p.Circuit.Elements[i]), index: i}
	for _, b := range p.branches(i, true) {
		t.parts = append(t.parts, part{b.index, b.sign})
	}
	return t
}

// accounts are those of all elements that are no ties.
func (s *system) accounts(needed []bool) []account {
	var list []account
	for i := range s.c.Elements {
		e := &s.c.Elements[i]
		if isTie(e) {
			continue
		}
		a := account{span: s.between(e.From, e.To), index: i, diode: -1, coil: -1, needed: needed[i]}
		switch e.Kind {
		case circuit.Resistor:
			a.g = 1 / float64(e.Resistance)
		case circuit.Sink:
			a.i0 = float64(e.Current)
		case circuit.Capacitor:
			a.c = float64(e.Capacitance)
		case circuit.Diode:
			a.junction = float64(e.Rectifier.Junction)
		}
		list = append(list, a)
	}
	s.assign(list)
	return list
}

// assign tells the accounts of diodes and coils which they are.
func (s *system) assign(list []account) {
	at := make([]*account, len(s.c.Elements))
	for i := range list {
		at[list[i].index] = &list[i]
	}
	for k := range s.diodes {
		a := at[s.diodes[k].element]
		a.diode, a.g = k, s.diodes[k].leak
	}
	for k := range s.inductors {
		at[s.inductors[k].element].coil = k
	}
}

// enter adds the steps of a track.
func (l *ledger) enter(t *track) {
	for k := range t.steps {
		p := newPage(t, k)
		for i := range l.accounts {
			l.add(&l.accounts[i], &p)
		}
		for i := range l.ties {
			l.gather(&l.ties[i], &p)
		}
	}
}
