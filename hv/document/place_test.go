package document_test

import (
	"testing"

	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

func sound(t *testing.T, text string) *bench {
	t.Helper()
	var b bench
	if faults := document.Read([]byte(text), &b); faults != nil {
		t.Fatal(faults)
	}
	return &b
}

const placed = `name = "µ"
  [[shelf]]
load = "3 J"
[[shelf]]
ends = [{ plug = "a" }, { plug = "b" },
  { plug = "c" }]

[supply]
peak = "1.5 kV"
`

func TestPlacesInsideLists(t *testing.T) {
	b := sound(t, placed)
	for _, row := range []struct{ got, want document.Place }{
		{b.Here(), document.Place{Key: "", Line: 1, Column: 1}},
		{b.Name.Place, document.Place{Key: "name", Line: 1, Column: 8}},
		{b.Shelves[0].Here(), document.Place{Key: "shelf", Line: 2, Column: 3}},
		{b.Shelves[0].Load.Place, document.Place{Key: "shelf.load", Line: 3, Column: 8}},
		{b.Shelves[1].Here(), document.Place{Key: "shelf", Line: 4, Column: 1}},
		{b.Shelves[1].Load.Place, document.Place{Key: "shelf.load"}},
		{b.Shelves[1].Ends[0].Here(), document.Place{Key: "shelf.ends", Line: 5, Column: 9}},
		{b.Shelves[1].Ends[1].Plug.Place, document.Place{Key: "shelf.ends.plug", Line: 5, Column: 34}},
		{b.Shelves[1].Ends[2].Here(), document.Place{Key: "shelf.ends", Line: 6, Column: 3}},
		{b.Supply.Here(), document.Place{Key: "supply", Line: 8, Column: 1}},
		{b.Supply.Peak.Place, document.Place{Key: "supply.peak", Line: 9, Column: 8}},
		{b.Supply.Form.Place, document.Place{Key: "supply.form"}},
		{b.Room.Here(), document.Place{Key: "room"}},
		{b.Room.Height.Place, document.Place{Key: "room.height"}},
	} {
		if row.got != row.want {
			t.Errorf("got %+v, want %+v", row.got, row.want)
		}
	}
}

func TestEveryWayToWriteATable(t *testing.T) {
	for _, text := range []string{
		"name = 'x'\n[supply]\npeak = '2 V'\n[supply.leads]\nlength = '1 m'\n[[supply.leads.ends]]\nplug = 'a'\n",
		"name = 'x'\nsupply.peak = '2 V'\nsupply.leads.length = '1 m'\nsupply.leads.ends = [{plug = 'a'}]\n",
		"name = 'x'\nsupply = { peak = '2 V', leads = { length = '1 m', ends = [ { plug = 'a' } ] } }\n",
		"name = 'x'\n[supply]\npeak = '2 V'\nleads.length = '1 m'\nleads.ends = [\n  { plug = 'a' }, # one\n]\n",
		"name = 'x'\n[supply.leads]\nlength = '1 m'\nends = [{plug = 'a'}]\n[supply]\npeak = '2 V'\n",
		"\"name\" = 'x'\n[ 'supply' ]\n\"pe\\u0061k\" = '2 V'\nleads = { length = '1 m', ends = [ { plug = 'a' } ] }\n",
	} {
		b := sound(t, text)
		if b.Supply.Peak.V != 2 || b.Supply.Leads.Length.V != 1 || len(b.Supply.Leads.Ends) != 1 || b.Supply.Leads.Ends[0].Plug.V != "a" {
			t.Errorf("%q: read %+v", text, b.Supply)
		}
	}
}

func TestAbsentIsNotZero(t *testing.T) {
	b := sound(t, "name = 'x'\n[supply]\npeak = '2 V'\nsteps = '0 V'\nearthed = false\n")
	s := b.Supply
	if !s.Steps.Set() || len(s.Steps.V) != 1 || !s.Earthed.Set() || s.Form.Set() || s.Stages.Set() {
		t.Errorf("read %+v", s)
	}
	if got := s.Stages.Or(4); got != 4 {
		t.Errorf("default: %d", got)
	}
	if got := s.Earthed.Or(true); got {
		t.Error("a given false counts as absent")
	}
	_, err := s.Frequency.Need()
	if l := lack.Of(err); l == nil || l.Kind != lack.Missing || l.Keys[0] != "supply.frequency" {
		t.Errorf("lack of a frequency: %v", err)
	}
	if v, err := s.Peak.Need(); err != nil || v != quantity.Voltage(2) {
		t.Errorf("peak: %v, %v", v, err)
	}
}

func TestRefusedListHoldsNothing(t *testing.T) {
	var b bench
	faults := document.Read([]byte("name = 'x'\n[supply]\npeak = '2 V'\ntaps = ['1 V', '2']\n"), &b)
	if len(faults) != 1 || b.Supply.Taps.V != nil || !b.Supply.Taps.Set() {
		t.Errorf("%v; read %+v", faults, b.Supply.Taps)
	}
}
