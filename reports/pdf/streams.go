package pdf

import (
	"bytes"
	"cmp"
	"compress/zlib"
	"errors"
	"fmt"
	"runtime"
	"slices"
	"strconv"

	"kilovet/hv/parallel"
)

// assembled is a file of the library with the sheets, compressed, in the places that are
// marked, and its other plain streams compressed as well.
func assembled(file []byte, sheets [][]byte, small *deflater) ([]byte, error) {
	objects, table, err := objectsOf(file)
	if err != nil {
		return nil, err
	}
	if err := fillIn(objects, sheets, small); err != nil {
		return nil, err
	}
	out := bytes.NewBuffer(make([]byte, 0, len(file)/2))
	out.Write(file[:objects[0].at])
	moved := make([]int, len(objects)+1)
	for _, o := range objects {
		moved[o.number] = out.Len()
		o.write(out)
	}
	at := out.Len()
	fmt.Fprintf(out, "xref\n0 %d\n0000000000 65535 f \n", len(objects)+1)
	for _, offset := range moved[1:] {
		fmt.Fprintf(out, "%010d 00000 n \n", offset)
	}
	trailer, _, found := bytes.Cut(table, []byte("startxref\n"))
	if !found {
		return nil, errStructure
	}
	out.Write(trailer)
	fmt.Fprintf(out, "startxref\n%d\n%%%%EOF\n", at)
	return out.Bytes(), nil
}

var errStructure = errors.New("the file of the library is not built as expected")

// object is a numbered piece of a file.
type object struct {
	number, at int
	whole      []byte
	stream     []byte // what of it may be compressed; nil where nothing
	small      []byte // the same, compressed
}

func (o object) write(out *bytes.Buffer) {
	if o.stream == nil {
		out.Write(o.whole)
		return
	}
	fmt.Fprintf(out, "%d 0 obj\n<</Filter /FlateDecode /Length %d>>\nstream\n", o.number, len(o.small))
	out.Write(o.small)
	out.WriteString("\nendstream\nendobj\n")
}

// objectsOf takes a file apart into its objects, in the order in which they stand, and
// what follows the table of their places.
func objectsOf(file []byte) (objects []object, table []byte, err error) {
	last := bytes.LastIndex(file, []byte("startxref\n"))
	if last < 0 {
		return nil, nil, errStructure
	}
	digits, _, _ := bytes.Cut(file[last+len("startxref\n"):], []byte("\n"))
	from, err := strconv.Atoi(string(digits))
	if err != nil || from < 0 || from >= last || !bytes.HasPrefix(file[from:], []byte("xref\n0 ")) {
		return nil, nil, errStructure
	}
	count, table, _ := bytes.Cut(file[from+len("xref\n0 "):], []byte("\n"))
	n, err := strconv.Atoi(string(count))
	const entry = 20 // bytes, ISO 32000-1:2008 7.5.4
	if err != nil || n < 2 || len(table) < n*entry {
		return nil, nil, errStructure
	}
	for i := 1; i < n; i++ {
		at, err := strconv.Atoi(string(table[i*entry : i*entry+10]))
		if err != nil || at >= from {
			return nil, nil, errStructure
		}
		objects = append(objects, object{number: i, at: at})
	}
	slices.SortFunc(objects, func(a, b object) int { return cmp.Compare(a.at, b.at) })
	for i := range objects {
		end := from
		if i+1 < len(objects) {
			end = objects[i+1].at
		}
		objects[i].whole = file[objects[i].at:end]
		objects[i].stream = objects[i].plainStream()
	}
	return objects, table[n*entry:], nil
}

// plainStream is the stream of an object that has nothing else.
func (o object) plainStream() []byte {
	rest, found := bytes.CutPrefix(o.whole, fmt.Appendf(nil, "%d 0 obj\n<</Length ", o.number))
	if !found {
		return nil
	}
	digits, rest, found := bytes.Cut(rest, []byte(">>\nstream\n"))
	n, err := strconv.Atoi(string(digits))
	if !found || err != nil || n > len(rest) || !bytes.Equal(rest[n:], []byte("\nendstream\nendobj\n")) {
		return nil
	}
	return rest[:n]
}

// fillIn gives the sheets to the objects that are marked, and compresses the others.
func fillIn(objects []object, sheets [][]byte, small *deflater) error {
	next := 0
	for i := range objects {
		switch o := &objects[i]; {
		case o.stream == nil:
		case next < len(sheets) && bytes.Contains(o.stream, []byte(mark(next))):
			o.small = sheets[next]
			next++
		default:
			o.small = small.of(o.stream)
		}
	}
	if next < len(sheets) {
		return errStructure
	}
	return nil
}

// deflateAll compresses what is seen on sheets, each processor some of them; a deflater is
// left over.
func deflateAll(painted []*painter) (all [][]byte, left *deflater) {
	all = make([][]byte, len(painted))
	workers := max(1, min(runtime.GOMAXPROCS(0), len(painted)))
	small := make([]deflater, workers)
	parallel.Each(workers, func(k int) {
		for i := k; i < len(painted); i += workers {
			all[i] = small[k].of(painted[i].content)
		}
	})
	return all, &small[0]
}

// deflater compresses one stream after the other. The library sets up a compressor anew
// for each, which takes longer than to compress.
type deflater struct{ writer *zlib.Writer }

func (d *deflater) of(plain []byte) []byte {
	out := bytes.NewBuffer(make([]byte, 0, len(plain)/2))
	if d.writer == nil {
		d.writer, _ = zlib.NewWriterLevel(out, zlib.BestSpeed) // a level that there is
	} else {
		d.writer.Reset(out)
	}
	_, _ = d.writer.Write(plain) // a buffer takes everything
	_ = d.writer.Close()
	return out.Bytes()
}
