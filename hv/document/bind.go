package document

import (
	"fmt"
	"reflect"
	"slices"
	"strings"
)

// binder fills a tagged struct from the tree of a document.
type binder struct {
	faults Faults
	top    reflect.Type
	known  map[reflect.Type][]Declared // of this reading, with paths from the struct itself
	all    []Declared                  // everything the description may hold, once needed
}

func (b *binder) fault(code Code, at Place, key, what, remedy string) {
	b.faults = append(b.faults, Fault{Code: code, Key: key, Line: at.Line, Column: at.Column, What: what, Remedy: remedy})
}

func (b *binder) declared(t reflect.Type) []Declared {
	if _, ok := b.known[t]; !ok {
		b.known[t] = declare(t, "")
	}
	return b.known[t]
}

// table fills a struct from a table and judges the keys of both.
func (b *binder) table(n *node, into reflect.Value, path string) {
	if f := into.FieldByName("Table"); f.IsValid() && f.Type() == reflect.TypeFor[Table]() {
		f.Set(reflect.ValueOf(Table{Place{Key: path, Line: n.place.Line, Column: n.place.Column}}))
	}
	declared := b.declared(into.Type())
	misspelt := b.unknowns(n, path, declared)
	for _, d := range declared {
		d.Path = join(path, d.Key)
		child := n.children[d.Key]
		if child == nil {
			child = misspelt[d.Key]
		}
		if child == nil && d.Needed && !n.partial {
			b.missing(n, d)
		}
		b.field(child, d, into.Field(d.index))
	}
}

// field fills one field; without a node it notes the keys of leaves only.
func (b *binder) field(n *node, d Declared, into reflect.Value) {
	switch {
	case d.kind == nil:
		b.leaf(n, d, into)
	case n == nil && into.Kind() == reflect.Struct:
		b.table(&node{kind: table, partial: true}, into, d.Path) // for the keys of its leaves
	case n == nil:
	case d.Holds == OneTable:
		b.oneTable(n, d, into)
	default:
		b.someTables(n, d, into)
	}
}

// oneTable fills the struct of a table. Of another form, what was given is read as
// far as it can be, so that it is neither called absent nor left unjudged.
func (b *binder) oneTable(n *node, d Declared, into reflect.Value) {
	if n.kind != table {
		b.wrongForm(n, d)
		for i, item := range n.items {
			if i > 0 && item.kind == table {
				b.table(item, reflect.New(d.kind).Elem(), d.Path)
			}
		}
		n = n.asTable()
	}
	if into.Kind() == reflect.Pointer {
		into.Set(reflect.New(d.kind))
		into = into.Elem()
	}
	b.table(n, into, d.Path)
}

// asTable is the table that something of another form is read as: of several the
// first, else one of which nothing is known.
func (n *node) asTable() *node {
	switch {
	case n.kind == table:
		return n
	case len(n.items) > 0 && n.items[0].kind == table:
		return n.items[0]
	}
	return &node{kind: table, partial: true, place: n.place}
}

func (b *binder) someTables(n *node, d Declared, into reflect.Value) {
	items := n.items
	if n.kind != tables && n.kind != list {
		b.wrongForm(n, d)
		items = []*node{n.asTable()}
	}
	into.Set(reflect.MakeSlice(into.Type(), len(items), len(items)))
	for i, item := range items {
		if item.kind != table {
			b.fault(Form, item.place, d.Path, describeNode(item)+" where a table is wanted", "write each in braces, as in { key = value }")
			item = item.asTable()
		}
		b.table(item, into.Index(i), d.Path)
	}
	if d.Needed && len(items) == 0 {
		b.fault(Length, n.place, d.Path, "an empty list", "give at least one")
	}
}

func (b *binder) wrongForm(n *node, d Declared) {
	switch {
	case n.kind == illegible: // said already
	case d.Holds == OneTable && n.kind == tables:
		b.fault(Form, n.place, d.Path, "there can be only one", "write ["+d.Path+"]")
	case d.Holds == OneTable:
		b.fault(Form, n.place, d.Path, describeNode(n)+" where a table is wanted", "write a table: "+d.Key+" = { … } or ["+d.Path+"]")
	case n.kind == table:
		b.fault(Form, n.place, d.Path, "one table where there can be several", "write [["+d.Path+"]], or a list "+d.Key+" = [{ … }]")
	default:
		b.fault(Form, n.place, d.Path, describeNode(n)+" where a list of tables is wanted", "write [["+d.Path+"]], or a list "+d.Key+" = [{ … }]")
	}
}

func (b *binder) missing(n *node, d Declared) {
	remedy := "add it: " + d.Means
	if d.kind == nil {
		remedy = fmt.Sprintf("add %s = %s (%s)", d.Key, d.Sample(), d.Means)
	}
	b.fault(Missing, n.place, d.Path, "not given, and "+within(n)+" makes no sense without it", remedy)
}

func within(n *node) string {
	if n.headed || n.closed {
		return "this table"
	}
	return "the description"
}

// unknowns reports the keys of a table that are not declared, and lists what stands
// there by the keys that were probably meant.
func (b *binder) unknowns(n *node, path string, declared []Declared) map[string]*node {
	var misspelt map[string]*node
	for _, name := range n.names {
		if slices.ContainsFunc(declared, func(d Declared) bool { return d.Key == name }) {
			continue
		}
		if near := b.unknown(n, name, path, declared); near != "" && misspelt[near] == nil {
			if misspelt == nil {
				misspelt = map[string]*node{}
			}
			misspelt[near] = n.children[name].presumed(n.keys[name])
		}
	}
	return misspelt
}

// presumed is what stands at a misspelt key, for the key that was probably meant: a
// table is read as if it stood there, a value only counts as given.
func (n *node) presumed(key Place) *node {
	if n.kind == table || n.kind == tables {
		return n
	}
	return &node{kind: illegible, place: key}
}

// unknown reports a key that is not declared and returns the one that was probably meant.
func (b *binder) unknown(n *node, name, path string, declared []Declared) string {
	accepted := make([]string, len(declared))
	for i, d := range declared {
		accepted[i] = d.Key
	}
	what := "there is no such key"
	if kind := n.children[name].kind; kind == table || kind == tables {
		what = "there is no such table"
	}
	near, ok := Nearest(name, accepted)
	if !ok {
		near = ""
	}
	b.fault(Unknown, n.keys[name], join(path, pathText([]string{name})), what, b.suggestion(name, near)+"accepted here: "+strings.Join(accepted, ", "))
	return near
}

func (b *binder) suggestion(name, near string) string {
	switch {
	case strings.EqualFold(near, name):
		return fmt.Sprintf("upper and lower case matter: write %q; ", near)
	case near != "":
		return fmt.Sprintf("was %q meant? ", near)
	}
	if b.all == nil {
		b.all = describe(b.top, "")
	}
	if i := slices.IndexFunc(b.all, func(d Declared) bool { return d.Key == name }); i >= 0 {
		return fmt.Sprintf("it belongs elsewhere, as in %q; ", b.all[i].Path)
	}
	return ""
}
