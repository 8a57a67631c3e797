package document

import (
	"fmt"
	"slices"
	"strconv"
	"strings"
	"unicode"
)

// nodeKind is what stands at a key.
type nodeKind int

const (
	scalar    nodeKind = iota // one value
	list                      // values in square brackets
	table                     // one table
	tables                    // tables under double-bracket headers
	illegible                 // something that could not be read
)

// node is what stands at one key of the document.
type node struct {
	kind     nodeKind
	place    Place  // of the value, the opening bracket or the header; without key
	raw      string // as it stands in the file
	value    any    // of a scalar
	items    []*node
	names    []string // of the children, in document order
	children map[string]*node
	keys     map[string]Place // of the children's keys

	headed  bool // a table with a header of its own, or made by dotted keys
	closed  bool // a table in braces
	partial bool // a line of the table could not be read
}

func (n *node) put(name string, key Place, child *node) {
	if n.children == nil {
		n.children, n.keys = map[string]*node{}, map[string]Place{}
	}
	n.names = append(n.names, name)
	n.children[name], n.keys[name] = child, key
}

// grower grows the tree of a document from its statements.
type grower struct {
	text    string
	cursor  *cursor
	faults  Faults
	root    *node
	context *node  // the table that keys belong to at present
	path    string // of that table
}

// grow makes the tree of a text and lists what could not be read.
func grow(text string) (*node, Faults) {
	root := &node{kind: table, place: Place{Line: 1, Column: 1}}
	g := &grower{text: text, cursor: newCursor(text), root: root, context: root}
	for all := scan(text); len(all) > 0; {
		n := max(1, keysAhead(all))
		g.run(all[:n])
		all = all[n:]
	}
	return root, g.faults
}

// keysAhead counts the keys before the next header or the next statement that is no TOML.
func keysAhead(all []statement) int {
	n := slices.IndexFunc(all, func(st statement) bool { return st.kind != pair || st.deep || st.broken })
	if n < 0 {
		return len(all)
	}
	return n
}

// run reads statements that follow each other: keys at one go where that succeeds,
// which is several times faster, else each by itself.
func (g *grower) run(all []statement) {
	if len(all) > 1 {
		if d, bad := decode(g.text[all[0].start:all[len(all)-1].end]); bad == nil {
			for _, st := range all {
				g.pair(g.context, st.entry, 0, d, d.values)
			}
			return
		}
	}
	for _, st := range all {
		g.statement(st)
	}
}

func (g *grower) fault(code Code, at Place, path []string, what, remedy string) {
	g.faults = append(g.faults, Fault{Code: code, Key: pathText(path), Line: at.Line, Column: at.Column, What: what, Remedy: remedy})
}

func (g *grower) statement(st statement) {
	switch {
	case st.deep:
		start := g.cursor.at(st.start)
		g.fault(Nesting, start, g.named(st), "nested too deeply", fmt.Sprintf("at most %d tables or lists within each other", deepest))
		g.unread(st, start)
		return
	case st.broken:
		g.unread(st, g.syntax(st, &unreadable{}))
		return
	}
	d, bad := decode(g.text[st.start:st.end])
	switch {
	case bad != nil:
		g.unread(st, g.syntax(st, bad))
	case st.kind == pair:
		g.pair(g.context, st.entry, 0, d, d.values)
	default:
		g.header(d.path(), st.kind, g.cursor.at(st.start))
	}
}

// syntax reports a statement that the TOML library refused, and tells where.
func (g *grower) syntax(st statement, bad *unreadable) Place {
	if inner, ok := bad.repeated(); ok {
		at := g.cursor.at(st.start + bad.offset)
		g.fault(Twice, at, g.under(inner), "given a second time between the same braces", "keep one")
		return at
	}
	d := st.diagnose(g.text, bad)
	at := g.cursor.at(d.offset)
	g.fault(Syntax, at, g.named(st), d.what, d.remedy)
	return at
}

