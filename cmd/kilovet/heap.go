package main

import (
	"runtime/debug"
	"sync"
	"sync/atomic"
)

// A review is over before collecting what it leaves behind pays, and touches most of its
// memory for the first time. So the heap is given a floor below which nothing is collected,
// and room that the system may hand out in large pages; a tenth to a sixth of the time of a
// short review, measured on two processors.
const (
	heapFloor = 48 << 20  // bytes, addressed and never touched
	heapRoom  = 128 << 20 // bytes, of which a review takes what it needs
)

// floor is what the collector takes for used memory.
var floor atomic.Pointer[[heapFloor]byte]

// makeRoom prepares the heap for a review, once in a process.
var makeRoom = sync.OnceFunc(func() {
	usual := debug.SetGCPercent(-1) // nothing is collected for so much that is never touched
	floor.Store(new([heapFloor]byte))
	inLargePages(make([]byte, heapRoom))
	debug.SetGCPercent(usual)
	debug.FreeOSMemory() // the room becomes free memory of the heap
})
