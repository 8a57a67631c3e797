package trace

import (
	"bytes"
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"math"
	"strconv"
	"strings"
	"unicode/utf8"

	"kilovet/hv/quantity"
)

// Fewest and Most are how many samples a record may have.
const (
	Fewest = 16
	Most   = 4 << 20
)

// Parse reads a record: lines of a time and a voltage, separated by commas, semicolons
// or tabs, further columns left aside; before them a header. What it cannot read is a
// *Fault with its line.
func Parse(data []byte, o Options) (*Trace, error) {
	data = bytes.TrimPrefix(data, []byte("\ufeff"))
	if !utf8.Valid(data) || bytes.IndexByte(data, 0) >= 0 {
		return nil, &Fault{1, "this is not a text file", "export the record as comma-separated text"}
	}
	p := parser{Options: o, reader: csv.NewReader(bytes.NewReader(data))}
	p.reader.Comma, p.reader.FieldsPerRecord, p.reader.LazyQuotes = separator(data), -1, true
	p.reader.ReuseRecord, p.reader.TrimLeadingSpace = true, true
	if p.Factor == 0 {
		p.Factor = 1
	}
	for {
		fields, err := p.reader.Read()
		if err == io.EOF {
			return p.finish()
		}
		if err != nil {
			return nil, unreadable(err)
		}
		line, _ := p.reader.FieldPos(0)
		if err := p.line(line, fields); err != nil {
			return nil, err
		}
	}
}

func unreadable(err error) error {
	var at *csv.ParseError
	if errors.As(err, &at) {
		return &Fault{at.Line, "cannot be read: " + at.Err.Error(), "export the record again"}
	}
	return &Fault{1, "cannot be read: " + err.Error(), ""}
}

// separator is the one of comma, semicolon and tab that the last whole line has most of.
func separator(data []byte) rune {
	text := strings.TrimRight(string(data[max(0, len(data)-4096):]), "\r\n \t")
	last := text[strings.LastIndexByte(text, '\n')+1:]
	best, most := ',', 0
	for _, s := range ",;\t" {
		if n := strings.Count(last, string(s)); n > most {
			best, most = s, n
		}
	}
	return best
}

// parser gathers a record line by line.
type parser struct {
	Options
	reader *csv.Reader
	trace  Trace
	last   int // line of the last sample
	// What a volt and a second of the record are in SI units.
	volt, second float64
	header       []string
}

// line takes one line: header, or a sample.
func (p *parser) line(line int, fields []string) error {
	if p.headed(line, fields) {
		p.header = append(p.header, strings.Join(fields, "\x00"))
		return nil
	}
	if len(p.trace.Times) == 0 {
		if err := p.units(line); err != nil {
			return err
		}
	}
	t, err := p.number(line, fields, 0, "time")
	if err != nil {
		return err
	}
	v, err := p.number(line, fields, 1, "voltage")
	if err != nil {
		return err
	}
	p.last = line
	return p.sample(line, quantity.Time(t*p.second), quantity.Voltage(v*p.volt*p.Factor))
}

// headed reports whether a line belongs to the header.
func (p *parser) headed(line int, fields []string) bool {
	if p.HeaderLines != nil {
		return line <= *p.HeaderLines
	}
	return len(p.trace.Times) == 0 && (len(fields) < 2 || !numeric(fields[0]) || !numeric(fields[1]))
}

func numeric(field string) bool {
	_, err := strconv.ParseFloat(strings.TrimSpace(field), 64)
	return err == nil
}

func (p *parser) number(line int, fields []string, i int, what string) (float64, error) {
	if i >= len(fields) {
		return 0, &Fault{line, "there is no " + what, "every line has a time and a voltage"}
	}
	field := strings.TrimSpace(fields[i])
	v, err := strconv.ParseFloat(field, 64)
	switch {
	case err != nil && strings.Contains(field, ","):
		return 0, &Fault{line, fmt.Sprintf("%.40q is no %s", field, what), "write numbers with a decimal point"}
	case err != nil:
		return 0, &Fault{line, fmt.Sprintf("%.40q is no %s", field, what), "take the line out, or count it in header_lines"}
	case math.IsNaN(v) || math.IsInf(v, 0):
		return 0, &Fault{line, fmt.Sprintf("%.40q is no finite %s", field, what), "the record was cut off or overloaded: take it again"}
	}
	return v, nil
}

func (p *parser) sample(line int, t quantity.Time, v quantity.Voltage) error {
	n := len(p.trace.Times)
	switch {
	case math.IsInf(float64(v), 0) || math.IsInf(float64(t), 0) || math.Abs(float64(v)) > 1e9 || math.Abs(float64(t)) > 1e9:
		return &Fault{line, "a value beyond any record", "check the units and the probe factor"}
	case n == Most:
		return &Fault{line, fmt.Sprintf("more than %d samples", Most), "export every n-th sample"}
	case n > 0 && !(t > p.trace.Times[n-1]):
		return &Fault{line, "the time does not rise", "one sweep only, in order, with enough digits"}
	}
	p.trace.Times = append(p.trace.Times, t)
	p.trace.Voltages = append(p.trace.Voltages, v)
	return nil
}

func (p *parser) finish() (*Trace, error) {
	if n := len(p.trace.Times); n < Fewest {
		return nil, &Fault{max(p.last, 1), fmt.Sprintf("%d samples, at least %d are needed", n, Fewest), "export the whole record"}
	}
	if d := p.trace.Duration(); !(d > 0) || math.IsInf(float64(d), 0) {
		return nil, &Fault{p.last, "the record has no duration", "export the times with enough digits"}
	}
	return &p.trace, nil
}
