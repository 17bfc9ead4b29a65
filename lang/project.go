package lang

import (
	"path"
	"slices"
	"sort"
	"strings"
)

// Project is the files of a workspace that are read together: the roots that
// were asked for and what they include.
type Project struct {
	Files map[string]*File
	// Asked are the files that were asked for by name; the others were read
	// because a file includes them.
	Asked map[string]bool
	// Roots are the files that no other file of the project includes, in
	// alphabetical order: each is a calculation of its own.
	Roots []string
	// Problems of includes, by declaration.
	Problems []Diagnostic
	includes map[string][]inclusion
	ids      map[string]*FileID
}

type inclusion struct {
	decl *Decl
	stmt *Stmt
	arg  *Expr
	name string // "" when it leads nowhere
	data bool   // a forces statement, which names a table
}

// Read gives the text of a file by its workspace name, or an error that is told
// to the user.
type Read func(name string) (string, error)

// Load reads the named files and all that they include. Unchanged declarations
// of an earlier project are used again; prev may be nil.
func Load(names []string, read Read, prev *Project) *Project {
	p := &Project{Files: map[string]*File{}, includes: map[string][]inclusion{}, ids: map[string]*FileID{}, Asked: map[string]bool{}}
	queue := slices.Clone(names)
	tables := map[string]bool{} // named by forces statements
	for _, name := range names {
		p.Asked[name] = true
	}
	sort.Strings(queue)
	failed := map[string]string{}
	for len(queue) > 0 {
		name := queue[0]
		queue = queue[1:]
		if p.Files[name] != nil || failed[name] != "" {
			continue
		}
		text, err := read(name)
		if err != nil {
			failed[name] = err.Error()
			continue
		}
		id := &FileID{Name: name}
		var old *File
		if prev != nil {
			if f := prev.Files[name]; f != nil {
				old = f
				id = prev.ids[name]
			}
		}
		p.ids[name] = id
		f := old
		switch {
		case tables[name]:
			if old == nil || !old.Data || old.Text != text {
				f = table(id, text)
			}
		case old == nil || old.Data || old.Text != text:
			f = Parse(id, text, old)
		}
		p.Files[name] = f
		for _, inc := range inclusions(f) {
			p.includes[name] = append(p.includes[name], inc)
			if inc.name != "" {
				queue = append(queue, inc.name)
				tables[inc.name] = tables[inc.name] || inc.data && !p.Asked[inc.name]
			}
		}
	}
	p.tables()
	p.link(names, failed)
	return p
}

// tables takes files that were asked for, but are named by a forces statement, for
// the tables that they are, unless a file includes them.
func (p *Project) tables() {
	named := map[string]bool{}
	for _, list := range p.includes {
		for _, inc := range list {
			if f := p.Files[inc.name]; f != nil && !f.Data {
				named[inc.name] = named[inc.name] || inc.data
			}
		}
	}
	for _, list := range p.includes {
		for _, inc := range list {
			if !inc.data {
				delete(named, inc.name)
			}
		}
	}
	for name, is := range named {
		if is {
			p.Files[name] = table(p.ids[name], p.Files[name].Text)
			delete(p.includes, name)
		}
	}
}

// inclusions are the statements of a file that name others, with the names they
// mean.
func inclusions(f *File) []inclusion {
	var out []inclusion
	for _, i := range f.includes {
		d := f.Decls[i]
		for _, s := range d.Stmts {
			if s.Word != "include" && s.Word != "forces" {
				continue
			}
			if _, assigned := s.Assigned(); assigned || s.Broken {
				continue
			}
			inc := inclusion{decl: d, stmt: s, data: s.Word == "forces"}
			if len(s.Args) > 0 && s.Args[0].Kind == StringExpr {
				inc.arg = s.Args[0]
				inc.name, _ = Resolve(f.Name, inc.arg.Text)
			}
			out = append(out, inc)
		}
	}
	return out
}

