package main

import (
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"fmt"
	"io"
	"os"
	"path/filepath"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/trace"
	"kilovet/rules"
)

// largestRecord is the most that is read of a measured record.
const largestRecord = 64 << 20

// record is a file that a description names.
type record struct {
	path string
	data []byte
}

// rippleRecord reads the record of the measured ripple that a description names, beside the
// description; nil where it names none. Its path is that from the folder of the description,
// on standard input from the present one.
func rippleRecord(c *chain.Chain, given source) (*record, error) {
	if c.Beam == nil || !c.Beam.MeasuredRipple.Set() {
		return nil, nil
	}
	path := c.Beam.MeasuredRipple.V
	if !filepath.IsAbs(path) {
		path = filepath.Join(filepath.Dir(given.name), filepath.FromSlash(path))
	}
	file, err := os.Open(path)
	if err != nil {
		return nil, fmt.Errorf("%s cannot be read: %w", path, plain(err))
	}
	defer file.Close()
	if about, err := file.Stat(); err != nil || !about.Mode().IsRegular() {
		return nil, fmt.Errorf("%s cannot be read: it is no ordinary file", path)
	}
	data, err := io.ReadAll(io.LimitReader(file, largestRecord+1))
	switch {
	case err != nil:
		return nil, fmt.Errorf("%s cannot be read: %w", path, plain(err))
	case len(data) > largestRecord:
		return nil, fmt.Errorf("%s cannot be read: it is larger than 64 MiB; export every n-th sample", path)
	}
	return &record{path, data}, nil
}

// input is the record as it is listed among the inputs.
func (r *record) input() rules.Input {
	sum := sha256.Sum256(r.data)
	return rules.Input{Role: "measured ripple", Name: filepath.Base(r.path), SHA256: hex.EncodeToString(sum[:])}
}

// read turns the record into a trace, as the description says it is to be read; what is
// damaged is a fault of the description at the key that names the file.
func (r *record) read(c *chain.Chain) (*trace.Trace, *document.Fault) {
	var o trace.Options
	if m := c.Beam.Measurement; m != nil {
		o.Factor, o.TimeUnit, o.VoltageUnit = m.ProbeFactor.V, m.TimeUnit.V, m.VoltageUnit.V
		if m.HeaderLines.Set() {
			o.HeaderLines = &m.HeaderLines.V
		}
	}
	t, err := trace.Parse(r.data, o)
	if err == nil {
		return t, nil
	}
	at := c.Beam.MeasuredRipple.Place
	f := &document.Fault{Key: at.Key, Line: at.Line, Column: at.Column, What: filepath.Base(r.path) + ": " + err.Error()}
	var damaged *trace.Fault
	if errors.As(err, &damaged) {
		f.What, f.Remedy = fmt.Sprintf("%s, line %d: %s", filepath.Base(r.path), damaged.Line, damaged.What), damaged.Remedy
	}
	return nil, f
}

// ripple reads the measured ripple that a description names; nil where it names none.
func (r *reviewing) ripple(c *chain.Chain, given source) (*record, *trace.Trace, error) {
	measured, err := rippleRecord(c, given)
	if err != nil {
		return nil, nil, exitf(files, "%v", err)
	}
	if measured == nil {
		return nil, nil, nil
	}
	if err := r.spares(measured.path); err != nil {
		return nil, nil, err
	}
	t, fault := measured.read(c)
	if fault != nil {
		return nil, nil, r.faulty(given.name, document.Faults{*fault})
	}
	return measured, t, nil
}

// spares refuses outputs that would overwrite a file that was read.
func (r *reviewing) spares(path string) error {
	for _, p := range []string{r.pdf, r.html, r.json} {
		if p != "" && p != "-" && same(p, path) {
			return exitf(unusable, "%s is read and would be written; give every file a name of its own", p)
		}
	}
	return nil
}
