package chain

import (
	"slices"
	"strings"

	"kilovet/hv/document"
)

// checkNodes looks up every node that the description names.
func checkNodes(s *survey) {
	s.newNodes()
	if !s.legible || !s.endsKnown() {
		return
	}
	if s.Access != nil {
		s.eachNode(s.Access.Touchable)
	}
	if s.Multiplier != nil { // else there are hardly any, and what needs them is reported apart
		s.chainNodes()
	}
}

// endsKnown reports whether all ends of parts are legible: any may name a new node.
func (s *survey) endsKnown() bool {
	return !slices.ContainsFunc(s.Parts, func(p Part) bool { return !s.sound(p.From.Place) || !s.sound(p.To.Place) })
}

func (s *survey) chainNodes() {
	for i := range s.Loads {
		s.toGround(s.Loads[i].At)
	}
	for i := range s.Bleeders {
		s.toGround(s.Bleeders[i].At)
	}
	if s.Divider != nil {
		s.sensedNode(s.Divider.Senses)
	}
	for i := range s.Instruments {
		s.node(s.Instruments[i].At)
		s.node(s.Instruments[i].To)
	}
	for i := range s.Spacings {
		sp := &s.Spacings[i]
		s.node(sp.From)
		s.node(sp.To)
		s.eachNode(sp.Also)
	}
	for i := range s.Feedthroughs {
		f := &s.Feedthroughs[i]
		s.node(f.Node)
		s.node(f.To)
		s.eachNode(f.Also)
	}
	for i := range s.Fields {
		for j := range s.Fields[i].Electrodes {
			s.node(s.Fields[i].Electrodes[j].Node)
		}
	}
}

// toGround judges the node of what hangs between a node and ground.
func (s *survey) toGround(at document.Given[string]) {
	s.node(at)
	if s.sound(at.Place) && (at.V == "ground" || at.V == "foot") {
		s.fault(at.Place, "both ends on ground", `name the node at high voltage, as in at = "output"`)
	}
}

func (s *survey) sensedNode(senses document.Given[string]) {
	s.node(senses)
	if v := senses.V; s.sound(senses.Place) && (v == "divider.tap" || v == "ground" || v == "foot") {
		s.fault(senses.Place, "the divider cannot sense "+v, `name the node whose voltage it measures, as in senses = "output"`)
	}
}

func (s *survey) eachNode(list document.Given[[]string]) {
	for _, name := range list.V {
		s.node(document.Given[string]{V: name, Place: list.Place})
	}
}

// node reports a name that is no node.
func (s *survey) node(name document.Given[string]) {
	if s.sound(name.Place) && !s.nodes[name.V] && !s.uncounted(name.V) {
		s.fault(name.Place, quoted(name.V)+" is no node of this chain", oneOf("node", "", name.V, s.listed))
	}
}

// uncounted reports whether a name is that of a stage, and the number of stages unknown.
func (s *survey) uncounted(name string) bool {
	family, _, _ := strings.Cut(name, ".")
	return (family == "stage" || family == "coupling") && s.Multiplier != nil && !s.sound(s.Multiplier.Stages.Place)
}

// newNodes judges the ends of loose parts that are no nodes of the chain without them.
func (s *survey) newNodes() {
	fixed := s.fixedNodes()
	uses := map[string]int{}
	for i := range s.Parts {
		uses[s.Parts[i].From.V]++
		uses[s.Parts[i].To.V]++
	}
	for i := range s.Parts {
		p := &s.Parts[i]
		if p.From.V == p.To.V && s.sound(p.To.Place) {
			s.fault(p.To.Place, "both ends on the same node", "name the node of the other end")
		}
		for _, end := range []document.Given[string]{p.From, p.To} {
			if s.sound(end.Place) && !slices.Contains(fixed, end.V) {
				s.newNode(end, fixed, uses[end.V])
			}
		}
	}
}

// newNode judges a name that makes a new node: it must not pass for a node that
// other chains have, nor be one of this chain's with a slip of the pen. Such a slip
// is taken for a name where more than one part bears it.
func (s *survey) newNode(end document.Given[string], fixed []string, uses int) {
	near, ok := document.Nearest(end.V, fixed)
	switch {
	case ok && strings.EqualFold(near, end.V):
		s.fault(end.Place, quoted(end.V)+" differs by upper and lower case only from a node", "write "+quoted(near))
	case reserved(end.V) && s.legible && !s.uncounted(end.V):
		s.fault(end.Place, quoted(end.V)+" is no node of this chain, and the name is kept for one", oneOf("node", "", end.V, fixed))
	case ok && uses == 1 && document.Slips(near, end.V) == 1:
		s.fault(end.Place, quoted(end.V)+" is no node but nearly one, and no other part is on it", "write "+quoted(near)+", or choose a name that is less alike")
	}
}

// reserved reports whether a name belongs to the nodes of chains in general.
func reserved(name string) bool {
	switch name {
	case "ground", "mains", "foot", "multiplier", "supply", "output", "control", "cathode":
		return true
	}
	family, _, _ := strings.Cut(name, ".")
	return slices.Contains([]string{"drive", "coupling", "stage", "filter", "heater", "divider"}, family)
}

// checkNames looks for things of one kind with the same name, and for parts named like nodes.
func checkNames(s *survey) {
	parts := names(s.Parts, func(p *Part) document.Given[string] { return p.Name })
	s.distinct("load", names(s.Loads, func(l *Load) document.Given[string] { return l.Name }))
	s.distinct("part", parts)
	s.distinct("spacing", names(s.Spacings, func(sp *Spacing) document.Given[string] { return sp.Name }))
	s.distinct("feedthrough", names(s.Feedthroughs, func(f *Feedthrough) document.Given[string] { return f.Name }))
	s.distinct("target", names(s.Targets, func(t *Target) document.Given[string] { return t.Name }))
	s.distinct("shield", names(s.Shields, func(sh *Shield) document.Given[string] { return sh.Name }))
	s.distinct("instrument", names(s.Instruments, func(i *Instrument) document.Given[string] { return i.Name }))
	s.distinct("field", names(s.Fields, func(f *Field) document.Given[string] { return f.Name }))
	for i := range s.Fields {
		s.distinct("probe", names(s.Fields[i].Probes, func(p *Probe) document.Given[string] { return p.Name }))
	}
	for _, p := range parts {
		if s.sound(p.Place) && s.nodes[p.V] {
			s.fault(p.Place, "a part with the name of a node", "give it a name of its own")
		}
	}
}

func names[T any](things []T, name func(*T) document.Given[string]) []document.Given[string] {
	all := make([]document.Given[string], len(things))
	for i := range things {
		all[i] = name(&things[i])
	}
	return all
}

func (s *survey) distinct(what string, names []document.Given[string]) {
	first := map[string]document.Place{}
	for _, n := range names {
		if !s.sound(n.Place) {
			continue
		}
		if there, twice := first[n.V]; twice {
			s.fault(n.Place, "a second "+what+" named "+quoted(n.V), "choose another name; the first is on line "+lineOf(there))
			continue
		}
		first[n.V] = n.Place
	}
}
