package document

import (
	"errors"
	"fmt"
	"math"
	"reflect"
	"slices"
	"strconv"
	"strings"
	"time"
	"unicode"
	"unicode/utf8"

	"kilovet/hv/quantity"
)

// longestText is the most characters that a text of a description can have.
const longestText = 500

// leaf fills one Given from what stands at its key.
func (b *binder) leaf(n *node, d Declared, into reflect.Value) {
	value, place := into.Addr().Interface().(interface {
		slot() (reflect.Value, *Place)
	}).slot()
	place.Key = d.Path
	if n == nil {
		return
	}
	place.Line, place.Column = n.place.Line, n.place.Column
	switch {
	case n.kind == illegible: // said already
	case n.kind == table || n.kind == tables:
		b.fault(Form, n.place, d.Path, "a table where "+d.wanted()+" is wanted", d.remedy())
	case d.List != "":
		b.list(n, d, value)
	default:
		b.single(n, d, value)
	}
}

// list fills a slice; "one or many" takes a single value as a list of one.
func (b *binder) list(n *node, d Declared, value reflect.Value) {
	items, before := n.items, len(b.faults)
	if n.kind != list {
		if d.List != "one or many" {
			b.fault(Length, n.place, d.Path, "one value where a list is wanted", "write a list, as in "+d.inList())
			return
		}
		items = []*node{n}
	}
	if want, err := strconv.Atoi(d.List); err == nil && len(items) != want {
		b.fault(Length, n.place, d.Path, fmt.Sprintf("a list of %d", len(items)), fmt.Sprintf("exactly %d values are wanted, as in %s", want, d.inList()))
	}
	if d.List == "one or many" && len(items) == 0 {
		b.fault(Length, n.place, d.Path, "an empty list", "give at least one value, as in "+d.Sample())
	}
	values := reflect.MakeSlice(value.Type(), len(items), len(items))
	for i, item := range items {
		b.single(item, d, values.Index(i))
	}
	if len(b.faults) == before { // of a list, all or nothing is usable
		value.Set(values)
	}
}

func (d Declared) inList() string {
	if sample := d.Sample(); !strings.HasPrefix(sample, "[") {
		return "[" + sample + "]"
	}
	return d.Sample()
}

// single fills one value and judges it.
func (b *binder) single(n *node, d Declared, value reflect.Value) {
	if n.kind != scalar {
		b.fault(Form, n.place, d.Path, describeNode(n)+" where "+d.wanted()+" is wanted", d.remedy())
		return
	}
	switch d.Holds {
	case AQuantity:
		b.quantity(n, d, value)
	case AText:
		b.text(n, d, value)
	case AWhole:
		b.whole(n, d, value)
	case ANumber:
		b.number(n, d, value)
	case AYesNo:
		v, ok := n.value.(bool)
		if !ok {
			b.wrongType(n, d)
			return
		}
		value.SetBool(v)
	}
}

func (b *binder) quantity(n *node, d Declared, value reflect.Value) {
	text, ok := n.value.(string)
	if !ok {
		b.notText(n, d)
		return
	}
	v, err := d.Dimension.Parse(text)
	if err != nil {
		what, remedy := refusal(err)
		b.fault(Quantity, n.place, d.Path, n.shown()+": "+what, remedy)
		return
	}
	if b.within(n, d, v) {
		value.SetFloat(v)
	}
}

// notText answers a bare number, and whatever else stands where a quantity is wanted.
func (b *binder) notText(n *node, d Declared) {
	var bare bool
	switch v := n.value.(type) {
	case int64:
		bare = true
	case float64:
		bare = !math.IsNaN(v) && !math.IsInf(v, 0)
	}
	if !bare {
		b.wrongType(n, d)
		return
	}
	_, err := d.Dimension.Parse(fmt.Sprint(n.value)) // refused for want of a unit
	what, remedy := refusal(err)
	b.fault(Quantity, n.place, d.Path, n.shown()+": "+what, remedy)
}

