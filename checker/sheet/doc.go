// Package sheet is the printed calculation: what was assumed, what was loaded,
// what was checked and how it was worked out, as one document that is written as
// HTML, as PDF and as Markdown.
//
// A sheet is composed once, of the blocks of package output and the pictures of
// package drawing; the writers differ in form alone. The same files give the same
// bytes: a sheet has no clock, and its mark says from which files it follows.
package sheet
