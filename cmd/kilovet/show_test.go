package main

import (
	"bufio"
	"bytes"
	"context"
	"fmt"
	"io"
	"net"
	"net/http"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"kilovet"
)

// shown is a description that is being shown.
type shown struct {
	path, address string
	ticks         chan time.Time
	end           func() error // and its error
}

// start shows a description until the test ends.
func start(t *testing.T, description string) *shown {
	t.Helper()
	return startUnder(t, description, "")
}

// startUnder shows a description under the local code in a file, if one is named.
func startUnder(t *testing.T, description, local string) *shown {
	t.Helper()
	path := filepath.Join(t.TempDir(), "chain.toml")
	write(t, path, description)
	listener, err := net.Listen("tcp4", "127.0.0.1:0")
	if err != nil {
		t.Fatal(err)
	}
	ctx, cancel := context.WithCancel(context.Background())
	s := &shown{path: path, address: listener.Addr().String(), ticks: make(chan time.Time)}
	ended := make(chan error, 1)
	out := &bytes.Buffer{}
	go func() {
		ended <- (&showing{world: world{out: out}, path: path, local: local}).serve(ctx, listener, s.ticks)
	}()
	s.end = func() error { cancel(); return <-ended }
	t.Cleanup(cancel)
	return s
}

func write(t *testing.T, path, text string) {
	t.Helper()
	if err := os.WriteFile(path, []byte(text), 0o644); err != nil {
		t.Fatal(err)
	}
}

func (s *shown) request(t *testing.T, method, path, host string) *http.Response {
	t.Helper()
	r, err := http.NewRequestWithContext(t.Context(), method, "http://"+s.address+path, nil)
	if err != nil {
		t.Fatal(err)
	}
	r.Host = host
	answer, err := http.DefaultClient.Do(r)
	if err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() { answer.Body.Close() })
	return answer
}

func (s *shown) page(t *testing.T) string {
	t.Helper()
	body, err := io.ReadAll(s.request(t, "GET", "/", "").Body)
	if err != nil {
		t.Fatal(err)
	}
	return string(body)
}

func TestShowFollowsTheFile(t *testing.T) {
	s := start(t, gap)
	if page := s.page(t); !strings.Contains(page, "<h1>A gap</h1>") || !strings.Contains(page, "EventSource") {
		t.Errorf("no review: %.200s", page)
	}
	events := bufio.NewScanner(s.request(t, "GET", "/changes", "").Body)
	first := next(t, events)
	if !strings.Contains(s.page(t), `name="version" content="`+first+`"`) {
		t.Errorf("the page is not of the version told: %s", first)
	}
	write(t, s.path, strings.Replace(gap, "clearance =", "clearence =", 1))
	s.ticks <- time.Time{}
	if second := next(t, events); second == first || second == "" {
		t.Errorf("no change told: %q", second)
	}
	if page := s.page(t); !strings.Contains(page, "1 fault in chain.toml") || !strings.Contains(page, "clearence") {
		t.Errorf("no faults: %.200s", page)
	}
	write(t, s.path, gap)
	s.ticks <- time.Time{}
	if again := next(t, events); again != first {
		t.Errorf("the same file is another version: %s, %s", first, again)
	}
	if err := s.end(); err != nil {
		t.Error(err)
	}
}

// The page follows the local code too: what it asks governs, and its faults are shown at
// their lines.
func TestShowFollowsTheLocalCode(t *testing.T) {
	code := filepath.Join(t.TempDir(), "house.toml")
	const stricter = "title = \"House rules\"\n\n[[limit]]\nrule   = \"spacing.clearance\"\nvalue  = \"250 mm\"\nsource = \"House rules HV-7\"\n"
	write(t, code, stricter)
	s := startUnder(t, gap, code)
	if page := s.page(t); !strings.Contains(page, "bring it to at least 250 mm") {
		t.Errorf("the local code does not govern: %.200s", page)
	}
	for broken, want := range map[string]string{
		strings.Replace(stricter, "value", "valeu", 1):                        "in house.toml",
		strings.Replace(stricter, "spacing.clearance", "spacing.clarence", 1): "in house.toml",
	} {
		write(t, code, broken)
		s.ticks <- time.Time{}
		s.ticks <- time.Time{} // taken when the first look is done
		if page := s.page(t); !strings.Contains(page, want) {
			t.Errorf("no faults of the local code: %.400s", page)
		}
	}
	if err := os.Remove(code); err != nil {
		t.Fatal(err)
	}
	for range 3 {
		s.ticks <- time.Time{}
	}
	if page := s.page(t); !strings.Contains(page, "cannot be read") {
		t.Errorf("judged without the local code that was asked for: %.200s", page)
	}
}

