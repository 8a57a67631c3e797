// Package browser holds no code: its tests open the page in a browser. It is a module
// of its own, so that nobody needs what drives the browser to build the rest.
package browser
