package circuit

// builder collects named elements and links before nodes are numbered.
type builder struct {
	elements []Element
	names    []string
	seen     map[string]bool
	links    []link
	negative bool
}

func newBuilder() *builder {
	const usual = 64 // elements and names of a chain, nearly
	b := &builder{seen: make(map[string]bool, usual), names: make([]string, 0, usual), elements: make([]Element, 0, usual)}
	b.name("ground")
	return b
}

func (b *builder) name(n string) {
	if !b.seen[n] {
		b.seen[n] = true
		b.names = append(b.names, n)
	}
}

func (b *builder) add(e Element, from, to string) {
	b.name(from)
	b.name(to)
	e.from, e.to = from, to
	b.elements = append(b.elements, e)
}

// link joins two names into one node; name is that of the connection.
func (b *builder) link(name, from, to string) {
	b.name(from)
	b.name(to)
	b.links = append(b.links, link{name, from, to})
}

// circuit numbers the nodes: names joined by links share one, ground is node 0. It takes
// the elements over: nothing is built on afterwards.
func (b *builder) circuit() *Circuit {
	c := &Circuit{Negative: b.negative, names: b.names, nodes: make(map[string]Node, len(b.names)), links: b.links}
	root := joined(b.links)
	for _, name := range b.names {
		r := root(name)
		n, ok := c.nodes[r]
		if !ok {
			n = Node(len(c.labels))
			c.labels = append(c.labels, nil)
			c.nodes[r] = n
		}
		c.nodes[name] = n
		c.labels[n] = append(c.labels[n], name)
	}
	c.Elements = b.elements
	for i := range c.Elements {
		e := &c.Elements[i]
		e.From, e.To = c.nodes[e.from], c.nodes[e.to]
	}
	return c
}

// joined finds the representative of a name among names joined by links.
func joined(links []link) func(string) string {
	parent := map[string]string{}
	find := func(n string) string {
		for parent[n] != "" {
			n = parent[n]
		}
		return n
	}
	for _, l := range links {
		a, b := find(l.from), find(l.to)
		if a == "ground" {
			a, b = b, a
		}
		if a != b {
			parent[a] = b
		}
	}
	return find
}
