package document_test

import (
	"fmt"
	"slices"
	"strings"
	"testing"

	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// Of some tables the same is said as of all.
func TestDescribeTables(t *testing.T) {
	var want []string
	for _, d := range document.Describe(&bench{}) {
		if table, _, _ := strings.Cut(d.Path, "."); table == "supply" {
			want = append(want, d.Path)
		}
	}
	var got []string
	for _, d := range document.DescribeTables(&bench{}, "supply") {
		got = append(got, d.Path)
	}
	if len(want) == 0 || !slices.Equal(got, want) {
		t.Errorf("%q, not %q", got, want)
	}
}

func TestDescribeListsEveryKey(t *testing.T) {
	var got []string
	for _, d := range document.Describe(&bench{}) {
		line := d.Path
		if d.Dimension != nil {
			line += " " + d.Dimension.Name
		}
		if d.Needed {
			line += " needed"
		}
		got = append(got, strings.TrimSpace(line+" "+d.Accepts()))
	}
	want := []string{
		"name needed", "shelf", "shelf.load energy", "shelf.ends", "shelf.ends.plug needed",
		"supply", "supply.peak voltage needed accepted: more than 0 V and at most 1 MV", "supply.frequency frequency accepted: more than 0 Hz",
		"supply.form accepted: sine, square", "supply.stages accepted: at least 1 and at most 60", "supply.exponent accepted: more than 0 and less than 9",
		"supply.earthed accepted: true, false", "supply.taps voltage accepted: at least 0 V", "supply.steps voltage accepted: at least 0 V", "supply.nodes",
		"supply.warmest temperature accepted: at least -40 degC and at most 90 degC",
		"supply.leads", "supply.leads.length length needed", "supply.leads.ends needed", "supply.leads.ends.plug needed",
		"room", "room.height length accepted: more than 0 m",
	}
	if strings.Join(got, "\n") != strings.Join(want, "\n") {
		t.Errorf("got\n%s\nwant\n%s", strings.Join(got, "\n"), strings.Join(want, "\n"))
	}
}

func TestNoFlawsInSoundDeclarations(t *testing.T) {
	for _, flaw := range document.Flaws(&bench{}) {
		t.Error(flaw)
	}
}

func TestFlaws(t *testing.T) {
	type part struct {
		Length document.Given[quantity.Length] `key:"length" range:"> 1 V" means:"length" example:"1 m"`
	}
	type flawed struct {
		A document.Given[quantity.Voltage] `key:"Peak" range:"> 0 V" means:"peak" example:"0 V"`
		B document.Given[string]           `key:"word" words:"a | b | a" example:"c"`
		C document.Given[[]int]            `key:"list" means:"list" example:"[1]"`
		D document.Given[int]              `key:"list" list:"none" means:"list"`
		E document.Given[bool]             `key:"yes" range:"> 0" words:"yes" means:"yes" example:"yes"`
		F *part                            `key:"part" list:"2" means:"part"`
		G document.Given[float64]          `key:"number" range:"about 3" means:"number" example:"3"`
	}
	got := strings.Join(document.Flaws(&flawed{}), "\n")
	want := strings.Join([]string{
		`Peak: a key is of small letters, digits and underscores`, `Peak: example: "0 V" is out of range`,
		`word: no meaning`, `word: a word twice`, `word: example: "c" is not an accepted word`,
		`list: the field and the list tag disagree`, `list: example: a list where a whole number is wanted`,
		`list: no example`, `list: list "none"`, `list: the field and the list tag disagree`, `list: declared twice`,
		`yes: a range of what is no number`, `yes: words for what is no text`, `yes: example: yes stands without quotes`,
		`part: a table has no range, words or list`,
		`part.length: range "> 1 V": unit "V" is a voltage, not a length; write a length such as "60 mm" (units: mm, cm, m, um, nm, pm, km)`,
		`number: range "about 3": no comparison "about"`,
	}, "\n")
	if got != want {
		t.Errorf("got\n%s\nwant\n%s", got, want)
	}
}

func ExampleDescribe() {
	for _, d := range document.Describe(&bench{})[5:8] {
		fmt.Printf("%-16s %-8s e.g. %s (%s)\n", d.Path, d.Means, d.Sample(), d.Range)
	}
	// Output:
	// supply           the supply e.g.  ()
	// supply.peak      peak     e.g. "1.5 kV" (> 0 V, <= 1 MV)
	// supply.frequency frequency e.g. "38 kHz" (> 0 Hz)
}
