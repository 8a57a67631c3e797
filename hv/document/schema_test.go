package document_test

import (
	"bytes"
	"encoding/json"
	"os"
	"path/filepath"
	"reflect"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"

	"github.com/santhosh-tekuri/jsonschema/v6"
	"pgregory.net/rapid"

	"kilovet/hv/chain"
	"kilovet/hv/chance"
	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// structural are the faults that a schema can see: those of one key by itself, apart
// from ranges of quantities.
var structural = []document.Code{document.Unknown, document.Form, document.Type, document.Quantity, document.Word, document.Text, document.Length, document.Missing}

// schemaOf compiles the schema of a struct, with its own patterns.
func schemaOf(t testing.TB, into any) *jsonschema.Schema {
	t.Helper()
	var out bytes.Buffer
	if err := document.Schema(&out, into, document.SchemaHead{ID: "urn:test", Title: "test", Means: "a test"}); err != nil {
		t.Fatal(err)
	}
	schema, err := jsonschema.UnmarshalJSON(&out)
	if err != nil {
		t.Fatal(err)
	}
	compiler := jsonschema.NewCompiler()
	compiler.AssertFormat()
	if err := compiler.AddResource("urn:test", schema); err != nil {
		t.Fatal(err)
	}
	compiled, err := compiler.Compile("urn:test")
	if err != nil {
		t.Fatal(err)
	}
	return compiled
}

// asJSON is a TOML text as a program that writes JSON would give it.
func asJSON(t testing.TB, text string) any {
	t.Helper()
	values, read := document.Plain(text)
	data, err := json.Marshal(values)
	if err != nil || !read {
		t.Fatalf("%q: %v", text, err)
	}
	back, err := jsonschema.UnmarshalJSON(bytes.NewReader(data))
	if err != nil {
		t.Fatal(err)
	}
	return back
}

func TestSchemaTakesEveryChain(t *testing.T) {
	schema := schemaOf(t, &chain.Chain{})
	files, err := filepath.Glob("../../testdata/chains/*.toml")
	if err != nil || len(files) < 5 {
		t.Fatalf("%v: %v", files, err)
	}
	for _, file := range files {
		data, err := os.ReadFile(file)
		if err != nil {
			t.Fatal(err)
		}
		if err := schema.Validate(asJSON(t, string(data))); err != nil {
			t.Errorf("%s: %v", file, err)
		}
	}
}

func TestSchemaTakesTheDraft(t *testing.T) {
	var draft bytes.Buffer
	if err := chain.Draft(&draft); err != nil {
		t.Fatal(err)
	}
	if err := schemaOf(t, &chain.Chain{}).Validate(asJSON(t, draft.String())); err != nil {
		t.Error(err)
	}
}

// keys are all keys of a description by the table they stand in.
type keys map[string][]document.Declared

func keysOf(into any) keys {
	by := keys{}
	for _, d := range document.Describe(into) {
		table := strings.TrimSuffix(strings.TrimSuffix(d.Path, d.Key), ".")
		by[table] = append(by[table], d)
	}
	return by
}

// needed writes the needed keys of a table, but one, with their examples.
func (k keys) needed(table, but string) []string {
	var all []string
	for _, d := range k[table] {
		switch {
		case !d.Needed || d.Key == but:
		case d.Example == "":
			all = append(all, d.Key+" = "+k.braced(d, k.needed(d.Path, "")))
		default:
			all = append(all, d.Key+" = "+d.Sample())
		}
	}
	return all
}

// braced writes a table in line, as a list of one where there can be several.
func (k keys) braced(d document.Declared, inner []string) string {
	text := "{ " + strings.Join(inner, ", ") + " }"
	if d.Holds == document.SomeTables {
		return "[" + text + "]"
	}
	return text
}

// with is a description that holds one value at a path, and what is needed beside it.
func (k keys) with(path, value string) string {
	for i := strings.LastIndexByte(path, '.'); i >= 0; i = strings.LastIndexByte(path, '.') {
		table, key := path[:i], path[i+1:]
		value = k.braced(k.find(table), append(k.needed(table, key), key+" = "+value))
		path = table
	}
	return strings.Join(append(k.needed("", path), path+" = "+value), "\n") + "\n"
}

func (k keys) find(path string) document.Declared {
	for _, d := range k[path[:max(strings.LastIndexByte(path, '.'), 0)]] {
		if d.Path == path {
			return d
		}
	}
	panic("no key " + path)
}

// Every key of every table is tried with its example and with values of other kinds:
// the schema refuses exactly what the reader refuses by the key's own form.
func TestSchemaRefusesWhatTheReaderRefuses(t *testing.T) {
	schema, by := schemaOf(t, &chain.Chain{}), keysOf(&chain.Chain{})
	refused, taken := 0, 0
	for _, d := range document.Describe(&chain.Chain{}) {
		values := []string{`"furlong"`, `"1 kV"`, `"2 mm"`, `" "`, "7", "1.5", "true", "[]", `["a", "b", "c"]`, "{}", "[{}]", `["1 m", "2 m"]`}
		if d.Example != "" {
			values = append(values, d.Sample(), "["+d.Sample()+"]")
		}
		for _, value := range values {
			if judge(t, schema, by.with(d.Path, value)) {
				refused++
			} else {
				taken++
			}
		}
	}
	if refused < 1000 || taken < 500 {
		t.Errorf("%d refused and %d taken: too few to tell", refused, taken)
	}
}

// judge fails where reader and schema disagree about the form of a description; it
// reports whether they refuse it.
func judge(t testing.TB, schema *jsonschema.Schema, text string) bool {
	t.Helper()
	faults := document.Read([]byte(text), &chain.Chain{})
	has := func(codes ...document.Code) bool {
		return slices.ContainsFunc(faults, func(f document.Fault) bool { return slices.Contains(codes, f.Code) })
	}
	err := schema.Validate(asJSON(t, text))
	if has(structural...) && err == nil || err != nil && !has(structural...) && !has(document.Range) {
		t.Errorf("%s\nreader: %v\nschema: %v", text, faults, err)
	}
	return err != nil
}

// An unknown key is refused in every table.
func TestSchemaRefusesUnknownKeys(t *testing.T) {
	schema, by := schemaOf(t, &chain.Chain{}), keysOf(&chain.Chain{})
	for table := range by {
		path := strings.TrimPrefix(table+".furlong", ".")
		if !judge(t, schema, by.with(path, "1")) {
			t.Errorf("%s is taken", path)
		}
	}
}

func TestSchemaKnowsRangesOfPureNumbers(t *testing.T) {
	schema := schemaOf(t, &bench{})
	for text, fine := range map[string]bool{
		"stages = 1": true, "stages = 60": true, "stages = 0": false, "stages = 61": false, "stages = 1.5": false,
		"exponent = 0.1": true, "exponent = 0": false, "exponent = 9": false, "exponent = 8": true,
	} {
		err := schema.Validate(asJSON(t, "name = 'x'\n[supply]\npeak = '1 V'\n"+text+"\n"))
		if (err == nil) != fine {
			t.Errorf("%s: %v", text, err)
		}
	}
}

// The sign of a quantity is a part of its pattern: the schema refuses what is less than
// nothing, and nothing, exactly where the reader does. Temperatures have no sign.
func TestSchemaKnowsTheSignsOfQuantities(t *testing.T) {
	schema, by := schemaOf(t, &chain.Chain{}), keysOf(&chain.Chain{})
	refused := map[string]int{}
	for _, d := range document.Describe(&chain.Chain{}) {
		if d.Holds != document.AQuantity || d.List != "" || d.Dimension.Name == "temperature" {
			continue
		}
		for _, number := range []string{"-1e-20", "0", "-0.0", "\u2212.0", "+00.0e5", "-.01e-18"} {
			text := by.with(d.Path, strconv.Quote(number+" "+d.Dimension.Units()[0]))
			faults := document.Read([]byte(text), &chain.Chain{})
			got, want := judge(t, schema, text), slices.ContainsFunc(faults, func(f document.Fault) bool { return f.Code == document.Range })
			if got != want {
				t.Errorf("%s = %s: reader %v, schema refuses %t", d.Path, number, faults, got)
			}
			if got {
				refused[number]++
			}
		}
	}
	if refused["-1e-20"] < 100 || refused["0"] < 80 || refused["0"] >= refused["-1e-20"] {
		t.Errorf("refused: %v", refused)
	}
}

// A needed key makes its table useless without it, so in the sound description above
// each may be left out but the needed ones.
func TestSchemaAsksForWhatIsNeeded(t *testing.T) {
	schema := schemaOf(t, &bench{})
	sound := asJSON(t, faulty["sound"])
	if err := schema.Validate(sound); err != nil {
		t.Fatal(err)
	}
	for _, key := range []string{"name", "shelf", "supply"} {
		whole, _ := document.Plain(faulty["sound"])
		delete(whole.(map[string]any), key)
		data, _ := json.Marshal(whole)
		back, _ := jsonschema.UnmarshalJSON(bytes.NewReader(data))
		if err := schema.Validate(back); (err == nil) != (key != "name") {
			t.Errorf("without %s: %v", key, err)
		}
	}
}

// dimensions are those of the description.
func dimensions() []*quantity.Dimension {
	var all []*quantity.Dimension
	for _, d := range document.Describe(&chain.Chain{}) {
		if d.Dimension != nil && !slices.Contains(all, d.Dimension) {
			all = append(all, d.Dimension)
		}
	}
	return all
}

// The pattern takes what the parser takes, but for numbers beyond computing with and
// temperatures below absolute zero.
func TestPatternAgreesWithTheParser(t *testing.T) {
	all := dimensions()
	patterns := map[*quantity.Dimension]*regexp.Regexp{}
	var units []string
	for _, d := range all {
		patterns[d] = regexp.MustCompile(document.UnitPattern(d))
		units = append(units, d.Units()...)
	}
	units = append(units, "µm", "μA", "MΩ", "k\u2126", "mm²", "kg/m³", "ohm\u00a0m", "v", "")
	numbers := []string{"1", "0", "12.", ".5", "7.25", "e3", "E-2", "e", "-", "+", "\u2212", ",", "_", "nan", "inf", ""}
	gaps := []string{"", " ", "  ", "\t", "\n", "\u00a0", "\u2009", "\u0085", "x"}
	chance.Check(t, func(t *rapid.T) {
		some := func(of []string, least, most int) string {
			return strings.Join(rapid.SliceOfN(rapid.SampledFrom(of), least, most).Draw(t, "pieces"), "")
		}
		d := rapid.SampledFrom(all).Draw(t, "dimension")
		text := some(gaps, 0, 1) + some(numbers, 1, 3) + some(gaps, 0, 1) + some(append(units, slices.Repeat(d.Units(), 10)...), 1, 1) + some(gaps, 0, 1)
		_, err := d.Parse(text)
		refused := err != nil && !strings.Contains(err.Error(), "to compute with") && !strings.Contains(err.Error(), "absolute zero")
		if matched := patterns[d].MatchString(text); matched == refused {
			t.Errorf("%s %q: pattern %t, parser %v", d.Name, text, matched, err)
		}
	})
}

func TestPatternTakesEveryUnit(t *testing.T) {
	for _, d := range dimensions() {
		pattern := regexp.MustCompile(document.UnitPattern(d))
		for _, u := range d.Units() {
			for text, fine := range map[string]bool{"1.5 " + u: true, " -2e-3 " + u + " ": true, "1.5 " + u + "x": false, u: false, "1,5 " + u: false} {
				if pattern.MatchString(text) != fine {
					t.Errorf("%s: %q: want %t", d.Name, text, fine)
				}
			}
		}
		if pattern.MatchString("15") || pattern.MatchString("0.51") {
			t.Errorf("%s: a number without a unit passes", d.Name)
		}
	}
}

func TestSchemaRepeats(t *testing.T) {
	var one, two bytes.Buffer
	for _, out := range []*bytes.Buffer{&one, &two} {
		if err := document.Schema(out, &chain.Chain{}, document.SchemaHead{}); err != nil {
			t.Fatal(err)
		}
	}
	if one.String() != two.String() {
		t.Error("two schemas of one declaration differ")
	}
}

// Every key's description says what it means and every example is one that the
// schema itself takes, as the reader does.
func TestSchemaDescribesEveryKey(t *testing.T) {
	var out bytes.Buffer
	if err := document.Schema(&out, &chain.Chain{}, document.SchemaHead{}); err != nil {
		t.Fatal(err)
	}
	var schema struct {
		Properties  map[string]described
		Definitions map[string]struct{ Properties map[string]described } `json:"$defs"`
	}
	if err := json.Unmarshal(out.Bytes(), &schema); err != nil {
		t.Fatal(err)
	}
	means := map[string]bool{}
	for _, d := range document.Describe(&chain.Chain{}) {
		means[d.Means] = true
	}
	found := len(schema.Properties)
	for name, key := range schema.Properties {
		check(t, means, name, key)
	}
	for table, def := range schema.Definitions {
		found += len(def.Properties)
		for name, key := range def.Properties {
			check(t, means, table+"."+name, key)
		}
	}
	if found < reflect.TypeFor[chain.Chain]().NumField() {
		t.Errorf("only %d keys found", found)
	}
}

type described struct{ Description string }

func check(t *testing.T, means map[string]bool, name string, key described) {
	t.Helper()
	for m := range means {
		if strings.HasPrefix(key.Description, m) {
			return
		}
	}
	t.Errorf("%s: description %q", name, key.Description)
}
