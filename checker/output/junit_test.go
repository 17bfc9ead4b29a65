package output_test

import (
	"bytes"
	"encoding/xml"
	"io"
	"regexp"
	"slices"
	"strings"
	"testing"

	"kern/checker/output"
	"kern/checker/record"
)

// TestJUnit counts what a report says, and finds every member in it.
func TestJUnit(t *testing.T) {
	r := reportOf(map[string]string{"a.kern": reported})
	var b bytes.Buffer
	if err := output.JUnit(&b, r, same, nil, same); err != nil {
		t.Fatal(err)
	}
	var got struct {
		Tests    int `xml:"tests,attr"`
		Failures int `xml:"failures,attr"`
		Errors   int `xml:"errors,attr"`
		Suites   []struct {
			Cases []struct {
				Name    string  `xml:"name,attr"`
				Failure *string `xml:"failure"`
				Error   *string `xml:"error"`
				Skipped *string `xml:"skipped"`
			} `xml:"testcase"`
		} `xml:"testsuite"`
	}
	if err := xml.Unmarshal(b.Bytes(), &got); err != nil {
		t.Fatal(err)
	}
	// A1 fails, A2 is undecided for its decimal comma, A3 departs, A4 passes, the text
	// has an error
	if got.Tests != 5 || got.Failures != 1 || got.Errors != 2 {
		t.Errorf("%+v\n%s", got, b.String())
	}
	for _, c := range got.Suites[0].Cases {
		if bad := c.Failure != nil || c.Error != nil; bad != (c.Name == "A1" || c.Name == "A2" || strings.Contains(c.Name, "text")) {
			t.Errorf("%s: %v", c.Name, bad)
		}
	}
	recorded := record.Of(r, same)
	recorded.Carry(nil, "known \x01 & <old>")
	b.Reset()
	if err := output.JUnit(&b, r, same, record.Compare(r, recorded, -1, same), same); err != nil {
		t.Fatal(err)
	}
	if err := xml.Unmarshal(b.Bytes(), &got); err != nil {
		t.Fatal(err)
	}
	if got.Failures != 0 || got.Errors != 1 {
		t.Errorf("with carried failures: %s", b.String())
	}
}

// junitForm is what junit-10.xsd of the Jenkins xUnit plugin (MIT) allows of the
// elements that a report has: what may stand in them and their attributes, those
// that must be there with a sign !. In our own form; the schema was read there.
var junitForm = map[string]struct{ inside, attributes string }{
	"testsuites": {"testsuite", "name time tests failures errors"},
	"testsuite":  {"testsuite properties testcase system-out system-err", "name! tests! failures! errors! group time skipped timestamp hostname id package file log url"},
	"testcase":   {"skipped error failure rerunFailure rerunError flakyFailure flakyError system-out system-err", "name! time classname group"},
	"skipped":    {"", "type message"},
	"error":      {"", "type message"},
	"failure":    {"", "type message"},
}

// surefireTime is the pattern of times in that schema.
var surefireTime = regexp.MustCompile(`^(([0-9]{0,3},)*[0-9]{3}|[0-9]{0,3})*(\.[0-9]*)?$`)

// TestJUnitForm holds reports against the published schema.
func TestJUnitForm(t *testing.T) {
	r := reportOf(map[string]string{"a.kern": reported, "b.kern": "x = 3 Kn\n"})
	recorded := record.Of(r, same)
	recorded.Carry(nil, "known")
	recorded.Entries[0].Utilisation = 0.1 // a difference
	for _, known := range []*record.Outcome{nil, record.Compare(r, recorded, -1, same)} {
		var b bytes.Buffer
		if err := output.JUnit(&b, r, same, known, same); err != nil {
			t.Fatal(err)
		}
		d := xml.NewDecoder(&b)
		var open []string
		seen := map[string]int{}
		for {
			token, err := d.Token()
			if err == io.EOF {
				break
			}
			if err != nil {
				t.Fatal(err)
			}
			switch e := token.(type) {
			case xml.StartElement:
				name := e.Name.Local
				seen[name]++
				form, ok := junitForm[name]
				if len(open) == 0 && name != "testsuites" || len(open) > 0 && !slices.Contains(strings.Fields(junitForm[open[len(open)-1]].inside), name) || !ok {
					t.Errorf("%s stands in %v", name, open)
				}
				for _, a := range e.Attr {
					if !slices.Contains(strings.Fields(strings.ReplaceAll(form.attributes, "!", "")), a.Name.Local) {
						t.Errorf("%s has an attribute %s", name, a.Name.Local)
					}
					if a.Name.Local == "time" && !surefireTime.MatchString(a.Value) {
						t.Errorf("%s is no time", a.Value)
					}
				}
				for _, must := range strings.Fields(form.attributes) {
					must, is := strings.CutSuffix(must, "!")
					if is && !slices.ContainsFunc(e.Attr, func(a xml.Attr) bool { return a.Name.Local == must }) {
						t.Errorf("%s lacks %s", name, must)
					}
				}
				open = append(open, name)
			case xml.EndElement:
				open = open[:len(open)-1]
			}
		}
		if seen["testcase"] < 6 || seen["error"] < 2 || known != nil && (seen["skipped"] == 0 || seen["failure"] == 0) {
			t.Errorf("%v", seen)
		}
	}
}

// TestAnnotations: messages and names are escaped as workflow commands ask
// (docs.github.com, "Workflow commands for GitHub Actions"): % CR LF in messages, and
// : and , in properties too.
func TestAnnotations(t *testing.T) {
	var b bytes.Buffer
	r := reportOf(map[string]string{"a,b: 5%.kern": reported})
	if err := output.Annotations(&b, r, nil, same); err != nil {
		t.Fatal(err)
	}
	lines := strings.Split(strings.TrimSpace(b.String()), "\n")
	if len(lines) != len(r.Diagnostics)+1 {
		t.Errorf("%d lines for %d diagnostics", len(lines), len(r.Diagnostics))
	}
	for _, l := range lines[:len(lines)-1] {
		if !strings.Contains(l, "file=a%2Cb%3A 5%25.kern,line=") || !strings.HasPrefix(l, "::") {
			t.Errorf("%q", l)
		}
	}
	if !strings.Contains(b.String(), "%0A") || !strings.HasPrefix(lines[0], "::warning ") {
		t.Errorf("%s", b.String())
	}
}
