// Package page turns a report into what a group meeting looks at: structures with
// their sites, lobes, levels and chances, on one self-contained HTML page or as single
// SVG drawings.
//
// The page asks for nothing from outside: no font, script, image or style is loaded.
// It is well-formed XML, says in words whatever it shows by colour or size, follows
// the reader's light or dark setting, and prints to A4. The same report gives the same
// bytes.
package page
