package document

import (
	"fmt"
	"reflect"
	"regexp"
	"slices"
	"strconv"
)

// Flaws lists what is wrong with the declarations of a struct, for the tests of the
// rooms that declare one: an example that the reader itself refuses, a range in a
// wrong unit, a key twice, a word or meaning missing.
func Flaws(into any) []string {
	var flaws []string
	seen := map[string]bool{}
	for _, d := range Describe(into) {
		for _, flaw := range d.flaws() {
			flaws = append(flaws, d.Path+": "+flaw)
		}
		if seen[d.Path] {
			flaws = append(flaws, d.Path+": declared twice")
		}
		seen[d.Path] = true
	}
	return flaws
}

var keyForm = regexp.MustCompile(`^[a-z][a-z0-9]*(_[a-z0-9]+)*$`)

func (d Declared) flaws() []string {
	var flaws []string
	add := func(wrong bool, format string, args ...any) {
		if wrong {
			flaws = append(flaws, fmt.Sprintf(format, args...))
		}
	}
	leaf := d.kind == nil
	add(!keyForm.MatchString(d.Key), "a key is of small letters, digits and underscores")
	add(d.Means == "", "no meaning")
	add(leaf && d.Example == "", "no example")
	add(d.flaw != nil, "%v", d.flaw)
	add(!leaf && (d.Range != "" || len(d.Words) > 0 || d.List != ""), "a table has no range, words or list")
	add(d.Range != "" && d.Holds != AQuantity && d.Holds != AWhole && d.Holds != ANumber, "a range of what is no number")
	add(len(d.Words) > 0 && d.Holds != AText, "words for what is no text")
	add(len(slices.Compact(slices.Sorted(slices.Values(d.Words)))) != len(d.Words), "a word twice")
	add(!slices.Contains([]string{"", "many", "one or many"}, d.List) && !isCount(d.List), "list %q", d.List)
	add(leaf && (d.slice() != (d.List != "")), "the field and the list tag disagree")
	if d.Example != "" && d.flaw == nil {
		flaws = append(flaws, d.refusals()...)
	}
	return flaws
}

func isCount(s string) bool { n, err := strconv.Atoi(s); return err == nil && n > 0 }

func (d Declared) slice() bool { return d.value != nil && d.value.Kind() == reflect.Slice }

// refusals reads the example as a file would give it.
func (d Declared) refusals() []string {
	root, faults := grow("example = " + d.Sample())
	b := &binder{faults: faults, known: map[reflect.Type][]Declared{}}
	if n := root.children["example"]; n != nil {
		b.field(n, d, reflect.New(d.field).Elem())
	}
	var flaws []string
	for _, f := range b.faults {
		flaws = append(flaws, "example: "+f.What)
	}
	return flaws
}
