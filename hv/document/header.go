package document

import "strings"

// header finds or makes the table that a header opens and turns to it.
func (g *grower) header(path []string, kind statementKind, at Place) {
	g.context, g.path = g.root, strings.Join(path, ".")
	last := len(path) - 1
	for i, name := range path {
		next := g.context.children[name]
		switch {
		case next == nil:
			next = newTable(kind, i == last, at)
			g.context.put(name, at, next)
		case next.closed || next.kind != table && next.kind != tables:
			g.twice(at, path, next)
			g.context = &node{kind: table} // its keys lead nowhere
			return
		case i == last:
			g.again(next, path, kind, at)
		}
		g.context = next.enter(i == last, at)
	}
}

func newTable(kind statementKind, last bool, at Place) *node {
	if last && kind == headers {
		return &node{kind: tables, place: at}
	}
	return &node{kind: table, place: at, headed: last}
}

// again judges a header whose table is there already: fine for one more of several
// and for a table that only its sub-tables have named so far.
func (g *grower) again(n *node, path []string, kind statementKind, at Place) {
	switch {
	case n.kind == tables && kind == header:
		g.fault(Form, at, path, "one table among several of the same name", "write [["+g.path+"]]")
	case n.kind == table && (n.headed || kind == headers):
		g.twice(at, path, n)
	case n.kind == table:
		n.headed, n.place = true, at
	}
}

// enter is the table that the keys after a header go to: of several, a new one or,
// on the way to a sub-table, the last.
func (n *node) enter(last bool, at Place) *node {
	if n.kind != tables {
		return n
	}
	if last {
		n.items = append(n.items, &node{kind: table, place: at, headed: true})
	}
	return n.items[len(n.items)-1]
}
