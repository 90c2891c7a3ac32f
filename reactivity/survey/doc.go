// Package survey judges thousands to millions of structures or reactions, line by
// line, in constant memory and on all cores, and writes one record for each in the
// order of the input.
//
// A line that cannot be read or judged becomes a record with its reason; the run goes
// on. Output written to a file can be resumed after an interruption at any instant:
// records are appended whole, and a torn last record is cut off before going on.
package survey
