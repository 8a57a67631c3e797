package chain

import "fmt"

// Nodes lists every node of the chain by all its names, from ground upwards, those
// that parts make last.
func (c *Chain) Nodes() []string {
	nodes := c.fixedNodes()
	seen := map[string]bool{"": true}
	for _, name := range nodes {
		seen[name] = true
	}
	for i := range c.Parts {
		for _, end := range []string{c.Parts[i].From.V, c.Parts[i].To.V} {
			if !seen[end] {
				nodes = append(nodes, end)
				seen[end] = true
			}
		}
	}
	return nodes
}

// fixedNodes are the nodes that a chain has without its loose parts.
func (c *Chain) fixedNodes() []string {
	nodes := []string{"ground", "mains"}
	if c.Drive != nil {
		nodes = append(nodes, "drive")
	}
	if c.Multiplier != nil {
		nodes = append(nodes, c.columnNodes()...)
		for i := range c.Filters {
			nodes = append(nodes, fmt.Sprintf("filter.%d", i+1))
		}
		nodes = append(nodes, "supply", "output")
	}
	if c.Bias != nil || c.Gun != nil {
		nodes = append(nodes, "control")
	}
	if c.HasCathode() {
		nodes = append(nodes, "cathode")
	}
	if c.Gun.EarthedCathode() {
		nodes = append(nodes, "anode")
	}
	if c.Heater != nil {
		nodes = append(nodes, "heater.a", "heater.b")
	}
	if c.Divider != nil {
		nodes = append(nodes, "divider.tap")
	}
	return nodes
}

// columnNodes are the nodes of the multiplier from its foot to its top.
func (c *Chain) columnNodes() []string {
	m := c.Multiplier
	columns := []string{"coupling"}
	var nodes []string
	if m.Symmetrical() {
		columns = []string{"coupling.a", "coupling.b"}
		nodes = append(nodes, "drive.a", "drive.b")
	}
	nodes = append(nodes, "foot")
	for k := 1; k <= m.Stages.V; k++ {
		for _, column := range columns {
			nodes = append(nodes, fmt.Sprintf("%s.%d", column, k))
		}
		nodes = append(nodes, fmt.Sprintf("stage.%d", k))
	}
	return append(nodes, "multiplier")
}

// HasCathode reports whether the chain ends at a cathode.
func (c *Chain) HasCathode() bool { return c.Bias != nil || c.Gun != nil || c.Heater != nil }