// next is the next version that is told.
func next(t *testing.T, events *bufio.Scanner) string {
	t.Helper()
	for events.Scan() {
		if version, ok := strings.CutPrefix(events.Text(), "data: "); ok {
			return version
		}
	}
	t.Fatalf("no more events: %v", events.Err())
	return ""
}

func TestShowHasPatienceWithAFileThatIsAway(t *testing.T) {
	s := start(t, gap)
	before := s.page(t)
	if err := os.Remove(s.path); err != nil {
		t.Fatal(err)
	}
	s.ticks <- time.Time{}
	s.ticks <- time.Time{} // taken when the first look is done
	if s.page(t) == before {
		s.ticks <- time.Time{}
	}
	if page := s.page(t); !strings.Contains(page, "cannot be read") {
		t.Errorf("what is gone is still shown: %.200s", page)
	}
	write(t, s.path, gap)
	s.ticks <- time.Time{}
	s.ticks <- time.Time{}
	if s.page(t) != before {
		t.Error("what is back is not shown")
	}
}

func TestShowServesThisComputerAlone(t *testing.T) {
	s := start(t, gap)
	port := s.address[strings.LastIndexByte(s.address, ':'):]
	for _, c := range []struct {
		method, path, host string
		want               int
	}{
		{"GET", "/", "127.0.0.1" + port, 200}, {"GET", "/", "localhost" + port, 200}, {"HEAD", "/", "", 200},
		{"GET", "/", "kilovet.example" + port, 421}, {"GET", "/changes", "kilovet.example" + port, 421}, {"GET", "/", "127.0.0.1", 421}, {"GET", "/", "127.0.0.1.example" + port, 421},
		{"POST", "/", "", 405}, {"DELETE", "/", "", 405}, {"GET", "/chain.toml", "", 404}, {"GET", "/../chain.toml", "", 404},
	} {
		answer := s.request(t, c.method, c.path, c.host)
		if answer.StatusCode != c.want {
			t.Errorf("%s %s for %s: %d, want %d", c.method, c.path, c.host, answer.StatusCode, c.want)
		}
		for name, value := range map[string]string{"Cache-Control": "no-store", "X-Content-Type-Options": "nosniff", "Cross-Origin-Resource-Policy": "same-origin",
			"Content-Security-Policy": "frame-ancestors 'none'"} {
			if answer.Header.Get(name) != value {
				t.Errorf("%s %s: %s: %q", c.method, c.path, name, answer.Header.Get(name))
			}
		}
	}
}

// A record beside the description is followed too; a damaged one is shown as a fault.
func TestShowFollowsTheMeasuredRipple(t *testing.T) {
	if testing.Short() {
		t.Skip("whole reviews; the ordinary run has them")
	}
	name, column := kilovet.Example()
	text := strings.Replace(string(column), "exposure             =", "measured_ripple      = \"scope.csv\"\nexposure             =", 1)
	if text == string(column) {
		t.Fatalf("%s has no exposure", name)
	}
	s := start(t, text)
	record := filepath.Join(filepath.Dir(s.path), "scope.csv")
	if page := s.page(t); !strings.Contains(page, "scope.csv cannot be read") {
		t.Errorf("a missing record is not shown: %.300s", page)
	}
	var rows strings.Builder
	for i := range 64 {
		fmt.Fprintf(&rows, "%d,%d\n", i, i%2)
	}
	write(t, record, rows.String())
	s.ticks <- time.Time{}
	s.ticks <- time.Time{}
	if page := s.page(t); !strings.Contains(page, "measured ripple") {
		t.Errorf("the record is not followed: %.300s", page)
	}
	write(t, record, "0,1\n1,x\n")
	s.ticks <- time.Time{}
	s.ticks <- time.Time{}
	if page := s.page(t); !strings.Contains(page, "line 2") {
		t.Errorf("the damage is not shown: %.300s", page)
	}
}
