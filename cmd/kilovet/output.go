package main

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"strings"

	"kilovet/hv/parallel"
	"kilovet/reports/seal"
)

// output is a file to be written, already rendered.
type output struct {
	path string
	data []byte
}

// replaceAll writes the outputs, each whole, once it is clear that none takes the place of
// something else: all beside the files that they replace, and then each in its place. The
// first that cannot be written ends it, and the message names those that were.
func replaceAll(outputs []output) error {
	for _, o := range outputs {
		if err := spares(o.path, kindOf(o.data)); err != nil {
			return err
		}
	}
	parts, errs := make([]part, len(outputs)), make([]error, len(outputs))
	defer func() {
		for _, p := range parts {
			p.giveUp()
		}
	}()
	parallel.Each(len(outputs), func(i int) { parts[i], errs[i] = outputs[i].beside() })
	for i, err := range errs {
		if err != nil {
			return unwritten(outputs, i, 0, err)
		}
	}
	for i := range parts {
		if err := parts[i].settle(); err != nil {
			return unwritten(outputs, i, i, err)
		}
	}
	return nil
}

// unwritten says that an output cannot be written, and how many were.
func unwritten(outputs []output, which, were int, err error) error {
	return exitf(files, "%s cannot be written: %v%s", outputs[which].path, plain(err), written(outputs[:were]))
}

// kind is what an output is, how files of it begin, what they hold further on, and whether
// they bear the stamp of a sheet to sign.
type kind struct {
	name, begins, holds string
	stamped             bool
}

// creator is how a PDF names its maker, in UTF-16.
const creator = "/Creator (\xfe\xff\x00k\x00i\x00l\x00o\x00v\x00e\x00t\x00 "

// The kinds of output.
var (
	sheets  = kind{name: "PDF of kilovet review", begins: "%PDF-", holds: creator}
	issued  = kind{name: "PDF of kilovet signoff", begins: "%PDF-", holds: creator, stamped: true}
	results = kind{name: "JSON of kilovet", begins: `{"contract":`}
	manuals = kind{name: "manual page of kilovet", begins: manualBegins}
	pages   = kind{name: "page of kilovet", begins: "<!DOCTYPE html>\n<html lang=\"en\" data-made-by=\"kilovet\">"}
)

func kindOf(data []byte) kind {
	for _, k := range []kind{sheets, issued, pages, manuals} {
		if rest, begins := bytes.CutPrefix(data, []byte(k.begins)); begins && k.goesOn(rest) {
			return k
		}
	}
	return results
}

// spares refuses an output that has the name of a description, or that would take the
// place of a file which is not an earlier output of its kind. An empty file, and what is
// no regular file, holds nothing to lose.
func spares(path string, k kind) error {
	if strings.EqualFold(filepath.Ext(path), ".toml") {
		return exitf(unusable, "%s has the name of a description and is not written; name the %s first and the description last", path, k.name)
	}
	info, err := os.Stat(path)
	if err != nil || !info.Mode().IsRegular() || info.Size() == 0 {
		return nil // writing says what is wrong, if anything is
	}
	file, err := os.Open(path)
	if err != nil {
		return exitf(files, "%s cannot be read, and what it holds is not replaced unseen: %v", path, plain(err))
	}
	defer file.Close()
	if !k.made(file, int(info.Size())) {
		return exitf(unusable, "%s exists and is no %s: it is not replaced; give another name, or remove it first", path, k.name)
	}
	return nil
}

// made reports whether a file of about a size is of the kind.
func (k kind) made(file io.Reader, size int) bool {
	begin := make([]byte, len(k.begins))
	if _, err := io.ReadFull(file, begin); err != nil || string(begin) != k.begins {
		return false
	}
	rest := bytes.NewBuffer(make([]byte, 0, size+bytes.MinRead))
	_, err := rest.ReadFrom(file)
	return err == nil && k.goesOn(rest.Bytes())
}

// goesOn reports whether what follows the beginning of a file is of the kind.
func (k kind) goesOn(rest []byte) bool {
	return bytes.Contains(rest, []byte(k.holds)) && seal.Stamped(rest) == k.stamped
}

func written(outputs []output) string {
	if len(outputs) == 0 {
		return "; nothing was written"
	}
	var names []string
	for _, o := range outputs {
		names = append(names, o.path)
	}
	return "; written: " + strings.Join(names, ", ")
}

// part is an output that is written and not yet in its place.
type part struct {
	path string // of the place
	file string // beside it, to be renamed; empty where data is to be written into the place
	data []byte
}

// beside writes the data to a new file in the folder of the one to be replaced, so that a
// reader sees the old file or the new one. What is no regular file, such as a device, is
// written into when its turn comes.
func (o output) beside() (part, error) {
	p := part{path: o.path, data: o.data}
	if target, err := filepath.EvalSymlinks(p.path); err == nil {
		p.path = target
	}
	mode := fs.FileMode(0o666)
	if info, err := os.Stat(p.path); err == nil {
		switch {
		case info.IsDir():
			return part{}, errors.New("it is a folder")
		case !info.Mode().IsRegular():
			return p, nil
		}
		mode = info.Mode().Perm()
	}
	file, err := create(p.path, mode)
	if err != nil {
		return part{}, err
	}
	p.file = file.Name()
	if err := fill(file, o.data); err != nil {
		return part{}, errors.Join(err, os.Remove(p.file))
	}
	return p, nil
}

// settle puts the output in its place.
func (p *part) settle() error {
	if p.file == "" {
		return os.WriteFile(p.path, p.data, 0o666)
	}
	if err := os.Rename(p.file, p.path); err != nil {
		return err
	}
	p.file = ""
	return nil
}

// giveUp removes what is not in its place.
func (p *part) giveUp() {
	if p.file != "" {
		_ = os.Remove(p.file) // what stays is named as a part
	}
}

// replace writes one output.
func (o output) replace() error {
	p, err := o.beside()
	if err != nil {
		return err
	}
	defer p.giveUp()
	return p.settle()
}

// create makes a new file beside the one to be replaced.
func create(path string, mode fs.FileMode) (*os.File, error) {
	dir, base := filepath.Split(path)
	for n := 1; ; n++ {
		file, err := os.OpenFile(filepath.Join(dir, fmt.Sprintf(".%s.%d.part", base, n)), os.O_WRONLY|os.O_CREATE|os.O_EXCL, mode)
		if !errors.Is(err, fs.ErrExist) || n == 100 {
			return file, err
		}
	}
}

func fill(file *os.File, data []byte) error {
	_, err := file.Write(data)
	return errors.Join(err, file.Sync(), file.Close())
}

// same reports whether two paths are one file, or would be.
func same(p, q string) bool {
	if resolved(p) == resolved(q) {
		return true
	}
	a, err := os.Stat(p)
	if err != nil {
		return false
	}
	b, err := os.Stat(q)
	return err == nil && a.Mode().IsRegular() && os.SameFile(a, b)
}

// resolved is a path without links, as far as there is something.
func resolved(path string) string {
	if whole, err := filepath.EvalSymlinks(path); err == nil {
		return whole
	}
	if folder, err := filepath.EvalSymlinks(filepath.Dir(path)); err == nil {
		return filepath.Join(folder, filepath.Base(path))
	}
	return filepath.Clean(path)
}
