package document

import (
	"encoding/json"
	"fmt"
	"io"
	"reflect"
	"slices"
	"strconv"
)

// SchemaHead is what a schema says of itself.
type SchemaHead struct{ ID, Title, Means string }

// Schema writes the declarations of a struct as a JSON Schema (draft 2020-12), for
// editors and other programs: keys, words, counts and the units of every quantity.
// It refuses nothing that Read takes, but a number within a hair of its bound. What it
// cannot say of a text, such as where the range of a quantity ends, stands in the
// descriptions; its sign is part of the pattern;
// checks across keys are not part of it.
func Schema(w io.Writer, into any, head SchemaHead) error {
	s := &schemer{kinds: map[string]reflect.Type{}}
	t := structType(into)
	root := object{
		{"$schema", "https://json-schema.org/draft/2020-12/schema"}, {"$id", head.ID},
		{"title", head.Title}, {"description", head.Means},
	}
	root = append(root, s.table(t)...)
	data, err := json.MarshalIndent(append(root, member{"$defs", s.definitions}), "", "  ")
	if err != nil {
		return fmt.Errorf("document: schema: %w", err)
	}
	_, err = w.Write(append(data, '\n'))
	return err
}

// schemer gathers the definitions that a schema refers to, in the order in which
// they are first needed.
type schemer struct {
	definitions object
	kinds       map[string]reflect.Type // of the tables defined
}

// define adds a definition unless it is there, and refers to it.
func (s *schemer) define(name string, describe func() object) object {
	if !slices.ContainsFunc(s.definitions, func(m member) bool { return m.name == name }) {
		s.definitions = append(s.definitions, member{name, nil}) // its place before those it needs itself
		i := len(s.definitions) - 1
		s.definitions[i].value = describe()
	}
	return object{{"$ref", "#/$defs/" + name}}
}

// table describes the keys of a struct.
func (s *schemer) table(t reflect.Type) object {
	var properties object
	var needed []string
	for _, d := range declare(t, "") {
		properties = append(properties, member{d.Key, s.key(d)})
		if d.Needed {
			needed = append(needed, d.Key)
		}
	}
	all := object{{"type", "object"}, {"properties", properties}, {"additionalProperties", false}}
	if len(needed) > 0 {
		all = append(all, member{"required", needed})
	}
	return all
}

// key describes what one key takes.
func (s *schemer) key(d Declared) object {
	about := object{{"description", d.explanation()}}
	if d.Example != "" {
		about = append(about, member{"examples", []any{d.example()}})
	}
	return append(about, s.takes(d)...)
}

func (s *schemer) takes(d Declared) object {
	switch {
	case d.Holds == OneTable:
		return s.kind(d.kind)
	case d.Holds == SomeTables:
		return listOf(s.kind(d.kind), least(d), -1)
	case d.List == "one or many":
		return object{{"anyOf", []any{s.single(d), listOf(s.single(d), 1, -1)}}}
	case d.List == "many":
		return listOf(s.single(d), 0, -1)
	case d.List != "":
		n, _ := strconv.Atoi(d.List)
		return listOf(s.single(d), n, n)
	}
	return s.single(d)
}

// least is the fewest tables that a key takes.
func least(d Declared) int {
	if d.Needed {
		return 1
	}
	return 0
}

func listOf(item object, least, most int) object {
	list := object{{"type", "array"}, {"items", item}}
	if least > 0 {
		list = append(list, member{"minItems", least})
	}
	if most >= 0 {
		list = append(list, member{"maxItems", most})
	}
	return list
}

// kind refers to the definition of a table, named by its type.
func (s *schemer) kind(t reflect.Type) object {
	if known := s.kinds[t.Name()]; known != nil && known != t {
		panic("document: two kinds of table of one name: " + t.Name())
	}
	s.kinds[t.Name()] = t
	return s.define(t.Name(), func() object { return s.table(t) })
}

// single describes one value.
func (s *schemer) single(d Declared) object {
	switch d.Holds {
	case AQuantity:
		return s.define(definitionName(d), func() object { return quantitySchema(d.Dimension, d.sign()) })
	case AWhole:
		return append(object{{"type", "integer"}}, d.bounds.schema()...)
	case ANumber:
		return append(object{{"type", "number"}}, d.bounds.schema()...)
	case AYesNo:
		return object{{"type", "boolean"}}
	}
	if len(d.Words) > 0 {
		return object{{"enum", d.Words}}
	}
	return s.define("text", textSchema)
}

// schema is the bounds of a pure number.
func (bs bounds) schema() object {
	words := map[string]string{">": "exclusiveMinimum", ">=": "minimum", "<": "exclusiveMaximum", "<=": "maximum"}
	var all object
	for _, b := range bs {
		all = append(all, member{words[b.sign], b.limit})
	}
	return all
}

// example is the key's example as a program would hold it.
func (d Declared) example() any {
	root, _ := grow("example = " + d.Sample())
	return root.children["example"].plain()
}

// plain is what stands at a key as plain values: maps, lists and scalars.
func (n *node) plain() any {
	switch n.kind {
	case list, tables:
		values := []any{}
		for _, item := range n.items {
			values = append(values, item.plain())
		}
		return values
	case table:
		values := map[string]any{}
		for _, name := range n.names {
			values[name] = n.children[name].plain()
		}
		return values
	}
	return n.value
}

// definitionName is the name of a quantity's dimension, and of its sign where the range
// gives one, as a part of a reference.
func definitionName(d Declared) string {
	name := []byte([...]string{"", "not negative ", "positive "}[d.sign()] + d.Dimension.Name)
	for i, c := range name {
		if c == ' ' {
			name[i] = '_'
		}
	}
	return string(name)
}
