package document_test

import (
	"slices"
	"strings"
	"testing"

	"kilovet/hv/document"
	"kilovet/hv/document/faulttest"
	"kilovet/hv/quantity"
)

// bench is a description of its own, with every kind of leaf and table.
type bench struct {
	document.Table
	Name    document.Given[string] `key:"name" needed:"yes" means:"what it is" example:"bench one"`
	Shelves []shelf                `key:"shelf" means:"a shelf"`
	Supply  *supply                `key:"supply" means:"the supply"`
	Room    room                   `key:"room" means:"the room"`
}

type supply struct {
	document.Table
	Peak      document.Given[quantity.Voltage]     `key:"peak" range:"> 0 V, <= 1 MV" needed:"yes" means:"peak" example:"1.5 kV"`
	Frequency document.Given[quantity.Frequency]   `key:"frequency" range:"> 0 Hz" means:"frequency" example:"38 kHz"`
	Form      document.Given[string]               `key:"form" words:"sine | square" means:"wave-form" example:"sine"`
	Stages    document.Given[int]                  `key:"stages" range:">= 1, <= 60" means:"stages" example:"6"`
	Exponent  document.Given[float64]              `key:"exponent" range:"> 0, < 9" means:"exponent" example:"2.0"`
	Earthed   document.Given[bool]                 `key:"earthed" means:"whether it is earthed" example:"true"`
	Taps      document.Given[[]quantity.Voltage]   `key:"taps" range:">= 0 V" list:"2" means:"taps" example:"[\"1 V\", \"2 V\"]"`
	Steps     document.Given[[]quantity.Voltage]   `key:"steps" range:">= 0 V" list:"one or many" means:"steps" example:"1 V"`
	Nodes     document.Given[[]string]             `key:"nodes" list:"many" means:"nodes" example:"[\"output\"]"`
	Warmest   document.Given[quantity.Temperature] `key:"warmest" range:">= -40 degC, <= 90 degC" means:"temperature" example:"30 degC"`
	Leads     *leads                               `key:"leads" means:"leads"`
}

type leads struct {
	document.Table
	Length document.Given[quantity.Length] `key:"length" needed:"yes" means:"length" example:"1 m"`
	Ends   []end                           `key:"ends" needed:"yes" means:"ends"`
}

type end struct {
	document.Table
	Plug document.Given[string] `key:"plug" needed:"yes" means:"plug" example:"banana"`
}

type shelf struct {
	document.Table
	Load document.Given[quantity.Energy] `key:"load" means:"load" example:"1 J"`
	Ends []end                           `key:"ends" means:"ends"`
}

type room struct {
	document.Table
	Height document.Given[quantity.Length] `key:"height" range:"> 0 m" means:"height" example:"3 m"`
}

