package main

import (
	"fmt"

	"kilovet/hv/parallel"
)

// defect says that the program itself failed, and where, so that it can be mended.
func defect(what any) exit {
	return exit{failed, fmt.Sprintf("the program itself failed: %v%s; nothing can be concluded from this run; please report it with the description", what, parallel.Place())}
}
