package lang

import (
	"sync/atomic"

	"kern/lang/unit"
)

// Source is one file's text under its name. Names are slash-separated paths
// inside the workspace, or whatever name an editor gives an unsaved text.
type Source struct {
	Name string
	Text string
}

// File is the tree of one source: declarations that follow one another and
// together make up the whole text.
type File struct {
	Name   string
	Text   string
	Decls  []*Decl
	Starts []int32 // where each declaration begins in Text
	// Flawed are the numbers of the declarations that have problems.
	Flawed   []int32
	includes []int32 // those that name a file
	// Data is set for a table of figures that a forces statement names: one
	// declaration without statements.
	Data bool
	// Unreadable says why the text was not parsed at all ("" when it was): it is
	// not text, or too big.
	Unreadable string
}

// Decl is one declaration with the comments and blank lines that follow it, up
// to the next one. Its tree depends on its own text alone, so an edit elsewhere
// in the file leaves it as it was.
type Decl struct {
	File *FileID
	*Syntax
	index atomic.Int32 // where it stood in the file last; see File.Index
}

// FileID identifies a file across the snapshots of a session.
type FileID struct{ Name string }

// Syntax is what the text of a declaration reads as. It is immutable and may be
// shared by declarations with the same text.
type Syntax struct {
	Text     string
	Stmts    []*Stmt
	Problems []Problem // spans relative to Text, maxReport at most
	found    int       // problems found, those beyond maxReport too
	// Dotted is set when the text may hold a name with a dot in it: "A1.N_Ed".
	Dotted bool
}

// Stmt is one statement: a word, what follows it on its line, and the block
// that it opens, if any.
type Stmt struct {
	Span Span // from the first token to the last, block included
	Line Span // without the block
	Head Span
	// Word is the statement's first word, "" when the line does not begin with
	// one.
	Word string
	Args []*Expr
	Body *Block
	// Broken is set when a problem was reported in the statement itself (not in
	// its block): readers then stay silent about consequences.
	Broken bool
}

// Assigned tells whether the statement has the form "word = …" and gives what
// stands behind the sign.
func (s *Stmt) Assigned() ([]*Expr, bool) {
	if s.Word != "" && len(s.Args) > 0 && s.Args[0].Kind == EqualsExpr {
		return s.Args[1:], true
	}
	return nil, false
}

// Block is the statements between braces.
type Block struct {
	Span  Span // braces included
	Stmts []*Stmt
}

// ExprKind tells the parts of a statement apart.
type ExprKind uint8

// The kinds of expression.
const (
	BadExpr     ExprKind = iota // something reported already
	NameExpr                    // a word or a name
	StringExpr                  // quoted text
	NumberExpr                  // a pure number
	QuantExpr                   // a number with its unit
	UnaryExpr                   // -x or +x
	BinaryExpr                  // x + y, - * / ^
	CallExpr                    // f(x, y)
	ParenExpr                   // (x)
	EqualsExpr                  // the sign = between the parts of a statement
	CompareExpr                 // < <= > >= == != between the parts of a statement
	CommaExpr                   // a comma between the parts of a statement
)

// Expr is a part of a statement: a word, a text, a sign or an arithmetic
// expression.
type Expr struct {
	Kind ExprKind
	Op   byte // + - * / ^ of UnaryExpr and BinaryExpr
	Span Span
	// Text is the name of NameExpr and CallExpr, the contents of StringExpr, the
	// sign of CompareExpr, the unit as written of QuantExpr.
	Text  string
	Value float64 // of NumberExpr and QuantExpr, as written, without the unit
	Unit  unit.Unit
	Args  []*Expr
}

// Is tells whether the expression is the given word.
func (e *Expr) Is(word string) bool { return e != nil && e.Kind == NameExpr && e.Text == word }

// UnitSpan is where the unit of a QuantExpr stands.
func (e *Expr) UnitSpan() Span {
	return Span{e.Span.End - int32(len(e.Text)), e.Span.End}
}

// Walk calls f for the expression and everything below it, parents first.
func (e *Expr) Walk(f func(*Expr)) {
	if e == nil {
		return
	}
	f(e)
	for _, a := range e.Args {
		a.Walk(f)
	}
}
