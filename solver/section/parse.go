package section

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"regexp"
	"strconv"
	"strings"
	"unicode/utf8"

	"gopkg.in/yaml.v3"
)

// fault is why a text is no YAML document that is read at all.
type fault struct {
	rule     string
	line     int
	what, do string
}

func (f *fault) Error() string { return f.what + "; " + f.do }

// textFault says why bytes are no text, nil if they are.
func textFault(data []byte) *fault {
	switch {
	case len(data) > MaxBytes:
		return &fault{"too-large", 0, fmt.Sprintf("the file is larger than %d MB, the most that is read", MaxBytes>>20), "open a design file"}
	case bytes.HasPrefix(data, []byte{0xff, 0xfe}) || bytes.HasPrefix(data, []byte{0xfe, 0xff}):
		return &fault{"not-text", 1, "the file is UTF-16 text", "save it as UTF-8"}
	case bytes.IndexByte(data, 0) >= 0:
		return &fault{"not-text", lineOf(data, bytes.IndexByte(data, 0)), "the file is binary, not text", "open a design file"}
	case !utf8.Valid(data):
		i := 0
		for i < len(data) {
			r, n := utf8.DecodeRune(data[i:])
			if r == utf8.RuneError && n == 1 {
				break
			}
			i += n
		}
		return &fault{"not-text", lineOf(data, i), "the file has bytes that are not UTF-8 text", "save it as UTF-8"}
	case len(bytes.TrimSpace(data)) == 0:
		return &fault{"empty-file", 1, "the file is empty", "open a design file; its first line is `packrise: 1`"}
	}
	return nil
}

func lineOf(data []byte, i int) int { return 1 + bytes.Count(data[:i], []byte("\n")) }

// parse reads one YAML document into its tree, without aliases, anchors and tags.
func parse(data []byte) (root *yaml.Node, bad *fault) {
	defer func() {
		if p := recover(); p != nil { // a defect of the YAML reader
			root, bad = nil, &fault{"not-yaml", 0, "the file can't be read as YAML", "compare it with an example"}
		}
	}()
	dec := yaml.NewDecoder(bytes.NewReader(data))
	var doc yaml.Node
	if err := dec.Decode(&doc); err != nil {
		if errors.Is(err, io.EOF) {
			return nil, &fault{"empty-file", 1, "the file holds only comments", "write a design; its first line is `packrise: 1`"}
		}
		return nil, yamlFault(data, err)
	}
	if doc.Kind != yaml.DocumentNode || len(doc.Content) != 1 {
		return nil, &fault{"not-yaml", 1, "the file holds no YAML document", "open a design file"}
	}
	if bad := plainTree(doc.Content[0]); bad != nil {
		return nil, bad
	}
	var more yaml.Node
	switch err := dec.Decode(&more); {
	case errors.Is(err, io.EOF):
		return doc.Content[0], nil
	case err != nil:
		return nil, yamlFault(data, err)
	}
	return nil, &fault{"many-documents", more.Line, "a second YAML document begins here", "keep one design in a file, without a line ---"}
}

// plainTree refuses what one text can mean in many ways.
func plainTree(n *yaml.Node) *fault {
	switch {
	case n.Kind == yaml.AliasNode || n.Anchor != "":
		return &fault{"alias", n.Line, "an anchor (&) or alias (*) stands here, which are not read", "write the value itself; a text that begins with & or * needs quotes"}
	case n.Style&yaml.TaggedStyle != 0:
		return &fault{"tag", n.Line, "a tag (" + show(n.Tag) + ") stands here, which are not read", "take it out; a text that begins with ! needs quotes"}
	}
	for _, c := range n.Content {
		if bad := plainTree(c); bad != nil {
			return bad
		}
	}
	return nil
}

var yamlLine = regexp.MustCompile(`^yaml: (?:line (\d+): )?(.*)$`)

// yamlFault turns the YAML reader's error into a sentence for people.
func yamlFault(data []byte, err error) *fault {
	m := yamlLine.FindStringSubmatch(strings.SplitN(err.Error(), "\n", 2)[0])
	f := &fault{rule: "not-yaml", what: "the file can't be read as YAML", do: "compare it with an example"}
	if m == nil {
		return f
	}
	f.line, _ = strconv.Atoi(m[1])
	lines := strings.Split(string(data), "\n")
	for i := max(f.line-2, 0); i < min(f.line+1, len(lines)); i++ {
		if indent := strings.TrimLeft(lines[i], " "); strings.HasPrefix(indent, "\t") {
			f.line, f.what, f.do = i+1, "the line is indented with a tab", "indent with spaces"
			return f
		}
	}
	f.what = "from here on the file is no YAML (" + clean(m[2]) + ")"
	f.do = "look for a bracket or quote that is not closed, or a wrong indent"
	if f.line >= len(lines)-1 {
		f.do = "the file may be cut off: " + f.do
	}
	return f
}
