package document

import (
	"fmt"
	"strconv"
	"strings"
)

// Written is one value as it stands in a description.
type Written struct {
	Place
	// At tells tables of one kind apart, by their name where they have one, else by
	// their number: spacing "lid".creepage, filter.2.resistor.value.
	At   string
	Text string // on one line
}

// List lists the values of a description in document order, table by table. Of a
// description with faults it lists what can be read.
func List(data []byte) []Written {
	text, unusable := decodeText(data)
	if unusable != nil {
		return nil
	}
	root, _ := grow(text)
	var l lister
	l.table(root, "", "")
	return l.all
}

type lister struct{ all []Written }

func (l *lister) table(n *node, key, at string) {
	for _, name := range n.names {
		child, key, at := n.children[name], join(key, name), join(at, name)
		switch {
		case child.kind == table:
			l.table(child, key, at)
		case child.holdsTables():
			l.tables(child, key, at)
		case child.kind != illegible:
			l.all = append(l.all, Written{Place{key, child.place.Line, child.place.Column}, at, child.text()})
		}
	}
}

func (l *lister) tables(n *node, key, at string) {
	seen := map[string]int{}
	for i, item := range n.items {
		name, ok := item.name()
		if !ok {
			l.table(item, key, fmt.Sprintf("%s.%d", at, i+1))
			continue
		}
		label := at + " " + strconv.Quote(name)
		if seen[name]++; seen[name] > 1 {
			label += fmt.Sprintf(" %d", seen[name])
		}
		l.table(item, key, label)
	}
}

// holdsTables reports whether several tables stand there, in braces or under headers.
func (n *node) holdsTables() bool {
	return n.kind == tables || n.kind == list && len(n.items) > 0 && n.items[0].kind == table
}

// name is what a table calls itself.
func (n *node) name() (string, bool) {
	child := n.children["name"]
	if child == nil {
		return "", false
	}
	name, ok := child.value.(string)
	return name, ok
}

// text is a value as it stands in the file; a list without its line breaks and comments.
func (n *node) text() string {
	if n.kind != list {
		return n.raw
	}
	items := make([]string, len(n.items))
	for i, item := range n.items {
		items[i] = item.text()
	}
	return "[" + strings.Join(items, ", ") + "]"
}
