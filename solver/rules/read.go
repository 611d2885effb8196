package rules

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"math"
	"reflect"
	"regexp"
	"slices"
	"strings"

	"gopkg.in/yaml.v3"

	"packrise/solver/quantity"
)

// reader collects what is wrong with a file, sheet by sheet.
type reader struct {
	file     string
	line     int // of the sheet being read
	problems []Problem
}

func (r *reader) fail(format string, args ...any) {
	r.problems = append(r.problems, Problem{File: r.file, Line: r.line, Text: fmt.Sprintf(format, args...)})
}

var yamlLine = regexp.MustCompile(`^yaml: (?:line (\d+): )?`)

// sheets splits a file into its YAML documents.
func (r *reader) sheets(text []byte) (out []*yaml.Node) {
	dec := yaml.NewDecoder(bytes.NewReader(text))
	for {
		var doc yaml.Node
		err := dec.Decode(&doc)
		if errors.Is(err, io.EOF) {
			return out
		}
		if err != nil {
			r.line = 0
			if m := yamlLine.FindStringSubmatch(err.Error()); m != nil {
				_, _ = fmt.Sscan(m[1], &r.line)
			}
			r.fail("this is not YAML: %s", yamlLine.ReplaceAllString(err.Error(), ""))
			return out
		}
		if n := doc.Content[0]; n.Kind == yaml.MappingNode {
			out = append(out, n)
		} else {
			r.line = n.Line
			r.fail("a sheet starts with group: and the kind of its table")
		}
	}
}

// decode fills a struct from a sheet and reports unknown keys and wrong values; ok is false if anything was wrong.
func (r *reader) decode(n *yaml.Node, out any) (ok bool) {
	before := len(r.problems)
	r.knownKeys(n, reflect.TypeOf(out).Elem(), true)
	r.line = n.Line
	if len(r.problems) == before {
		if err := n.Decode(out); err != nil {
			r.wrongValues(err)
		}
	}
	return len(r.problems) == before
}

var badValue = regexp.MustCompile("line (\\d+): cannot unmarshal !!\\w+ `?([^`]*)`? into (.*)")

func (r *reader) wrongValues(err error) {
	sheet := r.line
	for _, line := range strings.Split(err.Error(), "\n") {
		if m := badValue.FindStringSubmatch(line); m != nil {
			_, _ = fmt.Sscan(m[1], &r.line)
			r.fail("%q is not %s", m[2], kindWord(m[3]))
		}
	}
	if r.line == sheet && !badValue.MatchString(err.Error()) {
		r.fail("this can't be read: %s", yamlLine.ReplaceAllString(err.Error(), ""))
	}
	r.line = sheet
}

func kindWord(goType string) string {
	switch {
	case strings.Contains(goType, "["):
		return "a list"
	case strings.Contains(goType, "float"):
		return "a number"
	case strings.Contains(goType, "int"):
		return "a whole number"
	case strings.Contains(goType, "bool"):
		return "true or false"
	}
	return "a text"
}

// knownKeys refuses keys that the struct doesn't have.
func (r *reader) knownKeys(n *yaml.Node, t reflect.Type, top bool) {
	for t.Kind() == reflect.Pointer {
		t = t.Elem()
	}
	switch {
	case t.Kind() == reflect.Slice && n.Kind == yaml.SequenceNode:
		for _, item := range n.Content {
			r.knownKeys(item, t.Elem(), false)
		}
		return
	case t.Kind() == reflect.Map && n.Kind == yaml.MappingNode:
		for i := 1; i < len(n.Content); i += 2 {
			r.knownKeys(n.Content[i], t.Elem(), false)
		}
		return
	case t.Kind() != reflect.Struct || n.Kind != yaml.MappingNode:
		return
	}
	fields, names := fieldsOf(t)
	for i := 0; i+1 < len(n.Content); i += 2 {
		key := n.Content[i]
		if top && key.Value == "group" {
			continue
		}
		field, known := fields[key.Value]
		if !known {
			r.line = key.Line
			r.fail("unknown key %q; the nearest is %s", key.Value, nearest(names, key.Value))
			continue
		}
		r.knownKeys(n.Content[i+1], field, false)
	}
}

func fieldsOf(t reflect.Type) (fields map[string]reflect.Type, names []string) {
	fields = map[string]reflect.Type{}
	for i := range t.NumField() {
		name, _, _ := strings.Cut(t.Field(i).Tag.Get("yaml"), ",")
		fields[name] = t.Field(i).Type
		names = append(names, name)
	}
	return fields, names
}

// nearest returns the word that is spelt most like another.
func nearest(words []string, like string) string {
	if len(words) == 0 {
		return "none"
	}
	return slices.MinFunc(words, func(a, b string) int {
		return quantity.SpellingDistance(a, like) - quantity.SpellingDistance(b, like)
	})
}

var idForm = regexp.MustCompile(`^[a-z][a-z0-9]*(-[a-z0-9]+)*$`)

func (r *reader) id(key, v string) {
	if !idForm.MatchString(v) {
		r.fail("%s is %q; write small letters, digits and hyphens, starting with a letter", key, v)
	}
}

func (r *reader) text(key, v string) {
	if strings.TrimSpace(v) == "" {
		r.fail("%s is missing", key)
	}
}

// numbers turns cells into numbers, a blank into NaN, and wants them between two bounds.
func (r *reader) numbers(key string, cells []*float64, want int, low, high float64) []float64 {
	if len(cells) != want {
		r.fail("%s has %d values, and %d are needed", key, len(cells), want)
	}
	out := make([]float64, len(cells))
	for i, c := range cells {
		out[i] = math.NaN()
		if c == nil {
			continue
		}
		if out[i] = *c; !(*c >= low && *c <= high) {
			r.fail("%s has %g, which is not between %g and %g", key, *c, low, high)
		}
	}
	return out
}

// rising wants numbers in rising order; blank cells are only allowed where open says so, at the end.
func (r *reader) rising(key string, v []float64, open bool) {
	last := math.Inf(-1)
	for i, x := range v {
		switch {
		case math.IsNaN(x) && !(open && i == len(v)-1):
			r.fail("%s has a blank where a number is needed", key)
		case x <= last:
			r.fail("%s is not in rising order at %g", key, x)
		}
		last = x
	}
}
