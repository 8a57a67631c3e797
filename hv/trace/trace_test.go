package trace

import (
	"bytes"
	"errors"
	"fmt"
	"math"
	"strings"
	"testing"

	"kilovet/hv/quantity"
)

// sine is a record of a sine of 1 V amplitude and 1 kHz over 4 ms, in the units given.
func sine(header, separator string, seconds, volts float64) string {
	var b strings.Builder
	b.WriteString(header)
	for i := range 400 {
		t := float64(i) * 1e-5
		fmt.Fprintf(&b, "%.9g%s%.12g\n", t/seconds, separator, math.Sin(2*math.Pi*1e3*t)/volts)
	}
	return b.String()
}

func lines(n int) *int { return &n }

func TestRecordsOfManyKinds(t *testing.T) {
	for what, c := range map[string]struct {
		text string
		o    Options
	}{
		"bare":                {sine("", ",", 1, 1), Options{}},
		"headed":              {sine("Time,Channel 1\n", ",", 1, 1), Options{}},
		"units headed":        {sine("Time (us),Ch 1 (mV)\n", ",", 1e-6, 1e-3), Options{}},
		"units in brackets":   {sine("made by\n\"t [ms]\",u [kV]\n", ",", 1e-3, 1e3), Options{}},
		"a line of units":     {sine("x,1\ns,mV\n", ",", 1, 1e-3), Options{}},
		"semicolons":          {sine("t;u\n", ";", 1, 1), Options{}},
		"tabs":                {sine("", "\t", 1, 1), Options{}},
		"probe":               {sine("", ",", 1, 1000), Options{Factor: 1000}},
		"units told":          {sine("Time (s),Ch (V)\n", ",", 1e-9, 1e-6), Options{TimeUnit: "ns", VoltageUnit: "uV"}},
		"header counted":      {sine("1,2\n3,4\n", ",", 1, 1), Options{HeaderLines: lines(2)}},
		"with byte-order":     {"\ufeff" + sine("Time,V\n", ",", 1, 1), Options{}},
		"carriage returns":    {strings.ReplaceAll(sine("a,b\n", ",", 1, 1), "\n", "\r\n"), Options{}},
		"a third column":      {strings.ReplaceAll(sine("", ",", 1, 1), "\n", ",7\n"), Options{}},
		"blank lines between": {strings.ReplaceAll(sine("", ",", 1, 1), "\n", "\n\n"), Options{}},
	} {
		got, err := Parse([]byte(c.text), c.o)
		if err != nil {
			t.Errorf("%s: %v", what, err)
			continue
		}
		if math.Abs(float64(got.PeakToPeak())-2) > 1e-9 || math.Abs(float64(got.Duration())-4e-3) > 1e-12 || len(got.Times) != 400 {
			t.Errorf("%s: %v V over %v s in %d samples", what, got.PeakToPeak(), got.Duration(), len(got.Times))
		}
	}
}

func TestDamagedRecords(t *testing.T) {
	whole := sine("Time,V\n", ",", 1, 1)
	rows := strings.Split(whole, "\n")
	with := func(line int, text string) string {
		r := append([]string(nil), rows...)
		r[line-1] = text
		return strings.Join(r, "\n")
	}
	for what, c := range map[string]struct {
		text string
		line int
		says string
	}{
		"empty":            {"", 1, "0 samples"},
		"header alone":     {"Time,V\n", 1, "0 samples"},
		"short":            {strings.Join(rows[:8], "\n"), 8, "7 samples"},
		"no voltage":       {with(30, "0.00028"), 30, "no voltage"},
		"words":            {with(30, "0.00028,overflow"), 30, `"overflow" is no voltage`},
		"not a number":     {with(30, "0.00028,NaN"), 30, "no finite voltage"},
		"infinite":         {with(30, "0.00028,-Inf"), 30, "no finite voltage"},
		"time back":        {with(30, "0.00001,1"), 30, "does not rise"},
		"time twice":       {with(30, rows[28]), 30, "does not rise"},
		"a second header":  {with(30, "Time,V"), 30, `"Time" is no time`},
		"too much":         {with(30, "0.00028,1e12"), 30, "beyond any record"},
		"not text":         {"\xff\xfe\x00", 1, "not a text file"},
		"zeros":            {"a\x00b", 1, "not a text file"},
		"an unknown unit":  {sine("Time (min),V\n", ",", 1, 1), 2, "unit min"},
		"decimal comma":    {strings.ReplaceAll(sine("", ";", 1, 1), ".", ","), 400, "0 samples"},
		"cut in the midst": {whole[:len(whole)-25] + "e", 401, "no time"},
	} {
		got, err := Parse([]byte(c.text), Options{})
		var f *Fault
		if !errors.As(err, &f) {
			if c.says != "" {
				t.Errorf("%s: read as %d samples, %v", what, len(got.Times), err)
			}
			continue
		}
		if f.Line != c.line && what != "decimal comma" || !strings.Contains(f.Error(), c.says) {
			t.Errorf("%s: %v", what, err)
		}
	}
}

// Uneven times are drawn out straight; a ramp stays a ramp.
func TestEvenTimes(t *testing.T) {
	r := &Trace{}
	for i := range 100 {
		at := quantity.Time(i) + 0.3*quantity.Time(math.Sin(float64(i)))
		r.Times, r.Voltages = append(r.Times, at), append(r.Voltages, quantity.Voltage(2*at))
	}
	even, interval := r.Even(50)
	if len(even) != 50 {
		t.Fatalf("%d samples", len(even))
	}
	for i, v := range even {
		if want := 2 * (float64(r.Times[0]) + float64(i)*float64(interval)); math.Abs(float64(v)-want) > 1e-9 {
			t.Errorf("at %d: %v, want %v", i, v, want)
		}
	}
}

// go test -fuzz FuzzParse ./hv/trace
func FuzzParse(f *testing.F) {
	f.Add([]byte(sine("Time (us),Ch (mV)\n", ",", 1e-6, 1e-3)))
	f.Add([]byte(sine("t;u\n", ";", 1, 1)))
	f.Add([]byte("Time,V\n0,1\n\"1,2"))
	f.Add([]byte("\ufeff\t\n"))
	f.Fuzz(func(t *testing.T, data []byte) {
		got, err := Parse(data, Options{})
		if err != nil {
			var fault *Fault
			if !errors.As(err, &fault) || fault.Line < 1 || fault.What == "" || fault.Line > bytes.Count(data, []byte("\n"))+bytes.Count(data, []byte("\r"))+1 {
				t.Fatalf("an error without its line: %v", err)
			}
			return
		}
		even, interval := got.Even(64)
		if !(interval > 0) {
			t.Fatalf("interval %v", interval)
		}
		low, high := math.Inf(1), math.Inf(-1)
		for _, v := range got.Voltages {
			low, high = math.Min(low, float64(v)), math.Max(high, float64(v))
		}
		slack := 1e-9 * math.Max(math.Abs(low), math.Abs(high))
		for _, v := range even {
			if !(float64(v) >= low-slack && float64(v) <= high+slack) {
				t.Fatalf("resampled to %v, outside %v to %v", v, low, high)
			}
		}
	})
}
