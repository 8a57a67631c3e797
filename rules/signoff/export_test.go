package signoff

// Written is written, for its tests.
var Written = written
