package section

import (
	"bytes"
	"errors"
	"fmt"

	"gopkg.in/yaml.v3"
)

// Read reads a document, strictly: unknown keys, wrong types, missing required keys, duplicate ids and non-finite numbers are
// problems, and all of them are returned at once with lines and keys. The document is nil if any problem is Refused. Older
// format versions are migrated first.
func Read(data []byte) (*Document, []Problem) { return current.read(data) }

// Write returns the document as YAML. Keys, order, style and comments of the file that it was read from are kept: what did not
// change is the same to the byte. It fails for a document that Read would refuse, naming the first problem.
func Write(d *Document) ([]byte, error) {
	data, err := toText(d)
	if err != nil {
		return nil, fmt.Errorf("section: not written: %w", err)
	}
	return data, nil
}

// toText is Write with an error that has no context yet.
func toText(d *Document) ([]byte, error) {
	for _, p := range Check(d) {
		if p.Severity == Refused {
			return nil, errors.New(p.Sentence())
		}
	}
	return current.write(d)
}

// format is one version of the format with the ways that lead to it from older ones.
type format struct {
	version    int
	migrations map[int]func(root *yaml.Node) // from this version to the next, in place
}

var current = format{version: FormatVersion, migrations: map[int]func(*yaml.Node){}}

func (f format) read(data []byte) (*Document, []Problem) {
	data = bytes.TrimPrefix(data, []byte("\ufeff"))
	bad := textFault(data)
	var root *yaml.Node
	if bad == nil {
		root, bad = parse(data)
	}
	if bad != nil {
		return nil, []Problem{{Rule: bad.rule, Line: bad.line, What: bad.what, Do: bad.do}}
	}
	r := newReport(root)
	r.doc = &Document{}
	migrated, ok := f.migrate(r, root)
	if !ok {
		return nil, r.problems()
	}
	d := documentTable.read(r, root, "")
	r.check(&d)
	if problems := r.problems(); len(problems) > 0 {
		return nil, problems
	}
	d.origin = &origin{text: data, root: root}
	if migrated {
		d.origin = newOrigin([]byte(encode(root)))
	}
	return &d, nil
}

// migrate checks the version and brings an older tree to the present one.
func (f format) migrate(r *report, root *yaml.Node) (migrated, ok bool) {
	first := fmt.Sprintf("its first line is `%s: %d`", versionKey, f.version)
	if root.Kind != yaml.MappingNode {
		r.addLine("", root.Line, "wrong-type", "the file holds "+kindName(root)+" and is no design", "open a design file; "+first)
		return false, false
	}
	n := child(root, versionKey)
	at := path("").key(versionKey)
	if n == nil {
		r.addLine(at, 1, "missing-key", "¤ is missing, so the file is no design", "open a design file; "+first)
		return false, false
	}
	v := readNumber(r, n, at)
	switch {
	case r.spoilt[at]:
		return false, false
	case v != float64(int(v)) || v < 1 && f.migrations[int(v)] == nil:
		r.add(at, "version", "¤ is "+shown(v)+", which is no version of the format", "write "+first[len("its first line is "):])
		return false, false
	case v > float64(f.version):
		r.add(at, "newer-version", fmt.Sprintf("the design is of format version %s, and this program reads up to %d", shown(v), f.version), "open it with a newer Packrise")
		return false, false
	}
	for at := int(v); at < f.version; at++ {
		step := f.migrations[at]
		if step == nil {
			r.add(path("").key(versionKey), "version", fmt.Sprintf("format version %d is no longer read", at), "open and save it with an older Packrise first")
			return false, false
		}
		step(root)
		migrated = true
	}
	if migrated {
		n.Value = fmt.Sprint(f.version)
	}
	return migrated, true
}

func child(n *yaml.Node, key string) *yaml.Node {
	for i := 0; i+1 < len(n.Content); i += 2 {
		if n.Content[i].Value == key {
			return n.Content[i+1]
		}
	}
	return nil
}
