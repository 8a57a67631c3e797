package main

import (
	"fmt"
	"net/http"
	"slices"
	"sync"
)

// board serves one page to this computer and tells those who watch when there is
// another.
type board struct {
	hosts []string // that a request may name

	lock    sync.Mutex
	page    []byte
	version string
	changed chan struct{} // closed when there is another page
}

func newBoard(port int) *board {
	return &board{hosts: []string{fmt.Sprintf("127.0.0.1:%d", port), fmt.Sprintf("localhost:%d", port)}, changed: make(chan struct{})}
}

// put shows another page.
func (b *board) put(page []byte, version string) {
	b.lock.Lock()
	defer b.lock.Unlock()
	b.page, b.version = page, version
	close(b.changed)
	b.changed = make(chan struct{})
}

func (b *board) now() (page []byte, version string, changed <-chan struct{}) {
	b.lock.Lock()
	defer b.lock.Unlock()
	return b.page, b.version, b.changed
}

// ServeHTTP answers requests that name this computer as their host, so that no page
// from elsewhere can read the review under a name of its own.
func (b *board) ServeHTTP(w http.ResponseWriter, r *http.Request) {
	h := w.Header()
	h.Set("Cache-Control", "no-store")
	h.Set("X-Content-Type-Options", "nosniff")
	h.Set("Cross-Origin-Resource-Policy", "same-origin")
	h.Set("Referrer-Policy", "no-referrer")
	h.Set("Content-Security-Policy", "frame-ancestors 'none'")
	switch {
	case !slices.Contains(b.hosts, r.Host):
		http.Error(w, "this page is served to this computer alone", http.StatusMisdirectedRequest)
	case r.Method != http.MethodGet && r.Method != http.MethodHead:
		h.Set("Allow", "GET, HEAD")
		http.Error(w, "only to be read", http.StatusMethodNotAllowed)
	case r.URL.Path == "/":
		page, _, _ := b.now()
		h.Set("Content-Type", "text/html; charset=utf-8")
		w.Write(page)
	case r.URL.Path == "/changes":
		b.changes(w, r)
	default:
		http.NotFound(w, r)
	}
}

// changes sends the version shown, and each later one, as events.
func (b *board) changes(w http.ResponseWriter, r *http.Request) {
	w.Header().Set("Content-Type", "text/event-stream")
	flush := http.NewResponseController(w)
	for {
		_, version, changed := b.now()
		if _, err := fmt.Fprintf(w, "data: %s\n\n", version); err != nil {
			return
		}
		if err := flush.Flush(); err != nil {
			return
		}
		select {
		case <-changed:
		case <-r.Context().Done():
			return
		}
	}
}