// Resolve gives the workspace name that an include in the file means, and false
// when it would leave the workspace. Slashes of both kinds separate.
func Resolve(from, include string) (string, bool) {
	target := strings.ReplaceAll(include, `\`, "/")
	if target == "" || strings.HasPrefix(target, "/") || len(target) > 1 && target[1] == ':' || strings.Contains(target, "\x00") {
		return "", false
	}
	name := path.Join(path.Dir(from), target)
	if name == ".." || strings.HasPrefix(name, "../") || strings.HasPrefix(name, "/") {
		return "", false
	}
	return name, true
}

// link finds the roots and the includes that lead nowhere or in circles.
func (p *Project) link(names []string, failed map[string]string) {
	included := map[string]bool{}
	files := make([]string, 0, len(p.Files))
	for name := range p.Files {
		files = append(files, name)
	}
	sort.Strings(files)
	loops := map[string]bool{}
	for _, name := range files {
		for _, inc := range p.includes[name] {
			switch {
			case inc.arg == nil:
				p.include(inc, "wrong-form", inc.stmt.Line, inc.stmt.Word+" names a file: "+inc.example())
			case inc.arg.Text == "":
				p.include(inc, "include-outside", inc.arg.Span, inc.stmt.Word+" names no file: "+inc.example())
			case inc.name == "":
				p.include(inc, "include-outside", inc.arg.Span, "'"+inc.arg.Text+"' lies outside the workspace; a calculation reads nothing from there")
			case failed[inc.name] != "":
				p.include(inc, "include-missing", inc.arg.Span, "cannot read '"+inc.name+"': "+failed[inc.name])
			case inc.data && !p.Files[inc.name].Data:
				p.include(inc, "wrong-form", inc.arg.Span, "'"+inc.arg.Text+"' is read as a calculation, not as a table of forces: a table is a file of its own that nothing includes")
			case !inc.data && p.Files[inc.name].Data:
				p.include(inc, "wrong-form", inc.arg.Span, "'"+inc.arg.Text+"' is a table of forces: forces \""+inc.arg.Text+"\" compression positive")
			case inc.name == name || p.reaches(inc.name, name):
				p.include(inc, "include-loop", inc.arg.Span, "this include leads back to '"+name+"'")
				loops[name] = true
			default:
				included[inc.name] = true
				if inc.data {
					break // whoever reads the table reads the rest
				}
				if extra := inc.stmt.Args[1:]; len(extra) > 0 {
					p.include(inc, "left-over", extra[0].Span.Join(extra[len(extra)-1].Span), "include names one file; this does not belong here")
				}
			}
		}
	}
	for _, name := range names {
		if p.Files[name] != nil && (!included[name] || loops[name]) && !slices.Contains(p.Roots, name) {
			p.Roots = append(p.Roots, name)
		}
	}
	sort.Strings(p.Roots)
}

func (p *Project) include(inc inclusion, rule string, span Span, message string) {
	p.Problems = append(p.Problems, Diagnostic{Decl: inc.decl, Problem: Problem{Rule: rule, Span: span, Message: message}})
}

// example shows the form of the statement.
func (inc inclusion) example() string {
	if inc.data {
		return `forces "frame.csv" compression positive`
	}
	return `include "common.kern"`
}

// reaches tells whether a chain of includes leads from one file to another.
func (p *Project) reaches(from, to string) bool {
	seen := map[string]bool{from: true}
	queue := []string{from}
	for len(queue) > 0 {
		name := queue[0]
		queue = queue[1:]
		for _, inc := range p.includes[name] {
			if inc.name == to {
				return true
			}
			if inc.name != "" && !seen[inc.name] {
				seen[inc.name] = true
				queue = append(queue, inc.name)
			}
		}
	}
	return false
}

// Closure is a root with all that it includes, each file once, the included
// before the including.
func (p *Project) Closure(root string) []*File {
	var out []*File
	seen := map[string]bool{}
	var visit func(name string)
	visit = func(name string) {
		if seen[name] || p.Files[name] == nil {
			return
		}
		seen[name] = true
		for _, inc := range p.includes[name] {
			visit(inc.name)
		}
		out = append(out, p.Files[name])
	}
	visit(root)
	return out
}

// Included tells where an include statement of a file leads: "" for nowhere.
func (p *Project) Included(file string, stmt *Stmt) string {
	for _, inc := range p.includes[file] {
		if inc.stmt == stmt {
			return inc.name
		}
	}
	return ""
}
