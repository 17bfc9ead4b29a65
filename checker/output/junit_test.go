package output_test

import (
	"bytes"
	"encoding/xml"
	"strings"
	"testing"

	"kern/checker/output"
	"kern/checker/record"
)

// TestJUnit counts what a report says, and finds every member in it. The form is
// checked against a schema in .ci/reports.
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
