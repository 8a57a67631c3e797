package main

import "golang.org/x/sys/unix"

// inLargePages asks for large pages in an address range; a system that has none goes on
// in small ones.
func inLargePages(room []byte) { _ = unix.Madvise(room, unix.MADV_HUGEPAGE) }
