package sheet

import (
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"net/url"
	"path"
	"regexp"
	"slices"
	"strings"

	"kern/checker"
)

// Inputs are the files that a sheet follows from. Their names count from the
// deepest folder that holds them all, so that a copy of that folder has the same
// digest wherever it lies.
type Inputs struct {
	Files  []Input // by name
	Digest string  // SHA-256 over all names and texts, in hexadecimal digits
}

// Input is one file.
type Input struct {
	Name   string
	Bytes  int    // with line ends of one byte
	Digest string // SHA-256 of its text, in hexadecimal digits
	Asked  bool   // it was asked for by name, not included by another
}

// normal is a text as digests see it: line ends are those of Unix, so that a
// checkout on another platform has the same digest.
func normal(text string) string { return strings.ReplaceAll(text, "\r\n", "\n") }

// DigestOf is the digest of a file's text.
func DigestOf(text string) string {
	sum := sha256.Sum256([]byte(normal(text)))
	return hex.EncodeToString(sum[:])
}

// inputsOf takes the digest of files: their texts by name, in order.
func inputsOf(files map[string]string, asked func(name string) bool) Inputs {
	var in Inputs
	for name, text := range files {
		in.Files = append(in.Files, Input{Name: name, Bytes: len(normal(text)), Digest: DigestOf(text), Asked: asked(name)})
	}
	slices.SortFunc(in.Files, func(a, b Input) int { return strings.Compare(a.Name, b.Name) })
	whole := sha256.New()
	for _, f := range in.Files {
		// the name ends with a zero byte, which no name contains; the digest has a
		// fixed length: no two lists of files read alike
		fmt.Fprintf(whole, "%s\x00%s\n", f.Name, f.Digest)
	}
	in.Digest = hex.EncodeToString(whole.Sum(nil))
	return in
}

// common is the deepest folder of files, "" for the topmost.
func common(names []string) string {
	dir := ""
	for i, n := range names {
		d := path.Dir(n)
		if d == "." {
			return ""
		}
		if i == 0 {
			dir = d
		}
		for dir != "" && d != dir && !strings.HasPrefix(d, dir+"/") {
			if dir = path.Dir(dir); dir == "." {
				dir = ""
			}
		}
	}
	return dir
}

// relative is a name counted from a folder.
func relative(dir, name string) string {
	if dir == "" {
		return name
	}
	return strings.TrimPrefix(name, dir+"/")
}

// inputs finds the files that the parts of the sheet were read from.
func (c *composer) inputs() {
	files := map[string]string{}
	for _, p := range c.parts {
		for _, f := range p.calculation.Files {
			files[f.Name] = f.Text
		}
	}
	var all []string
	for name := range files {
		all = append(all, name)
	}
	c.dir = common(all)
	here := map[string]string{}
	asked := map[string]bool{}
	for name, text := range files {
		here[relative(c.dir, name)] = text
		asked[relative(c.dir, name)] = slices.Contains(c.options.Asked, name)
	}
	c.sheet.Inputs = inputsOf(here, func(name string) bool { return asked[name] })
	c.sheet.Results = resultsOf(c.chosen)
}

// resultsOf takes the digest of what a sheet comes to: verdict, utilisation and
// governing check of each member.
func resultsOf(results []*checker.Result) string {
	whole := sha256.New()
	for _, r := range results {
		fmt.Fprintf(whole, "%s\x00%s\x00%s\x00%s\n", r.Name, r.Verdict, r.Governing, fmt.Sprintf("%.4f", r.Utilisation))
	}
	return hex.EncodeToString(whole.Sum(nil))
}

// The mark is a line in every form of a sheet that says what it was made from. It
// has no letters that any of the forms would change.
var markForm = regexp.MustCompile(`kern-sheet:1\?[A-Za-z0-9%&=+._~-]+`)

func (s *Sheet) mark(form string) string {
	v := url.Values{"program": {s.Program}, "digest": {s.Inputs.Digest}, "results": {s.Results}, "form": {form}, "member": s.options.Members}
	if s.options.Full {
		v.Set("full", "1")
	}
	if form == "pdf" {
		v.Set("paper", string(s.options.Paper))
	}
	for _, f := range s.Inputs.Files {
		kind := "included"
		if f.Asked {
			kind = "asked"
		}
		v.Add(kind, f.Digest+" "+f.Name)
	}
	return "kern-sheet:1?" + v.Encode()
}

// Mark is what a finished sheet says it was made from.
type Mark struct {
	Form    string // html, pdf or markdown
	Program string
	Inputs  Inputs
	Results string
	Members []string
	Full    bool
	Paper   Paper
}

// ReadMark finds the mark in a finished sheet; false when it has none.
func ReadMark(sheet []byte) (Mark, bool) {
	found := string(markForm.Find(sheet))
	// HTML writes "&" as "&amp;"; in no form does the mark contain that itself
	if i := strings.Index(found, "&amp"); i >= 0 {
		found = ""
		if m := htmlMark.Find(sheet); m != nil {
			found = strings.ReplaceAll(string(m), "&amp;", "&")
		}
	}
	_, query, ok := strings.Cut(found, "?")
	if !ok {
		return Mark{}, false
	}
	v, err := url.ParseQuery(query)
	if err != nil || v.Get("digest") == "" || !slices.Contains([]string{"html", "pdf", "markdown"}, v.Get("form")) {
		return Mark{}, false
	}
	m := Mark{Form: v.Get("form"), Program: v.Get("program"), Results: v.Get("results"), Members: v["member"], Full: v.Get("full") == "1", Paper: Paper(v.Get("paper"))}
	m.Inputs.Digest = v.Get("digest")
	for _, kind := range []string{"asked", "included"} {
		for _, f := range v[kind] {
			digest, name, _ := strings.Cut(f, " ")
			m.Inputs.Files = append(m.Inputs.Files, Input{Name: name, Digest: digest, Asked: kind == "asked"})
		}
	}
	slices.SortFunc(m.Inputs.Files, func(a, b Input) int { return strings.Compare(a.Name, b.Name) })
	return m, true
}

var htmlMark = regexp.MustCompile(`kern-sheet:1\?[A-Za-z0-9%&=+._~;-]+`)
