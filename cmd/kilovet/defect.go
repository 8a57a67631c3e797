package main

import (
	"fmt"
	"runtime"
	"strings"
)

// defect says that the program itself failed, and where, so that it can be mended.
func defect(what any) exit {
	return exit{failed, fmt.Sprintf("the program itself failed: %v%s; nothing can be concluded from this run; please report it with the description", what, place())}
}

// place is the line of this program in which the running panic began; empty where no
// panic runs.
func place() string {
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
