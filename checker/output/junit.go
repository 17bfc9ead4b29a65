package output

import (
	"encoding/xml"
	"io"
	"strings"

	"kern/checker"
	"kern/checker/record"
	"kern/checker/standard"
	"kern/lang"
)

// The parts of a JUnit report.
type (
	junitReport struct {
		XMLName  xml.Name     `xml:"testsuites"`
		Name     string       `xml:"name,attr"`
		Tests    int          `xml:"tests,attr"`
		Failures int          `xml:"failures,attr"`
		Errors   int          `xml:"errors,attr"`
		Suites   []junitSuite `xml:"testsuite"`
	}
	junitSuite struct {
		Name     string      `xml:"name,attr"`
		Tests    int         `xml:"tests,attr"`
		Failures int         `xml:"failures,attr"`
		Errors   int         `xml:"errors,attr"`
		Skipped  int         `xml:"skipped,attr"`
		Time     string      `xml:"time,attr"`
		Cases    []junitCase `xml:"testcase"`
	}
	junitCase struct {
		Name    string      `xml:"name,attr"`
		Class   string      `xml:"classname,attr"`
		Time    string      `xml:"time,attr"`
		Skipped *junitSkip  `xml:"skipped"`
		Error   *junitFault `xml:"error"`
		Failure *junitFault `xml:"failure"`
	}
	junitSkip struct {
		Message string `xml:"message,attr"`
	}
	junitFault struct {
		Message string `xml:"message,attr"`
		Type    string `xml:"type,attr"`
		Text    string `xml:",chardata"`
	}
)

// JUnit writes a report as the test report that build servers read: a suite for
// every file, a case for every member and one for the text itself. A member that
// is undecided is an error, one whose failure is carried is skipped. Times are 0:
// the same files give the same bytes.
func JUnit(w io.Writer, r *checker.Report, names Names, known *record.Outcome, recorded Names) error {
	out := junitReport{Name: "kern"}
	suites := map[string]*junitSuite{}
	var order []string
	suite := func(file string) *junitSuite {
		if suites[file] == nil {
			suites[file] = &junitSuite{Name: printable(names(file)), Time: "0"}
			order = append(order, file)
		}
		return suites[file]
	}
	about := map[string][]string{} // what is said of members
	faults := map[string][]string{}
	lines := newIndex(r.Project)
	for _, d := range r.Diagnostics {
		suite(d.File)
		at := lines.span(d.File, d.Span).Start
		text := printable(names(d.File)) + ":" + itoa(at.Line) + ":" + itoa(at.Column) + ": " + printable(d.Message)
		switch {
		case d.Member != "":
			about[d.File+"\n"+d.Member] = append(about[d.File+"\n"+d.Member], text)
		case d.Severity == lang.Error:
			faults[d.File] = append(faults[d.File], text)
		}
	}
	for _, m := range r.Members {
		file, _ := r.Place(m)
		s := suite(file)
		c := junitCase{Name: m.Name, Class: s.Name, Time: "0"}
		said := about[file+"\n"+m.Name]
		fault := &junitFault{Message: "undecided", Type: "undecided", Text: strings.Join(said, "\n")}
		if len(said) > 0 {
			fault.Message = said[0]
		}
		switch {
		case m.Verdict == standard.Passes:
		case known.Carries(recorded(file), m.Name):
			c.Skipped = &junitSkip{"carried: " + m.Verdict.String()}
			for _, e := range known.Carried {
				if e.File == recorded(file) && e.Name == m.Name {
					c.Skipped.Message += ", because " + printable(e.Carried)
				}
			}
			s.Skipped++
		case m.Verdict == standard.Fails:
			fault.Type = m.Governing
			c.Failure = fault
			s.Failures++
		default:
			c.Error = fault
			s.Errors++
		}
		s.Cases = append(s.Cases, c)
	}
	for _, file := range order {
		s := suites[file]
		c := junitCase{Name: "the text of the file", Class: s.Name, Time: "0"}
		if f := faults[file]; len(f) > 0 {
			c.Error = &junitFault{Message: f[0], Type: "text", Text: strings.Join(f, "\n")}
			s.Errors++
		}
		s.Cases = append(s.Cases, c)
		s.Tests = len(s.Cases)
		out.Tests += s.Tests
		out.Failures += s.Failures
		out.Errors += s.Errors
		out.Suites = append(out.Suites, *s)
	}
	if known != nil && len(known.Differences) > 0 {
		s := junitSuite{Name: "recorded results", Time: "0", Tests: len(known.Differences), Failures: len(known.Differences)}
		for _, d := range known.Differences {
			s.Cases = append(s.Cases, junitCase{Name: d.Name, Class: printable(d.File), Time: "0",
				Failure: &junitFault{Message: d.Name + " " + d.Message, Type: "recorded", Text: d.Name + " " + d.Message}})
		}
		out.Tests += s.Tests
		out.Failures += s.Failures
		out.Suites = append(out.Suites, s)
	}
	if _, err := io.WriteString(w, xml.Header); err != nil {
		return err
	}
	e := xml.NewEncoder(w)
	e.Indent("", "  ")
	if err := e.Encode(out); err != nil {
		return err
	}
	_, err := io.WriteString(w, "\n")
	return err
}

// printable leaves out what XML cannot hold.
func printable(s string) string {
	return strings.Map(func(r rune) rune {
		if r < 32 && r != '\n' && r != '\t' || r == 0xfffe || r == 0xffff {
			return -1
		}
		return r
	}, strings.ToValidUTF8(s, "\ufffd"))
}