// refusal takes the refusal of a quantity apart.
func refusal(err error) (what, remedy string) {
	var r *quantity.Refusal
	if errors.As(err, &r) {
		return r.What, r.Remedy
	}
	return "not a quantity", ""
}

func (b *binder) text(n *node, d Declared, value reflect.Value) {
	v, ok := n.value.(string)
	switch length := utf8.RuneCountInString(v); {
	case !ok:
		b.wrongType(n, d)
	case len(d.Words) > 0 && !slices.Contains(d.Words, v):
		b.word(n, d, v)
	case strings.TrimSpace(v) == "":
		b.fault(Text, n.place, d.Path, "an empty text", "leave the key out, or write "+d.Sample())
	case length > longestText:
		b.fault(Text, n.place, d.Path, fmt.Sprintf("a text of %d characters", length), fmt.Sprintf("at most %d", longestText))
	case strings.ContainsFunc(v, unicode.IsControl):
		b.fault(Text, n.place, d.Path, "a text with line breaks or other control characters", "write it on one line")
	default:
		value.SetString(v)
	}
}

func (b *binder) word(n *node, d Declared, v string) {
	remedy := d.Accepts()
	if near, ok := Nearest(v, d.Words); ok {
		remedy = fmt.Sprintf("was %q meant? %s", near, remedy)
	}
	b.fault(Word, n.place, d.Path, n.shown()+" is not an accepted word", remedy)
}

func (b *binder) whole(n *node, d Declared, value reflect.Value) {
	v, ok := n.value.(int64)
	if !ok {
		b.wrongType(n, d)
		return
	}
	if b.within(n, d, float64(v)) {
		value.SetInt(v)
	}
}

func (b *binder) number(n *node, d Declared, value reflect.Value) {
	var v float64
	switch x := n.value.(type) {
	case int64:
		v = float64(x)
	case float64:
		v = x
	default:
		b.wrongType(n, d)
		return
	}
	if math.IsNaN(v) || math.IsInf(v, 0) {
		b.fault(Quantity, n.place, d.Path, n.shown()+" is not a finite number", "write a number, as in "+d.Sample())
		return
	}
	if b.within(n, d, v) {
		value.SetFloat(v)
	}
}

// within reports whether a number lies in the declared range, and the fault where not.
func (b *binder) within(n *node, d Declared, v float64) bool {
	inside := d.bounds.holds(v)
	if !inside {
		b.fault(Range, n.place, d.Path, n.shown()+" is out of range", d.Accepts())
	}
	return inside
}

func (b *binder) wrongType(n *node, d Declared) {
	b.fault(Type, n.place, d.Path, describeNode(n)+" where "+d.wanted()+" is wanted", d.remedy())
}

// wanted names what the key takes.
func (d Declared) wanted() string {
	switch d.Holds {
	case AQuantity:
		return d.Dimension.Noun()
	case AText:
		return "text"
	case AWhole:
		return "a whole number"
	case ANumber:
		return "a number"
	case AYesNo:
		return "true or false"
	}
	return "a table"
}

func (d Declared) remedy() string {
	switch {
	case d.Holds == AYesNo:
		return "write true or false, without quotes"
	case d.Holds == AWhole || d.Holds == ANumber:
		return "write " + d.wanted() + " without quotes, as in " + d.Sample()
	case len(d.Words) > 0:
		return "in quotes; " + d.Accepts()
	}
	return "write it in quotes, as in " + d.Sample()
}

// describeNode names what stands in the file.
func describeNode(n *node) string {
	switch n.kind {
	case list:
		return "a list"
	case table, tables:
		return "a table"
	}
	switch v := n.value.(type) {
	case string:
		return "text " + n.shown()
	case time.Time:
		return "a date or time"
	case int64:
		return "the number " + n.shown()
	case float64:
		if !math.IsNaN(v) && !math.IsInf(v, 0) {
			return "the number " + n.shown()
		}
	}
	return n.shown()
}

// shown is a value as a message repeats it, on one line.
func (n *node) shown() string {
	if text, ok := n.value.(string); ok {
		return strconv.Quote(brief(text))
	}
	return brief(n.raw)
}
