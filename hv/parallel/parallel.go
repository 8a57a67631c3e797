// Package parallel does pieces of work at the same time. Results are placed by index, so
// that nothing of the order in which they came shows; what a piece panics with comes out
// where the work was asked for.
package parallel

import (
	"fmt"
	"runtime"
	"strings"
	"sync"
)

// Do does pieces of work that do not wait for one another to begin, all at once.
func Do(work ...func()) {
	spread(len(work), len(work), func(i int) { work[i]() })
}

// Each does n pieces of work, about as many at once as there are processors. Some may
// wait for what others compute.
func Each(n int, work func(i int)) {
	spread(n, 2*runtime.GOMAXPROCS(0), work)
}

func spread(n, workers int, work func(i int)) {
	var group sync.WaitGroup
	next := make(chan int)
	broken := make(chan string, n)
	for range min(n, workers) {
		group.Go(func() {
			for i := range next {
				if what := caught(func() { work(i) }); what != "" {
					broken <- what
				}
			}
		})
	}
	for i := range n {
		next <- i
	}
	close(next)
	group.Wait()
	close(broken)
	if what, there := <-broken; there {
		panic(what)
	}
}

// caught is what a piece of work panics with, and where.
func caught(work func()) (what string) {
	defer func() {
		if r := recover(); r != nil {
			what = fmt.Sprintf("%v%s", r, Place())
		}
	}()
	work()
	return ""
}

// Place is the line of this program in which the running panic began, in brackets; empty
// where no panic runs.
func Place() string {
	callers := make([]uintptr, 64)
	frames := runtime.CallersFrames(callers[:runtime.Callers(1, callers)])
	for panicking, more := false, true; more; {
		var f runtime.Frame
		f, more = frames.Next()
		if panicking && !strings.HasPrefix(f.Function, "runtime.") {
			return fmt.Sprintf(" (%s, line %d)", f.Function, f.Line)
		}
		panicking = panicking || f.Function == "runtime.gopanic"
	}
	return ""
}