// named is the path of the key or table that an illegible statement is about; nil
// where that is illegible too.
func (g *grower) named(st statement) []string {
	path := plainPath(g.text[st.entry.start:st.entry.end])
	switch {
	case path == nil || st.kind != pair:
		return path
	case st.entry.value.start == 0: // without "=" it may be anything
		return nil
	}
	return g.under(path)
}

// unread takes from an illegible statement what its key gives away, so that nothing
// is called missing that only could not be read. It stands where its fault is.
func (g *grower) unread(st statement, at Place) {
	switch named := g.named(st); {
	case st.kind != pair && named != nil:
		g.header(named, st.kind, at)
	case st.kind != pair:
		g.context, g.path = &node{kind: table}, ""
	case named != nil:
		g.claim(plainPath(g.text[st.entry.start:st.entry.end]), at)
	default:
		g.context.partial = true
	}
}

// claim notes that a key was given, though not legibly.
func (g *grower) claim(path []string, at Place) {
	last := len(path) - 1
	into, _ := g.context.descend(path[:last], at)
	if into != nil && into.children[path[last]] == nil {
		into.put(path[last], at, &node{kind: illegible, place: at})
	}
}

// pair adds a key and its value to a table; depth is the number of names in the
// key's path that lead to the table.
func (g *grower) pair(into *node, e entry, depth int, d *decoded, values map[string]any) {
	path, key := d.path(), g.cursor.at(e.start)
	if len(path) <= depth {
		g.fault(Syntax, key, nil, "cannot be followed", "write one key = value a line")
		return
	}
	child := g.value(e.value, len(path), d, lookUp(values, path[depth:]))
	g.attach(into, path, depth, key, child)
}

func (g *grower) value(e element, depth int, d *decoded, value any) *node {
	n := &node{place: g.cursor.at(e.start), raw: g.text[e.start:e.end], value: value}
	switch e.opener {
	case '[':
		n.kind = list
		values, _ := value.([]any)
		for i, item := range e.items {
			n.items = append(n.items, g.value(item, depth, d, pick(values, i)))
		}
	case '{':
		n.kind, n.closed = table, true
		values, _ := value.(map[string]any)
		for _, inner := range e.entries {
			g.pair(n, inner, depth, d, values)
		}
	}
	return n
}

// attach hangs a child into a table under what follows the first depth names of a path.
func (g *grower) attach(into *node, path []string, depth int, key Place, child *node) {
	last := len(path) - 1
	into, there := into.descend(path[depth:last], key)
	if into != nil {
		there = into.children[path[last]]
	}
	if there != nil {
		g.twice(key, g.under(path), there)
		return
	}
	into.put(path[last], key, child)
}

// descend follows the names before the last of a dotted key, making tables on the
// way; where something else is in the way it returns that instead.
func (n *node) descend(names []string, key Place) (into, inTheWay *node) {
	for _, name := range names {
		next := n.children[name]
		if next == nil {
			next = &node{kind: table, place: key, headed: true}
			n.put(name, key, next)
		}
		if next.kind != table || next.closed {
			return nil, next
		}
		n = next
	}
	return n, nil
}

func (g *grower) under(path []string) []string {
	if g.path == "" {
		return path
	}
	return append([]string{g.path}, path...)
}

func (g *grower) twice(at Place, path []string, first *node) {
	g.fault(Twice, at, path, "given a second time", fmt.Sprintf("keep one; the first is on line %d", first.place.Line))
}

// pathText writes a path for a message; what cannot be printed stands in quotes, escaped.
func pathText(path []string) string {
	parts := slices.Clone(path)
	for i, part := range parts {
		if strings.ContainsFunc(part, func(r rune) bool { return !unicode.IsPrint(r) }) {
			parts[i] = strconv.Quote(part)
		}
		parts[i] = brief(parts[i])
	}
	return strings.Join(parts, ".")
}

func lookUp(values map[string]any, path []string) any {
	for i, name := range path {
		v := values[name]
		if i == len(path)-1 {
			return v
		}
		values, _ = v.(map[string]any)
	}
	return nil
}

func pick(values []any, i int) any {
	if i < len(values) {
		return values[i]
	}
	return nil
}