// faulty are documents whose comments say what is wrong with them.
var faulty = map[string]string{
	"sound": `
name = "x"
[[shelf]]
load = "3 J"
[[shelf]]
ends = [{ plug = "a" }, { plug = "b" }]
[supply]
peak = "1.5kV"
stages = 60
exponent = 2
earthed = false
taps = ["0 V", "1 V"]
steps = "1 V"
nodes = []
leads = { length = "1 m", ends = [{ plug = "c" }] }
`,
	"quantities": `name = "x"
[supply]
peak = 1750                    # FAULT 8 quantity: supply.peak: 1750: a number without a unit; write a voltage such as "1.5 kV" (units: V, kV, mV, uV, nV, MV)
frequency = "38 KHz"           # FAULT 13 quantity: "38 KHz": unknown unit "KHz"; upper and lower case matter: write "kHz"
taps = [0, "1,5 V"]            # FAULT 9 quantity: supply.taps: 0: a bare zero; write it with its unit, as in "0 V" # FAULT 12 quantity: "1,5 V": a decimal comma; write a decimal point, as in "1.5 kV"
warmest = "300 K/W"            # FAULT 11 quantity: unit "K/W" is a thermal resistance, not a temperature
steps = [nan, inf, "nan V"]    # FAULT 10 type: nan where a voltage is wanted # FAULT 15 type: inf where a voltage is wanted # FAULT 20 quantity: "nan V": not a finite number
exponent = nan                 # FAULT 12 quantity: supply.exponent: nan is not a finite number; write a number, as in 2.0
`,
	"ranges": `name = "x"
[supply]
peak = "-5 V"      # FAULT 8 range: supply.peak: "-5 V" is out of range; accepted: more than 0 V and at most 1 MV
stages = 61        # FAULT 10 range: supply.stages: 61 is out of range; accepted: at least 1 and at most 60
exponent = 9.0     # FAULT 12 range: accepted: more than 0 and less than 9
frequency = "0 Hz" # FAULT 13 range: accepted: more than 0 Hz
warmest = "400 K"  # FAULT 11 range: accepted: at least -40 degC and at most 90 degC
taps = ["1 V", "-1 V"] # FAULT 16 range: supply.taps: "-1 V" is out of range
`,
	"words": `name = "x"
[supply]
peak = "1 V"
form = "sin"       # FAULT 8 word: supply.form: "sin" is not an accepted word; was "sine" meant? accepted: sine, square
[[shelf]]
[[shelf]]
[supply.leads]
length = "1 m"
ends = [{ plug = "a" }]
`,
	"words far": `name = "x"
[supply]
peak = "1 V"
form = "Rectangular"  # FAULT 8 word: "Rectangular" is not an accepted word; accepted: sine, square
`,
	"types": `name = 5             # FAULT 8 type: name: the number 5 where text is wanted; write it in quotes, as in "bench one"
[supply]
peak = true          # FAULT 8 type: supply.peak: true where a voltage is wanted; write it in quotes, as in "1.5 kV"
stages = "6"         # FAULT 10 type: text "6" where a whole number is wanted; write a whole number without quotes, as in 6
exponent = "2"       # FAULT 12 type: text "2" where a number is wanted
earthed = "yes"      # FAULT 11 type: text "yes" where true or false is wanted; write true or false, without quotes
form = 3             # FAULT 8 type: the number 3 where text is wanted; in quotes; accepted: sine, square
nodes = [1]          # FAULT 10 type: supply.nodes: the number 1 where text is wanted
frequency = 2025-03-01 # FAULT 13 type: a date or time where a frequency is wanted
`,
	"whole numbers": `name = "x"
supply = { peak = "1 V", stages = 6.0 } # FAULT 35 type: supply.stages: the number 6.0 where a whole number is wanted
`,
	"texts": `name = "  "              # FAULT 8 text: name: an empty text; leave the key out, or write "bench one"
[supply]
peak = "1 V"
nodes = ["a\nb", ""]     # FAULT 10 text: a text with line breaks or other control characters # FAULT 18 text: an empty text
`,
	"lists": `name = ["x"]         # FAULT 8 form: name: a list where text is wanted
[supply]
peak = "1 V"
taps = ["1 V"]       # FAULT 8 length: a list of 1; exactly 2 values are wanted, as in ["1 V", "2 V"]
steps = []           # FAULT 9 length: an empty list; give at least one value, as in "1 V"
nodes = "output"     # FAULT 9 length: one value where a list is wanted; write a list, as in ["output"]
[supply.leads]
length = "1 m"
ends = []            # FAULT 8 length: supply.leads.ends: an empty list; give at least one
`,
	"forms": `name = "x"
supply = "230 V"     # FAULT 10 form: supply: text "230 V" where a table is wanted; write a table: supply = { … } or [supply]
shelf = [{ }, "b"]   # FAULT 15 form: shelf: text "b" where a table is wanted; write each in braces
room.height = { }    # FAULT 15 form: room.height: a table where a length is wanted
`,
	"one for several": `name = "x"
[shelf]              # FAULT 1 form: shelf: one table where there can be several; write [[shelf]]
load = "1"           # FAULT 8 quantity: shelf.load: "1": a number without a unit
[[supply]]           # FAULT 1 form: supply: there can be only one; write [supply] # FAULT 1 missing: supply.peak
[[supply]]           # FAULT 1 missing: supply.peak
`,
	"unknown": `name = "x"
Name = "y"           # FAULT 1 unknown: Name: there is no such key; upper and lower case matter: write "name"; accepted here: name, shelf, supply, room
peak = "1 V"         # FAULT 1 unknown: peak: there is no such key; it belongs elsewhere, as in "supply.peak"; accepted here
[suply]              # FAULT 1 unknown: suply: there is no such table; was "supply" meant? accepted here # FAULT 1 missing: supply.peak
anything = 1         # FAULT 1 unknown: supply.anything: there is no such key; accepted here: peak
[cellar]             # FAULT 1 unknown: cellar: there is no such table; accepted here
anything = 1
[[shelf]]
weight = 3           # FAULT 1 unknown: shelf.weight: there is no such key; accepted here: load, ends
`,
	"misspelt where needed": `nmae = "x"           # FAULT 1 unknown: nmae: there is no such key; was "name" meant?
[supply]
peek = "1 V"         # FAULT 1 unknown: supply.peek: there is no such key; was "peak" meant?
`,
	"missing": `# FAULT 1 missing: name: not given, and the description makes no sense without it; add name = "bench one" (what it is)
[supply]             # FAULT 1 missing: supply.peak: not given, and this table makes no sense without it; add peak = "1.5 kV" (peak)
leads = { ends = [{ plug = "a" }, { }] } # FAULT 9 missing: supply.leads.length # FAULT 35 missing: supply.leads.ends.plug
`,
	"twice": `name = "x"
name = "y"           # FAULT 1 twice: name: given a second time; keep one; the first is on line 1
[supply]
peak = "1 V"
stages = 0           # FAULT 10 range: out of range
[supply]             # FAULT 1 twice: supply: given a second time; keep one; the first is on line 3
peak = "2 V"         # FAULT 1 twice: supply.peak: given a second time; keep one; the first is on line 4
form = "round"       # FAULT 8 word: "round" is not
leads = { length = "1 m", length = "2 m" } # FAULT 27 twice: supply.leads.length: given a second time between the same braces
[supply.leads]
#^ already refused   # FAULT 1 twice: supply.leads: given a second time; keep one; the first is on line 9
`,
	"braces are closed": `name = "x"
room = { height = "3 m" }
room.height = "4 m"  # FAULT 1 twice: room.height: given a second time; keep one; the first is on line 2
`,
	"several and one": `name = "x"
[[shelf]]
[shelf]              # FAULT 1 form: shelf: one table among several of the same name; write [[shelf]]
load = 3             # FAULT 8 quantity: shelf.load: 3: a number without a unit
`,
	"syntax": `name = bench         # FAULT 8 syntax: name: bench stands without quotes; write "bench": texts and quantities stand in quotes
[supply]
peak = 1.75 kV       # FAULT 8 syntax: supply.peak: 1.75 kV stands without quotes; write "1.75 kV"
frequency = 38,5     # FAULT 13 syntax: supply.frequency: 38,5 stands without quotes
stages               # FAULT 1 syntax: neither a key with its value, a [table] nor a comment; write key = value
form =               # FAULT 1 syntax: supply.form: a key without a value; write its value after "="
= 5                  # FAULT 1 syntax: a value without a key
taps = ["1 V"        
#^ FAULT 8 syntax: the bracket "[" is not closed
steps = ["1 V", 2 V] # FAULT 17 syntax: 2 V stands without quotes
leads = { length = 1 m, ends = [] } # FAULT 20 syntax: 1 m stands without quotes
exponent = "2
#^ FAULT 12 syntax: supply.exponent: the quotes are not closed; close them on the same line
earthed = maybe      # FAULT 11 syntax: maybe stands without quotes
[room                # FAULT 1 syntax: room: this header cannot be read; write [table] or [[table]]
height = "3"         # FAULT 10 quantity: room.height: "3": a number without a unit
`,
	"tabs": "name = a\tb # FAULT 8 syntax: a b stands without quotes; write \"a b\"",
	"nesting": `name = "x"
shelf = [[[[[[[[[[[[[[[1]]]]]]]]]]]]]]] # FAULT 1 nesting: shelf: nested too deeply; at most 12 tables or lists within each other
`,
	"columns count characters": `name = "x"
[supply]
peak = "1 µV"   # µΩ are two bytes each
taps = ["1 µV", "2 µW"] # FAULT 17 quantity: supply.taps: "2 µW": unit "uW" is a power, not a voltage
`,
	"empty": "# FAULT 1 empty: the file holds no key; begin with a key",
}

