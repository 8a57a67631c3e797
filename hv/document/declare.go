package document

import (
	"reflect"
	"slices"
	"strings"

	"kilovet/hv/quantity"
)

// What a declared key holds.
type Holds int

// The things a key can hold.
const (
	OneTable   Holds = iota // a table
	SomeTables              // any number of tables
	AQuantity               // text with a unit
	AText                   // text
	AWhole                  // a whole number
	ANumber                 // a pure number
	AYesNo                  // true or false
)

// Declared is one key as its field and tag declare it.
type Declared struct {
	Path  string // without indices: "spacing.creepage"
	Key   string // its last part
	Holds Holds
	// Dimension of a quantity; nil for everything else.
	Dimension *quantity.Dimension
	Range     string   // as declared: "> 0 V, <= 1 MV"
	Words     []string // accepted words; empty where any text is
	List      string   // "2", "one or many", "many"; empty for a single value
	Means     string
	Example   string // as it would stand in a file, without quotes
	Needed    bool

	index  int          // of the field
	field  reflect.Type // of the field
	kind   reflect.Type // of the struct that a table fills; nil for leaves
	value  reflect.Type // of what a leaf holds; nil for tables
	bounds bounds
	flaw   error // of the range tag
}

var (
	slotted = reflect.TypeFor[interface {
		slot() (reflect.Value, *Place)
	}]()
	dimensions = reflect.TypeFor[interface{ Dimension() *quantity.Dimension }]()
)

// declare reads the tags of one struct, in field order; fields without a key do
// not belong to the file.
func declare(t reflect.Type, path string) []Declared {
	var all []Declared
	for i := range t.NumField() {
		if f := t.Field(i); f.Tag.Get("key") != "" {
			all = append(all, declareField(f, i, path))
		}
	}
	return all
}

func declareField(f reflect.StructField, index int, path string) Declared {
	d := Declared{
		Key: f.Tag.Get("key"), Range: f.Tag.Get("range"), List: f.Tag.Get("list"), Means: f.Tag.Get("means"),
		Example: f.Tag.Get("example"), Needed: f.Tag.Get("needed") == "yes", index: index, field: f.Type,
	}
	d.Path = join(path, d.Key)
	if words := f.Tag.Get("words"); words != "" {
		d.Words = strings.Split(words, " | ")
	}
	if !reflect.PointerTo(f.Type).Implements(slotted) {
		d.Holds, d.kind = holdsTable(f.Type)
		return d
	}
	d.value = f.Type.Field(0).Type
	d.Holds, d.Dimension = holdsValue(d.value)
	d.bounds, d.flaw = parseBounds(d.Range, d.Dimension)
	return d
}

func holdsTable(t reflect.Type) (Holds, reflect.Type) {
	switch {
	case t.Kind() == reflect.Slice && t.Elem().Kind() == reflect.Struct:
		return SomeTables, t.Elem()
	case t.Kind() == reflect.Pointer && t.Elem().Kind() == reflect.Struct:
		return OneTable, t.Elem()
	case t.Kind() == reflect.Struct:
		return OneTable, t
	}
	panic("document: a keyed field is neither a leaf nor a table: " + t.String())
}

func holdsValue(t reflect.Type) (Holds, *quantity.Dimension) {
	if t.Kind() == reflect.Slice {
		t = t.Elem()
	}
	if t.Implements(dimensions) {
		return AQuantity, reflect.Zero(t).Interface().(interface{ Dimension() *quantity.Dimension }).Dimension()
	}
	switch t.Kind() {
	case reflect.String:
		return AText, nil
	case reflect.Int:
		return AWhole, nil
	case reflect.Float64:
		return ANumber, nil
	case reflect.Bool:
		return AYesNo, nil
	}
	panic("document: a leaf of a type that no key can hold: " + t.String())
}

func join(path, key string) string {
	if path == "" {
		return key
	}
	return path + "." + key
}

// Describe lists every key that a description read into the struct may hold, depth
// first in the order of the fields.
func Describe(into any) []Declared { return describe(structType(into), "") }

// DescribeTables is Describe of some of the tables of the file alone.
func DescribeTables(into any, tables ...string) []Declared {
	var all []Declared
	for _, d := range declare(structType(into), "") {
		if slices.Contains(tables, d.Key) {
			all = append(append(all, d), describe(d.kind, d.Path)...)
		}
	}
	return all
}

func describe(t reflect.Type, path string) []Declared {
	var all []Declared
	for _, d := range declare(t, path) {
		all = append(all, d)
		if d.kind != nil {
			all = append(all, describe(d.kind, d.Path)...)
		}
	}
	return all
}

func structType(into any) reflect.Type {
	t := reflect.TypeOf(into)
	for t != nil && t.Kind() == reflect.Pointer {
		t = t.Elem()
	}
	if t == nil || t.Kind() != reflect.Struct {
		panic("document: descriptions are read into structs")
	}
	return t
}

// Accepts says in words what the key takes.
func (d Declared) Accepts() string {
	switch {
	case len(d.Words) > 0:
		return "accepted: " + strings.Join(d.Words, ", ")
	case len(d.bounds) > 0:
		return "accepted: " + d.bounds.words()
	case d.Holds == AYesNo:
		return "accepted: true, false"
	}
	return ""
}

// Sample is the key's example as it stands in a file, with quotes where needed.
func (d Declared) Sample() string {
	quoted := d.Holds == AQuantity || d.Holds == AText
	if !quoted || strings.HasPrefix(d.Example, "[") {
		return d.Example
	}
	return quote(d.Example)
}

func quote(s string) string {
	return `"` + strings.NewReplacer(`\`, `\\`, `"`, `\"`).Replace(s) + `"`
}
