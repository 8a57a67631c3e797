//go:build !linux

package main

// inLargePages leaves it to the system.
func inLargePages([]byte) {}