func TestFaults(t *testing.T) {
	for name, text := range faulty {
		t.Run(name, func(t *testing.T) {
			faulttest.Check(t, text, document.Read([]byte(text), &bench{}))
		})
	}
}

func TestWindowsLineEnds(t *testing.T) {
	for name, text := range faulty {
		t.Run(name, func(t *testing.T) {
			windows := strings.ReplaceAll(text, "\n", "\r\n")
			faulttest.Check(t, text, document.Read([]byte("\ufeff"+windows), &bench{}))
		})
	}
}

func TestFilesThatAreNoText(t *testing.T) {
	for _, row := range []struct{ name, data, want string }{
		{"latin-1", "name = \"x\"\n# \xb5F", `line 2, column 3: byte 0xb5 is not UTF-8; save the file as UTF-8`},
		{"utf-16", "\xff\xfen\x00", `line 1, column 1: byte 0xff is not UTF-8; save the file as UTF-8`},
		{"zero bytes", "name = \"x\"\x00", `line 1, column 11: control character 0x00; remove it; save the file as plain text in UTF-8`},
		{"lone carriage return", "name = \"x\" # y\rz", `line 1, column 15: control character 0x0d; remove it; save the file as plain text in UTF-8`},
		{"too large", "name = \"x\" #" + strings.Repeat(" ", 1<<20), `line 1, column 1: the file has 1048588 bytes; a description has at most 1048576`},
		{"nothing", "", `line 1, column 1: the file holds no key; begin with a key, as in format = 1`},
	} {
		faults := document.Read([]byte(row.data), &bench{})
		if got := faults.Error(); got != row.want {
			t.Errorf("%s:\ngot  %s\nwant %s", row.name, got, row.want)
		}
	}
}

// TestEveryCodeIsRaised holds the list of codes against the documents of these tests.
func TestEveryCodeIsRaised(t *testing.T) {
	raised := map[document.Code]bool{}
	texts := []string{"\xff", strings.Repeat(" ", 1<<20+1)}
	for _, text := range faulty {
		texts = append(texts, text)
	}
	for _, text := range texts {
		for _, f := range document.Read([]byte(text), &bench{}) {
			raised[f.Code] = true
			if f.What == "" || f.Remedy == "" {
				t.Errorf("%v: no word of what is wrong or what to do", f)
			}
		}
	}
	for _, code := range document.Codes() {
		if !raised[code] {
			t.Errorf("no document raises %s", code)
		}
		delete(raised, code)
	}
	if len(raised) > 0 {
		t.Errorf("not in the list of codes: %v", raised)
	}
}

func TestFaultsAreAnErrorOnlyWhereThereAreSome(t *testing.T) {
	var none document.Faults
	if none.Err() != nil {
		t.Error("no faults make an error")
	}
	some := document.Read(nil, &bench{})
	if some.Err() == nil || !slices.Equal(some, some.Err().(document.Faults)) {
		t.Errorf("%v make no error", some)
	}
}
