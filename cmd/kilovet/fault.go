package main

import (
	"fmt"

	"kilovet/hv/document"
)

// faultLine writes a fault as file:line:column: what; remedy, which editors follow.
func faultLine(name string, f document.Fault) string {
	text := fmt.Sprintf("%s:%d:%d: ", name, f.Line, f.Column)
	if f.Key != "" {
		text += f.Key + ": "
	}
	text += f.What
	if f.Remedy != "" {
		text += "; " + f.Remedy
	}
	return text
}
