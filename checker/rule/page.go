package rule

import (
	"embed"
	"errors"
	"fmt"
	"slices"
	"strconv"
	"strings"

	"kern/lang"
)

//go:embed pages/*.md
var pages embed.FS

// parse reads a page: front matter of lines "key: value" between two lines
// "---", then Markdown.
func parse(name, text string) (*Rule, error) {
	head, body, ok := strings.Cut(text, "\n---\n")
	head, opens := strings.CutPrefix(head, "---\n")
	if !ok || !opens {
		return nil, errors.New("no front matter between two lines ---")
	}
	r := &Rule{Name: name, Page: strings.Trim(body, "\n") + "\n"}
	seen := map[string]bool{}
	for line := range strings.SplitSeq(head, "\n") {
		key, value, ok := strings.Cut(line, ": ")
		value = strings.TrimSpace(value)
		if !ok || value == "" || seen[key] {
			return nil, fmt.Errorf("front matter %q is no line \"key: value\", or stands twice", line)
		}
		seen[key] = true
		if err := r.set(key, value); err != nil {
			return nil, err
		}
	}
	r.Check = r.Topic == "check"
	for _, key := range []string{"severity", "topic", "summary", "fix"} {
		if !seen[key] {
			return nil, fmt.Errorf("front matter lacks %q", key)
		}
	}
	if r.Check != seen["outcome"] {
		return nil, errors.New("front matter: a page of topic check has an outcome, and no other page has")
	}
	var err error
	r.Examples, err = examples(r.Page)
	return r, err
}

func (r *Rule) set(key, value string) error {
	oneOf := func(to *string, allowed ...string) error {
		if !slices.Contains(allowed, value) {
			return fmt.Errorf("%s %q is none of %s", key, value, strings.Join(allowed, ", "))
		}
		*to = value
		return nil
	}
	switch key {
	case "severity":
		for s := lang.Error; s <= lang.Hint; s++ {
			if s.String() == value {
				r.Severity = s
				return nil
			}
		}
		return fmt.Errorf("severity %q is not known", value)
	case "topic":
		return oneOf(&r.Topic, topics...)
	case "fix":
		return oneOf(&r.Fix, "none", "safe", "offer")
	case "outcome":
		return oneOf(&r.Outcome, "fails", "undecided", "none")
	case "summary":
		r.Summary = value
	case "also":
		r.Also = strings.Fields(value)
	default:
		return fmt.Errorf("front matter key %q is not known", key)
	}
	return nil
}

// examples reads the fenced blocks of a page whose first word is kern:
//
//	```kern bad               an example that breaks the rule
//	```kern good              one that keeps it
//	```kern file=common.kern  another file of the example before it
//
// Two flags write what cannot be printed. "bytes": the sign ␀ stands for a zero
// byte. "repeat=N": what stands between ⟨ and ⟩ stands N times.
func examples(page string) ([]Example, error) {
	var out []Example
	lines := strings.SplitAfter(page, "\n")
	for i := 0; i < len(lines); i++ {
		info, fence := strings.CutPrefix(strings.TrimRight(lines[i], "\n"), "```")
		if !fence {
			continue
		}
		var text strings.Builder
		for i++; ; i++ {
			if i == len(lines) {
				return nil, fmt.Errorf("the block %q is not closed", info)
			}
			if strings.TrimRight(lines[i], "\n") == "```" {
				break
			}
			text.WriteString(lines[i])
		}
		words := strings.Fields(info)
		if len(words) < 2 || words[0] != "kern" {
			continue // an equation
		}
		written, err := written(text.String(), words[2:])
		if err != nil {
			return nil, fmt.Errorf("the block %q: %w", info, err)
		}
		file, isFile := strings.CutPrefix(words[1], "file=")
		switch {
		case words[1] == "bad" || words[1] == "good":
			out = append(out, Example{Kind: words[1], Text: written})
		case isFile && file != "" && len(out) > 0:
			last := &out[len(out)-1]
			if last.Files == nil {
				last.Files = map[string]string{}
			}
			last.Files[file] = written
		default:
			return nil, fmt.Errorf("the block %q is neither bad nor good nor a file of an example", info)
		}
	}
	return out, nil
}

// written puts what the flags stand for into the text of an example.
func written(text string, flags []string) (string, error) {
	for _, flag := range flags {
		count, repeat := strings.CutPrefix(flag, "repeat=")
		switch {
		case flag == "bytes":
			text = strings.ReplaceAll(text, "␀", "\x00")
		case repeat:
			n, err := strconv.Atoi(count)
			if err != nil || n < 1 || n > 1_000_000 {
				return "", fmt.Errorf("repeat %q is no number of times", count)
			}
			var b strings.Builder
			for {
				before, rest, open := strings.Cut(text, "⟨")
				b.WriteString(before)
				if !open {
					break
				}
				again, after, closed := strings.Cut(rest, "⟩")
				if !closed {
					return "", errors.New("⟨ is not closed")
				}
				b.WriteString(strings.Repeat(again, n))
				text = after
			}
			text = b.String()
		default:
			return "", fmt.Errorf("flag %q is not known", flag)
		}
	}
	return text, nil
}
