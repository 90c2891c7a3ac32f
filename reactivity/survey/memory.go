package survey

import "runtime/debug"

// A survey keeps little and throws away much: fewer, larger collections cost less, and
// room that is not given back to the system need not be asked for again. The limit keeps
// memory where docs/survey.md says it stays.
const (
	collectionPercent = 2000
	collectionLimit   = 64 << 20 // bytes
)

// SetCollection sets the garbage collector of the process for a survey; undo puts back
// what was set before.
func SetCollection() (undo func()) {
	percent := debug.SetGCPercent(collectionPercent)
	limit := debug.SetMemoryLimit(collectionLimit)
	return func() {
		debug.SetGCPercent(percent)
		debug.SetMemoryLimit(limit)
	}
}
