// Package complete knows what can be written at a place of a calculation: items
// for completion and the forms of statements for signature help, as plain data.
//
// A place is read by its tokens (caret.go), which a half-typed line and a broken
// file have too. The written forms of the language (lang.Forms) are taken apart
// once (pattern.go), and what has been typed is held against them (due.go): that
// tells what can come next, in a form that is added tomorrow too. What that is,
// of the calculation at hand, stands in item_*.go.
//
// No number and no designation is ever proposed that nobody chose: a snippet
// that is left half filled in must be an error, not a load.
package complete
