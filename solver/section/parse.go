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
	case entries(data) > maxEntries:
		return &fault{"too-large", 0, fmt.Sprintf("the file has more than %d entries, and a design of %d parts has far fewer", maxEntries, MaxParts), "open a design file"}
	case len(bytes.TrimSpace(data)) == 0:
		return &fault{"empty-file", 1, "the file is empty", "open a design file; its first line is `packrise: 1`"}
	}
	return nil
}

// maxEntries bounds what the YAML reader has to build: its tree takes a hundred times the memory of the text.
const maxEntries = 300_000

// entries is at least the number of nodes in a YAML text, give or take some.
func entries(data []byte) int {
	return bytes.Count(data, []byte(",")) + bytes.Count(data, []byte(":")) + bytes.Count(data, []byte("- ")) + bytes.Count(data, []byte("-\n"))
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
	f := &fault{rule: "not-yaml", what: "the file can't be read as YAML", do: "compare it with an example"}
	m := yamlLine.FindStringSubmatch(strings.SplitN(err.Error(), "\n", 2)[0])
	if m == nil {
		return f
	}
	f.line, _ = strconv.Atoi(m[1])
	if strings.HasPrefix(m[2], "did not find") {
		f.line++ // the YAML reader's parser counts from 0, its scanner from 1
	}
	if strings.HasSuffix(m[2], "indicator") || strings.HasSuffix(m[2], "key") {
		f.line = badLine(data, f.line) // and of a block it names the beginning
	}
	f.line = max(f.line, 1)
	line := strings.SplitN(string(data[offsetOf(data, f.line-1):]), "\n", 2)[0]
	if strings.HasPrefix(strings.TrimLeft(line, " "), "\t") {
		f.what, f.do = "the line is indented with a tab", "indent with spaces"
		return f
	}
	f.what = "from here on the file is no YAML (" + clean(m[2]) + ")"
	f.do = "look for a bracket or quote that is not closed, or a wrong indent"
	if offsetOf(data, f.line) >= len(bytes.TrimRight(data, "\n")) || strings.Contains(m[2], "end of stream") {
		f.do = "the file may be cut off: " + f.do
	}
	return f
}

// badLine finds the line at which a block goes wrong: the one after the longest beginning of the file that reads well, looked for
// upwards from where reading stopped. said is taken where looking would take long.
func badLine(data []byte, said int) int {
	lines := &lineReader{data: data}
	var doc yaml.Node
	_ = yaml.NewDecoder(lines).Decode(&doc)
	work := 4 << 20 // bytes
	for k := lines.n - 1; k >= said; k-- {
		end := offsetOf(data, k)
		if work -= end + 1<<14; work < 0 {
			break
		}
		if yaml.Unmarshal(data[:end], &doc) == nil {
			return k + 1
		}
	}
	return said
}

// lineReader hands out a line at a time, so that n tells how far somebody has read.
type lineReader struct {
	data []byte
	n    int
}

func (r *lineReader) Read(p []byte) (int, error) {
	if len(r.data) == 0 {
		return 0, io.EOF
	}
	end := bytes.IndexByte(r.data, '\n') + 1
	if end == 0 {
		end = len(r.data)
	}
	k := copy(p, r.data[:end])
	if k == end {
		r.n++
	}
	r.data = r.data[k:]
	return k, nil
}

// offsetOf returns where the line after the n-th begins.
func offsetOf(data []byte, n int) int {
	at := 0
	for range n {
		i := bytes.IndexByte(data[at:], '\n')
		if i < 0 {
			return len(data)
		}
		at += i + 1
	}
	return at
}
